import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import {
  checkEffect,
  type EffectInput,
  type EffectOutcome,
  noiseClassOf,
  type Reading,
  type TestPoint,
} from '@/lib/domain/effects';
import { isSameSeason } from '@/lib/domain/sampling';

/**
 * Runs the R reference for the same inputs as `checkEffect`, so that a verdict on screen can be held against R's.
 * Which tests judge, their weights and the intended change come from the outcome; every number after that is R's own.
 * Not covered: values near or below the reporting limit, and a drift learnt from earlier tests.
 */
const here = (name: string): string => fileURLToPath(new URL(name, import.meta.url));

export const hasR = (): boolean => spawnSync('Rscript', ['--version']).status === 0;

export type RAnswer = { D: number; s: number; nu: number; lo: number; hi: number; rho: number; verdict: string };

type ROutcome = Extract<EffectOutcome, { ok: true }>;

const reading = (test: TestPoint, log: boolean) => ({
  value: test.value,
  cores: test.cores ?? 8,
  labDuplicates: test.labDuplicates,
  composites: test.composites,
  step: log ? (test.printedStep ?? 0) / test.value : (test.printedStep ?? 0),
});

/** The call for one reading; `which` picks the one with or without controls. */
export function rCall(input: EffectInput, outcome: ROutcome, which: Reading = outcome.reading) {
  const found = noiseClassOf(input.analyte);
  if (!found.ok) throw new Error(`No noise figure for ${input.analyte}.`);
  if (which.scale === 'low-values' || input.drift !== undefined)
    throw new Error('The R reference does not cover this case.');
  const log = found.noise.scale === 'log';
  const { after, before } = outcome;
  const w = (test: TestPoint): number => (log ? Math.log(test.value) : test.value);
  const point = (test: TestPoint) => reading(test, log);
  const mine = (test: TestPoint): boolean => test.analyte === input.analyte;
  const main = before.reduce((best, row) => (row.weight > best.weight ? row : best));
  const controls = which.withControls ? outcome.controls.filter((use) => use.used) : [];
  const byPlot = new Map<string, TestPoint>(
    [...input.siteTests, main.test]
      .filter(
        (test) =>
          mine(test) &&
          test.day === main.test.day &&
          test.method === main.test.method &&
          test.laboratoryId === main.test.laboratoryId,
      )
      .map((test) => [test.plotId, test]),
  );
  const steps = input.noise.untreatedSteps
    .map(({ pairs }) => pairs.filter((pair) => mine(pair.before)))
    .map((pairs) =>
      which.withControls
        ? pairs.filter(
            (pair) => pair.after.day !== after.day || !before.some((row) => row.test.day === pair.before.day),
          )
        : pairs,
    )
    .filter((pairs) => pairs.length > 0);
  const both = (pair: { before: TestPoint; after: TestPoint }) => ({
    before: point(pair.before),
    after: point(pair.after),
  });
  const season = found.noise.season === 'refuse' ? 0 : found.noise.season;
  const plotTest = (plotId: string, like: TestPoint): TestPoint => {
    const test = input.controls
      .find((plot) => plot.plotId === plotId)
      ?.tests.find((other) => mine(other) && other.day === like.day);
    if (test === undefined) throw new Error(`No test of control ${plotId} on ${like.day}.`);
    return test;
  };
  return {
    noise: { ...found.noise, season },
    labDifferences: input.noise.labDuplicates
      .filter((pair) => mine(pair.first))
      .map((pair) => w(pair.first) - w(pair.second)),
    fieldDuplicates: input.noise.fieldDuplicates
      .filter((pair) => mine(pair.first))
      .map((pair) => ({ a: point(pair.first), b: point(pair.second) })),
    untreatedSteps: steps.map((pairs) => pairs.map(both)),
    occasionSteps: steps
      .map((pairs) =>
        pairs.filter(
          (pair) =>
            isSameSeason(pair.before.day, pair.after.day) && pair.before.laboratoryId === pair.after.laboratoryId,
        ),
      )
      .filter((pairs) => pairs.length > 0)
      .map((pairs) => pairs.map(both)),
    after: point(after),
    befores: before.map((row) => ({ ...point(row.test), weight: row.weight })),
    round: [...byPlot.values()].map((test) => test.value),
    controls: controls.map((use) => ({
      after: point(plotTest(use.plotId, after)),
      befores: before.map((row) => point(plotTest(use.plotId, row.test))),
    })),
    seasonWeight: before.reduce((sum, row) => sum + (row.sameSeason ? 0 : row.weight), 0),
    laboratoryWeight: before.reduce((sum, row) => sum + (row.sameLaboratory ? 0 : row.weight), 0),
    intended: outcome.intended,
  };
}

export function runR(cases: readonly ReturnType<typeof rCall>[]): readonly RAnswer[] {
  const folder = mkdtempSync(join(tmpdir(), 'effect-check-'));
  try {
    const file = join(folder, 'in.json');
    writeFileSync(file, JSON.stringify(cases));
    const args = [here('effect-check.reference.R'), here('../../fixtures/tables/effect-check.R'), file];
    const answers: RAnswer[] = JSON.parse(execFileSync('Rscript', args, { encoding: 'utf8' }));
    return answers;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Checks one input both ways; throws when the outcome is a refusal, which R has no part in. */
export function checkBothWays(input: EffectInput): { readonly outcome: ROutcome; readonly r: RAnswer } {
  const outcome = checkEffect(input);
  if (!outcome.ok) throw new Error(`No verdict: ${outcome.reason}`);
  const [r] = runR([rCall(input, outcome)]);
  if (r === undefined) throw new Error('R gave no answer.');
  return { outcome, r };
}
