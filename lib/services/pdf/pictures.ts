import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import type { PDFDocumentProxy, PDFPageProxy } from 'pdfjs-dist';
import type { Grey } from '../pictures/types';

/** Points an inch at which a page is drawn: as its own picture has, within what type needs and memory bears. */
const LEAST_DPI = 120;
const MOST_DPI = 300;
const WITHOUT_PICTURE_DPI = 250;
const MOST_POINTS = 12_000_000;
/** A picture over this share of the page makes it a scan, even if a program stamped a few words on it. */
const COVERS = 0.6;

type Pictured = { readonly dpi: number | null; readonly cover: number };

/** Largest picture of a page: its own fineness and the share of the page that it covers. */
async function largestPicture(page: PDFPageProxy, OPS: Readonly<Record<string, number>>): Promise<Pictured> {
  const list = await page.getOperatorList();
  const [left = 0, bottom = 0, right = 0, top = 0] = page.view;
  const area = (right - left) * (top - bottom) || 1;
  const images = new Set([OPS.paintImageXObject, OPS.paintInlineImageXObject, OPS.paintImageMaskXObject]);
  let matrix = [1, 0, 0, 1, 0, 0];
  const kept: number[][] = [];
  let found: Pictured = { dpi: null, cover: 0 };
  for (const [index, op] of list.fnArray.entries()) {
    const args: unknown = list.argsArray[index];
    if (op === OPS.save) kept.push(matrix);
    else if (op === OPS.restore) matrix = kept.pop() ?? matrix;
    else if (op === OPS.transform && Array.isArray(args)) {
      const [a = 1, b = 0, c = 0, d = 1, e = 0, f = 0] = args.map(Number);
      const [ma = 1, mb = 0, mc = 0, md = 1, me = 0, mf = 0] = matrix;
      matrix = [
        ma * a + mc * b,
        mb * a + md * b,
        ma * c + mc * d,
        mb * c + md * d,
        ma * e + mc * f + me,
        mb * e + md * f + mf,
      ];
    } else if (images.has(op)) {
      const [a = 1, b = 0, c = 0, d = 1] = matrix;
      const cover = Math.abs(a * d - b * c) / area;
      if (cover <= found.cover) continue;
      const wide = Array.isArray(args) ? Number(args[1]) : Number.NaN;
      const side = Math.hypot(a, b) || 1;
      found = { cover, dpi: Number.isFinite(wide) && wide > 1 ? (wide / side) * 72 : null };
    }
  }
  return found;
}

function greyOf(pixels: Uint8ClampedArray, width: number, height: number): Grey {
  const data = new Uint8Array(width * height);
  for (let at = 0; at < data.length; at++) {
    const from = at * 4;
    data[at] = ((pixels[from] ?? 0) * 77 + (pixels[from + 1] ?? 0) * 150 + (pixels[from + 2] ?? 0) * 29) >> 8;
  }
  return { width, height, data };
}

/** pdf.js brings a canvas of its own; a second copy of that package in the process brings both down. */
function isFactory(
  value: unknown,
): value is { create(width: number, height: number): Drawing; destroy(drawing: Drawing): void } {
  return typeof value === 'object' && value !== null && 'create' in value && 'destroy' in value;
}

type Drawing = { canvas: HTMLCanvasElement; context: CanvasRenderingContext2D };

async function drawn(document: PDFDocumentProxy, page: PDFPageProxy, scale: number): Promise<Grey> {
  const factory: unknown = document.canvasFactory;
  if (!isFactory(factory)) throw new Error('No canvas to draw on.');
  const viewport = page.getViewport({ scale, rotation: 0 });
  const [width, height] = [Math.max(1, Math.round(viewport.width)), Math.max(1, Math.round(viewport.height))];
  const drawing = factory.create(width, height);
  try {
    await page.render({ canvas: null, canvasContext: drawing.context, viewport, background: '#ffffff' }).promise;
    return greyOf(drawing.context.getImageData(0, 0, width, height).data, width, height);
  } finally {
    factory.destroy(drawing);
  }
}

/** Null for a page that has no picture over it and need not be drawn, and for one so broken that it cannot be. */
async function pictureOf(
  document: PDFDocumentProxy,
  number: number,
  OPS: Readonly<Record<string, number>>,
  perhaps: boolean,
): Promise<Grey | null> {
  try {
    const page = await document.getPage(number);
    const { dpi, cover } = await largestPicture(page, OPS);
    let picture: Grey | null = null;
    if (!perhaps || cover >= COVERS) {
      const flat = page.getViewport({ scale: 1, rotation: 0 });
      const wanted = dpi === null || cover < 0.2 ? WITHOUT_PICTURE_DPI : Math.min(MOST_DPI, Math.max(LEAST_DPI, dpi));
      const scale = Math.min(wanted / 72, Math.sqrt(MOST_POINTS / (flat.width * flat.height)));
      picture = await drawn(document, page, scale);
    }
    page.cleanup();
    return picture;
  } catch {
    return null;
  }
}

/**
 * Draws pages of a PDF as pictures, as stored: crop box, /Rotate not applied. `numbers` are the pages without a text
 * layer; `perhaps` those with a few words only, which are drawn when a picture covers them. One page at a time is held.
 */
export async function picturesOfPdf(input: {
  bytes: Uint8Array;
  numbers: readonly number[];
  perhaps: readonly number[];
  onPicture: (number: number, picture: Grey) => Promise<void>;
}): Promise<void> {
  const { getDocument, OPS } = await import('pdfjs-dist/legacy/build/pdf.mjs');
  const root = dirname(createRequire(import.meta.url).resolve('pdfjs-dist/package.json'));
  const task = getDocument({
    data: Uint8Array.from(input.bytes),
    standardFontDataUrl: `${join(root, 'standard_fonts')}/`,
    cMapUrl: `${join(root, 'cmaps')}/`,
    wasmUrl: `${join(root, 'wasm')}/`,
    iccUrl: `${join(root, 'iccs')}/`,
    disableFontFace: true,
    useSystemFonts: false,
    enableXfa: false,
    maxImageSize: 40_000_000,
    verbosity: 0,
  });
  try {
    const document = await task.promise;
    for (const number of [...input.numbers, ...input.perhaps].sort((a, b) => a - b)) {
      const picture = await pictureOf(document, number, OPS, input.perhaps.includes(number));
      if (picture !== null) await input.onPicture(number, picture);
    }
  } finally {
    await task.destroy();
  }
}
