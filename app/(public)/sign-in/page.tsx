import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { pageContext } from '@/app/_server/context';
import { Notice } from '@/lib/ui/feedback/notice';
import { Door } from '../_components/door';
import { safeNext } from '../_components/next-path';
import { SignInForm } from './_components/sign-in-form';

export const metadata: Metadata = { title: 'Sign in' };

const WHY: Record<string, { title: string; said: string }> = {
  'signed-out': { title: 'You are signed out', said: 'Nothing of your sites is left in this browser.' },
  everywhere: { title: 'Signed out everywhere', said: 'Every device needs the password again.' },
  confirmed: { title: 'Your address is confirmed', said: 'Sign in with the password you chose.' },
  reset: { title: 'The new password is set', said: 'Every device was signed out. Sign in with the new password.' },
};

type Search = { next?: string | string[]; why?: string | string[]; email?: string | string[] };
const one = (value: string | string[] | undefined) => (typeof value === 'string' ? value : undefined);

export default async function SignInPage({ searchParams }: { searchParams: Promise<Search> }) {
  const search = await searchParams;
  const next = safeNext(one(search.next));
  if ((await pageContext()).actor.kind === 'person') redirect(next);
  const why = WHY[one(search.why) ?? ''];
  return (
    <Door title="Sign in" links={[{ href: '/sign-up', label: 'Make an account' }]}>
      {why ? (
        <Notice tone="saved" title={why.title} className="mb-7 max-w-measure">
          {why.said}
        </Notice>
      ) : null}
      <SignInForm next={next} email={one(search.email) ?? ''} />
    </Door>
  );
}
