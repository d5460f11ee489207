import { eq } from 'drizzle-orm';
import { laboratory, plot } from '@/db/schema';
import { analyte, isAnalyteKey, isMethodKey, methodLabel } from '@/lib/domain/analytes';
import { readingRange } from '@/lib/domain/drift';
import { compareTests, type TestPoint } from '@/lib/domain/effects';
import { notFound, Problem } from '@/lib/errors';
import { compareInput } from '@/lib/schemas/effects';
import { siteVerb } from '../verb';
import { loadReadings } from './points';

/** Any two tests of one analyte on this site: same plot or another, with what makes the interval wider said in words. */
export const compareResults = siteVerb({
  act: 'site.read',
  input: compareInput,
  run: async ({ tx, siteId, input }) => {
    if (!isAnalyteKey(input.analyte)) throw new Problem('invalid', 'This is not an analyte Loamline knows.');
    const about = analyte(input.analyte);
    const readings = await loadReadings(tx, siteId, { analytes: [input.analyte] });
    const of = (id: string): TestPoint => {
      const point = readings.points.find((one) => one.resultId === id);
      if (!point) throw notFound();
      return point;
    };
    const [a, b] = [of(input.a), of(input.b)];
    const noise = {
      labDuplicates: readings.labDuplicates,
      fieldDuplicates: readings.fieldDuplicates,
      untreatedSteps: [],
    };
    const plots = await tx.select({ id: plot.id, name: plot.name }).from(plot).where(eq(plot.siteId, siteId));
    const laboratories = await tx.select().from(laboratory).where(eq(laboratory.siteId, siteId));
    const shown = (point: TestPoint) => {
      const range = readingRange(point, noise);
      return {
        resultId: point.resultId as string,
        plotId: point.plotId as string,
        plotName: plots.find((row) => row.id === point.plotId)?.name ?? '',
        takenOn: point.day as string,
        value: point.value,
        unit: point.unit,
        qualifier: point.qualifier,
        method: point.method && isMethodKey(point.method) ? methodLabel(point.method) : point.method,
        laboratory: laboratories.find((row) => row.id === point.laboratoryId)?.name ?? null,
        low: range?.low ?? null,
        high: range?.high ?? null,
      };
    };
    return {
      analyte: input.analyte,
      analyteLabel: about.label,
      decimals: about.decimals,
      a: shown(a),
      b: shown(b),
      outcome: compareTests({ a, b, noise }),
    };
  },
});
