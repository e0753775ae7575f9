'use client';

import { useReactFlow } from 'reactflow';
import { Button } from '@/components/ui/button';

/** Nearer, farther, all of it: for hands without a wheel. */
export function Zoom() {
  const flow = useReactFlow();
  return (
    <div className="absolute right-2 bottom-2 z-[6] flex gap-1 lap:top-2 lap:bottom-auto">
      <Button className="pointer-coarse:hidden" aria-label="Farther" onClick={() => void flow.zoomOut()}>
        −
      </Button>
      <Button className="pointer-coarse:hidden" aria-label="Nearer" onClick={() => void flow.zoomIn()}>
        +
      </Button>
      <Button onClick={() => void flow.fitView({ padding: 0.02 })}>Whole sheet</Button>
    </div>
  );
}
