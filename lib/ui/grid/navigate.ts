import type { MoveTarget } from './key-map';
import { clampPoint, type GridPoint, type GridSize } from './rectangle';

/** Where a moving key leads; `pageRows` is the number of rows that fit on the screen. */
export function moveFrom(from: GridPoint, to: MoveTarget, size: GridSize, pageRows: number): GridPoint {
  const { row, column } = from;
  const targets: Readonly<Record<MoveTarget, GridPoint>> = {
    up: { row: row - 1, column },
    down: { row: row + 1, column },
    left: { row, column: column - 1 },
    right: { row, column: column + 1 },
    'row-start': { row, column: 0 },
    'row-end': { row, column: size.columns - 1 },
    'grid-start': { row: 0, column: 0 },
    'grid-end': { row: size.rows - 1, column: size.columns - 1 },
    'page-up': { row: row - Math.max(1, pageRows), column },
    'page-down': { row: row + Math.max(1, pageRows), column },
  };
  return clampPoint(targets[to], size);
}

/** The next cell that can be edited in reading order; null at the end, so that Tab then leaves the grid. */
export function nextEditable(
  from: GridPoint,
  step: 1 | -1,
  size: GridSize,
  editable: (point: GridPoint) => boolean,
): GridPoint | null {
  const total = size.rows * size.columns;
  for (let at = from.row * size.columns + from.column + step; at >= 0 && at < total; at += step) {
    const point = { row: Math.floor(at / size.columns), column: at % size.columns };
    if (editable(point)) return point;
  }
  return null;
}

/** The next doubtful cell after `from` in reading order, going round at the end; null when none is doubtful. */
export function nextDoubtful(
  from: GridPoint,
  size: GridSize,
  doubtful: (point: GridPoint) => boolean,
): GridPoint | null {
  const total = size.rows * size.columns;
  const start = from.row * size.columns + from.column;
  for (let step = 1; step <= total; step += 1) {
    const at = (start + step) % total;
    const point = { row: Math.floor(at / size.columns), column: at % size.columns };
    if (doubtful(point)) return point;
  }
  return null;
}
