import type { Metadata } from 'next';
import { PhotographsSheet } from '@/components/photographs/photographs-sheet';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { requireActor } from '@/lib/server/session';
import { listUploads } from '@/lib/server/uploads/list-uploads';
import { found, jobIdIn } from '../../../found';
import { today } from '../../../today';

export const metadata: Metadata = { title: 'Photographs' };

export default async function PhotographsPage({ params }: { params: Promise<{ jobId: string }> }) {
  const actor = await requireActor();
  const jobId = await jobIdIn(params);
  const [view, list] = await found(Promise.all([openDrawing(actor, { jobId }), listUploads(actor, jobId)]));
  return (
    <PhotographsSheet
      view={view}
      me={{ id: actor.personId, initials: actor.initials }}
      list={list}
      today={today()}
    />
  );
}
