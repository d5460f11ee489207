import { dayMs } from './numbers';
import { sortPoints } from './series';
import type { ChartAnalyte, DriftAmendment, DriftPoint } from './types';

/** One line of the table under the chart and of its CSV: both are made from this array, which is what was drawn. */
export interface DriftRow {
  readonly kind: 'test' | 'amendment';
  readonly id: string;
  readonly on: string;
  readonly printed: string;
  /** Null where the laboratory gave only a limit. */
  readonly value: number | null;
  readonly low: number | null;
  readonly high: number | null;
  readonly method: string;
  readonly laboratory: string;
  readonly depth: string;
  readonly note: string;
  /** Where the test can be read in full; not part of the CSV. */
  readonly href?: string;
}

export function driftRows(points: readonly DriftPoint[], amendments: readonly DriftAmendment[]): DriftRow[] {
  const tests = sortPoints(points).map((p): DriftRow => {
    const notes = [p.breakBefore === null ? '' : `not joined to the test before: ${p.breakBefore}`];
    if (p.qualifier === 'below') notes.push('below what the laboratory can read');
    if (p.qualifier === 'below-unknown') notes.push('below a limit the laboratory does not state');
    if (p.qualifier === 'above') notes.push('above what the laboratory can read');
    return {
      kind: 'test',
      id: p.id,
      on: p.takenOn,
      printed: p.printed,
      value: p.qualifier === 'exact' ? p.value : null,
      low: p.low,
      high: p.high,
      method: p.method,
      laboratory: p.laboratory,
      depth: p.depth,
      note: notes.filter(Boolean).join('; '),
      ...(p.href === undefined ? {} : { href: p.href }),
    };
  });
  const spread = amendments.map(
    (a): DriftRow => ({
      kind: 'amendment',
      id: a.id,
      on: a.on,
      printed: '',
      value: null,
      low: null,
      high: null,
      method: '',
      laboratory: '',
      depth: '',
      note: a.detail === undefined ? a.label : `${a.label}: ${a.detail}`,
    }),
  );
  return [...tests, ...spread].sort((a, b) => dayMs(a.on) - dayMs(b.on));
}

const PLAIN_NUMBER = /^[-+]?\d+(?:[.,]\d+)?$/;

/** A sheet program runs a text cell that starts like a formula; a leading apostrophe stops that. A plain number stays one. */
export function safeText(text: string): string {
  const guarded = /^[=+\-@\t\r\n]/.test(text) && !PLAIN_NUMBER.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(guarded) ? `"${guarded.replaceAll('"', '""')}"` : guarded;
}

const cell = (value: number | null): string => (value === null || !Number.isFinite(value) ? '' : String(value));

/** RFC 4180: comma, CRLF, a header with the unit, ISO days. Numbers stay numbers, also negative ones. */
export function driftCsv(rows: readonly DriftRow[], analyte: ChartAnalyte): string {
  const unit = analyte.unit === '' ? '' : ` (${analyte.unit})`;
  const head = [
    'date',
    'kind',
    `${analyte.label}${unit}`,
    'as printed',
    `95% range low${unit}`,
    `95% range high${unit}`,
    'method',
    'laboratory',
    'depth',
    'note',
  ].map(safeText);
  const lines = rows.map((r) =>
    [
      r.on,
      r.kind,
      cell(r.value),
      safeText(r.printed),
      cell(r.low),
      cell(r.high),
      safeText(r.method),
      safeText(r.laboratory),
      safeText(r.depth),
      safeText(r.note),
    ].join(','),
  );
  return `${[head.join(','), ...lines].join('\r\n')}\r\n`;
}
