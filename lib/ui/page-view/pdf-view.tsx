'use client';

import { ChevronLeft, ChevronRight, ZoomIn, ZoomOut } from 'lucide-react';
import { useEffect, useRef, useState } from 'react';
import { Button } from '../actions/button';
import { PdfPage } from './pdf-page';
import type { PageViewProps } from './types';
import { useFile } from './use-file';
import { usePaneWidth } from './use-pane-width';
import { usePdf } from './use-pdf';
import { ViewFailed, ViewLoading } from './view-states';

type PaneProps = Omit<PageViewProps, 'source' | 'originalHref'>;

export const ZOOMS = [0.75, 1, 1.5, 2, 3] as const;

export function PdfView({ url, ...props }: PaneProps & { url: string }) {
  const { file, again } = useFile(url, props.load);
  if (file.kind === 'loading') return <ViewLoading fileName={props.fileName} />;
  if (file.kind === 'failed') return <ViewFailed reason={file.reason} onAgain={again} />;
  return <OpenedPdf bytes={file.bytes} {...props} />;
}

function OpenedPdf({ bytes, ...props }: PaneProps & { bytes: Uint8Array }) {
  const pdf = usePdf(bytes);
  const pane = useRef<HTMLElement>(null);
  const paneWidth = usePaneWidth(pane, pdf.kind === 'ready');
  const [page, setPage] = useState(1);
  const [chosenZoom, setZoomAt] = useState<number | null>(null);

  // A letter page in a narrow pane would be too small to read against: it starts larger, and the row in focus is in sight.
  const zoomAt = chosenZoom ?? (paneWidth === 0 || paneWidth > 620 ? 1 : paneWidth > 450 ? 2 : 3);

  const wantedPage = props.marks.find((mark) => mark.rowId === props.highlightedRowId)?.page ?? null;
  const { highlightedRowId } = props;
  // biome-ignore lint/correctness/useExhaustiveDependencies: the row getting the focus again turns the page back to it
  useEffect(() => {
    if (wantedPage !== null) setPage(wantedPage);
  }, [wantedPage, highlightedRowId]);

  if (pdf.kind === 'loading') return <ViewLoading fileName={props.fileName} />;
  if (pdf.kind === 'broken') return <ViewFailed reason="broken" />;
  const pages = pdf.document.numPages;
  const shownPage = Math.min(pages, Math.max(1, page));
  return (
    <div className="grid min-w-0 gap-2">
      <div className="flex flex-wrap items-center gap-2">
        <Button
          look="quiet"
          size="small"
          className="gap-0!"
          icon={<ChevronLeft aria-hidden="true" className="size-4" />}
          onClick={() => setPage(shownPage - 1)}
          unavailable={shownPage <= 1 && 'this is the first page'}
        >
          <span className="sr-only">Previous page</span>
        </Button>
        <span className="font-figures text-sm">
          Page {shownPage} of {pages}
        </span>
        <Button
          look="quiet"
          size="small"
          className="gap-0!"
          icon={<ChevronRight aria-hidden="true" className="size-4" />}
          onClick={() => setPage(shownPage + 1)}
          unavailable={shownPage >= pages && 'this is the last page'}
        >
          <span className="sr-only">Next page</span>
        </Button>
        <ZoomButtons at={zoomAt} onChange={setZoomAt} />
      </div>
      <PagePane paneRef={pane} fileName={props.fileName}>
        <PdfPage {...props} document={pdf.document} page={shownPage} paneWidth={paneWidth} zoom={ZOOMS[zoomAt] ?? 1} />
      </PagePane>
    </div>
  );
}

export function ZoomButtons({ at, onChange }: { at: number; onChange: (next: number) => void }) {
  return (
    <span className="ml-auto flex items-center gap-2">
      <Button
        look="quiet"
        size="small"
        className="gap-0!"
        icon={<ZoomOut aria-hidden="true" className="size-4" />}
        onClick={() => onChange(at - 1)}
        unavailable={at === 0 && 'smallest size'}
      >
        <span className="sr-only">Smaller</span>
      </Button>
      <span className="w-12 text-center font-figures text-sm">{Math.round((ZOOMS[at] ?? 1) * 100)}%</span>
      <Button
        look="quiet"
        size="small"
        className="gap-0!"
        icon={<ZoomIn aria-hidden="true" className="size-4" />}
        onClick={() => onChange(at + 1)}
        unavailable={at === ZOOMS.length - 1 && 'largest size'}
      >
        <span className="sr-only">Larger</span>
      </Button>
    </span>
  );
}

/** The frame that scrolls. It takes the focus so that arrow keys scroll it; Tab goes on. */
export function PagePane({
  paneRef,
  fileName,
  children,
}: {
  paneRef: React.RefObject<HTMLElement | null>;
  fileName: string;
  children: React.ReactNode;
}) {
  return (
    <section
      ref={paneRef}
      data-page-pane=""
      aria-label={`Report ${fileName}`}
      // biome-ignore lint/a11y/noNoninteractiveTabindex: a scrolling frame must be reachable by keyboard
      tabIndex={0}
      className="max-h-[75vh] min-h-24 overflow-auto border border-fallow bg-silt"
    >
      {children}
    </section>
  );
}
