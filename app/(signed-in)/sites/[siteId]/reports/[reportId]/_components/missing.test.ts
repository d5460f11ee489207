import { describe, expect, it } from 'vitest';
import { makeBlocker, makeReviewSample, makeRow } from '@/tests/support/review-rows';
import { missingOf, unsettledSentence, valuesToConfirm } from './missing';

describe('missingOf', () => {
  it('counts by kind, one and many', () => {
    const found = missingOf(
      [makeBlocker('no-plot'), makeBlocker('no-plot', { reportSampleId: 'sample-2' }), makeBlocker('impossible')],
      new Set(),
    );
    expect(found.map((one) => one.sentence)).toEqual(['2 samples without a plot', '1 value to mend']);
  });
  it('tells a sample without rows from a row without a value', () => {
    const found = missingOf([makeBlocker('no-value'), makeBlocker('no-value', { rowId: 'p' })], new Set());
    expect(found.map((one) => one.sentence)).toEqual(['1 sample without values', '1 row without a value']);
  });
  it('leaves out a likeness that was said to be a second analysis', () => {
    expect(missingOf([makeBlocker('same-analysis')], new Set(['sample-1']))).toEqual([]);
    expect(missingOf([makeBlocker('no-day')], new Set(['sample-1']))).toHaveLength(1);
  });
});

describe('valuesToConfirm', () => {
  it('counts rows left in, of samples that count by themselves', () => {
    const samples = [
      makeReviewSample('in'),
      makeReviewSample('out', { leftOutReason: 'not ours' }),
      makeReviewSample('same', { sameAsId: 'other' }),
    ];
    const rows = [
      makeRow('a', { reportSampleId: 'in' }),
      makeRow('b', { reportSampleId: 'in', state: 'removed' }),
      makeRow('c', { reportSampleId: 'out' }),
      makeRow('d', { reportSampleId: 'same' }),
    ];
    expect(valuesToConfirm({ samples, rows })).toBe(1);
  });
});

describe('unsettledSentence', () => {
  it('is nothing when all is saved', () => {
    expect(unsettledSentence({ saving: 0, failed: 0, conflicts: 0, invalid: 0 })).toBeNull();
    expect(unsettledSentence({ saving: 2, failed: 1, conflicts: 0, invalid: 0 })).toBe(
      '1 change not saved, 2 changes being saved',
    );
  });
});
