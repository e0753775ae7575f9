import 'server-only';
import { endSessions } from '@/lib/server/account/end-sessions';
import { checkPassword, hashPassword, isPassword } from '@/lib/server/account/password';
import { giveBack, takeTry } from '@/lib/server/account/sign-in-limit';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { AppError } from '@/lib/server/errors';
import { Login, sequelize } from '@/models';

/** Changes one's own password and ends all other sessions. A borrowed browser cannot guess the old one at leisure. */
export async function changePassword(
  actor: Actor,
  { current, next }: { current: string; next: string },
): Promise<{ changed: true }> {
  const { teamId, personId } = actor;
  const attempt = { email: `password of ${personId}`, address: 'signed in', known: false };
  const wait = await takeTry(attempt);
  if (wait > 0) throw new AppError('too-many', `Too many tries. Wait ${wait} s.`, { wait });
  const login = await Login.findOne({ where: { teamId, personId } });
  if (!login || !(await isPassword(login.passwordHash, current)))
    throw new AppError('invalid', 'The password was not changed.', {
      fields: { current: 'This is not your present password.' },
    });
  checkPassword(next, [actor.name, login.email], 'next');
  const passwordHash = await hashPassword(next);
  await sequelize.transaction(async (transaction) => {
    await Login.update({ passwordHash, passwordAt: new Date() }, { where: { teamId, personId }, transaction });
    await endSessions(actor, 'password', { but: actor.sessionId, transaction });
    await audit(actor, 'account.password', personId, {}, transaction);
  });
  await giveBack(attempt);
  return { changed: true };
}
