import { createHash, randomUUID } from 'node:crypto';
import { mkdirSync, readdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';

const KEY_LIVES = 24 * 60 * 60 * 1000;

export class IdempotencyError extends Error {}

/** Mails and remembered idempotency keys, one JSON file each, written whole by renaming. */
export function openBox({ folder, now }) {
  const places = { mails: path.join(folder, 'mails'), keys: path.join(folder, 'keys') };
  for (const place of Object.values(places)) mkdirSync(place, { recursive: true });
  const load = (place) =>
    readdirSync(place)
      .filter((name) => name.endsWith('.json'))
      .map((name) => JSON.parse(readFileSync(path.join(place, name), 'utf8')));
  const mails = load(places.mails).sort((a, b) => a.sequence - b.sequence);
  const keys = new Map(load(places.keys).map((entry) => [entry.key, entry]));

  function save(place, name, value) {
    const file = path.join(place, `${name}.json`);
    writeFileSync(`${file}.making`, JSON.stringify(value));
    renameSync(`${file}.making`, file);
  }

  function add(mail) {
    const sequence = (mails.at(-1)?.sequence ?? 0) + 1;
    const kept = { id: randomUUID(), sequence, created_at: now().toISOString(), ...mail };
    save(places.mails, kept.id, kept);
    mails.push(kept);
    return kept;
  }

  const addressOf = (text) => (/<([^>]*)>\s*$/.exec(text)?.[1] ?? text).trim().toLowerCase();

  return {
    /** Newest first; `to` narrows it to one recipient's address, compared as mail compares them. */
    list(to) {
      const wanted = to === undefined || to === '' ? undefined : addressOf(to);
      const isTo = (mail) => [...mail.to, ...mail.cc, ...mail.bcc].some((each) => addressOf(each).includes(wanted));
      return mails.filter((mail) => wanted === undefined || isTo(mail)).reverse();
    },
    get: (id) => mails.find((mail) => mail.id === id),
    /**
     * Keeps the mails once per idempotency key: the same key and body within 24 hours returns the first answer's ids,
     * another body under the same key throws.
     */
    deliver({ key, body, list }) {
      const hash = createHash('sha256').update(body).digest('hex');
      const earlier = key === undefined ? undefined : keys.get(key);
      if (earlier !== undefined && now().getTime() - earlier.at < KEY_LIVES) {
        if (earlier.hash !== hash) throw new IdempotencyError();
        return earlier.ids;
      }
      const ids = list.map((mail) => add({ ...mail, idempotency_key: key ?? null }).id);
      if (key !== undefined) {
        const entry = { key, hash, ids, at: now().getTime() };
        save(places.keys, createHash('sha256').update(key).digest('hex'), entry);
        keys.set(key, entry);
      }
      return ids;
    },
  };
}
