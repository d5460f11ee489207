import { unitIn } from '../labels/label';
import type { ReadRecommendation } from '../types';
import { withoutRole } from './headingRole';
import { spoken } from './spoken';

function cutText(text: string, part: string): string {
  const at = text.toLowerCase().indexOf(part.toLowerCase());
  return at < 0 ? text : `${text.slice(0, at)} ${text.slice(at + part.length)}`;
}

function tidy(text: string): string {
  return text
    .replace(/\(\s*\)|\[\s*\]/g, ' ')
    .replace(/\b(apply|add|use|spread|broadcast|of|per|about|at|the|rate)\b/gi, ' ')
    .replace(/^[\s,;:([/-]+|[\s,;:([/-]+$/g, '')
    .replace(/\s+/g, ' ')
    .trim();
}

/** "Lime Rec (lb/ac)" advises lime. */
export function adviceItem(heading: string): string {
  const words = withoutRole(heading);
  const unit = unitIn(words);
  const bare = tidy(unit === null ? words : cutText(words, unit.printed));
  return bare === '' ? heading : bare;
}

/** "Lime 40 lb/1000 sq ft" in one cell; null when no amount with a unit stands in it. */
export function adviceInWords(text: string, sampleId: string | null, heading: string): ReadRecommendation | null {
  const found = /(?<![\d.,])(\d{1,3}(?:,\d{3})+|\d*\.?\d+)\s*(?=(?:lbs?|pounds?|oz|ounces?|tons?|t|kg|g|cwt)\b)/i.exec(
    text,
  );
  if (found === null || text.length > 200) return null;
  const after = text.slice(found.index + found[0].length);
  const unit = unitIn(spoken(after)) ?? unitIn(after);
  const rest = unit === null ? after : cutText(cutText(after, unit.printed), unit.unit);
  const item = tidy(text.slice(0, found.index)) || tidy(rest) || heading;
  return {
    sampleId,
    item: item.slice(0, 80),
    amount: Number((found[1] ?? '').replace(/,/g, '')),
    printed: text,
    unit: unit?.unit ?? null,
    page: null,
    box: null,
  };
}

const ADVICE_UNITS: ReadonlySet<string> = new Set([
  'lb/1000ft2',
  'lb/100ft2',
  'oz/1000ft2',
  'oz/100ft2',
  'oz/yd2',
  'g/m2',
  'cwt/acre',
]);
const AREA_UNITS: ReadonlySet<string> = new Set(['ton/acre', 't/ha', 'lb/acre', 'kg/ha']);

export function isAdviceUnit(unit: string | null): boolean {
  return unit !== null && ADVICE_UNITS.has(unit);
}

/** "Lime recommendation" names an analyte of the registry and is advice all the same; so is "Lime" by area. */
export function isAdviceRow(name: string, unit: string | null): boolean {
  if (/\brecommended (level|range)\b/i.test(name)) return false;
  if (/\b(recommend\w*|rec|to apply|apply|needed|application)\b/i.test(name)) return true;
  const byArea = unit !== null && AREA_UNITS.has(unit);
  return byArea && /^(lime|limestone|gypsum)\b/i.test(name) && !/\b(req\w*|index)\b/i.test(name);
}
