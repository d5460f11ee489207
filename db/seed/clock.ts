import { eq } from 'drizzle-orm';
import { person } from '@/db/schema';
import { type Actor, type Ctx, makeContext } from '@/lib/data/context';
import { database } from '@/lib/data/database';
import { asPersonId } from '@/lib/domain/ids';

/** The same sequence every time (multiplier and modulus of Park and Miller, 1988). */
function sequence(seed: number): (bytes: number) => Uint8Array {
  let state = seed;
  const next = () => {
    state = (state * 48_271) % 2_147_483_647;
    return (state >>> 8) & 0xff;
  };
  return (bytes) => Uint8Array.from({ length: bytes }, next);
}

const random = sequence(20_261_201);

/** Contexts of the past: a record of 2023 says that it was written in 2023. */
async function contextOn(day: string, actor: Actor, time: string): Promise<Ctx> {
  return { ...(await makeContext(actor)), now: new Date(`${day}T${time}Z`), random, requestId: `demo ${day}` };
}

export const nobodyOn = (day: string): Promise<Ctx> => contextOn(day, { kind: 'nobody' }, '16:00:00');
export const workerOn = (day: string): Promise<Ctx> => contextOn(day, { kind: 'worker' }, '17:30:00');

export async function personOn(day: string, email: string): Promise<Ctx> {
  const [row] = await database().select().from(person).where(eq(person.email, email));
  if (!row) throw new Error(`${email} has not signed up.`);
  const { name, units, locale, paper, timeZone, mailHour } = row;
  const verified = row.emailVerifiedAt !== null;
  const signedIn = { id: asPersonId(row.id), email, name, verified, units, locale, paper, timeZone, mailHour };
  return contextOn(day, { kind: 'person', sessionId: 'demo', person: signedIn }, '17:00:00');
}

export const later = (a: string, b: string): string => [a, b].sort().at(-1) ?? a;
