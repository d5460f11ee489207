'use client';

import { useState } from 'react';
import { Button } from '../actions/button';
import { PageView } from './page-view';
import { SAMPLE_PDF } from './sample-pdf';
import type { FetchedFile, PageMark } from './types';

const line = (rowNumber: number, label: string, y: number): PageMark => ({
  rowId: `r${rowNumber}`,
  label,
  rowNumber,
  page: 1,
  box: [0.5, y - 0.016, 0.58, y + 0.004],
  cell: null,
});
const MARKS: readonly PageMark[] = [
  line(1, 'pH', 0.22),
  line(2, 'Organic matter', 0.27),
  line(3, 'Phosphorus', 0.32),
  { rowId: 'r4', label: 'Potassium', rowNumber: 4, page: 2, box: [0.5, 0.204, 0.58, 0.224], cell: null },
];
const CSV = 'Plot;pH;P (ppm)\nNorth bed;6,4;41\n"South; lower";7,1;<0,1\n';
const CSV_MARKS: readonly PageMark[] = [
  { rowId: 'c1', label: 'pH, North bed', rowNumber: 1, page: null, box: null, cell: { row: 2, column: 2 } },
  { rowId: 'c2', label: 'P, South', rowNumber: 2, page: null, box: null, cell: { row: 3, column: 3 } },
];

/** The gallery's files are in its own text; no request is made for them. */
async function fromText(url: string): Promise<FetchedFile> {
  if (url === 'silent') return { ok: false, reason: 'store-silent' };
  if (url === 'csv') return { ok: true, bytes: new TextEncoder().encode(CSV) };
  return { ok: true, bytes: Uint8Array.from(atob(SAMPLE_PDF), (character) => character.charCodeAt(0)) };
}

/** Every state of the page view; the files are written into the page itself. */
export function PageViewGallery() {
  const [row, setRow] = useState<string | null>('r1');
  const [cell, setCell] = useState<string | null>('c1');
  return (
    <div className="grid gap-8 lg:grid-cols-2">
      <div className="grid content-start gap-2">
        <h3 className="text-lg">A page, one row focused</h3>
        <div className="flex flex-wrap gap-2">
          {MARKS.map((mark) => (
            <Button key={mark.rowId} look="quiet" size="small" onClick={() => setRow(mark.rowId)}>
              {mark.label}
            </Button>
          ))}
        </div>
        <PageView
          source={{ kind: 'pdf', url: 'pdf' }}
          fileName="spring.pdf"
          marks={MARKS}
          highlightedRowId={row}
          onPick={setRow}
          load={fromText}
          originalHref="#gallery-page"
        />
      </div>
      <div className="grid content-start gap-6">
        <h3 className="text-lg">A data file</h3>
        <PageView
          source={{ kind: 'csv', url: 'csv' }}
          fileName="spring.csv"
          marks={CSV_MARKS}
          highlightedRowId={cell}
          onPick={setCell}
          load={fromText}
        />
        <h3 className="text-lg">The store does not answer</h3>
        <PageView
          source={{ kind: 'pdf', url: 'silent' }}
          load={fromText}
          fileName="spring.pdf"
          marks={[]}
          highlightedRowId={null}
          onPick={setRow}
        />
        <h3 className="text-lg">Cannot be shown, and no file</h3>
        <PageView
          source={{ kind: 'unsupported', sentence: 'It is a scan from before this reader learned to read scans.' }}
          fileName="old.tif"
          marks={[]}
          highlightedRowId={null}
          onPick={setRow}
        />
        <PageView source={{ kind: 'none' }} fileName="" marks={[]} highlightedRowId={null} onPick={setRow} />
      </div>
    </div>
  );
}
