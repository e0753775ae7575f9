import type { ReactNode } from 'react';
import { GridEdge } from './grid-edge';

/** The drawing sheet itself: paper on the desk, grid, border. Everything else stands inside the border. */
export function Paper({ children, className = '' }: { children: ReactNode; className?: string }) {
  return (
    <div className={`relative flex min-h-0 flex-1 flex-col border border-rule bg-paper p-1 sm:p-4 ${className}`}>
      <GridEdge />
      <div className="relative flex min-h-0 flex-1 flex-col border-[1.5px] border-ink sm:border-[2.4px]">{children}</div>
    </div>
  );
}
