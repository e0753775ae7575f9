'use client';

import { useEffect, useRef, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';

interface MarginProps {
  children: ReactNode;
  label: string;
  /** above: on a narrow screen it lies above the sheet; drawer: it comes up from the foot, and the sheet stays in sight */
  narrow: 'above' | 'drawer';
  open: boolean;
  onClose(): void;
}

const beside = 'lap:static lap:visible lap:block lap:h-auto lap:max-h-none lap:w-[304px] lap:shrink-0 lap:overflow-y-auto lap:border-t-0 lap:border-r-0 lap:border-b-0 lap:border-l lap:border-rule lap:px-4 lap:py-4';
const above = 'order-first border-b border-rule px-4 py-3 lap:order-none';

/** What is to be answered on this sheet, at its right. */
export function Margin({ children, label, narrow, open, onClose }: MarginProps) {
  const box = useRef<HTMLElement>(null);
  useEffect(() => {
    if (open) box.current?.focus();
  }, [open]);
  if (narrow === 'above')
    return (
      <aside aria-label={label} className={`${above} ${beside}`}>
        {children}
      </aside>
    );
  return (
    <aside
      ref={box}
      tabIndex={-1}
      aria-label={label}
      className={`fixed inset-x-0 bottom-0 z-20 max-h-[54dvh] overflow-y-auto border-t-2 border-ink bg-paper p-4 outline-none ${open ? '' : 'invisible'} ${beside}`}
      onKeyDown={(event) => event.key === 'Escape' && onClose()}
    >
      <div className="float-right mb-2 ml-4 lap:hidden">
        <Button className="min-h-12 px-4" onClick={onClose}>
          Back to the sheet
        </Button>
      </div>
      {children}
    </aside>
  );
}
