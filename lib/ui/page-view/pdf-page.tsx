'use client';

import type { PDFDocumentProxy } from 'pdfjs-dist';
import { useEffect, useRef, useState } from 'react';
import { type QuarterTurn, quarterTurn } from './box-map';
import { BoxOverlay } from './box-overlay';
import type { PageMark } from './types';
import { ViewFailed } from './view-states';

interface PdfPageProps {
  readonly document: PDFDocumentProxy;
  readonly page: number;
  /** Width of the pane in CSS pixels; the page at zoom 1 fills it. */
  readonly paneWidth: number;
  readonly zoom: number;
  readonly fileName: string;
  readonly marks: readonly PageMark[];
  readonly highlightedRowId: string | null;
  readonly onPick: (rowId: string) => void;
}

interface Shown {
  readonly page: number;
  readonly width: number;
  readonly height: number;
  readonly turn: QuarterTurn;
}

export function PdfPage(props: PdfPageProps) {
  const { document: pdf, page, paneWidth, zoom, fileName } = props;
  const canvas = useRef<HTMLCanvasElement>(null);
  const [shown, setShown] = useState<Shown | null>(null);
  const [broken, setBroken] = useState(false);

  useEffect(() => {
    if (paneWidth === 0) return;
    let gone = false;
    let stop: (() => void) | null = null;
    const draw = async () => {
      const sheet = await pdf.getPage(page);
      const target = canvas.current;
      if (gone || !target) return;
      const scale = (paneWidth / sheet.getViewport({ scale: 1 }).width) * zoom;
      const density = Math.min(2, window.devicePixelRatio || 1);
      const viewport = sheet.getViewport({ scale });
      const sharp = sheet.getViewport({ scale: scale * density });
      target.width = Math.floor(sharp.width);
      target.height = Math.floor(sharp.height);
      // Written by script and not as an attribute: the page forbids inline styles.
      target.style.width = `${viewport.width}px`;
      target.style.height = `${viewport.height}px`;
      const task = sheet.render({ canvas: target, viewport: sharp });
      stop = () => task.cancel();
      setShown({ page, width: viewport.width, height: viewport.height, turn: quarterTurn(sheet.rotate) });
      setBroken(false);
      await task.promise;
    };
    draw().catch((problem: unknown) => {
      const cancelled = problem instanceof Error && problem.name === 'RenderingCancelledException';
      if (!gone && !cancelled) setBroken(true);
    });
    return () => {
      gone = true;
      stop?.();
    };
  }, [pdf, page, paneWidth, zoom]);

  if (broken) return <ViewFailed reason="broken" />;
  return (
    <div className="relative w-max bg-white">
      <canvas ref={canvas} role="img" aria-label={`Page ${page} of ${pdf.numPages} of ${fileName}`} className="block" />
      {shown?.page === page ? (
        <BoxOverlay
          marks={props.marks.filter((mark) => mark.page === page)}
          turn={shown.turn}
          size={shown}
          highlightedRowId={props.highlightedRowId}
          onPick={props.onPick}
        />
      ) : null}
    </div>
  );
}
