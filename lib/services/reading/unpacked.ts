import { createInflate, createInflateRaw } from 'node:zlib';

/** Bytes counted, and whether the packed part was whole as far as they were counted. */
export type Unpacked = { readonly size: number; readonly whole: boolean };

/**
 * How many bytes a packed part gives, counted and thrown away as they come, so that a bomb costs no memory. Stops at
 * `most` and answers with more than that; a part that breaks off or is damaged counts as far as it goes.
 */
export function unpackedSize(part: Uint8Array, form: 'zlib' | 'raw', most: number): Promise<Unpacked> {
  return new Promise((resolve) => {
    const inflate = form === 'zlib' ? createInflate() : createInflateRaw();
    let size = 0;
    const end = (whole: boolean) => {
      inflate.destroy();
      resolve({ size, whole });
    };
    inflate.on('data', (piece: Buffer) => {
      size += piece.length;
      if (size > most) end(true);
    });
    inflate.on('error', () => end(false));
    inflate.on('end', () => end(true));
    inflate.end(part);
  });
}
