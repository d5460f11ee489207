import type { Metadata } from 'next';
import { Suspense } from 'react';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { listBatches } from '@/lib/data/batches/listBatches';
import { dayOf } from '@/lib/data/days';
import { listPlots } from '@/lib/data/plots/listPlots';
import { listReports } from '@/lib/data/reports/listReports';
import { getSite } from '@/lib/data/sites/getSite';
import { PageLoading } from '../../../_components/page-loading';
import { Inbox } from './_components/inbox';
import { isFilter } from './_components/report-states';

export const metadata: Metadata = { title: 'Reports' };

type PageProps = {
  params: Promise<{ siteId: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
};

/** No loading.tsx here: it would stand above every single report too, and one that is not there would answer 200. */
export default function ReportsPage(props: PageProps) {
  return (
    <Suspense fallback={<PageLoading />}>
      <LoadedReports {...props} />
    </Suspense>
  );
}

async function LoadedReports({ params, searchParams }: PageProps) {
  const { siteId } = await params;
  const { show } = await searchParams;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/reports`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  const [reports, batches, live, archived] = await Promise.all([
    listReports({ ctx, input: { siteId } }),
    listBatches({ ctx, input: { siteId } }),
    listPlots({ ctx, input: { siteId } }),
    listPlots({ ctx, input: { siteId, archived: 'yes' } }),
  ]);
  const asked = typeof show === 'string' ? show : undefined;
  return (
    <Inbox
      site={{ id: site.id, name: site.name }}
      timeZone={person.timeZone}
      today={dayOf(ctx.now, person.timeZone)}
      plots={[...live.plots, ...archived.plots].map(({ id, name }) => ({ id, name }))}
      first={reports}
      batches={batches}
      shown={isFilter(asked) ? asked : 'all'}
      personId={person.id}
      mayWork={can(site.role, 'reading.work')}
      mayDecide={can(site.role, 'reading.decide')}
    />
  );
}
