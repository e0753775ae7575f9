import 'server-only';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { loadState } from '@/lib/server/drawings/load-state';
import { presentRevision } from '@/lib/server/drawings/list-revisions';
import { writeSnapshot } from '@/lib/server/drawings/write-snapshot';
import { AppError, missing } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import { authorize } from '@/lib/server/policies';
import type { RevisionView } from '@/lib/shared/drawings';
import { Drawing, Revision, sequelize } from '@/models';

/** A, B ... Z, AA, AB ... after the letter given. */
export function nextLetter(letter: string | null): string {
  if (letter === null) return 'A';
  const head = letter.slice(0, -1);
  const last = letter.at(-1)!;
  if (last !== 'Z') return head + String.fromCharCode(last.charCodeAt(0) + 1);
  return `${head === '' ? 'A' : nextLetter(head)}A`;
}

/** Freezes the drawing as it stands, under the next letter, in one transaction. */
export async function recordRevision(actor: Actor, drawingId: string, note: string): Promise<RevisionView> {
  const { teamId, personId } = actor;
  const revision = await sequelize.transaction(async (transaction) => {
    const head = await Drawing.findOne({ where: { teamId, id: drawingId }, lock: true, transaction });
    if (!head) throw missing('drawing');
    authorize(actor, 'drawing.record', await findJob(actor, { drawingId }, transaction));
    const newest = await Revision.findOne({ where: { teamId, drawingId }, order: [['rev', 'DESC']], transaction });
    if (newest?.rev === head.rev) throw new AppError('conflict', `Nothing was drawn since revision ${newest.letter}.`);
    const state = await loadState(teamId, drawingId, transaction);
    const sha256 = await writeSnapshot(teamId, drawingId, state, transaction);
    const letter = nextLetter(newest?.letter ?? null);
    const made = await Revision.create(
      { teamId, drawingId, letter, rev: state.rev, note, sha256, personId },
      { transaction },
    );
    await audit(actor, 'drawing.record', drawingId, { letter, rev: state.rev }, transaction);
    return made;
  });
  return presentRevision(revision, actor.name);
}
