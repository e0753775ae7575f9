'use client';

import { Fragment, useCallback, useMemo, useRef, useState } from 'react';
import type { Installation } from '@/diagram/document/schema';
import type { Finding } from '@/diagram/rules/types';
import { readerOf } from '@/diagram/schedules/edit';
import type { Column, Table } from '@/diagram/schedules/types';
import type { Desk } from './desk';
import { ColumnPages } from './column-pages';
import { ScheduleRow } from './schedule-row';
import { EDGE_WIDTH } from './way-edge';

/** px a finger goes sideways to turn the columns */
const SWIPE = 60;

interface ScheduleTableProps {
  desk: Desk;
  table: Table;
  document: Installation;
  findings: readonly Finding[];
  mayEdit: boolean;
}

/** px of a column for so many letters: the lettering advances 7.2 px at 12 px. */
const pixels = (letters: number): number => Math.round(letters * 7.2) + 6;

const head =
  'sticky top-0 z-10 bg-paper border-b-2 border-ink px-[3px] pb-1 text-left align-bottom text-small leading-[14px] font-normal text-grey';

/** A schedule as one table, typed where it is underlined; on a narrow sheet its columns are turned to page by page. */
export function ScheduleTable({ desk, table, document, findings, mayEdit }: ScheduleTableProps) {
  const columns = useMemo(() => table.columns.filter(({ fileOnly }) => !fileOnly), [table.columns]);
  const pages = useMemo(
    () => [...new Set(columns.map(({ page }) => page))].filter((page) => page !== 'stays'),
    [columns],
  );
  const [wanted, setPage] = useState(pages[0] ?? '');
  const page = pages.includes(wanted) ? wanted : (pages[0] ?? '');
  const shownOn = useCallback(
    ({ page: own, phone, roomy }: Column) => {
      if (roomy && own === page) return 'min-[901px]:max-lap:hidden';
      if (roomy) return 'max-lap:hidden';
      if (own === 'stays') return phone === undefined || phone === page ? '' : '[@media_screen_and_(max-width:600px)]:hidden';
      return own === page ? '' : '[@media_screen_and_(max-width:900px)]:hidden';
    },
    [page],
  );
  const touch = useRef<{ clientX: number; clientY: number } | null>(null);
  const turn = (by: 1 | -1) => setPage(pages[Math.min(pages.length - 1, Math.max(0, pages.indexOf(page) + by))] ?? '');
  const read = useMemo(() => readerOf(document), [document]);
  const parts = useMemo(() => new Map(document.parts.map((part) => [part.id, part])), [document]);
  const isWays = table.id === 'ways';
  const wide = columns.reduce((a, b) => (b.width > a.width ? b : a)).id;
  if (table.rows.length === 0) return <p className="px-2 py-3 text-grey">{table.empty}</p>;
  return (
    <>
      <ColumnPages pages={pages} page={page} onTurn={setPage} of={table.title} />
      <table
        aria-label={table.title}
        className="w-full table-fixed border-separate border-spacing-0"
        onCopy={(event) => {
          const text = desk.getState().copied();
          if (text === null) return;
          event.preventDefault();
          event.clipboardData.setData('text/plain', text);
        }}
        onTouchStart={(event) => (touch.current = event.touches.length === 1 ? event.touches[0]! : null)}
        onTouchEnd={(event) => {
          const from = touch.current;
          const to = event.changedTouches[0];
          if (
            !from ||
            !to ||
            Math.abs(to.clientX - from.clientX) < SWIPE ||
            Math.abs(to.clientY - from.clientY) > SWIPE / 2
          )
            return;
          turn(to.clientX < from.clientX ? 1 : -1);
        }}
      >
        <colgroup>
          <col style={{ width: isWays ? EDGE_WIDTH : 36 }} className={isWays ? 'max-sm:w-9!' : ''} />
          {columns.map((column) => (
            // One column takes what is left over: names are as long as they are.
            <col
              key={column.id}
              className={shownOn(column)}
              style={column.id === wide ? undefined : { width: pixels(column.width) }}
            />
          ))}
          <col className="max-[600px]:hidden" style={{ width: pixels(8) }} />
        </colgroup>
        <thead>
          <tr>
            <th
              scope="col"
              className={`sticky top-0 z-10 bg-paper pb-1 text-left align-bottom text-small leading-[14px] font-normal text-grey ${isWays ? '' : 'border-b-2 border-ink'}`}
            >
              {isWays ? (
                <>
                  LINE
                  <br />
                  BAR
                </>
              ) : (
                <span className="sr-only">Row</span>
              )}
            </th>
            {columns.map((column) => (
              <th
                key={column.id}
                scope="col"
                className={`${head} ${column.right ? 'text-right' : ''} ${shownOn(column)}`}
              >
                {column.name || <span className="sr-only">{column.spoken}</span>}
                {column.unit && (
                  <>
                    <br />
                    {column.unit}
                  </>
                )}
              </th>
            ))}
            <th scope="col" className={`${head} max-[600px]:hidden`}>
              Finding
            </th>
          </tr>
        </thead>
        <tbody>
          {table.rows.map((row, i) => {
            const first = table.rows[i - 1]?.group !== row.group;
            const last = table.rows[i + 1]?.group !== row.group;
            return (
              <Fragment key={row.id}>
                {isWays && first && i > 0 && (
                  <tr aria-hidden="true">
                    <td className="h-5 p-0" />
                  </tr>
                )}
                <ScheduleRow
                  desk={desk}
                  table={table}
                  row={row}
                  index={i}
                  columns={columns}
                  shownOn={shownOn}
                  part={row.part === null ? undefined : parts.get(row.part)}
                  first={first}
                  apart={isWays && first && i > 0}
                  last={last}
                  document={document}
                  read={read}
                  findings={findings}
                  mayEdit={mayEdit}
                />
              </Fragment>
            );
          })}
        </tbody>
      </table>
    </>
  );
}
