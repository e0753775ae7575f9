'use client';

import type { KeyboardEvent } from 'react';
import { cellName, focusCell } from '@/components/grid/focus';
import type { Part } from '@/diagram/document/schema';
import { isTyped, type Row, type Table } from '@/diagram/schedules/types';
import { HEAD, rowKey, type Desk } from './desk';
import { WayEdge } from './way-edge';

/** A row is as high as a mouse needs, or a finger. */
export const ROW_HEIGHT = 'h-7 pointer-coarse:h-11';

interface RowHeadProps {
  desk: Desk;
  table: Table;
  row: Row;
  index: number;
  part: Part | undefined;
  /** of its group */
  first: boolean;
  last: boolean;
  inHand: boolean;
  /** not in order: marked here where there is no room for the column that says so */
  grave: boolean;
  /** a row in words, for whoever cannot see it */
  label: string;
}

/** The head of a row: takes it in hand without opening a field, so that arrows walk the rows and letters act. */
export function RowHead({ desk, table, row, index, part, first, last, inHand, grave, label }: RowHeadProps) {
  const onKeyDown = (event: KeyboardEvent) => {
    const { step, extend } = desk.getState();
    const by = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0;
    if (event.key === 'Enter' || event.key === 'ArrowRight') {
      const typed = table.columns.find(({ id }) => {
        const cell = row.cells[id];
        return cell && isTyped(cell);
      });
      if (typed) focusCell(rowKey(table.id, row.id), typed.id);
    } else if (by !== 0 && event.shiftKey) extend(by);
    else if (by !== 0) step(by);
    else return;
    event.preventDefault();
  };
  const isWay = row.number !== undefined;
  return (
    <button
      type="button"
      data-cell={cellName(rowKey(table.id, row.id), HEAD)}
      aria-label={label}
      aria-pressed={inHand}
      className={`flex w-full scroll-mt-12 cursor-pointer items-center justify-end focus-visible:-outline-offset-2 ${ROW_HEIGHT} ${isWay ? '' : 'px-1 text-small text-grey'} ${inHand ? 'font-bold text-ink' : ''}`}
      onFocus={() => desk.getState().take(table.id, row.id, HEAD)}
      // Safari gives a button that is pressed no focus.
      onClick={(event) => event.currentTarget.focus()}
      onKeyDown={onKeyDown}
    >
      {isWay ? (
        <span className="block h-full max-sm:hidden">
          <WayEdge part={part} number={row.number!} backup={row.group === 'backup'} first={first} last={last} />
        </span>
      ) : null}
      <span
        className={`${isWay ? 'font-bold sm:hidden' : ''} ${grave ? 'max-[600px]:font-bold max-[600px]:text-red' : ''}`}
      >
        {grave && <span className="min-[601px]:hidden">! </span>}
        {row.number ?? index + 1}
      </span>
    </button>
  );
}
