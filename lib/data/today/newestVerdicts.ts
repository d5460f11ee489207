import { and, desc, eq, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { effectCheck, plot } from '@/db/schema';
import { checkEffect } from '@/lib/domain/effects';
import type { SiteId } from '@/lib/domain/ids';
import type { TodayVerdict } from '@/lib/schemas/today';
import { effectQuestions } from '../effects/assemble';
import { loadPicture } from '../effects/loadPicture';

const SHOWN = 3;

/** When each kept verdict last changed, by the intention it answers. */
async function keptSince(tx: Transaction, siteId: SiteId): Promise<Map<string, Date>> {
  const rows = await tx
    .selectDistinctOn([effectCheck.planIntentId], { intentId: effectCheck.planIntentId, at: effectCheck.computedAt })
    .from(effectCheck)
    .where(eq(effectCheck.siteId, siteId))
    .orderBy(effectCheck.planIntentId, desc(effectCheck.computedAt));
  return new Map(rows.map((row) => [row.intentId, row.at]));
}

/**
 * The verdicts that changed last. Word and sentence are computed now, as on the effects page, so that both always say
 * the same; only the order comes from what was kept.
 */
export async function newestVerdicts(tx: Transaction, siteId: SiteId, now: Date): Promise<TodayVerdict[]> {
  const since = await keptSince(tx, siteId);
  if (since.size === 0) return [];
  const picture = await loadPicture(tx, siteId, now);
  const open = await tx
    .select({ id: plot.id })
    .from(plot)
    .where(and(eq(plot.siteId, siteId), isNull(plot.archivedAt)));
  const isOpen = new Set(open.map((row) => row.id));
  const verdicts: TodayVerdict[] = [];
  for (const { id } of picture.plots) {
    if (!isOpen.has(id)) continue;
    for (const { input, intentIds } of effectQuestions(picture, id)) {
      const outcome = checkEffect(input);
      const [intentId] = intentIds;
      if (!outcome.ok || !intentId) continue;
      verdicts.push({
        id: intentId,
        plotId: id,
        plotName: input.plotName,
        verdict: outcome.verdict,
        sentence: outcome.sentences[0] ?? '',
        settledBy: outcome.settle[0]?.text ?? null,
        computedAt: (since.get(intentId) ?? now).toISOString(),
      });
    }
  }
  return verdicts.sort((a, b) => b.computedAt.localeCompare(a.computedAt)).slice(0, SHOWN);
}
