import { alignParts, distributeParts, unpinParts } from '@/diagram/commands/move-parts';
import type { Hands } from './hands';

/** Placing what is in hand: in line, evenly spaced, or by the sheet again. */

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

export function unpin(hands: Hands): void {
  if (held(hands).length === 0) hands.store.getState().say('Take a part in hand first.');
  else hands.do(unpinParts(hands.doc, face(hands), held(hands)));
}
