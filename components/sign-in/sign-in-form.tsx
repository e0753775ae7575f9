'use client';

import { signIn } from 'next-auth/react';
import { useEffect, useId, useState, type FormEvent } from 'react';
import { Button } from '@/components/ui/button';
import { ErrorLine } from '@/components/ui/error-line';
import { signInByPassword, type SignInAnswer } from '@/lib/shared/sign-in';
import { entryInput } from './entry-input';
import { PasswordCells } from './password-cells';
import { useWait } from './use-wait';

interface SignInFormProps {
  /** where to go on, a path of this app */
  next: string;
  /** what single sign-on is called; null where there is none */
  oidcName: string | null;
  /** said before anything is typed: why the sheet is shown */
  notice?: string;
}

const WRONG = 'E-mail or password is not right. After 5 tries it waits a minute.';
const refusals: Record<Exclude<SignInAnswer['kind'], 'in'>, string> = {
  wrong: WRONG,
  wait: WRONG,
  unreached: 'No network: the server did not answer. What you typed is still here.',
  failed: 'Not signed in: the server answered with an error. Try again in a moment.',
};

/** The sign-in, as the title block's own fields. */
export function SignInForm({ next, oidcName, notice }: SignInFormProps) {
  const id = useId();
  const [busy, setBusy] = useState(false);
  const [refusal, setRefusal] = useState('');
  const [offline, setOffline] = useState(false);
  const wait = useWait();

  useEffect(() => {
    const look = () => setOffline(!navigator.onLine);
    look();
    window.addEventListener('online', look);
    window.addEventListener('offline', look);
    return () => {
      window.removeEventListener('online', look);
      window.removeEventListener('offline', look);
    };
  }, []);

  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const typed = new FormData(event.currentTarget);
    setBusy(true);
    setRefusal('');
    const answer = await signInByPassword(String(typed.get('email')), String(typed.get('password')));
    if (answer.kind === 'in') {
      // A whole page load: nothing of the person before stays in memory.
      window.location.assign(next);
      return;
    }
    if (answer.kind === 'wait') wait.start(answer.seconds);
    setRefusal(refusals[answer.kind]);
    setBusy(false);
  };

  return (
    <form method="post" onSubmit={(event) => void submit(event)}>
      {(offline || notice) && (
        <p role="status" className="border-b border-ink bg-ink px-4 py-2 text-paper">
          {offline ? 'No network. Sign in when it is back.' : notice}
        </p>
      )}
      <div className="border-b border-ink p-2">
        <label htmlFor={id} className="block px-2 text-small text-grey">
          E-mail
        </label>
        <input id={id} name="email" type="email" required autoComplete="username" autoFocus className={entryInput} />
      </div>
      <PasswordCells label="Password" name="password" required autoComplete="current-password" />
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-ink p-4">
        <Button type="submit" solid size="large" disabled={busy || wait.seconds > 0}>
          {wait.seconds > 0 ? `Wait ${wait.seconds} s` : busy ? 'Opening' : 'Open my sheets'}
        </Button>
        {oidcName && (
          <Button size="large" onClick={() => void signIn('oidc', { callbackUrl: next })}>
            Sign in with {oidcName}
          </Button>
        )}
        <p className="min-w-0 flex-1 basis-56 text-small leading-5 text-grey">
          Forgot the password, or no account? The admin of your team gives you a link.
        </p>
        {refusal && (
          <div className="w-full">
            <ErrorLine>{refusal}</ErrorLine>
          </div>
        )}
      </div>
    </form>
  );
}
