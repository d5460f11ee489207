import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { readPagesTraced, type Trace } from '@/lib/reading/readPages';
import type { Reading } from '@/lib/reading/types';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { sniffReport } from '@/lib/services/reading/sniff';
import { drawTable } from './drawTable';
import { MAX_PAGES } from './limits';
import { readPictureFile, readPicturesOfPdf, type Told } from './pictures';
import { stagesOf } from './stages';

function escapeText(text: string): string {
  return text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
}

function rect(box: { x0: number; y0: number; x1: number; y1: number }, style: string, title: string): string {
  const size = `width="${(box.x1 - box.x0).toFixed(1)}" height="${(box.y1 - box.y0).toFixed(1)}"`;
  return `<rect x="${box.x0.toFixed(1)}" y="${box.y0.toFixed(1)}" ${size} ${style}><title>${escapeText(title)}</title></rect>`;
}

/** One page, upright, with what each stage saw: words, zones, table columns, form boxes, and the numbers taken. */
function drawPage(trace: Trace, number: number, reading: Reading): string {
  const page = trace.pages.find((one) => one.number === number);
  if (page === undefined) return '';
  const shapes: string[] = [];
  for (const word of page.words) {
    shapes.push(
      `<text x="${word.x0.toFixed(1)}" y="${word.y1.toFixed(1)}" font-size="${word.size.toFixed(1)}" textLength="${(word.x1 - word.x0).toFixed(1)}" lengthAdjust="spacingAndGlyphs">${escapeText(word.text)}</text>`,
    );
  }
  for (const zone of trace.zones.filter((one) => one.page === number && one.zone !== 'results')) {
    const y1 = Math.min(zone.y1, page.height);
    shapes.push(
      rect({ ...zone, y1 }, `fill="${zone.zone === 'notes' ? '#888' : '#c60'}" fill-opacity="0.1"`, zone.zone),
    );
  }
  for (const table of trace.tables) {
    const lines = [...table.header, ...table.rows].filter((line) => line.line.page === page);
    if (lines.length === 0) continue;
    const [y0, y1] = [Math.min(...lines.map((line) => line.line.y0)), Math.max(...lines.map((line) => line.line.y1))];
    for (const column of table.columns) {
      const meaning = column.label?.analyte ?? column.field ?? column.role ?? '?';
      shapes.push(
        rect(
          { x0: column.x0, x1: column.x1, y0, y1 },
          'fill="#06c" fill-opacity="0.07" stroke="#06c" stroke-width="0.5"',
          `${column.heading}: ${meaning}`,
        ),
      );
    }
  }
  for (const run of trace.runs) {
    const lines = run.segments.map((segment) => segment.line.line).filter((line) => line.page === page);
    if (lines.length === 0) continue;
    const [y0, y1] = [Math.min(...lines.map((line) => line.y0)), Math.max(...lines.map((line) => line.y1))];
    for (const column of run.columns)
      shapes.push(
        rect(
          { x0: column.x0, x1: column.x1, y0, y1 },
          'fill="#808" fill-opacity="0.06" stroke="#808" stroke-width="0.5"',
          `${column.heading}: ${column.role ?? '?'} ${column.unit?.unit ?? ''}`,
        ),
      );
  }
  for (const hit of trace.identity.filter((one) => one.page === number)) {
    shapes.push(
      `<text x="${hit.x0.toFixed(1)}" y="${(hit.y0 - 1).toFixed(1)}" font-size="4" fill="#080">${hit.field}: ${escapeText(hit.value)}</text>`,
    );
  }
  for (const edge of trace.edges.filter((one) => one.page === number)) {
    shapes.push(
      `<line x1="${edge.x.toFixed(1)}" x2="${edge.x.toFixed(1)}" y1="${edge.y0.toFixed(1)}" y2="${edge.y1.toFixed(1)}" stroke="#0a8" stroke-width="0.8" stroke-dasharray="4 3"><title>edge between parts</title></line>`,
    );
  }
  for (const one of trace.notTaken.filter((other) => other.cell.phrase.page === page)) {
    shapes.push(rect(one.cell.phrase, 'fill="#c60" fill-opacity="0.25"', `not a result (${one.role}): ${one.why}`));
  }
  for (const one of trace.proseRefused.filter((other) => other.line.line.page === page)) {
    shapes.push(rect(one.word, 'fill="#c60" fill-opacity="0.25"', `not a result: ${one.why}`));
  }
  const taken = reading.samples
    .flatMap((sample) => sample.results)
    .filter((result) => result.page === number && result.box !== null);
  const stored = taken.map((result) => {
    const [x0, y0, x1, y1] = result.box ?? [0, 0, 0, 0];
    const swap = page.turn === 90 || page.turn === 270;
    const [w, h] = swap ? [page.height, page.width] : [page.width, page.height];
    const [a, b, c, d] = [x0 * w, y0 * h, x1 * w, y1 * h];
    const box =
      page.turn === 90
        ? { x0: b, y0: w - c, x1: d, y1: w - a }
        : page.turn === 270
          ? { x0: h - d, y0: a, x1: h - b, y1: c }
          : page.turn === 180
            ? { x0: w - c, y0: h - d, x1: w - a, y1: h - b }
            : { x0: a, y0: b, x1: c, y1: d };
    return rect(
      box,
      `fill="none" stroke="${result.confidence >= 0.95 ? '#080' : '#c00'}"`,
      `${result.analyte} ${result.printed} ${result.unit ?? 'no unit'} ${result.confidence}`,
    );
  });
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${page.width} ${page.height}" font-family="sans-serif">${[...shapes, ...stored].join('\n')}</svg>\n`;
}

/** What the stages saw of a PDF or a picture; a scanned page is shown level, as the stages see it. */
async function tracedFile(input: { bytes: Uint8Array; fileName: string }) {
  const quiet: Told = { page: () => undefined, scans: () => undefined };
  const sniffed = sniffReport(input);
  if (!sniffed.ok) return null;
  if (sniffed.kind === 'png' || sniffed.kind === 'jpeg') return readPictureFile(input, quiet);
  if (sniffed.kind !== 'pdf') return null;
  const words = await wordsOfPdf({ bytes: input.bytes, maxPages: MAX_PAGES });
  if (!words.ok) return null;
  const pictured = await readPicturesOfPdf({ ...input, pages: words.pages }, quiet);
  if (pictured !== null) return pictured;
  const { reading, trace } = readPagesTraced({ fileName: input.fileName, pages: words.pages });
  return { level: reading, trace };
}

/** Writes DIR/<file>.page-<n>.svg and .stages.json for each page of a PDF or picture, DIR/<file>.sheet-<n>.svg for each sheet of a data file. */
export async function drawFile(input: { bytes: Uint8Array; fileName: string; directory: string }): Promise<void> {
  const sniffed = sniffReport(input);
  if (sniffed.ok && ['csv', 'xlsx', 'xls'].includes(sniffed.kind)) return drawTable(input);
  const traced = await tracedFile(input);
  if (traced === null || traced.trace === null) return;
  for (const page of traced.trace.pages) {
    await writeFile(
      join(input.directory, `${input.fileName}.page-${page.number}.svg`),
      drawPage(traced.trace, page.number, traced.level),
    );
    await writeFile(
      join(input.directory, `${input.fileName}.page-${page.number}.stages.json`),
      `${JSON.stringify(stagesOf(traced.trace, page.number, traced.level), null, 1)}\n`,
    );
  }
}
