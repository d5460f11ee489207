import { remark } from '../candidate';
import { type Label, readLabel, unitOnly } from '../labels/label';
import { type CellLine, numberBox, type PageCell } from './cells';
import type { ListRow } from './list';
import { labelText } from './rowLabels';
import { storedBox } from './words';

type Spot = { readonly line: CellLine; readonly cell: PageCell };
type Named = Spot & { readonly label: Label };

/** How much larger the result is set than the figures of its scale. */
const EMPHASIS = 1.25;

function middle(cell: PageCell): number {
  return (cell.phrase.x0 + cell.phrase.x1) / 2;
}

function height(cell: PageCell): number {
  return (cell.phrase.y0 + cell.phrase.y1) / 2;
}

/** Of some numbers the one set larger than the others; of several as large, the one clearly nearest. */
function emphasised(spots: readonly Spot[], from: PageCell): Spot | null {
  const largest = Math.max(...spots.map(({ cell }) => cell.phrase.size));
  const distance = (spot: Spot) => Math.abs(height(spot.cell) - height(from));
  const [first, second] = spots
    .filter(({ cell }) => cell.phrase.size * EMPHASIS > largest)
    .sort((a, b) => distance(a) - distance(b));
  if (first === undefined) return null;
  return second === undefined || distance(first) < 0.8 * distance(second) ? first : null;
}

/** Of two places the one with the larger type; beside its name where both are alike. */
function largest(spots: readonly (Spot | null)[]): Spot | null {
  return spots.reduce<Spot | null>(
    (best, spot) =>
      spot !== null && (best === null || spot.cell.phrase.size > 1.1 * best.cell.phrase.size) ? spot : best,
    null,
  );
}

function unitNear(
  spot: Spot,
  all: readonly Spot[],
): { unit: NonNullable<ReturnType<typeof unitOnly>>['unit']; printed: string } | null {
  const { phrase } = spot.cell;
  const beside = all
    .filter(
      ({ cell }) =>
        cell.phrase.page === phrase.page &&
        cell.phrase.x0 >= phrase.x1 - 1 &&
        cell.phrase.x0 - phrase.x1 < 2 * phrase.size,
    )
    .filter(({ cell }) => cell.phrase.y1 > phrase.y0 - 1 && cell.phrase.y0 < phrase.y1 + 1);
  return beside.map(({ cell }) => unitOnly(cell.phrase.text)).find((unit) => unit !== null) ?? null;
}

/** Unit or rating set under the label, in its own column. */
function under<T>(named: Named, all: readonly Spot[], read: (cell: PageCell) => T | null): T | null {
  const size = named.cell.phrase.size;
  const near = all
    .filter(({ cell }) => cell.phrase.page === named.cell.phrase.page)
    .filter(
      ({ cell }) => cell.phrase.y0 >= named.cell.phrase.y1 - 1 && cell.phrase.y0 - named.cell.phrase.y1 < 1.6 * size,
    )
    .filter(
      ({ cell }) => Math.min(cell.phrase.x1, named.cell.phrase.x1) > Math.max(cell.phrase.x0, named.cell.phrase.x0),
    );
  return near.map(({ cell }) => read(cell)).find((found) => found !== null) ?? null;
}

/**
 * Stage 6e. Cards, gauges and bars: the number stands over its label, or beside it on a scale, set larger than the
 * figures of the scale; a bar's number stands alone over its label. Used only where tables and lists found next to
 * nothing, because position alone is weaker evidence than a row or a column.
 */
export function cardRows(lines: readonly CellLine[], taken: ReadonlySet<CellLine>): ListRow[] {
  const all: Spot[] = lines
    .filter((line) => !taken.has(line))
    .flatMap((line) => line.cells.map((cell) => ({ line, cell })));
  const values = all.filter(({ cell }) => cell.meaning.kind === 'value');
  const named: Named[] = all.flatMap((spot) => {
    if (spot.cell.meaning.kind !== 'text' || spot.cell.phrase.words.length > 7) return [];
    const label = readLabel(labelText(spot.cell.phrase.text));
    return label === null || label.strength < 0.93 || unitOnly(spot.cell.phrase.text) !== null
      ? []
      : [{ ...spot, label }];
  });
  const rows: ListRow[] = [];
  const used = new Set<PageCell>();
  for (const one of named) {
    const { phrase } = one.cell;
    const samePage = values.filter(({ cell }) => cell.phrase.page === phrase.page && !used.has(cell));
    const beside = samePage.filter(
      ({ cell }) => cell.phrase.x0 > phrase.x1 && Math.abs(height(cell) - height(one.cell)) < 2.4 * phrase.size,
    );
    const between = (cell: PageCell) =>
      named.some(
        (other) =>
          other !== one &&
          other.cell.phrase.y0 > Math.min(cell.phrase.y0, phrase.y0) + 1 &&
          other.cell.phrase.y1 < Math.max(cell.phrase.y1, phrase.y1) - 1 &&
          Math.abs(middle(other.cell) - middle(one.cell)) < phrase.x1 - phrase.x0,
      );
    const over = samePage.filter(
      ({ cell }) =>
        Math.abs(middle(cell) - middle(one.cell)) < Math.max(phrase.x1 - phrase.x0, 4 * phrase.size) &&
        Math.abs(height(cell) - height(one.cell)) < 5 * Math.max(phrase.size, cell.phrase.size) &&
        !between(cell),
    );
    const bar = samePage.filter(
      ({ cell }) =>
        Math.abs(middle(cell) - middle(one.cell)) < 1.2 * phrase.size && cell.phrase.y1 < phrase.y0 && !between(cell),
    );
    const free = beside.filter(
      ({ cell }) =>
        cell.phrase.x0 - phrase.x1 < 60 * phrase.size &&
        !named.some(
          (other) =>
            other !== one &&
            other.cell.phrase.x0 > phrase.x1 &&
            other.cell.phrase.x0 < cell.phrase.x0 &&
            Math.abs(height(other.cell) - height(one.cell)) < phrase.size,
        ),
    );
    const found =
      largest([emphasised(free, one.cell), emphasised(over, one.cell)]) ?? (bar.length === 1 ? (bar[0] ?? null) : null);
    if (found === null || found.cell.meaning.kind !== 'value') continue;
    used.add(found.cell);
    const value = found.cell.meaning;
    const unit =
      value.unit === null && one.label.unit === null
        ? (unitNear(found, all) ?? under(one, all, (cell) => unitOnly(cell.phrase.text.replace(/^.*,\s*/, ''))))
        : null;
    rows.push({
      line: found.line,
      x0: phrase.x0,
      identity: null,
      candidate: {
        label: one.label,
        value,
        rating:
          value.rating ?? under(one, all, (cell) => (cell.meaning.kind === 'rating' ? cell.meaning.rating : null)),
        unit: value.unit ?? one.label.unit ?? unit?.unit ?? null,
        unitPrinted: value.unitPrinted ?? one.label.unitPrinted ?? unit?.printed ?? null,
        method: one.label.method,
        methodPrinted: one.label.methodPrinted,
        page: phrase.page.number,
        box: storedBox(found.line.line.page, numberBox(found.cell.phrase, value.span)),
        cell: null,
        position: 0.92,
        doubts: [remark('number-apart', 'The number stands apart from its name; check that they belong together.')],
      },
    });
  }
  return rows;
}
