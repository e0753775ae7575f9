import 'server-only';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { loadState } from '@/lib/server/drawings/load-state';
import { AppError } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import { findUpload, presentUpload } from '@/lib/server/uploads/find-upload';
import type { UploadPatch, UploadView } from '@/lib/shared/uploads';
import { sequelize } from '@/models';

/** A plan without its picture would be a blank paper with symbols on it. */
async function refuseIfPlan(actor: Actor, { id, jobId }: { id: string; jobId: string }): Promise<void> {
  const job = await findJob(actor, { jobId });
  const { document } = await loadState(actor.teamId, job!.drawingId);
  const plan = document.plans?.find(({ picture }) => picture === id);
  if (plan)
    throw new AppError('conflict', `This picture lies behind the plan "${plan.name}". Take the plan away first.`);
}

/** Captions a picture, says what it shows, removes it or brings it back. */
export async function changeUpload(actor: Actor, id: string, patch: UploadPatch): Promise<UploadView> {
  const upload = await findUpload(actor, id, 'picture.edit');
  const { caption, subject, place, removed } = patch;
  if (removed) await refuseIfPlan(actor, upload);
  if (caption !== undefined) upload.caption = caption;
  if (subject !== undefined) upload.set({ subject, place: place ?? null });
  if (removed !== undefined) upload.removedAt = removed ? (upload.removedAt ?? new Date()) : null;
  await sequelize.transaction(async (transaction) => {
    await upload.save({ transaction });
    if (removed !== undefined)
      await audit(actor, removed ? 'upload.remove' : 'upload.bring-back', id, { jobId: upload.jobId }, transaction);
  });
  return presentUpload(upload);
}
