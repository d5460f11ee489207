import { degrees, PDFDocument } from 'pdf-lib';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { describe, expect, it } from 'vitest';
import { boxAsShown, type QuarterTurn, quarterTurn, withAir } from './box-map';
import type { PageFractions } from './types';

const CROP = { x: 30, y: 50, width: 400, height: 600 };
const BOX: PageFractions = [0.1, 0.2, 0.25, 0.24];

/** The same box through pdf.js: page points of the crop box into the viewport it would draw. */
async function throughPdfJs(turn: QuarterTurn, box: PageFractions): Promise<number[]> {
  const made = await PDFDocument.create();
  const sheet = made.addPage([500, 700]);
  sheet.setCropBox(CROP.x, CROP.y, CROP.width, CROP.height);
  sheet.setRotation(degrees(turn));
  const task = getDocument({ data: await made.save(), verbosity: 0 });
  const page = await (await task.promise).getPage(1);
  const viewport = page.getViewport({ scale: 1.7 });
  const [x0, y0, x1, y1] = box;
  const corner = (x: number, y: number): number[] =>
    viewport.convertToViewportPoint(CROP.x + x * CROP.width, CROP.y + CROP.height - y * CROP.height);
  const [ax = 0, ay = 0] = corner(x0, y0);
  const [bx = 0, by = 0] = corner(x1, y1);
  await task.destroy();
  return [
    Math.min(ax, bx) / viewport.width,
    Math.min(ay, by) / viewport.height,
    Math.max(ax, bx) / viewport.width,
    Math.max(ay, by) / viewport.height,
  ];
}

describe('boxAsShown', () => {
  it.each([0, 90, 180, 270] as const)('lies where pdf.js draws it on a cropped page turned by %i', async (turn) => {
    const expected = await throughPdfJs(turn, BOX);
    const shown = boxAsShown(BOX, turn);
    for (const [index, value] of shown.entries()) expect(value).toBeCloseTo(expected[index] ?? Number.NaN, 6);
  });

  it('turning the page by hand: the top left corner goes to the top right at 90', () => {
    expect(boxAsShown([0, 0, 0.1, 0.05], 90)).toEqual([0.95, 0, 1, 0.1]);
    expect(boxAsShown([0, 0, 0.1, 0.05], 180)).toEqual([0.9, 0.95, 1, 1]);
    expect(boxAsShown([0, 0, 0.1, 0.05], 270)).toEqual([0, 0.9, 0.05, 1]);
  });

  it('puts swapped corners in order', () => {
    expect(boxAsShown([0.25, 0.24, 0.1, 0.2], 0)).toEqual(BOX);
  });
});

describe('quarterTurn', () => {
  it.each([
    [0, 0],
    [90, 90],
    [-90, 270],
    [450, 90],
    [720, 0],
    [45, 0],
  ])('%i is %i', (given, turn) => {
    expect(quarterTurn(given)).toBe(turn);
  });
});

describe('withAir', () => {
  it('stays on the page', () => {
    expect(withAir([0, 0.5, 0.995, 0.6], { x: 0.01, y: 0.01 })).toEqual([0, 0.49, 1, 0.61]);
  });
});
