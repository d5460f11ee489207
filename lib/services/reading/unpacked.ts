import { createInflate, createInflateRaw } from 'node:zlib';

/**
 * How many bytes a packed part gives, counted and thrown away as they come, so that a bomb costs no memory. Stops at
 * `most` and answers with more than that; a part that breaks off counts as far as it goes.
 */
export function unpackedSize(part: Uint8Array, form: 'zlib' | 'raw', most: number): Promise<number> {
  return new Promise((resolve) => {
    const inflate = form === 'zlib' ? createInflate() : createInflateRaw();
    let size = 0;
    const end = () => {
      inflate.destroy();
      resolve(size);
    };
    inflate.on('data', (piece: Buffer) => {
      size += piece.length;
      if (size > most) end();
    });
    inflate.on('error', end);
    inflate.on('end', end);
    inflate.end(part);
  });
}
