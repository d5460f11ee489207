import { ANALYTES, METHODS, RATINGS, UNITS } from '@/lib/domain/analytes';

/** Words of reports that are no analyte, unit or method. */
const PLAIN = [
  'sample', 'samples', 'soil', 'test', 'report', 'results', 'result', 'laboratory', 'lab', 'number', 'field', 'name',
  'depth', 'date', 'sampled', 'received', 'reported', 'analysis', 'rating', 'level', 'found', 'wanted', 'short',
  'desired', 'optimum', 'range', 'method', 'units', 'unit', 'extractable', 'available', 'saturation', 'base', 'bases',
  'cation', 'exchange', 'capacity', 'recommendation', 'recommendations', 'previous', 'inches', 'acre', 'total', 'ratio',
  'garden', 'grower', 'low', 'high', 'medium', 'very', 'adequate', 'deficient', 'excess', 'matter', 'organic', 'water',
]; // biome-ignore format: one list

function collect(): ReadonlySet<string> {
  const words = new Set<string>(PLAIN);
  const add = (text: string) => {
    for (const word of text.toLowerCase().split(/[^a-z0-9%/+.:-]+/)) if (word.length > 1) words.add(word);
  };
  for (const entry of ANALYTES) for (const text of [entry.label, entry.symbol, ...entry.spellings]) add(text);
  for (const entry of UNITS) entry.spellings.forEach(add);
  for (const entry of METHODS) entry.spellings.forEach(add);
  for (const entry of RATINGS) entry.spellings.forEach(add);
  return words;
}

const WORDS = collect();
const LONG = [...WORDS].filter((word) => /^[a-z]{6,}$/.test(word));

/** What the engine cannot tell apart, made one: 0 and O, 1 and l and I, 5 and S, rn and m; a doubled o is a 0 that stands beside an O. */
function blurredForm(text: string): string {
  return text
    .replace(/[0O]/g, 'o')
    .replace(/[1I|]/g, 'l')
    .replace(/[5]/g, 's')
    .toLowerCase()
    .replace(/rn/g, 'm')
    .replace(/oo/g, 'o');
}

/** Spellings as printed, by their blurred form; a form that stands for two spellings stands for neither. */
function collectForms(): ReadonlyMap<string, string> {
  const forms = new Map<string, string | null>();
  const add = (text: string) => {
    for (const word of text.split(/[\s(),;]+/)) {
      if (word.length < 2 || !/[A-Za-z]/.test(word) || /[^\x21-\x7e]/.test(word)) continue;
      const form = blurredForm(word);
      const known = forms.get(form);
      if (known === undefined) forms.set(form, word);
      else if (known !== null && known.toLowerCase() !== word.toLowerCase()) forms.set(form, null);
    }
  };
  for (const entry of ANALYTES) for (const text of [entry.symbol, ...entry.spellings]) add(text);
  for (const entry of UNITS) {
    for (const spelling of entry.spellings) {
      add(spelling);
      // A stroke is lost or taken for an l or an f: "mgkg", "lbslacre", "lbfacre".
      if (!/^[A-Za-z]{2,}\/[A-Za-z]{2,}$/.test(spelling)) continue;
      for (const without of ['', 'l', 'f']) {
        const form = blurredForm(spelling.replace('/', without));
        if (!forms.has(form)) forms.set(form, spelling);
      }
    }
  }
  for (const entry of METHODS) entry.spellings.forEach(add);
  return new Map([...forms].flatMap(([form, word]): [string, string][] => (word === null ? [] : [[form, word]])));
}

const FORMS = collectForms();

/** A word of units, symbols or methods in which a letter was taken for its double: "KCI", "NH40Ac", "Ib/A". */
export function unblurred(text: string): string | null {
  const core = /^[([]*(.*?)[)\],.;:*]*$/.exec(text)?.[1] ?? text;
  if (core.length < 2 || !/[A-Za-z]/.test(core) || WORDS.has(core.toLowerCase())) return null;
  // A letter and a figure is a sample's name.
  if (/^[A-Z]\d$/.test(core)) return null;
  const found = FORMS.get(blurredForm(core));
  // Two characters are too few to go by, but for these: sample names look like that.
  if (core.length === 2 && found !== undefined && !/^(lb|Cl|Al|OM)$/.test(found)) return null;
  return found === undefined || found.toLowerCase() === core.toLowerCase() ? null : text.replace(core, found);
}

export function bare(text: string): string {
  return text.toLowerCase().replace(/^[^a-z0-9%]+|[^a-z0-9%+]+$/g, '');
}

export function isKnown(text: string): boolean {
  return WORDS.has(bare(text));
}

export function isNumber(text: string): boolean {
  return /^[<>]?\d{1,6}([.,]\d{1,4})?$/.test(text.replace(/[A-Z*]{0,2}$/, ''));
}

/** True when one letter changed, put in or left out makes one word the other, or "rn" stands for "m". */
function oneOff(a: string, b: string): boolean {
  if (a.replace(/rn/g, 'm') === b.replace(/rn/g, 'm')) return true;
  if (Math.abs(a.length - b.length) > 1) return false;
  let at = 0;
  while (at < a.length && at < b.length && a[at] === b[at]) at += 1;
  const [restA, restB] = [a.slice(at), b.slice(at)];
  return restA.slice(1) === restB.slice(1) || restA.slice(1) === restB || restA === restB.slice(1);
}

/** A long word one letter away from exactly one word of the vocabulary becomes that word; its case is kept. */
export function mended(text: string): string | null {
  const low = bare(text).replace(/0/g, 'o').replace(/1/g, 'l').replace(/5/g, 's');
  if (low.length < 6 || !/^[a-z]+$/.test(low)) return null;
  if (WORDS.has(low)) return bare(text) === low ? null : recased(text, low);
  const near = LONG.filter((word) => oneOff(word, low) && `${word}s` !== low);
  return near.length === 1 && near[0] !== undefined ? recased(text, near[0]) : null;
}

function recased(text: string, word: string): string {
  const core = /[A-Za-z0-9]+/.exec(text)?.[0] ?? text;
  const upper = core === core.toUpperCase();
  const capital = /^[A-Z]/.test(core);
  const cased = upper ? word.toUpperCase() : capital ? (word[0] ?? '').toUpperCase() + word.slice(1) : word;
  return text.replace(core, cased);
}
