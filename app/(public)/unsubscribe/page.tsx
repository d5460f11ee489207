import type { Metadata } from 'next';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { StopMail } from './_components/stop-mail';

export const metadata: Metadata = { title: 'Stop reminder mail', referrer: 'no-referrer' };

export default async function UnsubscribePage({ searchParams }: { searchParams: Promise<{ token?: string }> }) {
  const { token } = await searchParams;
  return (
    <PublicFrame links={[{ href: '/sign-in', label: 'Sign in' }]}>
      <h1 className="text-2xl sm:text-3xl">Stop reminder mail</h1>
      <StopMail token={typeof token === 'string' ? token : ''} />
    </PublicFrame>
  );
}
