import { capacityOf } from '../circuit/way-cables';
import { conductorOhm } from '../calculations/conductor';
import { compareDesignations, nameOf } from '../document/names';
import { byCode, type Cable, type Wire } from '../document/schema';
import type { Context } from '../rules/context';
import { exceeds } from '../rules/readings/amounts';
import { figuresOf } from '../rules/readings/figures';
import { ampsFigure, amps, figure, missing, none, text } from './figure';
import type { Cell, Column, Row, Table } from './types';

const COLUMNS: readonly Column[] = [
  { id: 'name', name: 'From, to', width: 34, page: 'stays' },
  { id: 'ref', name: 'Cable', width: 6, page: 'stays', phone: 'laid', spoken: 'designation' },
  { id: 'way', name: 'Way', width: 4, right: true, page: 'size' },
  { id: 'cores', name: 'Cores', width: 5, right: true, page: 'size' },
  { id: 'csa', name: 'Live', unit: 'mm²', width: 5, right: true, page: 'size', spoken: 'live cores, mm²' },
  { id: 'cpc', name: 'Earth', unit: 'mm²', width: 5, right: true, page: 'size', spoken: 'earth core, mm²' },
  { id: 'length', name: 'Run', unit: 'm', width: 5, right: true, page: 'size', spoken: 'run, metres' },
  { id: 'laying', name: 'How,', unit: 'together', width: 8, page: 'laid', spoken: 'how it is laid, how many together' },
  { id: 'material', name: 'Of', width: 3, page: 'laid', spoken: 'conductor' },
  { id: 'insulation', name: 'In', width: 5, page: 'laid', spoken: 'insulation' },
  { id: 'ambient', name: 'At', unit: '°C', width: 4, right: true, page: 'laid', spoken: 'ambient, °C' },
  { id: 'need', name: 'Carries', unit: 'A', width: 7, right: true, page: 'carries', spoken: 'must carry, A' },
  { id: 'iz', name: 'Iz', unit: 'A', width: 10, right: true, page: 'carries', spoken: 'capacity Iz, A' },
  { id: 'r12', name: 'R1+R2', unit: 'ohm', width: 6, right: true, page: 'carries', spoken: 'R1+R2 cold, ohm' },
];

/** The two places of a cable: the ends of its first wire, as a person says them. */
function ends(context: Context, wires: readonly Wire[]): string {
  const [wire] = wires;
  if (!wire) return 'drawn in no wire';
  const say = ([id]: Wire['from']) => {
    const part = context.graph.parts.get(id);
    return part ? nameOf(context.document, part) : id;
  };
  return `${say(wire.from)} to ${say(wire.to)}`;
}

const ROLE_ORDER = ['line', 'switched', 'strapper', 'dc+', 'dc-', 'neutral', 'earth'];

/** Every cable, in the order of the ways it serves. */
export function cablesTable(context: Context): Table {
  const { document, graph } = context;
  const { ways, practice } = figuresOf(context);
  const wiresOf = new Map<string, Wire[]>();
  for (const wire of document.wires)
    if (wire.cable !== undefined) wiresOf.set(wire.cable, [...(wiresOf.get(wire.cable) ?? []), wire]);
  const wayOf = new Map<string, { number: number; device: string }>();
  for (const { number, device, wires } of context.ways)
    for (const id of wires) {
      const cable = document.wires.find((wire) => wire.id === id)?.cable;
      if (cable !== undefined && !wayOf.has(cable)) wayOf.set(cable, { number, device });
    }
  const needs = new Map<string, number>();
  for (const way of ways.values())
    for (const { cable, needA } of way.cables)
      if (needA !== null) needs.set(cable.id, Math.max(needs.get(cable.id) ?? 0, needA));

  const izCell = (cable: Cable, dc: boolean): Cell => {
    if (dc) return none;
    const iz = capacityOf(graph, practice, cable)?.izA;
    if (iz === undefined) return missing('Iz needs a size and a way of laying that the table of the practice holds');
    const need = needs.get(cable.id);
    return need !== undefined && exceeds(need, iz)
      ? { text: `${amps(iz)} < ${need}`, value: iz, beyond: true }
      : ampsFigure(iz);
  };

  const rowOf = (cable: Cable): Row => {
    const wires = (wiresOf.get(cable.id) ?? []).sort(
      (a, b) => ROLE_ORDER.indexOf(a.role) - ROLE_ORDER.indexOf(b.role) || byCode(a.id, b.id),
    );
    const way = wayOf.get(cable.id);
    const dc = wires.some(({ role }) => role === 'dc+' || role === 'dc-');
    const typed = (
      field: 'ref' | 'csa' | 'cpc' | 'length' | 'lead' | 'laying' | 'material' | 'insulation' | 'ambient',
    ): Cell => ({
      field: { of: 'cable', ids: [cable.id], field },
    });
    const need = needs.get(cable.id);
    const ohm = (csaMm2: number) =>
      conductorOhm({ csaMm2, lengthM: cable.length, temperatureC: 20, material: cable.material });
    const name = ends(context, wires);
    return {
      id: cable.id,
      name: cable.ref ? `Cable ${cable.ref}` : `Cable ${name}`,
      group: dc ? 'battery leads' : way ? 'ways' : 'before the ways',
      part: wires[0]?.to[0] ?? null,
      parts: [],
      wires: wires.map(({ id }) => id),
      way: way?.device ?? null,
      cells: {
        name: text(name),
        ref: typed('ref'),
        way: way ? text(String(way.number)) : none,
        cores: text(String(cable.cores ?? wires.length)),
        csa: typed('csa'),
        cpc: dc ? none : typed('cpc'),
        length: typed(dc ? 'lead' : 'length'),
        laying: typed('laying'),
        material: typed('material'),
        insulation: typed('insulation'),
        ambient: typed('ambient'),
        need: need === undefined ? none : ampsFigure(need),
        iz: izCell(cable, dc),
        r12: dc ? none : figure(ohm(cable.csa) + ohm(cable.cpc ?? cable.csa), 3),
      },
    };
  };
  const order = (row: Row) => (row.group === 'before the ways' ? -1 : (wayOf.get(row.id)?.number ?? 1e6));
  return {
    id: 'cables',
    title: 'Schedule of cables',
    noun: 'cables',
    columns: COLUMNS,
    rows: document.cables.map(rowOf).sort((a, b) => order(a) - order(b) || compareDesignations(a.id, b.id)),
    empty: 'No cable yet: draw a way on sheet 2.',
  };
}
