import { quarryHouse } from '@/lib/server/demo/house';
import { buildContext } from '@/diagram/rules/context';
import type { Installation } from '@/diagram/document/schema';
import { applyPatch } from '@/diagram/document/patch';
import { editCells, fieldText } from '@/diagram/schedules/edit';
import { isRefusal } from '@/diagram/commands/types';
import { isTyped, type FieldRef, type Row, type Table } from '@/diagram/schedules/types';
import { tableOf } from '@/diagram/schedules';
import type { TableId } from '@/diagram/schedules/types';

/** The demonstration's house with backup: seventeen ways, six of them behind the inverter. */
export const house = quarryHouse();

export const tableIn = (doc: Installation, id: TableId): Table => tableOf(buildContext(doc), id);

export function rowIn(table: Table, id: string): Row {
  const row = table.rows.find((each) => each.id === id);
  if (!row) throw new Error(`There is no row ${id} in the ${table.title}.`);
  return row;
}

export function refOf(row: Row, column: string): FieldRef {
  const cell = row.cells[column];
  if (!cell || !isTyped(cell)) throw new Error(`${row.name}, ${column} is not typed.`);
  return cell.field;
}

/** Types into a cell and gives the drawing after it, with what the history calls it. */
export function typed(doc: Installation, table: Table, row: Row, column: string, text: string) {
  const outcome = editCells(doc, [{ name: row.name, ref: refOf(row, column) }], text, table.noun);
  if (isRefusal(outcome)) throw new Error(outcome.refused);
  return { label: outcome.label, document: applyPatch(doc, outcome.patch) };
}

export const shown = (doc: Installation, row: Row, column: string): string => {
  const cell = row.cells[column]!;
  return isTyped(cell) ? fieldText(doc, cell.field) : cell.text;
};
