/** Text with tabs or commas between cells, quoted where a cell holds the delimiter, a quote or a line break. */
export function parseDelimited(text: string, delimiter: string): string[][] {
  const source = text.replace(/^\uFEFF/, '');
  const rows: string[][] = [];
  let row: string[] = [];
  let cell = '';
  let quoted = false;
  let at = 0;
  const endRow = () => {
    row.push(cell);
    rows.push(row);
    row = [];
    cell = '';
  };
  while (at < source.length) {
    const character = source.charAt(at);
    if (quoted) {
      if (character !== '"') cell += character;
      else if (source.charAt(at + 1) === '"') {
        cell += '"';
        at += 1;
      } else quoted = false;
    } else if (character === '"' && cell === '') quoted = true;
    else if (character === delimiter) {
      row.push(cell);
      cell = '';
    } else if (character === '\n') endRow();
    else if (character === '\r') {
      if (source.charAt(at + 1) !== '\n') endRow();
    } else cell += character;
    at += 1;
  }
  // A last line break ends the last row and starts no new one.
  if (cell !== '' || row.length > 0) endRow();
  return rows;
}

/** A quote that never closes would swallow the rest of a clipboard; then the text is split plainly. */
export function parseTsv(text: string): string[][] {
  const quotes = text.split('"').length - 1;
  if (quotes % 2 === 0) return parseDelimited(text, '\t');
  const lines = text.replace(/^\uFEFF/, '').split(/\r\n|\r|\n/);
  if (lines.at(-1) === '') lines.pop();
  return lines.map((line) => line.split('\t'));
}

export function formatTsv(rows: readonly (readonly string[])[]): string {
  return rows
    .map((row) => row.map((cell) => (/[\t\n\r"]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell)).join('\t'))
    .join('\n');
}
