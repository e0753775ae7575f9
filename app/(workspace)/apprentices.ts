import type { Actor } from '@/lib/server/actor';
import { listPeople } from '@/lib/server/people/list-people';
import type { PersonRow } from '@/lib/shared/people';

/** The apprentices to whom a job can be given. */
export async function apprenticesOf(actor: Actor): Promise<PersonRow[]> {
  const people = await listPeople(actor);
  return people.filter((person) => person.roles.includes('apprentice') && person.status !== 'off');
}
