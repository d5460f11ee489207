import type { ReactNode } from 'react';
import { listMySites } from '@/lib/data/sites/listMySites';
import { pagePerson } from '../_server/context';
import { SignedInFrame } from './_components/signed-in-frame';

/** The frame of everything behind a sign-in. Each page and each route asks again who is there: this is not the guard. */
export default async function SignedInLayout({ children }: { children: ReactNode }) {
  const { ctx, person } = await pagePerson('/today');
  const { sites } = await listMySites({ ctx, input: {} });
  return (
    <SignedInFrame sites={sites} name={person.name} paper={person.paper}>
      {children}
    </SignedInFrame>
  );
}
