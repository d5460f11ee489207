import { beforeAll, describe, expect, it } from 'vitest';
import { recordApplication } from '@/lib/data/applications/recordApplication';
import type { Ctx } from '@/lib/data/context';
import { archivePlot } from '@/lib/data/plots/archivePlot';
import { typeReport } from '@/lib/data/reports/typeReport';
import { addSample } from '@/lib/data/review/addSample';
import type { PlotId } from '@/lib/domain/ids';
import { ctxAs, makePlot, makeSite, type TestSite, useWorld } from '../support/factory';
import { problemOf } from '../support/people';

useWorld();

let site: TestSite;
let owner: Ctx;
let plotId: PlotId;
let archived: PlotId;

beforeAll(async () => {
  site = await makeSite();
  owner = await ctxAs(site.people.owner);
  plotId = await makePlot(site.id, { name: 'North end' });
  archived = await makePlot(site.id, { name: 'Given up' });
  await archivePlot({ ctx: owner, input: { siteId: site.id, plotId: archived, version: 1 } });
});

type Spread = Parameters<typeof recordApplication>[0]['input'];
const spread = (over: Partial<Spread>) =>
  recordApplication({
    ctx: owner,
    input: {
      siteId: site.id,
      plotId,
      material: { key: 'elemental-sulfur-90' },
      amount: 2,
      amountUnit: 'kg',
      appliedOn: '2026-04-20',
      intents: [],
      ...over,
    },
  });

describe('[E 51] what is typed has bounds', () => {
  const intent = { analyte: 'soil_ph_water', unit: 'pH', fullChange: -0.3, low: null, high: null, source: 'typed' };
  it.each<[string, Partial<Spread>]>([
    ['a change of 1e300 at its lower end', { intents: [{ ...intent, low: -1e300 }] }],
    ['a material with a line break', { material: { name: 'two\nlines', reaction: null, affects: [] } }],
    ['an area of a country', { areaM2: 1e9 }],
    ['an amount that is no number', { amount: Number.NaN }],
    ['a day of the last but one century', { appliedOn: '1849-04-20' }],
  ])('%s is refused', async (_, over) => {
    expect(await problemOf(spread(over))).toMatchObject({ code: 'invalid' });
  });

  it('invisible characters of a note are dropped and the note is kept', async () => {
    expect(await spread({ note: 'two bags\u0000, one torn', method: 'by\u0000hand' })).toMatchObject({
      id: expect.any(String),
    });
  });

  it('a sample ends deeper than it begins, also in a report typed in', async () => {
    const samples = [{ name: 'Bag', plotId, depthFromCm: 30, depthToCm: 10 }];
    const problem = await problemOf(typeReport({ ctx: owner, input: { siteId: site.id, samples } }));
    expect(problem.fields?.depthToCm).toContain('deeper');
  });
});

describe('an archived plot', () => {
  it('takes no new sample, record or typed report', async () => {
    const { reportId } = await typeReport({
      ctx: owner,
      input: { siteId: site.id, samples: [{ name: 'Bag', plotId }] },
    });
    const tries = [
      () => typeReport({ ctx: owner, input: { siteId: site.id, samples: [{ name: 'Bag', plotId: archived }] } }),
      () => addSample({ ctx: owner, input: { siteId: site.id, reportId, name: 'Second', plotId: archived } }),
      () => spread({ plotId: archived }),
    ];
    for (const one of tries) {
      const problem = await problemOf(one());
      expect(problem).toMatchObject({ code: 'conflict', reason: 'archived' });
      expect(problem.sentence).toContain('Given up is archived');
    }
  });
});
