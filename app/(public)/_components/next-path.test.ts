import { describe, expect, it } from 'vitest';
import { safeNext } from './next-path';

describe('[E 30] where to go after signing in', () => {
  it.each(['/sites/a/plots/b', '/sites/a?year=2026#ph', '/account'])('%s is kept', (path) => {
    expect(safeNext(path)).toBe(path);
  });

  it.each([
    undefined,
    '',
    '//evil.example',
    '/\\evil.example',
    '\\\\evil.example',
    'https:evil.example',
    'https://evil.example/sites',
    'javascript:alert(1)',
    '/\t/evil.example',
    '/\n/evil.example',
    ' /sites',
    '/sites\\..\\evil',
    'sites/a',
  ])('%j leads to the first page instead', (path) => {
    expect(safeNext(path)).toBe('/today');
  });
});
