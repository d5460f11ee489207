import pino from 'pino';
import { env } from './env';

let logger: pino.Logger | undefined;

/** JSON lines on standard output; ids only, never addresses, names, file text or tokens. */
export function log(): pino.Logger {
  logger ??= pino({ level: env().LOG_LEVEL, base: null, timestamp: pino.stdTimeFunctions.isoTime });
  return logger;
}
