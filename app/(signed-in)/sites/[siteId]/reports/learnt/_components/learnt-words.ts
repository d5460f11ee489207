import { analyte, isAnalyteKey, isMethodKey, methodLabel, unitOf } from '@/lib/domain/analytes';
import { asDay, dayInWords } from '@/lib/domain/days';
import type { LearntLayout } from '@/lib/schemas/learning';

type Lesson = LearntLayout['lessons'][number];

const SHAPES: Record<LearntLayout['shape'], string> = {
  'page-across': 'pages with the values of a sample side by side',
  'page-down': 'pages with the values of a sample in a list',
  'data-across': 'data files with a sample on each line',
  'data-down': 'data files with a value on each line',
};

export const shapeWords = (layout: LearntLayout): string => SHAPES[layout.shape];
export const laboratoryWords = (layout: LearntLayout): string => layout.laboratory ?? 'A form that names no laboratory';
export const onDay = (day: string): string => dayInWords(asDay(day));

export function meaningWords(lesson: Lesson): string {
  const name = isAnalyteKey(lesson.analyte) ? analyte(lesson.analyte).label : lesson.analyte;
  return lesson.form === null || lesson.form === 'element' ? name : `${name}, given as ${lesson.form}`;
}

export const methodWords = (lesson: Lesson): string =>
  lesson.method !== null && isMethodKey(lesson.method) ? methodLabel(lesson.method) : 'left open';

export const unitWords = (lesson: Lesson): string =>
  lesson.unit === null ? 'left open' : (unitOf(lesson.unit)?.label ?? lesson.unit);

/** "3 reports, the last one on 3 May 2026". */
export function fromWords(layout: LearntLayout): string {
  const [newest] = layout.reports;
  if (newest === undefined) return 'no report';
  const many = layout.reports.length;
  return many === 1
    ? `one report, ${onDay(newest.confirmedOn)}`
    : `${many} reports, the last on ${onDay(newest.confirmedOn)}`;
}
