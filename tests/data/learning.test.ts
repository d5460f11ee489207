import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { auditEvent, layoutMemory } from '@/db/schema';
import { database } from '@/lib/data/database';
import { forgetLayout } from '@/lib/data/learning/forgetLayout';
import { listLayouts } from '@/lib/data/learning/listLayouts';
import { recheckReviews } from '@/lib/data/learning/recheckReviews';
import { saveReading } from '@/lib/data/reports/saveReading';
import { startReading } from '@/lib/data/reports/startReading';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { withdrawReport } from '@/lib/data/results/withdrawReport';
import { editRow } from '@/lib/data/review/editRow';
import { getReview } from '@/lib/data/review/getReview';
import { removeRow } from '@/lib/data/review/removeRow';
import { withSite } from '@/lib/data/transaction';
import type { ReadResult } from '@/lib/reading/types';
import { ctxAs, ctxWorker, makePlot, makeSite, useWorld } from '../support/factory';
import { pdfBytes, problemOf, readResult, readSample, soilReading } from '../support/reports';
import { only, useReviewBench } from '../support/review';

useWorld();
const { bench, review, confirm, at } = useReviewBench();

const UNIT_MISSING = { code: 'unit-missing', sentence: 'The page gives no unit for this number.' };
let line = 0;
const placed = (over: Parameters<typeof readResult>[0]): ReadResult =>
  readResult({ box: [0.5, 0.2 + (line++ % 20) * 0.02, 0.55, 0.212 + (line % 20) * 0.02], ...over });
const PH = () => placed({ analyte: 'soil_ph_water', label: 'pH', printed: '6.3', unit: 'pH', method: '1:1_water' });
const P = (over: Partial<ReadResult> = {}) =>
  placed({
    analyte: 'phosphorus',
    label: 'Phosphorus',
    printed: '52',
    doubts: [UNIT_MISSING],
    confidence: 0.8,
    ...over,
  });
const K = (over: Partial<ReadResult> = {}) =>
  placed({ analyte: 'potassium', label: 'Potassium', printed: '150', unit: 'mg/kg', method: 'M3', ...over });

/** A report of this laboratory's layout with one sample of a plot, as the worker leaves it. */
async function read(laboratory: string, rows: readonly ReadResult[], siteId = bench.here.id, ctx = bench.helper) {
  const name = `Bed ${crypto.randomUUID().slice(0, 8)}`;
  const plotId = await makePlot(siteId, { name });
  const { reportId } = await uploadReport({ ctx, input: { siteId, fileName: 'r.pdf', bytes: pdfBytes() } });
  const worker = await ctxWorker();
  const task = await startReading({ ctx: worker, input: { siteId, id: reportId } });
  if (!task) throw new Error('The report could not be taken.');
  const sample = readSample({ sampleId: name, dateSampled: '2026-04-10', results: rows });
  const reading = soilReading([sample], { lab: { name: laboratory } });
  await saveReading({ ctx: worker, input: { lease: task.lease, reading } });
  return { plotId, reportId };
}

const rowOf = async (reportId: string, label: string) =>
  only((await review(reportId)).rows.filter((row) => row.label === label));

async function say(reportId: string, label: string, edits: { unit?: string; method?: string }) {
  const row = await rowOf(reportId, label);
  return editRow({ ctx: bench.helper, input: { ...at(row, reportId), ...edits } });
}
const layouts = async (ctx = bench.owner, siteId = bench.here.id) =>
  (await listLayouts({ ctx, input: { siteId } })).layouts;
const named = async (laboratory: string) => (await layouts()).filter((one) => one.laboratory === laboratory);

async function taught(laboratory: string) {
  const first = await read(laboratory, [PH(), P(), K()]);
  await say(first.reportId, 'Phosphorus', { unit: 'mg/kg', method: 'Olsen' });
  await confirm(first.reportId);
  return first;
}

describe('what a confirmed review taught', () => {
  it('answers what the next report of the layout leaves open, on its day, and keeps the doubt', async () => {
    await taught('Fen Road Soils');
    const next = await read('FEN ROAD SOILS', [PH(), P(), K()]);
    const row = await rowOf(next.reportId, 'Phosphorus');
    expect(row).toMatchObject({ unit: 'mg/kg', method: 'Olsen', confidence: 0.8, doubtful: true });
    expect(row.learnt).toEqual({ on: new Date().toISOString().slice(0, 10), filled: ['unit', 'method'] });
    expect(row.doubts.map((doubt) => doubt.code)).toEqual(['unit-missing']);
    expect((await rowOf(next.reportId, 'Potassium')).learnt?.filled).toEqual([]);
  });

  it('doubts the next report where it says otherwise', async () => {
    await taught('Beck Side Soils');
    const next = await read('Beck Side Soils', [PH(), P(), K({ unit: 'lb/acre' })]);
    const row = await rowOf(next.reportId, 'Potassium');
    expect(row).toMatchObject({ unit: 'lb/acre', learnt: null });
    expect(row.doubts.map((doubt) => doubt.code)).toEqual(['learnt-otherwise']);
  });

  it('says nothing about another laboratory or another layout', async () => {
    await taught('Green Lane Soils');
    for (const other of [
      await read('Mill Lane Soils', [PH(), P(), K()]),
      await read('Green Lane Soils', [P(), placed({ analyte: 'zinc', label: 'Zn', printed: '2' })]),
    ]) {
      expect(await rowOf(other.reportId, 'Phosphorus')).toMatchObject({ unit: null, learnt: null });
    }
  });

  it('reaches no other site', async () => {
    await taught('Ridge Top Soils');
    const there = bench.there;
    const owner = await ctxAs(there.people.owner);
    const next = await read('Ridge Top Soils', [PH(), P(), K()], there.id, owner);
    const seen = await getReview({ ctx: owner, input: { siteId: there.id, reportId: next.reportId } });
    expect(seen.rows.map((row) => [row.learnt, row.label === 'Phosphorus' ? row.unit : 'kept'])).toEqual([
      [null, null],
      [null, 'kept'],
      [null, 'kept'],
    ]);
    expect(await layouts(owner, there.id)).toEqual([]);
    const [mine] = await named('Ridge Top Soils');
    if (!mine) throw new Error('Nothing was learnt here.');
    const foreign = forgetLayout({ ctx: owner, input: { siteId: there.id, layoutId: mine.id } });
    expect((await problemOf(foreign)).code).toBe('not-found');
    expect(await database().select().from(layoutMemory)).toEqual([]);
    const rows = await withSite(there.id, (tx) => tx.select().from(layoutMemory));
    expect(rows).toEqual([]);
    expect(await named('Ridge Top Soils')).toHaveLength(1);
  });

  it('comes only from rows that were left in', async () => {
    const { reportId } = await read('Low Field Soils', [PH(), P(), K()]);
    const row = await rowOf(reportId, 'Phosphorus');
    await removeRow({ ctx: bench.helper, input: at(row, reportId) });
    await confirm(reportId);
    const [layout] = await named('Low Field Soils');
    expect(layout?.lessons.map((one) => one.label).sort()).toEqual(['Potassium', 'pH']);
  });

  it('goes with a withdrawal, but only what that report alone taught', async () => {
    const first = await taught('Holm Soils');
    const second = await read('Holm Soils', [PH(), P(), K()]);
    await say(second.reportId, 'Phosphorus', { method: 'M3' });
    await confirm(second.reportId, await ctxAs(bench.here.people.owner));
    const meant = async () => {
      const next = await read('Holm Soils', [PH(), P(), K()]);
      return (await rowOf(next.reportId, 'Phosphorus')).method;
    };
    const withdraw = (reportId: string) =>
      withdrawReport({ ctx: bench.owner, input: { siteId: bench.here.id, reportId, reason: 'Wrong plot.' } });
    expect(await meant()).toBe('M3');
    await withdraw(second.reportId);
    expect(await meant()).toBe('Olsen');
    await withdraw(first.reportId);
    expect(await meant()).toBeNull();
    expect(await named('Holm Soils')).toEqual([]);
  });

  it('reaches reviews that were open already, but no row that somebody has looked at, and goes with a withdrawal', async () => {
    const open = await read('Mere Soils', [PH(), P(), K({ unit: null, doubts: [UNIT_MISSING] })]);
    await say(open.reportId, 'Potassium', { unit: 'lb/acre' });
    const first = await taught('Mere Soils');
    const again = async () =>
      recheckReviews({ ctx: await ctxWorker(), input: { siteId: bench.here.id, id: first.reportId } });
    await again();
    expect(await rowOf(open.reportId, 'Phosphorus')).toMatchObject({
      unit: 'mg/kg',
      method: 'Olsen',
      version: 2,
      state: 'proposed',
      doubts: [UNIT_MISSING],
    });
    expect(await rowOf(open.reportId, 'Potassium')).toMatchObject({ unit: 'lb/acre', method: 'M3', learnt: null });
    await again();
    expect((await rowOf(open.reportId, 'Phosphorus')).version).toBe(2);
    const { id: siteId } = bench.here;
    await withdrawReport({ ctx: bench.owner, input: { siteId, reportId: first.reportId, reason: 'Wrong plot.' } });
    await again();
    expect(await rowOf(open.reportId, 'Phosphorus')).toMatchObject({
      unit: null,
      method: null,
      learnt: null,
      version: 3,
    });
  });

  it('is forgotten with one button by those who decide, and the trail says so', async () => {
    await taught('Carr Soils');
    await taught('Carr Soils');
    const [layout] = await named('Carr Soils');
    if (!layout) throw new Error('Nothing was learnt.');
    expect(layout.reports).toHaveLength(2);
    const input = { siteId: bench.here.id, layoutId: layout.id };
    expect((await problemOf(forgetLayout({ ctx: bench.helper, input }))).code).toBe('forbidden');
    const twice = await Promise.allSettled([
      forgetLayout({ ctx: bench.adviser, input }),
      forgetLayout({ ctx: bench.owner, input }),
    ]);
    expect(twice.map((one) => one.status).sort()).toEqual(['fulfilled', 'rejected']);
    expect(await named('Carr Soils')).toEqual([]);
    const trail = await withSite(bench.here.id, (tx) =>
      tx.select().from(auditEvent).where(eq(auditEvent.act, 'layout.forget')),
    );
    expect(trail).toHaveLength(1);
    expect(trail[0]?.detail).toMatchObject({ laboratory: 'Carr Soils' });
    const next = await read('Carr Soils', [PH(), P(), K()]);
    expect((await rowOf(next.reportId, 'Phosphorus')).unit).toBeNull();
  });

  it('is not shown to a viewer', async () => {
    const viewer = await ctxAs(bench.here.people.viewer);
    expect((await problemOf(listLayouts({ ctx: viewer, input: { siteId: bench.here.id } }))).code).toBe('forbidden');
    const elsewhere = await ctxAs((await makeSite()).people.owner);
    expect((await problemOf(listLayouts({ ctx: elsewhere, input: { siteId: bench.here.id } }))).code).toBe('not-found');
  });
});
