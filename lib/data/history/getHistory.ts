import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { application, laboratory } from '@/db/schema';
import { ANALYTES, type AnalyteKey, analyte, isMethodKey, methodLabel } from '@/lib/domain/analytes';
import { asDay } from '@/lib/domain/days';
import { type DriftView, driftOf } from '@/lib/domain/drift';
import type { SiteNoise, TestPoint } from '@/lib/domain/effects';
import { centimetres, formatArea, formatDepth, squareMetres } from '@/lib/domain/units';
import type { ApplicationAnswer } from '@/lib/schemas/applications';
import type { SeriesAnswer } from '@/lib/schemas/history';
import { idSchema } from '@/lib/schemas/parts';
import { loadApplications } from '../applications/loadApplications';
import type { SignedIn } from '../context';
import { dayOf } from '../days';
import { getPlotInSite } from '../plots/getPlotInSite';
import { siteVerb } from '../verb';
import { type Band, bandsOf } from './bands';
import { loadReadings, type SiteReadings } from './points';

type Sources = {
  readings: SiteReadings;
  applications: readonly ApplicationAnswer[];
  bands: readonly Band[];
  laboratories: ReadonlyMap<string, string>;
  hardWaterOrFreeLime: boolean;
  units: SignedIn['units'];
};

const preferOf = (units: SignedIn['units']) => (units === 'us' ? 'customary' : 'metric');

function driftIn(key: AnalyteKey, tests: readonly TestPoint[], sources: Sources, band: Band | undefined): DriftView {
  const ofKey = (pair: { first: TestPoint }) => pair.first.analyte === key;
  const noise: SiteNoise = {
    labDuplicates: sources.readings.labDuplicates.filter(ofKey),
    fieldDuplicates: sources.readings.fieldDuplicates.filter(ofKey),
    untreatedSteps: [],
  };
  const acting = sources.applications.filter(
    (one) => one.material.affects.includes(key) || one.intents.some((intent) => intent.analyte === key),
  );
  return driftOf({
    analyte: key,
    tests,
    applications: acting.map((one) => ({ day: asDay(one.appliedOn), label: one.material.name })),
    noise,
    ...(band
      ? {
          target: {
            ...(band.low === null ? {} : { low: band.low }),
            ...(band.high === null ? {} : { high: band.high }),
          },
        }
      : {}),
    hardWaterOrFreeLime: sources.hardWaterOrFreeLime,
  });
}

function seriesOf(key: AnalyteKey, sources: Sources): SeriesAnswer {
  const about = analyte(key);
  const tests = sources.readings.points.filter((point) => point.analyte === key);
  const unit = tests.at(-1)?.unit ?? '';
  const band = sources.bands.find(
    (one) => one.analyte === key && (one.unit === null || one.unit === unit || about.unit === 'pH'),
  );
  const view = driftIn(key, tests, sources, band);
  const shownUnit = about.unit === 'pH' ? '' : unit;
  return {
    analyte: key,
    label: about.label,
    unit: shownUnit,
    isPh: about.unit === 'pH',
    decimals: about.decimals,
    points: view.points.map(({ test, range }) => {
      const paper = sources.readings.papers.get(test.resultId);
      const alone = test.composites === 1 && test.labDuplicates === 1;
      const stop = view.breaks.find((one) => one.after.resultId === test.resultId);
      return {
        id: test.resultId as string,
        takenOn: test.day as string,
        value: test.value,
        unit: test.unit,
        printed: alone && paper ? paper.printed : test.value.toFixed(about.decimals),
        qualifier: test.qualifier === 'exact' ? 'exact' : test.qualifier === 'above' ? 'above' : 'below',
        low: range?.low ?? null,
        high: range?.high ?? null,
        method:
          test.method && isMethodKey(test.method) ? methodLabel(test.method) : (test.method ?? 'method not stated'),
        laboratory: sources.laboratories.get(test.laboratoryId ?? '') ?? 'laboratory not stated',
        depth: test.depthCm
          ? formatDepth(centimetres(test.depthCm.from), centimetres(test.depthCm.to), preferOf(sources.units))
          : 'depth not stated',
        breakBefore: stop?.sentence ?? null,
        reportId: paper?.reportId ?? null,
      };
    }),
    band: band ? { low: band.low, high: band.high, label: bandLabel(band), source: band.source } : null,
    trend: [view.trend.sentence, ...(view.trend.ok ? [view.forecast.sentence] : [])],
  };
}

function bandLabel(band: Band): string {
  if (band.low === null) return `up to ${band.high ?? ''}, ${band.label}`;
  return band.high === null ? `from ${band.low}, ${band.label}` : `${band.low} to ${band.high}, ${band.label}`;
}

/** Every analyte of one plot over the years: points with their 95 % range, bands, breaks with reasons, what was spread. */
export const getHistory = siteVerb({
  act: 'site.read',
  input: z.strictObject({ plotId: idSchema }),
  run: async ({ ctx, tx, siteId, person, input }) => {
    const plotRow = await getPlotInSite(tx, siteId, input.plotId);
    const today = dayOf(ctx.now, person.timeZone);
    const laboratories = await tx.select().from(laboratory).where(eq(laboratory.siteId, siteId));
    const sources: Sources = {
      readings: await loadReadings(tx, siteId, { plotIds: [plotRow.id] }),
      applications: await loadApplications(tx, siteId, person.id, eq(application.plotId, plotRow.id)),
      bands: await bandsOf(tx, siteId, plotRow, today),
      laboratories: new Map(laboratories.map((row) => [row.id, row.name])),
      hardWaterOrFreeLime: plotRow.freeLimeSeen,
      units: person.units,
    };
    const measured = new Set(sources.readings.points.map((point) => point.analyte));
    return {
      today: today as string,
      plot: { id: plotRow.id, name: plotRow.name },
      series: ANALYTES.filter(({ key }) => measured.has(key)).map(({ key }) => seriesOf(key, sources)),
      amendments: sources.applications.map((one) => ({
        id: one.id,
        on: one.appliedOn,
        label: `${one.material.name}, ${one.amountPrinted}`,
        detail: `${one.amountPrinted} over ${formatArea(squareMetres(one.areaM2), preferOf(person.units))}`,
      })),
    };
  },
});
