import type { ReactNode } from 'react';
import { orNotFound, pageContext } from '@/app/_server/context';
import { getSite } from '@/lib/data/sites/getSite';
import { BatchWatch } from '@/lib/ui/files/batch-watch';

type LayoutProps = { children: ReactNode; params: Promise<{ siteId: string }> };

export async function generateMetadata({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const site = await orNotFound(getSite({ ctx: await pageContext(), input: { siteId } }));
  return { title: { default: site.name, template: `%s · ${site.name} · Loamline` } };
}

/** Whoever is not on this site sees what they would see for a site that does not exist. */
export default async function SiteLayout({ children, params }: LayoutProps) {
  const { siteId } = await params;
  await orNotFound(getSite({ ctx: await pageContext(), input: { siteId } }));
  return (
    <>
      {children}
      <BatchWatch siteId={siteId} />
    </>
  );
}
