import 'server-only';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { missing } from '@/lib/server/errors';
import { giveLink, type OneTimeLink } from '@/lib/server/people/give-link';
import { authorize } from '@/lib/server/policies';
import { Person, sequelize } from '@/models';

/** A fresh one-time link: for an invitation that ran out, or somebody who forgot the password. */
export async function renewLink(actor: Actor, personId: string): Promise<OneTimeLink> {
  authorize(actor, 'people.manage');
  const { teamId } = actor;
  return sequelize.transaction(async (transaction) => {
    const person = await Person.findOne({ where: { teamId, id: personId, active: true }, transaction });
    if (!person) throw missing('person');
    await audit(actor, 'people.link', personId, {}, transaction);
    return giveLink(actor, personId, transaction);
  });
}
