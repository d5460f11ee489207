import type { Ref } from 'react';
import { driftLayout, type LayoutInput } from './drift-layout';
import { DriftMarks } from './drift-marks';
import { INK } from './palette';

interface DriftPictureProps extends Omit<LayoutInput, 'width' | 'height'> {
  readonly title: string;
  readonly finding: string;
  /** "Drawn 3 May 2026" */
  readonly drawnOn: string;
  readonly source: string;
  readonly fontFamily: string;
  readonly ref?: Ref<SVGSVGElement>;
}

export const PICTURE = { width: 900, height: 560 } as const;
const PAD = 28;
const HEAD = 86;
const FOOT = 34;

/** The chart as one self-contained drawing with its title, day and source: what the exported PNG shows. */
export function DriftPicture({ title, finding, drawnOn, source, fontFamily, ref, ...input }: DriftPictureProps) {
  const width = PICTURE.width - PAD * 2;
  const height = PICTURE.height - HEAD - FOOT - PAD;
  const layout = driftLayout({ ...input, width, height });
  return (
    <svg
      ref={ref}
      xmlns="http://www.w3.org/2000/svg"
      width={PICTURE.width}
      height={PICTURE.height}
      viewBox={`0 0 ${PICTURE.width} ${PICTURE.height}`}
      fontFamily={fontFamily}
      aria-hidden="true"
    >
      <rect width={PICTURE.width} height={PICTURE.height} fill={INK.chalk} />
      <text x={PAD} y={42} fontSize={22} fontWeight={700} fill={INK.humus}>
        {title}
      </text>
      {wrap(finding, 118, 2).map((line, index) => (
        <text key={line} x={PAD} y={66 + index * 18} fontSize={14} fill={INK.clay}>
          {line}
        </text>
      ))}
      <g transform={`translate(${PAD} ${HEAD + 8})`}>
        <DriftMarks layout={layout} analyte={input.analyte} band={input.band} />
      </g>
      <text x={PAD} y={PICTURE.height - 20} fontSize={12} fill={INK.clay}>
        {source}. {drawnOn}. Bars: 95% range of one test.
      </text>
    </svg>
  );
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
