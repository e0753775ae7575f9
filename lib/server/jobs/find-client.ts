import 'server-only';
import { QueryTypes, type Transaction } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import type { JobInput } from '@/lib/shared/jobs';
import { sequelize } from '@/models';

/**
 * The client of that name in the team, made if there is none. A telephone number or address that is given replaces the
 * one that is kept; one that is left out stays.
 * @returns its id
 */
export async function findOrMakeClient(
  actor: Actor,
  { client, clientPhone, clientEmail }: Pick<JobInput, 'client' | 'clientPhone' | 'clientEmail'>,
  transaction: Transaction,
): Promise<string> {
  const [row] = await sequelize.query<{ id: string }>(
    `insert into clients (team_id, id, name, phone, email) values ($1, gen_random_uuid(), $2, coalesce($3, ''), coalesce($4, ''))
     on conflict (team_id, lower(name))
       do update set phone = coalesce($3, clients.phone), email = coalesce($4, clients.email)
     returning id`,
    { bind: [actor.teamId, client, clientPhone ?? null, clientEmail ?? null], type: QueryTypes.SELECT, transaction },
  );
  return row!.id;
}
