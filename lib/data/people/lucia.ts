import { DrizzlePostgreSQLAdapter } from '@lucia-auth/adapter-drizzle';
import { Lucia, TimeSpan } from 'lucia';
import { person, session } from '@/db/schema';
import { database } from '../database';

export const SESSION_COOKIE = '__Host-loamline';

type SessionAttributes = { createdAt: Date; sharedComputer: boolean; userAgent: string | null };
type PersonAttributes = {
  name: string;
  email: string;
  emailVerifiedAt: Date | null;
  disabledAt: Date | null;
  units: 'us' | 'metric';
  locale: string;
  paper: 'letter' | 'a4';
  timeZone: string;
  mailHour: number;
};

declare module 'lucia' {
  interface Register {
    Lucia: ReturnType<typeof lucia>;
    DatabaseSessionAttributes: SessionAttributes;
    DatabaseUserAttributes: PersonAttributes;
  }
}

let instance: ReturnType<typeof build> | undefined;

function build() {
  return new Lucia(new DrizzlePostgreSQLAdapter(database(), session, person), {
    sessionExpiresIn: new TimeSpan(7, 'd'),
    sessionCookie: { name: SESSION_COOKIE, attributes: { secure: true, sameSite: 'lax', path: '/' } },
    getSessionAttributes: (row) => ({ createdAt: row.createdAt, sharedComputer: row.sharedComputer }),
    getUserAttributes: (row) => ({
      name: row.name,
      email: row.email,
      emailVerifiedAt: row.emailVerifiedAt,
      disabledAt: row.disabledAt,
      units: row.units,
      locale: row.locale,
      paper: row.paper,
      timeZone: row.timeZone,
      mailHour: row.mailHour,
    }),
  });
}

export function lucia() {
  instance ??= build();
  return instance;
}
