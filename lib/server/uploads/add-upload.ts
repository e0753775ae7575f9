import 'server-only';
import { UniqueConstraintError } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { sha256 } from '@/lib/server/drawings/hash';
import { AppError } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import { authorize } from '@/lib/server/policies';
import { storage } from '@/lib/server/storage/driver';
import { findUpload, presentUpload } from '@/lib/server/uploads/find-upload';
import { STORED_TYPE, keyOf } from '@/lib/server/uploads/keys';
import { checkKind, readPicture } from '@/lib/server/uploads/picture';
import { MOST_PICTURES, type UploadQuery, type UploadView } from '@/lib/shared/uploads';
import { Upload, sequelize } from '@/models';

/**
 * Takes a picture to a job. First the row, then the bytes, then the word that they are there: whatever is cut off in
 * between is swept away, and the same id sent again goes on where it was.
 * @param claimed the type that the sender says
 * @throws AppError invalid, conflict, too-many
 */
export async function addUpload(
  actor: Actor,
  jobId: string,
  { id, subject, place, caption }: UploadQuery,
  bytes: Buffer,
  claimed: string,
): Promise<UploadView> {
  authorize(actor, 'picture.edit', await findJob(actor, { jobId }));
  const { teamId, personId } = actor;
  const kind = checkKind(bytes, claimed);
  const hash = sha256(bytes);
  const known = await Upload.findOne({ where: { teamId, id } });
  if (known && (known.jobId !== jobId || known.sha256 !== hash))
    throw new AppError('conflict', 'This number of a picture is taken. Choose the file again.');
  if (!known?.storedAt) {
    if ((await Upload.count({ where: { teamId, jobId, removedAt: null } })) >= MOST_PICTURES)
      throw new AppError('conflict', `A job keeps ${MOST_PICTURES} pictures. Remove one that is not needed any more.`);
    const { width, height, large, small } = await readPicture(bytes, kind);
    const row = { teamId, id, jobId, personId, subject, place: place ?? null, caption };
    if (!known)
      try {
        await Upload.create({ ...row, width, height, bytes: large.length, sha256: hash }, { returning: false });
      } catch (error) {
        // The same picture came twice at the same time: both store the same bytes under the same key.
        if (!(error instanceof UniqueConstraintError)) throw error;
      }
    await storage().put(keyOf(row, 'small'), small, STORED_TYPE);
    await storage().put(keyOf(row, 'large'), large, STORED_TYPE);
    await sequelize.transaction(async (transaction) => {
      const [stored] = await Upload.update({ storedAt: new Date() }, { where: { teamId, id, storedAt: null }, transaction });
      if (stored) await audit(actor, 'upload.add', id, { jobId }, transaction);
    });
  }
  return presentUpload(await findUpload(actor, id, 'picture.read'));
}
