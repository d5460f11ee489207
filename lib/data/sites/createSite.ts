import { randomUUID } from 'node:crypto';
import { membership, site } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { createSiteInput } from '@/lib/schemas/sites';
import { audit } from '../audit';
import { enterSite } from '../transaction';
import { personVerb } from '../verb';

/** April to October in the north, October to April in the south: an assumption the settings can change. */
export function warmMonthsOf(hemisphere: 'north' | 'south'): boolean[] {
  const warm = hemisphere === 'north' ? [3, 4, 5, 6, 7, 8, 9] : [9, 10, 11, 0, 1, 2, 3];
  return Array.from({ length: 12 }, (_, month) => warm.includes(month));
}

export const createSite = personVerb({
  input: createSiteInput,
  run: async ({ ctx, tx, person, input }) => {
    const siteId = asSiteId(randomUUID());
    await enterSite(tx, siteId);
    await tx.insert(site).values({
      id: siteId,
      name: input.name,
      country: input.country,
      hemisphere: input.hemisphere,
      timeZone: input.timeZone ?? person.timeZone,
      warmMonths: warmMonthsOf(input.hemisphere),
      planWidthM: String(input.planWidthM),
      planHeightM: String(input.planHeightM),
      createdAt: ctx.now,
    });
    await tx.insert(membership).values({ siteId, personId: person.id, role: 'owner', createdAt: ctx.now });
    await audit(tx, ctx, siteId, { act: 'site.created', objectKind: 'site', objectId: siteId });
    return { siteId };
  },
});
