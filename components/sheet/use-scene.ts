'use client';

import { useEffect, useMemo, useRef, useSyncExternalStore } from 'react';
import type { Face, Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import type { Scene } from '@/diagram/layout/scene';
import { stableScene } from './canvas/stable-scene';

const never = () => () => undefined;

/**
 * False on the server and in the first paint, which show paper, border and title block: the drawing itself is worked out
 * in the browser alone, once, and not sent as pages of markup as well.
 */
export const useBrowser = (): boolean =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );

/**
 * A face as a scene; what did not change keeps its identity, and its way.
 * @param base what a ghost is drawn over: it differs from that and not from the ghost before
 */
export function useScene(
  document: Installation | null,
  face: Face,
  place: string | null,
  base: Scene | null = null,
): Scene | null {
  const before = useRef<Scene | null>(null);
  const scene = useMemo(
    // eslint-disable-next-line react-hooks/refs -- what a change does not touch keeps its way; a late scene costs time alone
    () => (document ? buildScene(document, face, { before: base ?? before.current, ...(place !== null && { place }) }) : null),
    [document, face, place, base],
  );
  // eslint-disable-next-line react-hooks/refs -- the scene before is a cache: reading it late costs drawing time, never correctness
  const stable = useMemo(() => scene && stableScene(before.current, scene), [scene]);
  useEffect(() => {
    before.current = stable;
  }, [stable]);
  return stable;
}
