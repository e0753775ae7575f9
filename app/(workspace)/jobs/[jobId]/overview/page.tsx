import type { Metadata } from 'next';
import { Sheet } from '@/components/sheet/sheet';
import { firstScene } from '@/lib/server/drawings/first-scene';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { readJob } from '@/lib/server/jobs/read-job';
import { requireActor } from '@/lib/server/session';
import { found, jobIdIn } from '../../../found';

export const metadata: Metadata = { title: 'Overview' };

interface Props {
  params: Promise<{ jobId: string }>;
  searchParams: Promise<{ preview?: string }>;
}

export default async function OverviewPage({ params, searchParams }: Props) {
  const actor = await requireActor();
  const jobId = await jobIdIn(params);
  const [view, job] = await found(Promise.all([openDrawing(actor, { jobId }), readJob(actor, jobId)]));
  return (
    <Sheet
      face="overview"
      view={view}
      drawn={firstScene(view.document, 'overview')}
      me={{ id: actor.personId, initials: actor.initials }}
      hoursWanted={job.hoursWanted}
      preview={(await searchParams).preview === 'draft'}
    />
  );
}
