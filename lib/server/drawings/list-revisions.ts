import 'server-only';
import { initialsOf, type Actor } from '@/lib/server/actor';
import { findJob } from '@/lib/server/jobs/find-job';
import { authorize } from '@/lib/server/policies';
import type { RevisionView } from '@/lib/shared/drawings';
import { Person, Revision } from '@/models';

export const presentRevision = ({ id, letter, rev, note, state, sha256, at }: Revision, by: string): RevisionView => ({
  id,
  letter,
  rev,
  note,
  state,
  hash: sha256,
  by: initialsOf(by),
  at: at.toISOString(),
});

/** All recorded revisions of a drawing, newest first. */
export async function listRevisions(actor: Actor, drawingId: string): Promise<RevisionView[]> {
  authorize(actor, 'drawing.read', await findJob(actor, { drawingId }));
  const revisions = await Revision.findAll({
    where: { teamId: actor.teamId, drawingId },
    include: [{ model: Person, as: 'person', where: { teamId: actor.teamId }, attributes: ['name'] }],
    order: [['rev', 'DESC']],
  });
  return revisions.map((revision) => presentRevision(revision, revision.person!.name));
}
