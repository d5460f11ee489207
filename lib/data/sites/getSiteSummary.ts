import { and, count, eq, isNull } from 'drizzle-orm';
import { plot, report, site } from '@/db/schema';
import { notFound } from '@/lib/errors';
import { nothingSchema } from '@/lib/schemas/parts';
import type { SiteSummary } from '@/lib/schemas/sites';
import { siteVerb } from '../verb';

export const getSiteSummary = siteVerb({
  act: 'site.read',
  input: nothingSchema,
  run: async ({ tx, siteId, role }): Promise<SiteSummary> => {
    const [row] = await tx.select({ id: site.id, name: site.name }).from(site).where(eq(site.id, siteId));
    if (!row) throw notFound();
    const [plots] = await tx
      .select({ n: count() })
      .from(plot)
      .where(and(eq(plot.siteId, siteId), isNull(plot.archivedAt)));
    const [waiting] = await tx
      .select({ n: count() })
      .from(report)
      .where(and(eq(report.siteId, siteId), eq(report.state, 'in-review')));
    return { id: row.id, name: row.name, role, plots: plots?.n ?? 0, inReview: waiting?.n ?? 0 };
  },
});
