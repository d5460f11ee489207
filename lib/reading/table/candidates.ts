import { NOT_ANALYSED, type Qualifier } from '@/lib/domain/analytes';
import type { Candidate } from '../candidate';
import { type Label, methodIn, unitIn, unitOnly } from '../labels/label';
import { ratingIn, type Value } from '../stages/values';
import { labelOf, spoken } from './spoken';

export type Beside = {
  readonly unit?: string;
  readonly method?: string;
  readonly rating?: string;
  /** A cell of a qualifier column: "<", "ND", "U", "J". */
  readonly qualifier?: string;
};

const NONE = new Set(NOT_ANALYSED.map((text) => text.toLowerCase()));

export type Place = { readonly sheet: number; readonly row: number; readonly column: number };

function signOf(text: string | undefined): { qualifier: Qualifier; sign: string } | null {
  if (text === undefined || text === '') return null;
  if (/^(<|<=|≤|lt|less than|below)$/i.test(text)) return { qualifier: '<', sign: '<' };
  if (/^(>|>=|≥|gt|greater than|above)$/i.test(text)) return { qualifier: '>', sign: '>' };
  if (/^(nd|n\.d\.|u|bdl|not detected|<\s?(mdl|rl|lod))$/i.test(text)) return { qualifier: 'nd', sign: '' };
  return /^(tr|trace)\.?$/i.test(text) ? { qualifier: 'trace', sign: '' } : null;
}

/** A column that calls itself a rating may hold a laboratory's own words or figures; long sentences are comments. */
function ratingText(text: string): string | null {
  if (text === '' || NONE.has(text.toLowerCase())) return null;
  return ratingIn(text) ?? (text.length <= 20 ? text : null);
}

/** A number with what stands around it. `place` is counted from 0. */
export function candidateOf(label: Label, value: Value, place: Place, beside: Beside): Candidate {
  const unitText = spoken(beside.unit ?? '');
  const unit = unitText === '' ? null : (unitOnly(unitText) ?? unitIn(unitText));
  const methodText = spoken(beside.method ?? '');
  let settled = label;
  // "K" with the unit "% of CEC" is a share, which is another analyte.
  const share =
    unit?.unit === '%' &&
    label.unit === null &&
    /^(potassium|calcium|magnesium|sodium|exchangeable_acidity)$/.test(label.analyte);
  if (share) settled = { ...(labelOf(`${spoken(label.text)} %`) ?? label), text: label.text };
  const method = methodText === '' ? null : methodIn(settled.analyte, methodText);
  const oxide = /\b(P2O5|K2O)\b/i.exec(`${beside.unit ?? ''} ${value.unitPrinted ?? ''}`)?.[1];
  const sign = value.qualifier === '=' ? signOf(beside.qualifier) : null;
  const signed: Value =
    sign === null ? value : { ...value, qualifier: sign.qualifier, printed: `${sign.sign}${value.printed}` };
  return {
    label: oxide === undefined || settled.form === null ? settled : { ...settled, form: oxide.toUpperCase() },
    value: signed,
    rating: value.rating ?? ratingText(beside.rating ?? ''),
    unit: value.unit ?? unit?.unit ?? settled.unit,
    unitPrinted: value.unitPrinted ?? (unit === null ? settled.unitPrinted : (beside.unit ?? unit.printed)),
    method: method?.method ?? settled.method,
    methodPrinted: method === null ? settled.methodPrinted : (beside.method ?? method.printed),
    page: null,
    box: null,
    cell: { sheet: place.sheet, row: place.row + 1, column: place.column + 1 },
    position: 1,
    doubts: [],
  };
}
