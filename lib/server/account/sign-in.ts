import 'server-only';
import { audit } from '@/lib/server/audit';
import { isKnownBrowser, markBrowser } from '@/lib/server/account/known-browser';
import { isPassword } from '@/lib/server/account/password';
import { giveBack, takeTry } from '@/lib/server/account/sign-in-limit';
import { describeFault, log } from '@/lib/server/log';
import { LONGEST_H, type SessionToken } from '@/lib/server/session';
import { AuthSession, Login, Person } from '@/models';

export interface SignedIn {
  teamId: string;
  personId: string;
}

/** An address as it is kept: lower case. Only plain ASCII passes, so that no look-alike letter folds into another. */
export const plainEmail = (text: string): string | null => {
  const email = text.trim().toLowerCase();
  return email.length <= 254 && /^[!-?A-~]+@[!-?A-~]+$/.test(email) ? email : null;
};

export type SignInResult = { who: SignedIn } | { wait: number } | null;

/**
 * Checks an address and a password. Unknown addresses, wrong passwords and people who were switched off get the same
 * answer, null, in the same time.
 */
export async function signIn(typedEmail: string, password: string, address: string): Promise<SignInResult> {
  const email = plainEmail(typedEmail) ?? 'nobody@invalid';
  const attempt = { email, address, known: await isKnownBrowser(email) };
  const wait = await takeTry(attempt);
  if (wait > 0) return { wait };
  const login = await Login.findOne({ where: { email } });
  const person = login && (await Person.findOne({ where: { teamId: login.teamId, id: login.personId } }));
  const right = await isPassword(login?.passwordHash, password.slice(0, 400));
  if (!login || !person?.active || !right) {
    if (login) noteRefusal(login);
    return null;
  }
  await giveBack(attempt);
  await markBrowser(email);
  return { who: { teamId: login.teamId, personId: login.personId } };
}

/** Written beside the answer and not before it: how long it takes must not tell that the address is known. */
function noteRefusal({ teamId, personId }: Login): void {
  audit({ teamId, personId: null }, 'account.refused', personId).catch((error: unknown) =>
    log('audit.failed', describeFault(error)),
  );
}

/** The person whom single sign-on names, if an admin has invited that address. */
export async function invitedPerson(typedEmail: string): Promise<SignedIn | null> {
  const email = plainEmail(typedEmail);
  const login = email && (await Login.findOne({ where: { email } }));
  if (!login) return null;
  const person = await Person.findOne({ where: { teamId: login.teamId, id: login.personId, active: true } });
  return person && { teamId: login.teamId, personId: login.personId };
}

/** Begins a session: a new row for every sign-in. */
export async function beginSession({ teamId, personId }: SignedIn): Promise<SessionToken> {
  const expiresAt = new Date(Date.now() + LONGEST_H * 3_600_000);
  const session = await AuthSession.create({ teamId, personId, expiresAt });
  await audit({ teamId, personId }, 'account.sign-in', personId);
  return { tid: teamId, sid: session.id, sub: personId };
}
