'use client';

import { useRouter } from 'next/navigation';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { useSingleKeys } from '@/components/frame/single-keys';
import { teamTabs } from '@/components/frame/tabs';
import type { KeyHelp } from '@/components/frame/types';
import { Button, ButtonLink } from '@/components/ui/button';
import type { JobPage, JobQuery } from '@/lib/shared/jobs';
import type { PersonRole } from '@/lib/shared/people';
import { DueRuler } from './due-ruler';
import { RegisterFoot } from './register-foot';
import { RegisterHead } from './register-head';
import { RegisterTable } from './register-table';
import { useRegisterQuery } from './use-register-query';
import { WaitsMargin } from './waits-margin';
import { isDone } from './words';

export interface RegisterProps {
  page: JobPage;
  query: JobQuery;
  /** jobs of the person who reads, and how many of all fall due this week */
  mine: JobPage;
  dueCount: number;
  person: { initials: string; roles: readonly PersonRole[] };
  team: string;
  mayCreate: boolean;
  /** ISO date where the server stands */
  today: string;
}

const keys: readonly KeyHelp[] = [
  { keys: ['↑', '↓'], does: 'row' },
  { keys: ['Enter'], does: 'unfold the row; again, open the sheet in hand' },
  { keys: ['←', '→'], does: 'along the set of sheets' },
  { keys: ['1', '2', '3'], does: 'open that sheet of the unfolded job' },
  { keys: ['Esc'], does: 'fold' },
  { keys: ['n'], does: 'new job' },
];

/** The register: find the job, see what waits, open its set at the right sheet. */
export function Register({ page, query, mine, dueCount, person, team, mayCreate, today }: RegisterProps) {
  const router = useRouter();
  const asked = useRegisterQuery(query);
  const mineIds = new Set(mine.rows.map((job) => job.id));
  const waiting = mine.rows.filter((job) => !isDone(job));
  const narrowed = query.search !== '' || query.filter !== 'all';
  useSingleKeys(mayCreate ? { n: () => router.push('/jobs/new') } : {});

  return (
    <SheetFrame
      tabs={teamTabs(person.roles)}
      current="jobs"
      who={person.initials}
      kind="Register"
      find
      keys={mayCreate ? keys : keys.slice(0, -1)}
      saveState={<span role="status">{asked.pending ? 'Looking' : ''}</span>}
      titleBlock={{
        number: '-',
        title: 'Jobs of the team',
        client: '',
        address: '',
        team,
        drawnBy: '',
        drawnOn: today,
        checkedBy: null,
        revision: '-',
        state: 'live',
      }}
      narrowMargin="above"
      marginLabel="What waits for you"
      margin={<WaitsMargin rows={waiting} who={person.initials} today={today} />}
      foot={<RegisterFoot query={query} mayCreate={mayCreate} today={today} />}
    >
      <div className="px-4 pt-4 pb-6 lap:px-6" aria-busy={asked.pending}>
        <RegisterHead
          team={team}
          all={page.all}
          found={page.total}
          narrowed={narrowed}
          filter={query.filter}
          counts={{ mine: mine.total, due: dueCount }}
          typed={asked.typed}
          onType={asked.type}
          onFilter={(filter) => asked.ask({ filter })}
        />
        <div className="mt-4">
          {page.rows.length > 0 ? (
            <RegisterTable rows={page.rows} query={query} today={today} mine={mineIds} mayEdit={mayCreate} onSort={asked.sort} />
          ) : narrowed ? (
            <NoMatch query={query} all={page.all} onClear={asked.clear} />
          ) : (
            <NoJob mayCreate={mayCreate} />
          )}
        </div>
        {page.pages > 1 && (
          <nav aria-label="Pages of the register" className="mt-4 flex items-center gap-3">
            <Button disabled={page.page <= 1} onClick={() => asked.ask({ page: page.page - 1 })}>
              Page before
            </Button>
            <span>
              {page.page} of {page.pages}
            </span>
            <Button disabled={page.page >= page.pages} onClick={() => asked.ask({ page: page.page + 1 })}>
              Next page
            </Button>
          </nav>
        )}
        <DueRuler rows={page.rows} mine={mineIds} today={today} />
      </div>
    </SheetFrame>
  );
}

function NoJob({ mayCreate }: { mayCreate: boolean }) {
  return (
    <div className="mt-10 flex flex-col items-start gap-4">
      <p className="text-[14px]">No job yet. {mayCreate ? 'The first begins with a client and a place.' : 'An electrician of your team begins one.'}</p>
      {mayCreate && (
        <ButtonLink href="/jobs/new" solid>
          New job
        </ButtonLink>
      )}
    </div>
  );
}

const nothingIn: Record<JobQuery['filter'], string> = {
  all: 'Nothing here.',
  mine: 'Nothing waits for you.',
  due: 'Nothing is due within a week.',
  archived: 'The archive is empty.',
};

function NoMatch({ query, all, onClear }: { query: JobQuery; all: number; onClear(): void }) {
  const jobs = `${all} ${all === 1 ? 'job' : 'jobs'} in all.`;
  return (
    <div className="mt-10 flex flex-wrap items-center gap-4">
      <p className="text-[14px]">
        {query.search ? `Nothing has "${query.search}".` : nothingIn[query.filter]} {jobs}
      </p>
      <Button onClick={onClear}>{query.search ? 'Clear' : 'Show all'}</Button>
    </div>
  );
}
