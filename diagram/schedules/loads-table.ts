import { KIND_NAME } from '../document/kinds';
import { byDesignation } from '../document/names';
import type { Part } from '../document/schema';
import type { Context } from '../rules/context';
import type { LoadResult } from '../rules/examination';
import { figuresOf } from '../rules/readings/figures';
import { isPoint } from '../terminals/roles-of-parts';
import { ampsFigure, missing, none, text } from './figure';
import type { Cell, Column, Row, Table } from './types';

const base: readonly Column[] = [
  { id: 'kind', name: 'Load', width: 9, page: 'stays' },
  { id: 'ref', name: 'Ref', width: 5, page: 'stays', spoken: 'designation' },
  { id: 'label', name: 'Name', width: 22, page: 'name' },
  { id: 'room', name: 'Room', width: 16, page: 'name' },
  { id: 'way', name: 'Way', width: 4, right: true, page: 'power' },
  { id: 'watts', name: 'Takes', unit: 'W', width: 6, right: true, page: 'power', spoken: 'watts' },
  { id: 'pf', name: 'Power', unit: 'factor', width: 6, right: true, page: 'power', spoken: 'power factor' },
  { id: 'start', name: 'Start', unit: '×', width: 5, right: true, page: 'power', spoken: 'start, times running' },
  { id: 'amps', name: 'Takes', unit: 'A', width: 6, right: true, page: 'power', spoken: 'amperes' },
];

/** A column a condition: volts at the load, or why there are none. */
const conditionColumns = (names: readonly string[]): Column[] =>
  names.map((name) => ({
    id: `on ${name}`,
    name: name.replace('main-off', 'main off').split('/')[0]!,
    unit: name.includes('/') ? `at ${name.split('/')[1]}, V` : 'V',
    width: 9,
    right: true,
    page: 'volts',
    spoken: `volts on ${name}`,
  }));

function voltsCell(result: LoadResult | undefined, condition: string): Cell {
  const state = result?.conditions[condition];
  if (!state) return none;
  if (!state.fed) return { text: 'dead', value: 0 };
  if (state.volts === null) return missing('Volts need the line-neutral loop of the supply');
  return { text: state.volts.toFixed(0), value: state.volts };
}

/** Every lamp, fan, outlet and appliance, room by room. */
export function loadsTable(context: Context, loads: readonly LoadResult[]): Table {
  const { document } = context;
  const conditions = context.evaluated.map(({ condition }) => condition.name);
  const drawn = new Map(figuresOf(context).drawn.map((each) => [each.part.id, each]));
  const results = new Map(loads.map((load) => [load.part, load]));
  const ways = new Map(context.ways.map((way) => [way.device, way.number]));
  const placeOrder = new Map((document.survey ?? []).map((room, i) => [room.id, i] as const));
  const placeName = new Map(document.places.map((place) => [place.id, place.name]));
  const rank = (part: Part) => placeOrder.get(part.place ?? '') ?? 1e6;
  const points = document.parts
    .filter(isPoint)
    .sort(
      (a, b) =>
        rank(a) - rank(b) ||
        (placeName.get(a.place ?? '') ?? '').localeCompare(placeName.get(b.place ?? '') ?? '', 'en') ||
        byDesignation(a, b),
    );
  const rowOf = (part: (typeof points)[number]): Row => {
    const each = drawn.get(part.id);
    const room = part.place === undefined ? '' : (placeName.get(part.place) ?? '');
    const socket = part.kind === 'socket';
    const kind = socket ? 'outlet' : KIND_NAME[part.kind];
    const typed = (field: 'ref' | 'label' | 'watts' | 'load' | 'pf' | 'start'): Cell => ({
      field: { of: 'part', ids: [part.id], field },
    });
    const result = results.get(part.id);
    return {
      id: part.id,
      name: part.ref ?? `${kind} in ${room}`,
      group: room,
      part: part.id,
      parts: [part.id],
      wires: [],
      way: each?.way ?? null,
      cells: {
        kind: text(kind),
        ref: typed('ref'),
        label: typed('label'),
        room: text(room),
        way: each?.way && ways.has(each.way) ? text(String(ways.get(each.way))) : none,
        watts: typed(socket ? 'load' : 'watts'),
        pf: socket ? none : typed('pf'),
        start: socket ? none : typed('start'),
        amps: each?.known ? (each.amps > 0 ? ampsFigure(each.amps) : none) : missing('Amperes need the watts'),
        ...Object.fromEntries(conditions.map((name) => [`on ${name}`, voltsCell(result, name)])),
      },
    };
  };
  return {
    id: 'loads',
    title: 'Schedule of loads',
    noun: 'loads',
    columns: [...base, ...conditionColumns(conditions)],
    rows: points.map(rowOf),
    empty: 'No load yet: a room gets its lamps and outlets on sheet 1 or 2.',
  };
}
