import type { Metadata } from 'next';
import { pageContext } from '@/app/_server/context';
import { ROLE_WORDS } from '@/lib/access/words';
import { lookAtInvitation } from '@/lib/data/sites/lookAtInvitation';
import { Problem } from '@/lib/errors';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { Notice } from '@/lib/ui/feedback/notice';
import { Door } from '../../_components/door';
import { AnswerInvitation } from './_components/answer-invitation';

export const metadata: Metadata = { title: 'Invitation', referrer: 'no-referrer' };

type PageProps = { params: Promise<{ token: string }>; searchParams: Promise<{ answer?: string | string[] }> };

const CUT_OFF =
  'This link is not whole. Copy all of it from the mail, or ask whoever invited you to send another. Nothing was changed.';

async function lookAt(token: string) {
  const ctx = await pageContext();
  const me = ctx.actor.kind === 'person' ? ctx.actor.person.email : null;
  try {
    return { ok: true as const, me, look: await lookAtInvitation({ ctx, input: { token } }) };
  } catch (error) {
    if (error instanceof Problem) {
      return { ok: false as const, me, sentence: error.code === 'invalid' ? CUT_OFF : error.sentence };
    }
    throw error;
  }
}

export default async function InvitationPage({ params, searchParams }: PageProps) {
  const { token } = await params;
  const { answer } = await searchParams;
  const seen = await lookAt(token);
  if (!seen.ok) {
    return (
      <Door title="This invitation cannot be answered">
        <Notice tone="look" className="mb-7 max-w-measure">
          {seen.sentence}
        </Notice>
        <LinkButton href={seen.me ? '/today' : '/sign-in'}>{seen.me ? 'Go to your sites' : 'Sign in'}</LinkButton>
      </Door>
    );
  }
  const { look, me } = seen;
  const words = ROLE_WORDS[look.role];
  const until = new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeZone: 'UTC' }).format(
    new Date(look.expiresAt),
  );
  return (
    <Door
      title={`Join ${look.siteName}`}
      lead={
        <>
          {look.invitedBy} asks you to join as {words.a}. {words.may} The invitation is for{' '}
          <span className="break-all">{look.email}</span> and stands until {until}.
        </>
      }
    >
      <AnswerInvitation token={token} look={look} me={me} sayingNo={answer === 'no'} />
    </Door>
  );
}
