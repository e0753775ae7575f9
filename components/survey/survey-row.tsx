'use client';

import type { SurveyRoom } from '@/diagram/document/schema';
import type { Step } from '@/diagram/survey/step';
import type { RoomTotals } from '@/diagram/survey/totals';
import { TYPED } from './columns';
import type { Problem } from './problems';
import { SurveyCell } from './survey-cell';
import type { Survey } from './use-survey';

interface SurveyRowProps {
  survey: Survey;
  room: SurveyRoom;
  above: string | null;
  below: string | null;
  totals?: RoomTotals;
  step?: Step;
  /** of this row */
  problems: readonly Problem[];
  /** designation of the room's switchboard on sheet 2 */
  board?: string;
}

const cell = 'border-r border-b border-hair p-0 h-10 last:border-r-0';
const figures = `${cell} px-2 text-right max-lap:px-1 tabular-nums whitespace-nowrap`;

/** A room: what is typed, then what it comes to. */
export function SurveyRow({ survey, room, above, below, totals, step, problems, board }: SurveyRowProps) {
  const inHand = survey.inHand?.room === room.id;
  const isBlank = room.id === survey.blank.id;
  const waits = problems.length > 0 || totals?.waits;
  return (
    <tr className={inHand ? 'bg-row font-bold' : ''}>
      {TYPED.map((column) => {
        const content = (
          <SurveyCell
            survey={survey}
            room={room}
            column={column}
            above={above}
            below={below}
            problem={problems.find((problem) => problem.column === column.id)}
          />
        );
        const ground = column.group === 'keeps' ? `bg-row ${column.id === 'keepLamps' ? 'border-l-2 border-l-ink' : ''}` : '';
        return column.id === 'name' ? (
          <th key={column.id} scope="row" className={`${cell} text-left ${inHand ? 'font-bold' : 'font-normal'}`}>
            {content}
          </th>
        ) : (
          <td key={column.id} data-group={column.group} className={`${cell} ${ground}`}>
            {content}
          </td>
        );
      })}
      <td data-group="comes" className={`${figures} border-l-2 border-l-ink`}>{totals && !isBlank && `${Math.round(totals.watts)}  ${totals.amps.toFixed(1)}`}</td>
      <td data-group="comes" className={figures}>
        {!totals || isBlank ? null : waits ? (
          <span className="font-normal text-grey">waits</span>
        ) : (
          totals.backupWatts > 0 && `${Math.round(totals.backupWatts)}  ${Math.round(totals.backupVa)}`
        )}
      </td>
      <td data-group="comes" className={`${cell} px-2 max-lap:px-1`}>{totals?.ways.join(' ')}</td>
      <td data-group="comes" className={`${cell} px-2 max-lap:px-1 ${waits ? 'text-red' : ''}`}>
        {isBlank ? <span className="text-grey">new room</span> : [board, waits ? 'waits' : step?.words].filter(Boolean).join(' ')}
      </td>
    </tr>
  );
}
