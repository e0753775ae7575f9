'use client';

import { useState } from 'react';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { useSingleKeys } from '@/components/frame/single-keys';
import { teamTabs } from '@/components/frame/tabs';
import { RefusalLine } from '@/components/frame/refusal-line';
import { Button } from '@/components/ui/button';
import { Key } from '@/components/ui/key';
import { Heading } from '@/components/ui/table';
import { ROLES, type PersonRole, type PersonRow as Person } from '@/lib/shared/people';
import { GivenLink } from './given-link';
import { InviteForm } from './invite-form';
import { PersonRow } from './person-row';
import { usePeople } from './use-people';
import { ROLE_WORDS } from './words';

interface PeopleSheetProps {
  people: readonly Person[];
  mayManage: boolean;
  person: { id: string; initials: string; roles: readonly PersonRole[] };
  team: string;
  today: string;
}

/** The people of the team; an admin invites, sets roles and switches off. */
export function PeopleSheet({ people, mayManage, person, team, today }: PeopleSheetProps) {
  const state = usePeople(people);
  const [inviting, setInviting] = useState(false);
  useSingleKeys(mayManage ? { n: () => setInviting(true) } : {});
  const waiting = state.people.filter(({ status }) => status === 'waiting').length;

  return (
    <SheetFrame
      tabs={teamTabs(person.roles)}
      current="people"
      who={person.initials}
      kind="People"
      titleBlock={{
        number: '-',
        title: 'People of the team',
        client: '',
        address: '',
        team,
        drawnBy: '',
        drawnOn: today,
        checkedBy: null,
        revision: '-',
        state: 'live',
      }}
      keys={mayManage ? [{ keys: ['n'], does: 'invite a person' }] : []}
      marginLabel="Roles"
      margin={
        <section>
          <h2 className="text-head font-bold">What a role may do</h2>
          <dl className="mt-2 flex flex-col gap-2">
            {ROLES.map((role) => (
              <div key={role}>
                <dt className="font-bold">{role}</dt>
                <dd className="text-grey">{ROLE_WORDS[role]}</dd>
              </div>
            ))}
          </dl>
        </section>
      }
      foot={
        mayManage ? (
          <p className="flex items-center gap-3 text-[14px] font-bold">
            <Button className="border-0! px-0! text-[14px]! font-bold" onClick={() => setInviting(true)}>
              + Invite a person
            </Button>
            <span className="pointer-coarse:hidden">
              <Key>n</Key>
            </span>
          </p>
        ) : (
          <p className="text-grey">An admin of your team invites people and sets their roles.</p>
        )
      }
    >
      <div className="flex flex-col gap-4 px-4 pt-4 pb-6 lap:px-6">
        <header>
          <h1 className="text-title font-bold">People</h1>
          <p className="mt-1 text-grey" role="status">
            {team}, {state.people.length} {state.people.length === 1 ? 'person' : 'people'}
            {waiting > 0 && `, ${waiting} invited`}
          </p>
        </header>
        {state.link && <GivenLink given={state.link} onClose={state.closeLink} />}
        {inviting && <InviteForm state={state} onClose={() => setInviting(false)} />}
        {state.refusal && !inviting && <RefusalLine refusal={state.refusal} />}
        <table role="table" aria-label="People of the team" className="w-full border-collapse max-[700px]:block">
          <thead role="rowgroup" className="max-[700px]:sr-only">
            <tr role="row">
              {['Name', 'E-mail', 'Roles', 'State', 'Last seen', ...(mayManage ? ['Change'] : [])].map((name) => (
                <Heading key={name} role="columnheader" className={name === 'Change' ? 'text-right' : ''}>
                  {name}
                </Heading>
              ))}
            </tr>
          </thead>
          <tbody role="rowgroup" className="max-[700px]:block">
            {state.people.map((row) => (
              <PersonRow key={row.id} person={row} state={state} mayManage={mayManage} isMe={row.id === person.id} today={today} />
            ))}
          </tbody>
        </table>
        {state.people.length === 1 && mayManage && !inviting && (
          <div className="flex flex-wrap items-center gap-4">
            <p className="text-[14px]">You are alone in the team. Others come by invitation.</p>
            <Button solid onClick={() => setInviting(true)}>
              Invite a person
            </Button>
          </div>
        )}
      </div>
    </SheetFrame>
  );
}
