'use client';

import { Heading } from '@/components/ui/table';
import type { JobQuery, JobRow } from '@/lib/shared/jobs';
import { RegisterRow } from './register-row';
import { useRegisterHand } from './use-register-hand';

interface RegisterTableProps {
  rows: readonly JobRow[];
  query: JobQuery;
  today: string;
  /** ids of the jobs that wait for the person who reads */
  mine: ReadonlySet<string>;
  mayEdit: boolean;
  onSort(sort: JobQuery['sort']): void;
}

interface Column {
  name: string;
  /** what the column sorts by */
  sort?: JobQuery['sort'];
  className: string;
}

const columns: readonly Column[] = [
  { name: 'Number', sort: 'number', className: 'w-20' },
  { name: 'Place and client', sort: 'title', className: '' },
  { name: 'Drawn, checked', className: 'w-32 max-[900px]:hidden' },
  { name: 'Rev', className: 'w-12 max-[900px]:hidden' },
  { name: 'State', sort: 'state', className: 'w-[118px]' },
  { name: 'What waits', className: '' },
  { name: 'Due', sort: 'due', className: 'w-28' },
  { name: 'Findings', className: 'w-20 text-right' },
];

/** The register as a table; the row in hand unfolds in place into its set of sheets. */
export function RegisterTable({ rows, query, today, mine, mayEdit, onSort }: RegisterTableProps) {
  const hand = useRegisterHand(rows);
  return (
    <table role="table" aria-label="Register of drawings" className="w-full table-fixed border-collapse max-[700px]:block">
      <thead role="rowgroup" className="max-[700px]:sr-only">
        <tr role="row">
          {columns.map(({ name, sort, className }) => (
            <Heading
              key={name}
              role="columnheader"
              className={className}
              sort={sort && { direction: query.sort === sort ? query.direction : null, onSort: () => onSort(sort) }}
            >
              {name}
            </Heading>
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup" className="max-[700px]:block">
        {rows.map((job) => (
          <RegisterRow
            key={job.id}
            job={job}
            today={today}
            mine={mine.has(job.id)}
            inHand={hand.row === job.id}
            unfolded={hand.unfolded === job.id}
            sheet={hand.sheet}
            mayEdit={mayEdit}
            onTake={() => hand.take(job.id)}
            onFold={(unfold) => hand.fold(job.id, unfold)}
            onSheet={hand.choose}
            onKey={hand.onKey}
          />
        ))}
      </tbody>
    </table>
  );
}
