import type { Installation } from '../document/schema';
import { readerOf } from './edit';
import { isTyped, type Cell, type FieldRef, type Table } from './types';

/** What a file says of itself above its rows. */
export interface FileHead {
  number: string;
  title: string;
  revision: string;
  /** ISO date of the newest change */
  drawnOn: string;
  drawnBy: string;
  state: string;
  practice: string;
}

type Value = string | number | null;

/** Numbers as numbers, to four places; words as words; what is missing is an empty cell. */
function valueOf(read: (ref: FieldRef) => string, cell: Cell | undefined): Value {
  if (!cell) return null;
  if (isTyped(cell)) {
    const text = read(cell.field);
    return /^-?\d+(\.\d+)?$/.test(text) ? Number(text) : text;
  }
  if (cell.value === undefined) return cell.text === '-' ? '' : cell.text;
  return cell.value === null || !Number.isFinite(cell.value) ? null : Number(cell.value.toFixed(4));
}

const capital = (words: string): string => `${words.charAt(0).toUpperCase()}${words.slice(1)}`;

/** The cautions that every export carries. */
const CAUTIONS = [
  'Design aid, not a permission. Verify every value by test.',
  'Isolate both sources, lock off, prove dead. Battery terminals are never dead.',
];

/**
 * A table as rows of a file: first what it is, of which revision, by whom and with which cautions, then an empty row, the
 * headings with their units, and the rows. Every record has the same number of fields, as RFC 4180 asks.
 */
export function csvRows(doc: Installation, table: Table, head: FileHead): Value[][] {
  const { columns } = table;
  const read = readerOf(doc);
  const width = Math.max(columns.length + 1, 2);
  const full = (values: readonly Value[]): Value[] => [...values, ...Array<Value>(width - values.length).fill('')];
  const heads = columns.map(({ name, unit, spoken }) => capital(spoken ?? [name, unit].filter(Boolean).join(', ')));
  const group = table.rows.some((row) => row.group !== '' && table.id === 'ways');
  return [
    ['Schedule', table.title],
    ['Drawing', `${head.number} ${head.title}`],
    ['Revision', head.revision],
    ['Date', head.drawnOn],
    ['Drawn by', head.drawnBy],
    ['State', head.state],
    ['Practice', head.practice],
    ...CAUTIONS.map((words) => ['Caution', words]),
    [],
    [group ? 'Number, fed by' : 'Row', ...heads],
    ...table.rows.map((row) => [
      group ? `${row.number} ${row.group}` : row.name,
      ...columns.map(({ id }) => valueOf(read, row.cells[id])),
    ]),
  ].map(full);
}
