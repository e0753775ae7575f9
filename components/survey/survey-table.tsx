'use client';

import { useState, type FocusEvent } from 'react';
import type { SurveyRoom } from '@/diagram/document/schema';
import { GROUPS, TYPED, type GroupId } from './columns';
import { SurveyRow } from './survey-row';
import type { Survey } from './use-survey';
import { roomsWords } from './words';

const group = 'h-6 border-b border-rule px-2 text-left max-lap:px-1 align-middle text-small font-semibold text-ink';
const head = 'h-10 border-r border-b-2 border-r-hair border-b-ink px-2 pb-1 max-lap:px-1 text-left align-bottom text-small leading-[14px] font-normal text-grey last:border-r-0';
const sum = 'h-10 border-y-2 border-r border-y-ink border-r-hair px-2 font-bold max-lap:px-1 tabular-nums last:border-r-0 whitespace-nowrap';

/** The rows with the blank one among them, where a new room would stand. */
export const rowsOf = (survey: Survey): SurveyRoom[] =>
  survey.mayEdit ? [...survey.rooms, survey.blank].sort((a, b) => a.order - b.order) : [...survey.rooms];

/** On a narrow screen the name stays and one group stands beside it. The others are out of sight, yet a key still reaches them. */
const PAGE: Record<GroupId, string> = {
  room: 'max-lap:[&_[data-group]:not([data-group=room])]:sr-only max-lap:[&_col[data-group]:not([data-group=room])]:hidden',
  holds: 'max-lap:[&_[data-group]:not([data-group=holds])]:sr-only max-lap:[&_col[data-group]:not([data-group=holds])]:hidden',
  keeps: 'max-lap:[&_[data-group]:not([data-group=keeps])]:sr-only max-lap:[&_col[data-group]:not([data-group=keeps])]:hidden',
  comes: 'max-lap:[&_[data-group]:not([data-group=comes])]:sr-only max-lap:[&_col[data-group]:not([data-group=comes])]:hidden',
};
const PAGES = Object.keys(PAGE) as GroupId[];

const groupOf = (id: string, group: GroupId): GroupId | undefined => (id === 'name' ? undefined : group);

/** Which group stands beside the names, as dots with their words. */
function Pager({ page, onPage }: { page: GroupId; onPage(page: GroupId): void }) {
  return (
    <nav aria-label="Groups of columns" className="mb-2 flex flex-wrap gap-2 lap:hidden">
      {PAGES.map((each) => (
        <button
          key={each}
          type="button"
          aria-current={each === page ? 'page' : undefined}
          className="flex min-h-11 cursor-pointer items-center gap-2 border border-rule px-3 aria-[current]:border-ink aria-[current]:font-bold"
          onClick={() => onPage(each)}
        >
          <span aria-hidden="true" className={`size-2 rounded-full border border-ink ${each === page ? 'bg-ink' : ''}`} />
          {GROUPS[each]}
        </button>
      ))}
    </nav>
  );
}

/** The survey as one table: a row a room, typed by keyboard alone. */
export function SurveyTable({ survey, boards }: { survey: Survey; boards: ReadonlyMap<string, string> }) {
  const rows = rowsOf(survey);
  const { totals } = survey;
  const count = (n: number) => (n === 0 ? '-' : String(n));
  const [page, setPage] = useState<GroupId>('holds');
  const follow = (event: FocusEvent) => {
    const group = event.target.closest<HTMLElement>('[data-group]')?.dataset.group;
    if (group) setPage(group as GroupId);
  };
  return (
    <>
    <Pager page={page} onPage={setPage} />
    <table
      aria-label="Survey, room by room"
      className={`relative w-full table-fixed border-collapse lap:min-w-[936px] ${PAGE[page]}`}
      onFocus={follow}
    >
      <colgroup>
        {TYPED.map((column) => (
          <col key={column.id} data-group={groupOf(column.id, column.group)} style={{ width: `${column.width}ch` }} />
        ))}
        <col data-group="comes" style={{ width: '12ch' }} />
        <col data-group="comes" style={{ width: '10ch' }} />
        <col data-group="comes" style={{ width: '12ch' }} />
        <col data-group="comes" style={{ width: '16ch' }} />
      </colgroup>
      <thead>
        <tr>
          <th scope="col" className={group}>
            {GROUPS.room}
          </th>
          <td data-group="room" colSpan={2} className={`${group} border-r border-r-ink`} />
          <th data-group="holds" colSpan={4} scope="colgroup" className={group}>
            {GROUPS.holds}
          </th>
          <th data-group="keeps" colSpan={4} scope="colgroup" className={`${group} border-l-2 border-l-ink bg-row`}>
            {GROUPS.keeps}
          </th>
          <th data-group="comes" colSpan={4} scope="colgroup" className={`${group} border-l-2 border-l-ink`}>
            {GROUPS.comes}
          </th>
        </tr>
        <tr>
          {TYPED.map((column) => (
            <th
              key={column.id}
              scope="col"
              data-group={groupOf(column.id, column.group)}
              className={`${head} ${column.group === 'keeps' ? 'bg-row' : ''} ${column.id === 'keepLamps' ? 'border-l-2 border-l-ink' : ''} ${column.right ? 'text-right' : ''}`}
            >
              {column.name}
              <br />
              {column.unit}
            </th>
          ))}
          <th data-group="comes" scope="col" className={`${head} border-l-2 border-l-ink text-right`}>
            Connected
            <br />
            W, A
          </th>
          <th data-group="comes" scope="col" className={`${head} text-right`}>
            Backup
            <br />
            W, VA
          </th>
          <th data-group="comes" scope="col" className={head}>
            Ways
          </th>
          <th data-group="comes" scope="col" className={head}>
            On sheet 2
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map((room, i) => (
          <SurveyRow
            key={room.id}
            survey={survey}
            room={room}
            above={rows[i - 1]?.id ?? null}
            below={rows[i + 1]?.id ?? null}
            totals={totals.rooms.find((entry) => entry.room === room.id)}
            step={survey.steps.find((step) => step.room === room.id)}
            problems={survey.problems.filter((problem) => problem.room === room.id)}
            board={boards.get(room.id)}
          />
        ))}
      </tbody>
      <tfoot>
        <tr>
          <th scope="row" className={`${sum} text-left`}>
            {roomsWords(survey.rooms.length)}
          </th>
          <td data-group="room" colSpan={2} className={sum} />
          <td data-group="holds" className={sum}>{count(totals.lamps)}</td>
          <td data-group="holds" className={sum}>{count(totals.fans)}</td>
          <td data-group="holds" className={sum}>{count(totals.outlets)}</td>
          <td data-group="holds" className={sum}>{count(totals.heavy)}</td>
          <td data-group="keeps" className={`${sum} border-l-2 border-l-ink bg-row`}>{count(totals.keepLamps)}</td>
          <td data-group="keeps" className={`${sum} bg-row`}>{count(totals.keepFans)}</td>
          <td data-group="keeps" className={`${sum} bg-row`}>{count(totals.keepOutletWatts)}</td>
          <td data-group="keeps" className={`${sum} bg-row text-right`}>{totals.backup ? totals.backup.hoursWanted : '-'}</td>
          <td data-group="comes" className={`${sum} border-l-2 border-l-ink text-right`}>
            {totals.watts > 0 ? `${Math.round(totals.watts)}  ${totals.amps.toFixed(1)}` : '-'}
          </td>
          <td data-group="comes" className={`${sum} text-right`}>{totals.backup ? `${Math.round(totals.backup.watts)}  ${Math.round(totals.backup.va)}` : '-'}</td>
          <td data-group="comes" className={sum}>{count(totals.ways)}</td>
          <td data-group="comes" className={sum}>{survey.toDraw.length > 0 ? `${survey.toDraw.length} to draw` : ''}</td>
        </tr>
      </tfoot>
    </table>
    </>
  );
}
