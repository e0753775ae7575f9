'use client';

import { useMemo } from 'react';
import { useStore } from 'reactflow';
import { PX } from './units';

/** A stretch of the drawing's width, 1/100 mm. */
export interface Sight {
  left: number;
  right: number;
}

/** px of the canvas at zoom 1: the sight moves on in steps of this, so that a pan seldom draws anything anew */
const STEP = 600;

/**
 * The stretch of the drawing that is in sight, and a step more on either side: lettering outside it is not drawn. Homes
 * grow to the side, so that their height needs no such care.
 */
export function useSight(): Sight {
  const steps = useStore(({ transform: [x, , zoom], width }) => {
    const from = Math.floor(-x / zoom / STEP) - 1;
    const to = Math.ceil((width - x) / zoom / STEP) + 1;
    return `${from} ${to}`;
  });
  return useMemo(() => {
    const [from = 0, to = 0] = steps.split(' ').map(Number);
    return { left: (from * STEP) / PX, right: (to * STEP) / PX };
  }, [steps]);
}

export const inSight = (sight: Sight, x: number, width = 0): boolean => x <= sight.right && x + width >= sight.left;
