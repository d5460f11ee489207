import type { Metadata } from 'next';
import { pageContext } from '@/app/_server/context';
import { lookAtReset } from '@/lib/data/people/lookAtReset';
import { env } from '@/lib/env';
import { Problem } from '@/lib/errors';
import { Notice } from '@/lib/ui/feedback/notice';
import { AgainForm } from '../../_components/again-form';
import { Door } from '../../_components/door';
import { NewPassword } from './_components/new-password';

export const metadata: Metadata = { title: 'Choose a new password', referrer: 'no-referrer' };

async function lookAt(token: string): Promise<string | null> {
  try {
    return (await lookAtReset({ ctx: await pageContext(), input: { token } })).email;
  } catch (error) {
    if (error instanceof Problem) return null;
    throw error;
  }
}

export default async function NewPasswordPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  const email = await lookAt(token);
  const links = [{ href: '/sign-in', label: 'Sign in' }];
  if (email === null) {
    return (
      <Door title="This link no longer works" links={links}>
        <Notice tone="look" title="Used, run out, or replaced" className="mb-7 max-w-measure">
          Your password is as it was. Ask for another link; each works once, for 30 minutes.
        </Notice>
        <AgainForm
          path="people/reset"
          button="Send another link"
          said="The link in it works once, for 30 minutes."
          mailboxUrl={env().MAILBOX_URL ?? null}
        />
      </Door>
    );
  }
  return (
    <Door title="Choose a new password" links={links}>
      <NewPassword token={token} email={email} />
    </Door>
  );
}
