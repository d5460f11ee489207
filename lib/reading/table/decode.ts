export type Decoded =
  | { readonly ok: true; readonly text: string; readonly encoding: string }
  | { readonly ok: false; readonly reason: 'binary' };

function looksUtf16(bytes: Uint8Array): 'utf-16le' | 'utf-16be' | null {
  const head = bytes.subarray(0, 400);
  let even = 0;
  let odd = 0;
  for (const [index, byte] of head.entries()) {
    if (byte !== 0) continue;
    if (index % 2 === 0) even += 1;
    else odd += 1;
  }
  if (odd > head.length / 4 && even === 0) return 'utf-16le';
  return even > head.length / 4 && odd === 0 ? 'utf-16be' : null;
}

/** Bytes of a data file to text: byte order mark, UTF-16 by its zeros, UTF-8 if it is valid, else Windows-1252. */
export function decode(bytes: Uint8Array): Decoded {
  const [first, second] = bytes;
  const marked = first === 0xff && second === 0xfe ? 'utf-16le' : first === 0xfe && second === 0xff ? 'utf-16be' : null;
  const encoding = marked ?? looksUtf16(bytes);
  if (encoding !== null) return { ok: true, text: new TextDecoder(encoding).decode(bytes), encoding };
  if (bytes.subarray(0, 4096).includes(0)) return { ok: false, reason: 'binary' };
  try {
    return { ok: true, text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), encoding: 'utf-8' };
  } catch {
    return { ok: true, text: new TextDecoder('windows-1252').decode(bytes), encoding: 'windows-1252' };
  }
}
