import 'server-only';
import type { Transaction } from 'sequelize';
import { endSessions } from '@/lib/server/account/end-sessions';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { AppError, missing } from '@/lib/server/errors';
import { readPeople } from '@/lib/server/people/list-people';
import { authorize } from '@/lib/server/policies';
import type { PersonRole, PersonRow } from '@/lib/shared/people';
import { Membership, Person, Team, sequelize } from '@/models';

/** Changes a person's roles or switches them off or on. It bites at their next request. */
export async function changePerson(
  actor: Actor,
  personId: string,
  { roles, active }: { roles?: PersonRole[]; active?: boolean },
): Promise<PersonRow> {
  authorize(actor, 'people.manage');
  const { teamId } = actor;
  await sequelize.transaction(async (transaction) => {
    // One at a time in a team: two admins cannot switch each other off.
    await Team.findOne({ where: { id: teamId }, lock: true, transaction });
    const person = await Person.findOne({ where: { teamId, id: personId }, transaction });
    if (!person) throw missing('person');
    if (roles) await setRoles(teamId, personId, roles, transaction);
    if (active !== undefined) await person.update({ active }, { transaction });
    if (active === false) await endSessions({ teamId, personId }, 'admin', { transaction });
    await refuseWithoutAdmin(teamId, transaction);
    await audit(
      actor,
      'people.change',
      personId,
      { ...(roles && { roles }), ...(active !== undefined && { active }) },
      transaction,
    );
  });
  const [row] = await readPeople(teamId, personId);
  return row!;
}

async function setRoles(
  teamId: string,
  personId: string,
  roles: PersonRole[],
  transaction: Transaction,
): Promise<void> {
  await Membership.destroy({ where: { teamId, personId }, transaction });
  await Membership.bulkCreate(
    [...new Set(roles)].map((role) => ({ teamId, personId, role })),
    { transaction },
  );
}

async function refuseWithoutAdmin(teamId: string, transaction: Transaction): Promise<void> {
  const admins = await Membership.findAll({ where: { teamId, role: 'admin' }, transaction });
  const active = await Person.count({
    where: { teamId, active: true, id: admins.map(({ personId }) => personId) },
    transaction,
  });
  if (active === 0)
    throw new AppError('conflict', 'The team would have no admin left. Make somebody else admin first.');
}
