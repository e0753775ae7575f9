'use client';

import { useLayoutEffect, useRef } from 'react';
import { draftWords } from '@/components/survey/draft-words';
import { Button, ButtonLink } from '@/components/ui/button';
import { diff } from '@/diagram/document/patch';
import type { Hands } from './hands';
import type { Mode } from './view';

interface DraftPanelProps {
  mode: Extract<Mode, { kind: 'draft' }>;
  hands: Hands;
  onLeave(): void;
}

/** What the survey would draw lies dashed on the sheet: taken as one step, or left. */
export function DraftPanel({ mode, hands, onLeave }: DraftPanelProps) {
  const take = useRef<HTMLButtonElement>(null);
  useLayoutEffect(() => take.current?.focus(), []);
  const patch = diff(hands.doc, mode.preview);
  return (
    <div
      role="dialog"
      aria-label="Draft of the survey"
      className="flex flex-col gap-2 border-y-2 border-ink bg-paper p-3"
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape') onLeave();
      }}
    >
      <h2 className="text-head font-bold">The draft, dashed</h2>
      <p>{draftWords(hands.doc, patch) || 'Nothing would change.'}</p>
      <p className="text-grey">What you moved by hand stays where it is; one undo takes it back.</p>
      <div className="flex flex-wrap gap-2">
        <Button
          ref={take}
          solid
          onClick={() => {
            onLeave();
            hands.do({ label: 'Draft the survey', patch });
            hands.view.getState().camera?.all();
          }}
        >
          Draft it so
        </Button>
        <ButtonLink href={`/jobs/${hands.store.getState().jobId}/survey`}>Back to the survey</ButtonLink>
        <Button onClick={onLeave}>Leave</Button>
      </div>
    </div>
  );
}
