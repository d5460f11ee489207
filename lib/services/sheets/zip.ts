import { unpackedSize } from '../reading/unpacked';

/** What the directory of a ZIP file promises, read without opening anything in it. */
export type ZipDirectory = {
  readonly entries: number;
  readonly unpacked: number;
  readonly names: readonly string[];
  /** Where each packed part stands. */
  readonly parts: readonly { readonly at: number; readonly packed: number; readonly deflated: boolean }[];
};

const END_MARK = 0x06054b50;
const ENTRY_MARK = 0x02014b50;
const END_LENGTH = 22;
const HEAD_LENGTH = 30;
const LONGEST_COMMENT = 65_535;
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
  const parts: { at: number; packed: number; deflated: boolean }[] = [];
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
    const deflated = view.getUint16(at + 10, true) === DEFLATED;
    parts.push({ at: view.getUint32(at + 42, true), packed: view.getUint32(at + 20, true), deflated });
    at += 46 + name + extra + comment;
  }
  return { entries, unpacked, names, parts };
}

/** Bytes that the parts really give, whatever the directory says; counting stops when there are more than `most`. */
export async function zipUnpacked(bytes: Uint8Array, directory: ZipDirectory, most: number): Promise<number> {
  const view = viewOf(bytes);
  let sum = 0;
  for (const part of directory.parts) {
    if (part.at + HEAD_LENGTH > bytes.length) continue;
    const from = part.at + HEAD_LENGTH + view.getUint16(part.at + 26, true) + view.getUint16(part.at + 28, true);
    // A part may be longer than it says; unpacking ends by itself where the packed bytes do.
    sum += part.deflated ? await unpackedSize(bytes.subarray(from), 'raw', most - sum) : part.packed;
    if (sum > most) break;
  }
  return sum;
}
