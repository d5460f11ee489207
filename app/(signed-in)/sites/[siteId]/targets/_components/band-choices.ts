import { ANALYTES, UNITS, unitOf } from '@/lib/domain/analytes';

export type BandChoice = {
  readonly key: string;
  readonly label: string;
  readonly unit: string;
  readonly units: readonly { readonly value: string; readonly label: string }[];
  readonly methods: readonly { readonly value: string; readonly label: string }[];
};

/** Amounts per weight, volume and area stand for each other on reports; other units stay among their own kind. */
const AMOUNTS: readonly string[] = ['mass', 'volume', 'area'];

/** Per analyte what a band can be given in. Made on the server: the forms need no dictionary of spellings. */
export function bandChoices(): BandChoice[] {
  return ANALYTES.map(({ key, label, unit, methods }) => {
    const basis = unitOf(unit)?.basis ?? 'none';
    const fits = (other: string) => other === basis || (AMOUNTS.includes(basis) && AMOUNTS.includes(other));
    return {
      key,
      label,
      unit,
      units: UNITS.filter((one) => one.key === unit || fits(one.basis)).map((one) => ({
        value: one.key,
        label: one.label,
      })),
      methods: methods.map((method) => ({ value: method.key, label: method.label })),
    };
  });
}
