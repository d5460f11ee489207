import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';

/** Secrets for this machine, made once and kept beside the data, readable by their owner only. */
export function keptSecrets(folder) {
  const file = path.join(folder, 'secrets.json');
  mkdirSync(folder, { recursive: true });
  const secret = () => randomBytes(32).toString('hex');
  const fresh = { APP_SECRET: secret(), S3_SECRET_ACCESS_KEY: secret(), RESEND_API_KEY: `re_${secret()}` };
  const kept = existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : {};
  const all = { ...fresh, ...kept };
  if (Object.keys(all).some((name) => kept[name] === undefined))
    writeFileSync(file, JSON.stringify(all, null, 2), { mode: 0o600 });
  return all;
}

/** What the running program may know: the owner's database address is for the migration steps only. */
export function withoutOwner(env) {
  const { DATABASE_OWNER_URL, ...rest } = env;
  return rest;
}
