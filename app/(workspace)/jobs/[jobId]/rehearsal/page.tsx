import type { Metadata } from 'next';
import { RehearsalSheet } from '@/components/rehearsal/rehearsal-sheet';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { requireActor } from '@/lib/server/session';
import { found, jobIdIn } from '../../../found';

export const metadata: Metadata = { title: 'Rehearsal' };

interface RehearsalPageProps {
  params: Promise<{ jobId: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function RehearsalPage({ params, searchParams }: RehearsalPageProps) {
  const actor = await requireActor();
  const jobId = await jobIdIn(params);
  const view = await found(openDrawing(actor, { jobId }));
  const given = Object.entries(await searchParams).flatMap(([key, value]) =>
    typeof value === 'string' ? [[key, value]] : [],
  );
  return (
    <RehearsalSheet
      view={view}
      me={{ id: actor.personId, initials: actor.initials }}
      query={new URLSearchParams(given).toString()}
    />
  );
}
