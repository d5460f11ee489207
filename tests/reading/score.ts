import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import type { Reading, ReadResult } from '@/lib/reading/types';

const FIXTURES = join(import.meta.dirname, '..', '..', 'fixtures');

type Box = readonly [number, number, number, number];
type WantedResult = {
  readonly analyte: string;
  readonly printed: string;
  readonly value: number | null;
  readonly qualifier: string;
  readonly unit: string | null;
  readonly form: string | null;
  readonly method: string | null;
  readonly rating: string | null;
  readonly page: number | null;
  readonly box: Box | null;
  readonly cell: { readonly sheet?: number; readonly row: number; readonly column: number } | null;
};
type WantedSample = {
  readonly sampleId: string | null;
  readonly labNumber: string | null;
  readonly fieldName: string | null;
  readonly dateSampled: string | null;
  readonly results: readonly WantedResult[];
};
export type Wanted = {
  readonly file: string;
  readonly kind: 'soil' | 'not-soil' | 'refused';
  readonly producer: string;
  readonly form?: string;
  readonly samples: readonly WantedSample[];
  readonly notResults?: readonly string[];
};
export type Scored = { readonly path: string; readonly form: string; readonly wanted: Wanted };

function filesUnder(folder: string): string[] {
  if (!existsSync(folder)) return [];
  return readdirSync(folder, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && entry.name.endsWith('.expected.json'))
    .map((entry) => join(entry.parentPath, entry.name))
    .sort();
}

/** Reports with their answers below fixtures/<set>; the folder names the form where the answer does not. */
export function reportsOf(set: string): Scored[] {
  return filesUnder(join(FIXTURES, set)).map((answer) => {
    const wanted: Wanted = JSON.parse(readFileSync(answer, 'utf8'));
    return {
      path: join(dirname(answer), basename(wanted.file)),
      form: wanted.form ?? basename(dirname(answer)),
      wanted,
    };
  });
}

/** text PDF, data file or picture: the three goals are set apart. */
export function familyOf(scored: Scored): 'text PDF' | 'data file' | 'scan or photo' {
  if (/scan|photo/.test(scored.form) || /\.(png|jpe?g)$/i.test(scored.path) || /\/scans\//.test(scored.path))
    return 'scan or photo';
  return /\.pdf$/i.test(scored.path) ? 'text PDF' : 'data file';
}

export type Score = {
  wanted: number;
  read: number;
  /** Sample, analyte, value, sign and unit all as printed. */
  right: number;
  /** Read rows whose number is none of the answer's. */
  notResults: number;
  sure: number;
  sureRight: number;
  /** Of the right rows: method, form, rating and place as well. */
  details: { method: number; form: number; rating: number; placed: number; box: number };
  kindRight: boolean;
  wrong: string[];
};

const plain = (text: string | null) =>
  (text ?? '')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();

type ReadSample = Reading['samples'][number];

function matchOf(want: WantedSample, left: readonly ReadSample[]): ReadSample | undefined {
  const ids = (sample: WantedSample | ReadSample) => [sample.sampleId, sample.labNumber, sample.fieldName];
  const [a, b, c] = ids(want).map(plain);
  const score = (sample: ReadSample) => {
    const [x, y, z] = ids(sample).map(plain);
    const same = (one: string | undefined, other: string | undefined) => one !== '' && one === other;
    const named = (same(a, x) ? 4 : 0) + (same(b, y) ? 4 : 0) + (same(c, z) ? 1 : 0);
    return named > 0 ? named : same(a, y) || same(a, z) || same(b, x) || same(c, x) ? 0.5 : 0;
  };
  const best = [...left].sort((one, other) => score(other) - score(one))[0];
  return best !== undefined && score(best) > 0 ? best : undefined;
}

function boxRight(want: WantedResult, got: ReadResult): boolean | null {
  if (want.cell !== null && want.cell !== undefined)
    return got.cell?.row === want.cell.row && got.cell.column === want.cell.column;
  if (want.box === null || want.box === undefined) return null;
  if (got.page !== want.page || got.box === null) return false;
  const [cx, cy] = [(got.box[0] + got.box[2]) / 2, (got.box[1] + got.box[3]) / 2];
  const [x0, a, x1, b] = want.box;
  const [y0, y1] = [Math.min(a, b), Math.max(a, b)];
  return cx > x0 - 0.008 && cx < x1 + 0.008 && cy > y0 - 0.008 && cy < y1 + 0.008;
}

const same = (want: WantedResult, got: ReadResult) =>
  got.analyte === want.analyte &&
  got.value === want.value &&
  got.qualifier === want.qualifier &&
  got.unit === want.unit;

function emptyScore(): Score {
  return {
    wanted: 0,
    read: 0,
    right: 0,
    notResults: 0,
    sure: 0,
    sureRight: 0,
    details: { method: 0, form: 0, rating: 0, placed: 0, box: 0 },
    kindRight: true,
    wrong: [],
  };
}

function tell(result: ReadResult): string {
  return `${result.analyte} ${result.printed} ${result.unit ?? 'no unit'} ${result.method ?? ''} @${result.confidence}`;
}

function scoreSample(want: WantedSample, sample: ReadSample | undefined, score: Score): ReadResult[] {
  const left = [...(sample?.results ?? [])];
  const name = want.sampleId ?? want.labNumber ?? want.fieldName ?? '?';
  for (const result of want.results) {
    score.wanted += 1;
    const fits = left.filter((got) => same(result, got));
    const got =
      fits.find((one) => boxRight(result, one) === true) ?? fits.find((one) => one.method === result.method) ?? fits[0];
    if (got === undefined) {
      const near = left.filter((one) => one.analyte === result.analyte).map(tell);
      score.wrong.push(
        `${name}: ${result.analyte} ${result.printed} ${result.unit ?? 'no unit'} not read${near.length > 0 ? `; read ${near.join(' | ')}` : ''}`,
      );
      continue;
    }
    left.splice(left.indexOf(got), 1);
    score.right += 1;
    if (got.confidence >= 0.95) score.sureRight += 1;
    if (got.method === result.method) score.details.method += 1;
    else score.wrong.push(`${name}: (method) ${result.analyte} ${got.method} for ${result.method}`);
    if (got.form === result.form) score.details.form += 1;
    if ((got.rating ?? null) === (result.rating ?? null)) score.details.rating += 1;
    else score.wrong.push(`${name}: (rating) ${result.analyte} ${got.rating} for ${result.rating}`);
    const placed = boxRight(result, got);
    if (placed !== null) score.details.box += 1;
    if (placed === true) score.details.placed += 1;
    else if (placed === false)
      score.wrong.push(
        `${name}: (place) ${result.analyte} ${result.printed} ${JSON.stringify(got.box)} for ${JSON.stringify(result.box)}`,
      );
  }
  return left;
}

/** One file's reading against its answer. A single sample without a name matches whatever sample is alone. */
export function scoreOf(wanted: Wanted, reading: Reading): Score {
  const score = emptyScore();
  score.kindRight = reading.kind === wanted.kind;
  if (!score.kindRight) score.wrong.push(`kind ${reading.kind} (${reading.error?.code ?? ''}) for ${wanted.kind}`);
  const left = [...reading.samples];
  const extra: ReadResult[] = [];
  const alone = wanted.samples.length === 1 && left.length === 1;
  for (const want of wanted.samples) {
    const sample = alone ? left[0] : matchOf(want, left);
    if (sample !== undefined) left.splice(left.indexOf(sample), 1);
    else
      score.wrong.push(
        `sample ${want.sampleId} / ${want.labNumber} / ${want.fieldName} not among ${reading.samples.map((one) => `${one.sampleId} / ${one.labNumber} / ${one.fieldName}`).join(' ; ')}`,
      );
    if (sample !== undefined && sample.dateSampled !== want.dateSampled)
      score.wrong.push(`(date) ${want.sampleId}: ${sample.dateSampled} for ${want.dateSampled}`);
    extra.push(...scoreSample(want, sample, score));
  }
  extra.push(...left.flatMap((sample) => sample.results));
  const all = reading.samples.flatMap((sample) => sample.results);
  score.read = all.length;
  score.sure = all.filter((result) => result.confidence >= 0.95).length;
  const numbers = wanted.samples.flatMap((sample) => sample.results);
  for (const got of extra) {
    const known = numbers.some(
      (want) => boxRight(want, got) === true || (want.analyte === got.analyte && want.value === got.value),
    );
    if (!known) score.notResults += 1;
    score.wrong.push(`extra ${known ? '' : '(no result) '}${tell(got)} "${got.label}"`);
  }
  return score;
}

export type Sum = {
  files: number;
  wanted: number;
  read: number;
  right: number;
  notResults: number;
  sure: number;
  sureRight: number;
  kinds: number;
};

export function sumOf(scores: readonly Score[]): Sum {
  const sum: Sum = { files: 0, wanted: 0, read: 0, right: 0, notResults: 0, sure: 0, sureRight: 0, kinds: 0 };
  for (const score of scores) {
    sum.files += 1;
    sum.wanted += score.wanted;
    sum.read += score.read;
    sum.right += score.right;
    sum.notResults += score.notResults;
    sum.sure += score.sure;
    sum.sureRight += score.sureRight;
    if (score.kindRight) sum.kinds += 1;
  }
  return sum;
}

export function f1Of(sum: Sum): { precision: number; recall: number; f1: number } {
  const precision = sum.read === 0 ? (sum.wanted === 0 ? 1 : 0) : sum.right / sum.read;
  const recall = sum.wanted === 0 ? 1 : sum.right / sum.wanted;
  return { precision, recall, f1: precision + recall === 0 ? 0 : (2 * precision * recall) / (precision + recall) };
}
