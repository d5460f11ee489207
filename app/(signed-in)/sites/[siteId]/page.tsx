import { Suspense } from 'react';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { listPlots } from '@/lib/data/plots/listPlots';
import { listReports } from '@/lib/data/reports/listReports';
import { getSite } from '@/lib/data/sites/getSite';
import { lengthUnit } from '../../_components/lengths';
import { PageLoading } from '../../_components/page-loading';
import { Ground } from './_components/ground';

type PageProps = { params: Promise<{ siteId: string }> };

/** No loading.tsx here: it would stand above the pages of plots and reports too, and one that is not there would answer 200. */
export default function GroundPage(props: PageProps) {
  return (
    <Suspense fallback={<PageLoading />}>
      <LoadedGround {...props} />
    </Suspense>
  );
}

async function LoadedGround({ params }: PageProps) {
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
