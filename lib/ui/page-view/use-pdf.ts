'use client';

import type { PDFDocumentProxy } from 'pdfjs-dist';
import { useEffect, useState } from 'react';

export type PdfState =
  | { readonly kind: 'loading' }
  | { readonly kind: 'broken' }
  | { readonly kind: 'ready'; readonly document: PDFDocumentProxy };

/** Opens a PDF in the browser. pdf.js is fetched here and not before: it must not run on the server. */
export function usePdf(bytes: Uint8Array): PdfState {
  const [state, setState] = useState<{ of: Uint8Array; state: PdfState } | null>(null);
  useEffect(() => {
    let gone = false;
    let close: (() => Promise<void>) | null = null;
    const open = async () => {
      const pdfjs = await import('pdfjs-dist/legacy/build/pdf.mjs');
      if (gone) return;
      pdfjs.GlobalWorkerOptions.workerSrc = '/pdf.worker.min.mjs';
      // pdf.js takes the array over; the copy keeps ours whole for a second opening.
      const task = pdfjs.getDocument({
        data: bytes.slice(),
        isEvalSupported: false,
        useSystemFonts: true,
        verbosity: 0,
      });
      close = () => task.destroy();
      const document = await task.promise;
      if (gone) return;
      setState({ of: bytes, state: { kind: 'ready', document } });
    };
    open().catch(() => {
      if (!gone) setState({ of: bytes, state: { kind: 'broken' } });
    });
    return () => {
      gone = true;
      void close?.();
    };
  }, [bytes]);
  return state?.of === bytes ? state.state : { kind: 'loading' };
}
