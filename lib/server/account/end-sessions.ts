import 'server-only';
import { Op, type Transaction } from 'sequelize';
import type { SessionToken } from '@/lib/server/session';
import { audit } from '@/lib/server/audit';
import { AuthSession } from '@/models';

type Why = 'sign-out' | 'everywhere' | 'password' | 'admin';

/** Ends the sessions of a person, all or all but one. Their cookies are dead from the next request on. */
export async function endSessions(
  { teamId, personId }: { teamId: string; personId: string },
  why: Why,
  { but, transaction }: { but?: string; transaction?: Transaction } = {},
): Promise<void> {
  await AuthSession.update(
    { endedAt: new Date(), endedBy: why },
    { where: { teamId, personId, endedAt: null, ...(but && { id: { [Op.ne]: but } }) }, transaction },
  );
}

/** Ends one session: signing out on this browser. */
export async function endSession({ tid, sid, sub }: SessionToken): Promise<void> {
  await AuthSession.update(
    { endedAt: new Date(), endedBy: 'sign-out' },
    { where: { teamId: tid, id: sid, endedAt: null } },
  );
  await audit({ teamId: tid, personId: sub }, 'account.sign-out', sub);
}
