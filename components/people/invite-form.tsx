'use client';

import { useState, type FormEvent } from 'react';
import { RefusalLine } from '@/components/frame/refusal-line';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { InviteSchema, type PersonRole } from '@/lib/shared/people';
import { RoleBoxes } from './role-boxes';
import type { People } from './use-people';

/** Takes a person into the team; what was typed stays until it has worked. */
export function InviteForm({ state, onClose }: { state: People; onClose(): void }) {
  const [name, setName] = useState('');
  const [email, setEmail] = useState('');
  const [roles, setRoles] = useState<PersonRole[]>(['apprentice']);

  const submit = async (event: FormEvent) => {
    event.preventDefault();
    const read = InviteSchema.safeParse({ name, email: email.trim(), roles });
    if (!read.success) {
      const wrong: Record<string, string> = {};
      for (const issue of read.error.issues) wrong[String(issue.path[0])] ??= issue.message;
      state.refuse(wrong);
      return;
    }
    if (await state.invite(read.data)) onClose();
  };

  return (
    <form noValidate aria-label="Invite a person" className="max-w-[560px] border-l-2 border-ink pl-4" onSubmit={(event) => void submit(event)}>
      <h2 className="text-head font-bold">Invite a person</h2>
      <div className="mt-3 grid gap-x-8 gap-y-4 sm:grid-cols-2">
        <TextField label="Name" autoFocus value={name} maxLength={80} error={state.fields.name} onChange={(event) => setName(event.target.value)} />
        <TextField label="E-mail" type="email" value={email} maxLength={254} error={state.fields.email} onChange={(event) => setEmail(event.target.value)} />
        <RoleBoxes roles={roles} error={state.fields.roles} onChange={setRoles} />
      </div>
      {state.refusal && (
        <div className="mt-3">
          <RefusalLine refusal={state.refusal} />
        </div>
      )}
      <div className="mt-4 flex gap-2">
        <Button type="submit" solid disabled={state.busy !== null}>
          {state.busy === 'new' ? 'Inviting' : 'Invite and show the link'}
        </Button>
        <Button onClick={onClose}>Leave</Button>
      </div>
    </form>
  );
}
