import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { report, reportSample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';
import type { AppliedMapping } from '@/lib/reading/ownSheet';
import type { OwnSheet } from '@/lib/schemas/ownSheets';
import type { Ctx } from '../context';
import { loadReports } from '../reports/loadReports';
import { loadKnownNames, suggestPlot } from '../reports/suggestPlots';
import { believableDay, centimetres } from '../reports/writeReadingRows';
import { faultsOf, nameOf, readMapped } from './readMapped';
import type { Mapped, SheetRow } from './sheetStore';

/** A screenful and more; the counts are of all. */
const SHOWN_SAMPLES = 60;
const SHOWN_PROBLEMS = 100;

type Known = Awaited<ReturnType<typeof loadKnownNames>>;

/** The plots chosen when this sheet was brought in before and taken back: nobody is asked twice. */
async function chosenBefore(tx: Transaction, siteId: SiteId, reportId: string): Promise<Map<string, string>> {
  const rows = await tx
    .select()
    .from(reportSample)
    .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, reportId)));
  return new Map(
    rows.flatMap(({ printedName: sampleId, fieldName, labNumber, plotId }) =>
      plotId === null ? [] : [[nameOf({ sampleId, fieldName, labNumber }), plotId] as const],
    ),
  );
}

function namesIn(
  applied: AppliedMapping,
  known: Known,
  before: ReadonlyMap<string, string>,
  ctx: Ctx,
): OwnSheet['names'] {
  const names = new Map<string, OwnSheet['names'][number]>();
  for (const sample of applied.reading.samples) {
    const name = nameOf(sample);
    const so = names.get(name);
    const withoutDay = believableDay(sample.dateSampled, ctx) === null ? 1 : 0;
    names.set(name, {
      name,
      samples: (so?.samples ?? 0) + 1,
      withoutDay: (so?.withoutDay ?? 0) + withoutDay,
      plotId: so
        ? so.plotId
        : (before.get(name) ?? suggestPlot({ printedName: sample.sampleId, fieldName: sample.fieldName }, known)),
    });
  }
  return [...names.values()];
}

/** All that the screen of a grower's own sheet shows. */
export async function sheetAnswer(
  tx: Transaction,
  ctx: Ctx,
  siteId: SiteId,
  row: SheetRow,
  mapped: Mapped,
): Promise<OwnSheet> {
  const [about] = await loadReports(tx, siteId, ctx.now, eq(report.id, row.reportId));
  if (!about) throw notFound();
  const applied = readMapped(row, mapped.mapping, about.fileName ?? '');
  const known = await loadKnownNames(tx, siteId, row.reportId);
  return {
    report: about,
    sheets: row.cells.map(({ number, name, rows }) => ({ number, name, rows: rows.length })),
    mapping: {
      ...mapped.mapping,
      columns: mapped.mapping.columns.map((column) => ({ ...column, examples: [...column.examples] })),
    } as OwnSheet['mapping'],
    rememberedOn: mapped.rememberedAt?.toISOString() ?? null,
    doubts: mapped.doubts.map(({ code, sentence }) => ({ code, sentence })),
    counts: applied.counts,
    samples: applied.reading.samples.slice(0, SHOWN_SAMPLES).map((sample) => {
      const faults = faultsOf(sample);
      return {
        name: nameOf(sample),
        takenOn: believableDay(sample.dateSampled, ctx),
        depthFromCm: centimetres(sample.depth, 'top'),
        depthToCm: centimetres(sample.depth, 'bottom'),
        results: sample.results.map(({ analyte, printed, unit, method, form }, at) => ({
          analyte,
          printed,
          unit,
          method,
          form,
          impossible: faults[at] ?? null,
        })),
      };
    }),
    problems: applied.problems.slice(0, SHOWN_PROBLEMS).map((problem) => ({ ...problem })),
    problemCount: applied.problems.length,
    names: namesIn(applied, known, await chosenBefore(tx, siteId, row.reportId), ctx),
    plots: known.plots.map(({ id, name }) => ({ id, name })),
  };
}
