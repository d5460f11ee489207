'use client';

import { Upload } from 'lucide-react';
import { LinkButton } from '../actions/link-button';
import { FileButton } from '../files/file-button';
import { placeAt } from './geometry';
import { PlotForm } from './plot-form';
import { lastTestText, plotArea } from './plot-words';
import type { PlanOutline, PlanPlot, SitePlanProps } from './types';

interface SelectedPlotProps extends SitePlanProps {
  readonly plot: PlanPlot;
  readonly outline: PlanOutline;
  readonly overlapping: readonly string[];
  readonly accept: string;
  readonly onNumbers: (outline: PlanOutline) => void;
}

/** What can be done with the plot that is selected on the plan. */
export function SelectedPlot(props: SelectedPlotProps) {
  const { plot, outline, unit, overlapping, canUpload, onDropFiles } = props;
  return (
    <section
      aria-label={plot.name}
      className="grid gap-3 border border-t-0 border-fallow border-l-4 border-l-gley bg-silt p-4"
    >
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <div className="min-w-0 flex-1 basis-48">
          <h2 className="text-lg break-words">
            <a
              href={props.plotHref(plot.id)}
              className="text-link"
              onClick={(event) => {
                if (!props.onOpen || event.metaKey || event.ctrlKey || event.shiftKey) return;
                event.preventDefault();
                props.onOpen(plot.id);
              }}
            >
              Open {plot.name}
            </a>
          </h2>
          <p className="text-sm text-clay">
            {[plotArea(plot, outline, unit), lastTestText(plot), plot.crop].filter(Boolean).join(' · ')}
          </p>
        </div>
        {props.editHref ? (
          <LinkButton look="quiet" href={props.editHref(plot.id)}>
            Edit<span className="sr-only"> {plot.name}</span>
          </LinkButton>
        ) : null}
        {canUpload && onDropFiles ? (
          <FileButton
            multiple
            accept={props.accept}
            icon={<Upload aria-hidden="true" className="size-4" />}
            onFiles={(files) => onDropFiles(plot.id, files)}
          >
            Upload a report<span className="sr-only"> to {plot.name}</span>
          </FileButton>
        ) : null}
      </div>
      {overlapping.length > 0 ? (
        <p className="text-sm text-ochre">
          <b>Look:</b> it overlaps {overlapping.join(' and ')}. Nothing is refused; check the numbers.
        </p>
      ) : null}
      {props.canEdit && props.onChangeOutline ? (
        <PlotForm
          key={plot.id}
          outline={outline}
          unit={unit}
          submitLabel="Save place and size"
          onSubmit={(rectangle) => props.onNumbers(placeAt(outline, rectangle))}
        />
      ) : null}
    </section>
  );
}
