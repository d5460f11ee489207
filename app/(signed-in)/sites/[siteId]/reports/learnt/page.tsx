import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { listLayouts } from '@/lib/data/learning/listLayouts';
import { getSite } from '@/lib/data/sites/getSite';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { LearntLayouts } from './_components/learnt-layouts';

export const metadata: Metadata = { title: 'What was learnt' };

export default async function LearntPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx } = await pagePerson(`/sites/${siteId}/reports/learnt`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  if (!can(site.role, 'reading.work')) notFound();
  const first = await orNotFound(listLayouts({ ctx, input: { siteId } }));
  return (
    <>
      <PageTitle
        title="What was learnt"
        above={{ href: `/sites/${siteId}/reports`, label: 'Reports' }}
        lead="What you confirmed in earlier reports, kept for the next report of the same form. It stays on this site, fills only what a page leaves open, and asks where a page says something else."
      />
      <LearntLayouts siteId={siteId} first={first} mayForget={can(site.role, 'reading.decide')} />
    </>
  );
}
