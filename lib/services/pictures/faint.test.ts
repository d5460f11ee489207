import { describe, expect, it } from 'vitest';
import { withDarkType } from './faint';
import { flatten } from './light';
import { isTwoToned, withoutSpecks } from './specks';
import type { Grey } from './types';

function sheet(width: number, height: number, shade: (x: number, y: number) => number): Grey {
  const data = new Uint8Array(width * height);
  for (let y = 0; y < height; y++) for (let x = 0; x < width; x++) data[y * width + x] = shade(x, y);
  return { width, height, data };
}
const at = (picture: Grey, x: number, y: number) => picture.data[y * picture.width + x] ?? -1;
const isType = (x: number, y: number) => x > 40 && x < 360 && y % 40 < 14 && x % 16 < 4;

describe('faded type', () => {
  it('becomes as dark as fresh type, on paper that becomes white', () => {
    const flat = flatten(
      sheet(400, 400, (x, y) => (isType(x, y) ? 190 : 245)),
      48,
    );
    expect(at(flat, 50, 5)).toBeLessThan(80);
    expect(at(flat, 10, 5)).toBe(255);
  });
  it('stays a shade where the type is fresh', () => {
    const shaded = sheet(400, 400, (x, y) => (isType(x, y) ? 20 : y > 300 && y < 312 ? 190 : 245));
    expect(at(flatten(shaded, 48), 10, 305)).toBeGreaterThan(190);
  });
  it('leaves paper without type as it is', () => {
    const blank = sheet(400, 400, (x, y) => 235 + ((x * 7 + y * 13) % 5));
    expect(flatten(blank, 48).data.reduce((least, value) => Math.min(least, value), 255)).toBeGreaterThan(240);
  });
  it('is darkened piece by piece beside black type, and fills are not', () => {
    const mixed = sheet(400, 200, (x, y) => {
      if (y >= 20 && y < 40 && x >= 20 && x < 26) return 0;
      if (y >= 20 && y < 40 && x >= 60 && x < 66) return 160;
      return y >= 100 && x >= 20 && x < 380 ? 160 : 255;
    });
    const dark = withDarkType(mixed, 20);
    expect(at(dark, 62, 30)).toBeLessThan(60);
    expect(at(dark, 22, 30)).toBe(0);
    expect(at(dark, 200, 150)).toBe(160);
  });
});

describe('specks of a fax', () => {
  const strewn = sheet(600, 600, (x, y) => {
    if (x > 100 && x < 120 && y > 100 && y < 130) return 0;
    if (x >= 130 && x < 135 && y >= 125 && y < 130) return 0;
    return x % 30 === 3 && y % 30 === 3 ? 0 : 255;
  });
  it('go, and the letter and its point stay', () => {
    const clean = withoutSpecks(strewn, 32);
    expect(at(clean, 33, 33)).toBe(255);
    expect(at(clean, 110, 115)).toBe(0);
    expect(at(clean, 132, 127)).toBe(0);
  });
  it('are looked for only where there are no greys', () => {
    expect(isTwoToned(strewn)).toBe(true);
    expect(isTwoToned(sheet(100, 100, (x) => (x % 10 === 0 ? 120 : 255)))).toBe(false);
  });
});
