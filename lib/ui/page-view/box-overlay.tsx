'use client';

import { useEffect, useRef } from 'react';
import { boxAsShown, type QuarterTurn, withAir } from './box-map';
import type { PageFractions, PageMark } from './types';

interface BoxOverlayProps {
  readonly marks: readonly PageMark[];
  readonly turn: QuarterTurn;
  readonly highlightedRowId: string | null;
  readonly onPick: (rowId: string) => void;
  /** Width and height of the page as shown, in CSS pixels. */
  readonly size: { readonly width: number; readonly height: number };
}

const AIR_PIXELS = 4;

/**
 * The boxes over the page. Hidden from assistive technology: the same place is said by the live line, and the same
 * step is made with the keyboard in the grid.
 */
export function BoxOverlay({ marks, turn, highlightedRowId, onPick, size }: BoxOverlayProps) {
  const highlighted = useRef<SVGRectElement>(null);
  const { width, height } = size;
  useEffect(() => {
    if (highlightedRowId === null || width === 0) return;
    scrollInside(highlighted.current);
  }, [highlightedRowId, width]);
  if (width === 0 || height === 0) return null;
  const air = { x: AIR_PIXELS / width, y: AIR_PIXELS / height };
  const place = (box: PageFractions) => {
    const [x0, y0, x1, y1] = withAir(boxAsShown(box, turn), air);
    return { x: x0 * width, y: y0 * height, width: (x1 - x0) * width, height: (y1 - y0) * height };
  };
  return (
    <svg
      aria-hidden="true"
      viewBox={`0 0 ${width} ${height}`}
      className="absolute inset-0 size-full"
      data-testid="page-boxes"
    >
      {marks.map((mark) => {
        if (!mark.box) return null;
        const here = mark.rowId === highlightedRowId;
        return (
          // biome-ignore lint/a11y/noStaticElementInteractions: a pointer short cut; the grid is the keyboard way
          <rect
            key={mark.rowId}
            ref={here ? highlighted : null}
            {...place(mark.box)}
            data-row-id={mark.rowId}
            data-highlighted={here || undefined}
            vectorEffect="non-scaling-stroke"
            pointerEvents="all"
            className={
              here
                ? 'cursor-pointer fill-gley/10 stroke-gley stroke-2'
                : 'cursor-pointer fill-transparent stroke-gley/60 stroke-1 [stroke-dasharray:2_3] hover:fill-gley/10'
            }
            onClick={() => onPick(mark.rowId)}
          />
        );
      })}
    </svg>
  );
}

/** Scrolls only the pane of the page, never the window: both panes keep their place. */
function scrollInside(target: SVGRectElement | null): void {
  const pane = target?.closest('[data-page-pane]');
  if (!target || !pane) return;
  const box = target.getBoundingClientRect();
  const frame = pane.getBoundingClientRect();
  const margin = 40;
  if (box.top < frame.top + margin || box.bottom > frame.bottom - margin) {
    pane.scrollTop += box.top - frame.top - frame.height / 2 + box.height / 2;
  }
  if (box.left < frame.left + margin || box.right > frame.right - margin) {
    pane.scrollLeft += box.left - frame.left - frame.width / 2 + box.width / 2;
  }
}
