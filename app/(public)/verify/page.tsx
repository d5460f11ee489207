import type { Metadata } from 'next';
import { env } from '@/lib/env';
import { AgainForm } from '../_components/again-form';
import { Door } from '../_components/door';

export const metadata: Metadata = { title: 'Confirm your address' };

export default function AskAgainPage() {
  return (
    <Door
      title="Ask for another link"
      lead="For an account whose address waits to be confirmed. The link in the mail works for 24 hours."
      links={[{ href: '/sign-in', label: 'Sign in' }]}
    >
      <AgainForm
        path="people/verification/again"
        button="Send the link"
        said="Open the link in it to confirm the address."
        mailboxUrl={env().MAILBOX_URL ?? null}
      />
    </Door>
  );
}
