'use client';

import { useState, useSyncExternalStore, type FormEvent } from 'react';
import { Button } from '@/components/ui/button';
import { ErrorLine } from '@/components/ui/error-line';
import { callApi } from '@/lib/shared/api-client';
import { PasswordSchema } from '@/lib/shared/people';
import { signInByPassword } from '@/lib/shared/sign-in';
import { PasswordCells } from './password-cells';

const NO_TOKEN = 'This address is not whole: open the link as it was given to you.';

/** The token stands behind the #, which no server and no log gets to see. */
const readHash = () => window.location.hash.slice(1);
const never = () => () => undefined;

/** A person who was invited, or forgot the password, sets one and is signed in with it. */
export function AcceptForm() {
  const token = useSyncExternalStore(never, readHash, () => null);
  const [busy, setBusy] = useState(false);
  const [wrong, setWrong] = useState<{ password?: string; again?: string }>({});
  const [refusal, setRefusal] = useState('');

  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const typed = new FormData(event.currentTarget);
    const password = String(typed.get('password'));
    const read = PasswordSchema.safeParse(password);
    setRefusal('');
    if (!read.success) return setWrong({ password: read.error.issues[0]!.message });
    if (typed.get('again') !== password) return setWrong({ again: 'The two are not the same.' });
    setWrong({});
    setBusy(true);
    const answer = await callApi<{ email: string }>('POST', '/api/invitations/accept', { token, password });
    if (!answer.ok) {
      setBusy(false);
      setWrong({ password: answer.refusal.fields?.password });
      setRefusal(answer.refusal.fields?.token ? NO_TOKEN : answer.refusal.message);
      return;
    }
    const signedIn = await signInByPassword(answer.data.email, password);
    window.location.assign(signedIn.kind === 'in' ? '/jobs' : '/signin');
  };

  return (
    <form method="post" onSubmit={(event) => void submit(event)}>
      <p className="border-b border-ink px-4 py-3">
        Choose a password of at least 10 characters; a short sentence is easiest to keep in mind. The link works once.
      </p>
      <PasswordCells label="Password" name="password" autoComplete="new-password" error={wrong.password} />
      <PasswordCells label="The same again" name="again" autoComplete="new-password" error={wrong.again} />
      <div className="flex flex-col items-start gap-3 border-b border-ink p-4">
        {token === '' && <ErrorLine>{NO_TOKEN}</ErrorLine>}
        {refusal && <ErrorLine>{refusal}</ErrorLine>}
        <Button type="submit" solid size="large" disabled={busy || !token}>
          {busy ? 'Opening' : 'Set it and open my sheets'}
        </Button>
      </div>
    </form>
  );
}
