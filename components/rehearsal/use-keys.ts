'use client';

import { useCallback, type KeyboardEvent } from 'react';
import { isTyping, useSingleKeys, useSingleKeysOn } from '@/components/frame/single-keys';
import type { KeyHelp } from '@/components/frame/types';
import { firstPart, nextPart, type Direction } from '@/components/sheet/navigate';
import type { Walk as Conductors } from '@/diagram/commands/walk';
import type { Installation } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import { faultsAt } from '@/diagram/rehearsal/fault-places';
import { nextSetting, settingsOf } from '@/diagram/rehearsal/settings';
import { conditionShown, stationIndex, walkIn, type RehearsalStore } from './state';

export const REHEARSAL_KEYS: readonly KeyHelp[] = [
  { keys: ['↑', '↓', '←', '→'], does: 'follow the conductor; in a walk left and right step' },
  { keys: ['Enter'], does: 'turn the switch or device in hand' },
  { keys: ['c'], does: 'next condition' },
  { keys: ['f'], does: 'a fault at the part in hand' },
  { keys: ['Space'], does: 'play the walk, unless your system asks for less motion' },
  { keys: ['g'], does: 'the connections of this place, and back' },
  { keys: ['Esc'], does: 'one step back: the choice, the fault, the part in hand' },
];

const ARROWS: Readonly<Record<string, Direction>> = {
  ArrowUp: 'up',
  ArrowDown: 'down',
  ArrowLeft: 'left',
  ArrowRight: 'right',
};

interface Sheet {
  store: RehearsalStore;
  document: Installation;
  conductors: Conductors;
  scene: Scene;
  play(): void;
  otherFace(): void;
}

/** One step back: what is open closes, then the fault goes, then the hand lets go. */
export function stepBack(store: RehearsalStore): void {
  const state = store.getState();
  if (state.choosing) state.set({ choosing: false });
  else if (state.faults.length > 0) state.clearFaults();
  else if (state.hand !== null) state.take(null);
}

/** Keys of the rehearsal. Arrows, Enter and Space act while the drawing has the focus, letters from anywhere but fields. */
export function useRehearsalKeys({ store, document, conductors, scene, play, otherFace }: Sheet) {
  const letters = useSingleKeysOn();
  useSingleKeys({
    c() {
      const { answer, setCondition } = store.getState();
      if (!answer) return;
      const now = answer.conditions.indexOf(conditionShown(store.getState()));
      setCondition(answer.conditions[(now + 1) % answer.conditions.length]!);
    },
    f() {
      const { hand, set } = store.getState();
      const part = document.parts.find(({ id }) => id === hand);
      if (part && faultsAt(part).length > 0) return set({ choosing: true });
      set({
        said: part
          ? 'No fault can be put in here: take a load, an outlet or the supply in hand.'
          : 'Take a part in hand first.',
      });
    },
    g: otherFace,
    Escape: () => stepBack(store),
  });
  return useCallback(
    (event: KeyboardEvent) => {
      if (event.altKey || event.ctrlKey || event.metaKey || isTyping(event.target)) return;
      // Buttons that lie on the sheet keep their own keys.
      if (event.target !== event.currentTarget) return;
      const state = store.getState();
      const direction = ARROWS[event.key];
      const done = () => {
        event.preventDefault();
        event.stopPropagation();
      };
      if (direction) {
        done();
        if (walkIn(state) && (direction === 'left' || direction === 'right'))
          return state.step(stationIndex(state) + (direction === 'left' ? -1 : 1));
        const known = state.hand !== null && scene.parts.some(({ id }) => id === state.hand);
        const next = known ? nextPart(document, conductors, scene, state.hand!, direction) : firstPart(scene);
        if (next) state.take(next);
        return;
      }
      if (event.key === 'Enter') {
        const part = document.parts.find(({ id }) => id === state.hand);
        const now = part && (state.stance?.moved[part.id] ?? state.answer?.settings[part.id]);
        if (!part || now === undefined || settingsOf(part).length === 0) return;
        done();
        return state.operate(part.id, nextSetting(part, now));
      }
      if (event.key === ' ') {
        done();
        play();
      }
      // Where single letters are switched off, Esc still leads back: it is no letter.
      if (event.key === 'Escape' && !letters) {
        done();
        stepBack(store);
      }
    },
    [store, document, conductors, scene, play, letters],
  );
}
