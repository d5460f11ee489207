'use client';

import { Upload } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useCallback, useMemo, useState } from 'react';
import { can } from '@/lib/access/table';
import type { Plot, PlotList } from '@/lib/schemas/plots';
import type { ReportList } from '@/lib/schemas/reports';
import type { Site } from '@/lib/schemas/sites';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { FileButton } from '@/lib/ui/files/file-button';
import { PageDrop } from '@/lib/ui/files/page-drop';
import { ACCEPTED_FILES } from '@/lib/ui/files/upload-item';
import { UploadList } from '@/lib/ui/files/upload-list';
import { useUploads } from '@/lib/ui/files/use-uploads';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { SitePlan } from '@/lib/ui/site-plan/site-plan';
import type { LengthUnit, PlanOutline } from '@/lib/ui/site-plan/types';
import { useApi } from '@/lib/ui/use-api';
import { ArchivedPlots } from './archived-plots';
import { FirstPlot } from './first-plot';
import { NamePlot } from './name-plot';
import { OutlineConflictNotice } from './outline-conflict';
import { ON_THEIR_WAY, planPlots } from './plan-plots';
import { useOutlineSaves } from './use-outline-saves';

type GroundProps = {
  readonly site: Site;
  readonly unit: LengthUnit;
  readonly first: { readonly plots: PlotList; readonly archived: PlotList; readonly inReview: ReportList };
};

/** The site's plan: what is where, what was last found there, and the place to let a report go. */
export function Ground({ site, unit, first }: GroundProps) {
  const home = `/sites/${site.id}`;
  const router = useRouter();
  const plots = useApi<PlotList>(`${home}/plots`, { fallback: first.plots });
  const archived = useApi<PlotList>(`${home}/plots?archived=yes`, { fallback: first.archived });
  const inReview = useApi<ReportList>(`${home}/reports?state=in-review`, { fallback: first.inReview });
  const list = plots.data?.plots ?? first.plots.plots;
  const year = plots.data?.year ?? first.plots.year;
  const reports = inReview.data?.reports ?? first.inReview.reports;

  const [selected, setSelected] = useState<string | null>(null);
  const [drawn, setDrawn] = useState<PlanOutline | null>(null);
  const mayEdit = can(site.role, 'ground.edit');
  const mayUpload = can(site.role, 'reading.work');

  const refresh = useCallback(() => void inReview.reload(), [inReview.reload]);
  const { items, store } = useUploads(site.id, refresh);
  const saved = useCallback(
    (plot: Plot) => {
      const others = list.filter((one) => one.id !== plot.id);
      void plots.reload({ plots: [...others, plot].sort((a, b) => a.name.localeCompare(b.name)), year });
    },
    [list, plots.reload, year],
  );
  const outlines = useOutlineSaves(site.id, list, saved);
  const shown = useMemo(
    () => planPlots(site.id, list, mayUpload ? reports : [], items),
    [site.id, list, mayUpload, reports, items],
  );

  const send = (plotId: string | null, files: readonly File[]) => {
    const to = { plotId, plotName: list.find((plot) => plot.id === plotId)?.name ?? null };
    void store.add(files, to).then((batchId) => batchId && router.push(`${home}/reports/batches/${batchId}`));
  };
  return (
    <>
      <PageTitle
        title={site.name}
        lead={leadOf(list.length, mayUpload)}
        actions={
          <>
            {mayUpload && list.length > 0 ? (
              <FileButton
                multiple
                accept={ACCEPTED_FILES}
                icon={<Upload aria-hidden="true" className="size-5" />}
                onFiles={(files) => send(null, files)}
              >
                Upload reports
              </FileButton>
            ) : null}
            {mayEdit && list.length > 0 ? (
              <LinkButton look="quiet" href={`${home}/plots/new`}>
                Add a plot
              </LinkButton>
            ) : null}
            <LinkButton look="quiet" href={`${home}/targets`}>
              Target sets
            </LinkButton>
          </>
        }
      />
      <div className="page-wrap grid gap-4 pb-10">
        <ProblemNotice problem={plots.problem ?? outlines.problem} />
        {outlines.conflict ? (
          <OutlineConflictNotice conflict={outlines.conflict} unit={unit} onSettle={outlines.settle} />
        ) : null}
        {list.length === 0 && mayEdit ? <FirstPlot home={home} /> : null}
        <SitePlan
          siteName={site.name}
          plots={shown}
          unit={unit}
          ground={{ width: site.planWidthM, height: site.planHeightM }}
          selectedPlotId={selected}
          onSelect={setSelected}
          plotHref={(id) => `${home}/plots/${id}`}
          onOpen={(id) => router.push(`${home}/plots/${id}`)}
          canEdit={mayEdit}
          canUpload={mayUpload}
          aside={
            items.length === 0 ? null : (
              <div id={ON_THEIR_WAY} className="scroll-mt-4">
                <UploadList
                  items={items}
                  store={store}
                  reportHref={(id) => `${home}/reports/${id}`}
                  batchHref={(id) => `${home}/reports/batches/${id}`}
                  mayType={`${home}/reports/new`}
                />
              </div>
            )
          }
          {...(mayUpload ? { onDropFiles: send } : {})}
          {...(mayEdit
            ? {
                onChangeOutline: outlines.save,
                onCreate: setDrawn,
                editHref: (id: string) => `${home}/plots/${id}/edit`,
              }
            : {})}
        />
      </div>
      <NamePlot
        siteId={site.id}
        unit={unit}
        year={year}
        outline={drawn}
        onClose={() => setDrawn(null)}
        onMade={(plot) => {
          saved(plot);
          setDrawn(null);
          setSelected(plot.id);
        }}
      />
      <PageDrop
        onFiles={mayUpload ? (files) => send(null, files) : undefined}
        label={
          list.length > 0
            ? `Let go over a plot, or anywhere else to send it to ${site.name}.`
            : `Let go to send it to ${site.name}.`
        }
      />
      {(archived.data?.plots.length ?? 0) > 0 ? (
        <Stretch title="Archived plots" ground="silt">
          <ArchivedPlots
            siteId={site.id}
            plots={archived.data?.plots ?? []}
            mayRestore={mayEdit}
            onRestored={() => {
              void archived.reload();
              void plots.reload();
            }}
          />
        </Stretch>
      ) : null}
    </>
  );
}

function leadOf(plots: number, mayUpload: boolean): string | undefined {
  if (plots === 0) return undefined;
  return mayUpload
    ? 'Drag a laboratory report onto the plot it is about, or use the button beside its name. What it says is read; nothing counts before it is confirmed.'
    : 'Open a plot for its tests and their history.';
}
