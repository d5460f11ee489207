'use client';

import { useMemo, useState } from 'react';
import { z } from 'zod';
import { Button } from '../actions/button';
import { TableView } from './table-view';
import type { PageViewProps } from './types';
import { useFile } from './use-file';
import { ViewFailed, ViewLoading, ViewPanel } from './view-states';

const cellsSchema = z.object({
  sheets: z.array(z.object({ number: z.number(), name: z.string().nullable(), rows: z.array(z.array(z.string())) })),
});
type Sheets = z.infer<typeof cellsSchema>['sheets'];

function sheetsIn(bytes: Uint8Array): Sheets {
  try {
    const parsed = cellsSchema.safeParse(JSON.parse(new TextDecoder().decode(bytes)));
    return parsed.success ? parsed.data.sheets : [];
  } catch {
    return [];
  }
}

/** A workbook sheet by sheet; the sheet of the focused row comes to the front. */
export function CellsView({ url, ...props }: Omit<PageViewProps, 'source' | 'originalHref'> & { url: string }) {
  const { file, again } = useFile(url, props.load);
  const sheets = useMemo(() => (file.kind === 'ready' ? sheetsIn(file.bytes) : []), [file]);
  const focused = props.marks.find((mark) => mark.rowId === props.highlightedRowId)?.cell?.sheet ?? null;
  const [chosen, setChosen] = useState<{ sheet: number; at: string | null } | null>(null);
  if (file.kind === 'loading') return <ViewLoading fileName={props.fileName} />;
  if (file.kind === 'failed' && file.reason === 'gone')
    return (
      <ViewPanel title="This workbook cannot be shown here">
        <p className="max-w-measure text-sm text-clay">
          It is kept as it came. Open the original in your own program and compare from there.
        </p>
      </ViewPanel>
    );
  if (file.kind === 'failed') return <ViewFailed reason={file.reason} onAgain={again} />;
  // A sheet picked by hand stays until another row gets the focus.
  const picked = chosen !== null && chosen.at === props.highlightedRowId ? chosen.sheet : null;
  const shown = sheets.find((sheet) => sheet.number === (picked ?? focused)) ?? sheets[0];
  if (shown === undefined) return <ViewPanel title="The workbook holds no lines" />;
  return (
    <div className="grid min-w-0 gap-2">
      {sheets.length > 1 ? (
        <fieldset className="flex flex-wrap gap-2">
          <legend className="sr-only">Sheets of {props.fileName}</legend>
          {sheets.map((sheet) => (
            <Button
              key={sheet.number}
              look="quiet"
              size="small"
              aria-pressed={sheet === shown}
              onClick={() => setChosen({ sheet: sheet.number, at: props.highlightedRowId })}
            >
              {sheet.name ?? `Sheet ${sheet.number}`}
            </Button>
          ))}
        </fieldset>
      ) : null}
      <TableView
        {...props}
        rows={shown.rows}
        marks={props.marks.filter((mark) => (mark.cell?.sheet ?? 1) === shown.number)}
      />
    </div>
  );
}
