import { type AnalyteKey, analyte, METHODS, type MethodKey, methodsOf, type UnitKey } from '@/lib/domain/analytes';
import { describedName } from './described';
import { METHOD_SPELLINGS, NAMES, UNIT_SPELLINGS } from './dictionary';
import { findWhole, normal } from './normal';
import { remembered } from './remember';

export type Label = {
  readonly analyte: AnalyteKey;
  readonly text: string;
  /** 1 for a name found as it stands, less the more had to be cut away to find it. */
  readonly strength: number;
  readonly unit: UnitKey | null;
  readonly unitPrinted: string | null;
  readonly method: MethodKey | null;
  readonly methodPrinted: string | null;
  readonly form: string | null;
  readonly ambiguous: string | null;
};

const NOISE =
  /\b(soil|test|result|results|value|level|available|avail|extractable|extr|exchangeable|exch|by|in|of|the|as|reported|measured|analysis|estimated|est|x|plant)\b/g;

/** The unit a text carries, with the characters that say so. */
export const unitIn = remembered((text: string): { unit: UnitKey; printed: string; rest: string } | null => {
  const plain = normal(text);
  for (const { unit, text: spelling } of UNIT_SPELLINGS) {
    const at = findWhole(plain, spelling);
    if (at < 0) continue;
    const rest = `${plain.slice(0, at)} ${plain.slice(at + spelling.length)}`.replace(/\s+/g, ' ').trim();
    return { unit, printed: printedUnit(text, spelling), rest };
  }
  return null;
});

function printedUnit(text: string, spelling: string): string {
  const bare = text
    .replace(/[()[\],]/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();
  const at = bare.toLowerCase().indexOf(spelling);
  return at < 0 ? spelling : bare.slice(at, at + spelling.length);
}

/** No unit and no label is longer; a longer text is not looked through for one. */
const LONGEST_UNIT = 80;
const LONGEST_LABEL = 400;

/** The unit when the text is a unit and nothing else. */
export function unitOnly(text: string): { unit: UnitKey; printed: string } | null {
  const found = text.length > LONGEST_UNIT ? null : unitIn(text);
  if (found === null || found.rest !== '') return null;
  return { unit: found.unit, printed: text.replace(/^[([]|[)\]]$/g, '').trim() };
}

/** "Mehlich-3" and "Mehlich 3" are one method. */
function loose(text: string): string {
  return normal(text).replace(/-/g, ' ');
}

type MethodSpelling = { readonly method: MethodKey; readonly spelling: string; readonly wanted: string };
const SPELLINGS = new Map<AnalyteKey, readonly MethodSpelling[]>();

function spellingsOf(key: AnalyteKey): readonly MethodSpelling[] {
  const known = SPELLINGS.get(key);
  if (known !== undefined) return known;
  const list = methodsOf(key)
    .flatMap((method) =>
      method.spellings.map((spelling) => ({ method: method.key, spelling, wanted: loose(spelling) })),
    )
    .filter((entry) => entry.wanted.length > 1);
  SPELLINGS.set(key, list);
  return list;
}

/** The method of that analyte which a text names, longest spelling first. */
export function methodIn(key: AnalyteKey, text: string): { method: MethodKey; printed: string } | null {
  const plain = loose(text);
  let best: { method: MethodKey; printed: string; length: number } | null = null;
  for (const { method, spelling, wanted } of spellingsOf(key)) {
    if (wanted.length <= (best?.length ?? 0)) continue;
    if (findWhole(plain, wanted) >= 0) best = { method, printed: spelling, length: wanted.length };
  }
  return best ?? suspension(key, text) ?? extractantIn(key, plain);
}

const EXTRACTED = new Set(['nutrients', 'micronutrients', 'metals']);
const EXTRACTANTS: ReadonlySet<MethodKey> = new Set<MethodKey>([
  'M3',
  'M1',
  'Colwell',
  'KCl40',
  'NH4OAc',
  'DTPA',
  'hot_water',
  'mod_Morgan',
  'Morgan',
  'AB_DTPA',
  'H3A',
  'NH4NO3',
  'DTPA_Sorbitol',
  'MCP',
]);
const EXTRACTANT_SPELLINGS = METHODS.filter((method) => EXTRACTANTS.has(method.key))
  .flatMap((method) => method.spellings.map((spelling) => ({ method: method.key, spelling, wanted: loose(spelling) })))
  .filter((entry) => entry.wanted.length > 3)
  .sort((a, b) => b.wanted.length - a.wanted.length);

/** An extractant that the registry lists for other elements: "K Colwell", "Mg, ammonium nitrate". */
function extractantIn(key: AnalyteKey, plain: string): { method: MethodKey; printed: string; length: number } | null {
  if (!EXTRACTED.has(analyte(key).group) || key === 'phosphorus') return null;
  const found = EXTRACTANT_SPELLINGS.find(({ wanted }) => findWhole(plain, wanted) >= 0);
  return found === undefined ? null : { method: found.method, printed: found.spelling, length: found.wanted.length };
}

const SUSPENSIONS: Readonly<Record<string, MethodKey>> = {
  '1': '1:1_water',
  '2': '1:2_water',
  '2.5': '1:2.5_water',
  '5': '1:5_water',
};

/** "pH (H2O, 1:5)": soil to water, in whatever words stand around it. */
function suspension(key: AnalyteKey, text: string): { method: MethodKey; printed: string; length: number } | null {
  if (key !== 'soil_ph_water') return null;
  const match = /(?<![\d.:])1 ?[:/] ?(1|2\.5|2|5)(?![\d.:])/.exec(text);
  const method = SUSPENSIONS[match?.[1] ?? ''];
  return match === null || method === undefined ? null : { method, printed: match[0], length: match[0].length };
}

function cutMethods(text: string): string {
  let rest = text;
  for (const spelling of METHOD_SPELLINGS) {
    const at = findWhole(rest, spelling);
    if (at >= 0) rest = `${rest.slice(0, at)} ${rest.slice(at + spelling.length)}`;
  }
  return rest.replace(/\s+/g, ' ').replace(/^[\s-]+|[\s-]+$/g, '');
}

/** Short symbols count only in a case that a laboratory would print: "Mg", "MG", never "mg" or "as". */
function caseFits(raw: string, spelling: string): boolean {
  if (spelling.length > 3) return true;
  const letters = raw.replace(/[^A-Za-z]/g, '');
  return raw.includes(spelling) || letters === letters.toUpperCase();
}

function lookUp(plain: string, raw: string): { analyte: AnalyteKey; ambiguous: string | null } | null {
  const named = (NAMES.get(plain) ?? []).filter((entry) => caseFits(raw, entry.spelling));
  const exact = named.find((entry) => entry.spelling === raw.trim()) ?? named[0];
  if (exact === undefined) return null;
  if (plain === 'na' && /NA/.test(raw)) {
    return { analyte: 'sodium', ambiguous: '"NA" can mean sodium, neutralizable acidity or not analysed.' };
  }
  if (plain === 'p2')
    return { analyte: 'phosphorus', ambiguous: '"P2" is strong Bray at one laboratory and Olsen at another.' };
  const other = named.find((entry) => entry.analyte !== exact.analyte && entry.spelling.length > 1);
  const clash = other === undefined || exact.analyte === 'sat_na' ? null : analyte(other.analyte).label;
  return { analyte: exact.analyte, ambiguous: clash === null ? null : `The name can also mean: ${clash}.` };
}

/** "SMP buffer pH", "CEC sum of cations": two names of one analyte side by side. */
function twoNames(plain: string): AnalyteKey | null {
  const words = plain.split(' ');
  for (let cut = 1; cut < words.length; cut++) {
    const first = NAMES.get(words.slice(0, cut).join(' '))?.[0]?.analyte;
    if (first !== undefined && first === NAMES.get(words.slice(cut).join(' '))?.[0]?.analyte) return first;
  }
  return null;
}

function sameInAllParts(raw: string): AnalyteKey | null {
  const parts = raw
    .split(/[(),;\n]|\s[-–]\s/)
    .map((part) => part.trim())
    .filter((part) => part !== '');
  if (parts.length < 2) return null;
  let found: AnalyteKey | null = null;
  for (const part of parts) {
    const one = lookUp(normal(part), part) ?? lookUp(normal(cutMethods(normal(part))), part);
    const only = unitOnly(part) !== null || cutMethods(normal(part)).replace(NOISE, '').trim() === '';
    if (one === null && !only) return null;
    if (one !== null && found !== null && one.analyte !== found) return null;
    if (one !== null) found = one.analyte;
  }
  return found;
}

const SHARES: Partial<Record<AnalyteKey, AnalyteKey>> = {
  potassium: 'sat_k',
  calcium: 'sat_ca',
  magnesium: 'sat_mg',
  sodium: 'sat_na',
  exchangeable_acidity: 'sat_h',
  aluminium: 'al_saturation',
};

function formOf(key: AnalyteKey, text: string): { form: string | null; doubt: string | null } {
  const plain = text.normalize('NFKC').replace(/\s/g, '');
  if (key === 'phosphorus') return { form: /P2O5/i.test(plain) ? 'P2O5' : 'element', doubt: null };
  if (key === 'potassium') return { form: /K2O/i.test(plain) ? 'K2O' : 'element', doubt: null };
  if (key === 'nitrate_n') {
    if (/N[O0]3-?N|nitrate-?n|nitratenitrogen|nitrogen|PSNT|residualn/i.test(plain))
      return { form: 'element', doubt: null };
    return { form: 'NO3', doubt: 'The page says nitrate; it may mean nitrate nitrogen, which is 4.43 times less.' };
  }
  if (key === 'sulfur') {
    if (/S[O0]4-+S|sul(f|ph)ate-?s|sulfatesul/i.test(plain)) return { form: 'element', doubt: null };
    if (/S[O0]4|sul(f|ph)ate/i.test(plain)) {
      return { form: 'SO4', doubt: 'The page says sulfate; it may mean sulfate sulfur, which is three times less.' };
    }
    return { form: 'element', doubt: null };
  }
  const group = analyte(key).group;
  const elemental = ['nutrients', 'micronutrients', 'metals', 'nitrogen'].includes(group) || key === 'aluminium';
  return {
    form: elemental && key !== 'p_saturation' && key !== 'pbi' && key !== 'enr' ? 'element' : null,
    doubt: null,
  };
}

const CHANGES =
  /recommend|needed|target|optimum|desired|require|ratio|apply|previous|last|goal|want|removal|uptake|goal/i;

/** "Salt (EC 1:5)" or "Copper (nitric digest)": one side of the brackets is the name, the other a few harmless words. */
function besideBrackets(raw: string): { analyte: AnalyteKey; strength: number; ambiguous: string | null } | null {
  const match = /^([^()]+)\(([^()]+)\)\s*$/.exec(raw);
  if (match === null || CHANGES.test(raw)) return null;
  const [outside, inside] = [(match[1] ?? '').trim(), (match[2] ?? '').trim()];
  if (outside.split(' ').length > 4 || inside.split(' ').length > 8) return null;
  const sides = [outside, inside].map((part) => {
    const plain = normal(part);
    return lookUp(plain, part) ?? lookUp(cutMethods(plain), part) ?? describedName(part, (name) => lookUp(name, part));
  });
  const [one, other] = sides;
  // "Sodium % of cations (ESP)": the abbreviation in brackets is the exact name.
  if (one != null && other != null && one.analyte !== other.analyte)
    return /^[A-Z]{3,6}$|^pH\b/.test(inside) ? { ...other, strength: 0.95 } : null;
  if (one != null && other != null) return { ...one, strength: 0.96 };
  const found = one ?? other ?? null;
  // A bare symbol in brackets after unknown words ("Free lime (S)") proves nothing.
  if (found === null || (one == null && inside.length < 2)) return null;
  return { ...found, strength: 0.93 };
}

/** A target range inside a label ("Phosphorus (25-50 ppm)") is no part of the name. */
const RANGE_IN_LABEL =
  /\(\s*(?:(?:we )?(?:want|wanted|target|ideal|optimum|aim|normal|usual|range|desired|goal)s?:?\s*)?(?:[<>]?\d[\d.,]*\s*(?:-|–|to)\s*\d[\d.,]*|(?:<|>|≤|≥|less than|more than|up to|below|above|under|over|at least|at most)\s*\d[\d.,]*)[^)]*\)/gi;

/** "7. Soil pH": the number of a form's box. */
const NUMBERED = /^\s*\(?\d{1,2}[.)]\s+(?=\p{L})/u;

const nameIn = remembered(
  (printed: string): { analyte: AnalyteKey; strength: number; ambiguous: string | null } | null => {
    const raw = printed.replace(RANGE_IN_LABEL, ' ').replace(NUMBERED, '').trim();
    const whole = lookUp(normal(raw), raw);
    if (whole !== null) return { ...whole, strength: 1 };
    const unit = unitIn(raw);
    const withoutUnit = unit === null ? normal(raw) : unit.rest;
    const second = unit === null ? null : lookUp(withoutUnit, raw);
    if (second !== null) return { ...second, strength: 0.99 };
    const withoutMethod = cutMethods(withoutUnit);
    const third = lookUp(withoutMethod, raw);
    if (third !== null) return { ...third, strength: 0.98 };
    const bare = withoutMethod.replace(NOISE, ' ').replace(/\s+/g, ' ').trim();
    const fourth = bare === withoutMethod ? null : lookUp(bare, raw);
    if (fourth !== null) return { ...fourth, strength: 0.96 };
    const same = twoNames(withoutUnit) ?? twoNames(withoutMethod) ?? sameInAllParts(raw);
    if (same !== null) return { analyte: same, strength: 0.97, ambiguous: null };
    const share =
      /^(?:share|portion|part|percent(?:age)?|saturation)\b.*\b(?:with|by|of|:)\s+(calcium|magnesium|potassium|sodium|hydrogen|bases)(?: (?:in|on|at|of) (?:the )?(?:cation )?(?:exchange (?:capacity|complex)|cec))?$/.exec(
        withoutUnit,
      );
    const held =
      share === null
        ? null
        : share[1] === 'bases'
          ? lookUp('base saturation', 'base saturation')
          : lookUp(share[1] ?? '', share[1] ?? '');
    if (held !== null) return { ...held, strength: 0.95 };
    const described = describedName(withoutUnit, (plain) => lookUp(plain, raw));
    if (described !== null) return { ...described, strength: 0.95 };
    return besideBrackets(raw);
  },
);

/**
 * What a label or column heading means. `text` is the heading's own words; `captions` are the words of merged captions
 * above it, which can add a unit, a method or "base saturation" but never name the analyte by themselves.
 */
export function readLabel(text: string, captions: readonly string[] = []): Label | null {
  if (text.length > LONGEST_LABEL) return null;
  const named = nameIn(text);
  if (named === null) {
    // "Particle size: sand", "Base saturation: calcium": what stands before the colon is the caption.
    const colon = text.indexOf(': ');
    return colon < 3 || /\d/.test(text.slice(0, colon))
      ? null
      : readLabel(text.slice(colon + 2), [text.slice(0, colon), ...captions]);
  }
  const around = [text, ...captions];
  const unit = around.map((part) => unitIn(part)).find((found) => found !== null) ?? null;
  const all = around.join(' ');
  let key = named.analyte;
  const share = SHARES[key];
  if (
    share !== undefined &&
    (unit?.unit === '%' ||
      (unit?.unit !== 'meq/100g' &&
        /saturation|\bof (the )?(cec\b|(cation )?exchange capacity)|of exchangeable bases|\bof bases\b/i.test(all)))
  ) {
    if (!/total/i.test(text)) key = share;
  }
  if (key === 'ec' && unit?.unit === 'mg/kg') key = 'tss';
  if (key === 'soil_ph_water' && /\bbuffer\b/i.test(text)) key = 'buffer_ph';
  if (
    key === 'soil_ph_water' &&
    /cacl ?2|calcium chloride|\bkcl\b|potassium chloride|\bsalt\b/i.test(all.normalize('NFKC'))
  )
    key = 'soil_ph_salt';
  const method = around.map((part) => methodIn(key, part)).find((found) => found !== null) ?? null;
  const { form, doubt } = formOf(key, text);
  return {
    analyte: key,
    text,
    strength: named.strength,
    unit: unit?.unit ?? null,
    unitPrinted: unit?.printed ?? null,
    method: method?.method ?? null,
    methodPrinted: method?.printed ?? null,
    form,
    ambiguous: named.ambiguous ?? doubt,
  };
}

/** The method that free text beside a row names, only when it is about that analyte. */
export function methodInAny(key: AnalyteKey, text: string): { method: MethodKey; printed: string } | null {
  return text.trim() === '' ? null : methodIn(key, text);
}
