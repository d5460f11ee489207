import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { INK, SERIES, seriesStyle } from './palette';

const tokens = readFileSync(new URL('../styles/tokens.css', import.meta.url), 'utf8');
const token = (name: string) => new RegExp(`--color-${name}:\\s*(#[0-9a-f]{6});`, 'i').exec(tokens)?.[1]?.toUpperCase();

describe('chart colours', () => {
  it('are those of the tokens', () => {
    SERIES.forEach((style, index) => {
      expect(token(`series-${index + 1}`)).toBe(style.colour);
    });
    expect(token('gley')).toBe(INK.gley);
    expect(token('gley-wash')).toBe(INK.gleyWash);
    expect(token('humus')).toBe(INK.humus);
    expect(token('clay')).toBe(INK.clay);
    expect(token('fallow')).toBe(INK.fallow);
    expect(token('chalk')).toBe(INK.chalk);
    expect(token('core-red')).toBe(INK.redHorizon);
  });

  it('never share a marker, so that grey prints stay readable', () => {
    expect(new Set(SERIES.map((s) => s.marker)).size).toBe(SERIES.length);
    expect(seriesStyle(6)).toBe(SERIES[0]);
  });
});
