/** Rectangle selection over row and column numbers; both corners belong to it. */
export interface GridPoint {
  readonly row: number;
  readonly column: number;
}

export interface Rectangle {
  readonly top: number;
  readonly left: number;
  readonly bottom: number;
  readonly right: number;
}

export interface GridSize {
  readonly rows: number;
  readonly columns: number;
}

export function rectangleOf(a: GridPoint, b: GridPoint): Rectangle {
  return {
    top: Math.min(a.row, b.row),
    bottom: Math.max(a.row, b.row),
    left: Math.min(a.column, b.column),
    right: Math.max(a.column, b.column),
  };
}

export function contains(rectangle: Rectangle, point: GridPoint): boolean {
  return (
    point.row >= rectangle.top &&
    point.row <= rectangle.bottom &&
    point.column >= rectangle.left &&
    point.column <= rectangle.right
  );
}

export function isSingle(rectangle: Rectangle): boolean {
  return rectangle.top === rectangle.bottom && rectangle.left === rectangle.right;
}

export function heightOf(rectangle: Rectangle): number {
  return rectangle.bottom - rectangle.top + 1;
}

export function widthOf(rectangle: Rectangle): number {
  return rectangle.right - rectangle.left + 1;
}

/** Row by row, left to right. */
export function pointsOf(rectangle: Rectangle): GridPoint[] {
  const points: GridPoint[] = [];
  for (let row = rectangle.top; row <= rectangle.bottom; row += 1) {
    for (let column = rectangle.left; column <= rectangle.right; column += 1) points.push({ row, column });
  }
  return points;
}

/** Stays inside the grid; there is no wrap at an edge. */
export function clampPoint(point: GridPoint, size: GridSize): GridPoint {
  return {
    row: Math.max(0, Math.min(size.rows - 1, point.row)),
    column: Math.max(0, Math.min(size.columns - 1, point.column)),
  };
}
