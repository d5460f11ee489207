import { type Identity, type IdentityField, remark } from '../candidate';
import { fieldOf as pageField } from '../stages/identity';
import { spoken } from './spoken';

const FURTHER: readonly (readonly [IdentityField, RegExp])[] = [
  [
    'dateSampled',
    /^(samp(l(e|ed|ing))?[ .-]?(dt|date|on)|date ?(sampled|collected|taken|of collection|drawn)|(sampled|collected) ?(date|on)?|dt sampled|sampling day|taken on|field date)$/,
  ],
  [
    'dateReported',
    /^(rep(or)?t(ed)?[ .-]?(dt|date)|date ?(reported|issued|completed|of report|approved|finalized|released)|(completed|issued|released|finali[sz]ed|approved) ?(date|on)?|report issued)$/,
  ],
  [
    'other',
    /^((date|dt) ?)?(received|rec'?d|entered|logged|login|processed|analy[sz]ed|tested|prepared|extracted|run)( ?(date|on|dt))?$/,
  ],
  [
    'labNumber',
    /^(lab(oratory)?[ .-]?(no|nr|num(ber)?|#|id|ref(erence)?|sample[ .-]?(no|num(ber)?|id|#)|code|sampleid|job)|barcode|bar code|tracking (no|number|id)|lims( id| no)?|sample barcode|lsn)$/,
  ],
  [
    'depthTop',
    /^((depth|sample depth) ?(top|from|start|begin(ning)?|upper|min)|(top|from|start|begin(ning)?|upper|min) ?depth|upper|top|from)( (in|inches|cm|mm))?$/,
  ],
  [
    'depthBottom',
    /^((depth|sample depth) ?(bottom|to|end(ing)?|lower|max|base)|(bottom|to|end(ing)?|lower|max|base) ?depth|lower|bottom|to)( (in|inches|cm|mm))?$/,
  ],
  ['depth', /^((sample|sampling|soil|core) )?(depth|horizon|layer|increment)( range| interval)?( (in|inches|cm|mm))?$/],
  [
    'sampleId',
    /^(((client|grower|customer|your|field|soil|user|farm) )?(sample|spl|smp)[ .-]?(id|ident|identification|identity|identifier|name|description|desc|label|ref(erence)?|no|nr|num(ber)?|#|code|location|point|site)?|sampleid|samplename|(your|client|customer|grower|sender) ?(mark|ref(erence)?|label)|bag( (no|id|number|label))?|plot( ?(id|name|no|number|label))?|bed( ?(id|name|no|number))?|site id|zone( ?(id|name|no))?|management zone|point( ?id)?|grid( ?(id|cell|point))?|bezeichnung|probe)$/,
  ],
  [
    'fieldName',
    /^((field|paddock|block|farm field|site|garden|tract|parcel|bench|greenhouse)( ?(id|name|no|nr|number|code))?)$/,
  ],
  [
    'other',
    /^(latitude|longitude|lat|lon(g)?|x|y|easting|northing|gps.*|acreage|area \(?ac(res)?\)?|hectares|ha|row|seq(uence)?( no)?|line( no)?|no of samples|price|cost|fee|invoice.*|phone|zip( code)?|post ?code|p\.?o\.?( (no|number|box).*)?|year|season|sample (type|matrix|material)|matrix|material|medium|comments?|remarks?|notes?|analyst|technician|package|test (package|code|pkg)|yield.*|crop.*|variety|submitter.*|account.*|client.*|grower.*|customer.*|order.*|batch.*|report|report.?(no|num(ber)?|id|#).*|dilution|job.*|project.*|farm|farm (id|no|number|name))$/,
  ],
];

function bare(text: string): string {
  return spoken(text)
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .toLowerCase()
    .replace(/\((yyyy|mm|dd|m|d|y|iso)[^)]*\)/g, ' ')
    .replace(/\((in|inches|cm|mm)\.?\)/g, ' $1')
    .replace(/[.:()]+/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();
}

export const isBareDate = (text: string): boolean => /^(dates?|datum)$/i.test(text.trim());

export const DATE_ASSUMED = remark(
  'date-kind-assumed',
  'The column "Date" does not say which day it means; it was taken as the day of sampling.',
);

const KNOWN = new Map<string, IdentityField | null>();

/** What a heading of a data file identifies, codes ("SAMPLE_ID", "LabNo") included; null for none. */
export function fieldOf(text: string): IdentityField | null {
  if (text === '' || text.length > 50) return null;
  const known = KNOWN.get(text);
  if (known !== undefined) return known;
  const words = bare(text);
  const field = FURTHER.find(([, pattern]) => pattern.test(words))?.[0] ?? pageField(text) ?? pageField(words);
  if (KNOWN.size > 4_000) KNOWN.clear();
  KNOWN.set(text, field);
  return field;
}

/** How surely a heading means the name people gave the sample, not a running number. */
export function nameRank(text: string): number {
  const words = bare(text);
  if (/\b(id|ident|identification|identity|identifier|name|description|desc|label|sampleid)\b/.test(words)) return 3;
  return /\b(no|nr|num|number|#|code)\b/.test(words) ? 1 : 2;
}

function depthUnit(text: string): 'in' | 'cm' | 'mm' | null {
  if (/(^|[\s\d(_])cm\b/i.test(text)) return 'cm';
  if (/(^|[\s\d(_])mm\b/i.test(text)) return 'mm';
  return /(^|[\s\d(_])in(ch(es)?)?\b|["”″]|''/i.test(text) ? 'in' : null;
}

function tenth(text: string): string {
  return String(Number(text) / 10);
}

/** A depth with the unit that cell, heading or file gives: "0-6" under "Depth (in)" is "0-6 in". */
export function depthText(cell: string, heading: string): string {
  const unit = depthUnit(cell) ?? depthUnit(heading);
  const numbers = cell
    .replace(/(\d)(in|cm|mm)/gi, '$1 $2')
    .replace(/''/g, '"')
    .replace(/(\d),(\d)/g, '$1.$2')
    .replace(/_/g, '-');
  if (unit === null) return numbers;
  const only = numbers
    .replace(/(in(ch(es)?)?|cm|mm)\b\.?|["”″]/gi, ' ')
    .replace(/\s+/g, ' ')
    .trim();
  return unit === 'mm' ? `${only.replace(/\d+(\.\d+)?/g, tenth)} cm` : `${only} ${unit}`;
}

/** Top and bottom of two columns become one depth. */
export function joinDepth(identity: Identity, heading: string): Identity {
  const { depthTop, depthBottom, ...rest } = identity;
  if (depthTop === undefined || depthBottom === undefined) return rest;
  return { depth: depthText(`${depthTop}-${depthBottom}`, heading), ...rest };
}

const DAY = 86_400_000;
const FIRST_1900 = Date.UTC(1899, 11, 30);

/** Days as data files write them and pages do not: "20241012", "45577" (a spreadsheet's day number). */
export function dateText(cell: string): string {
  const packed = /^((?:19|20)\d\d)(\d\d)(\d\d)$/.exec(cell);
  if (packed !== null) return `${packed[1]}-${packed[2]}-${packed[3]}`;
  // Points between the numbers are written only where the day comes first.
  const pointed = /^(\d{1,2})\.(\d{1,2})\.(\d{4})$/.exec(cell);
  if (pointed !== null)
    return `${pointed[3]}-${(pointed[2] ?? '').padStart(2, '0')}-${(pointed[1] ?? '').padStart(2, '0')}`;
  if (/^[34567]\d{4}(\.\d+)?$/.test(cell)) {
    const serial = Math.floor(Number(cell));
    return new Date(FIRST_1900 + serial * DAY).toISOString().slice(0, 10);
  }
  return cell;
}
