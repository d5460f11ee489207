'use client';

import { Maximize, PencilRuler, Square, Undo2, ZoomIn, ZoomOut } from 'lucide-react';
import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { Button } from '../actions/button';
import { cx } from '../cx';
import { ACCEPTED_FILES } from '../files/upload-item';
import { outlineOf, overlaps } from './geometry';
import { PlanDrawing } from './plan-drawing';
import { PlanList } from './plan-list';
import { PlotForm } from './plot-form';
import { SelectedPlot } from './selected-plot';
import type { PlanOutline, SitePlanProps } from './types';
import { usePlanDrafts } from './use-plan-drafts';
import type { DrawMode } from './use-plan-pointer';
import { fitView, type PlanView, zoomView } from './viewport';

const NEW_PLOT = outlineOf({ x: 1, y: 1, width: 6, height: 3 });
const FIRST_SIZE = { width: 900, height: 600 };

/** The ground of a site to scale, and the same plots as a list. */
export function SitePlan(props: SitePlanProps) {
  const { plots, unit, ground, canEdit, onCreate, onSelect } = props;
  const svg = useRef<SVGSVGElement>(null);
  const [size, setSize] = useState(FIRST_SIZE);
  const [ownView, setOwnView] = useState<PlanView | null>(null);
  const [mode, setMode] = useState<DrawMode | 'numbers'>('none');
  const [said, setSaid] = useState('');
  const drafts = usePlanDrafts(props, setSaid);

  useEffect(() => {
    const element = svg.current;
    if (!element) return;
    const watch = new ResizeObserver(([entry]) => {
      if (entry && entry.contentRect.width > 0) {
        setSize({ width: entry.contentRect.width, height: entry.contentRect.height });
      }
    });
    watch.observe(element);
    return () => watch.disconnect();
  }, []);

  const aspect = size.width / size.height;
  const fitted = useMemo(
    () =>
      fitView(
        plots.flatMap((plot) => (plot.outline ? [plot.outline] : [])),
        ground,
        aspect,
      ),
    [plots, ground, aspect],
  );
  // While somebody looks closer, the view is theirs; its height follows the drawing's shape.
  const view = ownView ? { ...ownView, height: ownView.width / aspect } : fitted;

  const selected = plots.find((plot) => plot.id === props.selectedPlotId);
  const selectedOutline = selected ? drafts.outlineOf(selected) : null;
  const overlapping = selectedOutline
    ? plots.filter((plot) => {
        const outline = plot.id === selected?.id ? null : drafts.outlineOf(plot);
        return outline !== null && overlaps(selectedOutline, outline);
      })
    : [];

  const created = useCallback(
    (outline: PlanOutline) => {
      setMode('none');
      onCreate?.(outline);
    },
    [onCreate],
  );
  const leave = () => setMode('none');
  const toggle = (wanted: DrawMode | 'numbers') => {
    setMode(mode === wanted ? 'none' : wanted);
    onSelect(null);
  };

  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: Escape leaves the drawing mode wherever the focus is
    <div
      className="grid gap-3"
      data-testid="site-plan"
      onKeyDown={(event) => {
        if (event.key === 'Escape' && mode !== 'none') leave();
      }}
    >
      <div className="flex flex-wrap items-center gap-2">
        {canEdit && onCreate ? (
          <>
            <Button
              look={mode === 'rectangle' ? 'primary' : 'quiet'}
              className="min-h-(--target) text-sm"
              aria-pressed={mode === 'rectangle'}
              icon={<Square aria-hidden="true" className="size-4" />}
              onClick={() => toggle('rectangle')}
            >
              Draw a plot
            </Button>
            <Button
              look={mode === 'free' ? 'primary' : 'quiet'}
              className="min-h-(--target) text-sm"
              aria-pressed={mode === 'free'}
              icon={<PencilRuler aria-hidden="true" className="size-4" />}
              onClick={() => toggle('free')}
            >
              Free shape
            </Button>
            <Button
              look={mode === 'numbers' ? 'primary' : 'quiet'}
              className="min-h-(--target) text-sm"
              aria-expanded={mode === 'numbers'}
              onClick={() => toggle('numbers')}
            >
              Add by numbers
            </Button>
            <Button
              look="quiet"
              className="min-h-(--target) text-sm"
              icon={<Undo2 aria-hidden="true" className="size-4" />}
              onClick={drafts.undo}
              unavailable={!drafts.canUndo && 'nothing to undo'}
            >
              Undo
            </Button>
          </>
        ) : null}
        <span className="ml-auto flex gap-2">
          <Button
            look="quiet"
            className="min-w-(--target) gap-0! px-2"
            icon={<ZoomOut aria-hidden="true" className="size-4" />}
            onClick={() => setOwnView(zoomView(view, 1 / 1.4))}
          >
            <span className="sr-only">Zoom out</span>
          </Button>
          <Button
            look="quiet"
            className="min-w-(--target) gap-0! px-2"
            icon={<ZoomIn aria-hidden="true" className="size-4" />}
            onClick={() => setOwnView(zoomView(view, 1.4, centreOfSelected(selectedOutline)))}
          >
            <span className="sr-only">Zoom in</span>
          </Button>
          <Button
            look="quiet"
            className="text-sm"
            icon={<Maximize aria-hidden="true" className="size-4" />}
            onClick={() => setOwnView(null)}
            unavailable={ownView === null && 'all of it is shown'}
          >
            Fit
          </Button>
        </span>
      </div>
      {mode === 'rectangle' ? (
        <p className="text-sm text-clay">Press on the ground and pull to the opposite corner.</p>
      ) : null}
      {mode === 'numbers' ? (
        <div className="border border-fallow bg-silt p-4">
          <PlotForm
            outline={NEW_PLOT}
            unit={unit}
            submitLabel="Add this plot"
            onSubmit={(rectangle) => created(outlineOf(rectangle))}
            onCancel={leave}
          />
        </div>
      ) : null}
      <div
        className={cx(
          'grid items-start gap-x-8 gap-y-3',
          (plots.length > 0 || Boolean(props.aside)) && 'lg:grid-cols-[minmax(0,1fr)_22rem] lg:grid-rows-[auto_1fr]',
        )}
      >
        {props.aside ? <div className="min-w-0 lg:col-start-2">{props.aside}</div> : null}
        <div
          className={cx(
            'min-w-0 lg:col-start-1 lg:row-span-2 lg:row-start-1',
            // Beside a long list the plan stays in sight, to let files go over it; with its panel open it may be too high for that.
            !selected && 'lg:sticky lg:top-4',
          )}
        >
          <PlanDrawing
            {...props}
            svg={svg}
            view={view}
            size={size}
            mode={mode === 'numbers' ? 'none' : mode}
            drafts={drafts}
            onView={setOwnView}
            onDrawn={created}
            say={setSaid}
          />
          {plots.length === 0 && !canEdit ? (
            <p className="border border-t-0 border-fallow bg-silt px-4 py-3 text-sm">
              No plot yet. Each will stand here to scale, with its area, its last test and its pH.
            </p>
          ) : null}
          {selected && selectedOutline ? (
            <SelectedPlot
              {...props}
              plot={selected}
              outline={selectedOutline}
              overlapping={overlapping.map((plot) => plot.name)}
              accept={ACCEPTED_FILES}
              onNumbers={(outline) => drafts.commit(selected, outline)}
            />
          ) : null}
          <p role="status" aria-live="polite" className="mt-2 min-h-6 text-sm text-clay" data-testid="site-plan-said">
            {said}
          </p>
        </div>
        <PlanList {...props} className="lg:col-start-2" outlineOf={drafts.outlineOf} accept={ACCEPTED_FILES} />
      </div>
    </div>
  );
}

function centreOfSelected(outline: PlanOutline | null) {
  if (!outline || outline.length === 0) return undefined;
  const sum = outline.reduce((total, point) => ({ x: total.x + point.x, y: total.y + point.y }), { x: 0, y: 0 });
  return { x: sum.x / outline.length, y: sum.y / outline.length };
}
