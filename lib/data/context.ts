import { randomBytes, randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import type { PersonId } from '@/lib/domain/ids';
import { database } from './database';

export type SignedIn = {
  id: PersonId;
  name: string;
  email: string;
  verified: boolean;
  units: 'us' | 'metric';
  locale: string;
  paper: 'letter' | 'a4';
  timeZone: string;
  mailHour: number;
};

export type Actor = { kind: 'person'; person: SignedIn; sessionId: string } | { kind: 'nobody' } | { kind: 'worker' };

/** Who asks, when, and by which chance: everything a verb may not fetch for itself. */
export type Ctx = {
  actor: Actor;
  now: Date;
  random: (bytes: number) => Uint8Array;
  requestId: string;
  ip: string;
};

/** "Now" is the database's time, so that web and worker on two machines agree; tests move it there. */
export async function databaseNow(): Promise<Date> {
  const rows = await database().execute<{ now: string }>(sql`select loamline_now() as now`);
  const text = rows[0]?.now;
  if (!text) throw new Error('The database did not say what time it is.');
  return new Date(text);
}

export async function makeContext(actor: Actor, extras: { ip?: string; requestId?: string } = {}): Promise<Ctx> {
  return {
    actor,
    now: await databaseNow(),
    random: (bytes) => randomBytes(bytes),
    requestId: extras.requestId ?? randomUUID(),
    ip: extras.ip ?? '',
  };
}
