import type { Metadata } from 'next';
import { pageContext } from '@/app/_server/context';
import { showMailActions } from '@/lib/data/reminders/mailActions';
import { Problem } from '@/lib/errors';
import { Notice } from '@/lib/ui/feedback/notice';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { LetterReminders } from './_components/letter-reminders';

export const metadata: Metadata = { title: 'Soil sample due', referrer: 'no-referrer' };

type Params = { token?: string; reminder?: string };

async function letterOf(token: string) {
  try {
    return { letter: await showMailActions({ ctx: await pageContext(), input: { token } }) };
  } catch (error) {
    if (error instanceof Problem && (error.code === 'gone' || error.code === 'invalid')) {
      return {
        sentence:
          'This link no longer works. Newer letters carry a fresh one; what is due also stands on your first page.',
      };
    }
    throw error;
  }
}

export default async function ReminderPage({ searchParams }: { searchParams: Promise<Params> }) {
  const { token, reminder } = await searchParams;
  const { letter, sentence } = await letterOf(typeof token === 'string' ? token : '');
  return (
    <PublicFrame links={[{ href: '/sign-in', label: 'Sign in' }]}>
      <h1 className="text-2xl sm:text-3xl">Soil sample due</h1>
      {letter ? (
        <LetterReminders token={String(token)} chosen={reminder ?? null} letter={letter} />
      ) : (
        <div className="mt-6">
          <Notice tone="look">{sentence}</Notice>
        </div>
      )}
    </PublicFrame>
  );
}
