import { and, desc, eq, inArray } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { effectCheck } from '@/db/schema';
import { analyte } from '@/lib/domain/analytes';
import { checkEffect } from '@/lib/domain/effects';
import type { SiteId } from '@/lib/domain/ids';
import type { EffectCheckAnswer } from '@/lib/schemas/effects';
import { idSchema } from '@/lib/schemas/parts';
import { siteVerb } from '../verb';
import { type EffectQuestion, effectQuestions, type SitePicture } from './assemble';
import { loadPicture } from './loadPicture';

function answerTo(picture: SitePicture, question: EffectQuestion): Omit<EffectCheckAnswer, 'earlier'> {
  const { input, intentIds } = question;
  const about = analyte(input.analyte);
  return {
    key: intentIds.join('+'),
    plotId: input.plotId,
    plotName: input.plotName,
    analyte: input.analyte,
    analyteLabel: about.label,
    decimals: about.decimals,
    applications: input.intents.map((intent) => ({
      id: intent.applicationId,
      material: intent.material,
      amountPrinted: picture.applications.find((one) => one.id === intent.applicationId)?.amountPrinted ?? '',
      appliedOn: intent.appliedOn,
      fullChange: intent.fullChange,
    })),
    outcome: checkEffect(input),
  };
}

async function earlierOf(tx: Transaction, siteId: SiteId, intentIds: readonly string[]) {
  if (intentIds.length === 0) return [];
  return tx
    .select({ intentId: effectCheck.planIntentId, verdict: effectCheck.verdict, computedAt: effectCheck.computedAt })
    .from(effectCheck)
    .where(and(eq(effectCheck.siteId, siteId), inArray(effectCheck.planIntentId, [...intentIds])))
    .orderBy(desc(effectCheck.computedAt));
}

/** Every effect check of one plot, or of the whole site, computed from what is confirmed now; newest application first. */
export const getEffects = siteVerb({
  act: 'site.read',
  input: z.strictObject({ plotId: idSchema.optional() }),
  run: async ({ ctx, tx, siteId, input }) => {
    const picture = await loadPicture(tx, siteId, ctx.now);
    const plots = picture.plots.filter((plot) => !input.plotId || plot.id === input.plotId);
    const questions = plots.flatMap((plot) => effectQuestions(picture, plot.id));
    const kept = await earlierOf(
      tx,
      siteId,
      questions.flatMap((question) => question.intentIds),
    );
    const checks = questions.map((question) => ({
      ...answerTo(picture, question),
      earlier: kept
        .filter((row) => row.intentId === question.intentIds[0])
        .slice(1)
        .map((row) => ({ verdict: row.verdict, computedAt: row.computedAt.toISOString() })),
    }));
    const latest = (check: EffectCheckAnswer) =>
      check.applications
        .map((one) => one.appliedOn)
        .sort()
        .at(-1) ?? '';
    checks.sort((a, b) => latest(b).localeCompare(latest(a)));
    return { today: picture.today as string, checks };
  },
});
