import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { readingRow, reportSample } from '@/db/schema';
import { correctResult } from '@/lib/data/results/correctResult';
import { withdrawReport } from '@/lib/data/results/withdrawReport';
import { setSameAs } from '@/lib/data/review/setSameAs';
import { enterSite } from '@/lib/data/transaction';
import { useWorld } from '../support/factory';
import { holding, untilWaiting } from '../support/held';
import { problemOf } from '../support/reports';
import { only, useReviewBench } from '../support/review';

const world = useWorld();
const { bench, reading, ready, review, confirm, live } = useReviewBench();

const withdraw = (reportId: string) =>
  withdrawReport({ ctx: bench.owner, input: { siteId: bench.here.id, reportId, reason: 'the wrong bag' } });

/** Holds one row of the review in another connection, so that whoever writes it waits just there. */
const holdRow = (id: string) =>
  holding(async (tx) => {
    await enterSite(tx, bench.here.id);
    await tx.select().from(readingRow).where(eq(readingRow.id, id)).for('update');
  });
const holdSample = (id: string) =>
  holding(async (tx) => {
    await enterSite(tx, bench.here.id);
    await tx.select().from(reportSample).where(eq(reportSample.id, id)).for('update');
  });

async function lean(reportId: string, on: string): Promise<unknown> {
  const mine = only((await review(reportId)).samples);
  const input = { siteId: bench.here.id, reportId, reportSampleId: mine.id, version: mine.version, sameAsId: on };
  return setSameAs({ ctx: bench.owner, input });
}

describe('two acts at the same moment', () => {
  it('a correction under way when its report is withdrawn does not outlive it', async () => {
    const { reportId, plotId } = await ready();
    await confirm(reportId);
    const [first] = await live(plotId);
    const row = (await review(reportId)).rows.find((one) => one.analyte === first?.analyte);
    if (!first || !row) throw new Error('Nothing to correct.');
    const held = await holdRow(row.id);
    const correcting = correctResult({
      ctx: bench.owner,
      input: { siteId: bench.here.id, resultId: first.id, value: '6.1', reason: 'misread' },
    });
    await untilWaiting(world, 1, correcting);
    const withdrawing = withdraw(reportId);
    await untilWaiting(world, 2, withdrawing);
    await held.release();
    await correcting;
    await withdrawing;
    expect(await live(plotId)).toEqual([]);
  });

  it('a report is not withdrawn while another one is being confirmed as the same analysis', async () => {
    const { reportId, one } = await ready();
    await confirm(reportId);
    const copy = await reading([{ ...one, sampleId: 'copy', dateSampled: null }], 'copy.pdf');
    await lean(copy, only((await review(reportId)).samples).id);
    const held = await holdSample(only((await review(copy)).samples).id);
    const confirming = confirm(copy);
    await untilWaiting(world, 1, confirming);
    const withdrawing = problemOf(withdraw(reportId));
    await untilWaiting(world, 2, withdrawing);
    await held.release();
    expect(await confirming).toMatchObject({ state: 'confirmed', results: 0 });
    expect(await withdrawing).toMatchObject({ code: 'conflict', reason: 'same-as-leans' });
  });

  it('two marks of "the same analysis" never make a chain', async () => {
    const reports = [await ready(), await ready(), await ready()].map((one) => one.reportId);
    const [a = '', b = '', c = ''] = reports;
    const sampleOf = async (reportId: string) => only((await review(reportId)).samples).id;
    const [sampleA, sampleB, sampleC] = [await sampleOf(a), await sampleOf(b), await sampleOf(c)];
    const held = await holdSample(sampleC);
    const third = lean(c, sampleA);
    await untilWaiting(world, 1, third);
    const first = problemOf(lean(a, sampleB));
    await untilWaiting(world, 2, first);
    await held.release();
    await third;
    expect(await first).toMatchObject({ code: 'conflict', reason: 'same-as-chain' });
  });
});
