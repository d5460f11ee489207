'use client';

import { CellsView } from './cells-view';
import { ImageView } from './image-view';
import { liveLine } from './live-line';
import { PdfView } from './pdf-view';
import { CsvView, TableView } from './table-view';
import { TextView } from './text-view';
import type { PageViewProps } from './types';
import { ViewPanel } from './view-states';

/** The report as it came, with the place of the focused row outlined. */
export function PageView({ source, originalHref, ...props }: PageViewProps) {
  const mark = props.marks.find((one) => one.rowId === props.highlightedRowId);
  return (
    <div className="grid min-w-0 gap-2" data-testid="page-view">
      <Shown source={source} {...props} />
      <div className="flex flex-wrap items-baseline justify-between gap-2 text-sm">
        <p role="status" aria-live="polite" className="text-clay" data-testid="page-place">
          {liveLine(mark)}
        </p>
        {originalHref ? (
          <a className="text-link" href={originalHref}>
            Open the original
          </a>
        ) : null}
      </div>
    </div>
  );
}

function Shown({ source, ...props }: Omit<PageViewProps, 'originalHref'>) {
  switch (source.kind) {
    case 'pdf':
      return <PdfView url={source.url} {...props} />;
    case 'image':
      return <ImageView url={source.url} {...props} />;
    case 'csv':
      return <CsvView url={source.url} {...props} />;
    case 'cells':
      return <CellsView url={source.url} {...props} />;
    case 'text':
      return <TextView url={source.url} {...props} />;
    case 'table':
      return <TableView rows={source.rows} {...props} />;
    case 'unsupported':
      return (
        <ViewPanel title="This file cannot be shown here">
          <p className="max-w-measure text-sm text-clay">{source.sentence}</p>
        </ViewPanel>
      );
    case 'none':
      return (
        <ViewPanel title="Entered by hand">
          <p className="max-w-measure text-sm text-clay">
            There is no file behind these values. A page added later would stand here, with each value outlined.
          </p>
        </ViewPanel>
      );
  }
}
