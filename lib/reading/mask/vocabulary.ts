import { ANALYTES, METHODS, QUALIFIERS, RATINGS, UNITS } from '@/lib/domain/analytes';
import headings from '@/lib/domain/analytes/headings.json';

/** Letters and digits only, lower case: "Sample ID:" and "sample id" are one. */
export const plain = (text: string): string =>
  text
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();

const tokensOf = (texts: readonly string[]): Set<string> =>
  new Set(texts.flatMap((text) => plain(text).split(' ')).filter((token) => /\p{L}/u.test(token)));

const NAMES = ANALYTES.flatMap((one) => [one.label, one.symbol, ...one.spellings]);
const METHOD_SPELLINGS = METHODS.flatMap((one) => [...one.spellings]);
const UNIT_SPELLINGS = UNITS.flatMap((one) => [one.label, ...one.spellings]);
const RATING_SPELLINGS = [...RATINGS, ...QUALIFIERS].flatMap((one) => [one.label, ...one.spellings]);
/** Words of any report that say nothing about whose it is. */
const NEUTRAL =
  'soil test tests report results result level levels value values rating range found desired optimum analysis method unit units depth in deficit short shortage sufficiency inches cm sample samples page of per and not table notes interpretation nutrient element date';
const HEADINGS = [...Object.values(headings).flat(), NEUTRAL];

const ofNames = tokensOf(NAMES);
const ofUnits = tokensOf(UNIT_SPELLINGS);
const ofHeadings = tokensOf(HEADINGS);

/** Every word of an analyte, method, unit, rating or heading that the registry knows. */
export const KNOWN_WORDS: ReadonlySet<string> = new Set([
  ...ofNames,
  ...tokensOf(METHOD_SPELLINGS),
  ...ofUnits,
  ...tokensOf(RATING_SPELLINGS),
  ...ofHeadings,
]);

/** Words that keep their meaning beside a word nobody knows: long enough not to be somebody's initial. */
export const STRONG_WORDS: ReadonlySet<string> = new Set(
  [...ofNames, ...ofUnits, ...ofHeadings].filter((word) => word.length >= 4),
);

/** Methods that carry the name of whoever found them: the same word can be the grower's own. */
export const NAME_LIKE: ReadonlySet<string> = new Set(
  [...METHOD_SPELLINGS, ...NAMES]
    .flatMap((text) => text.split(/[^\p{L}]+/u))
    .filter((word) => /^\p{Lu}\p{Ll}{3,}$/u.test(word))
    .map(plain)
    .filter((word) => METHOD_SPELLINGS.some((text) => plain(text).split(' ').includes(word)) && !isOrdinary(word)),
);

/** A word that some analyte's own label uses is a word of the trade, not a surname. */
function isOrdinary(word: string): boolean {
  return (
    ANALYTES.some((one) => plain(one.label).split(' ').includes(word)) || ofUnits.has(word) || ofHeadings.has(word)
  );
}

/** Whole spellings in which a name-like word may stand: "olsen p", "adams evans". */
export const SPELLINGS_WITH_NAMES: readonly string[] = [...new Set([...METHOD_SPELLINGS, ...NAMES].map(plain))].filter(
  (text) => text.split(' ').some((word) => NAME_LIKE.has(word)),
);

/** Captions of what identifies somebody or something of theirs; what follows or stands under them is never shown. */
const IDENTITY_LABELS: readonly string[] = [
  ...new Set(
    [
      ...headings.identity.filter((text) => !/depth|^page$|crop|yield/i.test(text)),
      'Name',
      'Address',
      'Street',
      'City',
      'County',
      'State',
      'Zip',
      'Postcode',
      'Phone',
      'Telephone',
      'Tel',
      'Fax',
      'Mobile',
      'E-mail',
      'Email',
      'Farm',
      'Owner',
      'Submitted by',
      'Submitted for',
      'Prepared for',
      'Report to',
      'Attn',
      'Attention',
      'Sampled by',
      'Member',
      'Customer No',
      'Account No',
      'Invoice',
      'Order',
    ].map(plain),
  ),
];

const BARE: ReadonlySet<string> = new Set(['sample', 'lab', 'state', 'order', 'field', 'plot']);

/** How many words of the run are an identity caption at its start; 0 when none is. */
export function identityLabelLength(words: readonly string[]): number {
  let longest = 0;
  for (const label of IDENTITY_LABELS) {
    const parts = label.split(' ');
    if (parts.length <= longest || parts.length > words.length) continue;
    const raw = words[parts.length - 1] ?? '';
    // "Sample:" and "Lab #" name one; "Sample depth" does not.
    if (BARE.has(label) && !/[:#]$/.test(raw) && !/^#/.test(words[parts.length] ?? '')) continue;
    if (parts.every((part, at) => plain(words[at] ?? '') === part)) longest = parts.length;
  }
  return longest;
}
