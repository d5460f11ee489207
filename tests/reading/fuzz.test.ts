import { expect, it } from 'vitest';
import { mutant } from '@/fixtures/make/hostile/mutate';
import { fuzzFiles } from '../bench/fuzz';
import { fuzz, unsound } from '../support/fuzz';

/** As many as fit into this; `npm run bench -- fuzz` tries thousands. */
const MILLISECONDS = 13_000;
const MUTANTS = 240;
const FILES = 30;

it('hurt reports always end in a sound reading', { timeout: 60_000 }, async () => {
  const all = fuzzFiles(false);
  const files = all.filter(
    (_, at) => Math.floor((at * FILES) / all.length) !== Math.floor(((at - 1) * FILES) / all.length),
  );
  expect(files).toHaveLength(FILES);
  const sum = await fuzz({ files, count: MUTANTS, seed: 7_001, milliseconds: MILLISECONDS, lanes: 2 });
  expect(sum.faults).toEqual([]);
  expect([...sum.ends.values()].reduce((all, times) => all + times, 0)).toBe(sum.tried);
  // Some are still read and some are refused: the mutants are neither all whole nor all beyond reading.
  expect(sum.tried).toBeGreaterThan(FILES / 2);
  expect(sum.ends.get('soil')).toBeGreaterThan(0);
  expect(sum.ends.size).toBeGreaterThan(2);
});

it('makes the same mutant of the same seed, and another of another', () => {
  const [file] = fuzzFiles(false);
  if (file === undefined) throw new Error('There is no report to hurt.');
  expect(mutant(file.bytes, 5).equals(mutant(file.bytes, 5))).toBe(true);
  expect(mutant(file.bytes, 5).equals(mutant(file.bytes, 6))).toBe(false);
});

it('knows an unsound reading when it sees one', () => {
  expect(unsound({ samples: [{ value: 1, label: 'pH' }] })).toBeNull();
  expect(unsound({ samples: [{ value: Number.NaN }] })).toContain('NaN in value');
  expect(unsound({ samples: [{ label: 'p\u202eH' }] })).toContain('hidden');
  expect(unsound({ samples: [{ label: 'x'.repeat(1_001) }] })).toContain('without end');
});
