const ERRORS = {
  AccessDenied: [403, 'Access denied.'],
  InvalidAccessKeyId: [403, 'The access key is not known here.'],
  SignatureDoesNotMatch: [403, 'The signature computed from the request differs from the one it carries.'],
  RequestTimeTooSkewed: [403, 'The request was signed too long ago or in the future.'],
  AuthorizationHeaderMalformed: [400, 'The request is signed for another region.'],
  XAmzContentSHA256Mismatch: [400, 'The stated x-amz-content-sha256 differs from the one computed.'],
  BadDigest: [400, 'A stated checksum differs from the one computed.'],
  InvalidDigest: [400, 'The stated Content-MD5 is not valid.'],
  IncompleteBody: [400, 'The body is shorter than stated or its chunks are broken.'],
  MalformedTrailerError: [400, 'The promised trailer is missing.'],
  MalformedXML: [400, 'The XML is not what this call takes.'],
  InvalidArgument: [400, 'An argument is not valid.'],
  InvalidBucketName: [400, 'The bucket name is not valid.'],
  KeyTooLongError: [400, 'The key is longer than 1024 bytes.'],
  EntityTooLarge: [400, 'The object is larger than this store takes.'],
  NoSuchBucket: [404, 'The bucket does not exist.'],
  NoSuchKey: [404, 'The key does not exist.'],
  MethodNotAllowed: [405, 'The method is not allowed here.'],
  BucketAlreadyOwnedByYou: [409, 'The bucket exists already and is yours.'],
  PreconditionFailed: [412, 'A precondition of the request does not hold.'],
  InvalidRange: [416, 'The range cannot be satisfied.'],
  InternalError: [500, 'The store failed.'],
  NotImplemented: [501, 'This store does not do that.'],
  SlowDown: [503, 'Please reduce the request rate.'],
};

const ESCAPES = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&apos;' };

// Control characters cannot stand in XML as they are; S3 writes them as character references too.
export const escapeXml = (text) =>
  String(text).replace(/[&<>"']|\p{Cc}/gu, (letter) => ESCAPES[letter] ?? `&#x${letter.charCodeAt(0).toString(16)};`);

const UNESCAPES = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };
const unescapeXml = (text) =>
  text.replace(/&(?:#x([0-9a-f]+)|#(\d+)|(\w+));/gi, (all, hex, decimal, name) => {
    if (hex !== undefined) return String.fromCodePoint(Number.parseInt(hex, 16));
    if (decimal !== undefined) return String.fromCodePoint(Number(decimal));
    return UNESCAPES[name] ?? all;
  });

/** The text of every <name> in a small, flat document. */
export const textsOf = (xml, name) =>
  [...xml.matchAll(new RegExp(`<${name}>([^<]*)</${name}>`, 'g'))].map((match) => unescapeXml(match[1]));

/** [['Key', 'a'], ['Part', [['X', 1]]]] as XML, in order. */
export const elements = (pairs) =>
  pairs
    .filter(([, value]) => value !== undefined)
    .map(([name, value]) => `<${name}>${Array.isArray(value) ? elements(value) : escapeXml(value)}</${name}>`)
    .join('');

export function sendXml(response, status, root, pairs) {
  const xml = `<?xml version="1.0" encoding="UTF-8"?>\n<${root} xmlns="http://s3.amazonaws.com/doc/2006-03-01/">${elements(pairs)}</${root}>`;
  const body = Buffer.from(xml);
  response.writeHead(status, { 'content-type': 'application/xml', 'content-length': body.length });
  response.end(body);
}

export function sendError(request, response, code, status = ERRORS[code][0]) {
  if (request.method === 'HEAD' || status === 304) {
    response.writeHead(status);
    return response.end();
  }
  const message = ERRORS[code]?.[1] ?? 'The store was told to fail.';
  const body = Buffer.from(
    `<?xml version="1.0" encoding="UTF-8"?>\n<Error>${elements([
      ['Code', code],
      ['Message', message],
    ])}</Error>`,
  );
  response.writeHead(status, { 'content-type': 'application/xml', 'content-length': body.length });
  response.end(body);
}
