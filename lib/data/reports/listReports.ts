import { and, eq, exists, or } from 'drizzle-orm';
import { report, reportSample } from '@/db/schema';
import { listReportsInput, type ReportList } from '@/lib/schemas/reports';
import { siteVerb } from '../verb';
import { loadReports } from './loadReports';

export const listReports = siteVerb({
  act: 'site.read',
  input: listReportsInput,
  run: async ({ ctx, tx, siteId, input }): Promise<ReportList> => {
    const { state, plotId } = input;
    const onPlot = plotId
      ? or(
          eq(report.droppedOnPlotId, plotId),
          exists(
            tx
              .select({ id: reportSample.id })
              .from(reportSample)
              .where(
                and(
                  eq(reportSample.siteId, siteId),
                  eq(reportSample.reportId, report.id),
                  eq(reportSample.plotId, plotId),
                ),
              ),
          ),
        )
      : undefined;
    return {
      reports: await loadReports(tx, siteId, ctx.now, and(state ? eq(report.state, state) : undefined, onPlot)),
    };
  },
});
