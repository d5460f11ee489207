import { unpackedSize } from '../reading/unpacked';

/** What the directory of a ZIP file promises, read without opening anything in it. */
export type ZipDirectory = {
  readonly entries: number;
  readonly unpacked: number;
  readonly names: readonly string[];
  /** Where each packed part stands. */
  readonly parts: readonly { readonly at: number }[];
};

const END_MARK = 0x06054b50;
const HEAD_MARK = 0x04034b50;
const ENTRY_MARK = 0x02014b50;
const END_LENGTH = 22;
const HEAD_LENGTH = 30;
const LONGEST_COMMENT = 65_535;
const STORED = 0;
const DEFLATED = 8;

function endOf(view: DataView): number {
  const lowest = Math.max(0, view.byteLength - END_LENGTH - LONGEST_COMMENT);
  for (let at = view.byteLength - END_LENGTH; at >= lowest; at--) if (view.getUint32(at, true) === END_MARK) return at;
  return -1;
}

const viewOf = (bytes: Uint8Array) => new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);

/** True when the mark is missing with which every ZIP file ends. */
export function zipIsCutOff(bytes: Uint8Array): boolean {
  return endOf(viewOf(bytes)) < 0;
}

/** Number of files and bytes unpacked as the directory states them; null when there is no whole directory. */
export function zipDirectory(bytes: Uint8Array): ZipDirectory | null {
  const view = viewOf(bytes);
  const end = endOf(view);
  if (end < 0) return null;
  const entries = view.getUint16(end + 10, true);
  let at = view.getUint32(end + 16, true);
  let unpacked = 0;
  const names: string[] = [];
  const parts: { at: number }[] = [];
  const text = new TextDecoder('utf-8');
  for (let index = 0; index < entries; index++) {
    if (at + 46 > bytes.length || view.getUint32(at, true) !== ENTRY_MARK) return null;
    unpacked += view.getUint32(at + 24, true);
    const [name, extra, comment] = [
      view.getUint16(at + 28, true),
      view.getUint16(at + 30, true),
      view.getUint16(at + 32, true),
    ];
    names.push(text.decode(bytes.subarray(at + 46, at + 46 + name)));
    parts.push({ at: view.getUint32(at + 42, true) });
    at += 46 + name + extra + comment;
  }
  return { entries, unpacked, names, parts };
}

/**
 * Bytes that the parts really give, whatever the directory says; counting stops when there are more than `most`. Null when
 * a part is damaged: the package that reads sheets may look for the end of such a part for ever.
 */
export async function zipUnpacked(bytes: Uint8Array, directory: ZipDirectory, most: number): Promise<number | null> {
  const view = viewOf(bytes);
  let sum = 0;
  for (const { at } of directory.parts) {
    if (at + HEAD_LENGTH > bytes.length || view.getUint32(at, true) !== HEAD_MARK) return null;
    const [method, packed, stated] = [
      view.getUint16(at + 8, true),
      view.getUint32(at + 18, true),
      view.getUint32(at + 22, true),
    ];
    if (method !== STORED && method !== DEFLATED) return null;
    const from = at + HEAD_LENGTH + view.getUint16(at + 26, true) + view.getUint16(at + 28, true);
    if (method === DEFLATED) {
      // A part may be longer than it says; unpacking ends by itself where the packed bytes do.
      const { size, whole } = await unpackedSize(bytes.subarray(from), 'raw', most - sum);
      if (!whole) return null;
      sum += Math.max(size, stated);
    } else sum += packed;
    if (sum > most) break;
  }
  return sum;
}
