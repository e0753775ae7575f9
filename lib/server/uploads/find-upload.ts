import 'server-only';
import type { Actor } from '@/lib/server/actor';
import { initialsOf } from '@/lib/server/actor';
import { missing } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import { authorize, type Action } from '@/lib/server/policies';
import type { UploadView } from '@/lib/shared/uploads';
import { Person, Upload } from '@/models';

/** With the name of whoever sent it. */
export const withPerson = (teamId: string) => [{ model: Person, as: 'person', where: { teamId }, attributes: ['name'] }];

/** A picture of a job that the actor may do this with. One whose bytes never arrived is not there. */
export async function findUpload(actor: Actor, id: string, action: Action): Promise<Upload> {
  const { teamId } = actor;
  const upload = await Upload.findOne({ where: { teamId, id }, include: withPerson(teamId) });
  if (!upload?.storedAt) throw missing('picture');
  authorize(actor, action, await findJob(actor, { jobId: upload.jobId }));
  return upload;
}

export const presentUpload = (upload: Upload): UploadView => ({
  id: upload.id,
  subject: upload.subject,
  place: upload.place,
  caption: upload.caption,
  width: upload.width,
  height: upload.height,
  by: { name: upload.person!.name, initials: initialsOf(upload.person!.name) },
  at: upload.at.toISOString(),
  removed: upload.removedAt !== null && upload.removedAt !== undefined,
});
