import type { Identity, IdentityField } from '../candidate';
import { readLabel } from '../labels/label';
import { remembered } from '../labels/remember';
import type { CellLine, PageCell } from './cells';
import { ANY_DATE } from './dates';

/** Headings of what identifies a sample, most telling first. "other" is known and set aside, so that it is not mistaken. */
const FIELDS: readonly (readonly [IdentityField, RegExp])[] = [
  [
    'dateSampled',
    /^(date (sampled|collected|taken|of sampling)|(sample|sampling|collection) date|sampled( on)?|collected( on)?|date sample taken)$/,
  ],
  [
    'dateReported',
    /^(date (reported|of report|printed|issued|completed)|report(ed)?( date| on)?|reporting date|date of issue|issued)$/,
  ],
  [
    'other',
    /^(date )?(received|processed|analy[sz]ed|logged)( on| date)?$|^(grower|client|customer|account|company|name|address|city|phone|fax|e-?mail|submitted (by|for)|prepared for|adviser|advisor|agent|copy to|bill to|order( no| number)?|report (no|number|id)|invoice|batch|page|county|state|crop(s| to grow| code)?( \d)?|last crop|previous crop|intended crop|yield goal|area|acres|size|sq ft|garden size|soil (type|code|class)|p\.?o\.?( no| number)?|kit|purpose|tillage|matrix|county code|information sheet|client no|account no|customer no)$/,
  ],
  [
    'labNumber',
    /^(lab(oratory)? ?(no|nr|number|#|id|ref(erence)?|sample( no| number| id)?|code)|lab#|labno|accession( no)?|specimen( no)?)$/,
  ],
  ['depthTop', /^(beginning depth|begin depth|top depth|upper depth|depth from|depth top|start depth)$/],
  ['depthBottom', /^(ending depth|end depth|bottom depth|lower depth|depth to|depth bottom)$/],
  ['depth', /^((sample|sampling|soil) )?depth( range)?( (in|inches|cm))?$/],
  [
    'sampleId',
    /^((soil|your|client|grower|customer|field) )?sample ?(id|ident|identification|identity|name|description|label|ref(erence)?|no|nr|number|#|code|location)?$|^(id|ident|identification|sampleid|sample-id|bed|plot( name)?|garden bed|location|description|your reference|your ref|client ref(erence)?|area sampled|sample area)$/,
  ],
  ['fieldName', /^(field( ?(id|name|no|number))?|site( name)?|garden|block|paddock|farm( name)?)$/],
];

function bareHeading(text: string): string {
  return text
    .replace(/^\s*\(?\d{1,2}[.)]\s+(?=\p{L})/u, '')
    .toLowerCase()
    .replace(/\((in|inches|cm)\.?\)/, '$1')
    .replace(/[.:()]/g, ' ')
    .replace(/[_]/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();
}

/** The field that a heading names, or null when it names none. */
export const fieldOf = remembered((text: string): IdentityField | null => {
  const bare = bareHeading(text);
  if (bare === '' || bare.length > 40) return null;
  return FIELDS.find(([, pattern]) => pattern.test(bare))?.[0] ?? null;
});

/** "Sample ID: Top bed" or "Lab No 20418" in one phrase. */
export function fieldWithValue(text: string): { field: IdentityField; value: string } | null {
  const colon = text.indexOf(':');
  if (colon > 0) {
    const field = fieldOf(text.slice(0, colon));
    const value = text.slice(colon + 1).trim();
    return field === null || value === '' ? null : { field, value: value.split(/\s[·|•]\s/)[0]?.trim() ?? value };
  }
  // "Sample SP-1", "Plot 4": without a colon only a short name with a figure in it.
  const plain = /^(sample|plot|bed|field|sample id|sample no\.?)\s+(\S+(?: \S+){0,2})$/i.exec(text);
  if (plain !== null && /\d|^[A-Z]$/.test(plain[2] ?? '') && !/^(no|id|number|date|depth|of)\b/i.test(plain[2] ?? ''))
    return { field: 'sampleId', value: (plain[2] ?? '').trim() };
  const words = text.split(' ');
  for (let cut = Math.min(words.length - 1, 4); cut >= 1; cut--) {
    const field = fieldOf(words.slice(0, cut).join(' '));
    const value = words.slice(cut).join(' ');
    if (field === null) continue;
    const dated = field === 'dateSampled' || field === 'dateReported';
    const ok = dated
      ? ANY_DATE.test(value)
      : field === 'labNumber'
        ? /\d{2,}/.test(value)
        : field === 'depth' && /\d/.test(value);
    if (ok) return { field, value };
  }
  return null;
}

/** "HH-331" or "20418" under or beside a name is the laboratory's number, not more of the name. */
export function isCode(text: string): boolean {
  return /^(?=.*\d{2})[A-Z]{0,4}[-./ ]?\d[\dA-Z./-]*$/.test(text);
}

type Inside = { field: IdentityField; value: string; from: number };

/** Fields set one after another in one phrase: "Sample 1: Marrow bed Lab no. WL-901 Depth 0-20 cm". */
export function fieldsInside(words: readonly string[]): readonly Inside[] {
  return insideOf(words.join(' '));
}

const insideOf = remembered((text: string): readonly Inside[] => {
  const words = text.split(' ');
  const starts: { field: IdentityField; from: number; to: number }[] = [];
  for (let at = 0; at < words.length; at++) {
    for (let to = Math.min(words.length - 1, at + 4); to > at; to--) {
      const text = words.slice(at, to).join(' ').replace(/^\(/, '');
      const colon = /[:#]$/.test(text);
      const bare = colon ? text.slice(0, -1) : text;
      const field =
        fieldOf(bare) ?? (colon && /^(sample|plot|bed|field) (no\.? ?)?\w{1,3}$/i.test(bare) ? 'sampleId' : null);
      if (field === null) continue;
      const rest = words.slice(to, to + 4).join(' ');
      const dated = field === 'dateSampled' || field === 'dateReported';
      const sure = dated
        ? new RegExp(`^(?:${ANY_DATE.source})`).test(rest)
        : field === 'depth'
          ? /^\d/.test(rest)
          : colon || (field === 'labNumber' && /^([A-Z]{1,4} )?\S*\d{2,}/.test(rest));
      if (!sure) continue;
      // "Top bed: sulfur" is no field in the middle of words; a number, a day or a depth may follow a name.
      if (at > 0 && starts.length === 0 && (field === 'other' || field === 'sampleId' || field === 'fieldName')) break;
      starts.push({ field, from: at, to });
      at = to;
      break;
    }
  }
  return starts.map((start, index) => ({
    field: start.field,
    value: words
      .slice(start.to, starts[index + 1]?.from ?? words.length)
      .join(' ')
      .replace(start.field === 'labNumber' || start.field === 'depth' ? /[),;].*$|\. .*$/ : /^$/, '')
      .replace(/\s[·|•](\s.*)?$/, '')
      .replace(/[,;|·•.]+$/, '')
      .trim(),
    from: start.from,
  }));
});

export type IdentityHit = {
  readonly field: IdentityField;
  readonly value: string;
  readonly page: number;
  readonly line: number;
  readonly x0: number;
  readonly y0: number;
};

function isHeading(text: string): boolean {
  return fieldOf(text) !== null || fieldWithValue(text) !== null;
}

function fits(field: IdentityField, text: string): boolean {
  if (field === 'dateSampled' || field === 'dateReported') return ANY_DATE.test(text);
  if (field === 'depth') return /\d/.test(text);
  return /[\p{L}\p{N}]/u.test(text) && text.length <= 60 && readLabel(text) === null;
}

function below(lines: readonly CellLine[], at: number, cell: PageCell): string | null {
  for (const next of lines.slice(at + 1, at + 3)) {
    if (next.line.page !== cell.phrase.page || next.line.y0 - cell.phrase.y1 > 1.8 * cell.phrase.size) return null;
    const hit = next.cells.find((other) => other.phrase.x0 < cell.phrase.x1 && other.phrase.x1 > cell.phrase.x0);
    if (hit !== undefined) return isHeading(hit.phrase.text) ? null : hit.phrase.text;
  }
  return null;
}

const PAIR =
  /([\p{L}\p{N}][\p{L}\p{N}'’-]*(?: [\p{L}\p{N}'’-]+){0,3}?) \((?:lab(?:oratory)?\.? ?(?:no|nr|number)?\.?:? ?)([A-Z]{0,4}[ -]?[\dA-Z./-]*\d)\)/giu;
const NO_NAME = /^(re|and|samples?|soil|the|of|two|three|for|your|beds?|plots?)$/i;

/**
 * "Soil samples Bed A (lab. no. 1180) and Bed B (lab. no. 1181)" in the head of a letter; further down each name stands
 * over what is told of it.
 */
function toldBefore(lines: readonly CellLine[], taken: ReadonlySet<CellLine>): IdentityHit[] {
  const free = lines.filter((line) => !taken.has(line));
  const text = free.map((line) => line.line.text).join(' ');
  const pairs = [...text.matchAll(PAIR)].map((match) => {
    const words = (match[1] ?? '').split(' ');
    while (words.length > 1 && NO_NAME.test(words[0] ?? '') && !/^bed|^plot/i.test(words[0] ?? '')) words.shift();
    return { name: words.join(' '), number: match[2] ?? '' };
  });
  if (pairs.length < 2) return [];
  return free.flatMap((line): IdentityHit[] => {
    const [cell] = line.cells;
    if (cell === undefined) return [];
    const lower = cell.phrase.text.toLowerCase();
    const pair = pairs.find(
      ({ name }) =>
        lower === name.toLowerCase() ||
        lower.startsWith(`${name.toLowerCase()}. `) ||
        lower.startsWith(`${name.toLowerCase()}: `),
    );
    if (pair === undefined) return [];
    const place = { page: cell.phrase.page.number, line: line.line.index, x0: cell.phrase.x0, y0: cell.phrase.y0 };
    return [
      { field: 'sampleId', value: pair.name, ...place },
      { field: 'labNumber', value: pair.number, ...place },
    ];
  });
}

/** "SAMPLE EAST RIDGE" is the sample called East Ridge. */
function bareName(text: string): string {
  return text.replace(/^(sample|plot|bed|field)( (id|name|no\.?))?[: ]+(?=\S)/i, '');
}

/** The name of a sample stands over or before its laboratory number when nothing else names it. */
function namesBeside(lines: readonly CellLine[], hits: readonly IdentityHit[]): IdentityHit[] {
  return hits.flatMap((hit): IdentityHit[] => {
    if (hit.field !== 'labNumber') return [];
    const near = hits.some(
      (other) =>
        other.field === 'sampleId' &&
        other.page === hit.page &&
        Math.abs(other.y0 - hit.y0) < 40 &&
        Math.abs(other.x0 - hit.x0) < 260,
    );
    if (near) return [];
    const at = lines.findIndex((line) => line.line.page.number === hit.page && line.line.index === hit.line);
    const own = lines[at];
    const above = lines.findLast(
      (line) =>
        line.line.page.number === hit.page &&
        line.line.y1 <= hit.y0 + 2 &&
        hit.y0 - line.line.y1 < 1.8 * line.line.size &&
        line.cells.some((cell) => cell.phrase.x0 < hit.x0 + 60 && cell.phrase.x1 > hit.x0),
    );
    const plain = (cell: PageCell | undefined) =>
      cell !== undefined &&
      cell.meaning.kind === 'text' &&
      cell.phrase.words.length <= 5 &&
      !isHeading(cell.phrase.text) &&
      !/[:@]|\d{4}/.test(cell.phrase.text) &&
      readLabel(cell.phrase.text) === null;
    const before = own?.cells[0];
    if (
      before !== undefined &&
      own !== undefined &&
      own.cells.length <= 3 &&
      plain(before) &&
      before.phrase.x1 < hit.x0 + 1
    )
      return [
        {
          field: 'sampleId',
          value: bareName(before.phrase.text),
          page: hit.page,
          line: hit.line,
          x0: before.phrase.x0,
          y0: before.phrase.y0,
        },
      ];
    const number = own?.cells.find((cell) => cell.phrase.x0 <= hit.x0 && cell.phrase.x1 > hit.x0);
    const over = above?.cells.find(
      (cell) => number !== undefined && cell.phrase.x0 < number.phrase.x1 && cell.phrase.x1 > number.phrase.x0,
    );
    if (
      over === undefined ||
      number === undefined ||
      above?.line.page !== own?.line.page ||
      above === undefined ||
      !plain(over) ||
      above.cells.length < 1 ||
      number.phrase.y0 - over.phrase.y1 > 1.8 * over.phrase.size
    )
      return [];
    // The laboratory's own name over its address is no sample.
    if (/\b(lab|labs|laborator|service|institute|university|street|road|box|centre|center)\b/i.test(over.phrase.text))
      return [];
    return [
      {
        field: 'sampleId',
        value: bareName(over.phrase.text),
        page: hit.page,
        line: hit.line - 1,
        x0: over.phrase.x0,
        y0: over.phrase.y0,
      },
    ];
  });
}

/** Stage 4a. Form boxes around the numbers: "label: value", label beside value, label over value. */
export function identityHits(lines: readonly CellLine[], taken: ReadonlySet<CellLine>): IdentityHit[] {
  const hits: IdentityHit[] = [];
  for (const [at, line] of lines.entries()) {
    if (taken.has(line)) continue;
    for (const [index, cell] of line.cells.entries()) {
      const text = cell.phrase.text;
      const place = { page: cell.phrase.page.number, line: line.line.index, x0: cell.phrase.x0, y0: cell.phrase.y0 };
      const inside = fieldsInside(cell.phrase.words.map((word) => word.text)).filter((one) => one.value !== '');
      if (inside.length >= 2 || (inside[0] !== undefined && inside[0].from > 0)) {
        const start = cell.phrase.words[inside[0]?.from ?? 0];
        const head = cell.phrase.words.slice(0, inside[0]?.from ?? 0).map((word) => word.text);
        // "North bed (lab no. WB 615)" begins what is told of that bed.
        if (start?.text.startsWith('(') && head.length >= 1 && head.length <= 5)
          hits.push({ field: 'sampleId', value: head.join(' '), ...place });
        for (const one of inside)
          hits.push({ field: one.field, value: one.value, ...place, x0: cell.phrase.words[one.from]?.x0 ?? place.x0 });
        continue;
      }
      const whole =
        fieldWithValue(text) ?? (inside[0] === undefined ? null : { field: inside[0].field, value: inside[0].value });
      if (whole !== null) {
        hits.push({ ...whole, ...place });
        continue;
      }
      const field = fieldOf(text);
      if (field === null) continue;
      const right = line.cells[index + 1];
      const beside =
        right !== undefined &&
        !isHeading(right.phrase.text) &&
        right.phrase.x0 - cell.phrase.x1 < 14 * cell.phrase.size;
      const value = beside && fits(field, right.phrase.text) ? right.phrase.text : below(lines, at, cell);
      if (value !== null && fits(field, value)) hits.push({ field, value, ...place });
    }
  }
  const sized = withoutSizes(hits);
  hits.splice(0, hits.length, ...sized);
  const told = toldBefore(lines, taken);
  if (told.length > 0) {
    const codes = new Set(told.map((one) => one.value));
    return [...hits.filter((hit) => !codes.has(hit.value)), ...told];
  }
  return [...hits, ...namesBeside(lines, hits)];
}

/** "Area sampled: 5,500 sq ft" is a size and no name. */
function withoutSizes(hits: readonly IdentityHit[]): IdentityHit[] {
  return hits.map((hit) =>
    hit.field === 'sampleId' &&
    /^[\d.,]+ ?(sq\.? ?(ft|feet|m|yd)|square|acres?|ac|ha|m2|m²|hectares?)\b/i.test(hit.value)
      ? { ...hit, field: 'other' }
      : hit,
  );
}

/** Hits that belong together, first one of each field kept. */
export function identityOf(hits: readonly IdentityHit[]): Identity {
  const identity: Identity = {};
  for (const hit of hits) {
    if (identity[hit.field] === undefined) identity[hit.field] = hit.value;
  }
  return identity;
}
