import 'server-only';
import { QueryTypes } from 'sequelize';
import { initialsOf, type Actor } from '@/lib/server/actor';
import { authorize } from '@/lib/server/policies';
import type { PersonRole, PersonRow } from '@/lib/shared/people';
import { sequelize } from '@/models';

interface Row {
  id: string;
  name: string;
  email: string;
  active: boolean;
  roles: PersonRole[];
  hasPassword: boolean;
  lastSeen: Date | null;
}

const present = ({ hasPassword, lastSeen, ...row }: Row): PersonRow => ({
  ...row,
  initials: initialsOf(row.name),
  status: !row.active ? 'off' : hasPassword || lastSeen ? 'active' : 'waiting',
  lastSeen: lastSeen?.toISOString() ?? null,
});

/** Everybody of the team, or the one person asked for, by name. */
export async function readPeople(teamId: string, personId: string | null = null): Promise<PersonRow[]> {
  const rows = await sequelize.query<Row>(
    `select p.id, p.name, l.email, p.active, l.password_hash is not null as "hasPassword",
            array(select m.role from memberships m where m.team_id = p.team_id and m.person_id = p.id order by 1) as roles,
            (select max(s.seen_at) from auth_sessions s where s.team_id = p.team_id and s.person_id = p.id) as "lastSeen"
       from people p join logins l on l.team_id = p.team_id and l.person_id = p.id
      where p.team_id = $1 and ($2::uuid is null or p.id = $2) order by lower(p.name), p.id`,
    { bind: [teamId, personId], type: QueryTypes.SELECT },
  );
  return rows.map(present);
}

export async function listPeople(actor: Actor): Promise<PersonRow[]> {
  authorize(actor, 'people.read');
  return readPeople(actor.teamId);
}
