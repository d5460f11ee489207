import type { Metadata } from 'next';
import { pageContext } from '@/app/_server/context';
import { lookAtVerification } from '@/lib/data/people/lookAtVerification';
import { env } from '@/lib/env';
import { Problem } from '@/lib/errors';
import { Notice } from '@/lib/ui/feedback/notice';
import { AgainForm } from '../../_components/again-form';
import { Door } from '../../_components/door';
import { ConfirmAddress } from './_components/confirm-address';

export const metadata: Metadata = { title: 'Confirm your address', referrer: 'no-referrer' };

async function lookAt(token: string) {
  try {
    return { ok: true as const, ...(await lookAtVerification({ ctx: await pageContext(), input: { token } })) };
  } catch (error) {
    if (error instanceof Problem) return { ok: false as const };
    throw error;
  }
}

/** Looking uses nothing up: programs that check mail follow links. The button does. */
export default async function VerifyPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  const look = await lookAt(token);
  const links = [{ href: '/sign-in', label: 'Sign in' }];
  if (!look.ok) {
    return (
      <Door title="This link no longer works" links={links}>
        <Notice tone="look" title="Used, run out, or replaced" className="mb-7 max-w-measure">
          If you confirmed the address before, all is well: sign in. If not, ask for another link.
        </Notice>
        <AgainForm
          path="people/verification/again"
          button="Send another link"
          said="Open the link in it to confirm the address."
          mailboxUrl={env().MAILBOX_URL ?? null}
        />
      </Door>
    );
  }
  return (
    <Door title="Confirm your address" links={links}>
      <ConfirmAddress token={token} email={look.email} name={look.name} />
    </Door>
  );
}
