import { type Chunk, chunksOf, type TextLine } from './lines';

type Span = { from: number; to: number };

/** Runs of lines that touch each other are one table; a blank line ends it only when the columns change too much. */
function spansOf(lines: readonly (readonly Chunk[])[]): Span[] {
  const spans: Span[] = [];
  const chunks = lines
    .filter((line) => line.length > 1)
    .flat()
    .sort((a, b) => a.from - b.from);
  for (const chunk of chunks) {
    const last = spans[spans.length - 1];
    if (last !== undefined && chunk.from < last.to) last.to = Math.max(last.to, chunk.to);
    else spans.push({ from: chunk.from, to: chunk.to });
  }
  return spans;
}

export type AlignedGrid = {
  readonly grid: readonly (readonly string[])[];
  /** Character of the line (from 1) at which a cell begins. */
  readonly column: (row: number, at: number) => number;
};

/** Text set in columns with blanks, as rows of cells: what overlaps in place from line to line is one column. */
export function alignedGrid(lines: readonly TextLine[]): AlignedGrid {
  const chunks = lines.map((line) => chunksOf(line.text, 2));
  const spans = spansOf(chunks);
  const places = new Map<string, number>();
  const grid = chunks.map((line, row) => {
    const cells: string[] = [];
    for (const chunk of line) {
      const at =
        line.length === 1 && chunk.from < (spans[1]?.from ?? Number.POSITIVE_INFINITY)
          ? 0
          : spans.findIndex((span) => chunk.from < span.to && chunk.to > span.from);
      const column = Math.max(0, at);
      while (cells.length <= column) cells.push('');
      cells[column] = cells[column] === '' ? chunk.text : `${cells[column]} ${chunk.text}`;
      if (!places.has(`${row}:${column}`)) places.set(`${row}:${column}`, lines[row]?.column(chunk.from) ?? 1);
    }
    return cells;
  });
  return { grid, column: (row, at) => places.get(`${row}:${at}`) ?? 1 };
}
