'use client';

import { useEffect, useRef, useLayoutEffect } from 'react';
import { Button } from '@/components/ui/button';
import { Segmented } from '@/components/ui/segmented';
import { diff } from '@/diagram/document/patch';
import type { Hands } from '../hands';
import { useView, type Mode } from '../view';
import { standBy, standDown } from './elk';
import type { TidyWay } from './use-tidy';

const WAYS: readonly { value: TidyWay; label: string }[] = [
  { value: 'current', label: 'order of current' },
  { value: 'short', label: 'short wires' },
];

interface TidyPanelProps {
  mode: Extract<Mode, { kind: 'tidy' }>;
  hands: Hands;
  tidy(way: TidyWay): void;
  onLeave(): void;
}

/** How the sheet would stand, shown dashed; taken as one step or left. */
export function TidyPanel({ mode, hands, tidy, onLeave }: TidyPanelProps) {
  const face = useView((state) => state.face);
  const first = useRef<HTMLButtonElement>(null);
  useLayoutEffect(() => first.current?.focus(), []);
  useEffect(() => {
    if (face !== 'connections') return;
    standBy();
    return standDown;
  }, [face]);
  return (
    <div
      role="dialog"
      aria-label="Tidy"
      data-way={mode.way}
      className="flex flex-col gap-2 border-y-2 border-ink bg-paper p-3"
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape') onLeave();
      }}
    >
      <h2 className="text-head font-bold">
        {mode.moved === 0
          ? 'All stands in its place'
          : `Tidy moves ${mode.moved === 1 ? 'one part' : `${mode.moved} parts`}`}
      </h2>
      {face === 'connections' && (
        <Segmented label="Tidy by" showLabel segments={WAYS} value={mode.way} onChange={tidy} />
      )}
      <p>What was moved by hand stays where it is. One undo takes it back.</p>
      <div className="flex gap-2">
        <Button
          ref={first}
          solid
          disabled={mode.moved === 0}
          onClick={() => {
            const patch = diff(hands.doc, mode.preview);
            onLeave();
            hands.do({ label: mode.way === 'current' ? 'Tidy the sheet' : 'Tidy for short wires', patch });
          }}
        >
          Take it so
        </Button>
        <Button onClick={onLeave}>Leave</Button>
      </div>
    </div>
  );
}
