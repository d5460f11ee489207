const CANDIDATES = [',', ';', '\t', '|'] as const;

/** The sign that parts the first lines most often and most evenly; a comma where none does. */
export function guessDelimiter(text: string): string {
  const lines = text
    .split(/\r\n|\r|\n/)
    .filter((line) => line.trim() !== '')
    .slice(0, 20);
  let best = ',';
  let bestScore = 0;
  for (const candidate of CANDIDATES) {
    const counts = lines.map((line) => line.replace(/"[^"]*"/g, '').split(candidate).length - 1);
    const most = Math.max(0, ...counts);
    const score = most * counts.filter((count) => count === most).length;
    if (score > bestScore) {
      best = candidate;
      bestScore = score;
    }
  }
  return best;
}

/** True when most lines are cells parted by one sign: such a text is shown as a table, as the reader takes it. */
export function looksDelimited(text: string): boolean {
  const lines = text.split(/\r\n?|\n/).filter((line) => line.trim() !== '');
  const most = (least: number, sign: RegExp) =>
    lines.filter((line) => (line.match(sign)?.length ?? 0) >= least).length >= 0.6 * lines.length;
  return most(1, /\t/g) || most(2, /;/g) || most(2, /\|/g) || most(2, /,(?! )/g);
}

/** Text of a data file: by its byte-order mark, else UTF-8, else the old Windows set. */
export function decodeText(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder('utf-16le').decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder('utf-16be').decode(bytes);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder('windows-1252').decode(bytes);
  }
}
