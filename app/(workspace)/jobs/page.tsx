import type { Metadata } from 'next';
import { Register } from '@/components/jobs/register';
import { listJobs } from '@/lib/server/jobs/list-jobs';
import { may } from '@/lib/server/policies';
import { requireActor } from '@/lib/server/session';
import { JobQuerySchema, type JobQuery } from '@/lib/shared/jobs';
import { today } from '../today';

export const metadata: Metadata = { title: 'Jobs' };

type Search = Promise<Record<string, string | string[] | undefined>>;

const asItOpens = JobQuerySchema.parse({});

/** The query of an address; one that makes no sense is the register as it opens. */
function readQuery(search: Awaited<Search>): JobQuery {
  const read = JobQuerySchema.safeParse(search);
  return read.success ? read.data : asItOpens;
}

export default async function JobsPage({ searchParams }: { searchParams: Search }) {
  const actor = await requireActor();
  const query = readQuery(await searchParams);
  const [page, mine, due] = await Promise.all([
    listJobs(actor, query),
    listJobs(actor, { ...asItOpens, filter: 'mine' }),
    listJobs(actor, { ...asItOpens, filter: 'due' }),
  ]);
  return (
    <Register
      page={page}
      query={query}
      mine={mine}
      dueCount={due.total}
      person={{ initials: actor.initials, roles: actor.roles }}
      team={actor.team}
      mayCreate={may(actor, 'job.create')}
      today={today()}
    />
  );
}
