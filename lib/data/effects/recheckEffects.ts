import { and, desc, eq } from 'drizzle-orm';
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

async function keepIfChanged(tx: Transaction, ctx: Ctx, siteId: SiteId, question: EffectQuestion): Promise<boolean> {
  const [planIntentId] = question.intentIds;
  if (!planIntentId) return false;
  const outcome = checkEffect(question.input);
  const [last] = await tx
    .select({ verdict: effectCheck.verdict, ruleVersion: effectCheck.ruleVersion })
    .from(effectCheck)
    .where(and(eq(effectCheck.siteId, siteId), eq(effectCheck.planIntentId, planIntentId)))
    .orderBy(desc(effectCheck.computedAt))
    .limit(1);
  if (last?.verdict === answerOf(outcome) && last.ruleVersion === outcome.ruleVersion) return false;
  await tx.insert(effectCheck).values({
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
  });
  return true;
}

/** Keeps the history of verdicts. One plot's new result can serve another as a control, so the whole site is looked at. */
export const recheckEffects = workerVerb({
  input: z.strictObject({ siteId: idSchema, id: idSchema }),
  run: ({ ctx, input }) => {
    const siteId = asSiteId(input.siteId);
    return withSite(siteId, async (tx) => {
      // One recheck of a site at a time: two that look at once would both find the verdict new.
      await tx.select({ id: site.id }).from(site).where(eq(site.id, siteId)).for('update');
      const picture = await loadPicture(tx, siteId, ctx.now);
      if (!picture.plots.some((plot) => plot.id === input.id)) return { changed: 0 };
      let changed = 0;
      for (const plot of picture.plots) {
        for (const question of effectQuestions(picture, plot.id)) {
          if (await keepIfChanged(tx, ctx, siteId, question)) changed += 1;
        }
      }
      return { changed };
    });
  },
});
