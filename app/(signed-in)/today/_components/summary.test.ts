import { describe, expect, it } from 'vitest';
import type { Today, TodaySite } from '@/lib/schemas/today';
import { summaryOf } from './summary';

const due = (inDays: number, snoozedUntil: string | null = null): TodaySite['due'][number] => ({
  id: crypto.randomUUID(),
  siteId: 'site',
  siteName: 'Hill Field',
  plotId: 'plot',
  plotName: 'North bed',
  kind: 'yearly-same-season',
  dueOn: '2026-04-12',
  reason: '',
  inDays,
  snoozedUntil,
  mayClose: true,
});
const review: TodaySite['reports'][number] = {
  id: 'report',
  fileName: 'a.pdf',
  state: 'in-review',
  uploadedAt: '2026-04-20T12:00:00.000Z',
  pages: 1,
  pagesRead: 1,
  samples: 3,
  refusal: null,
  waitingLong: false,
};
const today = (over: Partial<TodaySite>): Today => ({
  today: '2026-04-20',
  invitations: [],
  sites: [
    {
      id: 'site',
      name: 'Hill Field',
      role: 'owner',
      plots: 2,
      confirmed: 1,
      due: [],
      next: null,
      reports: [],
      moreReports: 0,
      batches: [],
      verdicts: [],
      ...over,
    },
  ],
});

describe('the day in a sentence', () => {
  it('counts what is due, what comes soon and what waits', () => {
    expect(summaryOf(today({ due: [due(-8), due(0), due(12)], reports: [review] }))).toBe(
      '2 samples are due, 1 comes due within a month and 1 report waits for you to confirm it.',
    );
  });
  it('names the samples when only later ones are there', () => {
    expect(summaryOf(today({ due: [due(12)] }))).toBe('1 sample comes due within a month.');
  });
  it('does not count what this person put off', () => {
    expect(summaryOf(today({ due: [due(-8, '2026-05-04'), due(-1)] }))).toBe('1 sample is due.');
  });
  it('asks nobody for what their role may not do', () => {
    expect(summaryOf(today({ role: 'adviser', reports: [review] }))).toBe('1 report waits for you to confirm it.');
    expect(summaryOf(today({ role: 'helper', reports: [review] }))).toBe('1 report can be reviewed.');
    expect(summaryOf(today({ role: 'viewer', reports: [review] }))).toBe('Nothing is due.');
  });
  it('says so when there is nothing', () => {
    expect(summaryOf(today({}))).toBe('Nothing is due.');
    expect(summaryOf({ today: '2026-04-20', sites: [], invitations: [] })).toBe('');
  });
});
