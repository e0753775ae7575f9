import 'server-only';
import { endSessions } from '@/lib/server/account/end-sessions';
import { checkPassword, hashPassword } from '@/lib/server/account/password';
import { audit } from '@/lib/server/audit';
import { AppError } from '@/lib/server/errors';
import { readToken } from '@/lib/server/people/invitation-token';
import { Invitation, Login, Person, sequelize } from '@/models';

const gone = () =>
  new AppError('missing', 'This link has been used or has run out. Ask the admin of your team for a new one.');

/** Sets the password of the person whom a one-time link was given to, and ends what sessions they had. */
export async function acceptInvitation({
  token,
  password,
}: {
  token: string;
  password: string;
}): Promise<{ email: string }> {
  const read = readToken(token);
  if (!read) throw gone();
  const { teamId, tokenHash } = read;
  const open = await Invitation.findOne({ where: { teamId, tokenHash, usedAt: null } });
  if (!open || open.expiresAt <= new Date()) throw gone();
  const [login, person] = await Promise.all([
    Login.findOne({ where: { teamId, personId: open.personId } }),
    Person.findOne({ where: { teamId, id: open.personId, active: true } }),
  ]);
  if (!login || !person) throw gone();
  checkPassword(password, [person.name, login.email], 'password');
  const passwordHash = await hashPassword(password);
  await sequelize.transaction(async (transaction) => {
    // One statement decides who was first, however often the link is sent at once.
    const [used] = await Invitation.update(
      { usedAt: new Date() },
      { where: { teamId, id: open.id, usedAt: null }, transaction },
    );
    if (used === 0) throw gone();
    await login.update({ passwordHash, passwordAt: new Date() }, { transaction });
    await endSessions({ teamId, personId: person.id }, 'password', { transaction });
    await audit({ teamId, personId: person.id }, 'people.accept', person.id, {}, transaction);
  });
  return { email: login.email };
}
