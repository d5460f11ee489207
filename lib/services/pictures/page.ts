import { shrink } from './grey';
import { otsu } from './light';
import { piecesOf } from './pieces';
import type { Grey, Ink, Point, Quad } from './types';

/** The page is looked for on a picture this long. */
const LOOK = 480;

function cross(o: Point, a: Point, b: Point): number {
  return (a.x - o.x) * (b.y - o.y) - (a.y - o.y) * (b.x - o.x);
}

/** Convex hull, clockwise on a page whose y runs down (Andrew's monotone chain). */
function hullOf(points: readonly Point[]): Point[] {
  const sorted = [...points].sort((a, b) => a.x - b.x || a.y - b.y);
  const half = (list: readonly Point[]) => {
    const out: Point[] = [];
    for (const point of list) {
      for (;;) {
        const [a, b] = [out[out.length - 2], out[out.length - 1]];
        if (a === undefined || b === undefined || cross(a, b, point) > 0) break;
        out.pop();
      }
      out.push(point);
    }
    return out.slice(0, -1);
  };
  return [...half(sorted), ...half([...sorted].reverse())];
}

function areaOf(points: readonly Point[]): number {
  let sum = 0;
  for (const [index, point] of points.entries()) {
    const next = points[(index + 1) % points.length] ?? point;
    sum += point.x * next.y - next.x * point.y;
  }
  return Math.abs(sum) / 2;
}

/** The hull with corners taken away, the least missed first, until four are left. */
function fourCorners(hull: readonly Point[]): Point[] {
  const left = [...hull];
  while (left.length > 4) {
    let [least, at] = [Number.POSITIVE_INFINITY, 0];
    for (const [index, point] of left.entries()) {
      const before = left[(index + left.length - 1) % left.length] ?? point;
      const after = left[(index + 1) % left.length] ?? point;
      const loss = Math.abs(cross(before, point, after));
      if (loss < least) [least, at] = [loss, index];
    }
    left.splice(at, 1);
  }
  return left;
}

type Side = { readonly point: Point; readonly way: Point };

/** Least-squares line through the hull's points along one side, away from its corners, where paper curls. */
function sideThrough(points: readonly Point[], a: Point, b: Point): Side {
  const length = Math.hypot(b.x - a.x, b.y - a.y) || 1;
  const [ux, uy] = [(b.x - a.x) / length, (b.y - a.y) / length];
  const near = points.filter((point) => {
    const along = ((point.x - a.x) * ux + (point.y - a.y) * uy) / length;
    const off = Math.abs((point.x - a.x) * -uy + (point.y - a.y) * ux);
    return along > 0.06 && along < 0.94 && off < Math.max(2, 0.012 * length);
  });
  if (near.length < 6) return { point: a, way: { x: ux, y: uy } };
  const mx = near.reduce((sum, point) => sum + point.x, 0) / near.length;
  const my = near.reduce((sum, point) => sum + point.y, 0) / near.length;
  let [xx, xy, yy] = [0, 0, 0];
  for (const point of near) {
    xx += (point.x - mx) ** 2;
    xy += (point.x - mx) * (point.y - my);
    yy += (point.y - my) ** 2;
  }
  const angle = Math.atan2(2 * xy, xx - yy) / 2;
  return { point: { x: mx, y: my }, way: { x: Math.cos(angle), y: Math.sin(angle) } };
}

function meet(a: Side, b: Side): Point | null {
  const det = a.way.x * b.way.y - a.way.y * b.way.x;
  if (Math.abs(det) < 0.2) return null;
  const t = ((b.point.x - a.point.x) * b.way.y - (b.point.y - a.point.y) * b.way.x) / det;
  return { x: a.point.x + t * a.way.x, y: a.point.y + t * a.way.y };
}

/** First and last bright points of every row and column of the page's piece. */
function outline(bright: Ink): Point[] {
  const points: Point[] = [];
  const { width, height, data } = bright;
  for (let y = 0; y < height; y++) {
    let [first, last] = [-1, -1];
    for (let x = 0; x < width; x++) {
      if (data[y * width + x] !== 1) continue;
      if (first < 0) first = x;
      last = x;
    }
    if (first >= 0) points.push({ x: first, y: y + 0.5 }, { x: last + 1, y: y + 0.5 });
  }
  for (let x = 0; x < width; x++) {
    let [first, last] = [-1, -1];
    for (let y = 0; y < height; y++) {
      if (data[y * width + x] !== 1) continue;
      if (first < 0) first = y;
      last = y;
    }
    if (first >= 0) points.push({ x: x + 0.5, y: first }, { x: x + 0.5, y: last + 1 });
  }
  return points;
}

/** Only the piece of brightness that holds most points: the sheet, and not the lamp beside it. */
function sheetOf(small: Grey, limit: number): Ink {
  const { width, height } = small;
  const data = new Uint8Array(width * height);
  for (let at = 0; at < data.length; at++) data[at] = (small.data[at] ?? 0) > limit ? 1 : 0;
  const largest = piecesOf({ width, height, data }).sort((a, b) => b.area - a.area)[0];
  if (largest === undefined) return { width, height, data: new Uint8Array(width * height) };
  // Flood from a point of the largest piece.
  const keep = new Uint8Array(width * height);
  let seed = -1;
  const labels = new Uint8Array(data);
  for (let start = 0; start < data.length && seed < 0; start++) {
    if (labels[start] !== 1) continue;
    const stack = [start];
    const members: number[] = [];
    labels[start] = 2;
    while (stack.length > 0) {
      const at = stack.pop() ?? 0;
      members.push(at);
      const x = at % width;
      for (const next of [x > 0 ? at - 1 : -1, x < width - 1 ? at + 1 : -1, at - width, at + width]) {
        if (next >= 0 && next < data.length && labels[next] === 1) {
          labels[next] = 2;
          stack.push(next);
        }
      }
    }
    if (members.length < largest.area * 0.5) continue;
    seed = start;
    for (const at of members) keep[at] = 1;
  }
  return { width, height, data: keep };
}

/** The sheet grown from the middle: a shadow darkens step by step and is crossed, the edge of the paper is not. */
function grown(small: Grey, most: number): Ink {
  const { width, height } = small;
  const light = new Float32Array(width * height);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      // The brightest point around: thin type does not stop the growth.
      let brightest = 1;
      for (let dy = -1; dy <= 1; dy++)
        for (let dx = -1; dx <= 1; dx++) {
          const [px, py] = [Math.min(width - 1, Math.max(0, x + dx)), Math.min(height - 1, Math.max(0, y + dy))];
          brightest = Math.max(brightest, small.data[py * width + px] ?? 0);
        }
      light[y * width + x] = Math.log(brightest + 8);
    }
  }
  const data = new Uint8Array(width * height);
  let seed = Math.floor(height / 2) * width + Math.floor(width / 2);
  for (let dy = -8; dy <= 8; dy++)
    for (let dx = -8; dx <= 8; dx++) {
      const at = (Math.floor(height / 2) + dy) * width + Math.floor(width / 2) + dx;
      if ((light[at] ?? 0) > (light[seed] ?? 0)) seed = at;
    }
  const stack = [seed];
  data[seed] = 1;
  while (stack.length > 0) {
    const at = stack.pop() ?? 0;
    const x = at % width;
    for (const next of [x > 0 ? at - 1 : -1, x < width - 1 ? at + 1 : -1, at - width, at + width]) {
      if (next < 0 || next >= data.length || data[next] === 1) continue;
      if (Math.abs((light[next] ?? 0) - (light[at] ?? 0)) > most) continue;
      data[next] = 1;
      stack.push(next);
    }
  }
  return { width, height, data };
}

/** Share of the quadrilateral's outline at which it is clearly brighter just inside than just outside, worst side first. */
function edgeOf(small: Grey, quad: Quad): { worst: number; mean: number } {
  const middle = {
    x: quad.reduce((sum, point) => sum + point.x, 0) / 4,
    y: quad.reduce((sum, point) => sum + point.y, 0) / 4,
  };
  const shade = (x: number, y: number) => {
    const [px, py] = [Math.round(x), Math.round(y)];
    return px < 0 || py < 0 || px >= small.width || py >= small.height
      ? null
      : (small.data[py * small.width + px] ?? 0);
  };
  const shares = quad.map((a, index) => {
    const b = quad[(index + 1) % 4] ?? a;
    const length = Math.hypot(b.x - a.x, b.y - a.y) || 1;
    let [nx, ny] = [-(b.y - a.y) / length, (b.x - a.x) / length];
    if ((middle.x - a.x) * nx + (middle.y - a.y) * ny < 0) [nx, ny] = [-nx, -ny];
    let [good, all] = [0, 0];
    for (let step = 0; step < 60; step++) {
      const t = 0.04 + (0.92 * step) / 59;
      const [x, y] = [a.x + (b.x - a.x) * t, a.y + (b.y - a.y) * t];
      const [inside, outside] = [shade(x + 3 * nx, y + 3 * ny), shade(x - 3 * nx, y - 3 * ny)];
      // A side that runs out of the picture says nothing for or against.
      if (inside === null || outside === null) continue;
      all += 1;
      if (inside > outside * 1.12 + 4) good += 1;
    }
    return all < 10 ? 0.6 : good / all;
  });
  return { worst: Math.min(...shares), mean: shares.reduce((sum, share) => sum + share, 0) / 4 };
}

function quadFrom(sheet: Ink): Quad | null {
  const points = outline(sheet);
  const rough = fourCorners(hullOf(points));
  const [a, b, c, d] = rough;
  if (a === undefined || b === undefined || c === undefined || d === undefined) return null;
  const corners = [a, b, c, d];
  const sides = corners.map((corner, index) => sideThrough(points, corner, corners[(index + 1) % 4] ?? corner));
  const met = corners.map((_, index) => {
    const [before, after] = [sides[(index + 3) % 4], sides[index]];
    return before === undefined || after === undefined ? null : meet(before, after);
  });
  const [p, q, r, s] = met;
  if (!p || !q || !r || !s) return null;
  // From the corner nearest the top left of the picture, clockwise.
  const clockwise = cross(p, q, r) > 0 ? [p, q, r, s] : [p, s, r, q];
  const first = clockwise.reduce((best, point, index) => {
    const other = clockwise[best] ?? point;
    return point.x + point.y < other.x + other.y ? index : best;
  }, 0);
  const [tl, tr, br, bl] = [0, 1, 2, 3].map((index) => clockwise[(first + index) % 4]);
  return tl && tr && br && bl ? [tl, tr, br, bl] : null;
}

function likelyPage(quad: Quad, width: number, height: number): boolean {
  for (let index = 0; index < 4; index++) {
    const [a, b, c] = [quad[index], quad[(index + 1) % 4], quad[(index + 2) % 4]];
    if (a === undefined || b === undefined || c === undefined) return false;
    const [ux, uy, vx, vy] = [a.x - b.x, a.y - b.y, c.x - b.x, c.y - b.y];
    const angle = Math.acos((ux * vx + uy * vy) / (Math.hypot(ux, uy) * Math.hypot(vx, vy) || 1));
    if (angle < 0.9 || angle > 2.25) return false;
  }
  const margin = 0.08;
  return quad.every(
    (point) =>
      point.x > -margin * width &&
      point.x < (1 + margin) * width &&
      point.y > -margin * height &&
      point.y < (1 + margin) * height,
  );
}

/**
 * The sheet of paper in a photograph, as its four corners, or null when the picture is the page itself (a scan, or a
 * photograph whose edges cannot be told). Sheets found by brightness and by growth are tried; a real one has a clear edge.
 */
export function findPage(picture: Grey): Quad | null {
  const by = Math.max(1, Math.floor(Math.max(picture.width, picture.height) / LOOK));
  const small = shrink(picture, by);
  const middle = otsu(small.data);
  const sheets = [
    ...[0.7, 0.85, 1, 1.12].map((share) => () => sheetOf(small, middle * share)),
    ...[0.05, 0.08, 0.12].map((most) => () => grown(small, most)),
  ];
  let found: { quad: Quad; score: number } | null = null;
  for (const sheet of sheets) {
    const quad = quadFrom(sheet());
    if (quad === null || !likelyPage(quad, small.width, small.height)) continue;
    const share = areaOf(quad) / (small.width * small.height);
    if (share < 0.2 || share > 0.985) continue;
    const { worst, mean } = edgeOf(small, quad);
    if (worst < 0.45 || mean < 0.7) continue;
    const score = mean + 0.5 * worst + 0.2 * share;
    if (found === null || score > found.score) found = { quad, score };
  }
  if (found === null) return null;
  const [tl, tr, br, bl] = found.quad.map((point) => ({ x: point.x * by, y: point.y * by }));
  return tl && tr && br && bl ? [tl, tr, br, bl] : null;
}

/** Size of the sheet as it would lie flat: the longer of each pair of sides. */
export function flatSize(quad: Quad): { width: number; height: number } {
  const far = (a: Point, b: Point) => Math.hypot(a.x - b.x, a.y - b.y);
  const [tl, tr, br, bl] = quad;
  return { width: Math.max(far(tl, tr), far(bl, br)), height: Math.max(far(tl, bl), far(tr, br)) };
}
