import { DrizzlePostgreSQLAdapter } from '@lucia-auth/adapter-drizzle';
import { type Adapter, type DatabaseSession, Lucia, TimeSpan } from 'lucia';
import { person, session } from '@/db/schema';
import { database } from '../database';

export const SESSION_COOKIE = '__Host-loamline';
export const IDLE_DAYS = 7;

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
    Lucia: ReturnType<typeof luciaAt>;
    DatabaseSessionAttributes: SessionAttributes;
    DatabaseUserAttributes: PersonAttributes;
  }
}

/** Lucia reads this machine's clock; the rows hold the database's. Shifting here keeps two machines, and tests, on one clock. */
class OnDatabaseTime extends DrizzlePostgreSQLAdapter implements Adapter {
  constructor(private readonly aheadMs: number) {
    super(database(), session, person);
  }

  override async getSessionAndUser(id: string): ReturnType<Adapter['getSessionAndUser']> {
    const [found, user] = await super.getSessionAndUser(id);
    if (!found || !user) return [null, null];
    return [{ ...found, expiresAt: new Date(found.expiresAt.getTime() - this.aheadMs) }, user];
  }

  override setSession(value: DatabaseSession): Promise<void> {
    return super.setSession({ ...value, expiresAt: new Date(value.expiresAt.getTime() + this.aheadMs) });
  }

  override updateSessionExpiration(id: string, expiresAt: Date): Promise<void> {
    return super.updateSessionExpiration(id, new Date(expiresAt.getTime() + this.aheadMs));
  }
}

export function luciaAt(now: Date) {
  return new Lucia(new OnDatabaseTime(now.getTime() - Date.now()), {
    sessionExpiresIn: new TimeSpan(IDLE_DAYS, 'd'),
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
