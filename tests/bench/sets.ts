import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { readFile as readReport } from '@/lib/jobs/readFile/readFile';
import { f1Of, familyOf, reportsOf, type Score, scoreOf, sumOf } from '../reading/score';
import { line, median, ms, quantile } from './measure';

type Timed = { form: string; family: ReturnType<typeof familyOf>; score: Score; milliseconds: number; pages: number };

async function scored(set: string, family: ReturnType<typeof familyOf> | null): Promise<Timed[]> {
  const found: Timed[] = [];
  for (const one of reportsOf(set)) {
    if (one.wanted.kind === 'refused' || (family !== null && familyOf(one) !== family)) continue;
    const bytes = new Uint8Array(readFileSync(one.path));
    const from = performance.now();
    const reading = await readReport({ bytes, fileName: one.wanted.file });
    const milliseconds = performance.now() - from;
    found.push({
      form: one.form,
      family: familyOf(one),
      score: scoreOf(one.wanted, reading),
      milliseconds,
      pages: Math.max(1, reading.pages),
    });
  }
  return found;
}

function tell(name: string, found: readonly Timed[]) {
  const sum = sumOf(found.map((one) => one.score));
  const { precision, recall, f1 } = f1Of(sum);
  const sure = sum.sure === 0 ? 'none' : `${((100 * sum.sureRight) / sum.sure).toFixed(2)} % of ${sum.sure}`;
  line(
    name,
    `P ${precision.toFixed(3)} R ${recall.toFixed(3)} F1 ${f1.toFixed(3)}  ${sum.files} files, ${sum.wanted} results; sure and right ${sure}; no result taken for one ${sum.notResults} of ${sum.read}; kind right ${sum.kinds} of ${sum.files}`,
  );
}

/** How well each form is read: of the reports that were tuned on, and of the others, which nobody who tunes has seen. */
export async function benchForms(): Promise<void> {
  for (const [name, sets] of [
    ['tuned on', ['reports', 'second-hand']],
    ['the other half', ['unseen']],
  ] as const) {
    const found: Timed[] = [];
    for (const set of sets) found.push(...(await scored(set, null)));
    for (const family of ['text PDF', 'data file', 'scan or photo'] as const) {
      const own = found.filter((one) => one.family === family);
      tell(`${name}: ${family}`, own);
      for (const form of [...new Set(own.map((one) => one.form))].sort())
        tell(
          `  ${form}`,
          own.filter((one) => one.form === form),
        );
      if (family === 'scan or photo' && own.length > 0) {
        const seconds = own.map((one) => one.milliseconds / one.pages).sort((a, b) => a - b);
        line(
          `${name}: a scanned page, start to answer`,
          ms(median(seconds)),
          `6 s on one core; 95th of 100: ${ms(quantile(seconds, 0.95))}`,
        );
      }
    }
  }
}

/** The whole reading process against `pdftotext -layout` on the same file, where that program is there. */
export async function benchLayout(files: readonly { name: string; path: string }[]): Promise<void> {
  for (const { name, path } of files) {
    const bytes = new Uint8Array(readFileSync(path));
    try {
      const layout = [0, 1, 2].map(() => {
        const from = performance.now();
        execFileSync('pdftotext', ['-layout', path, '-'], { maxBuffer: 64 * 1024 * 1024 });
        return performance.now() - from;
      });
      const reading: number[] = [];
      for (let turn = 0; turn < 3; turn++) {
        const from = performance.now();
        await readReport({ bytes, fileName: name });
        reading.push(performance.now() - from);
      }
      line(
        `${name}: reading process / pdftotext -layout process`,
        `${ms(median(reading.sort((a, b) => a - b)))} / ${ms(median(layout.sort((a, b) => a - b)))}`,
      );
    } catch {
      line(`${name}: pdftotext -layout`, 'not on this machine');
    }
  }
}
