import { ANALYTES, analyte, isAnalyteKey, methodsOf, UNITS } from '@/lib/domain/analytes';
import type { ColumnMeaningInput, OwnSheet, SheetMapping } from '@/lib/schemas/ownSheets';
import { SHEET_FORMS } from '@/lib/schemas/ownSheets';
import type { Option } from '@/lib/ui/fields/select-field';

type Kind = ColumnMeaningInput['kind'];
type Layout = SheetMapping['layout'];

const KIND_WORDS: Record<Kind, string> = {
  skip: 'Nothing for the history',
  'sample-name': 'Name of the plot or sample',
  'field-name': 'Name of the field',
  'lab-number': 'Laboratory number',
  laboratory: 'Name of the laboratory',
  'date-sampled': 'Day of sampling',
  depth: 'Depth',
  'depth-top': 'Depth, from',
  'depth-bottom': 'Depth, to',
  result: 'A result',
  analyte: 'Which analyte the line is about',
  value: 'The value',
  unit: 'The unit',
  method: 'The method',
};

const IN_BOTH: readonly Kind[] = [
  'skip',
  'sample-name',
  'field-name',
  'lab-number',
  'laboratory',
  'date-sampled',
  'depth',
  'depth-top',
  'depth-bottom',
];
const OF_LAYOUT: Record<Layout, readonly Kind[]> = {
  'sample-per-row': ['result'],
  'number-per-row': ['analyte', 'value', 'unit', 'method'],
};

export const kindOptions = (layout: Layout): readonly Option[] =>
  [...OF_LAYOUT[layout], ...IN_BOTH].map((kind) => ({ value: kind, label: KIND_WORDS[kind] }));

export const ANALYTE_CHOICES: readonly Option[] = ANALYTES.map((one) => ({ value: one.key, label: one.label }));
export const UNIT_CHOICES: readonly Option[] = UNITS.map((unit) => ({ value: unit.key, label: unit.label }));
export const FORM_CHOICES: readonly Option[] = SHEET_FORMS.map((form) => ({ value: form, label: form }));
export const DEPTH_UNITS: readonly Option[] = [
  { value: 'in', label: 'inches' },
  { value: 'cm', label: 'centimetres' },
];
export const DATE_ORDER_CHOICES: readonly Option[] = [
  { value: 'day-first', label: 'day first (3/4 is 3 April)' },
  { value: 'month-first', label: 'month first (3/4 is 4 March)' },
  { value: 'unknown', label: 'not decided' },
];

export const methodChoices = (key: string): readonly Option[] =>
  isAnalyteKey(key) ? methodsOf(key).map((method) => ({ value: method.key, label: method.label })) : [];

/** A pH is a pH; nobody is asked for its unit. */
export const unitIsImplied = (key: string): boolean => isAnalyteKey(key) && analyte(key).unit === 'pH';

/** What laboratories give as the element, its oxide or its ion. */
const WITH_FORMS = new Set(['phosphorus', 'potassium', 'calcium', 'magnesium', 'nitrate_n', 'sulfur']);
export const hasForms = (key: string): boolean => WITH_FORMS.has(key);

const isKind = (text: string): text is Kind => Object.hasOwn(KIND_WORDS, text);

/** The column as another kind; what it was known to be as a result stays when it is one again. */
export function asKind(text: string, before: ColumnMeaningInput): ColumnMeaningInput {
  const kind = isKind(text) ? text : 'skip';
  if (kind === before.kind) return before;
  if (kind === 'result') return { kind, analyte: 'soil_ph_water', unit: null, form: null, method: null };
  if (kind === 'depth' || kind === 'depth-top' || kind === 'depth-bottom') return { kind, unit: null };
  return { kind };
}

/** Another analyte: its methods are others, and only phosphorus and potassium are given as oxides by habit. */
export function asAnalyte(text: string, before: ColumnMeaningInput): ColumnMeaningInput {
  if (before.kind !== 'result' || !isAnalyteKey(text)) return before;
  const method = methodChoices(text).some((one) => one.value === before.method) ? before.method : null;
  return { ...before, analyte: text, method, form: hasForms(text) ? before.form : null };
}

/** "Phosphorus", "K as K2O": what stands over a column of the preview. */
export function resultWords(
  one: Pick<OwnSheet['samples'][number]['results'][number], 'analyte' | 'form' | 'unit'>,
): string {
  const name = isAnalyteKey(one.analyte) ? analyte(one.analyte).label : one.analyte;
  const form = one.form === null || one.form === 'element' ? '' : ` as ${one.form}`;
  const unit = one.unit === null || one.unit === 'pH' ? '' : `, ${one.unit}`;
  return `${name}${form}${unit}`;
}

export type PreviewColumn = { readonly key: string; readonly head: string };

/** The results of the preview as columns, in the order they first stand in. */
export function previewColumns(samples: OwnSheet['samples']): readonly PreviewColumn[] {
  const heads = [...new Set(samples.flatMap((sample) => sample.results.map(resultWords)))];
  return heads.map((head) => ({ key: head, head }));
}

export type Coming = { readonly samples: number; readonly leftOut: number };

/** How many samples have a plot and a day, and how many stay out. */
export function comingOf(names: OwnSheet['names'], plotOf: (name: string) => string | null): Coming {
  let samples = 0;
  let all = 0;
  for (const one of names) {
    all += one.samples;
    if (plotOf(one.name) !== null) samples += one.samples - one.withoutDay;
  }
  return { samples, leftOut: all - samples };
}
