import 'server-only';
import { Op } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import { authorize } from '@/lib/server/policies';
import { Client } from '@/models';

export interface ClientRow {
  id: string;
  name: string;
  phone: string;
  email: string;
}

/** `text` with the signs that a pattern gives a meaning taken as they stand. */
export const likeText = (text: string): string => `%${text.replace(/[\\%_]/g, '\\$&')}%`;

/** The first clients of the team, by name, whose name has the text in it. */
export async function listClients(actor: Actor, search: string): Promise<ClientRow[]> {
  authorize(actor, 'client.read');
  const clients = await Client.findAll({
    where: { teamId: actor.teamId, ...(search && { name: { [Op.iLike]: likeText(search) } }) },
    order: [['name', 'ASC']],
    limit: 20,
  });
  return clients.map(({ id, name, phone, email }) => ({ id, name, phone, email }));
}
