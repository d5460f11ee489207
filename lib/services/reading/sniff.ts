import { type RefusalCode, refusal } from './refusals';

export type ReportKind = 'pdf' | 'csv' | 'jpeg' | 'png' | 'xlsx' | 'xls';

export type Sniffed =
  | {
      readonly ok: true;
      readonly kind: ReportKind;
      readonly contentType: string;
      /** False for kinds that are stored but cannot be read yet. */
      readonly readable: boolean;
    }
  | { readonly ok: false; readonly code: RefusalCode; readonly sentence: string };

const TYPES: Readonly<
  Record<ReportKind, { contentType: string; extensions: readonly string[]; readable: boolean; maxBytes: number }>
> = {
  pdf: { contentType: 'application/pdf', extensions: ['pdf'], readable: true, maxBytes: 20 * 1024 * 1024 },
  csv: { contentType: 'text/csv', extensions: ['csv', 'tsv', 'txt', 'tab'], readable: true, maxBytes: 5 * 1024 * 1024 },
  jpeg: { contentType: 'image/jpeg', extensions: ['jpg', 'jpeg'], readable: false, maxBytes: 20 * 1024 * 1024 },
  png: { contentType: 'image/png', extensions: ['png'], readable: false, maxBytes: 20 * 1024 * 1024 },
  xlsx: {
    contentType: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
    extensions: ['xlsx'],
    readable: false,
    maxBytes: 5 * 1024 * 1024,
  },
  xls: { contentType: 'application/vnd.ms-excel', extensions: ['xls'], readable: false, maxBytes: 5 * 1024 * 1024 },
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
  const zeros = head.reduce((count, byte) => count + (byte === 0 ? 1 : 0), 0);
  if (zeros > 0) return zeros > head.length / 4 && zeros <= head.length / 2 + 1;
  const strange = head.reduce((count, byte) => count + (byte < 9 || (byte > 13 && byte < 32) ? 1 : 0), 0);
  return strange <= head.length / 100;
}

function contentOf(bytes: Uint8Array): ReportKind | 'html' | 'zip' | null {
  if (includesText(bytes.subarray(0, 1024), '%PDF-')) return 'pdf';
  if (startsWith(bytes, 0xff, 0xd8, 0xff)) return 'jpeg';
  if (startsWith(bytes, 0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a)) return 'png';
  if (startsWith(bytes, 0xd0, 0xcf, 0x11, 0xe0)) return 'xls';
  if (startsWith(bytes, 0x50, 0x4b, 0x03, 0x04))
    return includesText(bytes, '[Content_Types].xml') || includesText(bytes, 'xl/') ? 'xlsx' : 'zip';
  if (!looksLikeText(bytes)) return null;
  const text = Buffer.from(bytes.subarray(0, 512))
    .toString('latin1')
    .replace(/^\u00ef\u00bb\u00bf/, '')
    .trimStart()
    .toLowerCase();
  return /^(<!doctype|<html|<\?xml|<svg|<script|<head|<body)/.test(text) ? 'html' : 'csv';
}

/**
 * What a report file is, by its first bytes (4 KB are enough) and its name, which must agree. Pictures and spreadsheets
 * are accepted for keeping; `readable` says whether the reader takes them.
 */
export function sniffReport(input: { bytes: Uint8Array; fileName: string }): Sniffed {
  if (input.bytes.length === 0) return { ok: false, ...refusal('empty') };
  const extension = /\.([^.]+)$/.exec(input.fileName)?.[1]?.toLowerCase() ?? '';
  const named = Object.entries(TYPES).some(([, type]) => type.extensions.includes(extension));
  if (!named) return { ok: false, ...refusal('type-not-accepted') };
  const kind = contentOf(input.bytes);
  if (kind === null || kind === 'html' || kind === 'zip' || !TYPES[kind].extensions.includes(extension)) {
    return { ok: false, ...refusal(extension === 'pdf' ? 'not-a-pdf' : 'not-what-it-says') };
  }
  return { ok: true, kind, contentType: TYPES[kind].contentType, readable: TYPES[kind].readable };
}
