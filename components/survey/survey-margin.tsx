'use client';

import type { ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Note } from '@/components/ui/note';
import { focusCell } from '@/components/grid/focus';
import { columnOf } from './columns';
import type { Problem } from './problems';
import type { Survey } from './use-survey';
import { hoursWords } from './words';

/** notes of errors shown at once; the rest is counted */
const NOTES = 4;

function Total({ name, figure, rest }: { name: string; figure: string; rest?: string }) {
  return (
    <>
      <dt className="text-grey">{name}</dt>
      <dd>
        <b className="text-[16px]">{figure}</b> {rest}
      </dd>
    </>
  );
}

export function RunningTotals({ survey }: { survey: Survey }) {
  const { watts, demandAmps, serviceA, backup } = survey.totals;
  return (
    <section aria-label="Running totals">
      <h2 className="text-head font-bold">Running totals</h2>
      <dl className="mt-3 grid grid-cols-[104px_1fr] gap-y-2 leading-5">
        <Total name="Connected" figure={`${Math.round(watts)} W`} />
        <Total name="Demand" figure={`${demandAmps.toFixed(1)} A`} rest={`of ${serviceA}`} />
        {backup ? (
          <>
            <Total name="Backup" figure={`${Math.round(backup.watts)} W`} rest={`${Math.round(backup.va)} VA of ${backup.inverterVa}`} />
            <Total name="Hours" figure={hoursWords(backup.hours)} rest={`of ${backup.hoursWanted} wanted`} />
          </>
        ) : (
          <Total name="Backup" figure="none" rest="nothing stays on" />
        )}
      </dl>
    </section>
  );
}

function ProblemNote({ problem, inHand, survey }: { problem: Problem; inHand: boolean; survey: Survey }) {
  const { room, column, remedy, refused } = problem;
  return (
    <Note
      tone="finding"
      inHand={inHand}
      heading={problem.heading}
      meta={column && `cell ${columnOf(column).name}${columnOf(column).group === 'keeps' ? ', stays on' : ''}`}
      actions={
        <>
          {remedy && survey.mayEdit && (
            <Button tone="red" onClick={() => survey.remedy(problem)}>
              {remedy.label}
            </Button>
          )}
          {refused && <Button onClick={() => survey.takeBack(problem)}>Take it back</Button>}
          {room && column && <Button onClick={() => focusCell(room, column)}>Go to the cell</Button>}
        </>
      }
    >
      {problem.message}
    </Note>
  );
}

function Problems({ survey }: { survey: Survey }) {
  const { problems, inHand } = survey;
  const here = Math.max(0, problems.findIndex((problem) => problem.room === inHand?.room && problem.column === inHand?.column));
  const first = Math.min(here, Math.max(0, problems.length - NOTES));
  const rest = problems.length - NOTES;
  return (
    <>
      {problems.slice(first, first + NOTES).map((problem, i) => (
        <ProblemNote key={`${problem.room} ${problem.column} ${problem.heading}`} problem={problem} survey={survey} inHand={first + i === here} />
      ))}
      {rest > 0 && <p className="text-grey">{rest} more to put right; F8 goes through them</p>}
    </>
  );
}

function Demand({ survey }: { survey: Survey }) {
  const { demandLines, demandAmps } = survey.totals;
  if (demandLines.length === 0) return null;
  return (
    <section className="border-t border-rule pt-4">
      <h2 className="text-head font-bold">Demand, line by line</h2>
      <table className="mt-1 w-full border-collapse leading-5">
        <tbody>
          {demandLines.map((line) => (
            <tr key={`${line.what} ${line.allowance}`} title={line.source}>
              <th scope="row" className="py-0.5 pr-2 text-left align-top font-normal">
                {line.what} <span className="text-grey">{line.allowance}</span>
              </th>
              <td className="py-0.5 text-right align-bottom whitespace-nowrap tabular-nums">{line.demandA.toFixed(1)} A</td>
            </tr>
          ))}
        </tbody>
        <tfoot>
          <tr className="font-bold">
            <th scope="row" className="border-t border-ink text-left">
              sum
            </th>
            <td className="border-t border-ink text-right whitespace-nowrap tabular-nums">{demandAmps.toFixed(1)} A</td>
          </tr>
        </tfoot>
      </table>
    </section>
  );
}

/** What the survey comes to, what is to be put right, and the draft. */
export function SurveyMargin({ survey, draft }: { survey: Survey; draft: ReactNode }) {
  return (
    <div className="flex flex-col gap-5">
      <RunningTotals survey={survey} />
      <Problems survey={survey} />
      {draft}
      <Demand survey={survey} />
    </div>
  );
}
