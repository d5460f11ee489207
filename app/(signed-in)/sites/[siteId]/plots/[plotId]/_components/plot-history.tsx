'use client';

import { useSearchParams } from 'next/navigation';
import type { HistoryAnswer } from '@/lib/schemas/history';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { DriftChart } from '@/lib/ui/charts/drift-chart';
import { driftFinding } from '@/lib/ui/charts/finding';
import { formatDay } from '@/lib/ui/charts/numbers';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { SelectField } from '@/lib/ui/fields/select-field';
import { Layer, Layers } from '@/lib/ui/frame/layers';
import { useApi } from '@/lib/ui/use-api';
import { EveryAnalyte } from './every-analyte';
import { chosenSeries, driftProps, papersOf, shortLabel } from './history-props';
import { NoTestYet } from './no-test-yet';

type PlotHistoryProps = {
  siteId: string;
  siteName: string;
  first: HistoryAnswer;
  mayUpload: boolean;
  mayRecord: boolean;
};

export function PlotHistory({ siteId, siteName, first, mayUpload, mayRecord }: PlotHistoryProps) {
  const at = `/sites/${siteId}/plots/${first.plot.id}`;
  const { data = first, problem } = useApi<HistoryAnswer>(`${at}/history`, { fallback: first });
  const asked = useSearchParams().get('analyte');
  const series = chosenSeries(data.series, asked);
  if (series === undefined) return <NoTestYet {...{ siteId, at, history: data, mayUpload, mayRecord }} />;
  const chart = driftProps(data, series, { siteId, siteName });
  const missing = asked !== null && series.analyte !== asked;
  return (
    <Layers>
      <Layer depth="verdict">
        <div className="grid gap-4">
          <ProblemNotice problem={problem} />
          {missing ? (
            <Notice live>This analyte has no confirmed test on this plot; pH stands here instead.</Notice>
          ) : null}
          <p className="max-w-measure font-display text-xl leading-snug font-semibold" data-testid="finding">
            {driftFinding(chart)}
          </p>
          {series.trend.map((sentence) => (
            <p key={sentence} className="max-w-measure">
              {sentence}
            </p>
          ))}
        </div>
      </Layer>
      <Layer depth="chart">
        <div className="grid grid-cols-[minmax(0,1fr)] gap-5" id="chart">
          <SelectField
            name="analyte"
            label="Analyte"
            className="max-w-sm print:hidden"
            value={series.analyte}
            options={data.series.map((one) => ({ value: one.analyte, label: shortLabel(one.analyte, one.label) }))}
            onChange={(event) => {
              // The address keeps the choice; nothing has to be fetched for it.
              window.history.replaceState(null, '', `?analyte=${encodeURIComponent(event.currentTarget.value)}`);
            }}
          />
          <DriftChart key={series.analyte} {...chart} hideFinding />
          {series.band === null ? (
            <p className="max-w-measure text-sm text-clay">
              No target band is chosen for {chart.analyte.label} here. It comes with the crop of the year or the
              plot&rsquo;s target set, on the ground page.
            </p>
          ) : null}
          {series.points.length > 1 ? (
            <p className="print:hidden">
              <LinkButton look="quiet" href={`${at}/compare?analyte=${encodeURIComponent(series.analyte)}`}>
                Compare two of these tests
              </LinkButton>
            </p>
          ) : null}
        </div>
      </Layer>
      <Layer depth="numbers" label="Everything" title="Every analyte of this plot">
        <EveryAnalyte history={data} siteId={siteId} />
      </Layer>
      <Layer depth="page" title="The reports behind these numbers">
        <Papers siteId={siteId} history={data} />
      </Layer>
    </Layers>
  );
}

function Papers({ siteId, history }: { siteId: string; history: HistoryAnswer }) {
  return (
    <div className="grid gap-5 print:block">
      <ul className="grid max-w-measure border-y print:block border-horizon-3">
        {papersOf(history).map(({ reportId, days, values }) => (
          <li key={reportId} className="border-b border-horizon-3 last:border-0">
            <a
              href={`/sites/${siteId}/reports/${reportId}`}
              className="flex min-h-(--target) flex-wrap items-center justify-between gap-x-6 py-1"
            >
              <span className="text-link font-semibold">Report of {days.map((day) => formatDay(day)).join(', ')}</span>
              <span className="text-sm text-clay">
                {values} {values === 1 ? 'value' : 'values'} of this plot
              </span>
            </a>
          </li>
        ))}
      </ul>
      <p className="print:hidden">
        <LinkButton
          look="quiet"
          prefetch={false}
          href={`/api/v1/sites/${siteId}/results/csv?plotId=${history.plot.id}`}
        >
          Download every result as CSV
        </LinkButton>
      </p>
    </div>
  );
}
