import type { Metadata } from 'next';
import { pageContext } from '@/app/_server/context';
import { showMailActions } from '@/lib/data/reminders/mailActions';
import { Problem } from '@/lib/errors';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { Notice } from '@/lib/ui/feedback/notice';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { LetterReminders } from './_components/letter-reminders';

export const metadata: Metadata = { title: 'Soil sample due', referrer: 'no-referrer' };

type Params = { token?: string; reminder?: string; do?: string };

async function letterOf(token: string) {
  try {
    return { letter: await showMailActions({ ctx: await pageContext(), input: { token } }) };
  } catch (error) {
    if (error instanceof Problem && (error.code === 'gone' || error.code === 'invalid')) {
      return {
        sentence: 'Newer letters carry a fresh one. What is due also stands on your first page; nothing was changed.',
      };
    }
    throw error;
  }
}

export default async function ReminderPage({ searchParams }: { searchParams: Promise<Params> }) {
  const { token, reminder, do: wish } = await searchParams;
  const { letter, sentence } = await letterOf(typeof token === 'string' ? token : '');
  return (
    <PublicFrame links={[{ href: '/sign-in', label: 'Sign in' }]}>
      <h1 className="text-2xl sm:text-3xl">Soil sample due</h1>
      {letter ? (
        <LetterReminders
          token={String(token)}
          chosen={reminder ?? null}
          wish={wish === 'snooze' ? 'snooze-two-weeks' : 'already-sampled'}
          letter={letter}
        />
      ) : (
        <div className="mt-6">
          <Notice
            tone="look"
            title="This link no longer works"
            action={
              <LinkButton href="/today" look="quiet">
                See what is due
              </LinkButton>
            }
          >
            {sentence}
          </Notice>
        </div>
      )}
    </PublicFrame>
  );
}
