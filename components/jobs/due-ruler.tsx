import type { JobRow } from '@/lib/shared/jobs';
import { addDays, dayOfMonth, daysBetween, monthName, shortDate } from '@/lib/shared/dates';
import { isDone, isLate } from './words';

/** days on the ruler, from two before today */
const BEFORE = 2;
const DAYS = 22;
const STEP = 46;
const LEFT = 16;
const AXIS = 92;
/** px that a letter takes at 11 px */
const LETTER = 6.7;
const LEVEL = 22;
const LEVELS = 3;

interface Mark {
  job: JobRow;
  x: number;
  level: number;
  words: string;
}

/**
 * Puts each name on the lowest line on which it meets no other, from the right: a stem then rises left of every name
 * below it and crosses none.
 */
function placeMarks(jobs: readonly JobRow[], mine: ReadonlySet<string>, today: string): Mark[] {
  const begins: number[] = [];
  const marks: Mark[] = [];
  for (const job of [...jobs].reverse()) {
    const day = Math.max(0, daysBetween(today, job.due!) + BEFORE);
    if (day >= DAYS) continue;
    const words = `${job.number}${isLate(job, today) ? ' late' : mine.has(job.id) && !isDone(job) ? ' you' : ''}`;
    const x = LEFT + day * STEP;
    const end = x + words.length * LETTER + 6;
    const free = begins.findIndex((begin) => begin >= end);
    const level = free === -1 ? begins.length : free;
    begins[level] = x;
    if (level < LEVELS) marks.push({ job, x, level, words });
  }
  return marks;
}

/** What is due in the next weeks, on a ruler. The table says the same in words, so a screen reader is spared it. */
export function DueRuler({ rows, mine, today }: { rows: readonly JobRow[]; mine: ReadonlySet<string>; today: string }) {
  const due = rows.filter((job) => job.due !== null && job.state !== 'issued').sort((a, b) => (a.due! < b.due! ? -1 : 1));
  const marks = placeMarks(due, mine, today);
  if (marks.length === 0) return null;
  const todayX = LEFT + BEFORE * STEP;
  const width = LEFT + DAYS * STEP;
  return (
    <section aria-hidden="true" className="mt-8 max-[700px]:hidden">
      <p>
        <b>Due</b> <span className="ml-2 text-grey">today {shortDate(today, today)}</span>
      </p>
      <svg viewBox={`0 0 ${width} 140`} className="mt-1 block w-full max-w-[1048px] text-small" fill="none">
        <path d={`M0 ${AXIS}H${width}`} className="stroke-ink" strokeWidth="2" />
        {Array.from({ length: DAYS }, (_, i) => {
          const date = addDays(today, i - BEFORE);
          const first = dayOfMonth(date) === 1;
          return (
            <g key={date}>
              <path d={`M${LEFT + i * STEP} ${AXIS}v${first ? 12 : 6}`} className="stroke-ink" strokeWidth="1" />
              <text x={LEFT + i * STEP} y={AXIS + 24} textAnchor="middle" className="fill-grey">
                {dayOfMonth(date)}
              </text>
              {first && (
                <text x={LEFT + i * STEP - 6} y={AXIS + 42} className="fill-grey">
                  {monthName(date)}
                </text>
              )}
            </g>
          );
        })}
        <path d={`M${todayX} 30V${AXIS + 12}`} className="stroke-ink" strokeWidth="1.4" strokeDasharray="4 3" />
        {marks.map(({ job, x, level, words }) => {
          const late = isLate(job, today);
          const waits = mine.has(job.id) && !isDone(job);
          return (
            <g key={job.id}>
              <path d={`M${x} ${AXIS - 5}V${AXIS - 18 - level * LEVEL}`} className="stroke-ink" strokeWidth="1" />
              <rect
                x={x - 5}
                y={AXIS - 5}
                width="10"
                height="10"
                strokeWidth="1.4"
                className={late ? 'fill-red stroke-red' : waits ? 'fill-ink stroke-ink' : 'fill-paper stroke-ink'}
              />
              <text x={x - 4} y={AXIS - 22 - level * LEVEL} className={`${late ? 'fill-red' : 'fill-ink'} ${late || waits ? 'font-bold' : ''}`}>
                {words}
              </text>
            </g>
          );
        })}
      </svg>
      <p className="text-small text-grey">Black squares wait for you, red ones are late. An issued job has no square.</p>
    </section>
  );
}
