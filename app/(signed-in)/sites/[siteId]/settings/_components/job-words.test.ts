import { expect, it } from 'vitest';
import { JOB_NAMES } from '@/lib/jobs/names';
import { jobInWords } from './job-words';

it('has words for every job that an owner can find given up', () => {
  const ofSites = JOB_NAMES.filter((name) => name !== 'send-mail');
  expect(ofSites.length).toBeGreaterThan(4);
  expect(ofSites.filter((name) => jobInWords(name) === name)).toEqual([]);
});
