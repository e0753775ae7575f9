import 'server-only';
import { endSessions } from '@/lib/server/account/end-sessions';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';

/** Ends every session of the person who asks, this one included. */
export async function signOutEverywhere(actor: Actor): Promise<{ ended: true }> {
  await endSessions(actor, 'everywhere');
  await audit(actor, 'account.sign-out-everywhere', actor.personId);
  return { ended: true };
}
