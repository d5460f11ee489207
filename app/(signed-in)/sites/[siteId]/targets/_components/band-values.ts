import { numberReason, parseNumber } from '@/lib/ui/fields/parse-number';

export type BandBody = { analyte: string; low: number; high: number; unit: string | null; method: string | null };
export type ReadBands = { ok: true; bands: BandBody[] } | { ok: false; errors: Record<string, string> };

/** The rows of the form as bands; sentences by field name where one cannot be read. */
export function readBands(values: Readonly<Record<string, string>>, rows: readonly number[]): ReadBands {
  const errors: Record<string, string> = {};
  const seen = new Set<string>();
  const number = (field: string): number => {
    const read = parseNumber(values[field] ?? '');
    if (!read.ok) errors[field] = numberReason[read.reason];
    return read.ok ? read.value : 0;
  };
  const bands = rows.map((row): BandBody => {
    const analyte = values[`analyte-${row}`] ?? '';
    if (seen.has(analyte)) errors[`analyte-${row}`] = 'This one is in the set already. Each analyte once.';
    seen.add(analyte);
    const [low, high] = [number(`low-${row}`), number(`high-${row}`)];
    if (!errors[`low-${row}`] && !errors[`high-${row}`] && low > high) {
      errors[`high-${row}`] = 'The upper end must not be below the lower end.';
    }
    return { analyte, low, high, unit: values[`unit-${row}`] || null, method: values[`method-${row}`] || null };
  });
  return Object.keys(errors).length > 0 ? { ok: false, errors } : { ok: true, bands };
}

/** "bands.1.high" of a refusal, as the form names that field. */
export function bandField(path: string, rows: readonly number[]): string {
  const [top, at, field] = path.split('.');
  const row = rows[Number(at)];
  return top === 'bands' && row !== undefined ? `${field ?? 'low'}-${row}` : path;
}
