import {
  contains,
  type GridPoint,
  type GridSize,
  heightOf,
  isSingle,
  pointsOf,
  type Rectangle,
  widthOf,
} from './rectangle';

export interface PlannedValue extends GridPoint {
  readonly value: string;
}

export interface PastePlan {
  readonly values: readonly PlannedValue[];
  /** The rectangle to select afterwards. */
  readonly covered: Rectangle;
  /** Clipboard cells that fell outside the grid. */
  readonly clipped: number;
  /** Grid cells left alone because they are locked. */
  readonly locked: number;
}

export type PasteRefusal = { readonly ok: false; readonly reason: 'empty-clipboard' | 'all-locked' };

/** One clipboard cell fills the selection; a block lays out from the active cell and is clipped at the edge. */
export function planPaste(input: {
  readonly clipboard: readonly (readonly string[])[];
  readonly selection: Rectangle;
  readonly active: GridPoint;
  readonly size: GridSize;
  readonly editable: (point: GridPoint) => boolean;
}): { readonly ok: true; readonly plan: PastePlan } | PasteRefusal {
  const { clipboard, selection, active, size, editable } = input;
  const width = Math.max(0, ...clipboard.map((row) => row.length));
  if (clipboard.length === 0 || width === 0) return { ok: false, reason: 'empty-clipboard' };
  const fills = clipboard.length === 1 && width === 1;
  const origin = fills ? { row: selection.top, column: selection.left } : blockOrigin(selection, active);
  const wanted = fills
    ? { rows: heightOf(selection), columns: widthOf(selection) }
    : { rows: clipboard.length, columns: width };
  const covered: Rectangle = {
    top: origin.row,
    left: origin.column,
    bottom: Math.min(size.rows - 1, origin.row + wanted.rows - 1),
    right: Math.min(size.columns - 1, origin.column + wanted.columns - 1),
  };
  const values: PlannedValue[] = [];
  let locked = 0;
  for (const point of pointsOf(covered)) {
    const source = fills ? clipboard[0]?.[0] : clipboard[point.row - origin.row]?.[point.column - origin.column];
    // A short clipboard line says nothing about the cells it does not reach.
    if (source === undefined) continue;
    if (editable(point)) values.push({ ...point, value: source });
    else locked += 1;
  }
  if (values.length === 0) return { ok: false, reason: 'all-locked' };
  const cells = clipboard.reduce((sum, row) => sum + row.length, 0);
  return { ok: true, plan: { values, covered, locked, clipped: fills ? 0 : cells - values.length - locked } };
}

function blockOrigin(selection: Rectangle, active: GridPoint): GridPoint {
  if (isSingle(selection) || !contains(selection, active)) return active;
  return { row: selection.top, column: selection.left };
}

/** The first row of the selection goes to the rows under it; a single row takes the row above. */
export function planFillDown(
  selection: Rectangle,
  valueAt: (point: GridPoint) => string,
  editable: (point: GridPoint) => boolean,
): readonly PlannedValue[] {
  const single = selection.top === selection.bottom;
  const source = single ? selection.top - 1 : selection.top;
  if (source < 0) return [];
  return pointsOf({ ...selection, top: source + 1 })
    .filter(editable)
    .map((point) => ({ ...point, value: valueAt({ row: source, column: point.column }) }))
    .filter((planned) => planned.value !== valueAt(planned));
}
