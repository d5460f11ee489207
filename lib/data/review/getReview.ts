import { and, asc, eq } from 'drizzle-orm';
import { recommendation, report } from '@/db/schema';
import { notFound } from '@/lib/errors';
import { reportInput } from '@/lib/schemas/reports';
import type { Review } from '@/lib/schemas/review';
import { loadLaboratories } from '../laboratories/loadLaboratories';
import { namesOf } from '../people/names';
import { loadPlots } from '../plots/loadPlots';
import { yearOf } from '../plots/plotNow';
import { loadReports } from '../reports/loadReports';
import { siteVerb } from '../verb';
import { blockersOf } from './blockers';
import { loadOtherForms } from './loadOtherForms';
import { loadReview } from './loadReview';
import { inReviewOrder, toReviewRow } from './reviewRow';
import { toSample } from './sampleStore';

/** All that the review screen shows, in one answer. */
export const getReview = siteVerb({
  act: 'reading.work',
  input: reportInput,
  run: async ({ ctx, tx, siteId, person, input }): Promise<Review> => {
    const [about] = await loadReports(tx, siteId, ctx.now, eq(report.id, input.reportId));
    if (!about) throw notFound();
    const { samples, rows } = await loadReview(tx, siteId, about.id);
    const forms = await loadOtherForms(
      tx,
      siteId,
      { id: about.id, laboratoryId: about.laboratory?.id ?? null },
      samples,
      rows,
    );
    const advice = await tx
      .select()
      .from(recommendation)
      .where(and(eq(recommendation.siteId, siteId), eq(recommendation.reportId, about.id)))
      .orderBy(asc(recommendation.page), asc(recommendation.item), asc(recommendation.id));
    const names = await namesOf(
      tx,
      rows.flatMap((row) => (row.editedBy === null ? [] : [row.editedBy])),
    );
    return {
      report: about,
      samples: samples.map((sample) => ({
        ...toSample(sample),
        sameAs: forms.get(sample.id)?.sameAs ?? null,
        candidates: forms.get(sample.id)?.candidates ?? [],
      })),
      rows: inReviewOrder(
        rows.map((row) => toReviewRow(row, names)),
        samples.map((sample) => sample.id),
      ),
      recommendations: advice.map(({ id, reportSampleId, item, amount, printed, unit, page, box }) => ({
        id,
        reportSampleId,
        item,
        amount,
        printed,
        unit,
        page,
        box,
      })),
      plots: await loadPlots(tx, siteId, yearOf(ctx, person), false),
      laboratories: await loadLaboratories(tx, siteId),
      blockers: about.state === 'in-review' ? blockersOf({ samples, rows, forms }) : [],
    };
  },
});
