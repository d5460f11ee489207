import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import type { Expected } from '@/fixtures/make/source';
import type { Reading, ReadResult } from '@/lib/reading/types';

export const REPORTS = join(import.meta.dirname, '..', '..', 'fixtures', 'reports');

export type Fixture = { path: string; expected: Expected };

/** Every fixture on disk with its answer. */
export function fixtures(): Fixture[] {
  const found: Fixture[] = [];
  for (const folder of readdirSync(REPORTS)) {
    for (const name of readdirSync(join(REPORTS, folder))) {
      if (!name.endsWith('.expected.json')) continue;
      const expected: Expected = JSON.parse(readFileSync(join(REPORTS, folder, name), 'utf8'));
      const path = join(REPORTS, folder, basename(expected.file));
      if (!existsSync(path)) throw new Error(`${path} is missing`);
      found.push({ path, expected });
    }
  }
  return found.sort((a, b) => a.path.localeCompare(b.path));
}

type ExpectedSample = Expected['samples'][number];
type ExpectedResult = ExpectedSample['results'][number];

/** How far the middle of a box may lie outside the printed number's box, as a share of the page. */
const TOLERANCE = 0.006;

function boxProblem(expected: ExpectedResult, result: ReadResult): string | null {
  if (expected.cell !== null) {
    const same = result.cell?.row === expected.cell.row && result.cell.column === expected.cell.column;
    return same ? null : `cell ${JSON.stringify(result.cell)} for ${JSON.stringify(expected.cell)}`;
  }
  if (expected.box === null) return null;
  if (result.page !== expected.page || result.box === null) return `page ${result.page} for ${expected.page}`;
  const [x0, y0, x1, y1] = expected.box;
  const [cx, cy] = [(result.box[0] + result.box[2]) / 2, (result.box[1] + result.box[3]) / 2];
  const inside = cx > x0 - TOLERANCE && cx < x1 + TOLERANCE && cy > y0 - TOLERANCE && cy < y1 + TOLERANCE;
  return inside ? null : `box ${JSON.stringify(result.box)} for ${JSON.stringify(expected.box)}`;
}

function resultProblems(expected: ExpectedResult, result: ReadResult): string[] {
  const problems: string[] = [];
  const check = (name: string, got: unknown, want: unknown) => {
    if (got !== want) problems.push(`${name} ${String(got)} for ${String(want)}`);
  };
  check('printed', result.printed, expected.printed);
  check('value', result.value, expected.value);
  check('qualifier', result.qualifier, expected.qualifier);
  check('unit', result.unit, expected.unit);
  check('form', result.form, expected.form);
  check('method', result.method, expected.method);
  check('rating', result.rating, expected.rating);
  const box = boxProblem(expected, result);
  if (box !== null) problems.push(box);
  return problems;
}

export type Comparison = {
  right: number;
  wrong: string[];
  missing: string[];
  extra: string[];
  sure: number;
  sureWrong: number;
  other: string[];
};

function compareSample(expected: ExpectedSample, sample: Reading['samples'][number], into: Comparison) {
  const name = expected.sampleId ?? expected.labNumber ?? '?';
  for (const field of ['sampleId', 'labNumber', 'fieldName', 'dateSampled', 'dateReported'] as const) {
    if (sample[field] !== expected[field]) into.other.push(`${name}: ${field} ${sample[field]} for ${expected[field]}`);
  }
  if (JSON.stringify(sample.depth) !== JSON.stringify(expected.depth))
    into.other.push(`${name}: depth ${JSON.stringify(sample.depth)}`);
  const left = [...sample.results];
  for (const want of expected.results) {
    const at = left.findIndex((result) => result.analyte === want.analyte && result.unit === want.unit);
    const index = at >= 0 ? at : left.findIndex((result) => result.analyte === want.analyte);
    const result = left[index];
    if (result === undefined) {
      into.missing.push(`${name}: ${want.analyte} ${want.printed}`);
      continue;
    }
    left.splice(index, 1);
    const problems = resultProblems(want, result);
    if (result.confidence >= 0.95) into.sure += 1;
    if (problems.length === 0) into.right += 1;
    else {
      into.wrong.push(`${name}: ${want.analyte} ${problems.join(', ')}`);
      if (result.confidence >= 0.95) into.sureWrong += 1;
    }
  }
  for (const result of left) into.extra.push(`${name}: ${result.analyte} ${result.printed} (${result.label})`);
}

/** Reader's answer against the generator's, cell by cell. */
export function compare(expected: Expected, reading: Reading): Comparison {
  const into: Comparison = { right: 0, wrong: [], missing: [], extra: [], sure: 0, sureWrong: 0, other: [] };
  if (reading.kind !== expected.kind) into.other.push(`kind ${reading.kind} for ${expected.kind}`);
  if ((reading.error?.code ?? null) !== expected.code && expected.kind === 'refused')
    into.other.push(`code ${reading.error?.code} for ${expected.code}`);
  if (reading.lab.name !== expected.lab) into.other.push(`lab ${reading.lab.name} for ${expected.lab}`);
  const left = [...reading.samples];
  for (const want of expected.samples) {
    const byBoth = left.findIndex((sample) => sample.sampleId === want.sampleId && sample.labNumber === want.labNumber);
    const index =
      byBoth >= 0
        ? byBoth
        : left.findIndex(
            (sample) =>
              sample.sampleId === want.sampleId || (sample.labNumber !== null && sample.labNumber === want.labNumber),
          );
    const sample = left[index];
    if (sample === undefined) {
      into.missing.push(...want.results.map((result) => `${want.sampleId}: ${result.analyte}`));
      continue;
    }
    left.splice(index, 1);
    compareSample(want, sample, into);
  }
  for (const sample of left)
    into.extra.push(...sample.results.map((result) => `${sample.sampleId}: ${result.analyte} ${result.printed}`));
  for (const advice of expected.recommendations) {
    const found = reading.recommendations.some(
      (one) =>
        one.sampleId === advice.sampleId &&
        one.item === advice.item &&
        one.amount === advice.amount &&
        one.unit === advice.unit,
    );
    if (!found)
      into.other.push(
        `advice ${JSON.stringify(advice)} not among ${JSON.stringify(reading.recommendations.map(({ sampleId, item, amount, unit }) => ({ sampleId, item, amount, unit })))}`,
      );
  }
  if (reading.recommendations.length !== expected.recommendations.length)
    into.other.push(`${reading.recommendations.length} pieces of advice for ${expected.recommendations.length}`);
  for (const doubt of expected.mustDoubt) {
    const results = reading.samples
      .filter((sample) => sample.sampleId === doubt.sampleId)
      .flatMap((sample) => sample.results);
    const doubts = results
      .filter((result) => result.analyte === doubt.analyte)
      .flatMap((result) => result.doubts.map((one) => one.code));
    if (!doubts.includes(doubt.code)) into.other.push(`no doubt ${doubt.code} on ${doubt.analyte}`);
  }
  return into;
}
