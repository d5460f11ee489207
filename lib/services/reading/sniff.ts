import { type RefusalCode, refusal } from './refusals';

export type ReportKind = 'pdf' | 'csv' | 'text' | 'xml' | 'json' | 'jpeg' | 'png' | 'xlsx' | 'xls';

export type Sniffed =
  | {
      readonly ok: true;
      readonly kind: ReportKind;
      readonly contentType: string;
      /** False for kinds that are stored and not read. */
      readonly readable: boolean;
    }
  | { readonly ok: false; readonly code: RefusalCode; readonly sentence: string };

const TYPES: Readonly<
  Record<ReportKind, { contentType: string; extensions: readonly string[]; readable: boolean; maxBytes: number }>
> = {
  pdf: { contentType: 'application/pdf', extensions: ['pdf'], readable: true, maxBytes: 20 * 1024 * 1024 },
  csv: { contentType: 'text/csv', extensions: ['csv', 'tsv', 'tab'], readable: true, maxBytes: 5 * 1024 * 1024 },
  text: { contentType: 'text/plain', extensions: ['txt'], readable: true, maxBytes: 5 * 1024 * 1024 },
  xml: { contentType: 'application/xml', extensions: ['xml'], readable: true, maxBytes: 5 * 1024 * 1024 },
  json: { contentType: 'application/json', extensions: ['json'], readable: true, maxBytes: 5 * 1024 * 1024 },
  jpeg: { contentType: 'image/jpeg', extensions: ['jpg', 'jpeg'], readable: true, maxBytes: 20 * 1024 * 1024 },
  png: { contentType: 'image/png', extensions: ['png'], readable: true, maxBytes: 20 * 1024 * 1024 },
  xlsx: {
    contentType: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
    extensions: ['xlsx'],
    readable: true,
    maxBytes: 5 * 1024 * 1024,
  },
  xls: { contentType: 'application/vnd.ms-excel', extensions: ['xls'], readable: true, maxBytes: 5 * 1024 * 1024 },
};

/** Largest file of that kind, in bytes. */
export function maxBytesOf(kind: ReportKind): number {
  return TYPES[kind].maxBytes;
}

function startsWith(bytes: Uint8Array, ...marks: number[]): boolean {
  return marks.every((mark, index) => bytes[index] === mark);
}

function includesText(bytes: Uint8Array, text: string): boolean {
  return Buffer.from(bytes).includes(text);
}

/** Text has no zero bytes, except UTF-16, where every other byte is one; and hardly any control characters. */
function looksLikeText(bytes: Uint8Array): boolean {
  const head = bytes.subarray(0, 4096);
  if (startsWith(head, 0xff, 0xfe) || startsWith(head, 0xfe, 0xff)) return true;
  const zerosFrom = (first: number) =>
    head.reduce((sum, byte, at) => sum + (byte === 0 && at % 2 === first ? 1 : 0), 0);
  const [even, odd] = [zerosFrom(0), zerosFrom(1)];
  if (even + odd > 0) return Math.min(even, odd) === 0 && even + odd > head.length / 4;
  const strange = head.reduce((count, byte) => count + (byte < 9 || (byte > 13 && byte < 32) ? 1 : 0), 0);
  // A short text may hold a few; they are left out of what is read.
  return strange <= Math.max(3, head.length / 100);
}

/** The start of a text, whatever its encoding, in small letters. */
function startOf(bytes: Uint8Array): string {
  const wide = bytes.subarray(0, 1024).filter((byte) => byte !== 0);
  return Buffer.from(wide)
    .toString('latin1')
    .replace(/^(\u00ef\u00bb\u00bf|\u00ff\u00fe|\u00fe\u00ff)/, '')
    .trimStart()
    .toLowerCase();
}

type Content = 'pdf' | 'jpeg' | 'png' | 'xls' | 'locked' | 'xlsx' | 'zip' | 'html' | 'xml' | 'json' | 'text';

/** A locked workbook is an old container around the word "EncryptedPackage". */
const LOCKED = Buffer.from('EncryptedPackage', 'utf16le');

function contentOf(bytes: Uint8Array): Content | null {
  if (includesText(bytes.subarray(0, 1024), '%PDF-')) return 'pdf';
  if (startsWith(bytes, 0xff, 0xd8, 0xff)) return 'jpeg';
  if (startsWith(bytes, 0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a)) return 'png';
  if (startsWith(bytes, 0xd0, 0xcf, 0x11, 0xe0)) return Buffer.from(bytes).includes(LOCKED) ? 'locked' : 'xls';
  if (startsWith(bytes, 0x50, 0x4b, 0x03, 0x04))
    return includesText(bytes, '[Content_Types].xml') || includesText(bytes, 'xl/') ? 'xlsx' : 'zip';
  if (!looksLikeText(bytes)) return null;
  const text = startOf(bytes);
  if (/^(<!doctype html|<html|<svg|<script|<head|<body|<meta|<table)/.test(text)) return 'html';
  if (/^<(\?xml|!doctype|!--|[a-z_:])/.test(text)) return /<(html|svg)[\s/>]/.test(text) ? 'html' : 'xml';
  return /^[{[]\s*("|\{|\[|\}|\])/.test(text) ? 'json' : 'text';
}

/** What the content can be called: a plain text may be a table or words. */
const KINDS: Readonly<Record<Content, readonly ReportKind[]>> = {
  pdf: ['pdf'],
  jpeg: ['jpeg'],
  png: ['png'],
  xls: ['xls'],
  locked: ['xlsx', 'xls'],
  xlsx: ['xlsx'],
  zip: [],
  html: [],
  xml: ['xml'],
  json: ['json'],
  text: ['csv', 'text'],
};

/**
 * What a report file is, by its first bytes (4 KB are enough) and its name, which must agree. Pictures and spreadsheets
 * are accepted for keeping; `readable` says whether the reader takes them.
 */
export function sniffReport(input: { bytes: Uint8Array; fileName: string }): Sniffed {
  if (input.bytes.length === 0) return { ok: false, ...refusal('empty') };
  const extension = /\.([^.]+)$/.exec(input.fileName)?.[1]?.toLowerCase() ?? '';
  const named = Object.entries(TYPES).some(([, type]) => type.extensions.includes(extension));
  if (!named) return { ok: false, ...refusal('type-not-accepted') };
  const content = contentOf(input.bytes);
  const kind = content === null ? undefined : KINDS[content].find((one) => TYPES[one].extensions.includes(extension));
  if (kind === undefined) {
    return { ok: false, ...refusal(extension === 'pdf' ? 'not-a-pdf' : 'not-what-it-says') };
  }
  return { ok: true, kind, contentType: TYPES[kind].contentType, readable: TYPES[kind].readable };
}
