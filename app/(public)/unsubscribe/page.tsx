import type { Metadata } from 'next';
import { pageContext } from '@/app/_server/context';
import { lookAtUnsubscribe } from '@/lib/data/mail/lookAtUnsubscribe';
import { Problem } from '@/lib/errors';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { Notice } from '@/lib/ui/feedback/notice';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { StopMail } from './_components/stop-mail';

export const metadata: Metadata = { title: 'Stop reminder mail', referrer: 'no-referrer' };

/** Null when the link is unknown or has ended. */
async function behind(token: string) {
  try {
    return await lookAtUnsubscribe({ ctx: await pageContext(), input: { token } });
  } catch (error) {
    if (error instanceof Problem && (error.code === 'gone' || error.code === 'invalid')) return null;
    throw error;
  }
}

export default async function UnsubscribePage({ searchParams }: { searchParams: Promise<{ token?: string }> }) {
  const { token } = await searchParams;
  const secret = typeof token === 'string' ? token : '';
  const link = await behind(secret);
  return (
    <PublicFrame links={[{ href: '/sign-in', label: 'Sign in' }]}>
      <h1 className="text-2xl sm:text-3xl">Stop reminder mail</h1>
      {link ? (
        <StopMail token={secret} name={link.name} stopped={link.stopped} />
      ) : (
        <div className="mt-6">
          <Notice
            tone="look"
            title="This link no longer works"
            action={
              <LinkButton href="/account#mail" look="quiet">
                Open your settings
              </LinkButton>
            }
          >
            Copy all of it from the mail, or use the link of a newer letter. Your settings have the same switch. Nothing
            was changed.
          </Notice>
        </div>
      )}
    </PublicFrame>
  );
}
