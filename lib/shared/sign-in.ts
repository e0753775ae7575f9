/** What became of an attempt to sign in by password. */
export type SignInAnswer =
  | { kind: 'in' }
  | { kind: 'wrong' }
  /** too many tries: seconds until the next */
  | { kind: 'wait'; seconds: number }
  | { kind: 'failed' }
  /** no network */
  | { kind: 'unreached' };

/** The error that the answer carries in its address, as next-auth writes it there. */
function readError(url: string): SignInAnswer {
  const error = new URL(url, window.location.origin).searchParams.get('error');
  if (error === null) return { kind: 'in' };
  if (error === 'CredentialsSignin') return { kind: 'wrong' };
  const wait = /^wait:(\d+)$/.exec(error);
  return wait ? { kind: 'wait', seconds: Number(wait[1]) } : { kind: 'failed' };
}

/**
 * Signs in by e-mail and password. next-auth's own function leaves the page when the network is gone, and with it what
 * was typed; here a lost network is an answer.
 */
export async function signInByPassword(email: string, password: string): Promise<SignInAnswer> {
  try {
    const { csrfToken } = (await (await fetch('/api/auth/csrf')).json()) as { csrfToken: string };
    const answer = await fetch('/api/auth/callback/credentials', {
      method: 'POST',
      body: new URLSearchParams({ csrfToken, email, password, json: 'true' }),
    });
    const body = (await answer.json().catch(() => null)) as { url?: string } | null;
    return body?.url ? readError(body.url) : { kind: 'failed' };
  } catch {
    return { kind: 'unreached' };
  }
}
