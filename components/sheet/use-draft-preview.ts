'use client';

import { useEffect } from 'react';
import { applyPatch, isEmptyPatch } from '@/diagram/document/patch';
import type { Hands } from './hands';
import type { OpenDrawing } from './use-drawing';

/** Lays what the survey would draw over the sheet as a ghost, once, when the survey has asked for it. */
export function useDraftPreview(drawing: OpenDrawing, hands: Hands, wanted: boolean, hoursWanted: number): void {
  useEffect(() => {
    if (!wanted) return;
    let here = true;
    // Not before what was left unsent on this device has been found: the draft is made of the newest survey.
    void Promise.all([import('@/diagram/survey/draft'), drawing.keeper.ready]).then(([{ draftPatch }]) => {
      if (!here) return;
      const patch = draftPatch(hands.doc, hoursWanted);
      if (!hands.mayEdit || isEmptyPatch(patch)) return hands.store.getState().say('Sheet 2 is in step with the survey.');
      const preview = applyPatch(hands.doc, patch);
      hands.view.getState().setMode({ kind: 'draft', preview });
      hands.view.getState().set({ ghost: preview });
    });
    return () => {
      here = false;
    };
  }, [drawing, hands, wanted, hoursWanted]);
}
