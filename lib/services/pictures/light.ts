import type { Grey, Ink } from './types';

/** A field of light is taken to be at least this share of the light around it; what is darker is a dark fill, not a shadow. */
const DARKEST_SHADOW = 0.42;
/** Share of a block's points that may be brighter than the paper (specks, glare). */
const BRIGHT = 0.85;

/** Paper is put a little beyond white, so that its grain is lost. */
const WHITE = 1 / 1.12;
/** The same for faded type, whose hair strokes are not much darker than the paper. */
const FADED_WHITE = 0.955;
/** Type lighter than this share of its paper has faded. */
const FADED = 0.5;

type Field = { width: number; height: number; data: Float32Array };

function blurred(field: Field, radius: number): Field {
  const once = (from: Float32Array, width: number, height: number, step: number, across: number): Float32Array => {
    const out = new Float32Array(from.length);
    for (let line = 0; line < height; line++) {
      for (let at = 0; at < width; at++) {
        let [sum, count] = [0, 0];
        for (let k = Math.max(0, at - radius); k <= Math.min(width - 1, at + radius); k++) {
          sum += from[line * across + k * step] ?? 0;
          count += 1;
        }
        out[line * across + at * step] = sum / count;
      }
    }
    return out;
  };
  const rows = once(field.data, field.width, field.height, 1, field.width);
  return { ...field, data: once(rows, field.height, field.width, field.width, 1) };
}

/** The paper's brightness, block by block: the bright end of each block, with its neighbours' for blocks full of ink. */
function paperOf(picture: Grey, block: number): Field {
  const width = Math.ceil(picture.width / block);
  const height = Math.ceil(picture.height / block);
  const raw = new Float32Array(width * height);
  const counts = new Uint32Array(256);
  for (let by = 0; by < height; by++) {
    for (let bx = 0; bx < width; bx++) {
      counts.fill(0);
      let total = 0;
      for (let y = by * block; y < Math.min(picture.height, (by + 1) * block); y += 2) {
        for (let x = bx * block; x < Math.min(picture.width, (bx + 1) * block); x += 2) {
          const value = picture.data[y * picture.width + x] ?? 0;
          counts[value] = (counts[value] ?? 0) + 1;
          total += 1;
        }
      }
      let [value, below] = [0, counts[0] ?? 0];
      while (value < 255 && below < total * BRIGHT) below += counts[++value] ?? 0;
      raw[by * width + bx] = value;
    }
  }
  const wide = blurred({ width, height, data: raw }, Math.max(3, Math.round(Math.max(width, height) / 8)));
  const floor = raw.map((value, index) => Math.max(value, DARKEST_SHADOW * (wide.data[index] ?? 0)));
  return blurred({ width, height, data: floor }, 1);
}

/** The value below which so many of the counted lie. */
function quantile(counts: Uint32Array, wanted: number): number {
  let [value, below] = [0, counts[0] ?? 0];
  while (value < counts.length - 1 && below < wanted) below += counts[++value] ?? 0;
  return value;
}

/**
 * Which share of the paper's brightness becomes black and which white. Type that has faded is darkened until it is as dark
 * as fresh type; a page with enough dark ink on it stays as it is, so that its shades do not turn black.
 */
function toneOf(shares: Float32Array): { black: number; white: number } {
  const usual = { black: 0, white: WHITE };
  const counts = new Uint32Array(512);
  let total = 0;
  for (let at = 0; at < shares.length; at += 3) {
    const step = Math.min(511, Math.floor((shares[at] ?? 0) * 256));
    counts[step] = (counts[step] ?? 0) + 1;
    total += 1;
  }
  const share = (step: number) => (step + 0.5) / 256;
  const paper = share(quantile(counts, total / 2));
  const white = Math.max(WHITE, Math.min(FADED_WHITE, paper - 2 * Math.max(0, 1 - paper)));
  const type = counts.subarray(0, Math.floor(white * 256) - 4).reduce((sum, count) => sum + count, 0);
  if (type < 0.002 * total) return usual;
  const ink = share(Math.min(quantile(counts, 0.15 * type), quantile(counts, 0.005 * total)));
  return ink < FADED ? usual : { black: ink - 0.12 * (white - ink), white };
}

/** Divides the picture by the brightness of its paper, so that shadows and yellowed paper become white and faded type dark. */
export function flatten(picture: Grey, block: number): Grey {
  const paper = paperOf(picture, block);
  const shares = new Float32Array(picture.data.length);
  for (let y = 0; y < picture.height; y++) {
    const fy = Math.min(paper.height - 1, Math.max(0, (y + 0.5) / block - 0.5));
    const [top, ty] = [Math.floor(fy), fy - Math.floor(fy)];
    const [row0, row1] = [top * paper.width, Math.min(paper.height - 1, top + 1) * paper.width];
    for (let x = 0; x < picture.width; x++) {
      const fx = Math.min(paper.width - 1, Math.max(0, (x + 0.5) / block - 0.5));
      const [left, tx] = [Math.floor(fx), fx - Math.floor(fx)];
      const right = Math.min(paper.width - 1, left + 1);
      const upper = (paper.data[row0 + left] ?? 0) * (1 - tx) + (paper.data[row0 + right] ?? 0) * tx;
      const lower = (paper.data[row1 + left] ?? 0) * (1 - tx) + (paper.data[row1 + right] ?? 0) * tx;
      const light = Math.max(8, upper * (1 - ty) + lower * ty);
      const at = y * picture.width + x;
      shares[at] = (picture.data[at] ?? 0) / light;
    }
  }
  const { black, white } = toneOf(shares);
  const data = new Uint8Array(shares.length);
  const by = 255 / (white - black);
  for (let at = 0; at < data.length; at++)
    data[at] = Math.max(0, Math.min(255, Math.round(by * ((shares[at] ?? 0) - black))));
  return { ...picture, data };
}

/** The threshold that parts dark from bright best (Otsu 1979). */
export function otsu(data: Uint8Array): number {
  const counts = new Float64Array(256);
  for (const value of data) counts[value] = (counts[value] ?? 0) + 1;
  const total = data.length;
  const mean = counts.reduce((sum, count, value) => sum + count * value, 0);
  let [below, sumBelow, best, at] = [0, 0, -1, 128];
  for (let value = 0; value < 256; value++) {
    below += counts[value] ?? 0;
    sumBelow += (counts[value] ?? 0) * value;
    if (below === 0 || below === total) continue;
    const gap = sumBelow / below - (mean - sumBelow) / (total - below);
    const between = below * (total - below) * gap * gap;
    if (between > best) [best, at] = [between, value];
  }
  return at;
}

/** A threshold in a sensible band, so that a blank page yields no ink of noise. */
function usualLimit(flat: Grey): number {
  return Math.min(190, Math.max(110, otsu(flat.data)));
}

/** Faint enough for a grey hairline, dark enough for the grain of the paper. */
export const HAIRLINE = 222;

/** Ink of a flattened picture: what is as dark as its type, or as the limit says. */
export function inkOf(flat: Grey, limit = usualLimit(flat)): Ink {
  const data = new Uint8Array(flat.data.length);
  for (let at = 0; at < data.length; at++) data[at] = (flat.data[at] ?? 255) <= limit ? 1 : 0;
  return { width: flat.width, height: flat.height, data };
}
