'use client';

import { signOut } from 'next-auth/react';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { forgetOnSignOut } from '@/components/sheet/use-drawing';
import { Button } from '@/components/ui/button';
import { ConfirmBar } from '@/components/ui/confirm-bar';
import { ErrorLine } from '@/components/ui/error-line';
import { callApi } from '@/lib/shared/api-client';

const UNREACHED = 'Not signed out: the server did not answer. Try again when the network is back.';

/** Signs out here, or on every device. What is not saved yet stays on the device for this person's next sign-in. */
export function SignOut({ personId }: { personId: string }) {
  const router = useRouter();
  const [asking, setAsking] = useState(false);
  const [busy, setBusy] = useState(false);
  const [refusal, setRefusal] = useState('');

  const leave = async () => {
    // A browser without storage has nothing to forget.
    await forgetOnSignOut(personId).catch(() => undefined);
    await signOut({ callbackUrl: '/signin?why=out' });
  };
  const here = async () => {
    setBusy(true);
    setRefusal('');
    await leave().catch(() => setRefusal(UNREACHED));
    setBusy(false);
  };
  const everywhere = async () => {
    setBusy(true);
    setRefusal('');
    const answer = await callApi<unknown>('POST', '/api/account/sign-out-everywhere');
    if (answer.ok) await leave().catch(() => router.replace('/signin?why=out'));
    else setRefusal(answer.offline ? UNREACHED : answer.refusal.message);
    setBusy(false);
    setAsking(false);
  };

  return (
    <div className="flex flex-col gap-3">
      {asking ? (
        <ConfirmBar
          question="Sign out on every device? What is not saved on another device waits there until you sign in again."
          yes="Sign out everywhere"
          no="Stay"
          busy={busy}
          onYes={() => void everywhere()}
          onNo={() => setAsking(false)}
        />
      ) : (
        <div className="flex flex-wrap gap-2">
          <Button solid disabled={busy} onClick={() => void here()}>
            Sign out
          </Button>
          <Button onClick={() => setAsking(true)}>Sign out everywhere</Button>
        </div>
      )}
      {refusal && <ErrorLine>{refusal}</ErrorLine>}
    </div>
  );
}
