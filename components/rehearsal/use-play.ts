'use client';

import { useEffect, useMemo } from 'react';
import { createPlayer } from './player';
import type { RehearsalStore } from './state';

/** Plays a walk when asked to, and stops when asked again or when the sheet is left. */
export function usePlay(store: RehearsalStore): () => void {
  const player = useMemo(() => createPlayer(store), [store]);
  useEffect(() => player.stop, [player]);
  return player.toggle;
}
