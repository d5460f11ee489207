import { and, desc, eq, isNotNull, isNull, ne } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { plot, report, reportSample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';

type Named = { printedName: string | null; fieldName: string | null };

/** Case, accents and marks are the laboratory's habit, not the grower's name. */
export const plainName = (text: string | null): string =>
  (text ?? '')
    .normalize('NFKD')
    .toLowerCase()
    .replace(/\p{M}/gu, '')
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();

const namesOf = (sample: Named) =>
  [plainName(sample.fieldName), plainName(sample.printedName)].filter((name) => name !== '');

/** The one plot whose name stands in the text as whole words; of two, the longer; a draw is no answer. */
function containedPlot(name: string, plots: readonly { id: string; name: string }[]): string | null {
  const inside = plots
    .map((one) => ({ id: one.id, name: plainName(one.name) }))
    .filter((one) => one.name.length >= 3 && ` ${name} `.includes(` ${one.name} `))
    .sort((a, b) => b.name.length - a.name.length);
  const [best, next] = inside;
  return best && best.name.length !== next?.name.length ? best.id : null;
}

type Known = { plots: readonly { id: string; name: string }[]; earlier: ReadonlyMap<string, string> };
type Proposal = { plotId: string; because: 'same-name' | 'confirmed-before' | 'name-inside' };

/** The plot that would fit a sample, and why: its own name first, then what was confirmed before, then a name inside the text. */
export function proposePlot(sample: Named, known: Known): Proposal | null {
  const names = namesOf(sample);
  for (const name of names) {
    const exact = known.plots.filter((one) => plainName(one.name) === name);
    if (exact.length === 1 && exact[0]) return { plotId: exact[0].id, because: 'same-name' };
  }
  for (const name of names) {
    const before = known.earlier.get(name);
    if (before) return { plotId: before, because: 'confirmed-before' };
  }
  for (const name of names) {
    const inside = containedPlot(name, known.plots);
    if (inside) return { plotId: inside, because: 'name-inside' };
  }
  return null;
}

export const suggestPlot = (sample: Named, known: Known): string | null => proposePlot(sample, known)?.plotId ?? null;

/** Live plots, and where samples of a printed name were put before in other reports (the newest decision counts). */
export async function loadKnownNames(tx: Transaction, siteId: SiteId, reportId: string | null) {
  const plots = await tx
    .select({ id: plot.id, name: plot.name })
    .from(plot)
    .where(and(eq(plot.siteId, siteId), isNull(plot.archivedAt)));
  const live = new Set(plots.map((one) => one.id));
  const rows = await tx
    .select({
      printedName: reportSample.printedName,
      fieldName: reportSample.fieldName,
      plotId: reportSample.plotId,
    })
    .from(reportSample)
    .innerJoin(report, and(eq(report.siteId, siteId), eq(report.id, reportSample.reportId)))
    .where(
      and(
        eq(reportSample.siteId, siteId),
        reportId === null ? undefined : ne(reportSample.reportId, reportId),
        eq(report.state, 'confirmed'),
        isNotNull(reportSample.plotId),
        isNull(reportSample.leftOutReason),
      ),
    )
    .orderBy(desc(report.confirmedAt))
    .limit(2000);
  const earlier = new Map<string, string>();
  for (const row of rows) {
    for (const name of namesOf(row))
      if (row.plotId && live.has(row.plotId) && !earlier.has(name)) earlier.set(name, row.plotId);
  }
  return { plots, earlier };
}
