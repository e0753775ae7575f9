import type { SurveyRoom } from '@/diagram/document/schema';
import { USUAL_RUN, writeCell, type Column } from '@/diagram/survey/columns';

export interface TypedColumn {
  id: Column;
  /** two lines of heading: what, and how it is typed */
  name: string;
  unit: string;
  group: GroupId;
  /** ch */
  width: number;
  /** digits only: a phone shows its number pad */
  numeric: boolean;
  right?: boolean;
  /** read to a screen reader and in error notes */
  spoken: string;
}

export type GroupId = 'room' | 'holds' | 'keeps' | 'comes';

export const GROUPS: Record<GroupId, string> = {
  room: 'Room',
  holds: 'What it holds',
  keeps: 'Stays on in an outage',
  comes: 'Comes to',
};

/** The columns that are typed, in the order of the Tab key. */
export const TYPED: readonly TypedColumn[] = [
  { id: 'name', name: 'Name', unit: '', group: 'room', width: 18, numeric: false, spoken: 'name' },
  { id: 'kind', name: 'Kind', unit: '', group: 'room', width: 11, numeric: false, spoken: 'kind' },
  { id: 'run', name: 'Run', unit: 'm', group: 'room', width: 5, numeric: true, right: true, spoken: 'run from the board, metres' },
  { id: 'lamps', name: 'Lamps', unit: 'n × W', group: 'holds', width: 9, numeric: false, spoken: 'lamps, number and watts' },
  { id: 'fans', name: 'Fans', unit: 'n × W', group: 'holds', width: 9, numeric: false, spoken: 'fans, number and watts' },
  { id: 'outlets', name: 'Outlets', unit: 'n', group: 'holds', width: 8, numeric: true, spoken: 'outlets' },
  { id: 'heavy', name: 'Heavy', unit: 'what, W', group: 'holds', width: 15, numeric: false, spoken: 'heavy appliances, what and watts' },
  { id: 'keepLamps', name: 'Lamps', unit: 'n', group: 'keeps', width: 7, numeric: true, spoken: 'lamps that stay on' },
  { id: 'keepFans', name: 'Fans', unit: 'n', group: 'keeps', width: 6, numeric: true, spoken: 'fans that stay on' },
  { id: 'keepOutletWatts', name: 'Outlet', unit: 'W', group: 'keeps', width: 8, numeric: true, spoken: 'watts at one outlet that stays on' },
  { id: 'hours', name: 'Hours', unit: 'wanted', group: 'keeps', width: 8, numeric: true, right: true, spoken: 'hours wanted' },
];

export const columnOf = (id: Column): TypedColumn => TYPED.find((column) => column.id === id)!;

/** The text of a cell as the table shows it while nobody types there; a dash where there is nothing. */
export function showCell(column: Column, room: SurveyRoom): string {
  const text = writeCell(column, room);
  if (column === 'lamps' || column === 'fans') return text.replace('x', ' × ');
  return text;
}

/** What stands in grey in an empty cell. */
export const emptyCell = (column: Column): string => (column === 'run' ? String(USUAL_RUN) : '-');
