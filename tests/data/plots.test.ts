import { beforeAll, describe, expect, it } from 'vitest';
import type { Ctx } from '@/lib/data/context';
import { archivePlot } from '@/lib/data/plots/archivePlot';
import { createPlot } from '@/lib/data/plots/createPlot';
import { getPlot } from '@/lib/data/plots/getPlot';
import { listPlots } from '@/lib/data/plots/listPlots';
import { restorePlot } from '@/lib/data/plots/restorePlot';
import { setPlanting } from '@/lib/data/plots/setPlanting';
import { unsetPlanting } from '@/lib/data/plots/unsetPlanting';
import { updatePlot } from '@/lib/data/plots/updatePlot';
import { createTargetSet } from '@/lib/data/targets/createTargetSet';
import { editTargetSet } from '@/lib/data/targets/editTargetSet';
import { listTargets } from '@/lib/data/targets/listTargets';
import type { Plot } from '@/lib/schemas/plots';
import { ctxAs, ctxNobody, makePlot, makeSite, type TestSite, useWorld } from '../support/factory';
import { problemOf } from '../support/reports';

useWorld();

const square = (side: number) => [
  { x: 0, y: 0 },
  { x: side, y: 0 },
  { x: side, y: side },
  { x: 0, y: side },
];

let here: TestSite;
let there: TestSite;
let owner: Ctx;

beforeAll(async () => {
  here = await makeSite('Here');
  there = await makeSite('There');
  owner = await ctxAs(here.people.owner);
});

describe('plots', () => {
  it('takes the area from the outline until one is typed, and says which', async () => {
    const made = await createPlot({ ctx: owner, input: { siteId: here.id, name: 'North bed', outline: square(12) } });
    expect(made.area).toEqual({ m2: 144, from: 'outline' });
    expect(made.outlineSince).toBe(made.outlineSince?.slice(0, 10));
    const typed = await updatePlot({
      ctx: owner,
      input: { siteId: here.id, plotId: made.id, version: made.version, areaTypedM2: 140.5 },
    });
    expect(typed.area).toEqual({ m2: 140.5, from: 'typed' });
    expect(typed.version).toBe(made.version + 1);
    const bare = await createPlot({ ctx: owner, input: { siteId: here.id, name: 'Not drawn yet' } });
    expect(bare).toMatchObject({ outline: null, area: null, lastTest: null, planting: null });
  });

  it.each([
    [
      'a bow tie',
      [
        { x: 0, y: 0 },
        { x: 5, y: 5 },
        { x: 5, y: 0 },
        { x: 0, y: 5 },
      ],
      'crosses itself',
    ],
    [
      'two corners',
      [
        { x: 0, y: 0 },
        { x: 5, y: 5 },
      ],
      'three corners',
    ],
    [
      'a line',
      [
        { x: 0, y: 0 },
        { x: 5, y: 0 },
        { x: 9, y: 0 },
      ],
      'outline',
    ],
  ])('refuses %s for an outline with a sentence', async (_, outline, words) => {
    const problem = await problemOf(createPlot({ ctx: owner, input: { siteId: here.id, name: 'Odd', outline } }));
    expect(problem.code).toBe('invalid');
    expect(Object.values(problem.fields ?? {}).join(' ')).toContain(words);
  });

  it('answers a stale version with what stands there now, and keeps it', async () => {
    const made = await createPlot({ ctx: owner, input: { siteId: here.id, name: 'Two hands' } });
    const adviser = await ctxAs(here.people.adviser);
    const write = (ctx: Ctx, name: string) =>
      updatePlot({ ctx, input: { siteId: here.id, plotId: made.id, version: made.version, name } });
    const both = await Promise.allSettled([write(owner, 'From the owner'), write(adviser, 'From the adviser')]);
    const won = both.find((one) => one.status === 'fulfilled');
    const lost = both.find((one) => one.status === 'rejected');
    expect(won?.value).toMatchObject({ version: 2 });
    expect(lost?.reason).toMatchObject({ code: 'conflict', reason: 'stale-version', current: won?.value });
  });

  it('lets one live plot have a name, and an archived one keep it', async () => {
    const first = await createPlot({ ctx: owner, input: { siteId: here.id, name: 'Leek row' } });
    const again = () => createPlot({ ctx: owner, input: { siteId: here.id, name: 'leek ROW' } });
    expect(await problemOf(again())).toMatchObject({ code: 'conflict', reason: 'name-taken' });
    const version = first.version;
    const gone = await archivePlot({ ctx: owner, input: { siteId: here.id, plotId: first.id, version } });
    expect(gone.archivedAt).not.toBeNull();
    const edit = { siteId: here.id, plotId: first.id, version: gone.version, name: 'X' };
    expect(await problemOf(updatePlot({ ctx: owner, input: edit }))).toMatchObject({ reason: 'archived' });
    await again();
    const restore = { siteId: here.id, plotId: first.id, version: gone.version };
    expect(await problemOf(restorePlot({ ctx: owner, input: restore }))).toMatchObject({ reason: 'name-taken' });
    const listed = await listPlots({ ctx: owner, input: { siteId: here.id, archived: 'yes' } });
    expect(listed.plots.map((one) => one.id)).toEqual([first.id]);
  });

  it('brings an archived plot back', async () => {
    const made = await createPlot({ ctx: owner, input: { siteId: here.id, name: 'Comes back' } });
    const at = (plot: Plot) => ({ siteId: here.id, plotId: plot.id, version: plot.version });
    const gone = await archivePlot({ ctx: owner, input: at(made) });
    const back = await restorePlot({ ctx: owner, input: at(gone) });
    expect(back).toMatchObject({ archivedAt: null, version: 3 });
    expect(await problemOf(restorePlot({ ctx: owner, input: at(back) }))).toMatchObject({ code: 'conflict' });
  });

  it('holds one crop a year and shows this year’s', async () => {
    const made = await createPlot({ ctx: owner, input: { siteId: here.id, name: 'Onion bed' } });
    const { year } = await listPlots({ ctx: owner, input: { siteId: here.id } });
    const at = { siteId: here.id, plotId: made.id };
    await setPlanting({ ctx: owner, input: { ...at, year, crop: 'Onions' } });
    const set = await setPlanting({ ctx: owner, input: { ...at, year, crop: 'Leeks', plannedOn: `${year}-04-01` } });
    await setPlanting({ ctx: owner, input: { ...at, year: year - 1, crop: 'Beans' } });
    expect(set.planting).toMatchObject({ crop: 'Leeks', year, plannedOn: `${year}-04-01` });
    const detail = await getPlot({ ctx: owner, input: at });
    expect(detail.plantings.map((one) => one.crop)).toEqual(['Leeks', 'Beans']);
    expect((await unsetPlanting({ ctx: owner, input: { ...at, year } })).planting).toBeNull();
  });

  it('takes invisible marks out of reach of names', async () => {
    const bad = { siteId: here.id, name: 'Bed\u202edeb' };
    expect(await problemOf(createPlot({ ctx: owner, input: bad }))).toMatchObject({ code: 'invalid' });
    const tricky = await createPlot({ ctx: owner, input: { siteId: here.id, name: `'; drop table plot; --` } });
    expect(tricky.name).toBe(`'; drop table plot; --`);
  });

  it('lets helpers and viewers look, and owners and advisers write', async () => {
    for (const role of ['helper', 'viewer'] as const) {
      const ctx = await ctxAs(here.people[role]);
      const { plots } = await listPlots({ ctx, input: { siteId: here.id } });
      expect(plots.length).toBeGreaterThan(0);
      const problem = await problemOf(createPlot({ ctx, input: { siteId: here.id, name: `By ${role}` } }));
      expect(problem.code).toBe('forbidden');
    }
    const nobody = await problemOf(listPlots({ ctx: await ctxNobody(), input: { siteId: here.id } }));
    expect(nobody.code).toBe('not-signed-in');
  });

  it('answers another site’s plot like one that does not exist', async () => {
    const foreign = await makePlot(there.id);
    const missing = '00000000-0000-4000-8000-000000000000';
    const [one, two] = await Promise.all([
      problemOf(getPlot({ ctx: owner, input: { siteId: here.id, plotId: foreign } })),
      problemOf(getPlot({ ctx: owner, input: { siteId: here.id, plotId: missing } })),
    ]);
    expect({ code: one.code, sentence: one.sentence }).toEqual({ code: two.code, sentence: two.sentence });
    expect(one.code).toBe('not-found');
    const planting = { siteId: here.id, plotId: foreign, year: 2026, crop: 'Onions' };
    expect((await problemOf(setPlanting({ ctx: owner, input: planting }))).code).toBe('not-found');
    const edit = { siteId: here.id, plotId: foreign, version: 1, name: 'Mine now' };
    expect((await problemOf(updatePlot({ ctx: owner, input: edit }))).code).toBe('not-found');
  });
});

describe('target sets', () => {
  const bands = [{ analyte: 'soil_ph_water', low: 6.2, high: 6.8, unit: 'pH' }] as const;

  it('makes a new version of every edit and lets one of two editors win', async () => {
    const made = await createTargetSet({
      ctx: owner,
      input: { siteId: here.id, name: 'Show onions', bands: [...bands], validFrom: '2024-01-01' },
    });
    expect(made).toMatchObject({ version: 1, validFrom: '2024-01-01' });
    expect(made.bands).toEqual([{ analyte: 'soil_ph_water', low: '6.2', high: '6.8', unit: 'pH', method: null }]);
    const adviser = await ctxAs(here.people.adviser);
    const edit = (ctx: Ctx, high: number) =>
      editTargetSet({
        ctx,
        input: {
          siteId: here.id,
          targetKey: made.key,
          version: 1,
          name: 'Show onions',
          bands: [{ ...bands[0], high }],
        },
      });
    const both = await Promise.allSettled([edit(owner, 6.9), edit(adviser, 7.0)]);
    expect(both.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    const lost = both.find((one) => one.status === 'rejected');
    expect(lost?.reason).toMatchObject({ code: 'conflict', reason: 'stale-version' });
    const { own } = await listTargets({ ctx: owner, input: { siteId: here.id } });
    expect(own.find((set) => set.key === made.key)?.version).toBe(2);
  });

  it('ties a plot and its planting to a set by key, and refuses a key that nobody knows', async () => {
    const set = await createTargetSet({ ctx: owner, input: { siteId: here.id, name: 'Leeks', bands: [...bands] } });
    const plot = await createPlot({
      ctx: owner,
      input: { siteId: here.id, name: 'With targets', targetSetKey: set.key },
    });
    expect(plot.targetSetKey).toBe(set.key);
    const unknown = { siteId: here.id, plotId: plot.id, version: plot.version, targetSetKey: 'no-such-set' };
    expect(await problemOf(updatePlot({ ctx: owner, input: unknown }))).toMatchObject({ code: 'invalid' });
    const foreignOwner = await ctxAs(there.people.owner);
    const foreign = { siteId: there.id, name: 'Elsewhere', targetSetKey: set.key };
    expect(await problemOf(createPlot({ ctx: foreignOwner, input: foreign }))).toMatchObject({ code: 'invalid' });
  });

  it('refuses a band whose ends are swapped or beyond the scale', async () => {
    const swapped = [{ analyte: 'soil_ph_water' as const, low: 7, high: 6, unit: 'pH' }];
    const beyond = [{ analyte: 'soil_ph_water' as const, low: 7, high: 15, unit: 'pH' }];
    for (const wrong of [swapped, beyond]) {
      const input = { siteId: here.id, name: 'Wrong', bands: wrong };
      expect((await problemOf(createTargetSet({ ctx: owner, input }))).code).toBe('invalid');
    }
  });
});
