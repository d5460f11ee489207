import { describe, expect, it } from 'vitest';
import { NOISE_CLASSES } from '@/lib/domain/effects/noise-defaults';
import { statusOf } from './status-of';

describe('the status of a default', () => {
  it('is derived only where the table says so', () => {
    expect(statusOf('core, season, laboratory derived; the rest assumed', 'season')).toBe('derived');
    expect(statusOf('core, season, laboratory derived; the rest assumed', 'rep')).toBe('assumed');
    expect(statusOf('assumed', 'laboratory')).toBe('assumed');
  });

  it('understands every basis there is: each name it lists is one of the sizes', () => {
    const sizes = ['core', 'rep', 'wobble', 'occasion', 'season', 'laboratory'];
    for (const { basis } of Object.values(NOISE_CLASSES)) {
      if (basis === 'assumed') continue;
      const [named = ''] = basis.split(' derived');
      expect(named.split(', ').filter((name) => !sizes.includes(name))).toEqual([]);
      expect(basis.endsWith(' derived; the rest assumed')).toBe(true);
    }
  });
});
