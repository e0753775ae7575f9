import 'server-only';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { findUpload, presentUpload } from '@/lib/server/uploads/find-upload';
import type { UploadPatch, UploadView } from '@/lib/shared/uploads';
import { sequelize } from '@/models';

/** Captions a picture, says what it shows, removes it or brings it back. */
export async function changeUpload(actor: Actor, id: string, patch: UploadPatch): Promise<UploadView> {
  const upload = await findUpload(actor, id, 'picture.edit');
  const { caption, subject, place, removed } = patch;
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
