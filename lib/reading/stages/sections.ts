import { ANALYTES, type AnalyteKey, METHODS, type UnitKey } from '@/lib/domain/analytes';
import { methodIn, unitIn } from '../labels/label';
import { findWhole, normal } from '../labels/normal';
import type { CellLine } from './cells';
import { fieldsInside, fieldWithValue } from './identity';

export type Zone = 'results' | 'recommendation' | 'notes';
export type ZoneBox = {
  readonly zone: Zone;
  readonly page: number;
  readonly x0: number;
  readonly x1: number;
  readonly y0: number;
  readonly y1: number;
  /** Unit that the heading gives for everything under it. */
  readonly unit: UnitKey | null;
};

const ADVICE =
  /^(\W|\d\.)*((fertili[sz]er|lime|limestone|nutrient|amendment|soil amendment|lime (and|&) fertili[sz]er|soil fertility|crop|garden|our)\s*)*(recommendations?|suggestions?|suggested (rates?|amendments?|treatment|application)|advice|guidelines|what to (add|apply)|(rates?|amounts?) to apply)\b/i;
const NOTES =
  /^(notes?|comments?|remarks|interpretation|explanations?|how to read|understanding|legend|key|methods?( of analysis)?|definitions|guide to)\b/i;
const RESULTS =
  /^(soil )?((test|analysis|laboratory|analytical) )?(results?|analysis|report of analysis|soil test|soil analysis|test values)\b/i;

function zoneOfHeading(text: string): Zone | null {
  if (text.split(' ').length > 8) return null;
  if (ADVICE.test(text)) return 'recommendation';
  if (NOTES.test(text)) return 'notes';
  return RESULTS.test(text) ? 'results' : null;
}

/**
 * Stage 4b. Which part of a page is results, advice or notes, from headings. A heading beside another heading, or one
 * that begins right of the middle, rules only its own side.
 */
export function zonesOf(lines: readonly CellLine[]): ZoneBox[] {
  const heads: { unit: UnitKey | null; zone: Zone; page: number; x0: number; x1: number; y: number }[] = [];
  for (const line of lines) {
    if (line.values >= 2) continue;
    const found = line.cells.flatMap((cell) => {
      const zone = zoneOfHeading(cell.phrase.text);
      return zone === null ? [] : [{ zone, cell }];
    });
    const alone = line.cells.length === 1;
    for (const [index, { zone, cell }] of found.entries()) {
      // A line of column headings ("Test, Method, Result") is no section heading.
      const last = line.cells[line.cells.length - 1] === cell;
      const apart = last && cell.phrase.x0 - (line.cells[line.cells.length - 2]?.phrase.x1 ?? 0) > 2 * cell.phrase.size;
      const only = line.cells[0] === cell && /^recommendations?:?$/i.test(cell.phrase.text);
      const beside = zone === 'recommendation' && (line.cells.length === 2 || apart || only);
      if (!alone && found.length < line.cells.length && !beside) continue;
      const width = cell.phrase.page.width;
      const next = found[index + 1];
      const sided = found.length > 1 || cell.phrase.x0 > 0.52 * width;
      heads.push({
        unit: unitIn(cell.phrase.text)?.unit ?? null,
        zone,
        page: cell.phrase.page.number,
        x0: sided ? cell.phrase.x0 - 2 * cell.phrase.size : 0,
        x1: sided && next !== undefined ? next.cell.phrase.x0 - next.cell.phrase.size : width,
        y: cell.phrase.y0,
      });
    }
  }
  // What is told of the next sample is no advice for the one before.
  const samples = lines.flatMap((line) =>
    line.cells
      .filter((cell) => {
        const said = [
          ...fieldsInside(cell.phrase.words.map((word) => word.text)),
          ...[fieldWithValue(cell.phrase.text)].flatMap((one) => one ?? []),
        ];
        return said.some((one) => one.field === 'sampleId' || one.field === 'labNumber');
      })
      .map((cell) => ({ page: cell.phrase.page.number, x0: cell.phrase.x0, x1: cell.phrase.x1, y: cell.phrase.y0 })),
  );
  return heads.map((head) => {
    const ends = [...heads, ...(head.zone === 'recommendation' ? samples : [])]
      .sort((a, b) => a.y - b.y)
      .find((other) => other.page === head.page && other.y > head.y + 1 && other.x0 < head.x1 && other.x1 > head.x0);
    return {
      unit: head.unit,
      zone: head.zone,
      page: head.page,
      x0: head.x0,
      x1: head.x1,
      y0: head.y,
      y1: ends?.y ?? Number.POSITIVE_INFINITY,
    };
  });
}

/** What a place of a page belongs to: results, unless a box of advice or notes covers it. */
export function zoneAt(zones: readonly ZoneBox[], page: number, x: number, y: number): Zone {
  let zone: Zone = 'results';
  for (const box of zones) {
    if (box.page === page && x >= box.x0 && x < box.x1 && y >= box.y0 - 0.5 && y < box.y1 - 0.5) zone = box.zone;
  }
  return zone;
}

export type Statements = {
  /** Unit that the document says all results are in. */
  readonly unit: { unit: UnitKey; printed: string } | null;
  readonly methods: ReadonlyMap<AnalyteKey, { method: ReturnType<typeof methodIn>; printed: string }>;
  /** Units that a key or footnote gives by analyte. */
  readonly units?: ReadonlyMap<AnalyteKey, { unit: UnitKey; printed: string }>;
};

const ALL_RESULTS =
  /\b(all )?(results|values|nutrients|levels)\b.{0,30}\b(are |is )?(reported|expressed|given|shown|stated|listed|are|in)\b.{0,12}\b(in|as)\b/i;
const EXTRACTANTS = METHODS.filter((method) =>
  ['M3', 'M1', 'mod_Morgan', 'Morgan', 'AB_DTPA', 'H3A', 'NH4OAc'].includes(method.key),
);

const LONG_NAMES = ANALYTES.map((entry) => ({
  key: entry.key,
  symbol: entry.symbol,
  names: entry.spellings.filter((spelling) => spelling.length > 3).map((spelling) => normal(spelling)),
}));

function analytesNamed(text: string): AnalyteKey[] {
  const plain = normal(text);
  const found = new Set<AnalyteKey>();
  const words = text.split(/[\s,;:&/()]+|\band\b/).map((word) => word.replace(/\.$/, ''));
  for (const { key, symbol, names } of LONG_NAMES) {
    const bySymbol = words.includes(symbol) && symbol !== 'CaCO3';
    const byName = names.some((name) => findWhole(plain, name) >= 0);
    if (bySymbol || byName) found.add(key);
  }
  const groups: readonly (readonly [RegExp, readonly AnalyteKey[]])[] = [
    [/\b(micro-?nutrients?|trace elements?|minor elements?)\b/i, ['boron', 'zinc', 'manganese', 'iron', 'copper']],
    [
      /\b(major |macro-?|primary |secondary )nutrients\b/i,
      ['phosphorus', 'potassium', 'calcium', 'magnesium', 'sulfur'],
    ],
    [/\b(exchangeable )?(cations|bases)\b/i, ['potassium', 'calcium', 'magnesium', 'sodium']],
  ];
  for (const [pattern, keys] of groups) if (pattern.test(text)) for (const key of keys) found.add(key);
  if (found.has('buffer_ph') && !/(^|[,;:&] ?|and )pH\b(?! buffer)/.test(text.replace(/buffer pH/gi, '')))
    found.delete('soil_ph_water');
  return [...found];
}

/** "P, K, Ca and Mg in ppm; CEC in meq/100 g": units by analyte, in clauses without any other number. */
function unitsOf(text: string): [AnalyteKey, { unit: UnitKey; printed: string }][] {
  return text.split(/;|\.\s|\s\|\s|\s·\s/).flatMap((clause): [AnalyteKey, { unit: UnitKey; printed: string }][] => {
    if (clause.length > 160) return [];
    const found = unitIn(clause);
    if (
      found === null ||
      ['ton/acre', 'lb/1000ft2', 'lb/100ft2', 'oz/1000ft2', 'oz/100ft2', 'g/m2', 't/ha'].includes(found.unit)
    )
      return [];
    const bare = clause
      .replace(found.printed, ' ')
      .replace(/\b(P2O5|K2O|NO3|NH4|SO4|H2O|CaCl2|1:\d(\.\d)?|100)\b/g, ' ');
    if (/\d/.test(bare) || !/\b(in|as|are|is|=|:)|[:=]/i.test(clause)) return [];
    return analytesNamed(clause.replace(found.printed, ' ')).map((key) => [
      key,
      { unit: found.unit, printed: found.printed },
    ]);
  });
}

/** Stage 4c. What the page says once for all its numbers: "P, K, Ca, Mg: Mehlich-3; organic matter: loss on ignition". */
export function statementsOf(texts: readonly string[]): Statements {
  const methods = new Map<AnalyteKey, { method: ReturnType<typeof methodIn>; printed: string }>();
  let unit: Statements['unit'] = null;
  const units = new Map<AnalyteKey, { unit: UnitKey; printed: string }>();
  const everyone = new Set<AnalyteKey>();
  for (const text of texts) {
    for (const [key, found] of unitsOf(text)) if (!units.has(key)) units.set(key, found);
    const unless =
      /\(?([^()]{2,24}?) (?:unless|except where|if not) (?:otherwise )?(?:shown|stated|noted|given|marked)/i.exec(text);
    const general = unless === null ? null : unitIn(unless[1] ?? '');
    if (unit === null && general !== null) unit = { unit: general.unit, printed: general.printed };
    if (unit === null && ALL_RESULTS.test(text)) {
      const found = unitIn(text.slice(text.search(ALL_RESULTS)));
      if (found !== null && ['mg/kg', 'lb/acre', 'kg/ha', 'mg/L', 'mg/dm3'].includes(found.unit))
        unit = { unit: found.unit, printed: found.printed };
    }
    if (!/method|extract|procedure|determined|measured|\bby\b|analy[sz]ed|mehlich|suspension|ignition/i.test(text))
      continue;
    for (const clause of text.split(/;|\.\s|\s\|\s/)) {
      const named = analytesNamed(clause);
      for (const key of named) {
        const method = methodIn(key, clause);
        if (method !== null && !methods.has(key)) methods.set(key, { method, printed: method.printed });
      }
      const extractant = EXTRACTANTS.find((entry) =>
        entry.spellings.some(
          (spelling) =>
            spelling.length > 3 &&
            findWhole(normal(clause).replace(/-/g, ' '), normal(spelling).replace(/-/g, ' ')) >= 0,
        ),
      );
      if (named.length === 0 && extractant !== undefined && /extract|method/i.test(clause)) {
        for (const key of [...extractant.analytes, 'phosphorus' as const]) everyone.add(key);
        for (const key of everyone) {
          const method = methodIn(key, clause);
          if (method !== null && !methods.has(key)) methods.set(key, { method, printed: method.printed });
        }
      }
    }
  }
  return { unit, methods, units };
}

/** The laboratory's name: the largest type near the top that calls itself a laboratory or a testing service. */
export function laboratoryName(lines: readonly CellLine[]): string | null {
  const named = lines
    .filter((line) => line.line.page.number <= 2 && line.line.y0 < 0.35 * line.line.page.height)
    .flatMap((line) => line.cells)
    .filter((cell) =>
      /\b(laborator(y|ies)|labs?|testing (service|cent(er|re))|analytical|soil (service|testing))\b/i.test(
        cell.phrase.text,
      ),
    )
    .filter(
      (cell) =>
        !/\b(no|number|id|report|results?|analysis of|method)\b|[:#]/i.test(cell.phrase.text) &&
        cell.phrase.text.length <= 70,
    );
  const best = named.sort((a, b) => b.phrase.size - a.phrase.size || a.phrase.y0 - b.phrase.y0)[0];
  return best?.phrase.text ?? null;
}
