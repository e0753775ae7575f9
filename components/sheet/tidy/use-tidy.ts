'use client';

import { useCallback } from 'react';
import { applyPatch } from '@/diagram/document/patch';
import type { Face } from '@/diagram/document/schema';
import { tidyByBands } from '@/diagram/commands/tidy';
import type { Hands } from '../hands';

/** Works out how the sheet would stand when tidied, and shows it as a ghost: nothing is moved before it is taken. */
export function useTidy(hands: Hands, face: Face): () => void {
  return useCallback(() => {
    if (!hands.mayEdit) return hands.store.getState().say('You may read this drawing.');
    const { parts } = hands.store.getState().selection;
    const command = tidyByBands(hands.doc, face, parts.length > 1 ? parts : null);
    const preview = applyPatch(hands.doc, command.patch);
    const before = hands.doc.sheet?.[face] ?? {};
    const moved = Object.entries(preview.sheet?.[face] ?? {}).filter(
      ([id, at]) => before[id] && (before[id].x !== at.x || before[id].y !== at.y),
    ).length;
    if (moved === 0) return hands.store.getState().say('All stands as the sheet would place it.');
    hands.view.getState().setMode({ kind: 'tidy', preview, moved });
    hands.view.getState().set({ ghost: preview });
  }, [hands, face]);
}
