/** RFC 6266 with RFC 5987 names: the plain form holds only safe characters, the starred form the whole name. */
export function contentDisposition(as: 'attachment' | 'inline', fileName: string): string {
  const plain = fileName.replace(/[^\x20-\x7e]/g, '_').replace(/["\\%;]/g, '_');
  const wellFormed = Buffer.from(fileName, 'utf8').toString('utf8');
  const starred = encodeURIComponent(wellFormed).replace(
    /['()*]/g,
    (mark) => `%${mark.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `${as}; filename="${plain}"; filename*=UTF-8''${starred}`;
}

/** A stranger's bytes on our origin: fixed type, no guessing, no scripts, not kept by caches. */
export function fileResponse(file: {
  bytes: Uint8Array;
  contentType: string;
  fileName: string;
  as: 'attachment' | 'inline';
}): Response {
  return new Response(new Uint8Array(file.bytes), {
    headers: {
      'content-type': file.contentType,
      'content-length': String(file.bytes.byteLength),
      'content-disposition': contentDisposition(file.as, file.fileName),
      'x-content-type-options': 'nosniff',
      'content-security-policy': "sandbox; default-src 'none'",
      'cross-origin-resource-policy': 'same-origin',
      'cache-control': 'private, no-store',
    },
  });
}
