'use client';

import { useEffect, useRef } from 'react';
import { Button } from '@/components/ui/button';
import { diff } from '@/diagram/document/patch';
import type { Hands } from '../hands';
import type { Mode } from '../view';

/** How the sheet would stand, shown dashed; taken as one step or left. */
export function TidyPanel({
  mode,
  hands,
  onLeave,
}: {
  mode: Extract<Mode, { kind: 'tidy' }>;
  hands: Hands;
  onLeave(): void;
}) {
  const first = useRef<HTMLButtonElement>(null);
  useEffect(() => first.current?.focus(), []);
  return (
    <div
      role="dialog"
      aria-label="Tidy"
      className="flex flex-col gap-2 border-y-2 border-ink bg-paper p-3"
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape') onLeave();
      }}
    >
      <h2 className="text-head font-bold">Tidy moves {mode.moved === 1 ? 'one part' : `${mode.moved} parts`}</h2>
      <p>What was moved by hand stays where it is. One undo takes it back.</p>
      <div className="flex gap-2">
        <Button
          ref={first}
          solid
          onClick={() => {
            const patch = diff(hands.doc, mode.preview);
            onLeave();
            hands.do({ label: 'Tidy the sheet', patch });
          }}
        >
          Take it so
        </Button>
        <Button onClick={onLeave}>Leave</Button>
      </div>
    </div>
  );
}
