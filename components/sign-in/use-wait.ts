'use client';

import { useEffect, useState } from 'react';

/** Counts seconds down to nothing, by the clock, so that a sleeping tab does not lengthen the wait. */
export function useWait() {
  const [until, setUntil] = useState(0);
  const [seconds, setSeconds] = useState(0);
  useEffect(() => {
    if (until === 0) return;
    const tick = () => setSeconds(Math.max(0, Math.ceil((until - Date.now()) / 1000)));
    tick();
    const timer = setInterval(tick, 250);
    return () => clearInterval(timer);
  }, [until]);
  return { seconds, start: (length: number) => setUntil(Date.now() + length * 1000) };
}
