import type { Plot } from '@/lib/schemas/plots';
import type { Report } from '@/lib/schemas/reports';
import { isUnderWay, shareOf, shortText, type UploadItem } from '@/lib/ui/files/upload-item';
import type { PlanPlot, PlanUpload } from '@/lib/ui/site-plan/types';

export const ON_THEIR_WAY = 'on-their-way';

/** What the plan and its list show of each plot: the plot itself, reports to review, files on their way to it. */
export function planPlots(
  siteId: string,
  plots: readonly Plot[],
  inReview: readonly Report[],
  uploads: readonly UploadItem[],
): PlanPlot[] {
  return plots.map((plot) => {
    const waiting = inReview.filter((report) => isAbout(report, plot.id));
    const href =
      waiting.length === 1 && waiting[0] ? `/sites/${siteId}/reports/${waiting[0].id}` : `/sites/${siteId}/reports`;
    const own = uploads
      .filter((item) => item.plotId === plot.id && !standsBelow(item, waiting))
      .map((item) => planUpload(siteId, item));
    return {
      id: plot.id,
      name: plot.name,
      outline: plot.outline,
      ...(plot.areaTypedM2 === null ? {} : { typedAreaM2: plot.areaTypedM2 }),
      ...(plot.lastTest === null ? {} : { lastTest: lastTest(plot.lastTest) }),
      ...(plot.planting === null ? {} : { crop: plot.planting.crop }),
      ...(waiting.length === 0 ? {} : { waiting: { count: waiting.length, href } }),
      ...(own.length === 0 ? {} : { uploads: own }),
    };
  });
}

/** A report is about the plots its samples are assigned to; before anything is assigned, about the plot it was let go over. */
export function isAbout(report: Pick<Report, 'samples' | 'droppedOnPlotId'>, plotId: string): boolean {
  return report.samples.plotIds.length > 0
    ? report.samples.plotIds.includes(plotId)
    : report.droppedOnPlotId === plotId;
}

/** Once a file stands among the reports to review, saying so twice helps nobody. */
const standsBelow = ({ stage }: UploadItem, waiting: readonly Report[]): boolean =>
  stage.kind === 'settled' && waiting.some((report) => report.id === stage.reportId);

function lastTest({ takenOn, ph }: NonNullable<Plot['lastTest']>): NonNullable<PlanPlot['lastTest']> {
  return ph === null ? { date: takenOn, ph: null } : { date: takenOn, ph: ph.printed, phDate: ph.takenOn };
}

function planUpload(siteId: string, item: UploadItem): PlanUpload {
  const { stage } = item;
  const settled = stage.kind === 'settled';
  const asks = !isUnderWay(item) && (stage.kind === 'seen-before' || stage.kind === 'refused');
  return {
    fileName: item.file.name,
    text: shortText(item),
    share: shareOf(item),
    ...(settled
      ? {
          link: {
            href: `/sites/${siteId}/reports/${stage.reportId}`,
            label: stage.report.state === 'in-review' ? 'Review' : 'Open',
          },
        }
      : {}),
    ...(asks ? { link: { href: `#${ON_THEIR_WAY}`, label: 'What now?' } } : {}),
  };
}
