'use client';

import { useCallback, useMemo, useRef, type RefObject } from 'react';
import { useView, type OutlineState, type View } from '@/components/sheet/view';

/** The focus between the canvas and the outline: what one of them opened gives it back to that one. */
export interface TwoHands {
  /** the outline is open */
  shown: boolean;
  /** back to where the hands were */
  back(): void;
  toSheet(): void;
  openOutline(): void;
  closeOutline(): void;
  /** the outline says how its line in hand is focused; null when it closes */
  ready(focus: (() => void) | null): void;
}

export function useTwoHands(view: View, sheet: RefObject<HTMLDivElement | null>): TwoHands {
  const shown = useView((state) => state.outline.shown);
  const outline = useRef<(() => void) | null>(null);
  const set = useCallback(
    (change: Partial<OutlineState>) => view.getState().set({ outline: { ...view.getState().outline, ...change } }),
    [view],
  );
  const focusSheet = useCallback(() => {
    if (document.activeElement !== sheet.current) sheet.current?.focus({ preventScroll: true });
  }, [sheet]);
  const back = useCallback(() => {
    if (view.getState().outline.hand && outline.current) outline.current();
    else focusSheet();
  }, [view, focusSheet]);
  const toSheet = useCallback(() => {
    if (view.getState().outline.hand) set({ hand: false });
    focusSheet();
  }, [view, set, focusSheet]);
  const openOutline = useCallback(() => {
    set({ shown: true, hand: true });
    outline.current?.();
  }, [set]);
  const closeOutline = useCallback(() => {
    set({ shown: false, hand: false });
    focusSheet();
  }, [set, focusSheet]);
  const ready = useCallback((focus: (() => void) | null) => {
    outline.current = focus;
  }, []);
  return useMemo(
    () => ({ shown, back, toSheet, openOutline, closeOutline, ready }),
    [shown, back, toSheet, openOutline, closeOutline, ready],
  );
}
