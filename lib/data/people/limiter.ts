import { createHash } from 'node:crypto';
import { RateLimiterMemory, RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { Problem } from '@/lib/errors';
import type { Ctx } from '../context';
import { database } from '../database';
import { statement } from '../transaction';

/** What the limiter takes for a client of the pg package. */
const store = {
  async query({ text, values }: { text: string; values: unknown[] }) {
    const rows = [...(await database().execute(statement(text, values)))];
    return { rows, rowCount: rows.length };
  },
};

/** Counted in PostgreSQL, so that a restart or a second machine forgets nothing; in memory while the database is away. */
function limiter(keyPrefix: string, points: number, duration: number) {
  return new RateLimiterPostgres({
    storeClient: store,
    storeType: 'client',
    tableName: 'sign_in_attempt',
    tableCreated: true,
    clearExpiredByTimeout: true,
    keyPrefix,
    points,
    duration,
    insuranceLimiter: new RateLimiterMemory({ keyPrefix, points, duration }),
  });
}

const HOUR = 3600;
const FREE_TRIES = 5;
const FIRST_WAIT = 60;
const LONGEST_WAIT = HOUR;

const limiters = {
  try: limiter('try', FREE_TRIES, HOUR / 4),
  strike: limiter('strike', 1000, 24 * HOUR),
  place: limiter('place', 40, HOUR / 4),
  mail: limiter('mail', 5, HOUR),
  reset: limiter('reset', 3, HOUR),
};

/** The table holds no addresses. */
const keyOf = (text: string) => createHash('sha256').update(text.toLowerCase()).digest('hex');

async function refusal(attempt: Promise<unknown>): Promise<RateLimiterRes | null> {
  try {
    await attempt;
    return null;
  } catch (refused) {
    if (refused instanceof RateLimiterRes) return refused;
    throw refused;
  }
}

function inWords(seconds: number): string {
  if (seconds < 90) return `${seconds} seconds`;
  return `${Math.ceil(seconds / 60)} minutes`;
}

function tooMany(seconds: number, what: string): Problem {
  const wait = Math.max(1, Math.ceil(seconds));
  return new Problem('too-many', `${what} Wait ${inWords(wait)}, then try again.`, { retryAfterSeconds: wait });
}

/**
 * Taken before the password is looked at, so that fifty guesses at once are still five. Each round of five doubles the
 * wait, up to an hour; a new password by mail opens the door at once.
 */
export async function spendTry(email: string): Promise<void> {
  const key = keyOf(email);
  const refused = await refusal(limiters.try.consume(key));
  if (!refused) return;
  let seconds = refused.msBeforeNext / 1000;
  if (refused.consumedPoints === FREE_TRIES + 1) {
    const strike = await limiters.strike.consume(key);
    seconds = Math.min(FIRST_WAIT * 2 ** (strike.consumedPoints - 1), LONGEST_WAIT);
    await limiters.try.block(key, seconds);
  }
  throw tooMany(seconds, 'Too many tries for this address. A new password by mail works at once.');
}

export async function forgiveTries(email: string): Promise<void> {
  const key = keyOf(email);
  await Promise.all([limiters.try.delete(key), limiters.strike.delete(key)]);
}

/** Per address of the network, where the settings say how to know it. */
export async function spendPlace(ctx: Ctx): Promise<void> {
  if (ctx.ip === '' || ctx.ip === 'direct') return;
  const refused = await refusal(limiters.place.consume(ctx.ip));
  if (refused) throw tooMany(refused.msBeforeNext / 1000, 'Too many tries from this connection.');
}

/** Counted for every address alike, known or not. */
export async function spendMail(email: string): Promise<void> {
  const refused = await refusal(limiters.mail.consume(keyOf(email)));
  if (refused) throw tooMany(refused.msBeforeNext / 1000, 'Several mails went to this address already; look for them.');
}

/** False when this hour's three have gone out: then the answer is the same and no further mail is sent. */
export const maySendReset = async (email: string): Promise<boolean> =>
  (await refusal(limiters.reset.consume(keyOf(email)))) === null;
