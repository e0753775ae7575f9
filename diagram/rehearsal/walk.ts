import type { Standing } from '../circuit/assemble';
import { urges } from '../circuit/fault-trips';
import { FaultError, type Fault, type FaultStep } from '../circuit/fault-types';
import { walkFrom } from '../circuit/fault-walk';
import type { Steady } from '../circuit/steady';
import { tripBand } from '../calculations/trip-curve';
import { deviceOf } from '../circuit/way-faults';
import { practices } from '../practices';
import type { Graph } from '../terminals/graph';
import { isOvercurrent, isResidual } from '../terminals/roles-of-parts';
import { faultPath, type PathStep } from './fault-path';
import { readFigures, type Figures } from './figures';
import { missingFor, type Missing } from './missing';
import { fedBy } from './paths';
import { say, type Told } from './say-walk';

/** The home at one station of a walk. */
export interface Station {
  kind: 'before' | 'fault' | 'opens' | 'takes-over' | 'holds' | 'still';
  /** s from the first fault; null before it */
  t: number | null;
  earliest: number;
  /** id of the part at which it happens */
  part: string | null;
  heading: string;
  text: string;
  /** V of the faulted part's case to true earth, A in the fault */
  touchVolts: number;
  faultAmps: number;
  /** ids of the devices that the walk has opened so far */
  opened: string[];
  path: PathStep[];
  figures: Figures;
}

/** A walk as one goes through it: where one was before, every event, and how it is when nothing more happens. */
export interface Walk {
  faults: readonly Fault[];
  stations: Station[];
  cleared: boolean;
  /** s after the last fault */
  clearedAfter: number | null;
  by: string | null;
  /** s within which a final circuit is to be off, V that may stand, and where that is said */
  limit: { seconds: number; source: string; volts: number };
  /** what the walk teaches beyond its steps */
  remark: string | null;
  missing: Missing[];
  /** what the drawing does not tell and the walk takes for granted */
  assumes: string[];
}

export type WalkOutcome = { walk: Walk } | { cannot: string; missing: Missing[] };

interface Seen {
  step: FaultStep;
  steady: Steady;
  /** the home before the fault that this step belongs to */
  before: Steady;
}

/** A fault is put in: no device opens, no inverter takes over. */
const isFault = ({ amps, takesOver, event }: FaultStep): boolean =>
  amps === undefined && !takesOver && event !== 'no device opens';

/** Of the way in which the fault lies: whether its own overcurrent device would have cleared it, and when. */
function withoutResidual(graph: Graph, seen: Seen, at: string): { way: string; seconds: number } | null {
  const nodes = ['L', 'out.L'].flatMap((mark) => graph.node(at, mark) ?? []);
  const { condition, closed } = seen.steady.standing;
  const way = [...fedBy(graph, condition, closed, nodes).values()][0]?.way ?? null;
  const part = way === null ? undefined : graph.parts.get(way);
  const device = part && isOvercurrent(part) ? deviceOf(part) : null;
  if (!part || !device) return null;
  const amps = Math.max(...seen.steady.poleAmps(part.id).slice(0, 1));
  return { way: part.id, seconds: tripBand(device, amps).latestS };
}

/** Devices that do not stay closed as the home stands, before anything is put in: it is drawn so, or switched so. */
export interface Unheld {
  part: string;
  amps: number;
  astrayAmps: number;
  earliestS: number;
  latestS: number;
}

/** s: what opens later than that is called warm, not tripping */
const AN_HOUR = 3600;

export function unheldIn(graph: Graph, steady: Steady): Unheld[] {
  const watches = steady.assembly.inverters.every(({ mostA }) => mostA !== null);
  return urges(graph, steady, new Set(), watches)
    .filter(({ latestS }) => latestS <= AN_HOUR)
    .sort((a, b) => a.latestS - b.latestS)
    .map(({ part, amps, astrayAmps, earliestS, latestS }) => ({ part: part.id, amps, astrayAmps, earliestS, latestS }));
}

/** Walks faults from the home as somebody has put it, every station with all its figures. */
export function walkOf(graph: Graph, start: Standing, faults: readonly Fault[]): WalkOutcome {
  const known = faults.filter(({ at }) => graph.parts.has(at));
  const missing = missingFor(graph, known, start.condition.base !== 'outage');
  const stops = missing.find((each) => each.stops);
  if (stops) return { cannot: `Cannot be walked without ${stops.words}.`, missing };
  const seen: Seen[] = [];
  let first: Steady | undefined;
  let last: Steady | undefined;
  let before: Steady | undefined;
  let result;
  try {
    result = walkFrom(graph, start, faults, {
      handsOver: true,
      before: (steady) => (first = last = before = steady),
      step(step, steady) {
        // What was before a fault is the end of what went on before.
        if (isFault(step)) before = last;
        last = steady;
        seen.push({ step, steady, before: before! });
      },
    });
  } catch (error) {
    if (error instanceof FaultError) return { cannot: `This fault cannot be put in: ${error.message}.`, missing };
    throw error;
  }

  const figuresOf = new Map<Steady, Figures>();
  const read = (steady: Steady): Figures => {
    let figures = figuresOf.get(steady);
    if (!figures) figuresOf.set(steady, (figures = readFigures(graph, steady)));
    return figures;
  };
  const { disconnection, touchVolts } = practices[graph.document.practice];
  const within = graph.document.supply.system === 'TT' ? disconnection.finalTT : disconnection.finalTN;
  const limit = { seconds: within.value, source: within.source, volts: touchVolts.value };

  const stations: Station[] = [];
  const opened: string[] = [];
  let fault = -1;
  const add = (kind: Station['kind'], { step, steady, before: then }: Seen, told: Told): void => {
    const figures = read(steady);
    stations.push({
      kind,
      t: kind === 'before' ? null : step.t,
      earliest: step.earliest,
      part: kind === 'before' ? null : (step.part ?? null),
      ...told,
      touchVolts: kind === 'before' ? caseOf(graph, figures, faults[0]!.at) : step.touchVolts,
      faultAmps: kind === 'before' ? 0 : step.faultAmps,
      opened: [...opened],
      path: kind === 'before' ? [] : faultPath(graph, then, steady, step.faultAmps),
      figures,
    });
  };
  const scene = { graph, faults, read, start };
  add('before', { ...seen[0]!, steady: first!, before: first! }, say.before(scene, first!, faults[0]!));
  for (const each of seen) {
    const { step } = each;
    if (step.event === 'no device opens') add('holds', each, say.holds(scene, each, faults[fault]!));
    else if (isFault(step)) add('fault', each, say.fault(scene, each, faults[++fault]!));
    else if (step.takesOver) add('takes-over', each, say.takesOver(scene, each, faults[fault]!, stations.at(-1)!.figures));
    else {
      opened.push(step.part!);
      add('opens', each, say.opens(scene, each, faults[fault]!, stations.at(-1)!.figures));
    }
  }
  const end = seen.at(-1)!;
  if (stations.at(-1)!.kind !== 'holds') add('still', end, say.still(scene, end, first!, result));
  const struck = seen.findLast(({ step }) => isFault(step))!;
  const by = result.by === null ? undefined : graph.parts.get(result.by);
  const alone =
    by && isResidual(by) && struck.step.faultAmps > 0 ? withoutResidual(graph, struck, faults.at(-1)!.at) : null;
  return {
    walk: {
      faults,
      stations,
      cleared: result.cleared,
      clearedAfter: result.clearedAfter,
      by: result.by,
      limit,
      remark: alone && alone.seconds > limit.seconds ? say.alone(scene, alone, struck.step.faultAmps, start) : null,
      missing: missing.filter((each) => !each.stops),
      assumes: result.assumes,
    },
  };
}

const caseOf = (graph: Graph, figures: Figures, at: string): number =>
  figures.parts[at]?.caseVolts ??
  Object.values(figures.parts).reduce((most, { caseVolts = 0 }) => Math.max(most, caseVolts), 0);
