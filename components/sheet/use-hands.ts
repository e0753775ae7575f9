'use client';

import { useLayoutEffect, useState } from 'react';
import type { Installation } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import { Hands } from './hands';
import { newUuid } from './identity';
import type { DrawingStore } from './store';
import type { View } from './view';

/** The hands of this sheet, on the scene that is on the canvas. @param of the document that it shows */
export function useHands(store: DrawingStore, view: View, scene: Scene, of: Installation): Hands {
  const [hands] = useState(() => {
    const prefix = newUuid().slice(0, 8);
    let n = 0;
    return new Hands({ store, view, newId: () => `p${prefix}-${(n++).toString(36)}` });
  });
  // Before the first render is seen and before any key can arrive.
  useLayoutEffect(() => hands.show(scene, of), [hands, scene, of]);
  return hands;
}
