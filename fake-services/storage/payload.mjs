import { createHash, timingSafeEqual } from 'node:crypto';
import { crc32 } from 'node:zlib';

const digest = (name, bytes, encoding) => createHash(name).update(bytes).digest(encoding);
const crc32Base64 = (bytes) => {
  const four = Buffer.alloc(4);
  four.writeUInt32BE(crc32(bytes));
  return four.toString('base64');
};
const same = (a, b) => a.length === b.length && timingSafeEqual(Buffer.from(a), Buffer.from(b));

/** Takes the frames of an aws-chunked body apart: { bytes, trailers }, or undefined when they are broken. */
export function decodeChunks(framed) {
  const parts = [];
  let at = 0;
  for (;;) {
    const end = framed.indexOf('\r\n', at);
    if (end < 0) return undefined;
    const length = Number.parseInt(framed.subarray(at, end).toString('latin1').split(';')[0], 16);
    if (!Number.isInteger(length) || length < 0) return undefined;
    at = end + 2;
    if (length === 0) break;
    if (at + length + 2 > framed.length || framed.toString('latin1', at + length, at + length + 2) !== '\r\n')
      return undefined;
    parts.push(framed.subarray(at, at + length));
    at += length + 2;
  }
  const trailers = {};
  for (const line of framed.toString('latin1', at).split('\r\n').filter(Boolean)) {
    const colon = line.indexOf(':');
    if (colon > 0) trailers[line.slice(0, colon).toLowerCase()] = line.slice(colon + 1).trim();
  }
  return { bytes: Buffer.concat(parts), trailers };
}

/**
 * The bytes a request really carries, after every checksum it states has been recomputed:
 * { bytes, crc32 } or { code } with the S3 error code.
 */
export function checkedPayload(headers, body) {
  let bytes = body;
  let stated = headers;
  const contentHash = headers['x-amz-content-sha256'] ?? '';
  if (contentHash.startsWith('STREAMING-')) {
    if (contentHash !== 'STREAMING-UNSIGNED-PAYLOAD-TRAILER') return { code: 'NotImplemented' };
    const decoded = decodeChunks(body);
    if (decoded === undefined) return { code: 'IncompleteBody' };
    bytes = decoded.bytes;
    stated = { ...headers, ...decoded.trailers };
    const length = headers['x-amz-decoded-content-length'];
    if (length !== undefined && Number(length) !== bytes.length) return { code: 'IncompleteBody' };
    const promised = headers['x-amz-trailer'];
    if (promised !== undefined && decoded.trailers[promised.toLowerCase()] === undefined)
      return { code: 'MalformedTrailerError' };
  } else if (contentHash !== 'UNSIGNED-PAYLOAD' && !same(contentHash, digest('sha256', bytes, 'hex'))) {
    return { code: 'XAmzContentSHA256Mismatch' };
  }
  const md5 = headers['content-md5'];
  if (md5 !== undefined) {
    if (Buffer.from(md5, 'base64').length !== 16) return { code: 'InvalidDigest' };
    if (md5 !== digest('md5', bytes, 'base64')) return { code: 'BadDigest' };
  }
  const checksums = { crc32: crc32Base64, sha256: (all) => digest('sha256', all, 'base64') };
  for (const [name, value] of Object.entries(stated)) {
    const algorithm = /^x-amz-checksum-(?!algorithm|type|mode)(\w+)$/.exec(name)?.[1];
    if (algorithm === undefined) continue;
    if (checksums[algorithm] === undefined) return { code: 'NotImplemented' };
    if (value !== checksums[algorithm](bytes)) return { code: 'BadDigest' };
  }
  return { bytes, crc32: crc32Base64(bytes) };
}
