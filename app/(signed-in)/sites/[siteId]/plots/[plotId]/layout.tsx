import type { ReactNode } from 'react';
import { can } from '@/lib/access/table';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { LinkTabs } from '@/lib/ui/actions/link-tabs';
import { Notice } from '@/lib/ui/feedback/notice';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { plotLead } from './_components/plot-words';
import { openPlot, type PlotParams } from './_server/open-plot';

export async function generateMetadata({ params }: PlotParams) {
  const { siteId, plotId } = await params;
  const { plot, site } = await openPlot(siteId, plotId);
  return { title: { default: plot.name, template: `%s · ${plot.name} · ${site.name} · Loamline` } };
}

export default async function PlotLayout({ children, params }: PlotParams & { children: ReactNode }) {
  const { siteId, plotId } = await params;
  const { plot, site, person } = await openPlot(siteId, plotId);
  const at = `/sites/${siteId}/plots/${plotId}`;
  return (
    <>
      <PageTitle
        title={<span className="break-words">{plot.name}</span>}
        above={{ href: `/sites/${siteId}`, label: 'The ground' }}
        lead={plotLead(plot, person.units)}
        actions={
          can(site.role, 'ground.edit') ? (
            <LinkButton look="quiet" className="print:hidden" href={`${at}/edit`}>
              Edit the plot
            </LinkButton>
          ) : null
        }
      />
      <div className="page-wrap grid gap-4 pb-2 print:hidden">
        {plot.archivedAt === null ? null : (
          <Notice title="This plot is archived">
            Its history stays and can be read. Bring it back on the ground page before recording anything new.
          </Notice>
        )}
        <LinkTabs
          label={`Pages of ${plot.name}`}
          tabs={[
            { href: at, label: 'History' },
            { href: `${at}/compare`, label: 'Compare' },
            { href: `${at}/effects`, label: 'Effects' },
            { href: `${at}/records`, label: 'Records' },
          ]}
        />
      </div>
      {children}
    </>
  );
}
