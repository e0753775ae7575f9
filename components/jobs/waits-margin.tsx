import Link from 'next/link';
import { ButtonLink } from '@/components/ui/button';
import { Note } from '@/components/ui/note';
import type { JobRow } from '@/lib/shared/jobs';
import { shortDate } from '@/lib/shared/dates';
import { findingWords, isLate } from './words';

/** notes shown on a narrow screen, where they lie above the table */
const FEW = 3;
/** notes shown in the margin */
const MANY = 6;

/** The sheet on which it is answered. */
const sheetOf = (job: JobRow) => (job.waits.includes('survey') ? { number: 1, path: 'survey' } : { number: 2, path: 'overview' });

const heading = (job: JobRow): string => `${job.number}: ${job.waits}`;

interface WaitsMarginProps {
  /** jobs of this person in which something waits */
  rows: readonly JobRow[];
  who: string;
  today: string;
}

const dueWord = (job: JobRow, today: string): string =>
  job.due === null ? '' : `due ${shortDate(job.due, today)}${isLate(job, today) ? ', late' : ''}`;

/** What waits for the person who reads, each with its one action; on a narrow screen three lines above the table. */
export function WaitsMargin({ rows, who, today }: WaitsMarginProps) {
  return (
    <>
      <div className="max-lap:hidden">
        <h2 className="text-head font-bold">Waits for you, {who}</h2>
        {rows.length === 0 && <p className="mt-2 text-grey">Nothing waits.</p>}
        <ul className="mt-4 flex flex-col gap-8">
          {rows.slice(0, MANY).map((job, i) => (
            <li key={job.id}>
              <Note
                tone={job.findings?.danger ? 'finding' : 'plain'}
                inHand={i === 0}
                heading={heading(job)}
                meta={
                  <>
                    {job.due && <span className="mr-4">{dueWord(job, today)}</span>}
                    {findingWords(job)}
                  </>
                }
                actions={
                  <ButtonLink href={`/jobs/${job.id}/${sheetOf(job).path}`} tone={job.findings?.danger ? 'red' : 'ink'}>
                    Open sheet {sheetOf(job).number}
                  </ButtonLink>
                }
              >
                {job.title}, {job.client}
              </Note>
            </li>
          ))}
        </ul>
        {rows.length > MANY && <p className="mt-4 text-grey">and {rows.length - MANY} more</p>}
      </div>
      <ul aria-label="Waits for you" className="lap:hidden">
        {rows.length === 0 && <li className="text-grey">Nothing waits for you.</li>}
        {rows.slice(0, FEW).map((job) => (
          <li key={job.id}>
            <Link
              href={`/jobs/${job.id}/${sheetOf(job).path}`}
              className={`flex min-h-6 items-center gap-3 border-l-2 pl-3 no-underline pointer-coarse:min-h-11 ${job.findings?.danger ? 'border-red' : 'border-ink'}`}
            >
              <b className={`truncate ${job.findings?.danger ? 'text-red' : 'text-ink'}`}>{heading(job)}</b>
              <span className="ml-auto shrink-0 text-small text-grey">{dueWord(job, today)}</span>
            </Link>
          </li>
        ))}
      </ul>
    </>
  );
}
