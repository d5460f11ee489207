import type { Doubt, ReportState } from '@/db/schema';
import type { Reading } from '@/lib/reading/types';

const NO_ROWS: Doubt = {
  code: 'no-rows',
  sentence:
    'No soil results were found in this file. It is kept; if it does hold a soil test, type the numbers in beside the page.',
};
const NOT_SOIL: Doubt = {
  code: 'not-soil',
  sentence: 'This looks like a report of something other than soil, so nothing was taken from it. The file is kept.',
};
const REFUSED: Doubt = {
  code: 'refused',
  sentence: 'This file could not be read. It is kept; type the numbers in beside the page.',
};

/** Which state a reading leads to, and what the grower is told when nothing was taken. */
export function outcomeOf(reading: Reading): {
  state: Extract<ReportState, 'in-review' | 'unreadable' | 'not-soil'>;
  refusal: Doubt | null;
} {
  const said = reading.error ?? undefined;
  if (reading.kind === 'refused') return { state: 'unreadable', refusal: said ?? REFUSED };
  if (reading.kind === 'not-soil') return { state: 'not-soil', refusal: said ?? reading.warnings[0] ?? NOT_SOIL };
  const rows = reading.samples.reduce((count, sample) => count + sample.results.length, 0);
  return rows === 0 ? { state: 'unreadable', refusal: said ?? NO_ROWS } : { state: 'in-review', refusal: null };
}
