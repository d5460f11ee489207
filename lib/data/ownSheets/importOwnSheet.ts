import { and, eq, inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { ownSheet, readingRow, reportSample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import { type AppliedMapping, TYPED_BY_GROWER } from '@/lib/reading/ownSheet';
import type { Reading } from '@/lib/reading/types';
import { importSheetInput, type SheetImported } from '@/lib/schemas/ownSheets';
import { getLivePlotInSite } from '../plots/getLivePlotInSite';
import { lockPlots } from '../plots/lockPlots';
import { refreshReminders } from '../reminders/refreshReminders';
import { getReportInSite, type ReportRow } from '../reports/getReportInSite';
import { holdReportsOf } from '../reports/holdReportsOf';
import { moveReport } from '../reports/moveReport';
import { staleReport, stateAnswer } from '../reports/reportAnswer';
import { writeReadingRows } from '../reports/writeReadingRows';
import { writeResults } from '../results/writeResults';
import { loadOtherForms } from '../review/loadOtherForms';
import { loadReview } from '../review/loadReview';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { faultsOf, nameOf, readMapped } from './readMapped';
import { chosen, getSheetOfReport, mappingNow, rememberMapping } from './sheetStore';

/** More than thirty plots have in thirty years. */
const MOST_SAMPLES = 1_000;
const NO_PLOT = 'No plot was chosen for it.';
const NO_DAY = 'The spreadsheet gives no day for it.';
const NO_NUMBER = 'None of its numbers could be taken.';

function takeable(applied: AppliedMapping): AppliedMapping {
  const { length } = applied.reading.samples;
  if (length <= MOST_SAMPLES) return applied;
  const sentence = `This sheet holds ${length} samples, and ${MOST_SAMPLES} are taken at once. Nothing was imported; cut the sheet into parts and send each.`;
  throw new Problem('too-large', sentence, { reason: 'too-many-samples' });
}

/** Whose numbers they are is said by the report; as a doubt of every row it would hide the real ones. */
const unmarked = (reading: Reading): Reading => ({
  ...reading,
  samples: reading.samples.map((sample) => ({
    ...sample,
    results: sample.results.map((one) => ({
      ...one,
      doubts: one.doubts.filter((doubt) => doubt.code !== TYPED_BY_GROWER.code),
    })),
  })),
});

type Where = { tx: Transaction; siteId: SiteId };

/** What cannot stand is kept in the report, out of the results, each with its reason. */
async function leaveOut({ tx, siteId }: Where, reportId: string, applied: AppliedMapping): Promise<void> {
  const { samples, rows } = await loadReview(tx, siteId, reportId);
  const reasons = new Map<string, string[]>();
  const removed: string[] = [];
  const bySample = new Map<string, string[]>();
  for (const row of rows) bySample.set(row.reportSampleId, [...(bySample.get(row.reportSampleId) ?? []), row.id]);
  for (const sample of samples) {
    const read = applied.reading.samples[sample.ordinal - 1];
    if (!read) throw new Error('A sample of the sheet went missing.');
    const mine = bySample.get(sample.id) ?? [];
    const faults = faultsOf(read);
    const bad = mine.filter((_, at) => faults[at] !== null);
    removed.push(...bad);
    const none = bad.length === mine.length;
    const reason = sample.plotId === null ? NO_PLOT : sample.takenOn === null ? NO_DAY : none ? NO_NUMBER : null;
    if (reason !== null) reasons.set(reason, [...(reasons.get(reason) ?? []), sample.id]);
  }
  for (const [leftOutReason, ids] of reasons) {
    await tx
      .update(reportSample)
      .set({ leftOutReason })
      .where(and(eq(reportSample.siteId, siteId), inArray(reportSample.id, ids)));
  }
  if (removed.length > 0) {
    await tx
      .update(readingRow)
      .set({ state: 'removed' })
      .where(and(eq(readingRow.siteId, siteId), inArray(readingRow.id, removed)));
  }
}

/** A sample that a confirmed report already holds counts through that one: the grower typed in what the laboratory sent. */
async function tieToKnown({ tx, siteId }: Where, report: ReportRow): Promise<number> {
  const { samples, rows } = await loadReview(tx, siteId, report.id);
  const forms = await loadOtherForms(tx, siteId, report, samples, rows);
  const ties = samples.flatMap((sample) => {
    const twin = forms.get(sample.id)?.candidates.find((one) => one.reportState === 'confirmed');
    return twin ? [{ id: sample.id, sameAsId: twin.reportSampleId }] : [];
  });
  await holdReportsOf(
    tx,
    siteId,
    ties.map((tie) => tie.sameAsId),
  );
  for (const { id, sameAsId } of ties) {
    await tx
      .update(reportSample)
      .set({ sameAsId })
      .where(and(eq(reportSample.siteId, siteId), eq(reportSample.id, id)));
  }
  return ties.length;
}

/**
 * in-review -> confirmed: the numbers of a grower's own sheet become results, all of them or none, marked by their report
 * as typed by the grower and without a laboratory. The state moves first, so that a second click or a second person is
 * told. The mapping is kept for the next sheet with these headings. It is undone like any confirmation: by withdrawing it.
 */
export const importOwnSheet = siteVerb({
  act: 'reading.decide',
  input: importSheetInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<SheetImported> => {
    const { reportId } = input;
    const sheet = await getSheetOfReport(tx, siteId, reportId);
    const before = await getReportInSite(tx, siteId, reportId, 'update');
    if (before.origin !== 'own-sheet') throw notFound();
    if (before.state === 'in-review' && before.version !== input.version) throw staleReport(stateAnswer(before));
    const row = await moveReport(tx, siteId, reportId, ['in-review'], {
      state: 'confirmed',
      confirmedBy: person.id,
      confirmedAt: ctx.now,
      withdrawnReason: null,
    });
    const plots = new Map(input.plots.map((one) => [one.name, one.plotId]));
    const plotIds = [...new Set(input.plots.flatMap((one) => (one.plotId === null ? [] : [one.plotId])))];
    for (const plotId of plotIds) await getLivePlotInSite(tx, siteId, plotId);
    await lockPlots(tx, siteId, plotIds);

    const mapping = chosen(sheet, (await mappingNow(tx, siteId, sheet)).mapping, input);
    const applied = takeable(readMapped(sheet, mapping, row.fileName ?? ''));
    await writeReadingRows(
      tx,
      ctx,
      siteId,
      row,
      unmarked(applied.reading),
      (sample) => plots.get(nameOf(sample)) ?? null,
    );
    await leaveOut({ tx, siteId }, reportId, applied);
    const known = await tieToKnown({ tx, siteId }, row);
    const { samples, rows } = await loadReview(tx, siteId, reportId);
    const counted = samples.filter((one) => one.leftOutReason === null);
    if (counted.length === 0) {
      const sentence =
        'Nothing was imported: no row of the sheet has a plot, a day and a number. Choose the plots and the column of the days.';
      throw new Problem('conflict', sentence, { reason: 'nothing-to-import' });
    }
    const results = await writeResults({ tx, ctx, siteId, person, report: row, samples: counted, rows });
    await rememberMapping(tx, siteId, person.id, ctx.now, mapping);
    await tx
      .update(ownSheet)
      .set({ mapping, mappedBy: person.id, mappedAt: ctx.now })
      .where(and(eq(ownSheet.siteId, siteId), eq(ownSheet.id, sheet.id)));
    const touched = [...new Set(counted.flatMap((one) => (one.plotId === null ? [] : [one.plotId])))];
    const leftOut = samples.length - counted.length;
    const detail = { results, samples: counted.length, known, leftOut, plotIds: touched };
    await audit({ act: 'sheet.import', objectKind: 'report', objectId: reportId, detail });
    await enqueue(tx, 'recheck-reviews', { siteId, id: reportId });
    for (const plotId of touched) await refreshReminders(tx, ctx, siteId, plotId);
    const [anyPlot] = touched;
    if (anyPlot) await enqueue(tx, 'recheck-effects', { siteId, id: anyPlot });
    return {
      reportId,
      state: 'confirmed',
      version: row.version,
      samples: counted.length - known,
      results,
      known,
      leftOut,
      plotIds: touched,
    };
  },
});
