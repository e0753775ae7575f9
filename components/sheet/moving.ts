import { moveParts } from '@/diagram/commands/move-parts';
import { applyPatch } from '@/diagram/document/patch';
import { MODULE } from '@/diagram/symbols/types';
import type { Hands } from './hands';
import { leadBy } from './leading';
import type { Direction } from './navigate';
import { lockHolds } from './placing';
import { REST } from './view';

/** Moving what is in hand: by keys in modules, or to where a pointer has let go. */

const held = (hands: Hands) => hands.store.getState().selection.parts;

/** One module farther; a ghost stands where it would be. */
export function nudge(hands: Hands, direction: Direction): void {
  const { mode, face, setMode, set } = hands.view.getState();
  if (mode.kind !== 'move') return;
  const dx = mode.dx + (direction === 'left' ? -1 : direction === 'right' ? 1 : 0);
  const dy = mode.dy + (direction === 'up' ? -1 : direction === 'down' ? 1 : 0);
  setMode({ kind: 'move', dx, dy });
  if (held(hands).length === 0) return;
  const moved = moveParts(hands.doc, face, held(hands), dx * MODULE, dy * MODULE);
  set({ ghost: applyPatch(hands.doc, moved.patch) });
}

/** Leaves what was moved by keys where its ghost stands. */
export function endMove(hands: Hands): void {
  const { mode, setMode } = hands.view.getState();
  if (mode.kind !== 'move') return;
  setMode(REST);
  if (mode.dx === 0 && mode.dy === 0) return;
  if (held(hands).length === 0) leadBy(hands, mode.dx, mode.dy);
  else shiftParts(hands, held(hands), mode.dx * MODULE, mode.dy * MODULE);
}

/** Moves parts so far, in 1/100 mm; the terminal in hand stays in hand. @returns whether they stand elsewhere now */
export function shiftParts(hands: Hands, ids: readonly string[], dx: number, dy: number): boolean {
  const { terminal } = hands.store.getState().selection;
  if (lockHolds(hands, ids)) return false;
  const moved = hands.do(moveParts(hands.doc, hands.view.getState().face, ids, dx, dy));
  if (moved && terminal) hands.store.getState().select({ terminal });
  return moved;
}
