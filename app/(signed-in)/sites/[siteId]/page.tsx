import { orNotFound, pagePerson } from '@/app/_server/context';
import { listPlots } from '@/lib/data/plots/listPlots';
import { listReports } from '@/lib/data/reports/listReports';
import { getSite } from '@/lib/data/sites/getSite';
import { lengthUnit } from '../../_components/lengths';
import { Ground } from './_components/ground';

export default async function GroundPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  const [plots, archived, inReview] = await Promise.all([
    listPlots({ ctx, input: { siteId } }),
    listPlots({ ctx, input: { siteId, archived: 'yes' } }),
    listReports({ ctx, input: { siteId, state: 'in-review' } }),
  ]);
  return <Ground site={site} unit={lengthUnit(person.units)} first={{ plots, archived, inReview }} />;
}
