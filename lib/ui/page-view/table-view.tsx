'use client';

import { useEffect, useMemo, useRef } from 'react';
import { cx } from '../cx';
import { parseDelimited } from '../grid/delimited';
import { decodeText, guessDelimiter } from './delimiter';
import { PagePane } from './pdf-view';
import type { PageViewProps } from './types';
import { useFile } from './use-file';
import { ViewFailed, ViewLoading, ViewPanel } from './view-states';

type TableProps = Omit<PageViewProps, 'source' | 'originalHref'>;

/** Enough for a laboratory's file; a longer one is cut and says so, with the marked cells kept. */
const SHOWN_ROWS = 500;

export function CsvView({ url, ...props }: TableProps & { url: string }) {
  const { file, again } = useFile(url, props.load);
  const rows = useMemo(() => {
    if (file.kind !== 'ready') return [];
    const text = decodeText(file.bytes);
    return parseDelimited(text, guessDelimiter(text));
  }, [file]);
  if (file.kind === 'loading') return <ViewLoading fileName={props.fileName} />;
  if (file.kind === 'failed') return <ViewFailed reason={file.reason} onAgain={again} />;
  return <TableView rows={rows} {...props} />;
}

export function TableView({ rows, ...props }: TableProps & { rows: readonly (readonly string[])[] }) {
  const { marks, highlightedRowId, onPick, fileName } = props;
  const pane = useRef<HTMLElement>(null);
  const byCell = useMemo(
    () => new Map(marks.flatMap((mark) => (mark.cell ? [[`${mark.cell.row}:${mark.cell.column}`, mark]] : []))),
    [marks],
  );
  useEffect(() => {
    if (highlightedRowId === null) return;
    const cell = pane.current?.querySelector<HTMLElement>('[data-highlighted]');
    const frame = pane.current;
    if (!cell || !frame) return;
    frame.scrollTop = cell.offsetTop - frame.clientHeight / 2;
    frame.scrollLeft = cell.offsetLeft - frame.clientWidth / 2;
  }, [highlightedRowId]);

  if (rows.length === 0) {
    return <ViewPanel title="The file holds no lines" />;
  }
  const columns = rows.slice(0, SHOWN_ROWS).reduce((most, row) => Math.max(most, row.length), 0);
  return (
    <PagePane paneRef={pane} fileName={fileName}>
      <table className="border-separate border-spacing-0 bg-white text-sm">
        <caption className="sr-only">{fileName}, as it came</caption>
        <tbody>
          {rows.slice(0, SHOWN_ROWS).map((row, rowIndex) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: a line of a file has no other name than its number
            <tr key={rowIndex}>
              <th
                scope="row"
                className="sticky left-0 border-b border-r border-fallow/50 bg-silt px-2 font-figures text-xs font-normal text-clay"
              >
                {rowIndex + 1}
              </th>
              {Array.from({ length: columns }, (_, columnIndex) => {
                const mark = byCell.get(`${rowIndex + 1}:${columnIndex + 1}`);
                const here = mark !== undefined && mark.rowId === highlightedRowId;
                return (
                  // biome-ignore lint/a11y/useKeyWithClickEvents: a pointer short cut; the grid is the keyboard way
                  <td
                    // biome-ignore lint/suspicious/noArrayIndexKey: a column of a file has no other name than its number
                    key={columnIndex}
                    data-row-id={mark?.rowId}
                    data-highlighted={here || undefined}
                    onClick={mark ? () => onPick(mark.rowId) : undefined}
                    className={cx(
                      'whitespace-nowrap border-b border-r border-fallow/50 px-2 py-1 font-figures',
                      mark && 'cursor-pointer underline decoration-gley decoration-dotted underline-offset-4',
                      here && 'bg-gley-wash outline-2 outline-gley -outline-offset-2',
                    )}
                  >
                    {row[columnIndex] ?? ''}
                  </td>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
      {rows.length > SHOWN_ROWS ? (
        <p className="p-2 text-sm text-clay">
          The first {SHOWN_ROWS} of {rows.length} lines. Open the original for the rest.
        </p>
      ) : null}
    </PagePane>
  );
}
