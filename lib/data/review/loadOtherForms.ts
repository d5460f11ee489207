import { and, eq, inArray, isNull, ne, or } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { readingRow, report, reportSample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { OtherForm } from '@/lib/schemas/review';
import type { ReportRow } from '../reports/getReportInSite';
import { compareForms, looksLikeTheSame } from './compareForms';
import type { RowColumns } from './reviewRow';
import type { SampleColumns } from './sampleStore';

const MOST = 400;

const given = (values: readonly (string | null)[]): string[] => [...new Set(values)].filter((value) => value !== null);

/** For each sample: the form it was said to be the same as, and the others that look like it. */
export type OtherForms = Map<string, { sameAs: OtherForm | null; candidates: OtherForm[] }>;

type Other = { sample: SampleColumns; report: Pick<ReportRow, 'id' | 'state' | 'fileName' | 'laboratoryId'> };

async function loadOthers(
  tx: Transaction,
  siteId: SiteId,
  reportId: string,
  samples: readonly SampleColumns[],
): Promise<Other[]> {
  const numbers = given(samples.map((one) => one.labNumber));
  const plots = given(samples.map((one) => one.plotId));
  const days = given(samples.map((one) => one.takenOn));
  const chosen = given(samples.map((one) => one.sameAsId));
  const near = [
    numbers.length > 0 ? inArray(reportSample.labNumber, numbers) : undefined,
    plots.length > 0 && days.length > 0
      ? and(inArray(reportSample.plotId, plots), inArray(reportSample.takenOn, days))
      : undefined,
    chosen.length > 0 ? inArray(reportSample.id, chosen) : undefined,
  ].filter((one) => one !== undefined);
  if (near.length === 0) return [];
  return tx
    .select({
      sample: reportSample,
      report: { id: report.id, state: report.state, fileName: report.fileName, laboratoryId: report.laboratoryId },
    })
    .from(reportSample)
    .innerJoin(report, and(eq(report.siteId, siteId), eq(report.id, reportSample.reportId)))
    .where(
      and(
        eq(reportSample.siteId, siteId),
        ne(reportSample.reportId, reportId),
        inArray(report.state, ['in-review', 'confirmed']),
        isNull(reportSample.leftOutReason),
        isNull(reportSample.sameAsId),
        or(...near),
      ),
    )
    .limit(MOST);
}

export async function loadOtherForms(
  tx: Transaction,
  siteId: SiteId,
  reportRow: Pick<ReportRow, 'id' | 'laboratoryId'>,
  samples: readonly SampleColumns[],
  rows: readonly RowColumns[],
): Promise<OtherForms> {
  const asked = samples.filter((sample) => sample.leftOutReason === null);
  const others = await loadOthers(tx, siteId, reportRow.id, asked);
  const ids = others.map((other) => other.sample.id);
  const theirs =
    ids.length === 0
      ? []
      : await tx
          .select()
          .from(readingRow)
          .where(
            and(
              eq(readingRow.siteId, siteId),
              // Implied by the samples, and what the index knows.
              inArray(readingRow.reportId, [...new Set(others.map((other) => other.report.id))]),
              inArray(readingRow.reportSampleId, ids),
            ),
          );
  const forms: OtherForms = new Map();
  const rowsAbove = <R extends Pick<RowColumns, 'reportSampleId'>>(
    of: SampleColumns,
    among: readonly SampleColumns[],
    all: readonly R[],
  ): R[] => {
    const above = among.find((one) => one.reportId === of.reportId && one.ordinal === of.ordinal - 1);
    return above ? all.filter((row) => row.reportSampleId === above.id) : [];
  };
  const otherSamples = others.map((other) => other.sample);
  for (const sample of asked) {
    const mine = rows.filter((row) => row.reportSampleId === sample.id);
    const entry: { sameAs: OtherForm | null; candidates: OtherForm[] } = { sameAs: null, candidates: [] };
    for (const other of others) {
      const compared = compareForms(
        mine,
        theirs.filter((row) => row.reportSampleId === other.sample.id),
        { here: rowsAbove(sample, samples, rows), there: rowsAbove(other.sample, otherSamples, theirs) },
      );
      const form: OtherForm = {
        reportSampleId: other.sample.id,
        reportId: other.report.id,
        reportState: other.report.state,
        fileName: other.report.fileName,
        printedName: other.sample.printedName,
        labNumber: other.sample.labNumber,
        takenOn: other.sample.takenOn,
        ...compared,
      };
      if (sample.sameAsId === other.sample.id) entry.sameAs = form;
      else if (sample.sameAsId === null) {
        const a = { ...sample, laboratoryId: reportRow.laboratoryId };
        const b = { ...other.sample, laboratoryId: other.report.laboratoryId };
        if (looksLikeTheSame(a, b, compared)) entry.candidates.push(form);
      }
    }
    forms.set(sample.id, entry);
  }
  return forms;
}
