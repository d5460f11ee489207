import { asDay, dayInWords } from '@/lib/domain/days';
import type { RefusalCode } from '@/lib/domain/effects';

const SAME_METHOD = 'the same method next time; ask the laboratory before the sample is posted.';

/** What would help where no verdict or no difference is given: a whole phrase after "What would help:". */
const HELP: Readonly<Record<RefusalCode, string>> = {
  extractant: SAME_METHOD,
  'ph-medium': SAME_METHOD,
  'om-method': SAME_METHOD,
  'cec-method': SAME_METHOD,
  'method-unknown': 'the name of the method, from the laboratory, added to the result.',
  depth: 'a sample to the same depth next time.',
  'unit-basis': 'the missing figure from the laboratory, added to the report.',
  season: 'a test in the same season as the earlier one.',
  'too-early': 'a later sample.',
  'too-late': 'a test within 24 months of the next application.',
  overlap: 'one product at a time, with a test in between.',
  unconfirmed: 'its report confirmed.',
  'out-of-range': 'that result corrected, if it was misread.',
  'plan-too-small': 'a larger step, or judging over three seasons.',
  'no-noise-figure': 'four pairs of duplicate samples on this site; they teach Loamline how far two tests differ here.',
  'no-before-test': 'a test before the next application.',
  'no-after-test': 'a sample of this plot.',
  'both-below-limit': 'a method with a lower reporting limit.',
  'unknown-limit': 'the reporting limit, from the laboratory, added to the result.',
  'above-limit': 'the exact value, from the laboratory.',
  'other-analyte': 'two tests of the same analyte.',
};

export function helpFor({
  reason,
  from,
  until,
}: {
  reason: RefusalCode;
  from?: string | undefined;
  until?: string | undefined;
}): string {
  if (from === undefined) return HELP[reason];
  const last = until === undefined ? '' : ` and by ${dayInWords(asDay(until))}`;
  return `a sample taken from ${dayInWords(asDay(from))} on${last}.`;
}
