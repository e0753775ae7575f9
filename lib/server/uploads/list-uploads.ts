import 'server-only';
import { Op } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import { findJob } from '@/lib/server/jobs/find-job';
import { authorize, may } from '@/lib/server/policies';
import { presentUpload, withPerson } from '@/lib/server/uploads/find-upload';
import type { UploadList } from '@/lib/shared/uploads';
import { Upload } from '@/models';

/** The pictures of a job, the oldest first; removed ones are left out. */
export async function listUploads(actor: Actor, jobId: string): Promise<UploadList> {
  const job = await findJob(actor, { jobId });
  authorize(actor, 'picture.read', job);
  const { teamId } = actor;
  const uploads = await Upload.findAll({
    where: { teamId, jobId, storedAt: { [Op.ne]: null }, removedAt: null },
    include: withPerson(teamId),
    order: [
      ['at', 'ASC'],
      ['id', 'ASC'],
    ],
  });
  return { uploads: uploads.map(presentUpload), mayEdit: may(actor, 'picture.edit', job!) };
}
