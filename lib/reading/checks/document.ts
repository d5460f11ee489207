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

type Rated = { readonly result: ReadResult; readonly rank: number; readonly value: number };

function ratedGroups(samples: readonly (readonly ReadResult[])[]): readonly (readonly Rated[])[] {
  const groups = new Map<string, Rated[]>();
  for (const result of samples.flat()) {
    const level = result.rating === null ? -1 : rank(result.rating);
    if (level < 0 || result.value === null) continue;
    const key = `${result.analyte}|${result.unit}|${result.method}`;
    const group = groups.get(key) ?? [];
    group.push({ result, rank: level, value: result.value });
    groups.set(key, group);
  }
  return [...groups.values()];
}

/** A higher number with a lower rating than another sample of the same table is a question. */
function checkRatings(samples: readonly (readonly ReadResult[])[], raise: Raise) {
  for (const group of ratedGroups(samples)) {
    const largest = RATINGS.map((_, level) =>
      group
        .filter((one) => one.rank === level)
        .reduce<Rated | null>((best, one) => (best === null || one.value > best.value ? one : best), null),
    );
    for (const one of group) {
      const against = largest.slice(0, one.rank).find((other) => other !== null && other.value > one.value);
      if (against === undefined || against === null) continue;
      const text = `${one.result.printed} is rated ${one.result.rating}, while ${against.result.printed} is rated ${against.result.rating}.`;
      raise(one.result, remark('rating-order', text));
      raise(against.result, remark('rating-order', text));
    }
  }
}

export function checkDocument(samples: readonly (readonly ReadResult[])[], raise: Raise) {
  checkRepeats(samples, raise);
  checkRatings(samples, raise);
}
