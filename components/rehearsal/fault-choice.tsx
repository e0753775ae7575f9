'use client';

import { useEffect, useRef } from 'react';
import { Button } from '@/components/ui/button';
import type { Part } from '@/diagram/document/schema';
import { FAULT_NAMES, faultsAt } from '@/diagram/rehearsal/fault-places';
import { useRehearsal, useRehearsalStore } from './state';

/** The faults that can be put in at the part in hand; a further one follows when the home is still after those before it. */
export function FaultChoice({ part, name }: { part: Part; name: string }) {
  const store = useRehearsalStore();
  const choosing = useRehearsal((state) => state.choosing);
  const second = useRehearsal((state) => state.faults.length > 0);
  const box = useRef<HTMLDivElement>(null);
  const kinds = faultsAt(part);
  useEffect(() => {
    if (choosing) box.current?.querySelector('button')?.focus();
  }, [choosing]);
  if (kinds.length === 0) return null;
  return (
    <div ref={box} role="group" aria-label={`${second ? 'A further fault' : 'A fault'} at ${name}`}>
      <p className="text-grey">
        {second ? `A further fault at ${name}, after this one:` : `Put a fault in at ${name}:`}
      </p>
      <div className="mt-1 flex flex-wrap gap-2">
        {kinds.map((kind) => (
          <Button key={kind} tone="red" onClick={() => store.getState().insert({ kind, at: part.id })}>
            {FAULT_NAMES[kind]}
          </Button>
        ))}
      </div>
    </div>
  );
}
