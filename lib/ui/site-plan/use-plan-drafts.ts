'use client';

import { useCallback, useEffect, useState } from 'react';
import { type PlanOutline, type PlanPlot, type SitePlanProps, ToldElsewhere } from './types';

interface Draft {
  readonly outline: PlanOutline;
  /** The outline the draft started from, to see when the saved one has come back. */
  readonly base: string;
  readonly saved: boolean;
}

export interface PlanDrafts {
  readonly outlineOf: (plot: PlanPlot) => PlanOutline | null;
  /** Shows an outline without saving it: while dragging or while a key is held. */
  readonly preview: (plot: PlanPlot, outline: PlanOutline) => void;
  /** Saves what is shown, or the outline given. */
  readonly commit: (plot: PlanPlot, outline?: PlanOutline) => void;
  readonly dropPreview: (plotId: string) => void;
  readonly undo: () => void;
  readonly canUndo: boolean;
}

export function usePlanDrafts(
  { plots, onChangeOutline }: Pick<SitePlanProps, 'plots' | 'onChangeOutline'>,
  say: (sentence: string) => void,
): PlanDrafts {
  const [drafts, setDrafts] = useState<ReadonlyMap<string, Draft>>(new Map());
  const [last, setLast] = useState<{ plotId: string; before: PlanOutline } | null>(null);

  useEffect(() => {
    setDrafts((now) => {
      const kept = [...now].filter(([plotId, draft]) => {
        const plot = plots.find((one) => one.id === plotId);
        return plot !== undefined && !(draft.saved && JSON.stringify(plot.outline) !== draft.base);
      });
      return kept.length === now.size ? now : new Map(kept);
    });
  }, [plots]);

  const outlineOf = useCallback((plot: PlanPlot) => drafts.get(plot.id)?.outline ?? plot.outline, [drafts]);

  const preview = useCallback((plot: PlanPlot, outline: PlanOutline) => {
    setDrafts((now) => {
      const base = JSON.stringify(plot.outline);
      return new Map(now).set(plot.id, { outline, base, saved: false });
    });
  }, []);

  const dropPreview = useCallback((plotId: string) => {
    setDrafts((now) => {
      const next = new Map(now);
      next.delete(plotId);
      return next;
    });
  }, []);

  const save = useCallback(
    async (plot: PlanPlot, outline: PlanOutline, told: string) => {
      if (!onChangeOutline) return;
      preview(plot, outline);
      try {
        await onChangeOutline(plot.id, outline);
        setDrafts((now) => {
          const draft = now.get(plot.id);
          return draft?.outline === outline ? new Map(now).set(plot.id, { ...draft, saved: true }) : now;
        });
        say(told);
      } catch (error) {
        dropPreview(plot.id);
        say(error instanceof ToldElsewhere ? '' : `${plot.name} was not saved and stands where it was. Try again.`);
      }
    },
    [dropPreview, onChangeOutline, preview, say],
  );

  const commit = useCallback(
    (plot: PlanPlot, given?: PlanOutline) => {
      const draft = drafts.get(plot.id);
      // What was on screen before this change: the saved draft of the change before, or the plot's own outline.
      const before = draft?.saved ? draft.outline : plot.outline;
      const outline = given ?? (draft && !draft.saved ? draft.outline : undefined);
      if (!outline || !before) return;
      if (JSON.stringify(outline) === JSON.stringify(before)) return dropPreview(plot.id);
      setLast({ plotId: plot.id, before });
      void save(plot, outline, `${plot.name} saved.`);
    },
    [drafts, dropPreview, save],
  );

  const undo = useCallback(() => {
    const plot = plots.find((one) => one.id === last?.plotId);
    if (!plot || !last) return say('Nothing to undo.');
    setLast(null);
    void save(plot, last.before, `${plot.name} is back where it was.`);
  }, [last, plots, save, say]);

  return { outlineOf, preview, commit, dropPreview, undo, canUndo: last !== null };
}
