import { remembered } from '../labels/remember';

/** What a column holds, from its heading. Only "result" columns give results. */
export type Role =
  | 'result'
  | 'desired'
  | 'previous'
  | 'rating'
  | 'unit'
  | 'method'
  | 'limit'
  | 'difference'
  | 'recommendation'
  | 'analyte'
  | 'date'
  | 'unknown';

const ROLES: readonly (readonly [Role, RegExp])[] = [
  ['unit', /^(units?|uom|measured in)$/i],
  ['method', /^((test|lab) )?(methods?|extract(ant|ion)?|procedure)$/i],
  ['limit', /\b(detection|reporting|quantitation) limit|^(mdl|rl|lod|loq|pql)$|uncertainty|±|^std\.?( dev)?$/i],
  ['recommendation', /\b(recommend(ed|ation)s?( (rate|amount))?|to apply|apply|to add|add)\b/i],
  ['difference', /\b(deficit|difference|short(fall|age)?|surplus|excess|change|needed)\b/i],
  ['previous', /\b(previous|last (test|year|result|sample|season|time)|prior|earlier|past|history)\b/i],
  [
    'desired',
    /\b(desired|optimum|optimal|target|ideal|sufficien(t|cy)|normal|guide(line)?|wanted|goal|aim|usual|adequate|recommended range|range)\b/i,
  ],
  [
    'rating',
    /^((fertility |nutrient |supply )?(rating|interpretation|status|class|category|rank|grade|group|comment|remark|evaluation|assessment|rtg\.?)s?|level rating|soil level|rate)$/i,
  ],
  [
    'result',
    /^((your|soil|lab|laboratory|test|this|current|present|new|actual|amount) )*(results?|found|level( found)?|value( found)?|values|test|soil test|measured|actual|reading|current|concentration|contents?|amount|analysis result|your (soil|garden|bed|plot|sample)|this (year|test|sample))$/i,
  ],
  [
    'analyte',
    /^(test|analysis|analytes?|parameters?|determinations?|elements?|nutrients?|property|properties|measurement|soil test|component|item|description|characteristic)$/i,
  ],
];

/** The role that a heading names, or null. A heading of the first column is the analyte's ("Test", "Analysis"). */
export function roleOf(text: string, first: boolean): Role | null {
  return first ? firstRole(text) : otherRole(text);
}

const firstRole = remembered((text: string) => roleIn(text, true));
const otherRole = remembered((text: string) => roleIn(text, false));

function roleIn(text: string, first: boolean): Role | null {
  const bare = text
    .replace(/[:*]/g, '')
    .replace(/\s*\([^)]*\)\s*/g, ' ')
    .trim();
  if (bare === '' || bare.length > 40) return null;
  if (first && ROLES.some(([role, pattern]) => role === 'analyte' && pattern.test(bare))) return 'analyte';
  if (/^((spring|summer|fall|autumn|winter|[a-z]{3,9}\.?) )?(19|20)\d\d( (test|result))?$/i.test(bare)) return 'date';
  return ROLES.find(([, pattern]) => pattern.test(bare))?.[0] ?? null;
}

/** Names of rows that are not samples. */
export const NOT_A_SAMPLE =
  /^(optimum|optimal|desired|target|ideal|previous|last|average|avg|mean|median|min(imum)?|max(imum)?|totals?|sum|std|reporting|detection|mdl|rl|lod|blank|duplicate rpd|normal|range|sufficien|guide|units?|method|rating|recommend|critical|deficit|difference|shortage|surplus|needed|wanted)\b/i;

/** Row names that say "this is the result" and name no sample. */
export const JUST_RESULT =
  /^(your |test |soil |this )?(values?|levels?|results?|year|test|reading)( found)?$|^(found|actual|measured|now|current|analysis|others?|saturation|amount|contents?)$/i;
