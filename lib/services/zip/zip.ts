import { crc32 } from './crc32';

export type ZipEntry = { readonly name: string; readonly bytes: Uint8Array };

/** 1 January 1980, the first day the format knows: when a bundle was made is told to nobody. */
const DAY = 0x0021;
const VERSION = 20;
const UTF8 = 0x0800;

function header(entry: ZipEntry, sum: number): Buffer {
  const shared = Buffer.alloc(26);
  shared.writeUInt16LE(VERSION, 0);
  shared.writeUInt16LE(UTF8, 2);
  shared.writeUInt16LE(0, 4);
  shared.writeUInt16LE(0, 6);
  shared.writeUInt16LE(DAY, 8);
  shared.writeUInt32LE(sum, 10);
  shared.writeUInt32LE(entry.bytes.length, 14);
  shared.writeUInt32LE(entry.bytes.length, 18);
  shared.writeUInt16LE(Buffer.byteLength(entry.name), 22);
  return shared;
}

const signature = (...bytes: number[]) => Buffer.from([0x50, 0x4b, ...bytes]);

/** A few small files in one archive, stored as they are (pictures do not shrink twice). At most 65,535 files, 4 GB. */
export function zip(entries: readonly ZipEntry[]): Uint8Array {
  const parts: Buffer[] = [];
  const directory: Buffer[] = [];
  let at = 0;
  for (const entry of entries) {
    const name = Buffer.from(entry.name);
    const shared = header(entry, crc32(entry.bytes));
    const local = Buffer.concat([signature(3, 4), shared, name, entry.bytes]);
    const rest = Buffer.alloc(14);
    rest.writeUInt32LE(at, 10);
    const made = Buffer.alloc(2);
    made.writeUInt16LE(VERSION, 0);
    directory.push(Buffer.concat([signature(1, 2), made, shared, rest, name]));
    parts.push(local);
    at += local.length;
  }
  const listed = Buffer.concat(directory);
  const end = Buffer.alloc(18);
  end.writeUInt16LE(entries.length, 4);
  end.writeUInt16LE(entries.length, 6);
  end.writeUInt32LE(listed.length, 8);
  end.writeUInt32LE(at, 12);
  return new Uint8Array(Buffer.concat([...parts, listed, signature(5, 6), end]));
}
