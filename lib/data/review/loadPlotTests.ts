import { and, desc, eq, inArray, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { reportSample, result } from '@/db/schema';
import { isAnalyteKey, isMethodKey, isUnitKey } from '@/lib/domain/analytes';
import type { SiteId } from '@/lib/domain/ids';
import type { EarlierTest, HistoryValue } from '@/lib/reading/checks/history';
import type { RowColumns } from './reviewRow';

type Measured = Pick<RowColumns, 'analyte' | 'printed' | 'value' | 'qualifier' | 'unit' | 'method' | 'form'>;

/** More numbers of a plot than any record holds; the newest are the ones that matter. */
const MOST = 20_000;

/** null: a row that does not yet say what it measures has no history. */
export function toHistoryValue(row: Measured): HistoryValue | null {
  if (row.analyte === null || !isAnalyteKey(row.analyte)) return null;
  return {
    analyte: row.analyte,
    printed: row.printed,
    value: row.value === null ? null : Number(row.value),
    qualifier: row.qualifier,
    unit: row.unit !== null && isUnitKey(row.unit) ? row.unit : null,
    method: row.method !== null && isMethodKey(row.method) ? row.method : null,
    form: row.form,
  };
}

/** A confirmed test of a plot, and the report it came from: a report is not held against itself. */
export type PlotTest = EarlierTest & { readonly reportId: string };

/** The confirmed tests of these plots, sample by sample. */
export async function loadPlotTests(
  tx: Transaction,
  siteId: SiteId,
  plotIds: readonly string[],
): Promise<Map<string, PlotTest[]>> {
  const tests = new Map<string, PlotTest[]>();
  if (plotIds.length === 0) return tests;
  const rows = await tx
    .select({ result, printedName: reportSample.printedName, fieldName: reportSample.fieldName })
    .from(result)
    .innerJoin(reportSample, and(eq(reportSample.siteId, siteId), eq(reportSample.id, result.reportSampleId)))
    .where(and(eq(result.siteId, siteId), inArray(result.plotId, [...plotIds]), isNull(result.supersededAt)))
    .orderBy(desc(result.takenOn), desc(result.id))
    .limit(MOST);
  const samples = new Map<string, { plotId: string; test: PlotTest; values: HistoryValue[] }>();
  for (const { result: row, printedName, fieldName } of rows) {
    const known = samples.get(row.reportSampleId);
    const values = known?.values ?? [];
    const value = toHistoryValue(row);
    if (value !== null) values.push(value);
    if (known) continue;
    const test = { on: row.takenOn, sampleName: fieldName ?? printedName, values, reportId: row.reportId };
    samples.set(row.reportSampleId, { plotId: row.plotId, test, values });
  }
  for (const { plotId, test } of samples.values()) tests.set(plotId, [...(tests.get(plotId) ?? []), test]);
  return tests;
}
