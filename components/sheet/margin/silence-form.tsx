'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import type { Silence } from '@/diagram/document/schema';
import type { Finding } from '@/diagram/rules/types';
import type { Hands } from '../hands';

/** Rules whose finding may be silenced by everybody who draws; a danger needs an electrician or trainer. */
export function SilenceForm({ finding, by, hands, onDone }: { finding: Finding; by: string; hands: Hands; onDone(): void }) {
  const [reason, setReason] = useState('');
  const silence = () => {
    const at = finding.parts[0] ?? finding.wires[0];
    if (!at || reason.trim() === '') return;
    const silenced: Silence[] = [...(hands.doc.silenced ?? []), { rule: finding.rule, at, reason: reason.trim(), by }];
    hands.do({ label: `Answer for: ${finding.heading}`, patch: { set: { silenced } } });
    onDone();
  };
  return (
    <form
      className="mt-2 flex flex-col gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        silence();
      }}
    >
      <TextField
        label="Why it may stand"
        hint={`Printed with the name ${by}.`}
        value={reason}
        maxLength={500}
        autoFocus
        onChange={(event) => setReason(event.target.value)}
      />
      <div className="flex gap-2">
        <Button type="submit" disabled={reason.trim() === ''}>
          Let it stand
        </Button>
        <Button onClick={onDone}>Leave</Button>
      </div>
    </form>
  );
}
