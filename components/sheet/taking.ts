import { KIND_NAME } from '@/diagram/document/kinds';
import { nextPart, firstPart, type Direction } from './navigate';
import type { Hands } from './hands';

/** Taking several things in hand at once. */

/** The part in hand; without one the hands say so. */
function held(hands: Hands) {
  const { selection, say } = hands.store.getState();
  const part = hands.doc.parts.find((candidate) => candidate.id === selection.parts[0]);
  if (!part) say('Take a part in hand first.');
  return part;
}

function take(hands: Hands, parts: readonly string[], what: string): void {
  const { select, say } = hands.store.getState();
  select({ parts, wires: [], terminal: null });
  say(`${parts.length} in hand: ${what}.`);
}

export function takeAll(hands: Hands): void {
  take(hands, hands.scene().parts.map((part) => part.id), 'all of this sheet');
}

/** Everything in the room of the part in hand. */
export function takeRoom(hands: Hands): void {
  const part = held(hands);
  if (!part) return;
  const room = hands.doc.places.find((place) => place.id === part.place);
  if (!room) return hands.store.getState().say('What is in hand stands in no room.');
  take(hands, hands.doc.parts.filter((other) => other.place === room.id).map((other) => other.id), `all of ${room.name}`);
}

/** Everything of the kind in hand, to change it in one step. */
export function takeKind(hands: Hands): void {
  const part = held(hands);
  if (!part) return;
  const alike = hands.doc.parts.filter((other) => other.kind === part.kind);
  take(hands, alike.map((other) => other.id), `every ${KIND_NAME[part.kind]}`);
}

/** The next part in a direction is taken in hand besides what is. */
export function takeAlso(hands: Hands, direction: Direction): void {
  const { selection, select, say } = hands.store.getState();
  const last = selection.parts.at(-1);
  const next = last ? nextPart(hands.doc, hands.walk, hands.scene(), last, direction) : firstPart(hands.scene());
  if (!next) return say('Nothing lies that way.');
  // What is taken a second time goes to the end: from there the arrows go on.
  const parts = [...selection.parts.filter((id) => id !== next), next];
  select({ parts, wires: [], terminal: null });
  say(`${parts.length} in hand`);
}
