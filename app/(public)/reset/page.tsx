import type { Metadata } from 'next';
import { env } from '@/lib/env';
import { AgainForm } from '../_components/again-form';
import { Door } from '../_components/door';

export const metadata: Metadata = { title: 'Choose a new password' };

export default function ResetPage() {
  return (
    <Door
      title="Choose a new password"
      lead="We mail you a link that works once, for 30 minutes. Until you use it, everything stays as it is."
      links={[{ href: '/sign-in', label: 'Sign in' }]}
    >
      <AgainForm
        path="people/reset"
        button="Send the link"
        said="The link in it works once, for 30 minutes."
        mailboxUrl={env().MAILBOX_URL ?? null}
      />
    </Door>
  );
}
