import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const css = readFileSync(new URL('./styles/tokens.css', import.meta.url), 'utf8');
const tokens = new Map(
  [...css.matchAll(/--color-([a-z0-9-]+):\s*(#[0-9a-f]{6})/g)].map((m) => [m[1] ?? '', m[2] ?? '']),
);

/** Relative luminance and contrast ratio as defined in WCAG 2.2 (W3C Recommendation, 2023), "relative luminance". */
function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const s = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return s <= 0.04045 ? s / 12.92 : ((s + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * (r ?? 0) + 0.7152 * (g ?? 0) + 0.0722 * (b ?? 0);
}

function contrast(a: string, b: string): number {
  const value = (name: string) => {
    const hex = tokens.get(name);
    if (!hex) throw new Error(`no token ${name}`);
    return luminance(hex);
  };
  const [high, low] = [value(a), value(b)].sort((x, y) => y - x);
  return ((high ?? 0) + 0.05) / ((low ?? 0) + 0.05);
}

describe('contrast formula', () => {
  it('gives 21 for black on white, the largest ratio WCAG allows', () => {
    expect((luminance('#ffffff') + 0.05) / (luminance('#000000') + 0.05)).toBeCloseTo(21, 10);
  });
});

describe('text pairs reach 4.5:1 (WCAG 2.2, 1.4.3)', () => {
  const pairs: [string, string][] = [
    ...['chalk', 'white', 'silt', 'gley-wash', 'ochre-wash', 'iron-wash', 'lichen-wash'].map((g): [string, string] => [
      'humus',
      g,
    ]),
    ...['chalk', 'white', 'silt', 'gley-wash', 'ochre-wash', 'iron-wash', 'lichen-wash'].map((g): [string, string] => [
      'clay',
      g,
    ]),
    ...['chalk', 'white', 'silt', 'gley-wash'].map((g): [string, string] => ['gley', g]),
    ...['gley', 'gley-deep', 'iron', 'iron-deep', 'lichen', 'ochre', 'peat'].map((g): [string, string] => ['chalk', g]),
    ['ochre', 'chalk'],
    ['ochre', 'ochre-wash'],
    ['iron', 'chalk'],
    ['iron', 'white'],
    ['iron', 'iron-wash'],
    ['lichen', 'chalk'],
    ['lichen', 'lichen-wash'],
    ['lamp', 'peat'],
    ['horizon-5', 'peat'],
  ];
  it.each(pairs)('%s on %s', (text, ground) => {
    expect(contrast(text, ground)).toBeGreaterThanOrEqual(4.5);
  });
});

describe('lines, edges, markers and the focus ring reach 3:1 (WCAG 2.2, 1.4.11)', () => {
  const pairs: [string, string][] = [
    ['fallow', 'chalk'],
    ['fallow', 'white'],
    ['fallow', 'silt'],
    ['gley', 'chalk'],
    ['gley', 'white'],
    ['lamp', 'peat'],
    ['gley', 'gley-wash'],
    ...[1, 2, 3, 4, 5, 6].flatMap((n): [string, string][] => [
      [`series-${n}`, 'chalk'],
      [`series-${n}`, 'white'],
    ]),
  ];
  it.each(pairs)('%s on %s', (line, ground) => {
    expect(contrast(line, ground)).toBeGreaterThanOrEqual(3);
  });
});

describe('the ratios the design was chosen for', () => {
  it.each([
    ['humus', 'chalk', 16.07],
    ['humus', 'white', 17.16],
    ['humus', 'silt', 13.98],
    ['clay', 'chalk', 7.53],
    ['clay', 'silt', 6.56],
    ['fallow', 'chalk', 4.06],
    ['gley', 'chalk', 8.47],
    ['gley', 'white', 9.04],
    ['gley', 'gley-wash', 7.3],
    ['ochre', 'chalk', 5.98],
    ['ochre', 'ochre-wash', 5.2],
    ['iron', 'chalk', 7.79],
    ['iron', 'iron-wash', 6.43],
    ['lichen', 'chalk', 7.07],
    ['lichen', 'lichen-wash', 6.14],
    ['chalk', 'peat', 12.58],
    ['series-2', 'chalk', 4.02],
    ['series-3', 'chalk', 3.11],
  ])('%s on %s is %f', (a, b, ratio) => {
    expect(contrast(a, b)).toBeCloseTo(ratio, 1);
  });
});
