'use client';

import { useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Note } from '@/components/ui/note';
import type { GivenLink as Given } from './use-people';

/** A one-time link, shown once: the admin passes it on by a way of their own. */
export function GivenLink({ given, onClose }: { given: Given; onClose(): void }) {
  const field = useRef<HTMLInputElement>(null);
  const [said, setSaid] = useState('');
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(given.link);
      setSaid('Copied.');
    } catch {
      field.current?.select();
      setSaid('Marked: copy it with Ctrl C.');
    }
  };
  return (
    <Note
      inHand
      tone="person"
      heading={`A link for ${given.name}`}
      meta={`works once, until ${given.expiresAt.slice(0, 10)}`}
      actions={
        <>
          <Button tone="blue" onClick={() => void copy()}>
            Copy the link
          </Button>
          <Button onClick={onClose}>I have passed it on</Button>
        </>
      }
    >
      <p>Pass it on yourself, to nobody else: whoever opens it sets the password. It is not shown again.</p>
      <input
        ref={field}
        readOnly
        aria-label={`One-time link for ${given.name}`}
        value={given.link}
        className="mt-2 block w-full max-w-[760px] border border-rule bg-paper px-2 py-1 text-small"
        onFocus={(event) => event.target.select()}
      />
      <p role="status" className="min-h-4">
        {said}
      </p>
    </Note>
  );
}
