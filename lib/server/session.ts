import 'server-only';
import { decode } from 'next-auth/jwt';
import { cookies } from 'next/headers';
import { redirect } from 'next/navigation';
import { QueryTypes } from 'sequelize';
import { z } from 'zod';
import { initialsOf, type Actor } from '@/lib/server/actor';
import { env, isHttps } from '@/lib/server/env';
import type { PersonRole } from '@/lib/shared/people';
import { sessionCookieName } from '@/lib/shared/session-cookie';
import { sequelize } from '@/models';

/** A sign-in ends after this long whatever happens, and after `IDLE_H` without a request. */
export const LONGEST_H = 12;
const IDLE_H = 4;

export const sessionCookie = (): string => sessionCookieName(isHttps());

/** What the cookie says, once its seal is checked: which row to read. */
export const TokenSchema = z.object({ tid: z.uuid(), sid: z.uuid(), sub: z.uuid() });
export type SessionToken = z.infer<typeof TokenSchema>;

interface Row {
  personId: string;
  name: string;
  team: string;
  roles: PersonRole[];
  stale: boolean;
}

/**
 * The person behind a session that is neither ended nor out of time, with the roles held now.
 * @param touch false where nobody did anything: such a look must not keep an idle session alive
 */
export async function actorOf({ tid, sid, sub }: SessionToken, { touch = true } = {}): Promise<Actor | null> {
  const [row] = await sequelize.query<Row>(
    `select p.id as "personId", p.name, t.name as team, s.seen_at < now() - interval '1 minute' as stale,
            array(select m.role from memberships m where m.team_id = p.team_id and m.person_id = p.id order by 1) as roles
       from auth_sessions s
       join people p on p.team_id = s.team_id and p.id = s.person_id
       join teams t on t.id = s.team_id
      where s.team_id = $1 and s.id = $2 and p.id = $3 and p.active and s.ended_at is null
        and s.expires_at > now() and s.seen_at > now() - make_interval(hours => $4)`,
    { bind: [tid, sid, sub, IDLE_H], type: QueryTypes.SELECT },
  );
  if (!row) return null;
  if (touch && row.stale)
    await sequelize.query('update auth_sessions set seen_at = now() where team_id = $1 and id = $2', {
      bind: [tid, sid],
    });
  const { personId, name, team, roles } = row;
  return { teamId: tid, team, personId, sessionId: sid, name, initials: initialsOf(name), roles };
}

/** Who signed in on this browser, or null. Reads the cookie of the request that is being answered. */
export async function currentActor(): Promise<Actor | null> {
  const value = (await cookies()).get(sessionCookie())?.value;
  if (!value) return null;
  // A cookie that does not open is nobody's: a forged one, or one sealed before the secret was changed.
  const opened = await decode({ token: value, secret: env().NEXTAUTH_SECRET }).catch(() => null);
  const token = TokenSchema.safeParse(opened);
  return token.success ? actorOf(token.data) : null;
}

/** For pages: who asks; a stranger is sent to the sign-in sheet. Routes use {@link currentActor} and answer 401. */
export async function requireActor(): Promise<Actor> {
  return (await currentActor()) ?? redirect('/signin');
}
