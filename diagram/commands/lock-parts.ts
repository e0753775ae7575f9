import { diff } from '../document/patch';
import { applyPatch } from '../document/patch';
import { listNames, nameOf } from '../document/names';
import { canonical, type Arrangement, type Installation, type Position } from '../document/schema';
import { placeAll } from '../layout/place';
import type { Command } from './types';

/** Holding parts where they stand, on one face or on the plan. What a part is and what it is wired to stays open. */

export const isLocked = (doc: Installation, on: Arrangement, id: string): boolean => doc.sheet?.[on]?.[id]?.locked === true;

/** Of some parts those that a hand may move. */
export const unlocked = (doc: Installation, on: Arrangement, ids: readonly string[]): string[] =>
  ids.filter((id) => !isLocked(doc, on, id));

const names = (doc: Installation, ids: readonly string[]): string => {
  const wanted = new Set(ids);
  return listNames(
    doc.parts.filter(({ id }) => wanted.has(id)).map((part) => nameOf(doc, part)),
    3,
  );
};

/** Why parts do not move, in words. */
export const stays = (doc: Installation, ids: readonly string[]): string =>
  `${names(doc, ids)} ${ids.length === 1 ? 'is' : 'are'} locked in place. Unlock with Shift L.`;

/** Holds parts where they stand, or lets them go; a part let go stays pinned, as it was put there by hand. */
export function lockParts(doc: Installation, on: Arrangement, ids: readonly string[], lock: boolean): Command {
  // a part that the layout places has no position of its own to hold yet
  const before = lock && on !== 'plan' ? applyPatch(doc, placeAll(doc)) : doc;
  const positions: Record<string, Position> = { ...before.sheet?.[on] };
  for (const id of ids) {
    const at = positions[id];
    if (!at) continue;
    const { locked: _, ...open } = at;
    positions[id] = lock ? { ...open, pinned: true, locked: true } : open;
  }
  const next = canonical({ ...before, sheet: { ...before.sheet, [on]: positions } });
  return {
    label: `${lock ? 'Lock' : 'Unlock'} ${names(doc, ids)} ${lock ? 'in place' : ''}`.trim(),
    patch: diff(doc, next),
    parts: ids,
  };
}
