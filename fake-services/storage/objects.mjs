import { randomUUID } from 'node:crypto';
import { mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import path from 'node:path';

/**
 * Buckets and objects as files: bytes under a random name, beside them a .json that names the key. The .json is put in place
 * last and by renaming, so a killed store holds the old object or the new one, never half of either.
 */
export function openObjects(folder) {
  const buckets = new Map();
  mkdirSync(folder, { recursive: true });
  for (const bucket of readdirSync(folder)) buckets.set(bucket, load(path.join(folder, bucket)));

  function load(place) {
    const objects = new Map();
    const names = readdirSync(place);
    const kept = new Set();
    for (const name of names.filter((each) => each.endsWith('.json'))) {
      const object = JSON.parse(readFileSync(path.join(place, name), 'utf8'));
      const earlier = objects.get(object.key);
      if (earlier !== undefined && earlier.sequence > object.sequence) continue;
      objects.set(object.key, object);
    }
    for (const { id } of objects.values()) kept.add(`${id}.json`).add(`${id}.bytes`);
    for (const name of names.filter((each) => !kept.has(each))) rmSync(path.join(place, name));
    return objects;
  }

  const fileOf = (bucket, object, ending) => path.join(folder, bucket, `${object.id}.${ending}`);

  function discard(bucket, object) {
    rmSync(fileOf(bucket, object, 'json'), { force: true });
    rmSync(fileOf(bucket, object, 'bytes'), { force: true });
  }

  return {
    hasBucket: (bucket) => buckets.has(bucket),
    createBucket(bucket) {
      mkdirSync(path.join(folder, bucket), { recursive: true });
      buckets.set(bucket, new Map());
    },
    get: (bucket, key) => buckets.get(bucket)?.get(key),
    bytes: (bucket, object) => readFile(fileOf(bucket, object, 'bytes')),
    put(bucket, key, bytes, facts) {
      const objects = buckets.get(bucket);
      const earlier = objects.get(key);
      const object = { ...facts, key, id: randomUUID(), size: bytes.length, sequence: (earlier?.sequence ?? 0) + 1 };
      writeFileSync(fileOf(bucket, object, 'bytes'), bytes);
      writeFileSync(fileOf(bucket, object, 'making'), JSON.stringify(object));
      renameSync(fileOf(bucket, object, 'making'), fileOf(bucket, object, 'json'));
      objects.set(key, object);
      if (earlier !== undefined) discard(bucket, earlier);
      return object;
    },
    remove(bucket, key) {
      const object = buckets.get(bucket).get(key);
      if (object === undefined) return;
      buckets.get(bucket).delete(key);
      discard(bucket, object);
    },
    /** Keys in the order of their UTF-8 bytes, as S3 lists them. */
    list: (bucket, prefix) =>
      [...buckets.get(bucket).values()]
        .filter(({ key }) => key.startsWith(prefix))
        .sort((a, b) => Buffer.compare(Buffer.from(a.key), Buffer.from(b.key))),
  };
}
