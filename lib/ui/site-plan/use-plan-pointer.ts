'use client';

import { type PointerEvent, type RefObject, useRef, useState } from 'react';
import { dragCorner, moveBy, rectangleBetween, outlineOf as rectangleOutline, snap } from './geometry';
import type { DrawingSize } from './plan-furniture';
import type { PlanOutline, PlanPlot, PlanPoint } from './types';
import type { PlanDrafts } from './use-plan-drafts';
import { type PlanView, toMetres } from './viewport';

export type DrawMode = 'none' | 'rectangle' | 'free';

type Drag =
  | { readonly kind: 'move'; readonly plot: PlanPlot; readonly start: PlanPoint; readonly outline: PlanOutline }
  | { readonly kind: 'corner'; readonly plot: PlanPlot; readonly corner: number; readonly outline: PlanOutline }
  | { readonly kind: 'draw'; readonly start: PlanPoint }
  | { readonly kind: 'pan'; readonly start: PlanPoint; readonly view: PlanView };

const DRAG_STARTS_AT_PIXELS = 4;

interface Input {
  readonly svg: RefObject<SVGSVGElement | null>;
  readonly view: PlanView;
  readonly size: DrawingSize;
  readonly canEdit: boolean;
  readonly mode: DrawMode;
  readonly drafts: PlanDrafts;
  readonly onPan: (view: PlanView) => void;
  readonly onSelect: (plotId: string | null) => void;
  readonly onDrawn: (outline: PlanOutline) => void;
}

/** Pointer work on the plan: move, drag a corner, draw, shift the view. Everything takes effect on letting go. */
export function usePlanPointer(input: Input) {
  const { svg, view, size, canEdit, mode, drafts } = input;
  const drag = useRef<Drag | null>(null);
  const down = useRef<PlanPoint>({ x: 0, y: 0 });
  const moved = useRef(false);
  const [drawn, setDrawn] = useState<PlanOutline | null>(null);
  const [corners, setCorners] = useState<readonly PlanPoint[]>([]);

  const metresAt = (event: PointerEvent, of: PlanView = view): PlanPoint => {
    const frame = svg.current?.getBoundingClientRect();
    if (!frame || frame.width === 0) return { x: 0, y: 0 };
    const x = ((event.clientX - frame.left) / frame.width) * size.width;
    const y = ((event.clientY - frame.top) / frame.height) * size.height;
    return toMetres({ x, y }, of, size);
  };
  const begin = (event: PointerEvent<SVGElement>, next: Drag) => {
    if (event.button !== 0) return;
    drag.current = next;
    moved.current = false;
    down.current = { x: event.clientX, y: event.clientY };
    svg.current?.setPointerCapture?.(event.pointerId);
  };

  const onBodyDown = (event: PointerEvent<SVGElement>, plot: PlanPlot, outline: PlanOutline, selected: boolean) => {
    if (mode !== 'none') return;
    event.stopPropagation();
    input.onSelect(plot.id);
    if (canEdit && selected) begin(event, { kind: 'move', plot, outline, start: metresAt(event) });
  };
  const onCornerDown = (event: PointerEvent<SVGElement>, plot: PlanPlot, outline: PlanOutline, corner: number) => {
    event.stopPropagation();
    begin(event, { kind: 'corner', plot, corner, outline });
  };
  const onGroundDown = (event: PointerEvent<SVGElement>) => {
    const start = metresAt(event);
    if (mode === 'rectangle') begin(event, { kind: 'draw', start });
    else if (mode === 'none') begin(event, { kind: 'pan', start, view });
    else setCorners((now) => [...now, { x: Math.max(0, snap(start.x)), y: Math.max(0, snap(start.y)) }]);
  };
  const onMove = (event: PointerEvent<SVGElement>) => {
    const now = drag.current;
    if (!now) return;
    if (Math.hypot(event.clientX - down.current.x, event.clientY - down.current.y) >= DRAG_STARTS_AT_PIXELS) {
      moved.current = true;
    }
    if (!moved.current) return;
    const at = metresAt(event, now.kind === 'pan' ? now.view : view);
    if (now.kind === 'move' || now.kind === 'corner') drafts.preview(now.plot, draggedTo(now, at));
    else if (now.kind === 'draw') setDrawn(drawnBetween(now.start, at));
    else input.onPan({ ...now.view, x: now.view.x - (at.x - now.start.x), y: now.view.y - (at.y - now.start.y) });
  };
  const onUp = (event: PointerEvent<SVGElement>) => {
    const now = drag.current;
    drag.current = null;
    if (!now) return;
    if (now.kind === 'draw') {
      const outline = moved.current ? drawnBetween(now.start, metresAt(event)) : null;
      setDrawn(null);
      if (outline) input.onDrawn(outline);
    } else if (now.kind === 'pan') {
      if (!moved.current) input.onSelect(null);
    } else if (moved.current) {
      // From the event itself: the last preview may not have been drawn yet.
      drafts.commit(now.plot, draggedTo(now, metresAt(event)));
    }
  };
  const onCancel = () => {
    const now = drag.current;
    drag.current = null;
    setDrawn(null);
    if (now && (now.kind === 'move' || now.kind === 'corner')) drafts.dropPreview(now.plot.id);
  };
  const clearFree = () => setCorners([]);
  const closeFree = () => {
    if (corners.length >= 3) input.onDrawn(corners);
    setCorners([]);
  };

  return { drawn, corners, clearFree, closeFree, onBodyDown, onCornerDown, onGroundDown, onMove, onUp, onCancel };
}

function draggedTo(drag: Extract<Drag, { kind: 'move' | 'corner' }>, at: PlanPoint): PlanOutline {
  if (drag.kind === 'corner') return dragCorner(drag.outline, drag.corner, at);
  return moveBy(drag.outline, { x: at.x - drag.start.x, y: at.y - drag.start.y });
}

function drawnBetween(a: PlanPoint, b: PlanPoint): PlanOutline {
  const onPlan = (point: PlanPoint) => ({ x: Math.max(0, point.x), y: Math.max(0, point.y) });
  return rectangleOutline(rectangleBetween(onPlan(a), onPlan(b)));
}
