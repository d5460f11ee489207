import type { Page, Reading, Word } from '../types';
import { chunksOf, type TextLine } from './lines';

const WIDTH = 6;
const HEIGHT = 12;
const SIZE = 10;

/** Lines of text as one page of typewriter words, so that the reader of pages finds columns by their place. */
export function pageOfLines(lines: readonly TextLine[]): Page {
  const width = WIDTH * Math.max(40, ...lines.map((line) => line.text.length));
  const height = HEIGHT * Math.max(10, lines.length);
  const words = lines.flatMap((line, row) =>
    chunksOf(line.text, 1).map(
      (chunk): Word => ({
        text: chunk.text,
        x0: (chunk.from * WIDTH) / width,
        x1: (chunk.to * WIDTH) / width,
        y0: (row * HEIGHT + 1) / height,
        y1: (row * HEIGHT + 1 + SIZE) / height,
        size: SIZE,
        direction: 0,
      }),
    ),
  );
  return { number: 1, width, height, rotation: 0, words };
}

/** Places on that page given back as line and character; a pasted text has no page. */
export function withTextPlaces(reading: Reading, lines: readonly TextLine[], page: Page): Reading {
  return {
    ...reading,
    pages: 0,
    recommendations: reading.recommendations.map((one) => ({ ...one, page: null, box: null })),
    samples: reading.samples.map((sample) => ({
      ...sample,
      results: sample.results.map((result) => {
        if (result.box === null) return result;
        const [x0, y0, , y1] = result.box;
        const row = Math.floor((((y0 + y1) / 2) * page.height) / HEIGHT);
        const at = Math.round((x0 * page.width) / WIDTH);
        return {
          ...result,
          page: null,
          box: null,
          cell: { sheet: 1, row: row + 1, column: lines[row]?.column(at) ?? at + 1 },
        };
      }),
    })),
  };
}
