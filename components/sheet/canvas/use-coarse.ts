'use client';

import { useEffect, useState } from 'react';

/**
 * True while the pointer is a finger: then one finger pans, and a part is moved only after it was held. A screen that takes
 * both goes by whichever touched it last.
 */
export function useCoarse(): boolean {
  const [coarse, setCoarse] = useState(false);
  useEffect(() => {
    const query = matchMedia('(pointer: coarse)');
    const look = () => setCoarse(query.matches);
    const touched = (event: PointerEvent) => setCoarse(event.pointerType === 'touch');
    look();
    query.addEventListener('change', look);
    window.addEventListener('pointerdown', touched, true);
    return () => {
      query.removeEventListener('change', look);
      window.removeEventListener('pointerdown', touched, true);
    };
  }, []);
  return coarse;
}
