import {
  centimetres,
  figures,
  inches,
  squareFeet,
  squareMetres,
  toCentimetres,
  toInches,
  toSquareFeet,
  toSquareMetres,
} from '@/lib/domain/units';
import { numberReason, parseNumber } from '@/lib/ui/fields/parse-number';

/** From the fields of a record, in the person's units, to the body the API takes, and back. */

export type Units = 'us' | 'metric';
export const OWN = 'own';

const METRES: Readonly<Record<Units, (typed: number) => number>> = {
  us: (typed) => (typed < 0 ? typed : toSquareMetres(squareFeet(typed))),
  metric: (typed) => typed,
};
const CENTIMETRES: Readonly<Record<Units, (typed: number) => number>> = {
  us: (typed) => (typed < 0 ? typed : toCentimetres(inches(typed))),
  metric: (typed) => typed,
};

export const toAreaM2 = (typed: number, units: Units): number => METRES[units](typed);
export const toDepthCm = (typed: number, units: Units): number => CENTIMETRES[units](typed);
export const areaUnit = (units: Units): string => (units === 'us' ? 'sq ft' : 'm²');
export const depthUnit = (units: Units): string => (units === 'us' ? 'in' : 'cm');

/** As it stands in a field: no thousands sign, which could be read as a decimal comma. */
const plain = (value: number): string => figures(value, 4).replaceAll(',', '');
export const areaText = (m2: number, units: Units): string =>
  plain(units === 'us' ? toSquareFeet(squareMetres(m2)) : m2);
export const depthText = (cm: number, units: Units): string =>
  cm === 0 ? '0' : plain(units === 'us' ? toInches(centimetres(cm)) : cm);

type NumberRead = { value?: number; error?: string };

/** An empty field is nothing said; what cannot be read is said at the field. */
export function readNumber(typed: string | undefined): NumberRead {
  const read = parseNumber(typed ?? '');
  if (read.ok) return { value: read.value };
  return read.reason === 'empty' ? {} : { error: numberReason[read.reason] };
}

export type Intent = {
  analyte: string;
  unit: string | null;
  fullChange: number;
  low: number | null;
  high: number | null;
  source: string;
};

type Material = { key: string } | { name: string; reaction: string | null; affects: string[] };
export type ApplicationBody = {
  material: Material;
  amount?: number;
  amountUnit: string;
  plannedAmount?: number;
  appliedOn: string;
  areaM2?: number;
  depthCm?: number;
  method?: string;
  soilCondition?: string;
  note?: string;
};

type Read = { ok: true; body: ApplicationBody } | { ok: false; errors: Record<string, string> };

/** Figures already kept: a field left as it was shown sends them back whole, not rounded to what was shown. */
export type Kept = { areaM2: number | null; depthCm: number | null };

export function readFields(
  values: Record<string, string>,
  affects: readonly string[],
  units: Units,
  kept: Kept = { areaM2: null, depthCm: null },
): Read {
  const errors: Record<string, string> = {};
  const number = (name: string, convert = (typed: number) => typed): Record<string, number> => {
    const read = readNumber(values[name]);
    if (read.error !== undefined) errors[name] = read.error;
    return read.value === undefined ? {} : { [name]: convert(read.value) };
  };
  const text = (name: string): Record<string, string> => {
    const typed = values[name]?.trim() ?? '';
    return typed === '' ? {} : { [name]: typed };
  };
  const key = values.material ?? '';
  if (key === '') errors.material = 'Choose a material, or enter your own.';
  const own = values['material.name']?.trim() ?? '';
  if (key === OWN && own === '') errors['material.name'] = 'Name the material.';
  const reaction = values['material.reaction'] ?? '';
  const body: ApplicationBody = {
    material: key === OWN ? { name: own, reaction: reaction === '' ? null : reaction, affects: [...affects] } : { key },
    ...number('amount'),
    amountUnit: values.amountUnit ?? '',
    ...number('plannedAmount'),
    appliedOn: values.appliedOn ?? '',
    ...number('areaM2', (typed) =>
      kept.areaM2 !== null && values.areaM2 === areaText(kept.areaM2, units) ? kept.areaM2 : toAreaM2(typed, units),
    ),
    ...number('depthCm', (typed) =>
      kept.depthCm !== null && values.depthCm === depthText(kept.depthCm, units)
        ? kept.depthCm
        : toDepthCm(typed, units),
    ),
    ...text('method'),
    ...text('soilCondition'),
    ...text('note'),
  };
  return Object.keys(errors).length === 0 ? { ok: true, body } : { ok: false, errors };
}

/** The API counts the changes that were sent; its sentences go to the rows they came from, as a change is one field here. */
export function fieldErrors(
  fields: Record<string, string> | undefined,
  keys: readonly number[] = [],
): Record<string, string> {
  return Object.fromEntries(
    Object.entries(fields ?? {}).map(([name, sentence]) => {
      const sent = /^intents\.(\d+)(?:\.(\w+))?/.exec(name);
      if (sent === null) return [name, sentence];
      const row = keys[Number(sent[1])] ?? Number(sent[1]);
      return [`intents.${row}.${sent[2] === 'analyte' ? 'analyte' : 'fullChange'}`, sentence];
    }),
  );
}
