const WORDS: Readonly<Record<string, string>> = {
  'read-report': 'Reading a report',
  'recheck-effects': 'Going over the effect checks',
  'recheck-reviews': 'Going over open reviews',
  'tell-batch': 'Telling that many files are read',
  'tell-report': 'Telling that a report is read',
  'mask-page': 'Making a copy of a page without names',
  'drop-copy': 'Clearing away a copy of a page',
};

export const jobInWords = (job: string): string => WORDS[job] ?? job;
