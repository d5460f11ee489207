import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { getBatch } from '@/lib/data/batches/getBatch';
import { listBatchSamples } from '@/lib/data/batches/listBatchSamples';
import { getSite } from '@/lib/data/sites/getSite';
import { idSchema } from '@/lib/schemas/parts';
import { BatchScreen } from './_components/batch-screen';

export const metadata: Metadata = { title: 'Many files at once' };

export default async function BatchPage({ params }: { params: Promise<{ siteId: string; batchId: string }> }) {
  const { siteId, batchId } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/reports/batches/${batchId}`);
  if (!idSchema.safeParse(batchId).success) notFound();
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  const batch = await orNotFound(getBatch({ ctx, input: { siteId, batchId } }));
  const mayWork = can(site.role, 'reading.work');
  const samples = mayWork ? await listBatchSamples({ ctx, input: { siteId, batchId } }) : null;
  return (
    <BatchScreen
      site={{ id: siteId, name: site.name }}
      first={batch}
      firstSamples={samples}
      timeZone={person.timeZone}
      mayWork={mayWork}
      mine={batch.createdBy.id === person.id}
    />
  );
}
