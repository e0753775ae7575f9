import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { AccountSheet } from '@/components/account/account-sheet';
import { requireActor } from '@/lib/server/session';
import { THEME_COOKIE, readTheme } from '@/lib/shared/preferences';
import { today } from '../today';

export const metadata: Metadata = { title: 'Your account' };

export default async function AccountPage() {
  const actor = await requireActor();
  const theme = readTheme((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <AccountSheet
      person={{ id: actor.personId, name: actor.name, initials: actor.initials, roles: actor.roles }}
      team={actor.team}
      theme={theme}
      today={today()}
    />
  );
}
