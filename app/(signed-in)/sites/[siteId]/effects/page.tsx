import type { Metadata } from 'next';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { getEffects } from '@/lib/data/effects/getEffects';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { SiteEffects } from './_components/site-effects';

export const metadata: Metadata = { title: 'Effects' };

export default async function SiteEffectsPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx } = await pagePerson(`/sites/${siteId}/effects`);
  const first = await orNotFound(getEffects({ ctx, input: { siteId } }));
  return (
    <>
      <PageTitle
        title="Effects"
        lead="Whether what was spread changed the soil as it was meant to, as far as the tests can tell."
      />
      <SiteEffects siteId={siteId} first={first} />
    </>
  );
}
