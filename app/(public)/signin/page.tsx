import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { EntrySheet } from '@/components/sign-in/entry-sheet';
import { SignInForm } from '@/components/sign-in/sign-in-form';
import { env } from '@/lib/server/env';
import { currentActor } from '@/lib/server/session';

export const metadata: Metadata = { title: 'Sign in' };

const notices: Record<string, string> = {
  NotInvited: 'Nobody has invited this address into a team. The admin of your team does it.',
  ended: 'Your sign-in has ended. What is not saved is kept on this device and will be sent.',
  out: 'You are signed out.',
};
const OTHER = 'Single sign-on did not work. Try again, or sign in with your password.';

/** A path of this app, or the register: an address from outside leads nowhere else. */
const ownPath = (text: string | undefined): string => (text && /^\/(?![/\\])/.test(text) ? text : '/jobs');

type Search = Promise<Record<string, string | string[] | undefined>>;
const one = (value: string | string[] | undefined): string | undefined => (Array.isArray(value) ? value[0] : value);

export default async function SignInPage({ searchParams }: { searchParams: Search }) {
  const search = await searchParams;
  const next = ownPath(one(search.next));
  if (await currentActor()) redirect(next);
  const why = one(search.error) ?? one(search.why);
  const { OIDC_ISSUER: issuer, OIDC_NAME: name } = env();
  return (
    <EntrySheet sheet="0 Sign in" state="signed out">
      <SignInForm next={next} oidcName={issuer ? name : null} notice={why && (notices[why] ?? OTHER)} />
    </EntrySheet>
  );
}
