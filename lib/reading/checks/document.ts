import { RATINGS } from '@/lib/domain/analytes';
import { remark } from '../candidate';
import type { ReadResult } from '../types';
import type { Raise } from './sample';

/** Fewer equal numbers than this in two neighbouring samples are chance. */
const EQUAL_ROWS = 5;

function rank(rating: string): number {
  const bare = rating.toLowerCase();
  return RATINGS.findIndex((entry) => entry.spellings.some((spelling) => spelling.toLowerCase() === bare));
}

/** A row that repeats the sample above it cell by cell is a known fault of laboratories' data files. */
function checkRepeats(samples: readonly (readonly ReadResult[])[], raise: Raise) {
  for (const [index, results] of samples.entries()) {
    const above = samples[index - 1];
    if (above === undefined || results.length < EQUAL_ROWS) continue;
    const same = results.filter((result) =>
      above.some(
        (other) => other.analyte === result.analyte && other.unit === result.unit && other.printed === result.printed,
      ),
    );
    if (same.length < results.length || same.length < EQUAL_ROWS) continue;
    for (const result of results)
      raise(result, remark('same-as-above', 'All numbers of this sample equal those of the sample before it.'));
  }
}

/** A higher number with a lower rating than another sample of the same table is a question. */
function checkRatings(samples: readonly (readonly ReadResult[])[], raise: Raise) {
  const all = samples.flat().filter((result) => result.rating !== null && result.value !== null);
  for (const result of all) {
    const against = all.find((other) => {
      if (other.analyte !== result.analyte || other.unit !== result.unit) return false;
      const [mine, theirs] = [rank(result.rating ?? ''), rank(other.rating ?? '')];
      return mine >= 0 && theirs >= 0 && mine > theirs && (result.value ?? 0) < (other.value ?? 0);
    });
    if (against === undefined) continue;
    const text = `${result.printed} is rated ${result.rating}, while ${against.printed} is rated ${against.rating}.`;
    raise(result, remark('rating-order', text));
    raise(against, remark('rating-order', text));
  }
}

export function checkDocument(samples: readonly (readonly ReadResult[])[], raise: Raise) {
  checkRepeats(samples, raise);
  checkRatings(samples, raise);
}
