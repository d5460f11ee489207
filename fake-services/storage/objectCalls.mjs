import { createHash } from 'node:crypto';
import { sendError, sendXml, textsOf } from './xml.mjs';

const KEPT_HEADERS = [
  'content-type',
  'content-disposition',
  'content-language',
  'cache-control',
  'content-encoding',
  'expires',
];
const ANSWERED = {
  'response-content-type': 'content-type',
  'response-content-disposition': 'content-disposition',
  'response-cache-control': 'cache-control',
};

function keptHeaders(headers) {
  const kept = {};
  for (const [name, value] of Object.entries(headers)) {
    if (name.startsWith('x-amz-meta-') || KEPT_HEADERS.includes(name)) kept[name] = value;
  }
  const encoding = kept['content-encoding']
    ?.split(',')
    .map((part) => part.trim())
    .filter((part) => part !== 'aws-chunked');
  if (encoding !== undefined) {
    if (encoding.length > 0) kept['content-encoding'] = encoding.join(',');
    else delete kept['content-encoding'];
  }
  return { 'content-type': 'application/octet-stream', ...kept };
}

/** [first, last] inclusive; undefined when there is no (usable) range; null when it cannot be satisfied. */
export function parseRange(text, size) {
  const parts = /^bytes=(\d*)-(\d*)$/.exec(text ?? '');
  if (parts === null || (parts[1] === '' && parts[2] === '')) return undefined;
  if (parts[1] === '') {
    const length = Math.min(Number(parts[2]), size);
    return length === 0 ? null : [size - length, size - 1];
  }
  const first = Number(parts[1]);
  const last = parts[2] === '' ? size - 1 : Math.min(Number(parts[2]), size - 1);
  if (parts[2] !== '' && Number(parts[2]) < first) return undefined;
  return first >= size ? null : [first, last];
}

export function putObject({ request, response, objects, bucket, key, payload, now }) {
  const { headers } = request;
  const earlier = objects.get(bucket, key);
  if (headers['if-none-match'] === '*' && earlier !== undefined)
    return sendError(request, response, 'PreconditionFailed');
  if (headers['if-match'] !== undefined && headers['if-match'] !== earlier?.etag) {
    return sendError(request, response, earlier === undefined ? 'NoSuchKey' : 'PreconditionFailed');
  }
  const etag = `"${createHash('md5').update(payload.bytes).digest('hex')}"`;
  const facts = { etag, crc32: payload.crc32, modified: now().toISOString(), headers: keptHeaders(headers) };
  objects.put(bucket, key, payload.bytes, facts);
  response.writeHead(200, { etag, 'content-length': 0, 'x-amz-checksum-crc32': payload.crc32 });
  return response.end();
}

export async function getObject({ request, response, objects, bucket, key, query, garbage }) {
  const object = objects.get(bucket, key);
  if (object === undefined) return sendError(request, response, 'NoSuchKey');
  const { etag, size } = object;
  if (request.headers['if-match'] !== undefined && request.headers['if-match'] !== etag) {
    return sendError(request, response, 'PreconditionFailed');
  }
  if (request.headers['if-none-match'] === etag) {
    response.writeHead(304, { etag });
    return response.end();
  }
  const range = parseRange(request.headers.range, size);
  if (range === null) return sendError(request, response, 'InvalidRange');
  const [first, last] = range ?? [0, size - 1];
  const answer = {
    ...object.headers,
    etag,
    'accept-ranges': 'bytes',
    'last-modified': new Date(object.modified).toUTCString(),
    'content-length': last - first + 1,
  };
  for (const [name, header] of Object.entries(ANSWERED)) if (query.has(name)) answer[header] = query.get(name);
  if (range !== undefined) answer['content-range'] = `bytes ${first}-${last}/${size}`;
  else if (request.headers['x-amz-checksum-mode'] === 'ENABLED') {
    answer['x-amz-checksum-crc32'] = object.crc32;
    answer['x-amz-checksum-type'] = 'FULL_OBJECT';
  }
  const bytes = request.method === 'HEAD' ? undefined : (await objects.bytes(bucket, object)).subarray(first, last + 1);
  response.writeHead(range === undefined ? 200 : 206, answer);
  return response.end(garbage && bytes !== undefined ? Buffer.alloc(bytes.length, '?!') : bytes);
}

export function deleteObject({ response, objects, bucket, key }) {
  objects.remove(bucket, key);
  response.writeHead(204);
  return response.end();
}

export function deleteObjects({ request, response, objects, bucket, payload }) {
  const xml = payload.bytes.toString('utf8');
  const keys = textsOf(xml, 'Key');
  if (keys.length === 0 || keys.length > 1000) return sendError(request, response, 'MalformedXML');
  for (const key of keys) objects.remove(bucket, key);
  const quiet = textsOf(xml, 'Quiet')[0] === 'true';
  return sendXml(response, 200, 'DeleteResult', quiet ? [] : keys.map((key) => ['Deleted', [['Key', key]]]));
}

export function listObjects({ request, response, objects, bucket, query }) {
  const prefix = query.get('prefix') ?? '';
  const delimiter = query.get('delimiter') ?? '';
  const most = query.has('max-keys') ? Number(query.get('max-keys')) : 1000;
  const token = query.get('continuation-token');
  if (!Number.isInteger(most) || most < 0) return sendError(request, response, 'InvalidArgument');
  const after = token === null ? (query.get('start-after') ?? '') : Buffer.from(token, 'base64url').toString('utf8');
  if (token !== null && Buffer.from(after).toString('base64url') !== token)
    return sendError(request, response, 'InvalidArgument');

  const encode = query.get('encoding-type') === 'url' ? encodeURIComponent : (text) => text;
  const isAfter = (key) => Buffer.compare(Buffer.from(key), Buffer.from(after)) > 0;
  const entries = [];
  for (const object of objects.list(bucket, prefix)) {
    const cut = delimiter === '' ? -1 : object.key.indexOf(delimiter, prefix.length);
    const group = cut < 0 ? undefined : object.key.slice(0, cut + delimiter.length);
    const name = group ?? object.key;
    if (after !== '' && !isAfter(name)) continue;
    if (group === undefined || entries.at(-1)?.group !== group) entries.push({ name, group, object });
  }
  const page = entries.slice(0, Math.min(most, 1000));
  const more = page.length < entries.length && page.length > 0;
  return sendXml(response, 200, 'ListBucketResult', [
    ['Name', bucket],
    ['Prefix', encode(prefix)],
    ['Delimiter', delimiter === '' ? undefined : encode(delimiter)],
    ['MaxKeys', most],
    ['EncodingType', query.get('encoding-type') ?? undefined],
    ['KeyCount', page.length],
    ['IsTruncated', more],
    ['ContinuationToken', token ?? undefined],
    ['NextContinuationToken', more ? Buffer.from(page.at(-1).name).toString('base64url') : undefined],
    ...page
      .filter(({ group }) => group === undefined)
      .map(({ object }) => [
        'Contents',
        [
          ['Key', encode(object.key)],
          ['LastModified', object.modified],
          ['ETag', object.etag],
          ['Size', object.size],
          ['StorageClass', 'STANDARD'],
        ],
      ]),
    ...page
      .filter(({ group }) => group !== undefined)
      .map(({ group }) => ['CommonPrefixes', [['Prefix', encode(group)]]]),
  ]);
}
