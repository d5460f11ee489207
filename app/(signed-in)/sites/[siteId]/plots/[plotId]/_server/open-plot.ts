import { notFound } from 'next/navigation';
import { cache } from 'react';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { dayOf } from '@/lib/data/days';
import { getPlot } from '@/lib/data/plots/getPlot';
import { getSite } from '@/lib/data/sites/getSite';
import { idSchema } from '@/lib/schemas/parts';

/** The plot of an address with its site, read once for the layout and the page under it. */
export const openPlot = cache(async (siteId: string, plotId: string) => {
  const { ctx, person } = await pagePerson(`/sites/${siteId}/plots/${plotId}`);
  if (!idSchema.safeParse(plotId).success) notFound();
  const [site, plot] = await Promise.all([
    orNotFound(getSite({ ctx, input: { siteId } })),
    orNotFound(getPlot({ ctx, input: { siteId, plotId } })),
  ]);
  return { ctx, person, site, plot, today: dayOf(ctx.now, person.timeZone) as string };
});

export type PlotParams = { params: Promise<{ siteId: string; plotId: string }> };
export type Search = Promise<Record<string, string | string[] | undefined>>;
