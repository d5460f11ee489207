import { and, eq, inArray, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { result, sample } from '@/db/schema';
import { isAnalyteKey } from '@/lib/domain/analytes';
import { asDay } from '@/lib/domain/days';
import type { DuplicatePair, TestPoint } from '@/lib/domain/effects';
import { asLaboratoryId, asPlotId, asResultId, type SiteId } from '@/lib/domain/ids';

type Row = typeof result.$inferSelect & { cores: number | null; composite: number };

const QUALIFIED = { '=': 'exact', '<': 'below', '>': 'above', trace: 'below-unknown', nd: 'below-unknown' } as const;

/** 0.1 for "6.4", 1 for "52"; null where the cell holds no plain number. */
function printedStep(printed: string): number | null {
  const match = /\d(?:[.,](\d+))?/.exec(printed.trim());
  return match ? 10 ** -(match[1]?.length ?? 0) : null;
}

function pointOf(row: Row): TestPoint | null {
  const amount = row.valueSi ?? row.value;
  if (!isAnalyteKey(row.analyte)) return null;
  const qualifier = QUALIFIED[row.qualifier];
  if (amount === null && qualifier !== 'below-unknown') return null;
  const inMassUnits = row.valueSi !== null && row.unitBasis === 'mass';
  return {
    resultId: asResultId(row.id),
    plotId: asPlotId(row.plotId),
    analyte: row.analyte,
    day: asDay(row.takenOn),
    value: Number(amount ?? 0),
    unit: inMassUnits ? 'mg/kg' : (row.unit ?? ''),
    qualifier: qualifier === 'below' && Number(amount) === 0 ? 'below-unknown' : qualifier,
    reportingLimit: row.qualifier === '<' && row.value !== null ? Number(row.value) : null,
    method: row.method,
    testName: row.method === null ? row.analyte : null,
    laboratoryId: row.laboratoryId === null ? null : asLaboratoryId(row.laboratoryId),
    depthCm:
      row.depthFromCm === null || row.depthToCm === null
        ? null
        : { from: Number(row.depthFromCm), to: Number(row.depthToCm) },
    basis: row.unitBasis,
    form: row.form,
    printedStep: printedStep(row.printed),
    cores: row.cores,
    labDuplicates: 1,
    composites: 1,
    confirmed: true,
  };
}

const mean = (numbers: readonly number[]) => numbers.reduce((sum, number) => sum + number, 0) / numbers.length;

/** Averages numbers of equal standing; anything below or above a limit is left as the first one. */
function averaged(points: readonly TestPoint[], over: Partial<TestPoint>): TestPoint {
  const first = points[0];
  if (!first) throw new Error('Nothing to average.');
  const exact = points.every((point) => point.qualifier === 'exact');
  return { ...first, ...(exact ? { value: mean(points.map((point) => point.value)) } : {}), ...over };
}

function groupedBy<T>(items: readonly T[], keyOf: (item: T) => string): T[][] {
  const groups = new Map<string, T[]>();
  for (const item of items) {
    const key = keyOf(item);
    const group = groups.get(key);
    if (group) group.push(item);
    else groups.set(key, [item]);
  }
  return [...groups.values()];
}

export type SiteReadings = {
  /** One point a plot, day, analyte, method, form and basis: bags and analyses of it averaged. */
  points: TestPoint[];
  /** What the paper says, by the id a point carries. */
  papers: Map<string, { printed: string; reportId: string }>;
  labDuplicates: DuplicatePair[];
  fieldDuplicates: DuplicatePair[];
};

const alike = (row: Row) => [row.plotId, row.takenOn, row.analyte, row.method, row.form, row.unitBasis].join('|');

function foldTest(rows: readonly Row[], readings: SiteReadings): void {
  const bags: TestPoint[] = [];
  for (const bag of groupedBy(rows, (row) => row.sampleId)) {
    const analyses = bag.map(pointOf).filter((point) => point !== null);
    const [first, second] = analyses;
    if (!first) continue;
    if (second) readings.labDuplicates.push({ first, second });
    bags.push(averaged(analyses, { labDuplicates: analyses.length }));
  }
  const [first, second] = bags;
  if (!first) return;
  if (second) readings.fieldDuplicates.push({ first, second });
  readings.points.push(averaged(bags, { composites: bags.length }));
}

/** Live results of the site (or of some plots), as the statistics take them. */
export async function loadReadings(
  tx: Transaction,
  siteId: SiteId,
  only: { analytes?: readonly string[]; plotIds?: readonly string[] } = {},
): Promise<SiteReadings> {
  const rows = await tx
    .select({ result, cores: sample.cores, composite: sample.composite })
    .from(result)
    .innerJoin(sample, and(eq(sample.siteId, siteId), eq(sample.id, result.sampleId)))
    .where(
      and(
        eq(result.siteId, siteId),
        isNull(result.supersededAt),
        only.plotIds ? inArray(result.plotId, [...only.plotIds]) : undefined,
        only.analytes ? inArray(result.analyte, [...only.analytes]) : undefined,
      ),
    )
    .orderBy(result.takenOn, sample.composite, result.analysis);
  const flat: Row[] = rows.map((row) => ({ ...row.result, cores: row.cores, composite: row.composite }));
  const readings: SiteReadings = { points: [], papers: new Map(), labDuplicates: [], fieldDuplicates: [] };
  for (const row of flat) readings.papers.set(row.id, { printed: row.printed, reportId: row.reportId });
  for (const test of groupedBy(flat, alike)) foldTest(test, readings);
  readings.points.sort((a, b) => (a.day < b.day ? -1 : a.day > b.day ? 1 : 0));
  return readings;
}
