import { isLocked, lockParts, stays, unlocked } from '@/diagram/commands/lock-parts';
import { alignParts, distributeParts, turnParts, unpinParts } from '@/diagram/commands/move-parts';
import type { Hands } from './hands';

/** Placing what is in hand: in line, evenly spaced, turned, held where it stands, or by the sheet again. */

const held = (hands: Hands) => hands.store.getState().selection.parts;
const face = (hands: Hands) => hands.view.getState().face;

export function align(hands: Hands, along: 'row' | 'column'): void {
  if (held(hands).length < 2) hands.store.getState().say('Take at least two parts in hand.');
  else hands.do(alignParts(hands.doc, face(hands), held(hands), along));
}

export function distribute(hands: Hands, along: 'row' | 'column'): void {
  if (held(hands).length < 3) hands.store.getState().say('Take at least three parts in hand.');
  else hands.do(distributeParts(hands.doc, face(hands), held(hands), along));
}

/** Says so where all of some parts are locked in place. */
export function lockHolds(hands: Hands, ids: readonly string[]): boolean {
  const holds = ids.length > 0 && unlocked(hands.doc, face(hands), ids).length === 0;
  if (holds) hands.store.getState().say(stays(hands.doc, ids));
  return holds;
}

/** Locks what is in hand in place; where all of it is, lets it go. */
export function lock(hands: Hands): void {
  const ids = held(hands);
  if (ids.length === 0) hands.store.getState().say('Take a part in hand first.');
  else hands.do(lockParts(hands.doc, face(hands), ids, !ids.every((id) => isLocked(hands.doc, face(hands), id))));
}

export function turn(hands: Hands): void {
  if (held(hands).length === 0) hands.store.getState().say('Take a part in hand first.');
  else if (!lockHolds(hands, held(hands))) hands.do(turnParts(hands.doc, face(hands), held(hands)));
}

export function unpin(hands: Hands): void {
  if (held(hands).length === 0) hands.store.getState().say('Take a part in hand first.');
  else if (lockHolds(hands, held(hands))) return;
  else hands.do(unpinParts(hands.doc, face(hands), held(hands)));
}
