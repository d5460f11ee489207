import type { Metadata } from 'next';
import { pageContext } from '@/app/_server/context';
import { lookAtInvitation } from '@/lib/data/sites/lookAtInvitation';
import { env } from '@/lib/env';
import { Problem } from '@/lib/errors';
import { Notice } from '@/lib/ui/feedback/notice';
import { Door } from '../_components/door';
import { SignUp } from './_components/sign-up';

export const metadata: Metadata = { title: 'Make an account', referrer: 'no-referrer' };

type Search = { invitation?: string | string[] };

async function invitationOf(token: string | string[] | undefined) {
  if (typeof token !== 'string') return null;
  try {
    const look = await lookAtInvitation({ ctx: await pageContext(), input: { token } });
    return { token, email: look.email, siteName: look.siteName };
  } catch (error) {
    if (error instanceof Problem) return null;
    throw error;
  }
}

export default async function SignUpPage({ searchParams }: { searchParams: Promise<Search> }) {
  const invitation = await invitationOf((await searchParams).invitation);
  return (
    <Door title="Make an account" links={[{ href: '/sign-in', label: 'Sign in' }]}>
      {invitation ? (
        <Notice className="mb-7 max-w-measure" title={`You are invited to ${invitation.siteName}`}>
          Keep the address below: the invitation is for it, and confirming it makes you a member.
        </Notice>
      ) : null}
      <SignUp
        mailboxUrl={env().MAILBOX_URL ?? null}
        {...(invitation ? { invitation: invitation.token, email: invitation.email } : {})}
      />
    </Door>
  );
}
