import { eq } from 'drizzle-orm';
import { report } from '@/db/schema';
import { notFound } from '@/lib/errors';
import { type Report, reportInput } from '@/lib/schemas/reports';
import { siteVerb } from '../verb';
import { loadReports } from './loadReports';

/** State and progress of one report; screens ask for it again while it is being read. */
export const getReport = siteVerb({
  act: 'site.read',
  input: reportInput,
  run: async ({ ctx, tx, siteId, input }): Promise<Report> => {
    const [found] = await loadReports(tx, siteId, ctx.now, eq(report.id, input.reportId));
    if (!found) throw notFound();
    return found;
  },
});
