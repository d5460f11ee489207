import { beforeAll, describe, expect, it } from 'vitest';
import { correctApplication } from '@/lib/data/applications/correctApplication';
import { listApplications } from '@/lib/data/applications/listApplications';
import { recordApplication } from '@/lib/data/applications/recordApplication';
import { suggestChange } from '@/lib/data/applications/suggestChange';
import { getEffects } from '@/lib/data/effects/getEffects';
import { recheckEffects } from '@/lib/data/effects/recheckEffects';
import { compareResults } from '@/lib/data/history/compareResults';
import { getHistory } from '@/lib/data/history/getHistory';
import type { PlotId } from '@/lib/domain/ids';
import {
  ctxAs,
  ctxWorker,
  makeLaboratory,
  makePlot,
  makeSite,
  makeTest,
  type TestSite,
  useWorld,
} from '../support/factory';

useWorld();

const ph = (value: string) => [{ analyte: 'soil_ph_water', value, unit: 'pH' }];

describe('what was spread, and whether it worked', () => {
  let site: TestSite;
  let treated: PlotId;
  let untreated: PlotId;
  let ids: { fall: string; before: string; after: string };

  beforeAll(async () => {
    site = await makeSite();
    treated = await makePlot(site.id, { name: 'Top bed', texture: 'medium', targetSetKey: 'vegetables-1' });
    untreated = await makePlot(site.id, { name: 'Wall bed' });
    const laboratoryId = await makeLaboratory(site.id);
    const only = (rows: string[]) => rows[0] ?? '';
    const fall = only(await makeTest(site, treated, '2024-10-05', ph('7.1'), { laboratoryId }));
    const before = only(await makeTest(site, treated, '2025-04-12', ph('7.3'), { laboratoryId }));
    const after = only(await makeTest(site, treated, '2026-04-11', ph('6.8'), { laboratoryId }));
    await makeTest(site, untreated, '2025-04-12', ph('7.0'), { laboratoryId });
    await makeTest(site, untreated, '2026-04-11', ph('7.0'), { laboratoryId });
    ids = { fall, before, after };
    await recordApplication({
      ctx: await ctxAs(site.people.helper),
      input: {
        siteId: site.id,
        plotId: treated,
        material: { key: 'elemental-sulfur-90' },
        amount: 9,
        amountUnit: 'lb',
        appliedOn: '2025-04-20',
        intents: [{ analyte: 'soil_ph_water', unit: 'pH', fullChange: -0.5, low: null, high: null, source: 'typed' }],
      },
    });
  });

  it('judges the change against the untreated plot, and shows the same without it', async () => {
    const { checks } = await getEffects({
      ctx: await ctxAs(site.people.viewer),
      input: { siteId: site.id, plotId: treated },
    });
    expect(checks).toHaveLength(1);
    const outcome = checks[0]?.outcome;
    if (!outcome?.ok) throw new Error(`no verdict: ${outcome?.sentence}`);
    // Two plots only: no correction, so D is (7.3 - 6.8) less the untreated plot's change of 0.0, counted downwards.
    expect(outcome.reading.withControls).toBe(true);
    expect(outcome.reading.rho).toBe(1);
    expect(outcome.reading.change).toBeCloseTo(-0.5, 10);
    // Without it the fall test counts too, by inverse variance: v = .25²/15 + .06² + .06² + .1²/12, occasion .08², season .20²,
    // and .05 a year before spreading (8 and 197 days).
    const v = 0.25 ** 2 / 15 + 2 * 0.06 ** 2 + 0.1 ** 2 / 12 + 0.08 ** 2;
    const spring = 1 / (v + (0.05 * (8 / 365.25)) ** 2);
    const fall = 1 / (v + 0.2 ** 2 + (0.05 * (197 / 365.25)) ** 2);
    const before = (spring * 7.3 + fall * 7.1) / (spring + fall);
    expect(outcome.withoutControls?.change).toBeCloseTo(6.8 - before, 6);
    expect(outcome.before.map((one) => one.test.day)).toContain('2025-04-12');
    expect(outcome.controls.map((one) => [one.name, one.used])).toEqual([['Wall bed', true]]);
    expect(outcome.sentences.join(' ')).toContain('untreated');
  });

  it('keeps a verdict once, and again only when it changes', async () => {
    const ctx = await ctxWorker();
    expect(await recheckEffects({ ctx, input: { siteId: site.id, id: treated } })).toEqual({ changed: 1 });
    expect(await recheckEffects({ ctx, input: { siteId: site.id, id: treated } })).toEqual({ changed: 0 });
    const other = await makeSite('Other');
    expect(
      await recheckEffects({ ctx: await ctxWorker(), input: { siteId: site.id, id: await makePlot(other.id) } }),
    ).toEqual({ changed: 0 });
  });

  it('[E 45] finds nothing for a forged pair of site and plot', async () => {
    const other = await makeSite('Elsewhere');
    const forged = recheckEffects({ ctx: await ctxWorker(), input: { siteId: other.id, id: treated } });
    expect(await forged).toEqual({ changed: 0 });
  });

  it('compares spring with fall with a wider interval and says so', async () => {
    const ctx = await ctxAs(site.people.viewer);
    const spring = await compareResults({
      ctx,
      input: { siteId: site.id, analyte: 'soil_ph_water', a: ids.before, b: ids.after },
    });
    const fall = await compareResults({
      ctx,
      input: { siteId: site.id, analyte: 'soil_ph_water', a: ids.fall, b: ids.after },
    });
    if (!spring.outcome.ok || !fall.outcome.ok) throw new Error('these tests can be compared');
    expect(spring.outcome.widenedBy).toEqual([]);
    expect(fall.outcome.widenedBy).toEqual(['season']);
    expect(fall.outcome.hi - fall.outcome.lo).toBeGreaterThan(spring.outcome.hi - spring.outcome.lo);
    expect(spring.outcome.difference).toBeCloseTo(-0.5, 10);
    expect(spring.outcome.moreThanNoise).toBe(true);
  });

  it('draws the plot’s history with its band, its spreading and no trend from three tests', async () => {
    const history = await getHistory({
      ctx: await ctxAs(site.people.viewer),
      input: { siteId: site.id, plotId: treated },
    });
    const [series] = history.series;
    expect(series?.points.map((point) => [point.takenOn, point.printed])).toEqual([
      ['2024-10-05', '7.1'],
      ['2025-04-12', '7.3'],
      ['2026-04-11', '6.8'],
    ]);
    expect(series?.band).toMatchObject({ low: 6, high: 6.5 });
    expect(series?.trend.join(' ')).toMatch(/No trend/);
    expect(history.amendments).toHaveLength(1);
  });

  it('what was meant stays with the record when the amount is corrected, and only its author or a decider may', async () => {
    const helper = await ctxAs(site.people.helper);
    const [row] = (await listApplications({ ctx: helper, input: { siteId: site.id, plotId: treated } })).applications;
    if (!row) throw new Error('the record is gone');
    const another = await makeSite('Next door');
    const correction = {
      applicationId: row.id,
      material: { key: 'elemental-sulfur-90' },
      amount: 8,
      amountUnit: 'lb' as const,
      plannedAmount: 9,
      appliedOn: '2025-04-20',
      reason: 'one bag was short',
    };
    await expect(
      correctApplication({ ctx: await ctxAs(site.people.viewer), input: { siteId: site.id, ...correction } }),
    ).rejects.toMatchObject({ code: 'forbidden' });
    await expect(
      correctApplication({ ctx: await ctxAs(another.people.owner), input: { siteId: another.id, ...correction } }),
    ).rejects.toMatchObject({ code: 'not-found' });
    const [one, two] = await Promise.allSettled([
      correctApplication({ ctx: helper, input: { siteId: site.id, ...correction } }),
      correctApplication({ ctx: await ctxAs(site.people.owner), input: { siteId: site.id, ...correction } }),
    ]);
    expect([one?.status, two?.status].sort()).toEqual(['fulfilled', 'rejected']);
    const after = (await listApplications({ ctx: helper, input: { siteId: site.id } })).applications;
    expect(after.map((fresh) => [fresh.amountPrinted, fresh.intents[0]?.fullChange])).toEqual([['8 lb', -0.5]]);
    expect(after[0]?.plannedKg).toBeCloseTo(9 * 0.45359237, 9);
  });

  it('a slip mended in the amount is no departure from a plan that the record made itself', async () => {
    const ctx = await ctxAs(site.people.owner);
    const material = { key: 'elemental-sulfur-90' };
    const common = { siteId: site.id, material, amountUnit: 'lb' as const, appliedOn: '2025-05-01' };
    const { id } = await recordApplication({ ctx, input: { ...common, plotId: untreated, amount: 90, intents: [] } });
    await correctApplication({
      ctx,
      input: { ...common, applicationId: id, amount: 9, reason: 'one nought too many' },
    });
    const { applications } = await listApplications({ ctx, input: { siteId: site.id, plotId: untreated } });
    expect(applications.map((row) => [row.amountPrinted, row.plannedKg / row.amountKg])).toEqual([['9 lb', 1]]);
  });

  it('refuses a day that has not come', async () => {
    const ctx = await ctxAs(site.people.owner);
    const input = {
      siteId: site.id,
      plotId: treated,
      material: { key: 'elemental-sulfur-90' },
      amount: 1,
      amountUnit: 'lb' as const,
      appliedOn: '2090-01-01',
      intents: [],
    };
    await expect(recordApplication({ ctx, input })).rejects.toMatchObject({
      code: 'invalid',
      fields: { appliedOn: expect.any(String) },
    });
  });

  it('says what a published rule lets an amount do here, as a range with its source', async () => {
    const answer = await suggestChange({
      ctx: await ctxAs(site.people.owner),
      input: {
        siteId: site.id,
        plotId: treated,
        material: 'elemental-sulfur-90',
        amount: 9,
        amountUnit: 'lb',
        depthCm: 15.24,
      },
    });
    const [change] = answer.suggestions;
    expect(change?.analyte).toBe('soil_ph_water');
    expect(change && change.likely < 0 && Math.abs(change.low) < Math.abs(change.high)).toBe(true);
    expect(change?.source.length).toBeGreaterThan(10);
  });
});
