import { copyRoom, type RoomCopy } from '@/diagram/commands/copy-room';
import { isRefusal } from '@/diagram/commands/types';
import type { Hands } from './hands';
import { REST } from './view';

/** Copying a room whole. */

/** Asks how a room is to be copied: the one named, else that of the part in hand. */
export function askForCopy(hands: Hands, place?: string): void {
  const { selection, say } = hands.store.getState();
  const room = place ?? hands.doc.parts.find((part) => part.id === selection.parts[0])?.place;
  if (!hands.mayEdit) say('You may read this drawing.');
  else if (room === undefined) say('Take a part of the room in hand first.');
  else hands.view.getState().setMode({ kind: 'room', place: room });
}

/** @returns why it cannot be, else null */
export function copyInHand(hands: Hands, copy: RoomCopy): string | null {
  const outcome = copyRoom(hands.doc, copy, hands.newId);
  if (isRefusal(outcome)) return outcome.refused;
  hands.view.getState().setMode(REST);
  hands.do(outcome);
  return null;
}
