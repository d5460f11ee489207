import { and, desc, eq, exists, isNull } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { application, effectCheck, planIntent, plot } from '@/db/schema';
import { VERDICTS } from '@/lib/domain/effects';
import type { SiteId } from '@/lib/domain/ids';
import type { TodayVerdict } from '@/lib/schemas/today';

const SHOWN = 3;
const verdictSchema = z.enum(VERDICTS);
const outcomeSchema = z.object({
  sentences: z.array(z.string()).min(1),
  settle: z.array(z.object({ text: z.string() })),
});

/**
 * The verdicts that changed last, as they were kept. Only the latest word on an intention counts: a verdict that was
 * taken back since (a result withdrawn, say) is not news any more, nor is one on a record that was removed.
 */
export async function newestVerdicts(tx: Transaction, siteId: SiteId): Promise<TodayVerdict[]> {
  const latest = tx
    .selectDistinctOn([effectCheck.planIntentId])
    .from(effectCheck)
    .where(eq(effectCheck.siteId, siteId))
    .orderBy(effectCheck.planIntentId, desc(effectCheck.computedAt))
    .as('latest');
  const stillSpread = tx
    .select({ id: application.id })
    .from(application)
    .where(
      and(eq(application.siteId, siteId), eq(application.planId, planIntent.planId), isNull(application.supersededAt)),
    );
  const rows = await tx
    .select({
      id: latest.id,
      plotId: latest.plotId,
      plotName: plot.name,
      verdict: latest.verdict,
      outcome: latest.outcome,
      computedAt: latest.computedAt,
    })
    .from(latest)
    .innerJoin(plot, and(eq(plot.siteId, siteId), eq(plot.id, latest.plotId), isNull(plot.archivedAt)))
    .innerJoin(planIntent, and(eq(planIntent.siteId, siteId), eq(planIntent.id, latest.planIntentId)))
    .where(exists(stillSpread))
    .orderBy(desc(latest.computedAt));
  const shown: TodayVerdict[] = [];
  for (const { verdict, outcome, computedAt, ...row } of rows) {
    const word = verdictSchema.safeParse(verdict);
    const said = outcomeSchema.safeParse(outcome);
    if (!word.success || !said.success) continue;
    shown.push({
      ...row,
      verdict: word.data,
      sentence: said.data.sentences[0] ?? '',
      settledBy: said.data.settle[0]?.text ?? null,
      computedAt: computedAt.toISOString(),
    });
    if (shown.length === SHOWN) break;
  }
  return shown;
}
