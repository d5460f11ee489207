import { inflateSync } from 'node:zlib';
import { unpackedSize } from '../reading/unpacked';

const MEGABYTE = 1024 * 1024;
/** A picture of 40 megapixels in four colours; no page's text, type or table comes near the other figure. */
const MOST_OF_PICTURE = 160 * MEGABYTE;
const MOST_OF_OTHER = 48 * MEGABYTE;
const MOST_OF_OTHERS = 256 * MEGABYTE;
/** Packing makes a part at most so many times smaller. */
const MOST_TIMES = 1032;
/** A packed part within a packed part is opened as far as this to look at the inner one. */
const MOST_OF_OUTER = 8 * MEGABYTE;
const LONGEST_DICTIONARY = 2_000;

const STREAM = Buffer.from('stream');
const FLATE = /\/(?:FlateDecode|Fl)(?![A-Za-z])/g;

/** What stands before the packed bytes of the stream at `at`: its own dictionary, as far as it can be told. */
function dictionaryBefore(bytes: Buffer, at: number): string {
  const text = bytes.toString('latin1', Math.max(0, at - LONGEST_DICTIONARY), at);
  return text.slice(Math.max(0, text.lastIndexOf(' obj'), text.lastIndexOf('endstream')));
}

function inner(part: Uint8Array): Uint8Array | null {
  try {
    return inflateSync(part, { maxOutputLength: MOST_OF_OUTER });
  } catch {
    return null;
  }
}

/**
 * True when a stream of the file unpacks to far more than a report holds. Looks only at parts that could, and counts
 * what they give without keeping it; other ways of packing are left to the limit of memory.
 */
export async function unpacksTooLarge(file: Uint8Array): Promise<boolean> {
  const bytes = Buffer.from(file.buffer, file.byteOffset, file.byteLength);
  let others = 0;
  for (let at = bytes.indexOf(STREAM); at >= 0; at = bytes.indexOf(STREAM, at + STREAM.length)) {
    if (at >= 3 && bytes.toString('latin1', at - 3, at) === 'end') continue;
    const dictionary = dictionaryBefore(bytes, at);
    const times = dictionary.match(FLATE)?.length ?? 0;
    if (times === 0) continue;
    let from = at + STREAM.length;
    if (bytes[from] === 0x0d) from += 1;
    if (bytes[from] === 0x0a) from += 1;
    const found = bytes.indexOf('endstream', from, 'latin1');
    let part: Uint8Array = bytes.subarray(from, found < 0 ? bytes.length : found);
    if (times > 1) {
      const opened = inner(part);
      if (opened === null) {
        if ((await unpackedSize(part, 'zlib', MOST_OF_OUTER)).size > MOST_OF_OUTER) return true;
        continue;
      }
      part = opened;
    }
    const most = /\/Image(?![A-Za-z])/.test(dictionary) ? MOST_OF_PICTURE : MOST_OF_OTHER;
    if (part.length * MOST_TIMES > most) {
      const { size } = await unpackedSize(part, 'zlib', most);
      if (size > most) return true;
      if (most === MOST_OF_OTHER) others += size;
      if (others > MOST_OF_OTHERS) return true;
    }
    if (found > 0) at = found;
  }
  return false;
}
