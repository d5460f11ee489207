'use client';

import type { ReactNode, Ref } from 'react';
import { type DriftLayout, driftLayout, type LayoutInput } from './drift-layout';
import { DriftMarks } from './drift-marks';
import { formatDay } from './numbers';
import { INK } from './palette';
import { splitSeries } from './series';
import { Mark } from './shapes';

interface DriftPictureProps extends Omit<LayoutInput, 'width' | 'height'> {
  readonly title: string;
  readonly finding: string;
  /** "Drawn 3 May 2026" */
  readonly drawnOn: string;
  readonly source: string;
  readonly fontFamily: string;
  readonly ref?: Ref<SVGSVGElement>;
}

const WIDTH = 900;
const PAD = 28;
const HEAD = 94;
const CHART = 410;
const ROW = 19;
const FOOT_ROW = 16;

/** The chart as one self-contained drawing with title, key, day and source: the exported PNG, and the chart on paper. */
export function DriftPicture({ title, finding, drawnOn, source, fontFamily, ref, ...input }: DriftPictureProps) {
  const layout = driftLayout({ ...input, width: WIDTH - PAD * 2, height: CHART });
  const rows = keyRows(input, layout);
  const keyTop = HEAD + CHART + 26;
  const band = input.band === null ? '' : ` Target band: ${input.band.source}.`;
  const foot = wrap(`${source}. ${drawnOn}.${band}`, 130, 3);
  const footTop = keyTop + rows.length * ROW + 20;
  const height = footTop + foot.length * FOOT_ROW + 2;
  return (
    <svg
      ref={ref}
      xmlns="http://www.w3.org/2000/svg"
      width={WIDTH}
      height={height}
      viewBox={`0 0 ${WIDTH} ${height}`}
      fontFamily={fontFamily}
      fontSize={13}
      aria-hidden="true"
    >
      <rect width={WIDTH} height={height} fill={INK.chalk} />
      <text x={PAD} y={42} fontSize={22} fontWeight={700} fill={INK.humus}>
        {title}
      </text>
      {wrap(finding, 118, 2).map((line, index) => (
        <text key={line} x={PAD} y={66 + index * 18} fontSize={14} fill={INK.clay}>
          {line}
        </text>
      ))}
      <g transform={`translate(${PAD} ${HEAD})`}>
        <DriftMarks layout={layout} analyte={input.analyte} band={input.band} />
      </g>
      {rows.map(({ key, sign, words }, index) => (
        <g key={key} transform={`translate(${PAD} ${keyTop + index * ROW})`}>
          {sign}
          <text x={38} y={4} fill={INK.clay}>
            {wrap(words, 118, 1)[0] ?? ''}
          </text>
        </g>
      ))}
      {foot.map((line, index) => (
        <text key={line} x={PAD} y={footTop + index * FOOT_ROW} fontSize={12} fill={INK.clay}>
          {line}
        </text>
      ))}
    </svg>
  );
}

interface KeyRow {
  readonly key: string;
  readonly sign: ReactNode;
  readonly words: string;
}

/** A picture travels without the page, so it says itself what its marks and numbers mean. */
function keyRows(input: Pick<LayoutInput, 'points' | 'locale'>, layout: DriftLayout): KeyRow[] {
  const segments = splitSeries(input.points);
  const range = layout.points.some((p) => p.whisker !== null) ? '; bar: 95% range of one test' : '';
  const series = segments.map(({ key, style, points, breakBefore }): KeyRow => {
    const first = points[0];
    const how = [first?.method, first?.laboratory].filter(Boolean).join(', ') || 'method not stated';
    const from =
      breakBefore === null ? '' : `; from ${formatDay(first?.takenOn ?? '', input.locale)}, not joined: ${breakBefore}`;
    return {
      key,
      sign: (
        <g>
          <line x1={0} x2={28} y1={0} y2={0} stroke={style.colour} strokeWidth={2} strokeDasharray={style.dash} />
          <Mark x={14} y={0} colour={style.colour} shape={style.marker} size={4} />
        </g>
      ),
      words: `${how}${range}${from}`,
    };
  });
  if (!layout.flags) return series;
  const flags = layout.amendments.map(
    ({ amendment, text }): KeyRow => ({
      key: amendment.id,
      sign: (
        <g>
          <rect x={6} y={-8} width={16} height={15} rx={2} fill={INK.chalk} stroke={INK.redHorizon} />
          <text x={14} y={4} textAnchor="middle" fill={INK.redHorizon} fontWeight={600}>
            {text}
          </text>
        </g>
      ),
      words: `${formatDay(amendment.on, input.locale)}: ${[amendment.label, amendment.detail].filter(Boolean).join(', ')}`,
    }),
  );
  return [...series, ...flags];
}

/** Breaks a sentence into at most `most` lines; what does not fit ends in an ellipsis. */
export function wrap(text: string, width: number, most: number): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/\s+/)) {
    if (line !== '' && line.length + word.length + 1 > width) {
      lines.push(line);
      line = word;
    } else {
      line = line === '' ? word : `${line} ${word}`;
    }
  }
  if (line !== '') lines.push(line);
  if (lines.length <= most) return lines;
  const kept = lines.slice(0, most);
  const end = kept.pop() ?? '';
  return [...kept, `${end.slice(0, width - 1)}…`];
}
