import { labelOf, spoken } from './spoken';

/** What a column beside an analyte's own holds, from the words of its heading. */
export type ColumnRole =
  | 'result'
  | 'recommendation'
  | 'desired'
  | 'previous'
  | 'difference'
  | 'limit'
  | 'rating'
  | 'qualifier'
  | 'unit'
  | 'method'
  | 'date';

const WORDS: readonly (readonly [ColumnRole, RegExp])[] = [
  [
    'recommendation',
    /\b(rec(s|d|ommend(ed|ation|ations)?)? ?\d{0,2}\b\.?(?! (level|range|value))|to (be )?(apply|applied|add)|apply|application|fertili[sz]er( rate)?|suggested( rate)?|(nitrogen|n|phosphate|potash|p2o5|k2o|mgo|so3|nutrient|crop|magnesium|sulphur|sulfur) requirement|maintenance|build-?up|removal|crop need)\b/i,
  ],
  [
    'limit',
    /\b(mdl|rl|lod|loq|pql|mrl|(method )?(detection|reporting|quanti(ta|fica)tion|report|det\.?|rep\.?) ?(limit|lim|lvl|level)|uncertainty|std\.? ?dev|rsd|spike|(?:%|percent) recovery)\b|±/i,
  ],
  [
    'previous',
    /\b(prev(ious)?|last (test|year|result|sample|season|time|value)|prior|earlier|past|history|historic(al)?|old|before)\b/i,
  ],
  [
    'desired',
    /\b(desired|optimum|optimal|opt\b|target|ideal|sufficien(t|cy)|goal|critical|guide(line|lines|d)?|wanted|recommended (level|range|value)|normal|typical|ref(erence)? (range|value|level)|range|benchmark|thresholds?|low limit|high limit|(lower|upper) (limit|bound|end)|from|to|minimum|maximum|(?:regional |farm |county |lab |site )?(average|mean|median))\b/i,
  ],
  [
    'difference',
    /\b(deficit|deficiency|difference|diff|short(fall|age)?|surplus|over\/under|change|delta|trend|\+\/-|need(ed)?|requirement to)\b/i,
  ],
  ['qualifier', /\b(qual|qualifiers?|flags?|sign|q|data qualifier|lt|censor(ed)?|detect(ed)?)$|^(<|<\/>|<>|q|qual)\b/i],
  ['unit', /(^|\s)(units?|uom|unit of measure|measured in)$/i],
  ['method', /(^|\s)((test|lab|analysis|analytical) )?(methods?|meth|extract(ant|ion)?|procedure|technique)$/i],
  [
    'rating',
    /(^|\s)(ratings?|rtg|interp(retation)?s?|interp\.|class(ification)?|status|rank(ing)?|categor(y|ies)|evaluation|eval|assessment|level|lvl|fertility level|test level|sufficiency class|descr(iptor)?)$/i,
  ],
  ['date', /\b(date|dt|tested on|analy[sz]ed on)\b/i],
  [
    'result',
    /(^|\s)(results?|found|value|values|concentration|conc|actual|current|measured|reading|present|this (year|test|sample)|test value|reported|numeric|amount)$/i,
  ],
];

/** The role a heading's words name, or null. */
export function roleIn(text: string): ColumnRole | null {
  const words = spoken(text)
    .replace(/[:*()]/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();
  if (words === '' || words.length > 80) return null;
  return WORDS.find(([, pattern]) => pattern.test(words))?.[0] ?? null;
}

/** A heading without the words of its role and its year: what is left may name the analyte. */
export function withoutRole(text: string): string {
  let words = spoken(text);
  for (const [role, pattern] of WORDS) if (role !== 'date') words = words.replace(new RegExp(pattern, 'gi'), ' ');
  return words
    .replace(/\b(19|20)\d\d\b/g, ' ')
    .replace(/\b(level|values?|limit|rate|test|new|old|low|high|min|max)\b/gi, ' ')
    .replace(/[()[\]]\s*[()[\]]/g, ' ')
    .replace(/[\s,;:/-]+$/g, '')
    .replace(/^[\s,;:/-]+/g, '')
    .replace(/\s+/g, ' ')
    .trim();
}

const SEASONS: readonly (readonly [RegExp, number])[] = [
  [/\b(winter|jan|feb)/i, 0.1],
  [/\b(spring|mar|apr|may)/i, 0.3],
  [/\b(summer|jun|jul|aug)/i, 0.6],
  [/\b(fall|autumn|sep|oct|nov|dec)/i, 0.9],
];

/**
 * The year a heading is about, with the season as its part, or null. "2024", "Fall 2024" and "2024-10" have one; "2,000"
 * and a whole date have none.
 */
export function yearIn(text: string): number | null {
  const month = /(?<![\d/.-])((?:19|20)\d\d)[-/](\d{1,2})(?![\d/.-])/.exec(text);
  if (month !== null) return Number(month[1]) + Number(month[2]) / 12;
  const found = [...text.matchAll(/(?<![\d/.-])((?:19|20)\d\d)(?![\d/.-])/g)];
  const season = SEASONS.find(([pattern]) => pattern.test(text))?.[1] ?? 0;
  return found.length === 1 ? Number(found[0]?.[1]) + season : null;
}

/** A heading that is an analyte's name as it stands is no role, whatever words are in it ("Excess lime"). */
export function isWholeName(text: string): boolean {
  const label = labelOf(text);
  return label !== null && label.strength >= 0.98;
}
