'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmBar } from '@/components/ui/confirm-bar';
import { Stamp } from '@/components/ui/stamp';
import { shortDate } from '@/lib/shared/dates';
import type { PersonRole, PersonRow as Person } from '@/lib/shared/people';
import { RoleBoxes } from './role-boxes';
import type { People } from './use-people';
import { STATUS } from './words';

interface PersonRowProps {
  person: Person;
  state: People;
  mayManage: boolean;
  /** the person who reads */
  isMe: boolean;
  today: string;
}

const cell = 'min-h-8 border-b border-hair px-2 py-2 align-middle';

/** A person of the team; an admin opens the row to change roles, give a link, switch off. */
export function PersonRow({ person, state, mayManage, isMe, today }: PersonRowProps) {
  const [open, setOpen] = useState(false);
  const status = STATUS[person.status];
  return (
    <>
      <tr role="row" className={`max-[700px]:grid max-[700px]:grid-cols-[1fr_auto] max-[700px]:items-center max-[700px]:py-1 max-[700px]:[&>*]:py-1 max-[700px]:border-b max-[700px]:border-hair max-[700px]:[&>*]:border-b-0 ${open ? 'bg-row font-bold' : ''}`}>
        <th role="rowheader" scope="row" className={`${cell} text-left max-[700px]:col-start-1 max-[700px]:row-start-1 ${open ? 'font-bold' : 'font-normal'}`}>
          {person.name}
          {isMe && <span className="font-normal text-grey"> (you)</span>}
        </th>
        <td role="cell" className={`${cell} break-all max-[700px]:col-start-1 max-[700px]:row-start-2`}>
          {person.email}
        </td>
        <td role="cell" className={`${cell} max-[700px]:col-span-2 max-[700px]:row-start-3`}>
          {person.roles.join(', ')}
        </td>
        <td role="cell" className={`${cell} max-[700px]:col-start-2 max-[700px]:row-start-2 max-[700px]:text-right`}>
          <Stamp shape={status.shape}>{status.word}</Stamp>
        </td>
        <td role="cell" className={`${cell} whitespace-nowrap max-[700px]:hidden`}>
          {person.lastSeen ? shortDate(person.lastSeen, today) : 'never'}
        </td>
        {mayManage && (
          <td role="cell" className={`${cell} text-right max-[700px]:col-start-2 max-[700px]:row-start-1`}>
            <Button aria-expanded={open} aria-label={`Change ${person.name}`} onClick={() => setOpen(!open)}>
              Change
            </Button>
          </td>
        )}
      </tr>
      {open && (
        <tr role="row" className="max-[700px]:block">
          <td role="cell" colSpan={6} className="border-b-2 border-ink bg-row px-2 py-3 max-[700px]:block">
            <PersonEditor person={person} state={state} isMe={isMe} onDone={() => setOpen(false)} />
          </td>
        </tr>
      )}
    </>
  );
}

function PersonEditor({ person, state, isMe, onDone }: { person: Person; state: People; isMe: boolean; onDone(): void }) {
  const [roles, setRoles] = useState<PersonRole[]>(person.roles);
  const [asking, setAsking] = useState<'off' | 'link' | null>(null);
  const busy = state.busy !== null;
  const changed = roles.length !== person.roles.length || roles.some((role) => !person.roles.includes(role));

  if (asking === 'off')
    return (
      <ConfirmBar
        question={`Switch ${person.name} off? They are signed out at once and cannot sign in. What they drew stays.`}
        yes="Switch off"
        busy={busy}
        onNo={() => setAsking(null)}
        onYes={() => void state.change(person, { active: false }).then(onDone)}
      />
    );
  if (asking === 'link')
    return (
      <ConfirmBar
        question={`Give ${person.name} a new link? Links given before stop working; with it the password is set anew.`}
        yes="Give a new link"
        no="Leave it"
        busy={busy}
        onNo={() => setAsking(null)}
        onYes={() => void state.renew(person).then(onDone)}
      />
    );
  return (
    <div className="flex flex-col gap-3">
      <RoleBoxes roles={roles} error={roles.length === 0 ? 'Choose at least one role.' : undefined} onChange={setRoles} />
      <div className="flex flex-wrap gap-2">
        <Button solid disabled={busy || !changed || roles.length === 0} onClick={() => void state.change(person, { roles }).then((done) => done && onDone())}>
          Save the roles
        </Button>
        {person.status !== 'off' && <Button onClick={() => setAsking('link')}>New link</Button>}
        {person.status === 'off' ? (
          <Button disabled={busy} onClick={() => void state.change(person, { active: true })}>
            Switch on again
          </Button>
        ) : (
          <Button tone="red" disabled={isMe} title={isMe ? 'Another admin can switch you off.' : undefined} onClick={() => setAsking('off')}>
            Switch off
          </Button>
        )}
      </div>
    </div>
  );
}
