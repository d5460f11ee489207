import { and, eq, isNull, ne } from 'drizzle-orm';
import { Cookie } from 'lucia';
import type { Transaction } from '@/db/client';
import { person, session } from '@/db/schema';
import { asPersonId } from '@/lib/domain/ids';
import { type Actor, type Ctx, databaseNow } from '../context';
import { withPeople } from '../transaction';
import { luciaAt, SESSION_COOKIE } from './lucia';
import { hashSecret, newSecret } from './secrets';

const ABSOLUTE_SECONDS = 30 * 24 * 3600;
const SHARED_SECONDS = 12 * 3600;

export type OpenedSession = { setCookie: string };

/** On a shared computer the cookie has no age of its own: it goes when the browser is closed. */
function cookie(value: string, maxAge: number | undefined): string {
  const attributes = { httpOnly: true, secure: true, sameSite: 'lax', path: '/' } as const;
  return new Cookie(SESSION_COOKIE, value, maxAge === undefined ? attributes : { ...attributes, maxAge }).serialize();
}

/**
 * For whoever has just shown this password. Null when it was changed meanwhile: the look after the writing waits for a
 * change under way, and a change that comes later finds the session and ends it.
 */
export async function openSession(
  ctx: Ctx,
  shown: { personId: string; passwordHash: string },
  options: { sharedComputer: boolean; userAgent: string | null },
): Promise<OpenedSession | null> {
  const secret = newSecret(ctx);
  const sessionId = hashSecret(secret);
  await luciaAt(ctx.now).createSession(
    shown.personId,
    { createdAt: ctx.now, sharedComputer: options.sharedComputer, userAgent: options.userAgent },
    { sessionId },
  );
  const still = await withPeople((tx) =>
    tx
      .select({ id: person.id })
      .from(person)
      .where(and(eq(person.id, shown.personId), eq(person.passwordHash, shown.passwordHash), isNull(person.disabledAt)))
      .for('share'),
  );
  if (still.length === 0) {
    await closeSession(ctx, sessionId);
    return null;
  }
  return { setCookie: cookie(secret, options.sharedComputer ? undefined : ABSOLUTE_SECONDS) };
}

export async function isSharedComputer(tx: Transaction, sessionId: string): Promise<boolean> {
  const [row] = await tx.select({ shared: session.sharedComputer }).from(session).where(eq(session.id, sessionId));
  return row?.shared ?? false;
}

export const blankCookie = (): OpenedSession => ({ setCookie: cookie('', 0) });

export const closeSession = (ctx: Ctx, sessionId: string): Promise<void> =>
  luciaAt(ctx.now).invalidateSession(sessionId);

/** In the caller's transaction, so that a new password and the end of the old sessions are one change. */
export async function closeAllSessions(tx: Transaction, personId: string, except?: string): Promise<void> {
  await tx
    .delete(session)
    .where(except ? and(eq(session.userId, personId), ne(session.id, except)) : eq(session.userId, personId));
}

/** Who holds this cookie. An expired, over-age or disabled one is nobody, and its row goes. */
export async function actorOfCookie(secret: string | undefined): Promise<Actor> {
  if (!secret || secret.length > 100) return { kind: 'nobody' };
  const now = await databaseNow();
  const lucia = luciaAt(now);
  const { session: found, user } = await lucia.validateSession(hashSecret(secret));
  if (!found || !user) return { kind: 'nobody' };
  const age = (now.getTime() - found.createdAt.getTime()) / 1000;
  if (user.disabledAt || age > (found.sharedComputer ? SHARED_SECONDS : ABSOLUTE_SECONDS)) {
    await lucia.invalidateSession(found.id);
    return { kind: 'nobody' };
  }
  return {
    kind: 'person',
    sessionId: found.id,
    person: {
      id: asPersonId(user.id),
      name: user.name,
      email: user.email,
      verified: user.emailVerifiedAt !== null,
      units: user.units,
      locale: user.locale,
      paper: user.paper,
      timeZone: user.timeZone,
      mailHour: user.mailHour,
    },
  };
}

export function cookieFrom(header: string | null): string | undefined {
  const pairs = (header ?? '').split(';').map((pair) => pair.trim());
  return pairs.find((pair) => pair.startsWith(`${SESSION_COOKIE}=`))?.slice(SESSION_COOKIE.length + 1);
}
