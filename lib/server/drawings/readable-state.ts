import 'server-only';
import { Op } from 'sequelize';
import { applyPatch, type Patch } from '@/diagram/document/patch';
import { readWhatCan } from '@/diagram/document/salvage';
import type { DocumentError, Installation } from '@/diagram/document/schema';
import { sha256 } from '@/lib/server/drawings/hash';
import { DamagedDrawing, loadState } from '@/lib/server/drawings/load-state';
import { missing } from '@/lib/server/errors';
import { Drawing, DrawingChange, DrawingSnapshot } from '@/models';

/** A drawing as far as it can be read. */
export interface ReadableState {
  rev: number;
  document: Installation;
  /** empty where the drawing is whole */
  problems: DocumentError[];
  /** what is stored, as text, where the drawing is not whole: nothing of it is lost by being shown in part */
  original: string | null;
}

/**
 * The newest state for whoever only reads. What is damaged, cut off or not known to this version is left out and named;
 * nothing is written over it.
 */
export async function readableState(teamId: string, drawingId: string): Promise<ReadableState> {
  try {
    const { rev, document } = await loadState(teamId, drawingId);
    return { rev, document, problems: [], original: null };
  } catch (error) {
    if (!(error instanceof DamagedDrawing)) throw error;
    return pieceTogether(teamId, drawingId);
  }
}

const faultIn = (what: string, error: unknown): DocumentError => ({
  path: what,
  message: error instanceof Error ? error.message : String(error),
});

/** The newest snapshot there is, whatever its state, and every change after it that can be applied. */
async function pieceTogether(teamId: string, drawingId: string): Promise<ReadableState> {
  const head = await Drawing.findOne({ where: { teamId, id: drawingId } });
  if (!head) throw missing('drawing');
  const snapshot = await DrawingSnapshot.findOne({
    where: { teamId, drawingId, rev: { [Op.lte]: head.rev } },
    order: [['rev', 'DESC']],
  });
  const problems: DocumentError[] = [];
  const from = snapshot?.rev ?? 0;
  if (from < head.snapshotRev || !snapshot)
    problems.push({ path: `snapshot ${head.snapshotRev}`, message: `It is missing; what follows stands on ${snapshot ? `snapshot ${from}` : 'nothing'}.` });
  if (snapshot && sha256(snapshot.body) !== snapshot.sha256)
    problems.push({ path: `snapshot ${from}`, message: 'Its bytes are not the ones that were written.' });
  let data: unknown = null;
  try {
    data = snapshot && JSON.parse(snapshot.body);
  } catch (error) {
    problems.push(faultIn(`snapshot ${from}`, error));
  }
  const read = readWhatCan(data);
  problems.push(...read.errors);
  let { document } = read;
  const tail = await DrawingChange.findAll({
    attributes: ['rev', 'patch'],
    where: { teamId, drawingId, rev: { [Op.gt]: from, [Op.lte]: head.rev } },
    order: [['rev', 'ASC']],
  });
  if (tail.length !== head.rev - from)
    problems.push({ path: `changes ${from + 1} to ${head.rev}`, message: `${head.rev - from - tail.length} of them are missing.` });
  for (const { rev, patch } of tail)
    try {
      document = applyPatch(document, JSON.parse(patch) as Patch);
    } catch (error) {
      problems.push(faultIn(`change ${rev}`, error));
    }
  const original = { snapshot: snapshot?.body ?? null, changes: tail.map(({ rev, patch }) => ({ rev, patch })) };
  return {
    rev: head.rev,
    document,
    problems,
    original: tail.length === 0 && snapshot ? snapshot.body : `${JSON.stringify(original, null, 2)}\n`,
  };
}
