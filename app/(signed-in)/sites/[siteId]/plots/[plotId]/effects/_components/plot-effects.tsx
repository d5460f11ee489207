'use client';

import type { EffectsAnswer } from '@/lib/schemas/effects';
import type { HistoryAnswer } from '@/lib/schemas/history';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { Stretch } from '@/lib/ui/frame/layers';
import { useApi } from '@/lib/ui/use-api';
import { EffectCheck } from '../../../../effects/_components/effect-check';

type PlotEffectsProps = { siteId: string; first: EffectsAnswer; history: HistoryAnswer; mayRecord: boolean };

export function PlotEffects({ siteId, first, history, mayRecord }: PlotEffectsProps) {
  const plotId = history.plot.id;
  const { data = first, problem } = useApi<EffectsAnswer>(`/sites/${siteId}/effects?plotId=${plotId}`, {
    fallback: first,
  });
  const records = `/sites/${siteId}/plots/${plotId}/records`;
  if (data.checks.length === 0) {
    return (
      <Stretch>
        <ProblemNotice problem={problem} />
        <EmptyState
          shape="list"
          title="Nothing to check on this plot yet"
          action={mayRecord ? <LinkButton href={records}>Record what was spread</LinkButton> : null}
        >
          An application with the change it was meant to make stands here once it is recorded, and gets its verdict when
          a later test is confirmed. One plot left untreated and sampled on the same days makes the verdict firmer.
        </EmptyState>
      </Stretch>
    );
  }
  const ranges = new Map(
    history.series.flatMap((series) => series.points.map(({ id, low, high }) => [id, { low, high }] as const)),
  );
  return (
    <div className="grid gap-10">
      {problem ? (
        <Stretch>
          <ProblemNotice problem={problem} />
        </Stretch>
      ) : null}
      {data.checks.map((check) => (
        <EffectCheck
          key={check.key}
          check={check}
          ranges={ranges}
          target={history.series.find((series) => series.analyte === check.analyte)?.band ?? null}
        />
      ))}
    </div>
  );
}
