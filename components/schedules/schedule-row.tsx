'use client';

import { memo, type MouseEvent } from 'react';
import { useStore } from 'zustand';
import type { Installation, Part } from '@/diagram/document/schema';
import type { Finding } from '@/diagram/rules/types';
import { findingsOf } from '@/diagram/schedules/row-findings';
import { isTyped, type Column, type FieldRef, type Row, type Table } from '@/diagram/schedules/types';
import { isInHand, type Desk } from './desk';
import { ROW_HEIGHT, RowHead } from './row-head';
import { ScheduleCell } from './schedule-cell';

interface ScheduleRowProps {
  desk: Desk;
  table: Table;
  row: Row;
  index: number;
  columns: readonly Column[];
  /** classes by column that hide it on a narrow sheet unless its page lies open */
  shownOn: (column: Column) => string;
  part: Part | undefined;
  first: boolean;
  last: boolean;
  /** the first of a group that stands apart from the one before */
  apart: boolean;
  document: Installation;
  read: (ref: FieldRef) => string;
  findings: readonly Finding[];
  mayEdit: boolean;
}

const GRAVE = { danger: 0, defect: 1, advice: 2 } as const;

/** "danger" or "2 defects": the gravest, and how many there are. Advice is left to the margin. */
function FindingMark({ findings }: { findings: readonly Finding[] }) {
  const open = findings.filter(({ severity }) => severity !== 'advice');
  const worst = [...open].sort((a, b) => GRAVE[a.severity] - GRAVE[b.severity])[0];
  if (!worst) return <span className="block px-[3px] text-grey">-</span>;
  return (
    <span className="block truncate px-[3px] font-bold text-red" title={open.map(({ heading }) => heading).join('\n')}>
      {worst.severity}
      {open.length > 1 && ` +${open.length - 1}`}
    </span>
  );
}

/** What a row says of itself, read out at its head. */
function spoken(row: Row, columns: readonly Column[], read: (ref: FieldRef) => string, marks: number): string {
  const facts = columns.flatMap((column) => {
    const cell = row.cells[column.id];
    if (!cell) return [];
    const text = isTyped(cell) ? read(cell.field) : (cell.lacks ?? cell.text);
    return text === '' || text === '-' ? [] : [`${column.spoken ?? column.name} ${text}`];
  });
  return [row.name, ...facts, marks > 0 && `${marks} ${marks === 1 ? 'finding' : 'findings'}`]
    .filter(Boolean)
    .join(', ');
}

export const ScheduleRow = memo(function ScheduleRow(props: ScheduleRowProps) {
  const { desk, table, row, columns, shownOn, document, read, mayEdit } = props;
  const inHand = useStore(desk, (state) => isInHand(state, table.id, row.id));
  const findings = findingsOf(row, props.findings);
  const onMouseDown = (event: MouseEvent) => {
    if (!event.shiftKey || desk.getState().hand?.table !== table.id) return;
    // Shift and a click take the rows between in hand; the cell in hand stays.
    event.preventDefault();
    desk.getState().extendTo(row.id);
  };
  return (
    <tr
      data-row={row.id}
      data-in-hand={inHand || undefined}
      className={`group ${inHand ? 'bg-row font-semibold' : ''}`}
      onMouseDownCapture={onMouseDown}
    >
      <td className={`p-0 align-middle ${table.id === 'ways' ? 'bg-paper' : ''}`}>
        <RowHead
          desk={desk}
          table={table}
          row={row}
          index={props.index}
          part={props.part}
          first={props.first}
          last={props.last}
          inHand={inHand}
          grave={findings.some(({ severity }) => severity !== 'advice')}
          label={spoken(row, columns, read, findings.length)}
        />
      </td>
      {columns.map((column, i) => {
        const content = (
          <ScheduleCell
            desk={desk}
            table={table.id}
            row={row}
            column={column}
            cell={row.cells[column.id]}
            document={document}
            read={read}
            mayEdit={mayEdit}
          />
        );
        const look = `border-b border-hair p-0 align-middle ${ROW_HEIGHT} ${props.apart ? 'border-t-2 border-t-ink' : ''} ${shownOn(column)}`;
        return i === 0 ? (
          <th key={column.id} scope="row" className={`${look} text-left ${inHand ? 'font-semibold' : 'font-normal'}`}>
            {content}
          </th>
        ) : (
          <td key={column.id} className={look}>
            {content}
          </td>
        );
      })}
      <td
        className={`border-b border-hair p-0 align-middle max-[600px]:hidden ${props.apart ? 'border-t-2 border-t-ink' : ''}`}
      >
        <FindingMark findings={findings} />
      </td>
    </tr>
  );
});
