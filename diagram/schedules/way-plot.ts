import { kFactor } from '../calculations/adiabatic';
import type { OvercurrentDevice } from '../calculations/trip-curve';
import { dropLimitPercent } from '../calculations/volt-drop';
import { deviceOf, timeLimit } from '../circuit/way-faults';
import type { WayFigures } from '../circuit/way-figures';
import { designation, ratingLines } from '../layout/wording';
import type { Context } from '../rules/context';
import { figuresOf } from '../rules/readings/figures';
import { dropStations, type Station } from './drop-stations';
import { endFaults } from './end-faults';
import { decidingCable } from './way-runs';

/** A conductor that the device of a way has to save from a short circuit. */
export interface Conductor {
  /** "2.5 mm² copper" */
  name: string;
  csaMm2: number;
  /** A s^0.5/mm2 */
  k: number;
}

export interface FaultMark {
  id: 'line-neutral' | 'line-earth' | 'battery' | 'board';
  /** "line to neutral at the end" */
  name: string;
  amps: number;
}

/** What the pictures of a way are drawn from. */
export interface WayPlot {
  way: string;
  number: number;
  label: string;
  backup: boolean;
  /** "Q7 B16" */
  deviceName: string;
  /** null where its rating or curve is not given */
  device: OvercurrentDevice | null;
  ibA: number | null;
  inA: number | null;
  izA: number | null;
  /** A that the deciding cable must carry */
  needA: number | null;
  conductors: readonly Conductor[];
  faults: readonly FaultMark[];
  /** s in which a fault to earth must be cleared */
  withinS: number;
  /** s until a fault to earth is cleared, by the rcd where one is quicker; null where nothing clears it or none is reckoned */
  clearedS: number | null;
  rcdName: string | null;
  drop: {
    stations: readonly Station[];
    limitPercent: number;
    /** "lamps", "outlets and heat" */
    limitOf: string;
    /** what it is the worst point of */
    end: string;
  } | null;
}

const METAL = { Cu: 'copper', Al: 'aluminium' } as const;

/** The thinnest live core and the thinnest protective core of a way's cables, for each metal and insulation. */
function conductorsOf(way: WayFigures): Conductor[] {
  const found = new Map<string, Conductor>();
  for (const { cable } of way.cables) {
    const k = kFactor(cable.material, cable.insulation, true);
    const add = (kind: string, csaMm2: number) => {
      const key = `${kind} ${k}`;
      const before = found.get(key);
      if (!before || csaMm2 < before.csaMm2)
        found.set(key, {
          name: `${csaMm2} mm² ${METAL[cable.material]}${kind === 'earth' ? ', earth core' : ''}`,
          csaMm2,
          k,
        });
    };
    add('live', cable.csa);
    if (cable.cpc !== undefined && cable.cpc < cable.csa) add('earth', cable.cpc);
  }
  return [...found.values()].sort((a, b) => a.csaMm2 - b.csaMm2);
}

function faultsOf(context: Context, way: WayFigures): FaultMark[] {
  const { lineNeutral, lineEarth, onBattery, atBoard } = endFaults(context, way);
  const marks: [FaultMark['id'], string, number | null][] = [
    ['line-earth', 'line to earth at the end', lineEarth],
    ['battery', 'all that the battery source gives', onBattery],
    ['line-neutral', 'line to neutral at the end', lineNeutral],
    ['board', 'line to neutral at the board', atBoard],
  ];
  return marks.flatMap(([id, name, amps]) => (amps === null ? [] : [{ id, name, amps }]));
}

/** What the pictures of one way are drawn from; null for a device that is no way. */
export function wayPlot(context: Context, device: string): WayPlot | null {
  const way = figuresOf(context).ways.get(device);
  const named = context.ways.find((each) => each.device === device);
  if (!way || !named) return null;
  const { practice } = figuresOf(context);
  const { worstDrop } = way;
  const lamp = worstDrop?.at.part.kind === 'lamp';
  const base = lamp ? practice.voltDrop.lighting.value : practice.voltDrop.other.value;
  const decided = decidingCable(way.cables);
  const rcd = way.faultAt?.rcd ? context.graph.parts.get(way.faultAt.rcd) : undefined;
  return {
    way: device,
    number: named.number,
    label: named.label,
    backup: named.backup,
    deviceName: [designation(way.device), ...ratingLines(way.device).slice(0, 1)].join(' '),
    device: deviceOf(way.device),
    ibA: way.ibA,
    inA: way.inA,
    izA: decided?.capacity?.izA ?? null,
    needA: decided?.needA ?? null,
    conductors: conductorsOf(way),
    faults: faultsOf(context, way),
    withinS: way.fault?.withinS ?? timeLimit(practice, context.document.supply, way.device, way.drawn),
    clearedS: way.fault?.clearedS ?? null,
    rcdName: rcd ? designation(rcd) : null,
    drop: worstDrop && {
      stations: dropStations(context, worstDrop.at, worstDrop.fed),
      limitPercent: dropLimitPercent(base, worstDrop.fed.lengthM, practice.voltDrop.longRun.value),
      limitOf: lamp ? 'lamps' : 'outlets, fans and heat',
      end: context.name(worstDrop.at.part),
    },
  };
}
