import type { LengthUnit } from './types';
import { gridLines, gridStep, type PlanView, scaleBar, toDrawing } from './viewport';

export interface DrawingSize {
  readonly width: number;
  readonly height: number;
}

/** Grid ground: fine lines, every fifth one stronger. */
export function PlanGround({ view, size, unit }: { view: PlanView; size: DrawingSize; unit: LengthUnit }) {
  const step = gridStep(view, unit);
  const { xs, ys } = gridLines(view, step);
  const strong = (at: number) => Math.round(at / step) % 5 === 0;
  return (
    // biome-ignore lint/a11y/noAriaHiddenOnFocusable: a group of a drawing cannot take the focus
    <g aria-hidden="true" pointerEvents="none">
      {xs.map((x) => {
        const at = toDrawing({ x, y: 0 }, view, size).x;
        return <line key={`x${x}`} x1={at} x2={at} y1={0} y2={size.height} className={lineClass(strong(x))} />;
      })}
      {ys.map((y) => {
        const at = toDrawing({ x: 0, y }, view, size).y;
        return <line key={`y${y}`} x1={0} x2={size.width} y1={at} y2={at} className={lineClass(strong(y))} />;
      })}
    </g>
  );
}

const lineClass = (strong: boolean) => (strong ? 'stroke-fallow/35 stroke-1' : 'stroke-fallow/15 stroke-1');

export function PlanScale({ view, size, unit }: { view: PlanView; size: DrawingSize; unit: LengthUnit }) {
  const bar = scaleBar(view, unit);
  const length = (bar.metres / view.width) * size.width;
  const y = size.height - 16;
  return (
    // biome-ignore lint/a11y/noAriaHiddenOnFocusable: a group of a drawing cannot take the focus
    <g aria-hidden="true" pointerEvents="none" data-testid="plan-scale">
      <rect x={8} y={y - 22} width={length + 24} height={32} className="fill-chalk/90" />
      <path d={`M20 ${y - 5}v5h${length}v-5`} className="fill-none stroke-humus stroke-2" />
      <text x={20 + length / 2} y={y - 8} textAnchor="middle" className="fill-humus font-figures text-xs">
        {bar.label}
      </text>
    </g>
  );
}

export function PlanNorth({ degrees, size }: { degrees: number; size: DrawingSize }) {
  return (
    // biome-ignore lint/a11y/noAriaHiddenOnFocusable: a group of a drawing cannot take the focus
    <g aria-hidden="true" pointerEvents="none" transform={`translate(${size.width - 34} 36)`}>
      <circle r={22} className="fill-chalk/90" />
      <g transform={`rotate(${degrees})`}>
        <path d="M0 -17L6 4L0 0L-6 4Z" className="fill-humus" />
        <text
          y={16}
          textAnchor="middle"
          className="fill-humus text-xs font-semibold"
          transform={`rotate(${-degrees} 0 12)`}
        >
          N
        </text>
      </g>
    </g>
  );
}
