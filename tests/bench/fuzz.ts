import { readdirSync, readFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { type FuzzFile, fuzz } from '../support/fuzz';
import { line } from './measure';

const REPORTS = 'fixtures/reports';
const KINDS = /\.(pdf|csv|tsv|txt|xlsx|xls|xml|json)$/;

/** Reports that are read without looking at pictures, and are small enough to be hurt thousands of times. */
export function fuzzFiles(withPictures: boolean): FuzzFile[] {
  const kinds = withPictures ? /\.(pdf|csv|tsv|txt|xlsx|xls|xml|json|png|jpe?g)$/ : KINDS;
  return readdirSync(REPORTS, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && kinds.test(entry.name) && !entry.name.endsWith('.expected.json'))
    .filter((entry) => withPictures || !/scans|demo|refused/.test(entry.parentPath))
    .map((entry) => join(entry.parentPath, entry.name))
    .sort()
    .map((path) => ({ fileName: basename(path), bytes: new Uint8Array(readFileSync(path)) }))
    .filter((file) => file.bytes.length > 0 && file.bytes.length < 400_000);
}

/** `npm run bench -- fuzz`: some thousand mutants of the fixture reports, each of which must end in a sound reading. */
export async function benchFuzz(count: number, seed: number, withPictures = false): Promise<void> {
  const files = fuzzFiles(withPictures);
  const sum = await fuzz({ files, count, seed, milliseconds: 30 * 60_000, lanes: 2 });
  line('mutants read / files they come from', `${sum.tried} / ${files.length}`);
  const ends = [...sum.ends].sort((a, b) => b[1] - a[1]).map(([name, times]) => `${name} ${times}`);
  line('how they ended', ends.join(', '));
  line('slowest / most memory', `${Math.round(sum.slowestMs)} ms / ${Math.round(sum.peakBytes / 1024 / 1024)} MB`);
  line('faults (the process died or threw, or a reading was unsound)', String(sum.faults.length));
  for (const { fileName, seed: of, what } of [...sum.faults, ...sum.stopped].slice(0, 30))
    line(`  ${fileName}, seed ${of}`, what);
}
