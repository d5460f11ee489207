import type { Identity, IdentityField } from '../candidate';
import { unitIn } from '../labels/label';
import { fieldWithValue } from '../stages/identity';
import { type Statements, statementsOf } from '../stages/sections';
import type { Facts } from './facts';
import { dateText, depthText, fieldOf } from './fields';
import { spoken } from './spoken';

function put(identity: Identity, field: IdentityField, value: string, heading: string) {
  identity[field] ??= field === 'depth' ? depthText(value, heading) : /^date/.test(field) ? dateText(value) : value;
}

/** What the lines around the tables say once for the whole file: "Reported,2024-10-12", "Sampling depth: 0-6 in". */
export function titleIdentity(facts: Facts, rows: readonly number[]): Identity {
  const identity: Identity = {};
  for (const row of rows) {
    const cells = facts.grid[row] ?? [];
    for (const [column, cell] of cells.entries()) {
      if (cell === '') continue;
      const colon = cell.indexOf(':');
      const head = colon > 0 ? fieldOf(cell.slice(0, colon)) : null;
      const rest = colon > 0 ? cell.slice(colon + 1).trim() : '';
      const whole = head !== null && rest !== '' ? { field: head, value: rest } : fieldWithValue(cell);
      if (whole !== null) {
        put(identity, whole.field, whole.value, cell);
        continue;
      }
      const field = fieldOf(cell.replace(/:\s*$/, ''));
      const value = cells.slice(column + 1, column + 4).find((next) => next !== '') ?? '';
      if (field !== null && value !== '' && fieldOf(value) === null) put(identity, field, value, cell);
    }
  }
  return identity;
}

const ALL_IN = /^(all )?(units?|results?|values|concentrations?)( of measure| are| reported| given)?\s*(:|=|in|as)?\s/i;

/** What is said once of all numbers: a unit ("Units: mg/kg") and methods ("Extraction: Mehlich-3"). */
export function titleStatements(facts: Facts, rows: readonly number[]): Statements {
  const lines = rows.map((row) =>
    (facts.grid[row] ?? [])
      .filter((cell) => cell !== '')
      .map(spoken)
      .join(' '),
  );
  const texts = lines.filter((line) => line !== '');
  const found = statementsOf(texts);
  if (found.unit !== null) return found;
  const unit =
    texts
      .filter((line) => ALL_IN.test(line) && line.length < 140)
      .map((line) => unitIn(line))
      .find((one) => one !== null) ?? null;
  const mass = unit !== null && ['mg/kg', 'lb/acre', 'kg/ha', 'mg/L', 'mg/dm3'].includes(unit.unit);
  return mass && unit !== null ? { ...found, unit: { unit: unit.unit, printed: unit.printed } } : found;
}

const NAMED =
  /\b(laborator(y|ies)|labs?|soil testing|testing (service|cent(er|re))|analytical|agronomy services?|soil service|soil (health )?cent(er|re)|institute|bodenlabor|bodenproben|bodenuntersuchung|labor|laboratoire|laboratorio|laboratorium|jordpr\S+|agrolab|analyti(cs|k))\b/i;

/** The cell beside a heading, unless it is a heading itself. */
function headless(cell: string): string {
  return fieldOf(cell) === null && !/^[\d\s/#-]*$/.test(cell) ? cell : '';
}

/** The laboratory's name from the lines over the first table. */
export function laboratoryOf(facts: Facts, rows: readonly number[]): string | null {
  const cells = rows
    .filter((row) => row < 25)
    .flatMap((row) => {
      const line = facts.grid[row] ?? [];
      return line.flatMap((cell, column) => {
        const said = /^(lab(oratory)?( name)?|analy[sz]ed by|tested by|testing laboratory)\s*:?$/i.test(cell)
          ? headless(line[column + 1] ?? '')
          : '';
        return said === '' ? [cell] : [`Laboratory: ${said}`];
      });
    });
  const stated = cells.flatMap(
    (cell) =>
      /^(?:lab(?:oratory)?(?: name)?|analy[sz]ed by|tested by|testing laboratory)\s*:\s*(.+)$/i.exec(cell)?.[1] ?? [],
  )[0];
  if (stated !== undefined && !/^[\d\s/-]+$/.test(stated)) return stated.trim();
  const named = cells.find(
    (cell) =>
      NAMED.test(cell) &&
      cell.length <= 90 &&
      !/\b(no|number|id|report date|method)\b|[#:]/i.test(cell) &&
      fieldOf(cell) === null,
  );
  return named === undefined ? null : (named.split(/\s+[-–—|]\s+/).find((part) => NAMED.test(part)) ?? named).trim();
}

/** A list of codes with their units and methods, without a number ("P1, ppm, weak Bray"): what a heading alone does not say. */
export function legendOf(
  facts: Facts,
  rows: readonly number[],
  headings: ReadonlySet<string>,
): ReadonlyMap<string, string> {
  const legend = new Map<string, string>();
  for (const row of rows) {
    const cells = (facts.grid[row] ?? []).filter((cell) => cell !== '');
    const one = facts.rows[row];
    if (one === undefined || one.values > 0 || cells.length === 0) continue;
    if (cells.length === 1) {
      const said = /^([A-Za-z0-9 ._()+-]{1,24})\s*[=:]\s*(.{2,80})$/.exec(cells[0] ?? '');
      if (said !== null && unitIn(spoken(said[2] ?? '')) !== null)
        legend.set((said[1] ?? '').trim().toLowerCase(), said[2] ?? '');
      continue;
    }
    const rest = cells.slice(1).join(' ');
    const known = headings.has((cells[0] ?? '').toLowerCase());
    if ((known || unitIn(spoken(rest)) !== null) && cells.length <= 6) legend.set((cells[0] ?? '').toLowerCase(), rest);
  }
  return legend;
}

const LAB_HEAD = /^(lab(oratory)?( ?name)?|analy[sz]ed by|tested by|testing laboratory)$/i;

/** A column that says the same laboratory in every row. */
export function laboratoryColumn(facts: Facts): string | null {
  for (let head = 0; head < Math.min(facts.grid.length, 40); head++) {
    const at = (facts.grid[head] ?? []).findIndex((cell) => LAB_HEAD.test(cell.replace(/_/g, ' ')));
    if (at < 0 || (facts.rows[head]?.filled ?? 0) < 3) continue;
    const cells = new Set(
      facts.grid
        .slice(head + 1)
        .map((row) => row[at] ?? '')
        .filter((cell) => cell !== ''),
    );
    const [only] = cells;
    if (cells.size === 1 && only !== undefined && /\p{L}{3}/u.test(only)) return only;
  }
  return null;
}
