'use client';

import { useEffect, useRef } from 'react';
import { Button } from './button';

interface ConfirmBarProps {
  /** what will happen, and to whom */
  question: string;
  yes: string;
  no?: string;
  busy?: boolean;
  onYes(): void;
  onNo(): void;
}

/** Asks in place before something that hurts. The safe answer has the focus; Esc gives it. */
export function ConfirmBar({ question, yes, no = 'Leave it', busy = false, onYes, onNo }: ConfirmBarProps) {
  const safe = useRef<HTMLButtonElement>(null);
  useEffect(() => safe.current?.focus(), []);
  return (
    <div
      role="alertdialog"
      aria-label={question}
      className="flex flex-wrap items-center gap-x-4 gap-y-2 border-l-4 border-red bg-row py-2 pr-2 pl-3"
      onKeyDown={(event) => {
        if (event.key !== 'Escape') return;
        event.stopPropagation();
        onNo();
      }}
    >
      <p className="min-w-0 flex-1 basis-60">{question}</p>
      <div className="flex gap-2">
        <Button ref={safe} onClick={onNo}>
          {no}
        </Button>
        <Button tone="red" disabled={busy} onClick={onYes}>
          {yes}
        </Button>
      </div>
    </div>
  );
}
