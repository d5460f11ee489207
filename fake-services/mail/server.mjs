import http from 'node:http';
import { BodyTooLarge, listen, readBody, sendJson } from '../support/http.mjs';
import { createMischief, pause } from '../support/mischief.mjs';
import { IdempotencyError, openBox } from './box.mjs';
import { listPage, mailPage, missingPage } from './page.mjs';
import { validateMail } from './validate.mjs';

const LARGEST = 40 * 1024 * 1024;
const MOST_IN_A_BATCH = 100;
const PAGE_POLICY =
  "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'; form-action 'self'; base-uri 'none'";
// The mail's own HTML: no script, nothing from elsewhere; a link opens outside the frame.
const MAIL_POLICY =
  "sandbox allow-popups allow-popups-to-escape-sandbox allow-top-navigation-by-user-activation; default-src 'none'; style-src 'unsafe-inline'; img-src data:";

function sendHtml(response, status, html, policy = PAGE_POLICY) {
  response.writeHead(status, {
    'content-type': 'text/html; charset=utf-8',
    'content-security-policy': policy,
    'cache-control': 'no-store',
    'referrer-policy': 'no-referrer',
    'x-content-type-options': 'nosniff',
  });
  response.end(html);
}

const sendError = (response, [status, name, message], headers) =>
  sendJson(response, status, { statusCode: status, name, message }, headers);

/**
 * The mail API of the hosted service (POST /emails, POST /emails/batch, GET /emails/:id) with its idempotency keys, and a
 * mailbox to look into: GET / for people, GET /box.json?to= for programs. Misbehaviour on demand: POST /_control.
 */
export async function startMail({ folder, port, apiKey, now = () => new Date() }) {
  const box = openBox({ folder, now });
  const mischief = createMischief();
  const inFlight = new Set();

  function refusalOfKey(request) {
    const given = /^Bearer (.+)$/.exec(request.headers.authorization ?? '')?.[1];
    if (given === undefined) return [401, 'missing_api_key', 'Missing API key in the authorization header.'];
    return given === apiKey ? undefined : [403, 'invalid_api_key', 'API key is invalid.'];
  }

  function accept(body, isBatch, key) {
    let input;
    try {
      input = JSON.parse(body.toString('utf8'));
    } catch {
      return { error: [422, 'validation_error', 'The body is not JSON.'] };
    }
    if (isBatch && (!Array.isArray(input) || input.length === 0 || input.length > MOST_IN_A_BATCH)) {
      return { error: [422, 'validation_error', `A batch is a list of 1 to ${MOST_IN_A_BATCH} mails.`] };
    }
    const checked = (isBatch ? input : [input]).map((each) => validateMail(each, { batch: isBatch }));
    const wrong = checked.find(({ error }) => error !== undefined);
    if (wrong !== undefined) return wrong;
    try {
      const ids = box.deliver({ key, body, list: checked.map(({ mail }) => mail) });
      return { answer: isBatch ? { data: ids.map((id) => ({ id })) } : { id: ids[0] } };
    } catch (error) {
      if (!(error instanceof IdempotencyError)) throw error;
      const message = 'This idempotency key was used within the last 24 hours with another body.';
      return { error: [409, 'invalid_idempotent_request', message] };
    }
  }

  async function send(request, response, isBatch) {
    const orders = mischief.next(request);
    if (orders.drop) return request.socket.destroy();
    const body = await readBody(request, LARGEST);
    const key = request.headers['idempotency-key'];
    if (key !== undefined && (key.length < 1 || key.length > 256)) {
      return sendError(response, [
        400,
        'invalid_idempotency_key',
        'The idempotency key must be between 1 and 256 characters.',
      ]);
    }
    if (key !== undefined && inFlight.has(key)) {
      const message = 'Another request with this idempotency key is still being worked on.';
      return sendError(response, [409, 'concurrent_idempotent_requests', message]);
    }
    inFlight.add(key);
    try {
      if (orders.slow) await pause(orders.milliseconds);
      if (orders.fail) {
        const name =
          orders.status === 429
            ? 'rate_limit_exceeded'
            : orders.status < 500
              ? 'validation_error'
              : 'internal_server_error';
        const headers = orders.retryAfter === undefined ? {} : { 'retry-after': String(orders.retryAfter) };
        return sendError(response, [orders.status, name, 'The mail service was told to fail.'], headers);
      }
      const { answer, error } = accept(body, isBatch, key);
      if (error !== undefined) return sendError(response, error);
      if (orders.lose) return response.destroy();
      if (orders.garbage)
        return response.writeHead(200, { 'content-type': 'text/html' }).end('<html>not what you asked for');
      return sendJson(response, 200, answer);
    } finally {
      inFlight.delete(key);
    }
  }

  function api(request, response, path) {
    const refused = refusalOfKey(request);
    if (refused !== undefined) return sendError(response, refused);
    if (request.method === 'POST' && (path === '/emails' || path === '/emails/batch'))
      return send(request, response, path !== '/emails');
    const mail = request.method === 'GET' ? box.get(path.slice('/emails/'.length)) : undefined;
    if (mail === undefined) return sendError(response, [404, 'not_found', 'Email not found']);
    const { idempotency_key, sequence, attachments, headers, tags, ...shown } = mail;
    return sendJson(response, 200, { object: 'email', ...shown, last_event: 'delivered', scheduled_at: null });
  }

  function look(response, path, query) {
    if (path === '/') return sendHtml(response, 200, listPage(box.list(query.get('to') ?? ''), query.get('to') ?? ''));
    if (path === '/box.json')
      return sendJson(response, 200, box.list(query.get('to') ?? ''), { 'cache-control': 'no-store' });
    const [, id, part, index] = /^\/mail\/([^/]+)(?:\/(html|attachment)(?:\/(\d+))?)?$/.exec(path) ?? [];
    const mail = box.get(id);
    if (mail === undefined) return sendHtml(response, 404, missingPage());
    if (part === undefined) return sendHtml(response, 200, mailPage(mail));
    if (part === 'html') return sendHtml(response, 200, `<base target="_blank">${mail.html ?? ''}`, MAIL_POLICY);
    const attachment = mail.attachments[Number(index)];
    if (attachment === undefined) return sendHtml(response, 404, missingPage());
    response.writeHead(200, {
      'content-type': attachment.content_type,
      'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(attachment.filename)}`,
      'x-content-type-options': 'nosniff',
    });
    return response.end(Buffer.from(attachment.content, 'base64'));
  }

  async function handle(request, response) {
    const { pathname, searchParams } = new URL(request.url, 'http://mail');
    if (pathname === '/_control') return mischief.control(request, response);
    if (pathname === '/_health') return sendJson(response, 200, { ok: true });
    if (pathname === '/emails' || pathname.startsWith('/emails/')) return api(request, response, pathname);
    if (request.method !== 'GET' && request.method !== 'HEAD') {
      return sendError(response, [405, 'method_not_allowed', 'The mailbox is only for looking.']);
    }
    return look(response, pathname, searchParams);
  }

  const server = http.createServer((request, response) => {
    handle(request, response).catch((error) => {
      if (response.headersSent || request.socket.destroyed) return response.destroy();
      if (error instanceof BodyTooLarge)
        return sendError(response, [413, 'validation_error', 'The mail is larger than 40 MB.'], {
          connection: 'close',
        });
      console.error(error);
      return sendError(response, [500, 'internal_server_error', 'The mailbox failed.']);
    });
  });
  return listen(server, port);
}
