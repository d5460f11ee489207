import { ANALYTES, type AnalyteKey, METHODS, UNITS, type UnitKey } from '@/lib/domain/analytes';
import { normal } from './normal';

export type Named = { readonly analyte: AnalyteKey; readonly spelling: string };

/** Keys whose name is shared with a likelier one: the likelier wins, the reader says so where it matters. */
const YIELDS: ReadonlySet<AnalyteKey> = new Set<AnalyteKey>(['esp', 'lime_requirement', 'gypsum_requirement']);

function add<T>(map: Map<string, T[]>, key: string, value: T) {
  if (key === '') return;
  const list = map.get(key);
  if (list === undefined) map.set(key, [value]);
  else list.push(value);
}

function buildNames(): ReadonlyMap<string, readonly Named[]> {
  const map = new Map<string, Named[]>();
  for (const entry of ANALYTES) {
    for (const spelling of [entry.label, ...entry.spellings])
      add(map, normal(spelling), { analyte: entry.key, spelling });
    const symbol = entry.symbol;
    if (!/^(P|K|Ca|Mg|S|Zn|Mn|Fe|Cu|B|Al|Na)$/.test(symbol)) continue;
    // A method that carries the element's symbol ("M3-P", "Bray P1", "Olsen K") names the analyte by itself.
    const carries = new RegExp(`(^|[\\s(-])${symbol}(\\d|$|[\\s)-])`);
    for (const method of entry.methods) {
      for (const spelling of method.spellings) {
        const named = normal(spelling).includes(entry.label.toLowerCase());
        if ((named || carries.test(spelling)) && spelling !== 'P2O5')
          add(map, normal(spelling), { analyte: entry.key, spelling });
      }
    }
  }
  for (const list of map.values()) list.sort((a, b) => Number(YIELDS.has(a.analyte)) - Number(YIELDS.has(b.analyte)));
  return map;
}

/** Normal form of every name a report uses -> the analytes it can mean, likeliest first. */
export const NAMES = buildNames();

export type UnitSpelling = { readonly unit: UnitKey; readonly text: string };

/** Unit spellings in normal form, longest first. "pH" is a name before it is a unit and is left out. */
export const UNIT_SPELLINGS: readonly UnitSpelling[] = UNITS.filter((unit) => unit.key !== 'class')
  .flatMap((unit) => unit.spellings.map((spelling) => ({ unit: unit.key, text: normal(spelling) })))
  .filter((entry) => entry.text !== ':1' && entry.text !== 'ph')
  .filter((entry, index, all) => all.findIndex((other) => other.text === entry.text) === index)
  .sort((a, b) => b.text.length - a.text.length);

/** Method spellings that may be cut off a label to reach the name inside it, longest first. */
export const METHOD_SPELLINGS: readonly string[] = [
  ...new Set(
    METHODS.flatMap((method) =>
      method.spellings.flatMap((spelling) => [normal(spelling), normal(spelling).replace(/ (?=[\di]+$)/, '-')]),
    ),
  ),
]
  .filter((text) => text.length > 1 && !NAMES.has(text) && !['total', 'class', 'direct', 'none'].includes(text))
  .sort((a, b) => b.length - a.length);
