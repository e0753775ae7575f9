import type { Metadata } from 'next';
import { SchedulesSheet } from '@/components/schedules/schedules-sheet';
import { SCHEDULES } from '@/diagram/schedules/types';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { requireActor } from '@/lib/server/session';
import { found, jobIdIn } from '../../../found';

export const metadata: Metadata = { title: 'Schedules' };

interface SchedulesPageProps {
  params: Promise<{ jobId: string }>;
  searchParams: Promise<{ table?: string | string[]; way?: string | string[] }>;
}

export default async function SchedulesPage({ params, searchParams }: SchedulesPageProps) {
  const actor = await requireActor();
  const jobId = await jobIdIn(params);
  const { table, way } = await searchParams;
  const view = await found(openDrawing(actor, { jobId }));
  return (
    <SchedulesSheet
      view={view}
      me={{ id: actor.personId, initials: actor.initials }}
      schedule={SCHEDULES.find((id) => id === table) ?? 'ways'}
      way={typeof way === 'string' ? way : null}
    />
  );
}
