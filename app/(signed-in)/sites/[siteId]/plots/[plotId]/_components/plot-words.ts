import { formatArea, squareMetres } from '@/lib/domain/units';
import type { Plot } from '@/lib/schemas/plots';

const TEXTURES = { light: 'light soil', medium: 'medium soil', heavy: 'heavy soil' } as const;

/** "1,200 sq ft, exhibition onions this year, medium soil". */
export function plotLead(
  plot: Pick<Plot, 'area' | 'planting' | 'texture' | 'established'>,
  units: 'us' | 'metric',
): string {
  const prefer = units === 'us' ? 'customary' : 'metric';
  return [
    plot.area === null ? 'no area yet' : formatArea(squareMetres(plot.area.m2), prefer),
    plot.planting === null ? '' : `${plot.planting.crop} in ${plot.planting.year}`,
    plot.texture === null ? '' : TEXTURES[plot.texture],
    plot.established ? '' : 'new ground',
  ]
    .filter(Boolean)
    .join(', ');
}
