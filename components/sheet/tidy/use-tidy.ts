'use client';

import { useCallback } from 'react';
import { tidyByBands } from '@/diagram/commands/tidy';
import type { Command } from '@/diagram/commands/types';
import { applyPatch } from '@/diagram/document/patch';
import type { Face, Installation } from '@/diagram/document/schema';
import type { Hands } from '../hands';
import { elkCommand, elkGraph } from './elk-graph';
import { layOut } from './elk';

/** How a face may be tidied: in the order of current, or, on the connections face, for short wires. */
export type TidyWay = 'current' | 'short';

const movedBy = (doc: Installation, preview: Installation, face: Face): number => {
  const before = doc.sheet?.[face] ?? {};
  return Object.entries(preview.sheet?.[face] ?? {}).filter(
    ([id, at]) => before[id]?.x !== at.x || before[id]?.y !== at.y,
  ).length;
};

/** The parts to be placed anew: those in hand where there are several, else all; never what a person has pinned. */
function chosen(hands: Hands, face: Face): Set<string> {
  const { parts } = hands.store.getState().selection;
  const places = hands.doc.sheet?.[face] ?? {};
  const ids = parts.length > 1 ? parts : hands.scene().parts.map((part) => part.id);
  return new Set(ids.filter((id) => !places[id]?.pinned));
}

/**
 * Works out how the sheet would stand when tidied, and shows it as a ghost: nothing is moved before it is taken.
 */
export function useTidy(hands: Hands, face: Face): (way?: TidyWay) => void {
  return useCallback(
    (way = 'current') => {
      const { say, selection } = hands.store.getState();
      if (!hands.mayEdit) return say('You may read this drawing.');
      const show = (command: Command) => {
        const preview = applyPatch(hands.doc, command.patch);
        const moved = movedBy(hands.doc, preview, face);
        hands.view.getState().setMode({ kind: 'tidy', way, preview, moved });
        hands.view.getState().set({ ghost: preview });
      };
      if (way === 'current')
        return show(tidyByBands(hands.doc, face, selection.parts.length > 1 ? selection.parts : null));
      const { doc } = hands;
      void layOut(elkGraph(hands.scene(), chosen(hands, face))).then(
        (found) => {
          if (hands.doc !== doc) return;
          if (found) show(elkCommand(doc, hands.scene(), found));
          else say('No tidy drawing was found in three seconds. Take fewer parts in hand.');
        },
        () => say('The layout could not be worked out. Nothing was moved.'),
      );
    },
    [hands, face],
  );
}
