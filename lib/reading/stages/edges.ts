/** An upright edge between two parts of a page that have lines of their own, and the height over which it stands. */
export type Edge = { readonly x: number; readonly y0: number; readonly y1: number };

/** Which part a place belongs to: 0 outside all edges' heights, else one more than the edges left of it. */
export function partAt(edges: readonly Edge[], x: number, y: number): number {
  const standing = edges.filter((edge) => y > edge.y0 && y < edge.y1);
  return standing.length === 0 ? 0 : 1 + standing.filter((edge) => edge.x < x).length;
}
