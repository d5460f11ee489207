import type { Metadata } from 'next';
import { pagePerson } from '@/app/_server/context';
import { getToday } from '@/lib/data/today/getToday';
import { TodayBoard } from './_components/today-board';

export const metadata: Metadata = { title: 'Today' };

export default async function TodayPage() {
  const { ctx } = await pagePerson('/today');
  return <TodayBoard first={await getToday({ ctx, input: {} })} />;
}
