'use client';

import { useEffect, useMemo, useRef } from 'react';
import { cx } from '../cx';
import { parseDelimited } from '../grid/delimited';
import { decodeText, guessDelimiter, looksDelimited } from './delimiter';
import { PagePane } from './pdf-view';
import { TableView } from './table-view';
import type { PageMark, PageViewProps } from './types';
import { useFile } from './use-file';
import { ViewFailed, ViewLoading, ViewPanel } from './view-states';

type TextProps = Omit<PageViewProps, 'source' | 'originalHref'>;

const SHOWN_LINES = 3_000;

export function TextView({ url, ...props }: TextProps & { url: string }) {
  const { file, again } = useFile(url, props.load);
  const text = useMemo(() => (file.kind === 'ready' ? decodeText(file.bytes).replace(/^\uFEFF/, '') : ''), [file]);
  if (file.kind === 'loading') return <ViewLoading fileName={props.fileName} />;
  if (file.kind === 'failed') return <ViewFailed reason={file.reason} onAgain={again} />;
  if (text.trim() === '') return <ViewPanel title="The file holds no lines" />;
  const asTable = /\.txt$/i.test(props.fileName) && looksDelimited(text);
  if (asTable) return <TableView rows={parseDelimited(text, guessDelimiter(text))} {...props} />;
  return <LinesView lines={text.split(/\r\n?|\n|\f/)} {...props} />;
}

/** The mark of a number reaches to the next blank or sign of the file's own language. */
function lengthOf(line: string, from: number): number {
  return /^[<>]?[^\s<>"',;|{}]+/.exec(line.slice(from))?.[0].length ?? 1;
}

type Piece = { readonly at: number; readonly text: string; readonly mark: PageMark | null };

function piecesOf(line: string, marks: readonly PageMark[]): Piece[] {
  const pieces: Piece[] = [];
  let at = 0;
  for (const mark of [...marks].sort((a, b) => (a.cell?.column ?? 0) - (b.cell?.column ?? 0))) {
    const from = (mark.cell?.column ?? 1) - 1;
    if (from < at || from >= line.length) continue;
    if (from > at) pieces.push({ at, text: line.slice(at, from), mark: null });
    const to = from + lengthOf(line, from);
    pieces.push({ at: from, text: line.slice(from, to), mark });
    at = to;
  }
  if (at < line.length) pieces.push({ at, text: line.slice(at), mark: null });
  return pieces;
}

function LinesView({ lines, ...props }: TextProps & { lines: readonly string[] }) {
  const { marks, highlightedRowId, onPick, fileName } = props;
  const pane = useRef<HTMLElement>(null);
  const byLine = useMemo(() => {
    const map = new Map<number, PageMark[]>();
    for (const mark of marks) if (mark.cell) map.set(mark.cell.row, [...(map.get(mark.cell.row) ?? []), mark]);
    return map;
  }, [marks]);
  useEffect(() => {
    const here = highlightedRowId === null ? null : pane.current?.querySelector<HTMLElement>('[data-highlighted]');
    if (!here || !pane.current) return;
    pane.current.scrollTop = here.offsetTop - pane.current.clientHeight / 2;
    pane.current.scrollLeft = here.offsetLeft - pane.current.clientWidth / 2;
  }, [highlightedRowId]);
  return (
    <PagePane paneRef={pane} fileName={fileName}>
      <ol className="min-w-max bg-white py-2 text-sm">
        {lines.slice(0, SHOWN_LINES).map((line, index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: a line of a file has no other name than its number
          <li key={index} className="flex gap-3 px-2 font-figures">
            <span aria-hidden="true" className="w-10 shrink-0 select-none text-right text-xs text-clay">
              {index + 1}
            </span>
            <span className="whitespace-pre">
              {piecesOf(line, byLine.get(index + 1) ?? []).map((piece) =>
                piece.mark === null ? (
                  <span key={piece.at}>{piece.text}</span>
                ) : (
                  <Marked
                    key={piece.at}
                    text={piece.text}
                    mark={piece.mark}
                    here={piece.mark.rowId === highlightedRowId}
                    onPick={onPick}
                  />
                ),
              )}
            </span>
          </li>
        ))}
      </ol>
      {lines.length > SHOWN_LINES ? (
        <p className="p-2 text-sm text-clay">
          The first {SHOWN_LINES} of {lines.length} lines. Open the original for the rest.
        </p>
      ) : null}
    </PagePane>
  );
}

function Marked({
  text,
  mark,
  here,
  onPick,
}: {
  text: string;
  mark: PageMark;
  here: boolean;
  onPick: (rowId: string) => void;
}) {
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: a pointer short cut; the grid is the keyboard way
    // biome-ignore lint/a11y/noStaticElementInteractions: as above
    <span
      data-row-id={mark.rowId}
      data-highlighted={here || undefined}
      onClick={() => onPick(mark.rowId)}
      className={cx(
        'cursor-pointer underline decoration-gley decoration-dotted underline-offset-4',
        here && 'bg-gley-wash outline-2 outline-gley',
      )}
    >
      {text}
    </span>
  );
}
