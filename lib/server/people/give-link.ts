import 'server-only';
import type { Transaction } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import { env } from '@/lib/server/env';
import { makeToken } from '@/lib/server/people/invitation-token';
import { Invitation } from '@/models';

const DAYS = 7;

/** A link as it is shown once. The token stands behind the #, which no server and no log gets to see. */
export interface OneTimeLink {
  link: string;
  /** ISO 8601, UTC */
  expiresAt: string;
}

/** Makes a one-time link with which the person sets a password; links given before stop working. */
export async function giveLink(
  actor: Pick<Actor, 'teamId' | 'personId'>,
  personId: string,
  transaction: Transaction,
): Promise<OneTimeLink> {
  const { teamId } = actor;
  const { token, tokenHash } = makeToken(teamId);
  const expiresAt = new Date(Date.now() + DAYS * 86_400_000);
  await Invitation.update({ usedAt: new Date() }, { where: { teamId, personId, usedAt: null }, transaction });
  await Invitation.create({ teamId, personId, tokenHash, invitedBy: actor.personId, expiresAt }, { transaction });
  return { link: `${new URL('/invitation', env().NEXTAUTH_URL).href}#${token}`, expiresAt: expiresAt.toISOString() };
}
