/** What both little HTTP programs share: reading a body, answering JSON, listening on loopback only. */

export class BodyTooLarge extends Error {}

export async function readBody(request, limit) {
  const parts = [];
  let length = 0;
  for await (const part of request) {
    length += part.length;
    if (length > limit) throw new BodyTooLarge(`the body is larger than ${limit} bytes`);
    parts.push(part);
  }
  return Buffer.concat(parts);
}

export function sendJson(response, status, value, headers = {}) {
  const body = Buffer.from(JSON.stringify(value, null, 2));
  response.writeHead(status, { 'content-type': 'application/json', 'content-length': body.length, ...headers });
  response.end(body);
}

/** Resolves to { url, port, close } once the server accepts connections. */
export function listen(server, port) {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => {
      const address = server.address();
      const close = () =>
        new Promise((done) => {
          server.close(() => done());
          server.closeAllConnections();
        });
      resolve({ url: `http://127.0.0.1:${address.port}`, port: address.port, close });
    });
  });
}
