import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { PeopleSheet } from '@/components/people/people-sheet';
import { listPeople } from '@/lib/server/people/list-people';
import { may } from '@/lib/server/policies';
import { requireActor } from '@/lib/server/session';
import { today } from '../today';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage() {
  const actor = await requireActor();
  if (!may(actor, 'people.read')) redirect('/jobs');
  return (
    <PeopleSheet
      people={await listPeople(actor)}
      mayManage={may(actor, 'people.manage')}
      person={{ id: actor.personId, initials: actor.initials, roles: actor.roles }}
      team={actor.team}
      today={today()}
    />
  );
}
