import 'server-only';
import type { Actor } from '@/lib/server/actor';
import { readableState } from '@/lib/server/drawings/readable-state';
import { readTitleBlock } from '@/lib/server/drawings/title-block';
import { missing } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import { authorize, may } from '@/lib/server/policies';
import type { DrawingView, TitleBlock } from '@/lib/shared/drawings';

type WhichDrawing = { drawingId: string } | { jobId: string };

/** problems that are told; what is broken through and through is no longer than a page of them */
const MOST_PROBLEMS = 200;

async function read(actor: Actor, by: WhichDrawing): Promise<{ view: DrawingView; original: string | null }> {
  const job = await findJob(actor, by);
  authorize(actor, 'drawing.read', job);
  if (!job) throw missing('drawing');
  const { jobId, drawingId } = job;
  const [{ rev, document, problems, original }, titleBlock] = await Promise.all([
    readableState(actor.teamId, drawingId),
    readTitleBlock(actor.teamId, drawingId),
  ]);
  // What cannot be read whole is not written over: it is open for reading, whoever asks.
  const whole = problems.length === 0;
  const rights = { edit: whole && may(actor, 'drawing.edit', job), record: whole && may(actor, 'drawing.record', job) };
  const view = { id: drawingId, jobId, rev, document, state: job.drawing, rights, titleBlock };
  return { view: whole ? view : { ...view, problems: problems.slice(0, MOST_PROBLEMS) }, original };
}

/** A drawing with everything its sheets show, for whoever may read it. */
export const openDrawing = async (actor: Actor, by: WhichDrawing): Promise<DrawingView> => (await read(actor, by)).view;

/** The document as the interchange file; of one that cannot be read whole, what is stored of it, as it is stored. */
export async function readFile(actor: Actor, by: WhichDrawing): Promise<{ text: string; titleBlock: TitleBlock }> {
  const { view, original } = await read(actor, by);
  return { text: original ?? `${JSON.stringify(view.document, null, 2)}\n`, titleBlock: view.titleBlock };
}
