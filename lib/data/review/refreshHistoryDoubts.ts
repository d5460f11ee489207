import { and, eq, inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { type Doubt, plot, readingRow, report, reportSample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { BASIS_CODES, basisDoubts } from '@/lib/reading/checks/basis';
import { checkHistory, HISTORY_CODES, type HistoryValue } from '@/lib/reading/checks/history';
import { loadPlotTests, type PlotTest, toHistoryValue } from './loadPlotTests';
import type { RowColumns } from './reviewRow';
import type { SampleColumns } from './sampleStore';

type Row = HistoryValue & { readonly of: RowColumns };
type Found = { rows: ReadonlyMap<RowColumns, readonly Doubt[]>; sample: readonly Doubt[] };

function doubtsOf(sample: SampleColumns, rows: readonly Row[], tests: readonly PlotTest[], plotName: string): Found {
  const name = sample.fieldName ?? sample.printedName;
  const { rows: history, sample: said } = checkHistory({
    on: sample.takenOn,
    sampleName: name,
    plotName,
    rows,
    tests: tests.filter((test) => test.reportId !== sample.reportId),
  });
  const basis = basisDoubts(name, rows);
  return {
    rows: new Map(rows.map((row) => [row.of, [...(history.get(row) ?? []), ...(basis.get(row) ?? [])]])),
    sample: said,
  };
}

/** The old answers of these checks go, today's come, and whatever else is doubtful stays. */
const renewed = (before: readonly Doubt[], now: readonly Doubt[]): Doubt[] => [
  ...before.filter((one) => !HISTORY_CODES.has(one.code) && !BASIS_CODES.has(one.code)),
  ...now.map(({ code, sentence }) => ({ code, sentence })),
];

const sameDoubts = (a: readonly Doubt[], b: readonly Doubt[]) => JSON.stringify(a) === JSON.stringify(b);

/**
 * Holds the rows of these samples against what is confirmed of their plots, when a report was read and whenever a sample
 * gets another plot or day. A doubt is not an edit: the row's version stays, so that nobody's open cell turns stale.
 * `untouched`: rows that a person has already decided on are left alone.
 */
export async function refreshHistoryDoubts(
  tx: Transaction,
  siteId: SiteId,
  sampleIds: readonly string[],
  only: 'all' | 'untouched' = 'all',
): Promise<void> {
  if (sampleIds.length === 0) return;
  const samples = await tx
    .select()
    .from(reportSample)
    .where(and(eq(reportSample.siteId, siteId), inArray(reportSample.id, [...sampleIds])));
  const reportIds = [...new Set(samples.map((sample) => sample.reportId))];
  const plotIds = [...new Set(samples.flatMap((sample) => (sample.plotId === null ? [] : [sample.plotId])))];
  const rows = await tx
    .select()
    .from(readingRow)
    .where(
      and(
        eq(readingRow.siteId, siteId),
        inArray(readingRow.reportId, reportIds),
        inArray(readingRow.reportSampleId, [...sampleIds]),
      ),
    );
  const names = new Map(
    plotIds.length === 0
      ? []
      : (
          await tx
            .select()
            .from(plot)
            .where(and(eq(plot.siteId, siteId), inArray(plot.id, plotIds)))
        ).map((one) => [one.id, one.name]),
  );
  const tests = await loadPlotTests(tx, siteId, plotIds);
  const warnings = new Map<string, Doubt[]>();
  for (const sample of samples) {
    const mine = rows.filter((row) => row.reportSampleId === sample.id && row.state !== 'removed');
    const values = mine.flatMap((of): Row[] => {
      const value = toHistoryValue(of);
      return value === null ? [] : [{ ...value, of }];
    });
    const plotName = sample.plotId === null ? '' : (names.get(sample.plotId) ?? '');
    const found = doubtsOf(sample, values, sample.plotId === null ? [] : (tests.get(sample.plotId) ?? []), plotName);
    warnings.set(sample.reportId, [...(warnings.get(sample.reportId) ?? []), ...found.sample]);
    for (const [row, doubts] of found.rows) {
      const now = renewed(row.doubts, doubts);
      if (sameDoubts(row.doubts, now) || (only === 'untouched' && row.editedAt !== null)) continue;
      await tx
        .update(readingRow)
        .set({ doubts: now })
        .where(and(eq(readingRow.siteId, siteId), eq(readingRow.id, row.id)));
    }
  }
  for (const [reportId, said] of warnings) await renewWarnings(tx, siteId, reportId, samples, said);
}

/** A name that changed is said above the samples. Of the report's other samples the warnings stay as they were. */
async function renewWarnings(
  tx: Transaction,
  siteId: SiteId,
  reportId: string,
  asked: readonly SampleColumns[],
  said: readonly Doubt[],
): Promise<void> {
  const here = and(eq(report.siteId, siteId), eq(report.id, reportId));
  const [row] = await tx.select({ warnings: report.warnings, origin: report.origin }).from(report).where(here);
  if (!row) return;
  const names = asked.flatMap((sample) => {
    const name = sample.fieldName ?? sample.printedName;
    return sample.reportId === reportId && name !== null ? [`"${name}" `] : [];
  });
  const kept = row.warnings.filter(
    (one) => one.code !== 'sample-renamed' || !names.some((name) => one.sentence.startsWith(name)),
  );
  // In a grower's own sheet each name was given its plot by hand; two samples of one name are one question.
  const questions = row.origin === 'own-sheet' ? [] : said;
  const once = new Map(questions.map(({ code, sentence }) => [sentence, { code, sentence }]));
  const now = [...kept, ...once.values()];
  if (!sameDoubts(row.warnings, now)) await tx.update(report).set({ warnings: now }).where(here);
}
