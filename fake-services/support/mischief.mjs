import { readBody, sendJson } from './http.mjs';

const KINDS = ['fail', 'slow', 'garbage', 'drop', 'lose'];

/**
 * Lets a test tell a fake to misbehave. POST /_control takes
 * { fail, slow, garbage, drop, lose: how many of the next calls, status, retryAfter, milliseconds, method, path }:
 * fail answers `status` (503 unless told), slow waits `milliseconds` first, garbage answers nonsense,
 * drop cuts the connection before anything is done, lose does the work and cuts the connection instead of answering.
 * `method` and `path` (a prefix) narrow it to some calls. DELETE /_control makes the fake behave again.
 */
export function createMischief() {
  const nothing = () => ({ fail: 0, slow: 0, garbage: 0, drop: 0, lose: 0, status: 503, milliseconds: 1000 });
  let orders = nothing();

  async function control(request, response) {
    if (request.method === 'DELETE') orders = nothing();
    if (request.method === 'POST') {
      let wanted;
      try {
        wanted = JSON.parse((await readBody(request, 10_000)).toString('utf8'));
      } catch {
        return sendJson(response, 400, { message: 'The control body is not JSON.' });
      }
      const unknown = Object.keys(wanted).filter(
        (key) => ![...KINDS, 'status', 'retryAfter', 'milliseconds', 'method', 'path'].includes(key),
      );
      if (unknown.length > 0) return sendJson(response, 400, { message: `Unknown control: ${unknown.join(', ')}.` });
      orders = { ...nothing(), ...wanted };
    }
    return sendJson(response, 200, orders);
  }

  /** What to do with this call; each order is used up by it. */
  function next(request) {
    if (orders.method !== undefined && orders.method !== request.method) return {};
    if (orders.path !== undefined && !request.url.startsWith(orders.path)) return {};
    const now = { status: orders.status, retryAfter: orders.retryAfter, milliseconds: orders.milliseconds };
    for (const kind of KINDS) {
      if (orders[kind] > 0) {
        orders[kind] -= 1;
        now[kind] = true;
      }
    }
    return now;
  }

  return { control, next };
}

export const pause = (milliseconds) => new Promise((resolve) => setTimeout(resolve, milliseconds));
