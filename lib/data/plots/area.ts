import type { plot } from '@/db/schema';
import { outlineArea, type PlanPoint } from '@/lib/schemas/outline';
import type { Plot } from '@/lib/schemas/plots';

type Drawn = Pick<typeof plot.$inferSelect, 'areaTypedM2' | 'outline'>;

export const pointsOf = (outline: Drawn['outline']): PlanPoint[] => outline.map(([x, y]) => ({ x, y }));

/** Typed wins over the outline: a grower who has measured knows better than a drawing. */
export function areaOf(row: Drawn): Plot['area'] {
  if (row.areaTypedM2 !== null) return { m2: Number(row.areaTypedM2), from: 'typed' };
  return row.outline.length < 3 ? null : { m2: outlineArea(pointsOf(row.outline)), from: 'outline' };
}

/** Square metres; 0 while nobody has said how large the plot is. */
export const areaOfPlot = (row: Drawn): number => areaOf(row)?.m2 ?? 0;
