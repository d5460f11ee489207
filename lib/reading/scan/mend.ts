import type { Merged } from './types';
import { isKnown, mended, unblurred } from './vocabulary';

/** Letters that the engine takes for one another in the short words of units. */
const UNITS: readonly (readonly [RegExp, string])[] = [
  [/^([(]?)[I1|]bs?(?=$|[/)., ])/, '$1lb'],
  [/^([(]?)[I1|]bs(?=$|[/)., ])/, '$1lbs'],
  [/(\/|per)[I1|]bs?\b/, '$1lb'],
  [/^([(]?)(?:meg|mcq|rneq|mea|meqg)(?=\/?1?0?0?)/i, '$1meq'],
  [/^([(]?)(?:pprn|ppin|pom|ppn|pprm|opm|pprn\.)(?=$|[),.])/i, '$1ppm'],
  [/^([(]?)(?:rng|mq|mo)\/(?=k|K|L|d|1)/, '$1mg/'],
  [/mg\/k[gq9]\b/, 'mg/kg'],
  [/^([(]?)0z(?=$|[/)., ])/, '$1oz'],
  [/\/(?:1OO|I00|l00|10O|1O0)(?=g|\b)/, '/100'],
  [/^([(]?)p[.,-]p[.,-]m[.,]?(?=$|[)])/, '$1p.p.m.'],
  [/^[Il|]{2}([).,:]?)$/, 'II$1'],
  [/^([(]?)0\.M\.?(?=$|[),])/, '$1O.M.'],
  [/^([(]?)(?:[YV]o|yo|%o|[oO0]\/[oO0]|9\/[o0]|°\/[o0])(?=$|[),.])/, '$1%'],
  [/\bS04/, 'SO4'],
  [/\bN03/, 'NO3'],
  [/KC[I1|](?![A-Za-z0-9])/, 'KCl'],
  [/CaC[I1|]2/, 'CaCl2'],
  [/\bK20\b/, 'K2O'],
  [/\bP20[5S]\b|\bP2OS\b|\bP205\b/, 'P2O5'],
  [/\bH20\b/, 'H2O'],
  [/^([(]?)p[Hh](?=$|[ ,)])/, '$1pH'],
];

function unitsMended(text: string): string {
  let out = text;
  for (const [wrong, right] of UNITS) {
    const next = out.replace(wrong, right);
    if (next !== out) {
      out = /^[(]?[I1|]bs/.test(text) ? next.replace(/lb(?!s)/, 'lbs') : next;
      break;
    }
  }
  return out;
}

/** Letters inside a number: O for 0, l and I for 1, S for 5, B for 8, when everything else is a figure. */
function figuresMended(text: string): string | null {
  if (!/\d/.test(text) || !/[OoQDlI|SsBZ]/.test(text)) return null;
  const core = text
    .replace(/[OoQD]/g, '0')
    .replace(/[lI|]/g, '1')
    .replace(/[Ss]/g, '5')
    .replace(/B/g, '8')
    .replace(/Z/g, '2');
  if (!/^[<>]?\d+([.,]\d+)?$/.test(core)) return null;
  // A letter at the end after figures is more often a rating or a mark than a figure.
  if (/^[<>]?\d+([.,]\d+)?[A-Z]{1,2}$/.test(text) && !/[Oo]$/.test(text)) return null;
  return core;
}

/** "Al" over "A2" and "A3" is a sample's name, and "l" over "2" and "3" a number: the column tells. */
function namesMended(words: readonly Merged[]): readonly Merged[] {
  const patterns = [
    { wrong: /^([A-Z])[lI|]$/, beside: /^[A-Z]\d{1,2}$/ },
    { wrong: /^()[lI|]$/, beside: /^\d{1,2}$/ },
  ];
  return words.map((word) => {
    const fit = patterns.find(({ wrong }) => wrong.test(word.text));
    if (fit === undefined) return word;
    const height = word.y1 - word.y0;
    const column = words.filter((other) => Math.abs(other.x0 - word.x0) < 0.8 * height && fit.beside.test(other.text));
    if (column.length < 2) return word;
    return {
      ...word,
      text: word.text.replace(fit.wrong, (_, first: string) => `${first}1`),
      others: [...word.others, word.text],
    };
  });
}

/** Words with the engine's usual confusions undone. What was changed is doubted through the support it keeps. */
export function mendWords(words: readonly Merged[]): Merged[] {
  // An upright stroke alone is an edge of a table or of the sheet.
  const written = namesMended(words).filter((word) => !/^[il|]$/.test(word.text));
  return written.map((word) => {
    const figures = figuresMended(word.text);
    if (figures !== null && !isKnown(word.text) && !/^[A-Z]/.test(word.text)) {
      return { ...word, text: figures, support: Math.max(1, word.support - 1), others: [...word.others, word.text] };
    }
    const unit = unitsMended(word.text);
    if (unit !== word.text) return { ...word, text: unit };
    if (isKnown(word.text)) return word;
    const whole = unblurred(word.text) ?? mended(word.text);
    return whole === null ? word : { ...word, text: whole };
  });
}
