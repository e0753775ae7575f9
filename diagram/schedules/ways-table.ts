import { dropLimitPercent } from '../calculations/volt-drop';
import type { WayFigures } from '../circuit/way-figures';
import { designation } from '../layout/wording';
import type { Context } from '../rules/context';
import type { WayResult } from '../rules/examination';
import { exceeds } from '../rules/readings/amounts';
import { figuresOf } from '../rules/readings/figures';
import type { Way } from '../terminals/ways';
import { endFaults } from './end-faults';
import { amps, ampsFigure, figure, missing, none, seconds, text } from './figure';
import type { Cell, Column, Row, Table } from './types';
import { decidingCable, runsOf } from './way-runs';

const COLUMNS: readonly Column[] = [
  { id: 'label', name: 'Way', width: 23, page: 'stays', spoken: 'name' },
  { id: 'ref', name: 'Device', width: 5, page: 'stays', phone: 'device', spoken: 'designation of the device' },
  { id: 'rating', name: 'Rating', width: 7, page: 'stays', spoken: 'rating of the device' },
  { id: 'csa', name: 'Cable', unit: 'mm²', width: 5, right: true, page: 'cable', spoken: 'cable, mm²' },
  { id: 'length', name: 'Run', unit: 'm', width: 5, right: true, page: 'cable', spoken: 'run, metres' },
  {
    id: 'laying',
    name: 'How,',
    unit: 'together',
    width: 7,
    page: 'cable',
    spoken: 'how it is laid, how many circuits together',
  },
  { id: 'ib', name: 'Ib', unit: 'A', width: 5, right: true, page: 'current', spoken: 'design current Ib, A' },
  { id: 'in', name: 'In', unit: 'A', width: 4, right: true, page: 'current', roomy: true, spoken: 'rating In, A' },
  { id: 'iz', name: 'Iz', unit: 'A', width: 9, right: true, page: 'stays', phone: 'current', spoken: 'capacity Iz, A' },
  { id: 'capacity', name: 'Table', unit: 'A', width: 5, right: true, page: 'current', fileOnly: true },
  { id: 'drop', name: 'Drop', unit: '%', width: 5, right: true, page: 'current', spoken: 'volt drop, %' },
  { id: 'zs', name: 'Zs', unit: 'ohm', width: 5, right: true, page: 'fault', spoken: 'earth fault loop Zs, ohm' },
  { id: 'zsMax', name: 'Zs max', unit: 'ohm', width: 6, right: true, page: 'fault', fileOnly: true },
  {
    id: 'opens',
    name: 'Opens',
    unit: 'in',
    width: 7,
    right: true,
    page: 'fault',
    spoken: 'a fault to earth is cleared in',
  },
  {
    id: 'fault',
    name: 'L-N at',
    unit: 'end, A',
    width: 6,
    right: true,
    page: 'fault',
    spoken: 'least short circuit, A',
  },
  { id: 'rcd', name: 'Rcd', width: 4, page: 'device', spoken: 'residual-current device' },
  { id: 'points', name: 'Points', width: 5, right: true, page: 'device', roomy: true },
  { id: 'watts', name: 'Load', unit: 'W', width: 5, right: true, page: 'device', spoken: 'load, W' },
  { id: 'demand', name: 'Demand', unit: 'W', width: 6, right: true, page: 'device', fileOnly: true },
];

function izCell(way: WayFigures, result: WayResult): Cell {
  const decided = decidingCable(way.cables);
  if (!decided) return missing('Iz needs how it is laid');
  if (result.iz === null) return missing('Iz needs a size and a way of laying that the table of the practice holds');
  const need = decided.needA;
  if (need !== null && exceeds(need, result.iz))
    return { text: `${amps(result.iz)} < ${need === way.inA ? 'In' : need}`, value: result.iz, beyond: true };
  return ampsFigure(result.iz);
}

function dropCell(context: Context, way: WayFigures): Cell {
  const { worstDrop } = way;
  if (!worstDrop) {
    if (way.section.points.length === 0) return none;
    return missing(way.ibA === null ? 'The drop needs the watts of every load' : 'The drop needs a cable all the way');
  }
  const { voltDrop } = figuresOf(context).practice;
  const base = worstDrop.at.part.kind === 'lamp' ? voltDrop.lighting.value : voltDrop.other.value;
  const limit = dropLimitPercent(base, worstDrop.fed.lengthM, voltDrop.longRun.value);
  if (!exceeds(worstDrop.percent, limit)) return figure(worstDrop.percent, 2);
  return figure(worstDrop.percent, 2, { beyond: true });
}

function faultCells(context: Context, way: WayFigures): Record<'zs' | 'opens', Cell> {
  const { fault } = way;
  const { supply } = context.document;
  if (!fault) {
    const lacks =
      supply.system === 'TT' && supply.ra === undefined
        ? 'Zs needs the ohms of the electrode'
        : supply.system !== 'TT' && supply.ze === undefined
          ? 'Zs needs the external loop Ze'
          : null;
    return lacks && way.drawn.length > 0 ? { zs: missing(lacks), opens: missing(lacks) } : { zs: none, opens: none };
  }
  return {
    zs: { text: fault.zs.toFixed(fault.zs < 10 ? 2 : 1), value: fault.zs, ...(!fault.holds && { beyond: true }) },
    opens: {
      text: fault.clearedS === null ? 'never' : seconds(fault.clearedS),
      value: fault.clearedS,
      ...(!fault.holds && { beyond: true }),
    },
  };
}

function faultCell(context: Context, way: WayFigures): Cell {
  const { lineNeutral, onBattery } = endFaults(context, way);
  const least = onBattery === null ? lineNeutral : lineNeutral === null ? onBattery : Math.min(lineNeutral, onBattery);
  if (least !== null) return ampsFigure(least);
  if (way.drawn.length === 0) return none;
  return missing(
    context.document.supply.zln === undefined
      ? 'The short circuit needs the line-neutral loop of the supply'
      : 'The short circuit needs a cable all the way',
  );
}

function rowOf(context: Context, { device, number, backup, parts, wires }: Way, result: WayResult): Row {
  const { graph } = context;
  const way = figuresOf(context).ways.get(device)!;
  const runs = runsOf(graph, way);
  const [run] = runs;
  const cables = way.cables.map(({ cable }) => cable);
  const alike = run ? cables.filter(({ csa }) => csa === run.cable.csa) : [];
  const others = [...new Set(cables.map(({ csa }) => csa))].filter((csa) => csa !== run?.cable.csa);
  const laidAlike = run
    ? cables.filter(({ method, grouped }) => method === run.cable.method && grouped === run.cable.grouped)
    : [];
  const noCable = missing('The way has no cable yet: draw one on sheet 3');
  const typed = (field: 'csa' | 'length' | 'laying', ids: readonly string[], more?: string): Cell =>
    ids.length === 0 ? noCable : { field: { of: 'cable', ids, field }, ...(more && { more }) };
  const ofDevice = (field: 'label' | 'ref' | 'rating'): Cell => ({ field: { of: 'part', ids: [device], field } });
  const rcd = result.rcd === null ? undefined : graph.parts.get(result.rcd);
  const over = way.ibA !== null && way.inA !== null && exceeds(way.ibA, way.inA);
  return {
    id: device,
    name: `Way ${number}`,
    number,
    group: backup ? 'backup' : 'mains',
    part: device,
    parts,
    wires,
    way: device,
    cells: {
      label: ofDevice('label'),
      ref: ofDevice('ref'),
      rating: ofDevice('rating'),
      csa: typed(
        'csa',
        alike.map(({ id }) => id),
        others.length > 0 ? `+${others.join(' ')}` : undefined,
      ),
      length: typed('length', run ? [run.cable.id] : []),
      laying: typed(
        'laying',
        laidAlike.map(({ id }) => id),
      ),
      ib:
        result.ib === null
          ? missing('Ib needs the watts of every load')
          : over
            ? ampsFigure(result.ib, { beyond: true })
            : ampsFigure(result.ib),
      in: result.in === null ? missing('In needs the rating of the device') : text(String(result.in)),
      iz: izCell(way, result),
      capacity: result.capacity === null ? none : figure(result.capacity, 1),
      drop: dropCell(context, way),
      ...faultCells(context, way),
      zsMax: result.zsMax === null ? none : figure(result.zsMax, 2),
      fault: faultCell(context, way),
      rcd: rcd ? text(designation(rcd)) : none,
      points: figure(result.points, 0),
      watts: figure(result.connectedWatts, 0),
      demand: figure(result.demandWatts, 0),
    },
  };
}

/** All ways of the home: what is typed of each, and what it comes to. */
export function waysTable(context: Context, ways: readonly WayResult[]): Table {
  const results = new Map(ways.map((result) => [result.part, result]));
  return {
    id: 'ways',
    title: 'Schedule of ways',
    noun: 'ways',
    columns: COLUMNS,
    rows: context.ways.map((way) => rowOf(context, way, results.get(way.device)!)),
    empty: 'No way yet: extend from the line bar.',
  };
}
