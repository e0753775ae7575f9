'use client';

import type { KeyboardEvent } from 'react';
import { useStore } from 'zustand';
import { GridCell } from '@/components/grid/grid-cell';
import { cellName, focusCell } from '@/components/grid/focus';
import type { Installation } from '@/diagram/document/schema';
import { fieldById } from '@/diagram/schedules/fields';
import { isTyped, type Cell, type Column, type FieldRef, type Row, type TableId } from '@/diagram/schedules/types';
import { HEAD, cellKey, rowKey, type Desk } from './desk';

interface ScheduleCellProps {
  desk: Desk;
  table: TableId;
  row: Row;
  column: Column;
  cell: Cell | undefined;
  document: Installation;
  read: (ref: FieldRef) => string;
  mayEdit: boolean;
}

/** A figure that is worked out: plain, red where it is beyond its limit, a question mark where it waits for something. */
function Figure({ cell, right }: { cell: Exclude<Cell, { field: FieldRef }>; right?: boolean }) {
  const look = cell.beyond ? 'font-bold text-red' : cell.text === '-' ? 'text-grey' : '';
  return (
    <span
      className={`block truncate px-[3px] ${right ? 'text-right tabular-nums' : ''} ${look}`}
      title={cell.lacks ?? cell.text}
    >
      {cell.text}
      {cell.lacks && <span className="sr-only">{cell.lacks}</span>}
    </span>
  );
}

/** The keys that lead from cell to cell, and act on several rows at once. */
const keysOf =
  (desk: Desk) =>
  (event: KeyboardEvent): (() => void) | undefined => {
    const ctrl = event.ctrlKey || event.metaKey;
    const { step, extend, sameAsAbove, hand } = desk.getState();
    const several = hand !== null && hand.extent !== hand.row;
    switch (event.key) {
      case 'Enter':
        // With several rows in hand the text goes to all of them, and they stay in hand.
        return ctrl ? undefined : several ? () => undefined : () => step(event.shiftKey ? -1 : 1);
      case 'ArrowDown':
        return ctrl ? undefined : event.shiftKey ? () => extend(1) : () => step(1);
      case 'ArrowUp':
        return ctrl ? undefined : event.shiftKey ? () => extend(-1) : () => step(-1);
      case 'd':
        return ctrl ? sameAsAbove : undefined;
      default:
        return undefined;
    }
  };

export function ScheduleCell({ desk, table, row, column, cell, document, read, mayEdit }: ScheduleCellProps) {
  const refused = useStore(desk, (state) => state.refused.get(cellKey(table, row.id, column.id)));
  const onKey = keysOf(desk);
  if (!cell) return null;
  if (!isTyped(cell)) return <Figure cell={cell} right={column.right} />;
  const field = fieldById(cell.field.field);
  const text = read(cell.field);
  const usual = field.usual?.(document) ?? '-';
  if (!mayEdit)
    return (
      <span
        className={`block truncate px-[3px] ${column.right ? 'text-right tabular-nums' : ''} ${text === '' ? 'text-grey' : ''}`}
        title={text}
      >
        {text || usual}
        {cell.more && <span className="ml-1 text-small text-grey">{cell.more}</span>}
      </span>
    );
  const { take, type, takeBack } = desk.getState();
  const name = rowKey(table, row.id);
  return (
    <span className="flex h-full items-center">
      <GridCell
        name={cellName(name, column.id)}
        label={`${row.name}, ${column.spoken ?? column.name}`}
        text={text}
        refused={refused?.text}
        invalid={refused !== undefined}
        describedBy={refused && `refused-${name}-${column.id}`.replace(/[^\w-]/g, '-')}
        title={refused?.message ?? (text.length > column.width ? text : undefined)}
        placeholder={usual}
        numeric={field.numeric}
        className={`mx-[3px] h-5! scroll-mt-12 truncate border-b border-dotted border-rule focus:bg-paper focus:outline-offset-3! ${column.right ? 'text-right tabular-nums' : ''}`}
        onTake={() => take(table, row.id, column.id)}
        onType={(typed) => type(table, row.id, column.id, typed)}
        onKey={onKey}
        onPaste={(pasted) => desk.getState().paste(pasted)}
        onEscape={() => {
          if (refused) takeBack(refused);
          else focusCell(name, HEAD);
          return true;
        }}
      />
      {cell.more && (
        <span className="mr-1 shrink-0 text-small text-grey" title={`other runs of it: ${cell.more.slice(1)} mm²`}>
          {cell.more}
        </span>
      )}
    </span>
  );
}
