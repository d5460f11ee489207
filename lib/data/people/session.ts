import { asPersonId } from '@/lib/domain/ids';
import { type Actor, type Ctx, databaseNow } from '../context';
import { lucia, SESSION_COOKIE } from './lucia';
import { hashSecret, newSecret } from './secrets';

const ABSOLUTE_MS = 30 * 24 * 3600 * 1000;
const SHARED_MS = 12 * 3600 * 1000;

export type OpenedSession = { setCookie: string };

export async function openSession(
  ctx: Ctx,
  personId: string,
  options: { sharedComputer: boolean; userAgent: string | null },
): Promise<OpenedSession> {
  const secret = newSecret(ctx);
  await lucia().createSession(
    personId,
    { createdAt: ctx.now, sharedComputer: options.sharedComputer, userAgent: options.userAgent },
    { sessionId: hashSecret(secret) },
  );
  return { setCookie: lucia().createSessionCookie(secret).serialize() };
}

export const closeSession = async (sessionId: string): Promise<OpenedSession> => {
  await lucia().invalidateSession(sessionId);
  return { setCookie: lucia().createBlankSessionCookie().serialize() };
};

export const closeAllSessions = (personId: string): Promise<void> => lucia().invalidateUserSessions(personId);

/** Who holds this cookie. An expired, over-age or disabled one is nobody, and its row goes. */
export async function actorOfCookie(secret: string | undefined): Promise<Actor> {
  if (!secret || secret.length > 100) return { kind: 'nobody' };
  const { session, user } = await lucia().validateSession(hashSecret(secret));
  if (!session || !user) return { kind: 'nobody' };
  const age = (await databaseNow()).getTime() - session.createdAt.getTime();
  if (user.disabledAt || age > (session.sharedComputer ? SHARED_MS : ABSOLUTE_MS)) {
    await lucia().invalidateSession(session.id);
    return { kind: 'nobody' };
  }
  return {
    kind: 'person',
    sessionId: session.id,
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
