import { Problem } from '@/lib/errors';
import { confirmInput } from '@/lib/schemas/review';
import { learnFromReport } from '../learning/learnFromReport';
import { lockPlots } from '../plots/lockPlots';
import { refreshReminders } from '../reminders/refreshReminders';
import { holdReportsOf } from '../reports/holdReportsOf';
import { moveReport } from '../reports/moveReport';
import { blockersOf } from '../review/blockers';
import { loadOtherForms } from '../review/loadOtherForms';
import { loadReview } from '../review/loadReview';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { writeResults } from './writeResults';

export type Confirmed = { reportId: string; state: 'confirmed'; results: number; plotIds: string[] };

/**
 * in-review -> confirmed, with all its results or not at all. The state moves first: of two people one wins and the
 * other waits and is told. The plots are held before other forms are looked for, so that a page and its data file,
 * confirmed at the same moment, cannot both count.
 */
export const confirmReport = siteVerb({
  act: 'reading.decide',
  input: confirmInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<Confirmed> => {
    const { reportId, separateAnalyses } = input;
    const row = await moveReport(tx, siteId, reportId, ['in-review'], {
      state: 'confirmed',
      confirmedBy: person.id,
      confirmedAt: ctx.now,
      withdrawnReason: null,
    });
    const { samples, rows } = await loadReview(tx, siteId, reportId);
    const counted = samples.filter((sample) => sample.leftOutReason === null);
    const plotIds = [...new Set(counted.flatMap((sample) => (sample.plotId === null ? [] : [sample.plotId])))];
    const leansOn = counted.flatMap((sample) => (sample.sameAsId === null ? [] : [sample.sameAsId]));
    await holdReportsOf(tx, siteId, leansOn);
    await lockPlots(tx, siteId, plotIds);
    const forms = await loadOtherForms(tx, siteId, row, samples, rows);
    const blockers = blockersOf({ samples, rows, forms, separateAnalyses });
    const [first] = blockers;
    if (first) {
      const more = blockers.length > 1 ? ` And ${blockers.length - 1} more to settle.` : '';
      throw new Problem('conflict', `Not confirmed yet. ${first.sentence}${more}`, {
        reason: 'blocked',
        current: { blockers },
      });
    }
    const results = await writeResults({ tx, ctx, siteId, person, report: row, samples: counted, rows });
    await learnFromReport({ tx, ctx, siteId, person, report: row, samples: counted, rows });
    await audit({
      act: 'report.confirm',
      objectKind: 'report',
      objectId: reportId,
      detail: { results, plotIds, separateAnalyses },
    });
    await enqueue(tx, 'recheck-reviews', { siteId, id: reportId });
    for (const plotId of plotIds) await refreshReminders(tx, ctx, siteId, plotId);
    // One is enough: the recheck looks at the whole site, since a plot can serve another as its control.
    const [anyPlot] = plotIds;
    if (anyPlot) await enqueue(tx, 'recheck-effects', { siteId, id: anyPlot });
    return { reportId, state: 'confirmed', results, plotIds };
  },
});
