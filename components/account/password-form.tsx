'use client';

import { useState, type FormEvent } from 'react';
import { Button } from '@/components/ui/button';
import { DoneLine, ErrorLine } from '@/components/ui/error-line';
import { CheckField, TextField } from '@/components/ui/field';
import { callApi } from '@/lib/shared/api-client';
import { PasswordSchema } from '@/lib/shared/people';

type Wrong = Partial<Record<'current' | 'next' | 'again', string>>;
const EMPTY = { current: '', next: '', again: '' };

/** Changes one's own password; all other sign-ins end with it. */
export function PasswordForm() {
  const [typed, setTyped] = useState(EMPTY);
  const [wrong, setWrong] = useState<Wrong>({});
  const [refusal, setRefusal] = useState('');
  const [done, setDone] = useState(false);
  const [busy, setBusy] = useState(false);
  const [shown, setShown] = useState(false);

  const submit = async (event: FormEvent) => {
    event.preventDefault();
    setDone(false);
    setRefusal('');
    const read = PasswordSchema.safeParse(typed.next);
    const errors: Wrong = {
      ...(typed.current === '' && { current: 'Type your present password.' }),
      ...(!read.success && { next: read.error.issues[0]!.message }),
      ...(typed.again !== typed.next && { again: 'The two are not the same.' }),
    };
    setWrong(errors);
    if (Object.keys(errors).length > 0) return;
    setBusy(true);
    const answer = await callApi<unknown>('POST', '/api/account/password', { current: typed.current, next: typed.next });
    setBusy(false);
    if (!answer.ok) {
      setWrong(answer.refusal.fields ?? {});
      return setRefusal(answer.refusal.message);
    }
    setTyped(EMPTY);
    setDone(true);
  };

  const field = (name: keyof typeof EMPTY, label: string, autoComplete: string) => (
    <TextField
      label={label}
      type={shown ? 'text' : 'password'}
      autoComplete={autoComplete}
      value={typed[name]}
      error={wrong[name]}
      onChange={(event) => setTyped({ ...typed, [name]: event.target.value })}
    />
  );

  return (
    <form noValidate aria-label="Change the password" className="flex max-w-[400px] flex-col gap-4" onSubmit={(event) => void submit(event)}>
      {field('current', 'Present password', 'current-password')}
      {field('next', 'New password', 'new-password')}
      {field('again', 'The same again', 'new-password')}
      <CheckField label="Show the passwords" checked={shown} onChange={(event) => setShown(event.target.checked)} />
      {refusal && <ErrorLine>{refusal}</ErrorLine>}
      {done && <DoneLine>The password is changed. Your other sign-ins have ended.</DoneLine>}
      <div>
        <Button type="submit" solid disabled={busy}>
          {busy ? 'Changing' : 'Change the password'}
        </Button>
      </div>
    </form>
  );
}
