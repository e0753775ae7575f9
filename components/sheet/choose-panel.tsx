'use client';

import { useLayoutEffect, useRef } from 'react';
import { Button } from '@/components/ui/button';
import { KIND_NAME } from '@/diagram/document/kinds';
import { nameOf } from '@/diagram/document/names';
import type { End } from '@/diagram/document/schema';
import type { Hands } from './hands';
import type { Mode } from './view';

interface ChoosePanelProps {
  mode: Extract<Mode, { kind: 'choose' }>;
  hands: Hands;
  onLeave(): void;
}

/** Two terminals lie closer together than a finger tells apart: which one is meant. */
export function ChoosePanel({ mode, hands, onLeave }: ChoosePanelProps) {
  const first = useRef<HTMLButtonElement>(null);
  useLayoutEffect(() => first.current?.focus(), []);
  const words = ([id, mark]: End) => {
    const part = hands.doc.parts.find((candidate) => candidate.id === id);
    return part ? `${nameOf(hands.doc, part)}:${mark}, ${KIND_NAME[part.kind]}` : `${id}:${mark}`;
  };
  return (
    <div
      role="dialog"
      aria-label="Which terminal"
      className="flex flex-col gap-2 border-y-2 border-ink bg-paper p-3"
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape') onLeave();
      }}
    >
      <h2 className="text-head font-bold">Which one?</h2>
      {mode.ends.map((end, i) => (
        <Button
          key={end.join(' ')}
          ref={i === 0 ? first : undefined}
          className="min-h-12 w-full px-4"
          onClick={() => {
            hands.view.getState().setMode(mode.back);
            hands.tap(end, end[0], true);
          }}
        >
          {words(end)}
        </Button>
      ))}
      <Button className="min-h-12 w-full px-4" onClick={onLeave}>
        Neither
      </Button>
    </div>
  );
}
