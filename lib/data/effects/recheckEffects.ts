import { desc, eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { effectCheck, site } from '@/db/schema';
import { checkEffect, type EffectOutcome } from '@/lib/domain/effects';
import { asSiteId, type SiteId } from '@/lib/domain/ids';
import { idSchema } from '@/lib/schemas/parts';
import type { Ctx } from '../context';
import { withSite } from '../transaction';
import { workerVerb } from '../verb';
import { type EffectQuestion, effectQuestions } from './assemble';
import { loadPicture } from './loadPicture';

const answerOf = (outcome: EffectOutcome): string => (outcome.ok ? outcome.verdict : outcome.answer);

type Kept = { verdict: string; ruleVersion: string };

/** The last word on every intention of the site. */
async function lastWords(tx: Transaction, siteId: SiteId): Promise<Map<string, Kept>> {
  const rows = await tx
    .selectDistinctOn([effectCheck.planIntentId], {
      id: effectCheck.planIntentId,
      verdict: effectCheck.verdict,
      ruleVersion: effectCheck.ruleVersion,
    })
    .from(effectCheck)
    .where(eq(effectCheck.siteId, siteId))
    .orderBy(effectCheck.planIntentId, desc(effectCheck.computedAt));
  return new Map(rows.map((row) => [row.id, row]));
}

function changedCheck(ctx: Ctx, siteId: SiteId, question: EffectQuestion, kept: ReadonlyMap<string, Kept>) {
  const [planIntentId] = question.intentIds;
  if (!planIntentId) return null;
  const outcome = checkEffect(question.input);
  const last = kept.get(planIntentId);
  if (last?.verdict === answerOf(outcome) && last.ruleVersion === outcome.ruleVersion) return null;
  return {
    siteId,
    plotId: question.input.plotId,
    planIntentId,
    inputs: {
      tests: question.input.tests.map((test) => test.resultId),
      controls: question.input.controls.map((control) => control.plotId),
      applications: question.input.intents.map((intent) => intent.applicationId),
    },
    outcome: { ...outcome },
    verdict: answerOf(outcome),
    ruleVersion: outcome.ruleVersion,
    computedAt: ctx.now,
  };
}

/** Keeps the history of verdicts. One plot's new result can serve another as a control, so the whole site is looked at. */
export const recheckEffects = workerVerb({
  input: z.strictObject({ siteId: idSchema, id: idSchema }),
  run: ({ ctx, input }) => {
    const siteId = asSiteId(input.siteId);
    return withSite(siteId, async (tx) => {
      // One recheck of a site at a time: two that look at once would both find the verdict new. The weaker lock lets
      // everybody else write meanwhile: a new row of the site only asks that the site stays.
      await tx.select({ id: site.id }).from(site).where(eq(site.id, siteId)).for('no key update');
      const picture = await loadPicture(tx, siteId, ctx.now);
      if (!picture.plots.some((plot) => plot.id === input.id)) return { changed: 0 };
      const kept = await lastWords(tx, siteId);
      const changed = picture.plots
        .flatMap((plot) => effectQuestions(picture, plot.id))
        .flatMap((question) => changedCheck(ctx, siteId, question, kept) ?? []);
      if (changed.length > 0) await tx.insert(effectCheck).values(changed);
      return { changed: changed.length };
    });
  },
});
