import type { Metadata } from 'next';
import { Sheet } from '@/components/sheet/sheet';
import { firstScene } from '@/lib/server/drawings/first-scene';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { readJob } from '@/lib/server/jobs/read-job';
import { requireActor } from '@/lib/server/session';
import { found, jobIdIn } from '../../../found';

export const metadata: Metadata = { title: 'Connections' };

interface ConnectionsPageProps {
  params: Promise<{ jobId: string }>;
  searchParams: Promise<{ place?: string | string[] }>;
}

export default async function ConnectionsPage({ params, searchParams }: ConnectionsPageProps) {
  const actor = await requireActor();
  const jobId = await jobIdIn(params);
  const asked = (await searchParams).place;
  const place = typeof asked === 'string' ? asked : null;
  const [view, job] = await found(Promise.all([openDrawing(actor, { jobId }), readJob(actor, jobId)]));
  return (
    <Sheet
      face="connections"
      place={place}
      view={view}
      drawn={firstScene(view.document, 'connections', place)}
      me={{ id: actor.personId, initials: actor.initials }}
      hoursWanted={job.hoursWanted}
    />
  );
}
