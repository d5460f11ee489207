'use client';

import Link from 'next/link';
import type { EffectCheckAnswer, EffectsAnswer } from '@/lib/schemas/effects';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { Stretch } from '@/lib/ui/frame/layers';
import { useApi } from '@/lib/ui/use-api';
import { RefusalBox } from '@/lib/ui/verdict/refusal-box';
import { VerdictLine } from '@/lib/ui/verdict/verdict-line';
import { checkLabel, refusalBoxProps, spreadWords, verdictProps } from './effect-props';

/** The verdicts of all plots, the newest application first; each leads to its plot, where the reasons are. */
export function SiteEffects({ siteId, first }: { siteId: string; first: EffectsAnswer }) {
  const { data = first, problem } = useApi<EffectsAnswer>(`/sites/${siteId}/effects`, { fallback: first });
  const judged = data.checks.filter((check) => check.outcome.ok);
  const open = data.checks.filter((check) => !check.outcome.ok);
  return (
    <>
      <Stretch>
        <div className="grid gap-6">
          <ProblemNotice problem={problem} />
          {data.checks.length === 0 ? (
            <EmptyState shape="list" title="No effect to check yet">
              Record what was spread on a plot and the change it was meant to make. Once its later test is confirmed,
              the verdict stands here: as intended, short of it, or what else the numbers allow to say.
            </EmptyState>
          ) : judged.length === 0 ? (
            <p>No verdict yet. What is open stands below, with what it waits for.</p>
          ) : (
            <Checks siteId={siteId} checks={judged} />
          )}
        </div>
      </Stretch>
      {open.length > 0 ? (
        <Stretch title="No verdict yet, and why" ground="white">
          <Checks siteId={siteId} checks={open} />
        </Stretch>
      ) : null}
    </>
  );
}

function Checks({ siteId, checks }: { siteId: string; checks: readonly EffectCheckAnswer[] }) {
  return (
    <ul className="grid border-y border-horizon-5">
      {checks.map((check) => (
        <li
          key={check.key}
          className="grid gap-x-8 gap-y-3 border-b border-horizon-5 py-5 last:border-0 lg:grid-cols-[18rem_1fr]"
        >
          <div className="min-w-0">
            <Link
              href={`/sites/${siteId}/plots/${check.plotId}/effects`}
              className="text-link inline-flex min-h-8 items-center text-lg font-semibold break-words"
            >
              {check.plotName}
            </Link>
            <p className="font-semibold">{checkLabel(check)}</p>
            <p className="text-sm text-clay">{spreadWords(check)}</p>
          </div>
          {check.outcome.ok ? (
            <VerdictLine {...verdictProps(check.outcome)} />
          ) : (
            <RefusalBox {...refusalBoxProps(check.outcome, check.decimals)} />
          )}
        </li>
      ))}
    </ul>
  );
}
