'use client';

import type { SurveyRoom } from '@/diagram/document/schema';
import { GROUPS, TYPED } from './columns';
import { SurveyRow } from './survey-row';
import type { Survey } from './use-survey';
import { roomsWords } from './words';

const group = 'h-6 border-b border-rule px-2 text-left max-lap:px-1 align-middle text-small font-semibold text-ink';
const head = 'h-10 border-r border-b-2 border-r-hair border-b-ink px-2 pb-1 max-lap:px-1 text-left align-bottom text-small leading-[14px] font-normal text-grey last:border-r-0';
const sum = 'h-10 border-y-2 border-r border-y-ink border-r-hair px-2 font-bold max-lap:px-1 tabular-nums last:border-r-0 whitespace-nowrap';

/** The rows with the blank one among them, where a new room would stand. */
export const rowsOf = (survey: Survey): SurveyRoom[] =>
  survey.mayEdit ? [...survey.rooms, survey.blank].sort((a, b) => a.order - b.order) : [...survey.rooms];

/** The survey as one table: a row a room, typed by keyboard alone. */
export function SurveyTable({ survey, boards }: { survey: Survey; boards: ReadonlyMap<string, string> }) {
  const rows = rowsOf(survey);
  const { totals } = survey;
  const count = (n: number) => (n === 0 ? '-' : String(n));
  return (
    <table aria-label="Survey, room by room" className="w-full min-w-[936px] table-fixed border-collapse">
      <colgroup>
        {TYPED.map((column) => (
          <col key={column.id} style={{ width: `${column.width}ch` }} />
        ))}
        <col style={{ width: '12ch' }} />
        <col style={{ width: '10ch' }} />
        <col style={{ width: '12ch' }} />
        <col style={{ width: '16ch' }} />
      </colgroup>
      <thead>
        <tr>
          <th colSpan={3} scope="colgroup" className={`${group} border-r border-r-ink`}>
            {GROUPS.room}
          </th>
          <th colSpan={4} scope="colgroup" className={group}>
            {GROUPS.holds}
          </th>
          <th colSpan={4} scope="colgroup" className={`${group} border-l-2 border-l-ink bg-row`}>
            {GROUPS.keeps}
          </th>
          <th colSpan={4} scope="colgroup" className={`${group} border-l-2 border-l-ink`}>
            {GROUPS.comes}
          </th>
        </tr>
        <tr>
          {TYPED.map((column) => (
            <th
              key={column.id}
              scope="col"
              className={`${head} ${column.group === 'keeps' ? 'bg-row' : ''} ${column.id === 'keepLamps' ? 'border-l-2 border-l-ink' : ''} ${column.right ? 'text-right' : ''}`}
            >
              {column.name}
              <br />
              {column.unit}
            </th>
          ))}
          <th scope="col" className={`${head} border-l-2 border-l-ink text-right`}>
            Connected
            <br />
            W, A
          </th>
          <th scope="col" className={`${head} text-right`}>
            Backup
            <br />
            W, VA
          </th>
          <th scope="col" className={head}>
            Ways
          </th>
          <th scope="col" className={head}>
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
          <th scope="row" colSpan={3} className={`${sum} text-left`}>
            {roomsWords(survey.rooms.length)}
          </th>
          <td className={sum}>{count(totals.lamps)}</td>
          <td className={sum}>{count(totals.fans)}</td>
          <td className={sum}>{count(totals.outlets)}</td>
          <td className={sum}>{count(totals.heavy)}</td>
          <td className={`${sum} border-l-2 border-l-ink bg-row`}>{count(totals.keepLamps)}</td>
          <td className={`${sum} bg-row`}>{count(totals.keepFans)}</td>
          <td className={`${sum} bg-row`}>{count(totals.keepOutletWatts)}</td>
          <td className={`${sum} bg-row text-right`}>{totals.backup ? totals.backup.hoursWanted : '-'}</td>
          <td className={`${sum} border-l-2 border-l-ink text-right`}>
            {totals.watts > 0 ? `${Math.round(totals.watts)}  ${totals.amps.toFixed(1)}` : '-'}
          </td>
          <td className={`${sum} text-right`}>{totals.backup ? `${Math.round(totals.backup.watts)}  ${Math.round(totals.backup.va)}` : '-'}</td>
          <td className={sum}>{count(totals.ways)}</td>
          <td className={sum}>{survey.toDraw.length > 0 ? `${survey.toDraw.length} to draw` : ''}</td>
        </tr>
      </tfoot>
    </table>
  );
}
