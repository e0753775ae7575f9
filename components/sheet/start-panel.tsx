'use client';

import { Button, ButtonLink } from '@/components/ui/button';
import type { Hands } from './hands';

const BANDS = ['SUPPLY', 'METER', 'MAIN PROTECTION', 'BOARD', 'ROOMS'];

/** An empty sheet: the bands with their names, and the two ways to begin. */
export function StartPanel({ jobId, hands, mayEdit }: { jobId: string; hands: Hands; mayEdit: boolean }) {
  return (
    <div className="absolute inset-0 flex flex-col" aria-label="Empty sheet">
      {BANDS.map((band, i) => (
        <div key={band} className={`flex flex-1 items-center gap-6 px-4 ${i > 0 ? 'border-t border-hair' : ''}`}>
          <span className="w-40 shrink-0 tracking-[2px] text-grey max-sm:w-auto max-sm:text-small">{band}</span>
          {i === 0 && mayEdit && (
            <div className="flex flex-wrap gap-2">
              <ButtonLink href={`/jobs/${jobId}/survey`}>Start from the survey</ButtonLink>
              <Button solid onClick={() => hands.placeSupply()} data-first>
                Place the supply
              </Button>
            </div>
          )}
          {i === 1 && mayEdit && (
            <p className="max-w-96 text-grey max-sm:hidden">
              The supply brings fuse, meter, main switch, rcd and bars; from there the sheet is drawn by extending: e.
            </p>
          )}
          {i === 0 && !mayEdit && <p className="text-grey">Nothing is drawn yet.</p>}
        </div>
      ))}
    </div>
  );
}
