import http from 'node:http';
import { BodyTooLarge, listen, readBody, sendJson } from '../support/http.mjs';
import { createMischief, pause } from '../support/mischief.mjs';
import { deleteObject, deleteObjects, getObject, listObjects, putObject } from './objectCalls.mjs';
import { openObjects } from './objects.mjs';
import { checkedPayload } from './payload.mjs';
import { refusal } from './signature.mjs';
import { sendError } from './xml.mjs';

const LARGEST = 64 * 1024 * 1024;
const BUCKET = /^[a-z0-9][a-z0-9.-]{1,61}[a-z0-9]$/;
// Calls this store does not know would otherwise be taken for the plain one of the same path.
const KNOWN_QUERY = new Set([
  'x-id',
  'list-type',
  'prefix',
  'delimiter',
  'max-keys',
  'continuation-token',
  'start-after',
  'encoding-type',
  'fetch-owner',
  'delete',
  'response-content-type',
  'response-content-disposition',
  'response-cache-control',
]);

function bucketCall(call, method) {
  const { request, response, objects, bucket, query } = call;
  if (method === 'PUT') {
    if (!BUCKET.test(bucket)) return sendError(request, response, 'InvalidBucketName');
    if (objects.hasBucket(bucket)) return sendError(request, response, 'BucketAlreadyOwnedByYou');
    objects.createBucket(bucket);
    response.writeHead(200, { location: `/${bucket}`, 'content-length': 0 });
    return response.end();
  }
  if (!objects.hasBucket(bucket)) return sendError(request, response, 'NoSuchBucket');
  if (method === 'HEAD') {
    response.writeHead(200);
    return response.end();
  }
  if (method === 'GET' && query.get('list-type') === '2') return listObjects(call);
  if (method === 'POST' && query.has('delete')) return deleteObjects(call);
  return sendError(request, response, 'NotImplemented');
}

function objectCall(call, method) {
  const { request, response, objects, bucket, key } = call;
  if (!objects.hasBucket(bucket)) return sendError(request, response, 'NoSuchBucket');
  if (Buffer.byteLength(key) > 1024) return sendError(request, response, 'KeyTooLongError');
  if (request.headers['x-amz-copy-source'] !== undefined) return sendError(request, response, 'NotImplemented');
  if (method === 'PUT') return putObject(call);
  if (method === 'GET' || method === 'HEAD') return getObject(call);
  if (method === 'DELETE') return deleteObject(call);
  return sendError(request, response, 'MethodNotAllowed');
}

/**
 * An S3 of the few calls Loamline makes, path style, on 127.0.0.1 only. Unsigned, mis-signed or damaged requests are refused
 * as the real one refuses them. Misbehaviour on demand: POST /_control (see support/mischief.mjs); GET /_health says it is up.
 */
export async function startStorage({ folder, port, accessKeyId, secretAccessKey, region, now = () => new Date() }) {
  const objects = openObjects(folder);
  const mischief = createMischief();

  async function handle(request, response) {
    if (request.url === '/_control') return mischief.control(request, response);
    if (request.url === '/_health') return sendJson(response, 200, { ok: true });
    const orders = mischief.next(request);
    if (orders.drop) return request.socket.destroy();
    if (orders.slow) await pause(orders.milliseconds);
    const body = await readBody(request, LARGEST);
    if (orders.fail)
      return sendError(request, response, orders.status === 503 ? 'SlowDown' : 'InternalError', orders.status);
    const refused = refusal(request, { accessKeyId, secretAccessKey, region, now: now().getTime() });
    if (refused !== undefined) return sendError(request, response, refused);
    const payload = checkedPayload(request.headers, body);
    if (payload.code !== undefined) return sendError(request, response, payload.code);
    if (orders.garbage && request.method !== 'GET') {
      response.writeHead(200, { 'content-type': 'application/xml' });
      return response.end('<<<not xml');
    }

    const url = new URL(request.url, 'http://store');
    const [bucket = '', ...rest] = url.pathname.slice(1).split('/').map(decodeURIComponent);
    const key = rest.join('/');
    const query = url.searchParams;
    if ([...query.keys()].some((name) => !KNOWN_QUERY.has(name))) return sendError(request, response, 'NotImplemented');
    const answer = orders.lose ? silent(response) : response;
    const call = { request, response: answer, objects, bucket, key, query, payload, now, garbage: orders.garbage };
    if (bucket === '') return sendError(request, response, 'NotImplemented');
    return key === '' ? bucketCall(call, request.method) : objectCall(call, request.method);
  }

  const server = http.createServer((request, response) => {
    handle(request, response).catch((error) => {
      if (response.headersSent) return response.destroy();
      if (error instanceof BodyTooLarge) {
        response.setHeader('connection', 'close');
        return sendError(request, response, 'EntityTooLarge');
      }
      if (!request.socket.destroyed) console.error(error);
      return sendError(request, response, 'InternalError');
    });
  });
  return listen(server, port);
}

/** An answer that is written nowhere: the work is done, the caller only sees the connection end. */
function silent(response) {
  return { writeHead: () => undefined, end: () => response.destroy() };
}
