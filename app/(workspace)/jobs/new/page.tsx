import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { JobSheet } from '@/components/jobs/job-sheet';
import { apprenticesOf } from '../../apprentices';
import { today } from '../../today';
import { may } from '@/lib/server/policies';
import { requireActor } from '@/lib/server/session';

export const metadata: Metadata = { title: 'New job' };

export default async function NewJobPage() {
  const actor = await requireActor();
  if (!may(actor, 'job.create')) redirect('/jobs');
  return (
    <JobSheet
      job={null}
      apprentices={await apprenticesOf(actor)}
      person={{ initials: actor.initials, roles: actor.roles }}
      team={actor.team}
      today={today()}
    />
  );
}
