'use client';

import type { ReactNode } from 'react';
import { WaitLine } from '@/components/ui/wait-line';
import { Paper } from './paper';

/** While a sheet is fetched: paper, grid and border at once, then words in the foot. */
export function LoadingSheet({ children }: { children: ReactNode }) {
  return (
    <div className="flex h-dvh flex-col p-1 sm:px-2 sm:pb-2">
      <div className="min-h-12 lap:h-8 lap:min-h-0" />
      <Paper>
        <div className="flex-1" />
        <div className="min-h-[72px] border-t-[1.6px] border-ink px-4 py-2">
          <WaitLine
            retry={
              <button type="button" className="cursor-pointer text-ink underline underline-offset-[3px]" onClick={() => window.location.reload()}>
                Try again
              </button>
            }
          >
            {children}
          </WaitLine>
        </div>
      </Paper>
    </div>
  );
}
