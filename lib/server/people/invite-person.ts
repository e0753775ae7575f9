import 'server-only';
import { UniqueConstraintError } from 'sequelize';
import { plainEmail } from '@/lib/server/account/sign-in';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { AppError } from '@/lib/server/errors';
import { giveLink, type OneTimeLink } from '@/lib/server/people/give-link';
import { readPeople } from '@/lib/server/people/list-people';
import { authorize } from '@/lib/server/policies';
import type { PersonRole, PersonRow } from '@/lib/shared/people';
import { Login, Membership, Person, sequelize } from '@/models';

export type Invited = { person: PersonRow } & OneTimeLink;

/** Takes a person into the team, who waits until the link that is answered has been opened. */
export async function invitePerson(
  actor: Actor,
  { name, email: typed, roles }: { name: string; email: string; roles: PersonRole[] },
): Promise<Invited> {
  authorize(actor, 'people.manage');
  const email = plainEmail(typed);
  if (!email) throw refusedAddress('Only plain letters, digits and signs: this address has others.');
  const { teamId } = actor;
  try {
    const { personId, link } = await sequelize.transaction(async (transaction) => {
      const person = await Person.create({ teamId, name }, { transaction });
      await Login.create({ email, teamId, personId: person.id }, { transaction });
      await Membership.bulkCreate(
        [...new Set(roles)].map((role) => ({ teamId, personId: person.id, role })),
        { transaction },
      );
      await audit(actor, 'people.invite', person.id, { roles }, transaction);
      return { personId: person.id, link: await giveLink(actor, person.id, transaction) };
    });
    const [person] = await readPeople(teamId, personId);
    return { person: person!, ...link };
  } catch (error) {
    // Also when another team has the address; which of the two it is, is nobody's business here.
    if (error instanceof UniqueConstraintError)
      throw refusedAddress('This address is taken. Each person signs in with one of their own.');
    throw error;
  }
}

const refusedAddress = (reason: string) =>
  new AppError('invalid', 'Nobody was invited.', { fields: { email: reason } });
