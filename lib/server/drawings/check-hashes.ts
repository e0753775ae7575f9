import 'server-only';
import { Op } from 'sequelize';
import { applyPatch, type Patch } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';
import { audit } from '@/lib/server/audit';
import { changeHash, sha256 } from '@/lib/server/drawings/hash';
import { log } from '@/lib/server/log';
import { Drawing, DrawingChange, DrawingSnapshot } from '@/models';

const PAGE = 500;

/**
 * Reads a whole drawing and holds it against itself: each snapshot against its sum, each change against its link, the
 * last link against the head, and each snapshot against the one before it and the changes between them.
 * @returns what is wrong, in words; empty where all is well
 */
export async function damageOf({ teamId, id, rev, headHash }: Drawing): Promise<string[]> {
  const wrong: string[] = [];
  const snapshots = await DrawingSnapshot.findAll({ where: { teamId, drawingId: id }, order: [['rev', 'ASC']] });
  const frozen = new Map(snapshots.map((snapshot) => [snapshot.rev, snapshot.body]));
  for (const snapshot of snapshots)
    if (sha256(snapshot.body) !== snapshot.sha256) {
      wrong.push(`snapshot ${snapshot.rev} is not what was written`);
      frozen.delete(snapshot.rev);
    }

  let document: Installation | null = frozen.has(0) ? (JSON.parse(frozen.get(0)!) as Installation) : null;
  let hash: string | null = null;
  let at = 0;
  for (let from = 0; ; ) {
    const changes = await DrawingChange.findAll({
      where: { teamId, drawingId: id, rev: { [Op.gt]: from } },
      order: [['rev', 'ASC']],
      limit: PAGE,
    });
    for (const change of changes) {
      // Between what was thinned and what was kept there is no link to hold on to.
      const follows = change.rev === at + 1;
      if (!follows && hash !== null) wrong.push(`changes ${at + 1} to ${change.rev - 1} are missing`);
      if (follows && hash !== null && change.prevHash !== hash) wrong.push(`change ${change.rev} does not follow`);
      if (changeHash(change.prevHash, { ...change.get(), drawingId: id }) !== change.hash)
        wrong.push(`change ${change.rev} is not what was written`);
      const base = follows ? document : frozen.has(change.rev - 1) ? (JSON.parse(frozen.get(change.rev - 1)!) as Installation) : null;
      document = base && applyPatch(base, JSON.parse(change.patch) as Patch);
      hash = change.hash;
      at = change.rev;
      const body = frozen.get(at);
      if (body !== undefined && document && JSON.stringify(document) !== body)
        wrong.push(`snapshot ${at} is not what the changes lead to`);
      if (body !== undefined && !document) document = JSON.parse(body) as Installation;
    }
    if (changes.length < PAGE) break;
    from = at;
  }
  if (rev > 0 && at !== rev) wrong.push(`the newest change is ${at}, the head says ${rev}`);
  else if (hash !== null && hash !== headHash) wrong.push('the head does not follow from the newest change');
  return wrong;
}

/** Checks every drawing, one after the other; damage is logged and written into the audit trail. */
export async function checkHashes(): Promise<{ drawings: number; damaged: number }> {
  let drawings = 0;
  let damaged = 0;
  for (let after = ''; ; ) {
    const page: Drawing[] = await Drawing.findAll({
      where: after ? { id: { [Op.gt]: after } } : {},
      order: [['id', 'ASC']],
      limit: 50,
    });
    for (const drawing of page) {
      drawings += 1;
      const wrong = await damageOf(drawing);
      if (wrong.length === 0) continue;
      // Saved in the middle of the reading? Then it is well a moment later.
      const again = await Drawing.findOne({ where: { teamId: drawing.teamId, id: drawing.id } });
      const still = again ? await damageOf(again) : [];
      if (still.length === 0) continue;
      damaged += 1;
      log('drawing.damaged', { drawingId: drawing.id, wrong: still });
      await audit({ teamId: drawing.teamId, personId: null }, 'drawing.damaged', drawing.id, { wrong: still.slice(0, 5) });
    }
    if (page.length < 50) break;
    after = page.at(-1)!.id;
  }
  log('hash.checked', { drawings, damaged });
  return { drawings, damaged };
}
