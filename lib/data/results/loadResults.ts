import { and, asc, desc, eq, gte, isNull, lte, type SQL } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import type { Transaction } from '@/db/client';
import { laboratory, result, sample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { Problem } from '@/lib/errors';
import type { Result } from '@/lib/schemas/results';
import { namesOf } from '../people/names';

/** Beyond this an answer is no list any more; it is refused rather than cut, so that nobody takes a part for the whole. */
const MOST = 50_000;

const replaced = alias(result, 'replaced');

export const resultFilter = (input: {
  plotId?: string | undefined;
  analyte?: string | undefined;
  from?: string | undefined;
  to?: string | undefined;
}): SQL | undefined =>
  and(
    input.plotId ? eq(result.plotId, input.plotId) : undefined,
    input.analyte ? eq(result.analyte, input.analyte) : undefined,
    input.from ? gte(result.takenOn, input.from) : undefined,
    input.to ? lte(result.takenOn, input.to) : undefined,
  );

/** Live results, newest first. */
export async function loadResults(tx: Transaction, siteId: SiteId, only?: SQL): Promise<Result[]> {
  const rows = await tx
    .select({ result, composite: sample.composite, laboratoryName: laboratory.name, reason: replaced.supersededReason })
    .from(result)
    .innerJoin(sample, and(eq(sample.siteId, siteId), eq(sample.id, result.sampleId)))
    .leftJoin(laboratory, and(eq(laboratory.siteId, siteId), eq(laboratory.id, result.laboratoryId)))
    .leftJoin(replaced, and(eq(replaced.siteId, siteId), eq(replaced.id, result.supersedesId)))
    .where(and(eq(result.siteId, siteId), isNull(result.supersededAt), only))
    .orderBy(desc(result.takenOn), asc(result.plotId), asc(result.analyte), asc(result.analysis), asc(result.id))
    .limit(MOST + 1);
  if (rows.length > MOST) {
    throw new Problem('too-large', `These are more than ${MOST} results. Ask for one plot, one analyte or some years.`);
  }
  const names = await namesOf(
    tx,
    rows.map((row) => row.result.confirmedBy),
  );
  return rows.map(({ result: row, composite, laboratoryName, reason }) => ({
    id: row.id,
    sampleId: row.sampleId,
    reportId: row.reportId,
    analysis: row.analysis,
    composite,
    plotId: row.plotId,
    takenOn: row.takenOn,
    depthFromCm: row.depthFromCm,
    depthToCm: row.depthToCm,
    laboratory: row.laboratoryId && laboratoryName ? { id: row.laboratoryId, name: laboratoryName } : null,
    analyte: row.analyte,
    method: row.method,
    form: row.form,
    unit: row.unit,
    unitBasis: row.unitBasis,
    value: row.value,
    valueSi: row.valueSi,
    qualifier: row.qualifier,
    printed: row.printed,
    unitPrinted: row.unitPrinted,
    confirmedBy: names.get(row.confirmedBy) ?? null,
    confirmedAt: row.confirmedAt.toISOString(),
    supersedesId: row.supersedesId,
    correctionReason: reason,
  }));
}
