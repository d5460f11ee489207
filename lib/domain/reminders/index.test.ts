import { describe, expect, it } from 'vitest';
import { asDay } from '../days';
import { defaultWarmMonths } from '../sampling';
import { type DueFacts, NOTICE_OFFSETS, nextDue } from '.';

const facts = (more: Partial<DueFacts>): DueFacts => ({
  kind: 'after-sulfur',
  warmMonths: defaultWarmMonths('north'),
  lastSampleOn: asDay('2026-04-10'),
  applications: [{ appliedOn: asDay('2026-04-15'), reaction: 'sulfur' }],
  ...more,
});

const dueOn = (more: Partial<DueFacts>) => {
  const due = nextDue(facts(more));
  return due.ok ? due.dueOn : due.reason;
};

describe('the next sample', () => {
  it('waits for 90 warm days after sulfur: 15 in April, 31 in May, 30 in June, 14 in July', () => {
    expect(dueOn({})).toBe('2026-07-14');
  });

  it('counts from the newest application, and in the southern year', () => {
    const twice = [
      { appliedOn: asDay('2026-05-15'), reaction: 'sulfur' as const },
      { appliedOn: asDay('2026-04-15'), reaction: 'sulfur' as const },
    ];
    expect(dueOn({ applications: twice })).toBe('2026-08-13');
    // Warm October to April: 15 days left in April, then 75 from 1 October.
    expect(dueOn({ warmMonths: defaultWarmMonths('south') })).toBe('2026-12-14');
  });

  it('waits for 126 warm days after lime spread in winter: April to 4 August', () => {
    const lime = [{ appliedOn: asDay('2026-11-20'), reaction: 'lime' as const }];
    expect(dueOn({ kind: 'after-lime', applications: lime })).toBe('2027-08-04');
  });

  it('comes a year after the last sample for the same season, also from 29 February', () => {
    expect(dueOn({ kind: 'yearly-same-season' })).toBe('2027-04-10');
    expect(dueOn({ kind: 'yearly-same-season', lastSampleOn: asDay('2028-02-29') })).toBe('2029-02-28');
  });

  it('says why there is none', () => {
    expect(dueOn({ kind: 'after-lime' })).toBe('nothing-spread');
    expect(dueOn({ kind: 'yearly-same-season', lastSampleOn: null })).toBe('no-sample-yet');
    expect(dueOn({ warmMonths: new Array<boolean>(12).fill(false) })).toBe('never-warm-enough');
    expect(dueOn({ lastSampleOn: asDay('2026-07-14') })).toBe('already-sampled');
  });

  it('tells people two weeks before, on the day and two weeks after', () => {
    expect(NOTICE_OFFSETS).toEqual([-14, 0, 14]);
  });
});
