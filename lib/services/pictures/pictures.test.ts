import { describe, expect, it } from 'vitest';
import { flatten, inkOf } from './light';
import { carry, chain, inverse, rectangleToQuad, shifting, turning } from './matrix';
import { findPage } from './page';
import { lettersOf, piecesOf } from './pieces';
import { prepare } from './prepare';
import { withoutRules } from './rules';
import { runsUpright, skewOf } from './straight';
import type { Grey, Quad } from './types';

function sheet(width: number, height: number, shade: (x: number, y: number) => number): Grey {
  const data = new Uint8Array(width * height);
  for (let y = 0; y < height; y++) for (let x = 0; x < width; x++) data[y * width + x] = shade(x, y);
  return { width, height, data };
}

/** Lines of blocks as high as letters, 12 wide with a gap of 4, as text would stand. */
function textLike(x: number, y: number): boolean {
  return x > 60 && x < 540 && y > 60 && y < 700 && y % 40 < 14 && x % 16 < 12 && Math.floor(x / 80) % 3 !== 2;
}

const QUAD: Quad = [
  { x: 80, y: 60 },
  { x: 520, y: 95 },
  { x: 560, y: 740 },
  { x: 50, y: 700 },
];

describe('projective maps', () => {
  it('take the corners of a rectangle onto the corners of the quadrilateral, and back', () => {
    const map = rectangleToQuad(300, 400, QUAD);
    for (const [x, y, corner] of [
      [0, 0, QUAD[0]],
      [300, 0, QUAD[1]],
      [300, 400, QUAD[2]],
      [0, 400, QUAD[3]],
    ] as const) {
      const there = carry(map, x, y);
      expect(there.x).toBeCloseTo(corner.x, 6);
      expect(there.y).toBeCloseTo(corner.y, 6);
      const back = carry(inverse(map), there.x, there.y);
      expect(back.x).toBeCloseTo(x, 6);
      expect(back.y).toBeCloseTo(y, 6);
    }
  });

  it('are done from the last to the first', () => {
    const at = carry(chain(shifting(10, 0), turning(Math.PI / 2)), 1, 0);
    expect(at.x).toBeCloseTo(10, 9);
    expect(at.y).toBeCloseTo(1, 9);
  });
});

describe('a photograph', () => {
  const inside = inverse(rectangleToQuad(1, 1, QUAD));
  const photo = sheet(600, 800, (x, y) => {
    const at = carry(inside, x, y);
    const paper = at.x > 0 && at.x < 1 && at.y > 0 && at.y < 1;
    const shadow = 1 - 0.45 / (1 + Math.exp(-(x / 600 + y / 800 - 1) * 20));
    return Math.round((paper ? 235 : 90 + 8 * Math.sin(x / 9)) * shadow);
  });

  it('shows its sheet although a shadow darkens half of it', () => {
    const found = findPage(photo);
    expect(found).not.toBeNull();
    for (const [index, corner] of (found ?? []).entries()) {
      expect(Math.abs(corner.x - (QUAD[index]?.x ?? 0))).toBeLessThan(5);
      expect(Math.abs(corner.y - (QUAD[index]?.y ?? 0))).toBeLessThan(5);
    }
  });

  it('has no sheet in it when it is the sheet', () => {
    expect(findPage(sheet(600, 800, (x, y) => (textLike(x, y) ? 30 : 250)))).toBeNull();
  });

  it('loses its shadow when it is divided by the light of its paper', () => {
    const flat = flatten(photo, 24);
    const at = (x: number, y: number) => flat.data[y * 600 + x] ?? 0;
    expect(photo.data[600 * 600 + 450]).toBeLessThan(160);
    expect(at(450, 600)).toBeGreaterThan(240);
    expect(at(150, 150)).toBeGreaterThan(240);
  });
});

describe('straightening', () => {
  const lettersAt = (degrees: number, upright: boolean) => {
    const [c, s] = [Math.cos((degrees * Math.PI) / 180), Math.sin((degrees * Math.PI) / 180)];
    const picture = sheet(600, 800, (x, y) => {
      const [u, v] = [(x - 300) * c + (y - 400) * s + 300, -(x - 300) * s + (y - 400) * c + 400];
      return (upright ? textLike(v - 60, u + 60) : textLike(Math.round(u), Math.round(v))) ? 20 : 255;
    });
    return lettersOf(piecesOf(inkOf(picture)));
  };

  it.each([-4, -1.5, 0, 0.6, 3])('finds a skew of %f degrees', (degrees) => {
    expect((skewOf(lettersAt(degrees, false)) * 180) / Math.PI).toBeCloseTo(degrees, 0);
  });

  it('tells lines that run up the page from lines that run across', () => {
    expect(runsUpright(lettersAt(0, false))).toBe(false);
    expect(runsUpright(lettersAt(0, true))).toBe(true);
  });

  it('knows where each point of the prepared picture stands on the page as it came', () => {
    const prepared = prepare(
      sheet(600, 800, (x, y) => (textLike(x, y) ? 20 : 255)),
      true,
    );
    expect(prepared).not.toBeNull();
    if (prepared === null) return;
    const { width, height } = prepared.picture;
    const [a, b] = [carry(prepared.toStored, 0, 0), carry(prepared.toStored, width, height)];
    // The part with type: 60 to 540 across and 80 to 700 down, with a little room.
    expect(a.x * 600).toBeGreaterThan(20);
    expect(a.x * 600).toBeLessThan(66);
    expect(b.x * 600).toBeGreaterThan(528);
    expect(b.y * 800).toBeGreaterThan(690);
  });

  it('finds nothing to prepare on an empty page', () => {
    expect(
      prepare(
        sheet(600, 800, () => 250),
        true,
      ),
    ).toBeNull();
  });
});

describe('ruling lines', () => {
  const ruled = sheet(400, 300, (x, y) => {
    const letter = y >= 100 && y < 130 && x % 30 < 16 && x > 40 && x < 360;
    const line = Math.abs(y - 60) < 2 || Math.abs(y - 200) < 2 || Math.abs(x - 20) < 2 || Math.abs(x - 380) < 2;
    return letter || line ? 10 : 255;
  });

  it('are wiped with their crossings, and letters stay', () => {
    const clean = withoutRules(ruled, inkOf(ruled, 220), 30);
    const dark = (x: number, y: number) => (clean.data[y * 400 + x] ?? 255) < 128;
    expect(dark(200, 60)).toBe(false);
    expect(dark(20, 150)).toBe(false);
    expect(dark(20, 60)).toBe(false);
    expect(dark(380, 200)).toBe(false);
    expect(dark(65, 115)).toBe(true);
    expect(dark(305, 115)).toBe(true);
  });
});
