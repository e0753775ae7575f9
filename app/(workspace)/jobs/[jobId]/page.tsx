import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { JobSheet } from '@/components/jobs/job-sheet';
import { readJob } from '@/lib/server/jobs/read-job';
import { requireActor } from '@/lib/server/session';
import { apprenticesOf } from '../../apprentices';
import { found, jobIdIn } from '../../found';
import { today } from '../../today';

export const metadata: Metadata = { title: 'Job' };

export default async function JobPage({ params }: { params: Promise<{ jobId: string }> }) {
  const actor = await requireActor();
  const jobId = await jobIdIn(params);
  const job = await found(readJob(actor, jobId));
  if (!job.rights.edit) redirect(`/jobs/${jobId}/overview`);
  return (
    <JobSheet
      job={job}
      apprentices={await apprenticesOf(actor)}
      person={{ initials: actor.initials, roles: actor.roles }}
      team={actor.team}
      today={today()}
    />
  );
}
