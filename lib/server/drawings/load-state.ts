import 'server-only';
import { Op, type Transaction } from 'sequelize';
import { applyPatch, type Patch } from '@/diagram/document/patch';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { sha256 } from '@/lib/server/drawings/hash';
import { keep, recall, type DrawingState } from '@/lib/server/drawings/state-cache';
import { missing } from '@/lib/server/errors';
import { Drawing, DrawingChange, DrawingSnapshot } from '@/models';

/** What is stored of a drawing is not what was written, or cannot be put together. */
export class DamagedDrawing extends Error {}

/**
 * The document frozen at a revision of the drawing.
 * @throws DamagedDrawing when the stored bytes are not the ones that were written, or a later version wrote them
 */
export async function readSnapshot(
  teamId: string,
  drawingId: string,
  rev: number,
  transaction?: Transaction,
): Promise<Installation> {
  const snapshot = await DrawingSnapshot.findOne({ where: { teamId, drawingId, rev }, transaction });
  if (!snapshot || sha256(snapshot.body) !== snapshot.sha256)
    throw new DamagedDrawing(`The snapshot ${rev} of drawing ${drawingId} is ${snapshot ? 'damaged' : 'missing'}.`);
  const document = JSON.parse(snapshot.body) as Installation;
  const read = readDocument(document);
  if (!read.ok) throw new DamagedDrawing(`The snapshot ${rev} of drawing ${drawingId} is no whole drawing: ${read.errors[0]!.path}.`);
  return document;
}

/** The newest state: what is kept in memory, else the newest snapshot, and the changes after it. */
export async function loadState(teamId: string, drawingId: string, transaction?: Transaction): Promise<DrawingState> {
  const head = await Drawing.findOne({ where: { teamId, id: drawingId }, transaction });
  if (!head) throw missing('drawing');
  const known = recall(teamId, drawingId);
  if (known?.rev === head.rev && known.hash === head.headHash) return known;
  const from =
    known && known.rev < head.rev && known.rev >= head.snapshotRev
      ? known
      : { rev: head.snapshotRev, document: await readSnapshot(teamId, drawingId, head.snapshotRev, transaction) };

  const tail = await DrawingChange.findAll({
    attributes: ['rev', 'patch'],
    where: { teamId, drawingId, rev: { [Op.gt]: from.rev, [Op.lte]: head.rev } },
    order: [['rev', 'ASC']],
    transaction,
  });
  if (tail.length !== head.rev - from.rev)
    throw new DamagedDrawing(`Drawing ${drawingId} lacks changes between ${from.rev} and ${head.rev}.`);
  const document = tail.reduce((doc, { patch }) => applyPatch(doc, JSON.parse(patch) as Patch), from.document);
  const state = { rev: head.rev, hash: head.headHash, document };
  // Inside a transaction the head may be one that is never committed.
  if (!transaction) keep(teamId, drawingId, state);
  return state;
}
