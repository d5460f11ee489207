import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { readTableTraced, type TableInput } from '@/lib/reading/readTable';
import { workbookOf } from '@/lib/services/sheets/workbook';

const WIDTH = 96;
const HEIGHT = 16;
const MOST_ROWS = 400;
const MOST_COLUMNS = 60;

const COLOURS: Readonly<Record<string, string>> = {
  taken: '#cde8cd',
  'summary-row': '#e4e0d4',
  recommendation: '#f3ddc4',
};

function escapeText(text: string): string {
  return text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
}

async function inputOf(bytes: Uint8Array, fileName: string): Promise<TableInput | null> {
  if (!/\.xlsx?$/i.test(fileName)) return { fileName, bytes };
  const book = await workbookOf(bytes);
  return book.ok ? { fileName, sheets: book.sheets, shownDates: book.shownDates, warnings: book.remarks } : null;
}

/** Writes DIR/<file>.sheet-<n>.svg for each sheet: every cell, what was taken and why each other number was not. */
export async function drawTable(input: { bytes: Uint8Array; fileName: string; directory: string }): Promise<void> {
  const table = await inputOf(input.bytes, input.fileName);
  const trace = table === null ? null : readTableTraced(table).trace;
  if (trace === null) return;
  for (const { facts, ledger } of trace.sheets) {
    const shown = facts.grid.slice(0, MOST_ROWS);
    const cells = shown.flatMap((row, r) =>
      row.slice(0, MOST_COLUMNS).flatMap((text, c) => {
        if (text === '') return [];
        const number = facts.meaning(r, c).kind === 'value';
        const what = ledger?.get(`${r}:${c}`) ?? (number ? 'outside-table' : '');
        const fill = what === '' ? '#fff' : (COLOURS[what] ?? '#f3d0d0');
        const [x, y] = [c * WIDTH, r * HEIGHT];
        return [
          `<g><title>${escapeText(`${text} ${what}`)}</title><rect x="${x}" y="${y}" width="${WIDTH}" height="${HEIGHT}" fill="${fill}" stroke="#ccc"/><text x="${x + 3}" y="${y + 11}" font-size="9">${escapeText(text.slice(0, 17))}</text></g>`,
        ];
      }),
    );
    const [width, height] = [WIDTH * Math.min(facts.width, MOST_COLUMNS), HEIGHT * shown.length];
    const svg = `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" font-family="sans-serif">${cells.join('\n')}</svg>\n`;
    await writeFile(join(input.directory, `${input.fileName}.sheet-${facts.sheet.number}.svg`), svg);
  }
}
