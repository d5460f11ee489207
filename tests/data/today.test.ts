import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { membership, report, reportSample } from '@/db/schema';
import { recordApplication } from '@/lib/data/applications/recordApplication';
import { removeApplication } from '@/lib/data/applications/removeApplication';
import { recheckEffects } from '@/lib/data/effects/recheckEffects';
import { claimMail } from '@/lib/data/mail/claimMail';
import { settleMail } from '@/lib/data/mail/settleMail';
import { setRule } from '@/lib/data/reminders/setRule';
import { snoozeReminder } from '@/lib/data/reminders/snoozeReminder';
import { getReport } from '@/lib/data/reports/getReport';
import { acceptInvitation } from '@/lib/data/sites/acceptInvitation';
import { createSite } from '@/lib/data/sites/createSite';
import { invite } from '@/lib/data/sites/invite';
import { getSiteToday } from '@/lib/data/today/getSiteToday';
import { getToday } from '@/lib/data/today/getToday';
import { withSite } from '@/lib/data/transaction';
import type { PlotId } from '@/lib/domain/ids';
import {
  ctxAs,
  ctxWorker,
  makePerson,
  makePlot,
  makeSite,
  makeTest,
  type TestPerson,
  type TestSite,
  useWorld,
} from '../support/factory';
import { linkIn, mailsTo } from '../support/people';

const world = useWorld();
const ph = (value: string) => [{ analyte: 'soil_ph_water', value, unit: 'pH' }];
const at = (moment: string) => world.moveClock(Math.round((new Date(moment).getTime() - Date.now()) / 1000));
const todayOf = async (who: TestPerson) => getToday({ ctx: await ctxAs(who), input: {} });

describe('the first page', () => {
  let site: TestSite;
  let north: PlotId;
  let south: PlotId;

  beforeAll(async () => {
    await at('2026-04-20T15:00:00Z');
    site = await makeSite('Hill Field');
    north = await makePlot(site.id, { name: 'North bed' });
    south = await makePlot(site.id, { name: 'South bed' });
    const ctx = await ctxAs(site.people.owner);
    for (const [plotId, day] of [
      [south, '2025-05-02'],
      [north, '2025-04-12'],
    ] as const) {
      await makeTest(site, plotId, day, ph('7.3'));
      await setRule({ ctx, input: { siteId: site.id, plotId, kind: 'yearly-same-season', active: true } });
    }
  });

  it('lists what is due, soonest first, with the days to it', async () => {
    const { today, sites } = await todayOf(site.people.viewer);
    expect(today).toBe('2026-04-20');
    expect(sites.map((one) => one.name)).toEqual(['Hill Field']);
    expect(sites[0]?.due.map((one) => [one.plotName, one.inDays, one.mayClose])).toEqual([
      ['North bed', -8, false],
      ['South bed', 12, false],
    ]);
    expect(sites[0]?.next).toBeNull();
  });

  it('names the next one when nothing is due within a month', async () => {
    await at('2026-03-20T15:00:00Z');
    const [here] = (await todayOf(site.people.owner)).sites;
    expect(here?.due.map((one) => [one.plotName, one.inDays])).toEqual([['North bed', 23]]);
    expect([here?.next?.plotName, here?.next?.dueOn]).toEqual(['South bed', '2026-05-02']);
    await at('2026-04-20T15:00:00Z');
  });

  it('shows my own rest from a reminder to me alone', async () => {
    const { sites } = await todayOf(site.people.helper);
    const reminderId = sites[0]?.due[0]?.id ?? '';
    const ctx = await ctxAs(site.people.helper);
    await snoozeReminder({ ctx, input: { siteId: site.id, reminderId, until: '2026-05-04' } });
    const restOf = async (who: TestPerson) => (await todayOf(who)).sites[0]?.due[0]?.snoozedUntil;
    expect(await restOf(site.people.helper)).toBe('2026-05-04');
    expect(await restOf(site.people.adviser)).toBeNull();
  });

  it('brings reviews before refused files before files still being read, and counts the rest', async () => {
    const file = (state: 'in-review' | 'unreadable' | 'reading' | 'received' | 'confirmed', name: string) => ({
      siteId: site.id,
      state,
      fileName: name,
      uploadedBy: site.people.owner.id,
      uploadedAt: new Date('2026-04-20T14:00:00Z'),
      ...(state === 'unreadable' ? { refusalCode: 'locked', refusalSentence: 'This file is locked.' } : {}),
    });
    await withSite(site.id, async (tx) => {
      const rows = await tx
        .insert(report)
        .values([
          file('reading', 'c.pdf'),
          file('received', 'd.pdf'),
          file('received', 'e.pdf'),
          file('unreadable', 'b.pdf'),
          file('confirmed', 'x.pdf'),
          file('in-review', 'a.pdf'),
          file('received', 'f.pdf'),
        ])
        .returning();
      const inReview = rows.find((row) => row.state === 'in-review')?.id ?? '';
      const bag = { siteId: site.id, reportId: inReview, plotId: north };
      await tx.insert(reportSample).values([
        { ...bag, ordinal: 1 },
        { ...bag, ordinal: 2 },
      ]);
    });
    const [here] = (await todayOf(site.people.owner)).sites;
    expect(here?.reports.slice(0, 2).map((one) => [one.fileName, one.samples, one.refusal])).toEqual([
      ['a.pdf', 2, null],
      ['b.pdf', 0, 'This file is locked.'],
    ]);
    expect(here?.reports.slice(2).map((one) => one.state)).not.toContain('confirmed');
    expect([here?.reports.length, here?.moreReports]).toEqual([5, 1]);
    expect(here?.reports.find((one) => one.state === 'received')?.waitingLong).toBe(true);
    // The two tests of the plots and x.pdf.
    expect(here?.confirmed).toBe(3);
  });

  it('tells the newest verdict, and not one whose record was removed', async () => {
    const { id } = await recordApplication({
      ctx: await ctxAs(site.people.owner),
      input: {
        siteId: site.id,
        plotId: north,
        material: { key: 'elemental-sulfur-90' },
        amount: 9,
        amountUnit: 'lb',
        appliedOn: '2025-04-20',
        intents: [{ analyte: 'soil_ph_water', unit: 'pH', fullChange: -0.5, low: null, high: null, source: 'typed' }],
      },
    });
    await makeTest(site, north, '2026-04-11', ph('6.8'));
    await makeTest(site, south, '2026-04-11', ph('7.3'));
    await recheckEffects({ ctx: await ctxWorker(), input: { siteId: site.id, id: north } });
    const [here] = (await todayOf(site.people.viewer)).sites;
    expect(here?.verdicts.map((one) => one.plotName)).toEqual(['North bed']);
    expect(here?.verdicts[0]?.sentence).toMatch(/pH/);
    await removeApplication({
      ctx: await ctxAs(site.people.owner),
      input: { siteId: site.id, applicationId: id, reason: 'wrong plot' },
    });
    expect((await todayOf(site.people.viewer)).sites[0]?.verdicts).toEqual([]);
  });

  it('shows an adviser all their sites, those that ask for something first, and nothing of others', async () => {
    const adviser = await makePerson();
    const quiet = await makeSite('A quiet site');
    await makeSite('Not mine');
    for (const siteId of [quiet.id, site.id]) {
      await withSite(siteId, (tx) => tx.insert(membership).values({ siteId, personId: adviser.id, role: 'adviser' }));
    }
    const { sites } = await todayOf(adviser);
    expect(sites.map((one) => [one.name, one.role])).toEqual([
      ['Hill Field', 'adviser'],
      ['A quiet site', 'adviser'],
    ]);
  });

  it('tells a newcomer of an invitation to their address, until it is answered', async () => {
    const newcomer = await makePerson();
    const { siteId } = await createSite({ ctx: await ctxAs(site.people.owner), input: { name: 'Asked to' } });
    await invite({ ctx: await ctxAs(site.people.owner), input: { siteId, email: newcomer.email, role: 'helper' } });
    const before = await todayOf(newcomer);
    expect(before.sites).toEqual([]);
    expect(before.invitations.map((one) => [one.siteName, one.role])).toEqual([['Asked to', 'helper']]);
    expect((await todayOf(site.people.viewer)).invitations).toEqual([]);
    const unproven = await makePerson({ emailVerifiedAt: null });
    await invite({ ctx: await ctxAs(site.people.owner), input: { siteId, email: unproven.email, role: 'helper' } });
    expect((await todayOf(unproven)).invitations).toEqual([]);
    const token = await linkIn(newcomer.email, 'invitation');
    expect(JSON.stringify(before)).not.toContain(token);
    const id = (await mailsTo(newcomer.email, 'invitation'))[0]?.id ?? '';
    await claimMail({ ctx: await ctxWorker(), input: { id } });
    const sent = { answer: 'sent' as const, id, providerId: 'p-1' };
    await settleMail({ ctx: await ctxWorker(), input: sent });
    expect((await mailsTo(newcomer.email, 'invitation'))[0]?.text).toBe('');
    expect((await todayOf(newcomer)).invitations).toEqual(before.invitations);
    await acceptInvitation({ ctx: await ctxAs(newcomer), input: { token } });
    const after = await todayOf(newcomer);
    expect(after.invitations).toEqual([]);
    expect(after.sites.map((one) => [one.name, one.plots])).toEqual([['Asked to', 0]]);
  });

  it('says of a file unread for half a minute that it waits long, here as on its own page', async () => {
    const fresh = await makeSite('A resting reader');
    const ctx = await ctxAs(fresh.people.owner);
    const sent = (id: string, secondsAgo: number) => ({
      siteId: fresh.id,
      id,
      state: 'received' as const,
      fileName: `${secondsAgo}.pdf`,
      uploadedBy: fresh.people.owner.id,
      uploadedAt: new Date(ctx.now.getTime() - secondsAgo * 1000),
    });
    const [young, old] = [randomUUID(), randomUUID()];
    await withSite(fresh.id, (tx) => tx.insert(report).values([sent(young, 29), sent(old, 31)]));
    const { reports } = await getSiteToday({ ctx, input: { siteId: fresh.id } });
    expect(new Map(reports.map((one) => [one.fileName, one.waitingLong]))).toEqual(
      new Map([
        ['29.pdf', false],
        ['31.pdf', true],
      ]),
    );
    for (const one of reports) {
      const own = await getReport({ ctx, input: { siteId: fresh.id, reportId: one.id } });
      expect(own.waitingLong).toBe(one.waitingLong);
    }
  });
});
