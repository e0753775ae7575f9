'use client';

import { useEffect, useState, type ReactNode } from 'react';

/** ms before anything is said: what is quick stays silent */
const SAY_AFTER = 300;
/** ms until slowness is admitted */
const SLOW_AFTER = 5000;

/** What is being fetched, in words; after five seconds it owns up to being slow and offers a way out. */
export function WaitLine({ children, retry }: { children: ReactNode; retry?: ReactNode }) {
  const [stage, setStage] = useState<'silent' | 'said' | 'slow'>('silent');
  useEffect(() => {
    const said = setTimeout(() => setStage('said'), SAY_AFTER);
    const slow = setTimeout(() => setStage('slow'), SLOW_AFTER);
    return () => {
      clearTimeout(said);
      clearTimeout(slow);
    };
  }, []);
  return (
    <p role="status" className="min-h-4 text-grey">
      {stage !== 'silent' && children}
      {stage === 'slow' && <span className="ml-2">Slow. Still trying.</span>}
      {stage === 'slow' && retry && <span className="ml-2">{retry}</span>}
    </p>
  );
}
