'use client';

import { useCallback, useEffect, useRef } from 'react';
import { stationIndex, walkIn, type RehearsalStore } from './state';

/** ms at a station: long enough to read what it says */
const STAY = 2600;

/** Plays a walk when asked to, and stops when asked again, at its end, or as soon as anything else is done. */
export function usePlay(store: RehearsalStore): () => void {
  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);
  const stop = useCallback(() => {
    if (timer.current) clearTimeout(timer.current);
    timer.current = null;
  }, []);
  useEffect(() => stop, [stop]);
  return useCallback(() => {
    if (timer.current) return stop();
    const walk = walkIn(store.getState());
    if (!walk) return;
    if (matchMedia('(prefers-reduced-motion: reduce)').matches)
      return store
        .getState()
        .set({ said: 'Nothing plays by itself here: your system asks for less motion. Step with the arrows.' });
    if (stationIndex(store.getState()) === walk.stations.length - 1) store.getState().step(0);
    let expected = stationIndex(store.getState());
    const next = () => {
      const state = store.getState();
      // Somebody has stepped by hand, or the walk is another one.
      if (walkIn(state) !== walk || stationIndex(state) !== expected || expected === walk.stations.length - 1)
        return stop();
      expected++;
      state.step(expected);
      timer.current = setTimeout(next, STAY);
    };
    timer.current = setTimeout(next, STAY);
  }, [store, stop]);
}
