import { readdir } from 'node:fs/promises';
import { beforeAll, describe, expect, it } from 'vitest';
import { layoutMemory } from '@/db/schema';
import { listApplications } from '@/lib/data/applications/listApplications';
import { recordApplication } from '@/lib/data/applications/recordApplication';
import { createBatch } from '@/lib/data/batches/createBatch';
import { getBatch } from '@/lib/data/batches/getBatch';
import { getBatchPlace } from '@/lib/data/batches/getBatchPlace';
import { listBatches } from '@/lib/data/batches/listBatches';
import { listBatchSamples } from '@/lib/data/batches/listBatchSamples';
import type { Ctx } from '@/lib/data/context';
import { askCopy } from '@/lib/data/copies/askCopy';
import { getCopy } from '@/lib/data/copies/getCopy';
import { getEffects } from '@/lib/data/effects/getEffects';
import { recheckEffects } from '@/lib/data/effects/recheckEffects';
import { giveUpJob } from '@/lib/data/failedJobs/giveUpJob';
import { listFailedJobs } from '@/lib/data/failedJobs/listFailedJobs';
import { compareResults } from '@/lib/data/history/compareResults';
import { getHistory } from '@/lib/data/history/getHistory';
import { listLaboratories } from '@/lib/data/laboratories/listLaboratories';
import { listLayouts } from '@/lib/data/learning/listLayouts';
import { getOwnSheet } from '@/lib/data/ownSheets/getOwnSheet';
import { saveSheetRows } from '@/lib/data/ownSheets/saveSheetRows';
import { getPlot } from '@/lib/data/plots/getPlot';
import { listPlots } from '@/lib/data/plots/listPlots';
import { collectDue } from '@/lib/data/reminders/collectDue';
import { listDue } from '@/lib/data/reminders/listDue';
import { listRules } from '@/lib/data/reminders/listRules';
import { setRule } from '@/lib/data/reminders/setRule';
import { getReport } from '@/lib/data/reports/getReport';
import { listReports } from '@/lib/data/reports/listReports';
import { saveReading } from '@/lib/data/reports/saveReading';
import { startReading } from '@/lib/data/reports/startReading';
import { typeReport } from '@/lib/data/reports/typeReport';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { exportResults } from '@/lib/data/results/exportResults';
import { latestResults } from '@/lib/data/results/latestResults';
import { listResults } from '@/lib/data/results/listResults';
import { addRow } from '@/lib/data/review/addRow';
import { getReview } from '@/lib/data/review/getReview';
import { getSite } from '@/lib/data/sites/getSite';
import { getSiteSummary } from '@/lib/data/sites/getSiteSummary';
import { listAudit } from '@/lib/data/sites/listAudit';
import { listInvitations } from '@/lib/data/sites/listInvitations';
import { listMembers } from '@/lib/data/sites/listMembers';
import { listMySites } from '@/lib/data/sites/listMySites';
import { listTargets } from '@/lib/data/targets/listTargets';
import { getSiteToday } from '@/lib/data/today/getSiteToday';
import { getToday } from '@/lib/data/today/getToday';
import { withSite } from '@/lib/data/transaction';
import type { PlotId, SiteId } from '@/lib/domain/ids';
import { countingConnection } from '../support/countQueries';
import { ctxAs, ctxWorker, makePlot, makeSite, makeTest, useWorld } from '../support/factory';
import { pdfBytes, readResult, readSample, soilReading } from '../support/reports';

const world = useWorld();

type Ground = {
  siteId: SiteId;
  owner: Ctx;
  worker: Ctx;
  plotId: PlotId;
  reportId: string;
  a: string;
  b: string;
  batchId: string;
  copy: { reportId: string; copyId: string };
  sheetId: string;
};

/** A report in review with so many samples and rows. */
async function makeReview(ctx: Ctx, siteId: SiteId, plotIds: readonly PlotId[]): Promise<string> {
  const samples = plotIds.map((plotId, at) => ({ name: `Bag ${at}`, plotId, takenOn: '2026-09-01' }));
  const { reportId } = await typeReport({ ctx, input: { siteId, laboratoryName: 'Long Lane Bench', samples } });
  const review = await getReview({ ctx, input: { siteId, reportId } });
  for (const { id: reportSampleId } of review.samples) {
    await addRow({ ctx, input: { siteId, reportId, reportSampleId, analyte: 'soil_ph_water', value: '6.4' } });
  }
  return reportId;
}

/** A batch of so many files, all of them read, and as many jobs given up. */
async function makeBatch(owner: Ctx, siteId: SiteId, plotIds: readonly PlotId[]) {
  // The same moment as the owner's: the newest lines of the trail are then not all the worker's.
  const worker = { ...(await ctxWorker()), now: owner.now };
  const files = plotIds.map((_, at) => ({ name: `old-${at}.pdf`, bytes: 9 }));
  const { batchId, fileIds } = await createBatch({ ctx: owner, input: { siteId, files } });
  let reportId = '';
  for (const [at, batchFileId] of fileIds.entries()) {
    const sent = await uploadReport({
      ctx: owner,
      input: { siteId, fileName: 'old.pdf', bytes: pdfBytes(), batchFileId },
    });
    reportId = sent.reportId;
    const task = await startReading({ ctx: worker, input: { siteId, id: reportId } });
    if (!task) throw new Error('The report could not be taken.');
    const results = [readResult({ analyte: 'soil_ph_water', printed: '6.4' })];
    const reading = soilReading([readSample({ sampleId: `Bag ${at}`, results })]);
    await saveReading({ ctx: worker, input: { lease: task.lease, reading } });
    await learn(siteId, reportId, owner.actor.kind === 'person' ? owner.actor.person.id : '');
    const given = { siteId, id: plotIds[at] ?? '', job: 'recheck-effects' as const, sentence: 'It stopped.' };
    await giveUpJob({ ctx: worker, input: given });
  }
  const { id: copyId } = await askCopy({ ctx: owner, input: { siteId, reportId, page: 1 } });
  return { batchId, copy: { reportId, copyId } };
}

/** What a confirmed report taught of its layout, each of a layout of its own. */
const learn = (siteId: SiteId, reportId: string, by: string) =>
  withSite(siteId, (tx) =>
    tx.insert(layoutMemory).values({
      siteId,
      reportId,
      fingerprint: reportId,
      laboratory: 'long lane bench',
      shape: 'page-down',
      headings: ['p', 'ph'],
      lessons: [],
      learntBy: by,
    }),
  );

/** A grower's own sheet with so many names. */
async function makeSheet(owner: Ctx, siteId: SiteId, names: number): Promise<string> {
  const input = {
    siteId,
    fileName: 'own.csv',
    bytes: new TextEncoder().encode(`Bed,Date,pH\n${siteId},2019-04-10,6.1\n`),
  };
  const { reportId } = await uploadReport({ ctx: owner, input: { ...input, ownSheet: 'true' } });
  const worker = await ctxWorker();
  const task = await startReading({ ctx: worker, input: { siteId, id: reportId } });
  if (!task) throw new Error('The sheet could not be taken.');
  const lines = Array.from({ length: names }, (_, at) => [`Bed ${at}`, '2019-04-10', '6.1']);
  const rows = {
    ok: true as const,
    sheets: [{ number: 1, name: null, rows: [['Bed', 'Date', 'pH'], ...lines] }],
    remarks: [],
  };
  await saveSheetRows({ ctx: worker, input: { lease: task.lease, rows } });
  return reportId;
}

async function makeGround(plots: number, years: number): Promise<Ground> {
  const site = await makeSite(`${plots} plots`);
  const siteId = site.id;
  const owner = await ctxAs(site.people.owner);
  const plotIds: PlotId[] = [];
  const results: string[] = [];
  for (let at = 0; at < plots; at += 1) {
    const plotId = await makePlot(siteId);
    plotIds.push(plotId);
    for (let year = 0; year < years; year += 1) {
      const ph = { analyte: 'soil_ph_water', value: `${7 - year / 20}`, unit: 'pH' };
      const phosphorus = { analyte: 'phosphorus', value: `${50 + year}`, unit: 'mg/kg', basis: 'mass' as const };
      results.push(...(await makeTest(site, plotId, `${2026 - years + year}-04-10`, [ph, phosphorus])));
    }
    const intent = { analyte: 'soil_ph_water', unit: 'pH', fullChange: -0.3, low: null, high: null, source: 'typed' };
    const spread = { material: { key: 'elemental-sulfur-90' }, amount: 2, amountUnit: 'kg' as const };
    for (let year = 0; year < years; year += 5) {
      const appliedOn = `${2026 - years + year}-05-01`;
      await recordApplication({ ctx: owner, input: { siteId, plotId, ...spread, appliedOn, intents: [intent] } });
    }
    await setRule({ ctx: owner, input: { siteId, plotId, kind: 'yearly-same-season', active: true } });
  }
  const [plotId] = plotIds;
  const [a] = results;
  const b = results.at(-2);
  if (!plotId || !a || !b) throw new Error('The ground is empty.');
  const batch = await makeBatch(owner, siteId, plotIds);
  const reportId = await makeReview(owner, siteId, plotIds);
  const sheetId = await makeSheet(owner, siteId, plotIds.length);
  await recheckEffects({ ctx: await ctxWorker(), input: { siteId, id: plotId } });
  return { siteId, owner, worker: await ctxWorker(), plotId, reportId, a, b, sheetId, ...batch };
}

const here = ({ siteId }: Ground) => ({ siteId });
/** Every verb that lists, and the jobs that look over a whole site. */
const ASKED: Record<string, (ground: Ground) => Promise<unknown>> = {
  listApplications: (g) => listApplications({ ctx: g.owner, input: here(g) }),
  getEffects: (g) => getEffects({ ctx: g.owner, input: here(g) }),
  getHistory: (g) => getHistory({ ctx: g.owner, input: { ...here(g), plotId: g.plotId } }),
  compareResults: (g) =>
    compareResults({ ctx: g.owner, input: { ...here(g), analyte: 'soil_ph_water', a: g.a, b: g.b } }),
  listLayouts: (g) => listLayouts({ ctx: g.owner, input: here(g) }),
  getOwnSheet: (g) => getOwnSheet({ ctx: g.owner, input: { ...here(g), reportId: g.sheetId } }),
  listLaboratories: (g) => listLaboratories({ ctx: g.owner, input: here(g) }),
  getPlot: (g) => getPlot({ ctx: g.owner, input: { ...here(g), plotId: g.plotId } }),
  listPlots: (g) => listPlots({ ctx: g.owner, input: here(g) }),
  listDue: (g) => listDue({ ctx: g.owner, input: here(g) }),
  listRules: (g) => listRules({ ctx: g.owner, input: here(g) }),
  getReport: (g) => getReport({ ctx: g.owner, input: { ...here(g), reportId: g.reportId } }),
  listReports: (g) => listReports({ ctx: g.owner, input: here(g) }),
  exportResults: (g) => exportResults({ ctx: g.owner, input: here(g) }),
  latestResults: (g) => latestResults({ ctx: g.owner, input: here(g) }),
  listResults: (g) => listResults({ ctx: g.owner, input: here(g) }),
  getReview: (g) => getReview({ ctx: g.owner, input: { ...here(g), reportId: g.reportId } }),
  getSite: (g) => getSite({ ctx: g.owner, input: here(g) }),
  getSiteSummary: (g) => getSiteSummary({ ctx: g.owner, input: here(g) }),
  listAudit: (g) => listAudit({ ctx: g.owner, input: here(g) }),
  listInvitations: (g) => listInvitations({ ctx: g.owner, input: here(g) }),
  listMembers: (g) => listMembers({ ctx: g.owner, input: here(g) }),
  listMySites: (g) => listMySites({ ctx: g.owner, input: {} }),
  listTargets: (g) => listTargets({ ctx: g.owner, input: here(g) }),
  getSiteToday: (g) => getSiteToday({ ctx: g.owner, input: here(g) }),
  getToday: (g) => getToday({ ctx: g.owner, input: {} }),
  listBatches: (g) => listBatches({ ctx: g.owner, input: here(g) }),
  getBatch: (g) => getBatch({ ctx: g.owner, input: { ...here(g), batchId: g.batchId } }),
  listBatchSamples: (g) => listBatchSamples({ ctx: g.owner, input: { ...here(g), batchId: g.batchId } }),
  getBatchPlace: (g) => getBatchPlace({ ctx: g.owner, input: { ...here(g), reportId: g.copy.reportId } }),
  listFailedJobs: (g) => listFailedJobs({ ctx: g.owner, input: here(g) }),
  getCopy: (g) => getCopy({ ctx: g.owner, input: { ...here(g), ...g.copy } }),
  recheckEffects: (g) => recheckEffects({ ctx: g.worker, input: { ...here(g), id: g.plotId } }),
};
/** The first takes nothing but the person, the next two a file; `…InSite` fetch one row and are no verbs. */
const NO_LIST = /^(getMe|getReportFile|getCopyFile|get\w+InSite)$/;
const MOST = 20;

describe('the queries of a page', () => {
  let count: (work: () => Promise<unknown>) => Promise<number>;
  let small: Ground;
  let large: Ground;

  beforeAll(async () => {
    small = await makeGround(1, 2);
    large = await makeGround(30, 10);
    count = await countingConnection(world.urls().appUrl);
  }, 120_000);

  it('are counted for every verb that lists or gets', async () => {
    const files = await readdir('lib/data', { recursive: true });
    const verbs = files.flatMap((file) => /\/((?:list|get)\w+)\.ts$/.exec(file)?.[1] ?? []);
    expect(verbs.filter((verb) => !(verb in ASKED) && !NO_LIST.test(verb))).toEqual([]);
  });

  it.each(Object.entries(ASKED))('%s asks no more of 30 plots and 10 years than of one plot', async (_, ask) => {
    const few = await count(() => ask(small));
    expect(few).toBeGreaterThan(1);
    expect(await count(() => ask(large))).toBe(few);
    expect(few).toBeLessThanOrEqual(MOST);
  });

  it('collectDue asks by site and member, not by reminder', async () => {
    const due = new Date('2026-04-10T15:00:00Z');
    let notices = 0;
    const queries = await count(async () => {
      const letters = await collectDue({ ctx: { ...large.worker, now: due }, input: {} });
      notices = letters.reduce((sum, letter) => sum + letter.notices.length, 0);
    });
    expect(notices).toBeGreaterThanOrEqual(90);
    expect(queries).toBeLessThanOrEqual(30);
  });
});
