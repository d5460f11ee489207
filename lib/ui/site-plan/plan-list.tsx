'use client';

import { Upload } from 'lucide-react';
import { type DragEvent, useState } from 'react';
import { cx } from '../cx';
import { StatusWord } from '../feedback/status-word';
import { FileButton } from '../files/file-button';
import { lastTestText, plotArea, waitingText } from './plot-words';
import type { LengthUnit, PlanOutline, PlanPlot, PlanUpload, SitePlanProps } from './types';

type PlanListProps = Pick<
  SitePlanProps,
  'plots' | 'plotHref' | 'onOpen' | 'editHref' | 'canUpload' | 'onDropFiles' | 'selectedPlotId'
> & {
  readonly unit: LengthUnit;
  readonly outlineOf: (plot: PlanPlot) => PlanOutline | null;
  readonly accept: string;
  readonly className?: string;
};

/** The same plots as a list: for a phone, for a screen reader, and for who would rather read. */
export function PlanList(props: PlanListProps) {
  const [dropId, setDropId] = useState<string | null>(null);
  if (props.plots.length === 0) return null;
  const { canUpload, onDropFiles } = props;
  const dropHandlers = (plotId: string) => {
    if (!canUpload || !onDropFiles) return {};
    return {
      onDragOver: (event: DragEvent) => {
        event.preventDefault();
        event.dataTransfer.dropEffect = 'copy';
        setDropId(plotId);
      },
      onDragLeave: () => setDropId(null),
      onDrop: (event: DragEvent) => {
        event.preventDefault();
        event.stopPropagation();
        setDropId(null);
        const files = [...event.dataTransfer.files];
        if (files.length > 0) onDropFiles(plotId, files);
      },
    };
  };
  return (
    <ul className={cx('border-t border-fallow/60', props.className)} aria-label="Plots">
      {props.plots.map((plot) => (
        <li
          key={plot.id}
          {...dropHandlers(plot.id)}
          className={cx(
            'border-b border-fallow/60 border-l-4 py-2 pl-3',
            plot.id === props.selectedPlotId ? 'border-l-gley' : 'border-l-transparent',
            plot.id === dropId && 'bg-gley-wash',
          )}
        >
          <PlanRow plot={plot} {...props} />
        </li>
      ))}
    </ul>
  );
}

function PlanRow({ plot, unit, outlineOf, canUpload, onDropFiles, ...props }: PlanListProps & { plot: PlanPlot }) {
  return (
    <div className="flex flex-wrap items-start gap-x-4 gap-y-1">
      <div className="min-w-0 flex-1 basis-52">
        <a
          href={props.plotHref(plot.id)}
          className="text-link inline-flex min-h-(--target) max-w-full items-center font-semibold"
          onClick={(event) => {
            if (!props.onOpen || event.metaKey || event.ctrlKey || event.shiftKey) return;
            event.preventDefault();
            props.onOpen(plot.id);
          }}
        >
          <span className="min-w-0 break-words">{plot.name}</span>
        </a>
        <p className="text-sm break-words text-clay">
          {[plotArea(plot, outlineOf(plot), unit), lastTestText(plot), plot.crop].filter(Boolean).join(' · ')}
        </p>
        {plot.outline ? null : <p className="text-sm text-clay">Not drawn on the plan.</p>}
        {plot.waiting ? (
          <a href={plot.waiting.href} className="inline-flex min-h-(--target) items-center text-sm">
            <StatusWord status="needs-you">{waitingText(plot)}</StatusWord>
            <span className="sr-only"> for {plot.name}</span>
          </a>
        ) : null}
        {plot.uploads?.map((upload, at) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: two files of one name may be on their way to one plot
          <UploadLine key={`${upload.fileName} ${at}`} upload={upload} />
        ))}
      </div>
      <div className="flex flex-wrap gap-x-1">
        {props.editHref ? (
          <a
            href={props.editHref(plot.id)}
            className="text-link -ml-2 inline-flex min-h-(--target) items-center px-2 text-sm font-semibold"
          >
            Edit<span className="sr-only"> {plot.name}</span>
          </a>
        ) : null}
        {canUpload && onDropFiles ? (
          <FileButton
            look="quiet"
            multiple
            className="text-sm"
            accept={props.accept}
            icon={<Upload aria-hidden="true" className="size-4" />}
            onFiles={(files) => onDropFiles(plot.id, files)}
          >
            Upload a report<span className="sr-only"> to {plot.name}</span>
          </FileButton>
        ) : null}
      </div>
    </div>
  );
}

function UploadLine({ upload }: { upload: PlanUpload }) {
  return (
    <div className="mt-1 text-sm">
      <span className="font-semibold break-all">{upload.fileName}</span>: {upload.text}{' '}
      {upload.link ? (
        <a href={upload.link.href} className="text-link inline-flex min-h-(--target) items-center font-semibold">
          {upload.link.label}
          <span className="sr-only"> {upload.fileName}</span>
        </a>
      ) : null}
      {upload.share === null ? null : (
        <progress
          aria-label={upload.fileName}
          className="mt-1 block h-2.5 w-full max-w-64 appearance-none border border-fallow bg-white [&::-moz-progress-bar]:bg-gley [&::-webkit-progress-bar]:bg-white [&::-webkit-progress-value]:bg-gley"
          max={1}
          value={upload.share}
        />
      )}
    </div>
  );
}
