import { asc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { plot, site } from '@/db/schema';
import { asPlotId, type SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';
import { loadApplications } from '../applications/loadApplications';
import { dayOf } from '../days';
import { loadReadings } from '../history/points';
import type { SitePicture } from './assemble';

/** What the effect check looks at: every plot of the site, its live results of these analytes, and what was spread. */
export async function loadPicture(
  tx: Transaction,
  siteId: SiteId,
  now: Date,
  analytes?: readonly string[],
): Promise<SitePicture> {
  const [place] = await tx.select().from(site).where(eq(site.id, siteId));
  if (!place) throw notFound();
  const plots = await tx
    .select({ id: plot.id, name: plot.name })
    .from(plot)
    .where(eq(plot.siteId, siteId))
    .orderBy(asc(plot.createdAt), asc(plot.name));
  return {
    today: dayOf(now, place.timeZone),
    warmMonths: place.warmMonths,
    plots: plots.map((row) => ({ id: asPlotId(row.id), name: row.name })),
    applications: await loadApplications(tx, siteId, null),
    readings: await loadReadings(tx, siteId, analytes ? { analytes } : {}),
  };
}

/** The analytes that some live application of the site was meant to change. */
export const intendedAnalytes = (picture: Pick<SitePicture, 'applications'>): string[] => [
  ...new Set(picture.applications.flatMap((one) => one.intents.map((intent) => intent.analyte))),
];
