'use client';

import { type DragEvent, type KeyboardEvent, type RefObject, useId, useRef, useState } from 'react';
import { areaOf, boundsOf } from './geometry';
import { areaText, lengthText } from './measure';
import { type DrawingSize, PlanGround, PlanNorth, PlanScale } from './plan-furniture';
import { isArrow, outlineAfterKey } from './plan-keys';
import { PlotShape } from './plot-shape';
import type { PlanOutline, PlanPlot, SitePlanProps } from './types';
import type { PlanDrafts } from './use-plan-drafts';
import { type DrawMode, usePlanPointer } from './use-plan-pointer';
import { type PlanView, toDrawing } from './viewport';

interface PlanDrawingProps extends SitePlanProps {
  readonly svg: RefObject<SVGSVGElement | null>;
  readonly view: PlanView;
  readonly size: DrawingSize;
  readonly mode: DrawMode;
  readonly drafts: PlanDrafts;
  readonly onView: (view: PlanView) => void;
  readonly onDrawn: (outline: PlanOutline) => void;
  readonly say: (sentence: string) => void;
}

export function PlanDrawing(props: PlanDrawingProps) {
  const { plots, unit, view, size, drafts, canEdit, mode, selectedPlotId } = props;
  const helpId = useId();
  const [dropId, setDropId] = useState<string | null>(null);
  const keyHeld = useRef(false);
  const pointer = usePlanPointer({
    svg: props.svg,
    view,
    size,
    canEdit,
    mode,
    drafts,
    onPan: props.onView,
    onSelect: props.onSelect,
    onDrawn: props.onDrawn,
  });
  const open = (plotId: string) => {
    if (props.onOpen) props.onOpen(plotId);
    else window.location.assign(props.plotHref(plotId));
  };

  const onKeyDown = (event: KeyboardEvent<SVGElement>, plot: PlanPlot, outline: PlanOutline) => {
    const selected = plot.id === selectedPlotId;
    if (event.key === 'Enter' || event.key === ' ') {
      event.preventDefault();
      if (selected && event.key === 'Enter') open(plot.id);
      else props.onSelect(selected ? null : plot.id);
    } else if (event.key === 'Escape') {
      drafts.dropPreview(plot.id);
      keyHeld.current = false;
      props.onSelect(null);
    } else if (selected && canEdit && isArrow(event.key)) {
      const next = outlineAfterKey(outline, event.key, event.shiftKey);
      event.preventDefault();
      if (!next) return;
      keyHeld.current = true;
      drafts.preview(plot, next);
    }
  };
  // A held key is one change: it is saved when the key is let go or the plot is left.
  const settle = (plot: PlanPlot) => {
    if (!keyHeld.current) return;
    keyHeld.current = false;
    drafts.commit(plot);
  };

  const takesFiles = props.canUpload && props.onDropFiles !== undefined;
  const dropHandlers = (plot: PlanPlot) => ({
    onDragOver: (event: DragEvent<SVGElement>) => {
      event.preventDefault();
      if (!takesFiles) return;
      event.dataTransfer.dropEffect = 'copy';
      setDropId(plot.id);
    },
    onDragLeave: () => setDropId(null),
    onDrop: (event: DragEvent<SVGElement>) => {
      event.preventDefault();
      event.stopPropagation();
      setDropId(null);
      const files = [...event.dataTransfer.files];
      if (takesFiles && files.length > 0) props.onDropFiles?.(plot.id, files);
    },
  });

  // The selected plot is drawn last, so that its corners lie on top; the order of the Tab key is that of the list.
  const shown = plots.flatMap((plot) => {
    const outline = drafts.outlineOf(plot);
    return outline ? [{ plot, outline }] : [];
  });
  return (
    <>
      <svg
        ref={props.svg}
        viewBox={`0 0 ${size.width} ${size.height}`}
        className={`block aspect-4/5 w-full touch-pan-y select-none border border-fallow bg-white sm:aspect-3/2 ${mode === 'none' ? 'cursor-grab' : 'cursor-crosshair'}`}
        data-testid="site-plan-drawing"
        onPointerDown={pointer.onGroundDown}
        onPointerMove={pointer.onMove}
        onPointerUp={pointer.onUp}
        onPointerCancel={pointer.onCancel}
        onDragOver={(event) => event.preventDefault()}
        onDrop={(event) => {
          event.preventDefault();
          event.stopPropagation();
          if (takesFiles && event.dataTransfer.files.length > 0)
            props.onDropFiles?.(null, [...event.dataTransfer.files]);
        }}
      >
        <title>{`Plan of ${props.siteName}`}</title>
        <defs>
          <pattern id="plan-furrows" width="8" height="8" patternUnits="userSpaceOnUse" patternTransform="rotate(14)">
            <rect width="8" height="8" className="fill-silt" />
            <path d="M0 4h8" className="stroke-horizon-5 stroke-1" />
          </pattern>
        </defs>
        <PlanGround view={view} size={size} unit={unit} />
        {shown.map(({ plot, outline }) => (
          <PlotShape
            key={plot.id}
            plot={plot}
            outline={outline}
            view={view}
            size={size}
            unit={unit}
            selected={plot.id === selectedPlotId}
            dropTarget={plot.id === dropId}
            canMove={canEdit && mode === 'none'}
            helpId={helpId}
            onOpen={() => open(plot.id)}
            onKeyDown={(event) => onKeyDown(event, plot, outline)}
            onKeyUp={() => settle(plot)}
            onBlur={() => settle(plot)}
            onBodyDown={(event) => pointer.onBodyDown(event, plot, outline, plot.id === selectedPlotId)}
            onCornerDown={(event, corner) => pointer.onCornerDown(event, plot, outline, corner)}
            dropHandlers={dropHandlers(plot)}
          />
        ))}
        <Pencil outline={pointer.drawn ?? pointer.corners} closed={pointer.drawn !== null} {...props} />
        <PlanScale view={view} size={size} unit={unit} />
        {props.northDegrees === undefined ? null : <PlanNorth degrees={props.northDegrees} size={size} />}
      </svg>
      <p id={helpId} className="sr-only">
        {canEdit
          ? 'Space selects. Once selected: arrow keys move by half a metre, Shift and arrow keys resize, Enter opens, Escape leaves.'
          : 'Space selects. Enter on a selected plot opens it.'}
      </p>
      {mode === 'free' ? (
        <FreeShapeBar corners={pointer.corners.length} onClose={pointer.closeFree} onClear={pointer.clearFree} />
      ) : null}
    </>
  );
}

function FreeShapeBar({ corners, onClose, onClear }: { corners: number; onClose: () => void; onClear: () => void }) {
  return (
    <p className="flex flex-wrap items-center gap-3 border border-t-0 border-fallow bg-gley-wash px-3 py-2 text-sm">
      <span className="flex-1">
        {corners < 3 ? `Press on each corner: ${corners} so far, at least 3.` : `${corners} corners.`}
      </span>
      <button type="button" className="text-link min-h-9" disabled={corners === 0} onClick={onClear}>
        Start over
      </button>
      <button type="button" className="text-link min-h-9 font-semibold" disabled={corners < 3} onClick={onClose}>
        Close the shape
      </button>
    </p>
  );
}

/** The shape being drawn, with its measures. */
function Pencil({
  outline,
  closed,
  view,
  size,
  unit,
}: { outline: PlanOutline; closed: boolean } & Pick<PlanDrawingProps, 'view' | 'size' | 'unit'>) {
  const bounds = boundsOf(outline);
  if (!bounds) return null;
  const corners = outline.map((point) => toDrawing(point, view, size));
  const points = corners.map((corner) => `${corner.x},${corner.y}`).join(' ');
  const at = toDrawing({ x: bounds.minX, y: bounds.maxY }, view, size);
  const wide = lengthText(bounds.maxX - bounds.minX, unit);
  const long = lengthText(bounds.maxY - bounds.minY, unit);
  return (
    <g pointerEvents="none">
      {closed || outline.length > 2 ? (
        <polygon points={points} className="fill-gley/10 stroke-gley stroke-2 [stroke-dasharray:6_4]" />
      ) : (
        <polyline points={points} className="fill-none stroke-gley stroke-2" />
      )}
      {corners.map((corner) => (
        <circle key={`${corner.x} ${corner.y}`} cx={corner.x} cy={corner.y} r={4} className="fill-gley" />
      ))}
      <text
        x={Math.max(4, Math.min(at.x, size.width - 290))}
        y={Math.max(16, at.y - 8)}
        className="fill-gley-deep font-figures text-sm font-semibold"
      >
        {closed ? `${wide} × ${long} = ` : ''}
        {areaText(areaOf(outline), unit)}
      </text>
    </g>
  );
}
