import 'server-only';
import type { Actor } from '@/lib/server/actor';
import { loadState } from '@/lib/server/drawings/load-state';
import { readTitleBlock } from '@/lib/server/drawings/title-block';
import { missing } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import { authorize, may } from '@/lib/server/policies';
import type { DrawingView } from '@/lib/shared/drawings';

/** A drawing with everything its sheets show, for whoever may read it. */
export async function openDrawing(actor: Actor, by: { drawingId: string } | { jobId: string }): Promise<DrawingView> {
  const job = await findJob(actor, by);
  authorize(actor, 'drawing.read', job);
  if (!job) throw missing('drawing');
  const { jobId, drawingId } = job;
  const [{ rev, document }, titleBlock] = await Promise.all([
    loadState(actor.teamId, drawingId),
    readTitleBlock(actor.teamId, drawingId),
  ]);
  const rights = { edit: may(actor, 'drawing.edit', job), record: may(actor, 'drawing.record', job) };
  return { id: drawingId, jobId, rev, document, state: job.drawing, rights, titleBlock };
}
