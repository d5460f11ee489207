import { readFile as load, mkdir, writeFile } from 'node:fs/promises';
import { basename, join } from 'node:path';
import { drawFile } from '@/lib/jobs/readFile/draw';
import { readFile } from '@/lib/jobs/readFile/readFile';
import type { Reading } from '@/lib/reading/types';

const USAGE = 'Usage: npm run --silent read -- [--out DIR] [--draw DIR] FILE...';
const AT_ONCE = 2;

type Options = { out: string | null; draw: string | null; files: string[] };

function parse(args: readonly string[]): Options | null {
  const options: Options = { out: null, draw: null, files: [] };
  for (let index = 0; index < args.length; index++) {
    const arg = args[index] ?? '';
    if (arg === '--out' || arg === '--draw') {
      const directory = args[index + 1];
      if (directory === undefined || directory.startsWith('--')) return null;
      if (arg === '--out') options.out = directory;
      else options.draw = directory;
      index += 1;
    } else if (arg.startsWith('--')) return null;
    else options.files.push(arg);
  }
  return options.files.length === 0 ? null : options;
}

type Outcome = { ok: true; reading: Reading } | { ok: false; sentence: string };

async function readOne(path: string, options: Options): Promise<Outcome> {
  try {
    const bytes = new Uint8Array(await load(path));
    const fileName = basename(path);
    const reading = await readFile({ bytes, fileName });
    if (options.draw !== null) await drawFile({ bytes, fileName, directory: options.draw });
    if (options.out !== null) await writeFile(join(options.out, `${fileName}.json`), `${JSON.stringify(reading)}\n`);
    return { ok: true, reading };
  } catch (error) {
    return { ok: false, sentence: `${path}: ${error instanceof Error ? error.message : 'failed'}` };
  }
}

async function main(): Promise<number> {
  const options = parse(process.argv.slice(2));
  if (options === null) {
    process.stderr.write(`${USAGE}\n`);
    return 2;
  }
  for (const directory of [options.out, options.draw])
    if (directory !== null) await mkdir(directory, { recursive: true });
  let failed = 0;
  const waiting: Promise<Outcome>[] = [];
  let started = 0;
  for (let index = 0; index < options.files.length; index++) {
    while (started < options.files.length && started < index + AT_ONCE)
      waiting.push(readOne(options.files[started++] ?? '', options));
    const outcome = await waiting[index];
    if (outcome === undefined || !outcome.ok) {
      failed += 1;
      process.stderr.write(`${outcome?.sentence ?? 'failed'}\n`);
    } else if (options.out === null) process.stdout.write(`${JSON.stringify(outcome.reading)}\n`);
  }
  return failed === 0 ? 0 : 1;
}

main().then(
  (code) => {
    process.exitCode = code;
  },
  (error: unknown) => {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    process.exitCode = 1;
  },
);
