import { hash, verify } from '@node-rs/argon2';
import { Problem } from '@/lib/errors';

/** OWASP Password Storage Cheat Sheet: argon2id with 19 MiB, two passes, one lane. */
const COST = { memoryCost: 19456, timeCost: 2, parallelism: 1 };
const PREFIX = '$argon2id$v=19$m=19456,t=2,p=1$';
const AT_ONCE = 4;
const MAY_WAIT = 200;

let running = 0;
const waiting: (() => void)[] = [];

/** A hash takes about 50 ms of a core: four at once, so that a rush of sign-ins does not stop every other page. */
async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= AT_ONCE) {
    if (waiting.length >= MAY_WAIT) {
      throw new Problem('unavailable', 'Very many people are signing in right now. Try again in a moment.', {
        retryAfterSeconds: 2,
      });
    }
    await new Promise<void>((go) => waiting.push(go));
  } else {
    running += 1;
  }
  try {
    return await work();
  } finally {
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}

export const hashingNow = () => ({ running, waiting: waiting.length });

/** The same letters typed on two devices may be composed differently. */
const composed = (password: string) => password.normalize('NFC');

export const hashPassword = (password: string): Promise<string> => inTurn(() => hash(composed(password), COST));

let dummy: Promise<string> | undefined;

/** With nobody to compare to, a hash of nothing is compared: the answer takes as long for an unknown address. */
export async function fitsPassword(stored: string | undefined, password: string): Promise<boolean> {
  dummy ??= hashPassword('nobody has this password');
  const against = stored?.startsWith('$argon2id$v=') ? stored : await dummy;
  const fits = await inTurn(() => verify(against, composed(password)));
  return fits && against === stored;
}

export const isOutdatedHash = (stored: string) => !stored.startsWith(PREFIX);
