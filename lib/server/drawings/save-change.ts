import 'server-only';
import { UniqueConstraintError } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import { appendChange } from '@/lib/server/drawings/append-change';
import { afterSave } from '@/lib/server/drawings/background';
import { changesSince } from '@/lib/server/drawings/list-changes';
import { DamagedDrawing, loadState } from '@/lib/server/drawings/load-state';
import { forget, keep, type DrawingState } from '@/lib/server/drawings/state-cache';
import { AppError } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import { authorize } from '@/lib/server/policies';
import type { Change, SaveAnswer } from '@/lib/shared/drawings';
import { DrawingChange, sequelize } from '@/models';

/** The revision at which this very save was taken before: a lost answer is no failed save. */
async function savedBefore(teamId: string, drawingId: string, saveId: string): Promise<SaveAnswer | null> {
  const change = await DrawingChange.findOne({ attributes: ['rev'], where: { teamId, drawingId, saveId } });
  return change && { rev: change.rev };
}

/**
 * Saves one command, in one transaction, and answers after it is on disk. A retry with the same `saveId` gives the same
 * answer and changes nothing.
 * @throws AppError stale with the changes since `base`, when somebody saved meanwhile
 */
export async function saveChange(actor: Actor, drawingId: string, change: Change): Promise<SaveAnswer> {
  const { teamId } = actor;
  const job = await findJob(actor, { drawingId });
  authorize(actor, 'drawing.read', job);
  const before = await savedBefore(teamId, drawingId, change.saveId);
  if (before) return before;
  authorize(actor, 'drawing.edit', job);

  const state = await wholeState(teamId, drawingId);
  const next = state.rev === change.base ? await commit(actor, drawingId, state, change) : null;
  if (next) {
    keep(teamId, drawingId, next);
    afterSave(teamId, drawingId, next.rev);
    return { rev: next.rev };
  }
  const meanwhile = await savedBefore(teamId, drawingId, change.saveId);
  if (meanwhile) return meanwhile;
  authorize(actor, 'drawing.edit', await findJob(actor, { drawingId })); // closed meanwhile
  const { rev, changes } = await changesSince(teamId, drawingId, change.base);
  throw new AppError('stale', 'Somebody else changed this drawing meanwhile.', { rev, since: changes });
}

/** The newest state, to be drawn on. @throws AppError conflict where it cannot be read whole: nothing is written over it */
async function wholeState(teamId: string, drawingId: string): Promise<DrawingState> {
  try {
    return await loadState(teamId, drawingId);
  } catch (error) {
    if (!(error instanceof DamagedDrawing)) throw error;
    throw new AppError('conflict', 'This drawing cannot be read whole, so that nothing is written over it.');
  }
}

async function commit(actor: Actor, drawingId: string, state: DrawingState, change: Change) {
  try {
    return await sequelize.transaction((transaction) => appendChange(actor, drawingId, state, change, transaction));
  } catch (error) {
    // The same save came twice at the same time and the other one was first: answered above as saved before.
    if (error instanceof UniqueConstraintError) return null;
    // Whether the commit happened is not known when the connection went away: the next reading asks the database.
    forget(actor.teamId, drawingId);
    throw error;
  }
}
