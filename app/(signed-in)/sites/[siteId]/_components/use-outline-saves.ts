'use client';

import { useCallback, useRef, useState } from 'react';
import { type Plot, plotSchema } from '@/lib/schemas/plots';
import { callApi, type Problem } from '@/lib/ui/api';
import { type PlanOutline, ToldElsewhere } from '@/lib/ui/site-plan/types';

export type OutlineConflict = {
  readonly plotId: string;
  readonly mine: PlanOutline;
  readonly before: PlanOutline | null;
  readonly current: Plot;
};

/** Only a plot that was refused for its version comes with what stands there now. */
export function plotOf(problem: Problem): Plot | null {
  if (problem.status !== 409 || problem.reason !== 'stale-version') return null;
  return plotSchema.safeParse(problem.current).data ?? null;
}

/**
 * Saves outlines one after the other for each plot: two quick moves must not refuse each other for their version.
 * A refused one is thrown, so that the plan goes back, and kept here with both values.
 */
export function useOutlineSaves(siteId: string, plots: readonly Plot[], onSaved: (plot: Plot) => void) {
  const versions = useRef(new Map<string, number>());
  const running = useRef(new Map<string, Promise<unknown>>());
  const [conflict, setConflict] = useState<OutlineConflict | null>(null);
  const [problem, setProblem] = useState<Problem>();

  const write = useCallback(
    async (plotId: string, outline: PlanOutline, version: number, before: PlanOutline | null) => {
      const body = { version, outline };
      const result = await callApi<Plot>(`/sites/${siteId}/plots/${plotId}`, { method: 'PATCH', body });
      if (result.ok) {
        versions.current.set(plotId, result.data.version);
        setConflict((now) => (now?.plotId === plotId ? null : now));
        setProblem(undefined);
        onSaved(result.data);
        return;
      }
      const current = plotOf(result.problem);
      if (current) setConflict({ plotId, mine: outline, before, current });
      else setProblem(result.problem);
      throw new ToldElsewhere(result.problem.code);
    },
    [onSaved, siteId],
  );

  const save = useCallback(
    (plotId: string, outline: PlanOutline): Promise<void> => {
      const before = running.current.get(plotId) ?? Promise.resolve();
      const next = before
        .catch(() => undefined)
        .then(() => {
          const shown = plots.find((plot) => plot.id === plotId);
          const version = Math.max(shown?.version ?? 0, versions.current.get(plotId) ?? 0);
          return write(plotId, outline, version, shown?.outline ?? null);
        });
      running.current.set(plotId, next);
      return next;
    },
    [plots, write],
  );

  /** Either way what stands there now becomes what the person has seen. */
  const settle = useCallback(
    async (choice: 'mine' | 'theirs') => {
      if (!conflict) return;
      versions.current.set(conflict.plotId, conflict.current.version);
      onSaved(conflict.current);
      setConflict(null);
      if (choice === 'mine')
        await write(conflict.plotId, conflict.mine, conflict.current.version, conflict.current.outline).catch(
          () => undefined,
        );
    },
    [conflict, onSaved, write],
  );

  return { save, conflict, settle, problem };
}
