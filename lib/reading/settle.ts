import { type AnalyteKey, analyte, type UnitKey } from '@/lib/domain/analytes';
import { type Candidate, remark } from './candidate';
import type { Statements } from './stages/sections';
import type { ReadResult, Remark } from './types';

const IMPLIED: ReadonlySet<UnitKey> = new Set<UnitKey>(['pH', 'ratio', 'index']);
const AREA_ADVICE: ReadonlySet<UnitKey> = new Set<UnitKey>([
  'lb/1000ft2',
  'lb/100ft2',
  'oz/1000ft2',
  'oz/100ft2',
  'oz/yd2',
  'g/m2',
]);

/** Ceilings of confidence, by what is wrong. A row is given 0.95 or more only when nothing is. */
const CEILING: Readonly<Record<string, number>> = {
  'unit-missing': 0.8,
  'unit-unusual': 0.6,
  'method-missing': 0.96,
  'ph-method-missing': 0.93,
  'name-ambiguous': 0.7,
  'several-numbers': 0.6,
  'number-format': 0.6,
  'header-on-page-before': 0.9,
  implausible: 0.3,
  'reads-like-recommendation': 0.4,
  'two-readings': 0.5,
  'shares-off': 0.85,
  'cations-off': 0.88,
  'ppm-meq-off': 0.6,
  'rating-order': 0.85,
  'same-as-above': 0.6,
  'unit-from-statement': 0.96,
};

export function ceiling(doubts: readonly Remark[]): number {
  return doubts.reduce((low, doubt) => Math.min(low, CEILING[doubt.code] ?? 0.9), 1);
}

function methodMatters(key: AnalyteKey): boolean {
  const group = analyte(key).group;
  if (group === 'nutrients') return key !== 'pbi' && key !== 'p_saturation';
  return (
    group === 'micronutrients' || key === 'buffer_ph' || key === 'organic_matter' || key === 'ec' || key === 'nitrate_n'
  );
}

function settleUnit(
  candidate: Candidate,
  statements: Statements,
): { unit: UnitKey | null; printed: string | null; doubts: Remark[] } {
  const entry = analyte(candidate.label.analyte);
  const { unit, unitPrinted } = candidate;
  if (IMPLIED.has(entry.unit) && (unit === null || entry.unit !== 'index'))
    return { unit: entry.unit, printed: unitPrinted, doubts: [] };
  if (unit !== null && AREA_ADVICE.has(unit)) {
    return {
      unit,
      printed: unitPrinted,
      doubts: [remark('reads-like-recommendation', 'The unit is one of advice; this may be a recommendation.')],
    };
  }
  if (unit === '%' && entry.unit === 'mg/kg') {
    const doubt = remark(
      'unit-unusual',
      'Per cent is unusual for this in soil; the number may be of plants or fertiliser.',
    );
    return { unit, printed: unitPrinted, doubts: [doubt] };
  }
  if (unit !== null) return { unit, printed: unitPrinted, doubts: [] };
  if (candidate.method === 'index') return { unit: 'index', printed: null, doubts: [] };
  const keyed = statements.units?.get(candidate.label.analyte);
  if (keyed !== undefined)
    return {
      unit: keyed.unit,
      printed: keyed.printed,
      doubts: [remark('unit-from-statement', 'The unit is given in a note of the page, not beside the number.')],
    };
  if (statements.unit !== null && entry.unit === 'mg/kg') {
    return { unit: statements.unit.unit, printed: statements.unit.printed, doubts: [] };
  }
  return { unit: null, printed: null, doubts: [remark('unit-missing', 'The page gives no unit for this number.')] };
}

/** Stage 7. A candidate with unit, method, form and first doubts settled; checks over the whole sample come after. */
export function settle(candidate: Candidate, statements: Statements): ReadResult {
  const key = candidate.label.analyte;
  const stated = candidate.method === null ? statements.methods.get(key) : undefined;
  const method = candidate.method ?? stated?.method?.method ?? null;
  const { unit, printed, doubts: unitDoubts } = settleUnit(candidate, statements);
  const doubts: Remark[] = [...candidate.doubts, ...unitDoubts];
  if (method === null && key === 'soil_ph_water') {
    doubts.push(remark('ph-method-missing', 'The page does not say how pH was measured; it is taken as pH in water.'));
  } else if (method === null && methodMatters(key)) {
    doubts.push(remark('method-missing', 'The page does not say by which method this was measured.'));
  }
  if (candidate.label.ambiguous !== null) doubts.push(remark('name-ambiguous', candidate.label.ambiguous));
  if (candidate.value.doubtful !== null) doubts.push(remark('number-format', candidate.value.doubtful));
  return {
    analyte: key,
    label: candidate.label.text,
    printed: candidate.value.printed,
    value: candidate.value.value,
    qualifier: candidate.value.qualifier,
    unit,
    unitPrinted: printed,
    form: unit === 'index' ? null : candidate.label.form,
    method,
    methodPrinted: candidate.methodPrinted ?? stated?.printed ?? null,
    rating: candidate.rating,
    primary: true,
    page: candidate.page,
    box: candidate.box,
    cell: candidate.cell,
    confidence: 0.995 * candidate.label.strength * candidate.position,
    doubts,
  };
}
