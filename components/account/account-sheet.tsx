'use client';

import type { ReactNode } from 'react';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { teamTabs } from '@/components/frame/tabs';
import { ROLE_WORDS } from '@/components/people/words';
import type { PersonRole } from '@/lib/shared/people';
import type { Theme } from '@/lib/shared/preferences';
import { Appearance } from './appearance';
import { PasswordForm } from './password-form';
import { SignOut } from './sign-out';

interface AccountSheetProps {
  person: { id: string; name: string; initials: string; roles: readonly PersonRole[] };
  team: string;
  theme: Theme;
  today: string;
}

function Group({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="border-t-2 border-ink pt-4">
      <h2 className="mb-3 text-head font-bold">{title}</h2>
      {children}
    </section>
  );
}

/** One's own account: password, sign-ins, paper and keys. */
export function AccountSheet({ person, team, theme, today }: AccountSheetProps) {
  return (
    <SheetFrame
      tabs={teamTabs(person.roles)}
      current="account"
      who={person.initials}
      kind="Account"
      titleBlock={{
        number: '-',
        title: person.name,
        client: '',
        address: '',
        team,
        drawnBy: '',
        drawnOn: today,
        checkedBy: null,
        revision: '-',
        state: 'signed in',
      }}
    >
      <div className="flex max-w-[760px] flex-col gap-8 px-4 pt-4 pb-6 lap:px-6">
        <header>
          <h1 className="text-title font-bold">{person.name}</h1>
          <p className="mt-1 text-grey">{team}</p>
          <ul className="mt-2">
            {person.roles.map((role) => (
              <li key={role}>
                <b>{role}</b> <span className="text-grey">{ROLE_WORDS[role]}</span>
              </li>
            ))}
          </ul>
        </header>
        <Group title="Sign out">
          <SignOut personId={person.id} />
        </Group>
        <Group title="Paper and keys">
          <Appearance theme={theme} />
        </Group>
        <Group title="Password">
          <PasswordForm />
        </Group>
      </div>
    </SheetFrame>
  );
}
