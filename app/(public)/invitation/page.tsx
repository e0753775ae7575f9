import type { Metadata } from 'next';
import { AcceptForm } from '@/components/sign-in/accept-form';
import { EntrySheet } from '@/components/sign-in/entry-sheet';

export const metadata: Metadata = { title: 'Invitation', referrer: 'no-referrer' };

export default function InvitationPage() {
  return (
    <EntrySheet sheet="0 Invitation" state="invited">
      <AcceptForm />
    </EntrySheet>
  );
}
