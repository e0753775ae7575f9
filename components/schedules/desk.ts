import { createStore, type StoreApi } from 'zustand/vanilla';
import { focusCell } from '@/components/grid/focus';
import { keyOf } from '@/components/sheet/margin/notes';
import type { DrawingStore } from '@/components/sheet/store';
import { isRefusal } from '@/diagram/commands/types';
import type { Patch } from '@/diagram/document/patch';
import { editBlock, editCells, fieldText, readerOf, type Typed } from '@/diagram/schedules/edit';
import {
  TABLES_OF,
  isTyped,
  type FieldRef,
  type Row,
  type ScheduleId,
  type Table,
  type TableId,
} from '@/diagram/schedules/types';
import type { Worked } from '@/diagram/schedules/work-out';

/** The column of a row's head: it takes the row in hand and is no field, so that single letters act there. */
export const HEAD = '#';

/** What is in hand: a cell, or a row by its head; with Shift and arrows the rows up to `extent` as well. */
export interface Hand {
  table: TableId;
  row: string;
  column: string;
  extent: string;
}

/** A text that could not be read: it stays in its cell, not in the drawing. */
export interface Refused {
  table: TableId;
  row: string;
  column: string;
  text: string;
  message: string;
}

/** The findings before the last change, to say which are new and which are gone. */
export interface Since {
  label: string;
  before: ReadonlySet<string>;
}

export interface DeskState {
  worked: Worked | null;
  schedule: ScheduleId;
  hand: Hand | null;
  refused: ReadonlyMap<string, Refused>;
  since: Since | null;

  turnTo(schedule: ScheduleId): void;
  /** A cell or a row's head has the focus: its row is in hand, and its part on the drawing. */
  take(table: TableId, row: string, column: string): void;
  /** Takes the next row in hand as well, up or down from the last one. */
  extend(step: 1 | -1): void;
  extendTo(row: string): void;
  /** Types a text into the cell in hand, and into the same column of every row in hand. */
  type(table: TableId, row: string, column: string, text: string): void;
  sameAsAbove(): void;
  /** Takes over a block from a spreadsheet, from the cell in hand down and to the right. @returns false for a text of one cell */
  paste(text: string): boolean;
  /** The cells in hand as a column of text; null where only one is. */
  copied(): string | null;
  /** The next row up or down in which the column can be typed. */
  step(by: 1 | -1): void;
  takeBack(entry: Refused): void;
  /** One named change of the drawing, with what it does to the findings. */
  run(label: string, patch: Patch): boolean;
}

export type Desk = StoreApi<DeskState>;

export const cellKey = (table: TableId, row: string, column: string): string => `${table}/${row}:${column}`;
export const rowKey = (table: TableId, row: string): string => `${table}/${row}`;

export const tableIn = ({ worked }: Pick<DeskState, 'worked'>, id: TableId): Table | undefined => worked?.tables[id];

/** Rows in hand, in the order of the table. */
export function rowsInHand(state: Pick<DeskState, 'worked' | 'hand'>): Row[] {
  const { hand } = state;
  const rows = hand ? (tableIn(state, hand.table)?.rows ?? []) : [];
  if (!hand) return [];
  const [a, b] = [hand.row, hand.extent].map((id) => rows.findIndex((row) => row.id === id)) as [number, number];
  return a < 0 || b < 0 ? rows.filter((row) => row.id === hand.row) : rows.slice(Math.min(a, b), Math.max(a, b) + 1);
}

export const isInHand = (state: DeskState, table: TableId, row: string): boolean =>
  state.hand?.table === table && rowsInHand(state).some(({ id }) => id === row);

const refIn = (row: Row | undefined, column: string): FieldRef | null => {
  const cell = row?.cells[column];
  return cell && isTyped(cell) ? cell.field : null;
};

/** The schedules at work: which one lies open, what is in hand, what could not be read, and all one can do to a cell. */
export function createDesk(drawing: DrawingStore, schedule: ScheduleId, way: string | null): Desk {
  return createStore<DeskState>((set, get) => {
    const forget = (keys: readonly string[]) =>
      set({ refused: new Map([...get().refused].filter(([key]) => !keys.includes(key))) });
    const edit = (table: Table, rows: readonly Row[], column: string, text: string): string | null => {
      const { document } = drawing.getState();
      const targets = rows.flatMap((row) => {
        const ref = refIn(row, column);
        return ref ? [{ name: row.name, ref }] : [];
      });
      const outcome = editCells(document, targets, text, table.noun);
      if (isRefusal(outcome)) return outcome.refused;
      get().run(outcome.label, outcome.patch);
      return null;
    };
    return {
      worked: null,
      schedule,
      hand: way === null ? null : { table: 'ways', row: way, column: HEAD, extent: way },
      refused: new Map(),
      since: null,

      turnTo(next) {
        const part = drawing.getState().selection.parts[0];
        // What is in hand on the drawing is in hand on the schedule it is turned to, where that has a row of it.
        const found = TABLES_OF[next].flatMap((id) => {
          const row = get().worked?.tables[id].rows.find((each) => each.part === part);
          return row ? [{ table: id, row: row.id, column: HEAD, extent: row.id }] : [];
        });
        set({ schedule: next, hand: found[0] ?? null });
      },

      take(table, row, column) {
        const { hand } = get();
        if (hand?.table === table && hand.row === row && hand.column === column) return;
        set({ hand: { table, row, column, extent: row } });
        const part = tableIn(get(), table)?.rows.find(({ id }) => id === row)?.part;
        if (part) drawing.getState().select({ parts: [part], wires: [], terminal: null });
      },

      extend(step) {
        const { hand } = get();
        const rows = hand ? (tableIn(get(), hand.table)?.rows ?? []) : [];
        const next = rows[rows.findIndex(({ id }) => id === hand?.extent) + step];
        if (hand && next) set({ hand: { ...hand, extent: next.id } });
      },

      extendTo(row) {
        const { hand } = get();
        if (hand) set({ hand: { ...hand, extent: row } });
      },

      type(tableId, rowId, column, text) {
        const table = tableIn(get(), tableId);
        const row = table?.rows.find(({ id }) => id === rowId);
        if (!table || !row) return;
        const held = rowsInHand(get());
        const rows = get().hand?.column === column && held.some(({ id }) => id === rowId) ? held : [row];
        const message = edit(table, rows, column, text);
        const key = cellKey(tableId, rowId, column);
        if (message === null) forget(rows.map(({ id }) => cellKey(tableId, id, column)));
        else {
          const entry: Refused = { table: tableId, row: rowId, column, text, message };
          set({ refused: new Map([...get().refused, [key, entry]]) });
        }
      },

      sameAsAbove() {
        const { hand } = get();
        const table = hand ? tableIn(get(), hand.table) : undefined;
        if (!hand || !table || hand.column === HEAD) return;
        const held = rowsInHand(get());
        const at = table.rows.findIndex(({ id }) => id === held[0]?.id);
        // Of several rows the first is the pattern; of one, the row above it.
        const from = held.length > 1 ? held[0] : table.rows[at - 1];
        const ref = refIn(from, hand.column);
        const to = held.length > 1 ? held.slice(1) : held;
        if (!ref) return;
        const message = edit(table, to, hand.column, fieldText(drawing.getState().document, ref));
        if (message) drawing.getState().say(message);
        else forget(to.map(({ id }) => cellKey(hand.table, id, hand.column)));
      },

      paste(text) {
        const lines = text.replace(/[\r\n]+$/, '').split(/\r?\n/);
        const { hand } = get();
        const table = hand ? tableIn(get(), hand.table) : undefined;
        if (!hand || !table || (lines.length === 1 && !text.includes('\t'))) return false;
        const top = table.rows.findIndex(({ id }) => id === hand.row);
        const block = lines.flatMap((line, i): Typed[] => {
          const row = table.rows[top + i];
          const typedColumns = table.columns.filter(({ id }) => refIn(row, id));
          const left = typedColumns.findIndex(({ id }) => id === hand.column);
          return line.split('\t').flatMap((piece, j) => {
            const column = left < 0 ? undefined : typedColumns[left + j];
            const ref = column && refIn(row, column.id);
            return row && ref ? [{ name: row.name, ref, text: piece }] : [];
          });
        });
        const outcome = editBlock(drawing.getState().document, block);
        if (isRefusal(outcome)) drawing.getState().say(`Nothing was pasted. ${outcome.refused}`);
        else if (block.length > 0) get().run(outcome.label, outcome.patch);
        return true;
      },

      copied() {
        const held = rowsInHand(get());
        const column = get().hand?.column;
        if (held.length < 2 || !column || column === HEAD) return null;
        const read = readerOf(drawing.getState().document);
        return held
          .map(({ cells }) => {
            const cell = cells[column];
            return !cell ? '' : isTyped(cell) ? read(cell.field) : cell.text;
          })
          .join('\n');
      },

      step(by) {
        const { hand } = get();
        const rows = hand ? (tableIn(get(), hand.table)?.rows ?? []) : [];
        if (!hand) return;
        for (let i = rows.findIndex(({ id }) => id === hand.row) + by; i >= 0 && i < rows.length; i += by)
          if (hand.column === HEAD || refIn(rows[i], hand.column))
            return focusCell(rowKey(hand.table, rows[i]!.id), hand.column);
      },

      takeBack({ table, row, column }) {
        forget([cellKey(table, row, column)]);
        focusCell(rowKey(table, row), column);
      },

      run(label, patch) {
        const before = new Set(get().worked?.findings.map(keyOf));
        if (!drawing.getState().run(label, patch)) return false;
        set({ since: { label, before } });
        return true;
      },
    };
  });
}
