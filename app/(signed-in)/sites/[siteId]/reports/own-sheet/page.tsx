import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { getSite } from '@/lib/data/sites/getSite';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { SendSheet } from './_components/send-sheet';
import { SheetShape } from './_components/sheet-shape';

export const metadata: Metadata = { title: 'Own spreadsheet' };

export default async function OwnSheetPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  await pagePerson(`/sites/${siteId}/reports/own-sheet`).then(async ({ ctx }) => {
    const site = await orNotFound(getSite({ ctx, input: { siteId } }));
    if (!can(site.role, 'reading.work')) notFound();
  });
  return (
    <>
      <PageTitle
        title="A spreadsheet of your own"
        above={{ href: `/sites/${siteId}/reports`, label: 'Reports' }}
        lead="Old results that you typed up yourself, in one go. You say once what each column holds, look at what comes of it, and bring it in. It stands in the history as typed by you, with no laboratory page behind it."
      />
      <Stretch>
        <SendSheet siteId={siteId} />
      </Stretch>
      <Stretch title="What a sheet may look like" ground="white">
        <SheetShape />
      </Stretch>
    </>
  );
}
