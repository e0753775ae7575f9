import type { Metadata } from 'next';
import { PlanSheet } from '@/components/plan/plan-sheet';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { requireActor } from '@/lib/server/session';
import { listUploads } from '@/lib/server/uploads/list-uploads';
import { found, jobIdIn } from '../../../found';

export const metadata: Metadata = { title: 'Plan' };

interface PlanPageProps {
  params: Promise<{ jobId: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function PlanPage({ params, searchParams }: PlanPageProps) {
  const actor = await requireActor();
  const jobId = await jobIdIn(params);
  const [view, list] = await found(Promise.all([openDrawing(actor, { jobId }), listUploads(actor, jobId)]));
  const { storey } = await searchParams;
  return (
    <PlanSheet
      view={view}
      me={{ id: actor.personId, initials: actor.initials }}
      list={list}
      storey={typeof storey === 'string' ? storey : null}
    />
  );
}
