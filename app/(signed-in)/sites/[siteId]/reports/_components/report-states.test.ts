import { describe, expect, it } from 'vitest';
import type { Report } from '@/lib/schemas/reports';
import { arranged, countsOf, isStuck, reportName, samplesText, stateWord } from './report-states';

const report = (change: Partial<Report>): Report => ({
  id: 'a',
  origin: 'file',
  state: 'in-review',
  fileName: 'spring.pdf',
  contentType: 'application/pdf',
  bytes: 1000,
  pages: 3,
  pagesRead: 3,
  revision: 1,
  refusal: null,
  warnings: [],
  laboratory: null,
  laboratoryPrinted: null,
  droppedOnPlotId: null,
  uploadedBy: { id: 'p', name: 'Ada' },
  uploadedAt: '2026-05-03T10:00:00.000Z',
  confirmedBy: null,
  confirmedAt: null,
  withdrawnReason: null,
  samples: { all: 3, assigned: 0, plotIds: [] },
  version: 1,
  waitingLong: false,
  ...change,
});

describe('arranged', () => {
  const list = [
    report({ id: 'set', state: 'set-aside', uploadedAt: '2026-06-01T00:00:00.000Z' }),
    report({ id: 'done', state: 'confirmed', uploadedAt: '2026-05-09T00:00:00.000Z' }),
    report({ id: 'old', state: 'in-review', uploadedAt: '2025-05-01T00:00:00.000Z' }),
    report({ id: 'bad', state: 'not-soil', uploadedAt: '2026-05-10T00:00:00.000Z' }),
    report({ id: 'new', state: 'in-review', uploadedAt: '2026-05-01T00:00:00.000Z' }),
    report({ id: 'busy', state: 'received', uploadedAt: '2026-05-12T00:00:00.000Z' }),
  ];
  it('puts what waits for a person first, newest of it on top, and leaves out what was set aside', () => {
    expect(arranged(list, 'all').map((one) => one.id)).toEqual(['new', 'old', 'busy', 'bad', 'done']);
  });
  it('shows what was set aside where it is asked for, and counts agree with what is shown', () => {
    expect(arranged(list, 'set-aside').map((one) => one.id)).toEqual(['set']);
    const counts = countsOf(list);
    for (const filter of ['all', 'review', 'reading', 'unreadable', 'confirmed', 'set-aside'] as const) {
      expect(counts[filter]).toBe(arranged(list, filter).length);
    }
  });
});

describe('words', () => {
  it('say the page that is being read, never one beyond the last', () => {
    expect(stateWord(report({ state: 'reading', pages: 3, pagesRead: 1 }))).toBe('Reading page 2 of 3');
    expect(stateWord(report({ state: 'reading', pages: 3, pagesRead: 3 }))).toBe('Reading page 3 of 3');
    expect(stateWord(report({ state: 'reading', pages: null }))).toBe('Reading');
  });

  it('name a report by its file, its revision, or its laboratory', () => {
    expect(reportName(report({ revision: 2 }))).toBe('spring.pdf (revision 2)');
    expect(reportName(report({ fileName: null, laboratory: { id: 'l', name: 'Elm Hill' } }))).toBe(
      'Typed in, Elm Hill',
    );
  });

  it('say which plots, and how many samples have none', () => {
    const names = new Map([['n', 'North bed']]);
    expect(samplesText(report({ samples: { all: 3, assigned: 1, plotIds: ['n'] } }), names)).toBe(
      '3 samples: North bed, 2 without a plot',
    );
    expect(samplesText(report({ samples: { all: 1, assigned: 0, plotIds: [] } }), names)).toBe(
      '1 sample, no plot chosen yet',
    );
    expect(samplesText(report({ samples: { all: 0, assigned: 0, plotIds: [] } }), names)).toBeNull();
  });
});

describe('isStuck', () => {
  const sent = Date.parse('2026-05-03T10:00:00.000Z');
  it('is a file that nobody has begun to read for half a minute', () => {
    expect(isStuck(report({ state: 'received' }), sent + 29_000)).toBe(false);
    expect(isStuck(report({ state: 'received' }), sent + 31_000)).toBe(true);
    expect(isStuck(report({ state: 'reading' }), sent + 31_000)).toBe(false);
    expect(isStuck(report({ state: 'received', waitingLong: true }), sent)).toBe(true);
  });
});
