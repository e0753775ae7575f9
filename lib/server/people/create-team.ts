import 'server-only';
import { plainEmail } from '@/lib/server/account/sign-in';
import { audit } from '@/lib/server/audit';
import { AppError } from '@/lib/server/errors';
import { giveLink, type OneTimeLink } from '@/lib/server/people/give-link';
import { Login, Membership, Person, Team, sequelize } from '@/models';

/**
 * A new team with its first admin. Only whoever runs the server can do this (`npm run team`): there is no form with
 * which a stranger makes a team.
 * @returns the link with which the admin sets a password
 */
export async function createTeam(name: string, admin: { name: string; email: string }): Promise<OneTimeLink> {
  const email = plainEmail(admin.email);
  if (!email) throw new AppError('invalid', `${admin.email} is not an e-mail address of plain letters.`);
  return sequelize.transaction(async (transaction) => {
    const { id: teamId } = await Team.create({ name }, { transaction });
    const person = await Person.create({ teamId, name: admin.name }, { transaction });
    await Login.create({ email, teamId, personId: person.id }, { transaction });
    await Membership.bulkCreate(
      (['admin', 'electrician'] as const).map((role) => ({ teamId, personId: person.id, role })),
      { transaction },
    );
    await audit({ teamId, personId: null }, 'people.create-team', person.id, {}, transaction);
    return giveLink({ teamId, personId: person.id }, person.id, transaction);
  });
}
