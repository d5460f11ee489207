'use client';

import type { ReactNode } from 'react';
import { INK } from './palette';
import { anchorAt, type StripScale } from './strip-scale';

/** Strips place things in percent across and pixels down: they fit any width, and their words keep their size. */
const pct = (value: number): string => `${Number(value.toFixed(3))}%`;

export function StripFrame({ height, children }: { height: number; children: ReactNode }) {
  return (
    <svg width="100%" height={height} fontSize="13" aria-hidden="true" overflow="visible">
      {children}
    </svg>
  );
}

/** Puts a small drawing at a percentage across. */
function At({ x, y, children }: { x: number; y: number; children: ReactNode }) {
  return (
    <svg x={pct(x)} y={y} overflow="visible" aria-hidden="true">
      {children}
    </svg>
  );
}

/** The datum line as the scale. */
export function StripAxis({ scale, y, zeroWord }: { scale: StripScale; y: number; zeroWord?: string }) {
  return (
    <g>
      <line x1="0" x2="100%" y1={y} y2={y} stroke={INK.gley} strokeWidth="2" />
      {scale.ticks.map(({ value, label }) => (
        <g key={label}>
          <line x1={pct(scale.at(value))} x2={pct(scale.at(value))} y1={y} y2={y + 5} stroke={INK.gley} />
          <text x={pct(scale.at(value))} y={y + 19} textAnchor="middle" fill={INK.clay} fontSize="12">
            {label}
          </text>
        </g>
      ))}
      {zeroWord !== undefined && (
        <text x={pct(scale.at(0))} y={y + 36} textAnchor={anchorAt(scale.at(0), 9)} fill={INK.humus} fontSize="12">
          {zeroWord}
        </text>
      )}
    </g>
  );
}

interface ZoneProps {
  readonly scale: StripScale;
  readonly low: number | null;
  readonly high: number | null;
  readonly top: number;
  readonly bottom: number;
}

/** The intended zone: wash with dotted edges; an open side has no edge. */
export function Zone({ scale, low, high, top, bottom }: ZoneProps) {
  const from = low === null ? 0 : scale.at(low);
  const to = high === null ? 100 : scale.at(high);
  return (
    <g>
      <rect x={pct(from)} y={top} width={pct(Math.max(0.5, to - from))} height={bottom - top} fill={INK.gleyWash} />
      {[low === null ? null : from, high === null ? null : to].map((x) =>
        x === null ? null : (
          <line
            key={x}
            x1={pct(x)}
            x2={pct(x)}
            y1={top}
            y2={bottom}
            stroke={INK.gley}
            strokeWidth="2"
            strokeDasharray="1 4"
            strokeLinecap="round"
          />
        ),
      )}
    </g>
  );
}

interface BarProps {
  readonly scale: StripScale;
  readonly y: number;
  readonly low: number | null;
  readonly high: number | null;
  readonly colour?: string;
}

/** An interval: a bar with end caps; an open side ends in an arrow head at the rim. */
export function IntervalBar({ scale, y, low, high, colour = INK.humus }: BarProps) {
  const from = low === null ? 0 : scale.at(low);
  const to = high === null ? 100 : scale.at(high);
  return (
    <g stroke={colour} strokeWidth="2.5" fill="none">
      <line x1={pct(from)} x2={pct(to)} y1={y} y2={y} />
      <At x={from} y={y}>
        <path d={low === null ? 'M7 -5l-7 5l7 5' : 'M0 -6v12'} />
      </At>
      <At x={to} y={y}>
        <path d={high === null ? 'M-7 -5l7 5l-7 5' : 'M0 -6v12'} />
      </At>
    </g>
  );
}

interface DotProps {
  readonly scale: StripScale;
  readonly value: number;
  readonly y: number;
  readonly hollow?: boolean;
  readonly colour?: string;
}

export function StripDot({ scale, value, y, hollow = false, colour = INK.humus }: DotProps) {
  return (
    <circle
      cx={pct(scale.at(value))}
      cy={y}
      r={hollow ? 6 : 6.5}
      fill={hollow ? INK.chalk : colour}
      stroke={hollow ? colour : INK.chalk}
      strokeWidth={hollow ? 2.5 : 1.5}
    />
  );
}

interface WordProps {
  readonly scale: StripScale;
  readonly value: number;
  readonly y: number;
  readonly children: string;
  readonly colour?: string;
  readonly bold?: boolean;
  /** Colour the words stand on. */
  readonly ground?: string;
}

/** Words at a value, kept inside the strip and readable over a line. */
export function StripWord({
  scale,
  value,
  y,
  children,
  colour = INK.humus,
  bold = false,
  ground = INK.chalk,
}: WordProps) {
  const at = scale.at(value);
  return (
    <text
      x={pct(at)}
      y={y}
      textAnchor={anchorAt(at)}
      fill={colour}
      fontWeight={bold ? 700 : 400}
      stroke={ground}
      strokeWidth="5"
      strokeLinejoin="round"
      paintOrder="stroke"
    >
      {children}
    </text>
  );
}

export function StripUpright({
  scale,
  value,
  top,
  bottom,
  dashed = false,
  colour = INK.humus,
}: {
  scale: StripScale;
  value: number;
  top: number;
  bottom: number;
  dashed?: boolean;
  colour?: string;
}) {
  const x = pct(scale.at(value));
  return (
    <line x1={x} x2={x} y1={top} y2={bottom} stroke={colour} strokeWidth="1.5" strokeDasharray={dashed ? '5 4' : ''} />
  );
}

/** A line between two values on two rows; with an arrow head only where the change is clear. */
export function StripLink({
  scale,
  from,
  to,
  y1,
  y2,
  arrow,
}: {
  scale: StripScale;
  from: number;
  to: number;
  y1: number;
  y2: number;
  arrow: boolean;
}) {
  const side = to === from ? 0 : to > from ? 1 : -1;
  return (
    <g stroke={INK.clay} strokeWidth="1.5" fill="none">
      <line x1={pct(scale.at(from))} x2={pct(scale.at(to))} y1={y1} y2={y2} strokeDasharray={arrow ? '' : '3 4'} />
      {arrow && (
        <At x={scale.at(to)} y={y2}>
          <path d={`M${-14 * side} -9l${5 * side} 7l${-9 * side} 1`} fill="none" strokeWidth="2" />
        </At>
      )}
    </g>
  );
}
