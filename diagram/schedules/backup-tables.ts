import { autonomyHours } from '../calculations/autonomy';
import type { BackupFigures } from '../circuit/backup-figures';
import { ASSUMED_EFFICIENCY } from '../circuit/loads';
import { KIND_NAME } from '../document/kinds';
import { byDesignation, nameOf } from '../document/names';
import type { PartOf } from '../document/schema';
import { designation } from '../layout/wording';
import type { Context } from '../rules/context';
import { exceeds } from '../rules/readings/amounts';
import { backupsOf } from '../rules/readings/figures';
import { ampsFigure, figure, hoursText, missing, none, text } from './figure';
import type { FieldId } from './fields';
import type { Cell, Column, Row, Table } from './types';

const SOURCES: readonly Column[] = [
  { id: 'ref', name: 'Source', width: 6, page: 'stays', spoken: 'designation' },
  { id: 'va', name: 'Gives', unit: 'VA', width: 6, right: true, page: 'gives', spoken: 'gives, VA' },
  { id: 'surge', name: 'At a start', unit: 'VA', width: 7, right: true, page: 'gives', spoken: 'at a start, VA' },
  { id: 'efficiency', name: 'Efficiency', unit: '%', width: 6, right: true, page: 'gives', spoken: 'efficiency, %' },
  { id: 'charge', name: 'Charge', unit: 'A', width: 6, right: true, page: 'gives', spoken: 'charge, A' },
  { id: 'cutoff', name: 'Cutoff', unit: 'V', width: 6, right: true, page: 'gives', spoken: 'cutoff, V' },
  { id: 'watts', name: 'Carries', unit: 'W', width: 7, right: true, page: 'carries', spoken: 'carries, W' },
  { id: 'carried', name: 'Carries', unit: 'VA', width: 10, right: true, page: 'carries', spoken: 'carries, VA' },
  { id: 'start', name: 'Starts', unit: 'VA', width: 10, right: true, page: 'carries', spoken: 'largest start, VA' },
  { id: 'dc', name: 'Battery', unit: 'A', width: 7, right: true, page: 'carries', spoken: 'battery current, A' },
  { id: 'wanted', name: 'Wanted', unit: 'h', width: 6, right: true, page: 'hours', spoken: 'hours wanted' },
  { id: 'hours', name: 'Lasts', width: 9, right: true, page: 'stays', phone: 'hours', spoken: 'lasts' },
];

const BATTERIES: readonly Column[] = [
  { id: 'ref', name: 'Battery', width: 6, page: 'stays', spoken: 'designation' },
  { id: 'place', name: 'Stands in', width: 16, page: 'what' },
  { id: 'volts', name: 'Each', unit: 'V', width: 5, right: true, page: 'what', spoken: 'volts of each' },
  { id: 'ah', name: 'Each', unit: 'Ah', width: 6, right: true, page: 'stays', spoken: 'ampere-hours of each' },
  { id: 'hours', name: 'In', unit: 'h', width: 4, right: true, page: 'what', spoken: 'hours in which it gives its Ah' },
  { id: 'chemistry', name: 'Kind', width: 8, page: 'what', spoken: 'chemistry' },
  { id: 'count', name: 'Count', width: 5, right: true, page: 'what', spoken: 'how many' },
  { id: 'arrangement', name: 'Joined in', width: 9, page: 'what', spoken: 'arrangement' },
];

const LOADS: readonly Column[] = [
  { id: 'kind', name: 'Stays on', width: 9, page: 'stays' },
  { id: 'ref', name: 'Ref', width: 5, page: 'stays', spoken: 'designation' },
  { id: 'label', name: 'Name', width: 18, page: 'name' },
  { id: 'room', name: 'Room', width: 16, page: 'name' },
  { id: 'way', name: 'Way', width: 4, right: true, page: 'name' },
  { id: 'source', name: 'From', width: 5, page: 'name' },
  { id: 'watts', name: 'Takes', unit: 'W', width: 6, right: true, page: 'power', spoken: 'watts' },
  { id: 'pf', name: 'Power', unit: 'factor', width: 6, right: true, page: 'power', spoken: 'power factor' },
  { id: 'start', name: 'Start', unit: '×', width: 5, right: true, page: 'power', spoken: 'start, times running' },
  { id: 'share', name: 'Share', unit: '%', width: 5, right: true, page: 'hours', spoken: 'share of the load, %' },
  {
    id: 'without',
    name: 'Without it',
    unit: 'lasts',
    width: 10,
    right: true,
    page: 'stays',
    phone: 'hours',
    spoken: 'without it the backup lasts',
  },
];

const typed = (id: string, field: FieldId): Cell => ({ field: { of: 'part', ids: [id], field } });

/** h at a load; null where the bank is not known */
export function hoursAt({ bank, inverter }: BackupFigures, watts: number): number | null {
  if (!bank) return null;
  return autonomyHours({ bank, watts, efficiency: inverter.efficiency ?? ASSUMED_EFFICIENCY });
}

const limited = (value: number, limit: number | undefined): Cell =>
  limit !== undefined && exceeds(value, limit) ? figure(value, 0, { beyond: true }) : figure(value, 0);

function sourceRow(backup: BackupFigures): Row {
  const { inverter, load, hours, dcAmps } = backup;
  const { id } = inverter;
  const short = hours !== null && inverter.hoursWanted !== undefined && exceeds(inverter.hoursWanted, hours);
  return {
    id,
    name: designation(inverter),
    group: '',
    part: id,
    parts: [id],
    wires: [],
    way: null,
    cells: {
      ref: typed(id, 'ref'),
      va: typed(id, 'va'),
      surge: typed(id, 'surge'),
      efficiency: typed(id, 'efficiency'),
      charge: typed(id, 'charge'),
      cutoff: typed(id, 'cutoff'),
      watts: figure(load.watts, 0),
      carried: limited(load.va, inverter.va),
      start: limited(load.surgeVa, inverter.surge),
      dc: dcAmps === null ? missing('The battery current needs VA and cutoff') : ampsFigure(dcAmps),
      wanted: typed(id, 'hoursWanted'),
      hours:
        hours === null
          ? missing('The hours need the volts and Ah of the battery, and a load')
          : { text: hoursText(hours), value: hours, ...(short && { beyond: true }) },
    },
  };
}

/** Every backup source, with what it carries on battery. */
export const sourcesTable = (context: Context): Table => ({
  id: 'sources',
  title: 'Backup sources',
  noun: 'sources',
  columns: SOURCES,
  rows: backupsOf(context).map(sourceRow),
  empty: 'No backup source: the survey says what must stay on in an outage.',
});

/** Every battery as its label says. */
export function batteriesTable(context: Context): Table {
  const rowOf = (battery: PartOf<'battery'>): Row => ({
    id: battery.id,
    name: designation(battery),
    group: '',
    part: battery.id,
    parts: [battery.id],
    wires: [],
    way: null,
    cells: {
      ref: typed(battery.id, 'ref'),
      place: text(context.document.places.find(({ id }) => id === battery.place)?.name ?? ''),
      volts: typed(battery.id, 'volts'),
      ah: typed(battery.id, 'ah'),
      hours: typed(battery.id, 'hours'),
      chemistry: typed(battery.id, 'chemistry'),
      count: typed(battery.id, 'count'),
      arrangement: typed(battery.id, 'arrangement'),
    },
  });
  const batteries = context.parts('battery') as readonly PartOf<'battery'>[];
  return {
    id: 'batteries',
    title: 'Batteries',
    noun: 'batteries',
    columns: BATTERIES,
    rows: [...batteries].sort(byDesignation).map(rowOf),
    empty: 'No battery.',
  };
}

/** What stays on in an outage, and how long it would last without each. */
export function backupTable(context: Context): Table {
  const { document } = context;
  const ways = new Map(context.ways.map((way) => [way.device, way.number]));
  const rows = backupsOf(context).flatMap((backup) =>
    backup.drawn.map(({ part, watts, way }): Row => {
      const room = document.places.find(({ id }) => id === part.place)?.name ?? '';
      const socket = part.kind === 'socket';
      const kind = socket ? 'outlet' : KIND_NAME[part.kind];
      const without = hoursAt(backup, backup.load.watts - watts);
      return {
        id: part.id,
        name: nameOf(document, part),
        group: backup.inverter.id,
        part: part.id,
        parts: [part.id],
        wires: [],
        way,
        cells: {
          kind: text(kind),
          ref: typed(part.id, 'ref'),
          label: typed(part.id, 'label'),
          room: text(room),
          way: way !== null && ways.has(way) ? text(String(ways.get(way))) : none,
          source: text(designation(backup.inverter)),
          watts: typed(part.id, socket ? 'load' : 'watts'),
          pf: socket ? none : typed(part.id, 'pf'),
          start: socket ? none : typed(part.id, 'start'),
          share: backup.load.watts > 0 ? figure((100 * watts) / backup.load.watts, 0) : none,
          without:
            without === null
              ? missing('The hours need the volts and Ah of the battery')
              : { text: hoursText(without), value: Number.isFinite(without) ? without : null },
        },
      };
    }),
  );
  return {
    id: 'backup',
    title: 'What stays on in an outage',
    noun: 'loads',
    columns: LOADS,
    rows,
    empty: 'Nothing stays on in an outage: the survey says what should.',
  };
}
