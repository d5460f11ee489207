import { beforeAll, describe, expect, it } from 'vitest';
import { auditEvent, outbox, reportSample } from '@/db/schema';
import { assignPlots } from '@/lib/data/batches/assignPlots';
import { createBatch } from '@/lib/data/batches/createBatch';
import { getBatch } from '@/lib/data/batches/getBatch';
import { getBatchPlace } from '@/lib/data/batches/getBatchPlace';
import { leaveOut } from '@/lib/data/batches/leaveOut';
import { listBatches } from '@/lib/data/batches/listBatches';
import { listBatchSamples } from '@/lib/data/batches/listBatchSamples';
import { refuseFile } from '@/lib/data/batches/refuseFile';
import { setBatchMail } from '@/lib/data/batches/setBatchMail';
import { tellBatch, tellReport } from '@/lib/data/batches/tellBatch';
import type { Ctx } from '@/lib/data/context';
import { setMailPreference } from '@/lib/data/mail/preferences';
import { giveUpReading } from '@/lib/data/reports/giveUpReading';
import { saveReading } from '@/lib/data/reports/saveReading';
import { startReading } from '@/lib/data/reports/startReading';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { removeMember } from '@/lib/data/sites/removeMember';
import { withPeople, withSite } from '@/lib/data/transaction';
import type { ReadSample } from '@/lib/reading/types';
import { ctxAs, ctxWorker, makePlot, makeSite, type TestSite, useWorld } from '../support/factory';
import { pdfBytes, problemOf, readResult, readSample, soilReading } from '../support/reports';

const world = useWorld();
let here: TestSite;
let owner: Ctx;
let helper: Ctx;
beforeAll(async () => {
  here = await makeSite('Here');
  owner = await ctxAs(here.people.owner);
  helper = await ctxAs(here.people.helper);
});

const PH = readResult({ analyte: 'soil_ph_water', printed: '6.4', unit: 'pH' });
const named = (...names: string[]) => names.map((sampleId) => readSample({ sampleId, results: [PH] }));

async function announce(count: number, ctx = owner, site = here) {
  const files = Array.from({ length: count }, (_, at) => ({ name: `old-${at + 1}.pdf`, bytes: 40 }));
  return createBatch({ ctx, input: { siteId: site.id, files } });
}
const send = (batchFileId: string, ctx = owner, site = here, bytes = pdfBytes()) =>
  uploadReport({ ctx, input: { siteId: site.id, fileName: 'old.pdf', bytes, batchFileId } });

async function read(reportId: string, samples: readonly ReadSample[], site = here) {
  const ctx = await ctxWorker();
  const task = await startReading({ ctx, input: { siteId: site.id, id: reportId } });
  if (!task) throw new Error('The report could not be taken.');
  await saveReading({ ctx, input: { lease: task.lease, reading: soilReading(samples) } });
}
const tell = async (batchId: string, site = here) =>
  tellBatch({ ctx: await ctxWorker(), input: { siteId: site.id, id: batchId } });
const look = (batchId: string, site = here, ctx = owner) => getBatch({ ctx, input: { siteId: site.id, batchId } });
const letters = async (who: { email: string }) =>
  (await withPeople((tx) => tx.select().from(outbox))).filter((one) => one.toAddress === who.email);

describe('a batch', () => {
  it('keeps every announced file: sent, refused before sending, refused by the server, seen before, never come', async () => {
    const { batchId, fileIds } = await createBatch({
      ctx: helper,
      input: {
        siteId: here.id,
        files: [
          { name: '../../a\u0000b.pdf', bytes: 40 },
          { name: 'empty.pdf', bytes: 0, refusal: 'This file is empty.' },
          { name: 'c.pdf', bytes: 40 },
          { name: 'd.pdf', bytes: 40 },
          { name: 'e.pdf', bytes: 40 },
        ],
      },
    });
    const [a = '', , c = '', d = ''] = fileIds;
    const bytes = pdfBytes();
    const first = await send(a, helper, here, bytes);
    expect((await send(a, helper, here, bytes)).kind, 'the answer was lost, the try repeated').toBe('seen-before');
    expect((await send(c, helper, here, bytes)).kind).toBe('seen-before');
    await refuseFile({ ctx: helper, input: { siteId: here.id, batchId, fileId: d, sentence: 'Not a report.' } });
    const { files, counts } = await look(batchId);
    expect(files.map((file) => [file.fileName, file.state, file.refusal, file.report?.id ?? null])).toEqual([
      ['a b.pdf', 'kept', null, first.reportId],
      ['empty.pdf', 'refused', 'This file is empty.', null],
      ['c.pdf', 'seen-before', null, first.reportId],
      ['d.pdf', 'refused', 'Not a report.', null],
      ['e.pdf', 'announced', null, null],
    ]);
    expect(counts).toMatchObject({ files: 5, missing: 1, beingRead: 2, notTaken: 2 });
    expect(await leaveOut({ ctx: helper, input: { siteId: here.id, batchId } })).toEqual({ leftOut: 1 });
    expect(await leaveOut({ ctx: helper, input: { siteId: here.id, batchId } })).toEqual({ leftOut: 0 });
    const kept = { siteId: here.id, batchId, fileId: a, sentence: 'x' };
    expect((await problemOf(refuseFile({ ctx: helper, input: kept }))).code).toBe('conflict');
  });

  it('takes at most a hundred files, and an announced file of this site only', async () => {
    expect((await problemOf(announce(101))).code).toBe('invalid');
    const there = await makeSite('There');
    const { fileIds } = await announce(1, await ctxAs(there.people.owner), there);
    expect((await problemOf(send(fileIds[0] ?? ''))).code).toBe('not-found');
  });

  it('is listed while it asks something of somebody', async () => {
    const { batchId, fileIds } = await announce(1);
    const listed = async () =>
      (await listBatches({ ctx: owner, input: { siteId: here.id } })).batches.some((one) => one.id === batchId);
    expect(await listed()).toBe(true);
    await refuseFile({
      ctx: owner,
      input: { siteId: here.id, batchId, fileId: fileIds[0] ?? '', sentence: 'Not a report.' },
    });
    expect(await listed()).toBe(false);
  });
});

describe('plots in bulk', () => {
  it('proposes by name and saves each sample whole or not at all', async () => {
    const site = await makeSite('Bulk');
    const ctx = await ctxAs(site.people.owner);
    const north = await makePlot(site.id, { name: 'North bed' });
    const { batchId, fileIds } = await announce(2, ctx, site);
    const [one, two] = [await send(fileIds[0] ?? '', ctx, site), await send(fileIds[1] ?? '', ctx, site)];
    await read(one.reportId, named('North bed', 'Row 7', 'Row 8'), site);
    await read(two.reportId, named('Row 7'), site);
    const south = await makePlot(site.id, { name: 'Row 7' });
    const at = { siteId: site.id, batchId };
    const { samples, plots } = await listBatchSamples({ ctx, input: at });
    expect(plots.map((plot) => plot.name)).toEqual(['North bed', 'Row 7']);
    expect(samples.map((sample) => [sample.printedName, sample.plotId, sample.proposal])).toEqual([
      ['North bed', north, { plotId: north, because: 'same-name' }],
      ['Row 7', null, { plotId: south, because: 'same-name' }],
      ['Row 8', null, null],
      ['Row 7', null, { plotId: south, because: 'same-name' }],
    ]);
    const [, row7, row8, again] = samples;
    if (!row7 || !row8 || !again) throw new Error('The samples are missing.');
    const edits = [
      { reportSampleId: row7.id, version: row7.version, plotId: south },
      { reportSampleId: row8.id, version: row8.version + 5, plotId: south },
      { reportSampleId: again.id, version: again.version, plotId: north },
    ];
    const { outcomes } = await assignPlots({ ctx, input: { ...at, edits } });
    expect(outcomes.map((outcome) => outcome.kind)).toEqual(['saved', 'stale', 'saved']);
    expect(outcomes[1]?.sentence).toMatch(/Somebody changed this sample/);
    const stored = await withSite(site.id, (tx) => tx.select().from(reportSample));
    expect(Object.fromEntries(stored.map((row) => [row.id, row.plotId]))).toEqual({
      [samples[0]?.id ?? '']: north,
      [row7.id]: south,
      [row8.id]: null,
      [again.id]: north,
    });
    const elsewhere = await makePlot((await makeSite('Foreign')).id);
    const foreign = assignPlots({ ctx, input: { ...at, edits: [{ ...edits[0], plotId: elsewhere } as never] } });
    expect((await problemOf(foreign)).code).toBe('not-found');
  });
});

describe('where a report stands in its batch', () => {
  it('names the next one to review, those passed over last', async () => {
    const { fileIds } = await announce(3);
    const ids: string[] = [];
    for (const id of fileIds) {
      const { reportId } = await send(id);
      await read(reportId, named('X'));
      ids.push(reportId);
    }
    const place = (reportId = '') => getBatchPlace({ ctx: owner, input: { siteId: here.id, reportId } });
    expect(await place(ids[0])).toMatchObject({ position: 1, of: 3, toReview: 2, next: { reportId: ids[1] } });
    expect(await place(ids[2])).toMatchObject({ position: 3, of: 3, next: { reportId: ids[0] } });
    const alone = await uploadReport({
      ctx: owner,
      input: { siteId: here.id, fileName: 'alone.pdf', bytes: pdfBytes() },
    });
    expect(await place(alone.reportId)).toBeNull();
  });
});

describe('telling that a batch is read', () => {
  it('waits for the last file, then writes one letter, and none to who did not ask', async () => {
    const site = await makeSite('Told');
    const ctx = await ctxAs(site.people.owner);
    const { batchId, fileIds, mailWanted } = await announce(3, ctx, site);
    expect(mailWanted).toBe(false);
    await setBatchMail({ ctx, input: { siteId: site.id, batchId, wanted: true } });
    const [a = '', b = '', c = ''] = fileIds;
    await read((await send(a, ctx, site)).reportId, named('X', 'Y'), site);
    await tell(batchId, site);
    expect((await look(batchId, site, ctx)).readyAt).toBeNull();
    const lost = await send(b, ctx, site);
    await refuseFile({ ctx, input: { siteId: site.id, batchId, fileId: c, sentence: 'Not a report.' } });
    await tell(batchId, site);
    expect(await letters(site.people.owner)).toEqual([]);
    const worker = await ctxWorker();
    await giveUpReading({ ctx: worker, input: { siteId: site.id, id: lost.reportId } });
    await Promise.all([tell(batchId, site), tell(batchId, site)]);
    await tellReport({ ctx: worker, input: { siteId: site.id, id: lost.reportId } });
    const [letter, ...more] = await letters(site.people.owner);
    expect(more).toEqual([]);
    expect(letter?.subject).toBe('1 of 3 reports ready to review: Told');
    expect(letter?.text).toContain('1 report with 2 samples waits to be compared');
    expect(letter?.text).toContain('1 file could not be read');
    expect(letter?.text).toContain('1 file not taken');
    expect(letter?.text).toContain(`/sites/${site.id}/reports/batches/${batchId}`);
    expect(letter?.headers['List-Unsubscribe-Post']).toBe('List-Unsubscribe=One-Click');
    const acts = await withSite(site.id, (tx) => tx.select().from(auditEvent));
    expect(acts.filter((one) => one.act === 'batch.ready')).toHaveLength(1);
  });

  it('writes to nobody who stopped these letters afterwards, has left, or never wished for one', async () => {
    for (const what of ['stopped', 'left', 'never'] as const) {
      const site = await makeSite(what);
      const ctx = await ctxAs(site.people.helper);
      const { batchId, fileIds } = await announce(1, ctx, site);
      if (what !== 'never') await setBatchMail({ ctx, input: { siteId: site.id, batchId, wanted: true } });
      await read((await send(fileIds[0] ?? '', ctx, site)).reportId, named('X'), site);
      if (what === 'stopped') {
        const later = { ...ctx, now: new Date(ctx.now.getTime() + 1000) };
        await setMailPreference({ ctx: later, input: { kind: 'report-ready', wanted: false } });
      }
      if (what === 'left') {
        const by = await ctxAs(site.people.owner);
        await removeMember({ ctx: by, input: { siteId: site.id, memberId: await memberId(site, 'helper') } });
      }
      await tell(batchId, site);
      expect((await look(batchId, site, await ctxAs(site.people.owner))).readyAt, what).not.toBeNull();
      expect(await letters(site.people.helper), what).toEqual([]);
    }
  });

  it('does not wait for files whose browser is gone', async () => {
    const { batchId, fileIds } = await announce(2);
    await read((await send(fileIds[0] ?? '')).reportId, named('X'));
    await tell(batchId);
    expect((await look(batchId)).readyAt).toBeNull();
    await world.moveClock(31 * 60);
    await tell(batchId);
    await world.moveClock(0);
    expect((await look(batchId)).readyAt).not.toBeNull();
  });

  it('tells of a file sent by itself only to who asked for that, once', async () => {
    const site = await makeSite('Single');
    const ctx = await ctxAs(site.people.owner);
    const one = await uploadReport({ ctx, input: { siteId: site.id, fileName: 'one.pdf', bytes: pdfBytes() } });
    await read(one.reportId, named('X'), site);
    const told = async (id: string) => tellReport({ ctx: await ctxWorker(), input: { siteId: site.id, id } });
    await told(one.reportId);
    expect(await letters(site.people.owner)).toEqual([]);
    await setMailPreference({ ctx, input: { kind: 'report-ready', wanted: true } });
    const two = await uploadReport({ ctx, input: { siteId: site.id, fileName: 'two.pdf', bytes: pdfBytes() } });
    await read(two.reportId, named('X'), site);
    await told(two.reportId);
    await told(two.reportId);
    expect((await letters(site.people.owner)).map((one) => one.subject)).toEqual(['Report ready to review: two.pdf']);
  });
});

async function memberId(site: TestSite, role: string): Promise<string> {
  const { membership } = await import('@/db/schema');
  const rows = await withSite(site.id, (tx) => tx.select().from(membership));
  return rows.find((row) => row.role === role)?.id ?? '';
}
