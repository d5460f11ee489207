import { createPlot } from '@/lib/data/plots/createPlot';
import { setPlanting } from '@/lib/data/plots/setPlanting';
import { createSite } from '@/lib/data/sites/createSite';
import { later, personOn } from './clock';
import { PEOPLE } from './people';
import type { DemoSite } from './types';

export type MadeSite = { siteId: string; plots: Map<string, string> };

export async function makeGround(site: DemoSite): Promise<MadeSite> {
  const owner = PEOPLE[site.owner].email;
  const ctx = await personOn(site.since, owner);
  const { siteId } = await createSite({
    ctx,
    input: { name: site.name, country: 'US', planWidthM: site.plan.widthM, planHeightM: site.plan.heightM },
  });
  const plots = new Map<string, string>();
  for (const { outline, crops, ...facts } of site.plots) {
    const corners = outline.map(([x, y]) => ({ x, y }));
    const { id: plotId } = await createPlot({ ctx, input: { siteId, ...facts, outline: corners } });
    plots.set(facts.name, plotId);
    for (const { year, crop, targetSetKey } of crops) {
      await setPlanting({
        ctx: await personOn(later(`${year}-04-10`, site.since), owner),
        input: { siteId, plotId, year, crop, targetSetKey: targetSetKey ?? null, plannedOn: `${year}-04-28` },
      });
    }
  }
  return { siteId, plots };
}

export function idOf(map: ReadonlyMap<string, string>, name: string): string {
  const id = map.get(name);
  if (id === undefined) throw new Error(`The demo knows no ${name}.`);
  return id;
}
