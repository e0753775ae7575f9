import 'server-only';
import { QueryTypes, type Transaction } from 'sequelize';
import { applyPatch } from '@/diagram/document/patch';
import { sendNote } from '@/lib/server/live/notes';
import { checkLimits } from '@/lib/server/drawings/check-limits';
import { changeHash } from '@/lib/server/drawings/hash';
import type { DrawingState } from '@/lib/server/drawings/state-cache';
import { AppError } from '@/lib/server/errors';
import type { Change } from '@/lib/shared/drawings';
import { DrawingChange, sequelize } from '@/models';

const MOST_PATCH_BYTES = 512 * 1024;

/**
 * Adds a change to the log, inside the caller's transaction: the head moves from `state.rev` to the next revision only
 * if nobody moved it meanwhile and the drawing is open.
 * @param state the drawing as the change found it
 * @returns the state after it, or null when the head had moved or was closed: then nothing was written
 * @throws AppError invalid, too-large
 */
export async function appendChange(
  who: { teamId: string; personId: string },
  drawingId: string,
  state: DrawingState,
  { saveId, label, patch: data }: Omit<Change, 'base'>,
  transaction: Transaction,
): Promise<DrawingState | null> {
  const document = applyPatch(state.document, data);
  checkLimits(document);
  const patch = JSON.stringify(data);
  if (Buffer.byteLength(patch) > MOST_PATCH_BYTES)
    throw new AppError('too-large', 'This one change is more than 512 kB. Save it in parts.');
  const rev = state.rev + 1;
  const change = { drawingId, rev, saveId, personId: who.personId, at: new Date(), label, patch };
  const hash = changeHash(state.hash, change);

  const moved = await sequelize.query(
    `update drawings set rev = rev + 1, head_hash = $4
      where team_id = $1 and id = $2 and rev = $3 and head_hash = $5 and state = 'open' returning rev`,
    { bind: [who.teamId, drawingId, state.rev, hash, state.hash], type: QueryTypes.SELECT, transaction },
  );
  if (moved.length === 0) return null;
  await DrawingChange.create(
    { teamId: who.teamId, ...change, prevHash: state.hash, hash },
    { transaction, returning: false },
  );
  await sendNote({ team: who.teamId, drawing: drawingId, rev }, transaction);
  return { rev, hash, document };
}
