'use client';

import { useLayoutEffect, useState, type ReactNode, type RefObject } from 'react';
import type { Point } from '@/diagram/layout/scene';

export interface Box {
  width: number;
  height: number;
}

/** Where a panel of this width stands so that the point it speaks of stays in sight. */
function beside(at: Point | undefined, box: Box, width: number): { left: number; top: number } {
  if (!at) return { left: Math.max(8, box.width - width - 12), top: 12 };
  const right = at.x + 48 + width <= box.width;
  const left = right ? Math.max(8, at.x + 48) : Math.max(8, at.x - 48 - width);
  return { left, top: Math.max(12, Math.min(box.height - 320, at.y - 40)) };
}

interface FloatingProps {
  box: Box;
  at?: Point | undefined;
  width: number;
  children: ReactNode;
}

/** A panel that lies on the sheet, beside the point it speaks of. */
export function Floating({ box, at, width, children }: FloatingProps) {
  const fits = Math.min(width, Math.max(200, box.width - 16));
  const place = beside(at, box, fits);
  return (
    <div
      className="absolute z-10 overflow-y-auto border-x border-rule bg-paper"
      style={{ ...place, width: fits, maxHeight: Math.max(160, box.height - place.top - 4) }}
    >
      {children}
    </div>
  );
}

/** A panel as the foot of the screen, where a hand that holds the tablet reaches it. */
export function AtFoot({ children }: { children: ReactNode }) {
  return <div className="absolute inset-x-0 bottom-0 z-10 max-h-[70%] overflow-y-auto">{children}</div>;
}

/** The size of an element on the screen, in px. */
export function useBox(of: RefObject<HTMLElement | null>): Box {
  const [box, setBox] = useState<Box>({ width: 0, height: 0 });
  useLayoutEffect(() => {
    const element = of.current;
    if (!element) return;
    const observer = new ResizeObserver(() => setBox({ width: element.clientWidth, height: element.clientHeight }));
    observer.observe(element);
    return () => observer.disconnect();
  }, [of]);
  return box;
}
