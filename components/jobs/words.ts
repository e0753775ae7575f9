import type { StampShape } from '@/components/ui/stamp';
import type { JobRow } from '@/lib/shared/jobs';
import { daysBetween, shortDate } from '@/lib/shared/dates';

const stamps: Record<JobRow['state'], { word: string; shape: StampShape }> = {
  draft: { word: 'draft', shape: 'dashed' },
  submitted: { word: 'for review', shape: 'outlined' },
  returned: { word: 'returned', shape: 'red' },
  approved: { word: 'approved', shape: 'outlined' },
  issued: { word: 'issued', shape: 'filled' },
};
export const stampOf = (job: JobRow) => stamps[job.state];

export const isLate = (job: JobRow, today: string): boolean =>
  job.due !== null && job.state !== 'issued' && daysBetween(today, job.due) < 0;

/** "2 Dec", "28 Nov, late"; empty without a date. */
export const dueWords = (job: JobRow, today: string): string =>
  job.due === null ? '' : `${shortDate(job.due, today)}${isLate(job, today) ? ', late' : ''}`;

/** Nothing is left to do in the job for now. */
export const isDone = (job: JobRow): boolean => job.waits === '' || job.waits.startsWith('nothing');

export const findingCount = (job: JobRow): number | null =>
  job.findings && job.findings.danger + job.findings.defect + job.findings.advice;

const one = (count: number, word: string) => `${count} ${word}${count === 1 ? '' : 's'}`;

/** "1 danger, 2 defects", "no finding", "not examined". */
export function findingWords(job: JobRow): string {
  if (!job.findings) return 'not examined';
  const { danger, defect, advice } = job.findings;
  const words = [danger && one(danger, 'danger'), defect && one(defect, 'defect'), advice && `${advice} advice`].filter(Boolean);
  return words.length > 0 ? words.join(', ') : 'no finding';
}

export const drawnChecked = (job: JobRow): string => [job.drawnBy, job.checkedBy].filter(Boolean).join(', ');
