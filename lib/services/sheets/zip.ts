/** What the directory of a ZIP file promises, read without opening anything in it. */
export type ZipDirectory = { readonly entries: number; readonly unpacked: number; readonly names: readonly string[] };

const END_MARK = 0x06054b50;
const ENTRY_MARK = 0x02014b50;
const END_LENGTH = 22;
const LONGEST_COMMENT = 65_535;

/** Number of files and bytes unpacked as the directory states them; null when there is no whole directory. */
export function zipDirectory(bytes: Uint8Array): ZipDirectory | null {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  let end = -1;
  const lowest = Math.max(0, bytes.length - END_LENGTH - LONGEST_COMMENT);
  for (let at = bytes.length - END_LENGTH; at >= lowest; at--) {
    if (view.getUint32(at, true) === END_MARK) {
      end = at;
      break;
    }
  }
  if (end < 0) return null;
  const entries = view.getUint16(end + 10, true);
  let at = view.getUint32(end + 16, true);
  let unpacked = 0;
  const names: string[] = [];
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
    at += 46 + name + extra + comment;
  }
  return { entries, unpacked, names };
}
