'use client';

import { Upload } from 'lucide-react';
import { cx } from '../cx';
import { FileButton } from '../files/file-button';
import { lastTestText, plotArea } from './plot-words';
import type { LengthUnit, PlanOutline, PlanPlot, SitePlanProps } from './types';

type PlanListProps = Pick<
  SitePlanProps,
  'plots' | 'plotHref' | 'onOpen' | 'canUpload' | 'onDropFiles' | 'selectedPlotId'
> & {
  readonly unit: LengthUnit;
  readonly outlineOf: (plot: PlanPlot) => PlanOutline | null;
  readonly accept: string;
};

/** The same plots as a list: for a phone, for a screen reader, and for who would rather read. */
export function PlanList(props: PlanListProps) {
  const { plots, unit, outlineOf, canUpload, onDropFiles } = props;
  if (plots.length === 0) return null;
  return (
    <ul className="grid border-t border-fallow/60" aria-label="Plots">
      {plots.map((plot) => (
        <li
          key={plot.id}
          className={cx(
            'flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-fallow/60 border-l-4 py-2 pl-3',
            plot.id === props.selectedPlotId ? 'border-l-gley' : 'border-l-transparent',
          )}
        >
          <div className="min-w-0 flex-1 basis-56">
            <a
              href={props.plotHref(plot.id)}
              className="text-link inline-flex min-h-9 items-center font-semibold"
              onClick={(event) => {
                if (!props.onOpen || event.metaKey || event.ctrlKey || event.shiftKey) return;
                event.preventDefault();
                props.onOpen(plot.id);
              }}
            >
              {plot.name}
            </a>
            <p className="text-sm text-clay">
              {[plotArea(plot, outlineOf(plot), unit), lastTestText(plot), plot.crop].filter(Boolean).join(' · ')}
            </p>
            {plot.outline ? null : <p className="text-sm text-clay">Not drawn on the plan.</p>}
            {plot.uploads?.map((upload) => (
              <div key={upload.fileName} className="mt-1 text-sm">
                <span className="font-semibold">{upload.fileName}</span>: {upload.text}
                {upload.share === null ? null : (
                  <progress
                    className="mt-1 block h-2.5 w-full max-w-64 appearance-none border border-fallow bg-white [&::-moz-progress-bar]:bg-gley [&::-webkit-progress-bar]:bg-white [&::-webkit-progress-value]:bg-gley"
                    max={1}
                    value={upload.share}
                  >
                    {Math.round(upload.share * 100)}%
                  </progress>
                )}
              </div>
            ))}
          </div>
          {canUpload && onDropFiles ? (
            <FileButton
              look="quiet"
              size="small"
              multiple
              accept={props.accept}
              icon={<Upload aria-hidden="true" className="size-4" />}
              onFiles={(files) => onDropFiles(plot.id, files)}
            >
              Upload a report<span className="sr-only"> to {plot.name}</span>
            </FileButton>
          ) : null}
        </li>
      ))}
    </ul>
  );
}
