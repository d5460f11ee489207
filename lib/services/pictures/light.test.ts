import { describe, expect, it } from 'vitest';
import { flatten } from './light';
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
});
