import { cookies, headers } from 'next/headers';
import { redirect, notFound as showNotFound } from 'next/navigation';
import { cache } from 'react';
import { type Ctx, makeContext, type SignedIn } from '@/lib/data/context';
import { SESSION_COOKIE } from '@/lib/data/people/lucia';
import { actorOfCookie } from '@/lib/data/people/session';
import { Problem } from '@/lib/errors';

/** The context of a page render, one per request. */
export const pageContext = cache(async (): Promise<Ctx> => {
  const cookie = (await cookies()).get(SESSION_COOKIE)?.value;
  return makeContext(await actorOfCookie(cookie));
});

/** Where the proxy writes down which page was asked for: a layout does not know it, and must not lead back elsewhere. */
const PAGE_ASKED_FOR = 'x-loamline-page';

async function toSignIn(next: string): Promise<never> {
  const asked = (await headers()).get(PAGE_ASKED_FOR) ?? next;
  redirect(`/sign-in?next=${encodeURIComponent(asked)}`);
}

export async function pagePerson(next: string): Promise<{ ctx: Ctx; person: SignedIn }> {
  const ctx = await pageContext();
  if (ctx.actor.kind !== 'person') return toSignIn(next);
  return { ctx, person: ctx.actor.person };
}

/** A read verb on a page: what is not found shows the page for that, what is not allowed the same. */
export async function orNotFound<T>(reading: Promise<T>): Promise<T> {
  try {
    return await reading;
  } catch (error) {
    if (error instanceof Problem && (error.code === 'not-found' || error.code === 'forbidden')) showNotFound();
    if (error instanceof Problem && error.code === 'not-signed-in') return toSignIn('/today');
    throw error;
  }
}
