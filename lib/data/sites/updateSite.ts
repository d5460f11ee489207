import { eq } from 'drizzle-orm';
import { site } from '@/db/schema';
import { updateSiteInput } from '@/lib/schemas/sites';
import { siteVerb } from '../verb';
import { readSite } from './readSite';

export const updateSite = siteVerb({
  act: 'site.manage',
  input: updateSiteInput,
  run: async ({ tx, siteId, role, input, audit }) => {
    const change = {
      ...(input.name === undefined ? {} : { name: input.name }),
      ...(input.country === undefined ? {} : { country: input.country }),
      ...(input.hemisphere === undefined ? {} : { hemisphere: input.hemisphere }),
      ...(input.timeZone === undefined ? {} : { timeZone: input.timeZone }),
      ...(input.warmMonths === undefined ? {} : { warmMonths: input.warmMonths }),
      ...(input.planWidthM === undefined ? {} : { planWidthM: String(input.planWidthM) }),
      ...(input.planHeightM === undefined ? {} : { planHeightM: String(input.planHeightM) }),
    };
    const before = await readSite(tx, siteId, role);
    if (Object.keys(change).length === 0) return before;
    await tx.update(site).set(change).where(eq(site.id, siteId));
    const after = await readSite(tx, siteId, role);
    await audit({ act: 'site.changed', objectKind: 'site', objectId: siteId, detail: { before, after } });
    return after;
  },
});
