import { asc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { plot, site } from '@/db/schema';
import { asPlotId, type SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';
import { loadApplications } from '../applications/loadApplications';
import { dayOf } from '../days';
import { loadReadings } from '../history/points';
import type { SitePicture } from './assemble';

/** What the effect check looks at: every plot of the site, what was spread, and live results of what it was meant to change. */
export async function loadPicture(tx: Transaction, siteId: SiteId, now: Date): Promise<SitePicture> {
  const [place] = await tx.select().from(site).where(eq(site.id, siteId));
  if (!place) throw notFound();
  const plots = await tx
    .select({ id: plot.id, name: plot.name })
    .from(plot)
    .where(eq(plot.siteId, siteId))
    .orderBy(asc(plot.createdAt), asc(plot.name));
  const applications = await loadApplications(tx, siteId, null);
  const intended = new Set(applications.flatMap((one) => one.intents.map((intent) => intent.analyte)));
  return {
    today: dayOf(now, place.timeZone),
    warmMonths: place.warmMonths,
    plots: plots.map((row) => ({ id: asPlotId(row.id), name: row.name })),
    applications,
    readings: await loadReadings(tx, siteId, { analytes: [...intended] }),
  };
}
