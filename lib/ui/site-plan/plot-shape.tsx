'use client';

import type { DragEvent, KeyboardEvent, PointerEvent } from 'react';
import { cx } from '../cx';
import { labelSpot } from './geometry';
import type { DrawingSize } from './plan-furniture';
import { fitText, lastTestText, plotArea, plotPhrase, waitingText } from './plot-words';
import type { LengthUnit, PlanOutline, PlanPlot } from './types';
import { type PlanView, toDrawing } from './viewport';

const LINE = 18;

export interface PlotShapeProps {
  readonly plot: PlanPlot;
  readonly outline: PlanOutline;
  readonly view: PlanView;
  readonly size: DrawingSize;
  readonly unit: LengthUnit;
  readonly selected: boolean;
  readonly dropTarget: boolean;
  readonly canMove: boolean;
  readonly helpId: string;
  readonly onOpen: () => void;
  readonly onKeyDown: (event: KeyboardEvent<SVGElement>) => void;
  readonly onKeyUp: (event: KeyboardEvent<SVGElement>) => void;
  readonly onBlur: () => void;
  readonly onBodyDown: (event: PointerEvent<SVGElement>) => void;
  readonly onCornerDown: (event: PointerEvent<SVGElement>, corner: number) => void;
  readonly dropHandlers: {
    readonly onDragOver: (event: DragEvent<SVGElement>) => void;
    readonly onDragLeave: (event: DragEvent<SVGElement>) => void;
    readonly onDrop: (event: DragEvent<SVGElement>) => void;
  };
}

export function PlotShape(props: PlotShapeProps) {
  const { plot, outline, view, size, unit, selected, dropTarget, canMove } = props;
  const corners = outline.map((point) => toDrawing(point, view, size));
  const points = corners.map((corner) => `${corner.x},${corner.y}`).join(' ');
  return (
    <g {...props.dropHandlers} data-plot-id={plot.id}>
      {/* biome-ignore lint/a11y/useSemanticElements: a shape of a drawing cannot be a button element */}
      <polygon
        points={points}
        role="button"
        tabIndex={0}
        aria-pressed={selected}
        aria-label={plotPhrase(plot, outline, unit)}
        aria-describedby={props.helpId}
        onKeyDown={props.onKeyDown}
        onKeyUp={props.onKeyUp}
        onBlur={props.onBlur}
        onPointerDown={props.onBodyDown}
        onDoubleClick={props.onOpen}
        className={cx(
          'touch-none outline-none focus-visible:outline-3 focus-visible:outline-gley focus-visible:shadow-none',
          dropTarget
            ? 'fill-gley-wash stroke-gley stroke-[4] [stroke-dasharray:8_4]'
            : selected
              ? 'fill-gley-wash stroke-gley stroke-[3]'
              : 'fill-[url(#plan-furrows)] stroke-horizon-2 stroke-2 hover:stroke-gley hover:stroke-[3]',
          selected && canMove ? 'cursor-move' : 'cursor-pointer',
        )}
      />
      <PlotLabel {...props} />
      {selected && canMove
        ? corners.map((corner, index) => (
            <g
              // biome-ignore lint/suspicious/noArrayIndexKey: a corner has no other name than its place in the outline
              key={index}
              onPointerDown={(event) => props.onCornerDown(event, index)}
              className="cursor-crosshair touch-none"
            >
              <circle cx={corner.x} cy={corner.y} r={18} className="fill-transparent" />
              <rect
                x={corner.x - 6}
                y={corner.y - 6}
                width={12}
                height={12}
                className="fill-white stroke-gley stroke-2"
              />
            </g>
          ))
        : null}
    </g>
  );
}

function PlotLabel({ plot, outline, view, size, unit, dropTarget }: PlotShapeProps) {
  const spot = labelSpot(outline);
  const at = toDrawing(spot.at, view, size);
  const across = (spot.width / view.width) * size.width - 12;
  const up = (spot.height / view.height) * size.height - 12;
  // A long narrow bed carries its label along its length.
  const turned = up > 1.5 * across && fitText(plot.name, across, 16) !== plot.name;
  const [width, height] = turned ? [up, across] : [across, up];
  const name = fitText(plot.name, width, 16);
  if (name === '' || height < 14) return null;
  const upload = plot.uploads?.[0];
  const lines = dropTarget
    ? ['Let go here']
    : [plotArea(plot, outline, unit), ...testLines(plot, width), plot.crop ?? '', upload?.text ?? waitingText(plot)];
  const room = Math.max(0, Math.floor((height - 18) / LINE));
  const shown = lines
    .map((line) => fitText(line, width, 14))
    .filter((line) => line !== '')
    .slice(0, room);
  const top = -((shown.length * LINE) / 2) + 5;
  return (
    // biome-ignore lint/a11y/noAriaHiddenOnFocusable: a group of a drawing cannot take the focus
    <g
      textAnchor="middle"
      pointerEvents="none"
      aria-hidden="true"
      transform={`translate(${at.x} ${at.y})${turned ? ' rotate(-90)' : ''}`}
    >
      <text y={top} className="fill-humus text-base font-semibold">
        {name}
      </text>
      <g className="fill-clay text-sm">
        {shown.map((line, index) => (
          <text key={line} y={top + (index + 1) * LINE + 1}>
            {line}
          </text>
        ))}
      </g>
    </g>
  );
}

/** One line where it fits, else pH and day under each other. */
function testLines(plot: PlanPlot, width: number): string[] {
  const whole = lastTestText(plot);
  return fitText(whole, width, 14) === whole ? [whole] : whole.split(', ');
}
