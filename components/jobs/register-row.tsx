'use client';

import Link from 'next/link';
import type { KeyboardEvent } from 'react';
import { Stamp } from '@/components/ui/stamp';
import type { JobRow } from '@/lib/shared/jobs';
import { SetOfSheets } from './set-of-sheets';
import { drawnChecked, dueWords, findingCount, findingWords, isDone, isLate, stampOf } from './words';

interface RegisterRowProps {
  job: JobRow;
  today: string;
  /** it waits for the person who reads */
  mine: boolean;
  inHand: boolean;
  unfolded: boolean;
  /** id of the sheet that Enter opens */
  sheet: string;
  mayEdit: boolean;
  onTake(): void;
  onFold(unfold: boolean): void;
  onSheet(sheet: string): void;
  onKey(event: KeyboardEvent): void;
}

const cell = 'h-8 border-b border-hair px-2 align-middle group-data-open:border-b-0 group-data-open:border-t-2 group-data-open:border-t-ink max-[700px]:group-data-open:border-t-0 pointer-coarse:h-11';

/** A job in the register; in hand and unfolded, its set of sheets lies below it. */
export function RegisterRow({ job, today, mine, inHand, unfolded, sheet, mayEdit, onTake, onFold, onSheet, onKey }: RegisterRowProps) {
  const stamp = stampOf(job);
  const late = isLate(job, today);
  const count = findingCount(job);
  const strong = unfolded ? 'font-bold' : '';
  return (
    <>
      <tr
        role="row"
        data-open={unfolded || undefined}
        className="group cursor-pointer max-[700px]:grid max-[700px]:grid-cols-[4.5rem_minmax(0,1fr)_auto] max-[700px]:border-b max-[700px]:border-hair max-[700px]:py-1 hover:bg-lane data-open:bg-row max-[700px]:[&>td]:h-auto max-[700px]:[&>td]:border-b-0 max-[700px]:[&>td]:py-1"
        onClick={() => onFold(!unfolded)}
      >
        <td role="cell" className={`${cell} ${strong} whitespace-nowrap`}>
          <button
            type="button"
            data-job={job.id}
            tabIndex={inHand ? 0 : -1}
            aria-expanded={unfolded}
            aria-controls={`set-${job.id}`}
            className="cursor-pointer text-left whitespace-nowrap pointer-coarse:min-h-11"
            onFocus={onTake}
            onKeyDown={onKey}
            onClick={(event) => {
              event.stopPropagation();
              onFold(!unfolded);
            }}
          >
            {job.number}
          </button>
        </td>
        <td role="cell" className={`${cell} ${strong} py-1`}>
          <bdi>{job.title}</bdi>, <bdi>{job.client}</bdi>
        </td>
        <td role="cell" className={`${cell} whitespace-nowrap max-[900px]:hidden`}>
          {drawnChecked(job) || '-'}
        </td>
        <td role="cell" className={`${cell} max-[900px]:hidden`}>
          {job.revision}
        </td>
        <td role="cell" className={cell}>
          <Stamp shape={stamp.shape}>{stamp.word}</Stamp>
        </td>
        <td
          role="cell"
          className={`${cell} py-1 max-[700px]:col-span-2 ${isDone(job) ? 'text-grey' : mine ? 'font-bold' : ''}`}
        >
          {mine && !isDone(job) && 'you: '}
          {job.waits || 'nothing'}
        </td>
        <td role="cell" className={`${cell} whitespace-nowrap max-[700px]:text-right ${late ? 'font-bold text-red' : ''}`}>
          {dueWords(job, today)}
        </td>
        <td
          role="cell"
          title={findingWords(job)}
          className={`${cell} text-right max-[700px]:hidden ${job.findings?.danger ? 'font-bold text-red' : ''}`}
        >
          {count ?? '-'}
        </td>
      </tr>
      {unfolded && (
        <tr role="row" id={`set-${job.id}`} className="max-[700px]:block">
          <td role="cell" colSpan={8} className="border-b-2 border-ink bg-row px-2 pt-1 pb-3 max-[700px]:block" onKeyDown={onKey}>
            <p className="mb-2 flex flex-wrap gap-x-6 text-small">
              <b>Set of sheets{job.revision === '-' ? '' : `, revision ${job.revision}`}</b>
              <span className="text-grey max-[900px]:hidden">Enter opens the sheet in hand; 1 to 3 opens that sheet; arrows choose; Esc folds</span>
              <span className="ml-auto flex gap-4">
                {(['plan', 'photographs'] as const).map((sheet) => (
                  <Link
                    key={sheet}
                    href={`/jobs/${job.id}/${sheet}`}
                    className="text-ink underline underline-offset-[3px] pointer-coarse:min-h-11"
                  >
                    {sheet === 'plan' ? 'Plan' : 'Photographs'}
                  </Link>
                ))}
                {mayEdit && (
                  <Link href={`/jobs/${job.id}`} className="text-ink underline underline-offset-[3px] pointer-coarse:min-h-11">
                    Edit the job
                  </Link>
                )}
              </span>
            </p>
            <SetOfSheets job={job} inHand={sheet} onChoose={onSheet} />
          </td>
        </tr>
      )}
    </>
  );
}
