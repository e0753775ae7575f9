'use client';

import { useDrawing, useSheet, type Me, type OpenDrawing } from '@/components/sheet/use-drawing';
import type { Patch } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';
import type { DrawingRights, DrawingView, TitleBlock } from '@/lib/shared/drawings';

/** The drawing as the survey needs it: the document, and one way to change it. */
export interface SurveyDocument {
  drawing: OpenDrawing;
  document: Installation;
  rights: DrawingRights;
  titleBlock: TitleBlock;
  /** one named command, one undo; false when it changes nothing or the drawing may only be read */
  run(label: string, patch: Patch): boolean;
  undo(): void;
  redo(): void;
}

/** Opens the drawing that all sheets of the job share in this window. */
export function useSurveyDocument(view: DrawingView, me: Me): SurveyDocument {
  const drawing = useDrawing(view, me);
  const { store } = drawing;
  return {
    drawing,
    document: useSheet(store, (state) => state.document),
    rights: useSheet(store, (state) => state.rights),
    titleBlock: useSheet(store, (state) => state.titleBlock),
    run: useSheet(store, (state) => state.run),
    undo: useSheet(store, (state) => state.undo),
    redo: useSheet(store, (state) => state.redo),
  };
}
