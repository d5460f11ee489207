import { createHash, createHmac, timingSafeEqual } from 'node:crypto';

/* Signature version 4 in the Authorization header, as in "Signing AWS API requests" (Amazon Web Services, IAM user guide). */

const MINUTES_OFF = 15;
const hmac = (key, text) => createHmac('sha256', key).update(text).digest();
const sha256 = (text) => createHash('sha256').update(text).digest('hex');
const encode = (text) =>
  encodeURIComponent(text).replace(/[!'()*]/g, (letter) => `%${letter.charCodeAt(0).toString(16).toUpperCase()}`);

function canonicalPath(path) {
  return path
    .split('/')
    .map((segment) => encode(decodeURIComponent(segment)))
    .join('/');
}

function canonicalQuery(query) {
  if (query === '') return '';
  return query
    .split('&')
    .map((pair) => {
      const [name, ...value] = pair.split('=');
      return [name, value.join('=')].map((part) => encode(decodeURIComponent(part.replaceAll('+', ' '))));
    })
    .sort((a, b) => (a[0] === b[0] ? (a[1] < b[1] ? -1 : 1) : a[0] < b[0] ? -1 : 1))
    .map((pair) => pair.join('='))
    .join('&');
}

function sign({ method, url, headers, signedHeaders, payloadHash, secretAccessKey, scope, date }) {
  const [path, query = ''] = url.split('?');
  const headerLines = signedHeaders.map(
    (name) =>
      `${name}:${String(headers[name] ?? '')
        .trim()
        .replace(/ +/g, ' ')}\n`,
  );
  const canonical = [
    method,
    canonicalPath(path),
    canonicalQuery(query),
    headerLines.join(''),
    signedHeaders.join(';'),
    payloadHash,
  ].join('\n');
  const toSign = ['AWS4-HMAC-SHA256', date, scope, sha256(canonical)].join('\n');
  const key = scope.split('/').reduce((previous, part) => hmac(previous, part), `AWS4${secretAccessKey}`);
  return createHmac('sha256', key).update(toSign).digest('hex');
}

/** The Authorization header for a request of our own. */
export function authorization({ method, url, headers, payloadHash, accessKeyId, secretAccessKey, region }) {
  const date = headers['x-amz-date'];
  const scope = `${date.slice(0, 8)}/${region}/s3/aws4_request`;
  const signedHeaders = Object.keys(headers).sort();
  const signature = sign({ method, url, headers, signedHeaders, payloadHash, secretAccessKey, scope, date });
  const credential = `${accessKeyId}/${scope}`;
  return `AWS4-HMAC-SHA256 Credential=${credential}, SignedHeaders=${signedHeaders.join(';')}, Signature=${signature}`;
}

function parseDate(text) {
  const parts = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/.exec(text ?? '');
  if (parts === null) return undefined;
  const [year, month, day, hour, minute, second] = parts.slice(1).map(Number);
  return Date.UTC(year, month - 1, day, hour, minute, second);
}

const HEADER =
  /^AWS4-HMAC-SHA256 Credential=([^/,\s]+)\/(\d{8}\/[^/,\s]+\/s3\/aws4_request),\s*SignedHeaders=([^,\s]+),\s*Signature=([0-9a-f]{64})$/;

/** Undefined when the request is signed by the one key this store knows, else the S3 error code of the refusal. */
export function refusal(request, { accessKeyId, secretAccessKey, region, now = Date.now() }) {
  const parts = HEADER.exec(request.headers.authorization ?? '');
  if (parts === null) return 'AccessDenied';
  const [, key, scope, names, signature] = parts;
  if (key !== accessKeyId) return 'InvalidAccessKeyId';
  const date = request.headers['x-amz-date'];
  const moment = parseDate(date);
  if (moment === undefined || !date.startsWith(scope.slice(0, 8))) return 'AccessDenied';
  if (Math.abs(now - moment) > MINUTES_OFF * 60_000) return 'RequestTimeTooSkewed';
  if (scope.split('/')[1] !== region) return 'AuthorizationHeaderMalformed';
  const signedHeaders = names.split(';');
  const payloadHash = request.headers['x-amz-content-sha256'];
  const mustBeSigned = Object.keys(request.headers).filter((name) => name === 'host' || name.startsWith('x-amz-'));
  if (payloadHash === undefined || mustBeSigned.some((name) => !signedHeaders.includes(name))) return 'AccessDenied';
  let expected;
  try {
    const { method, url, headers } = request;
    expected = sign({ method, url, headers, signedHeaders, payloadHash, secretAccessKey, scope, date });
  } catch {
    return 'SignatureDoesNotMatch';
  }
  return timingSafeEqual(Buffer.from(expected), Buffer.from(signature)) ? undefined : 'SignatureDoesNotMatch';
}
