import net from 'node:net';

function isFree(port) {
  return new Promise((resolve) => {
    const probe = net.createServer();
    probe.once('error', () => resolve(false));
    probe.listen({ port, host: '127.0.0.1', exclusive: true }, () => probe.close(() => resolve(true)));
  });
}

/** The first free loopback port at or after `wanted`, leaving out `taken`; 0 asks the system for any. */
export async function freePort(wanted, taken = []) {
  if (wanted === 0) {
    return new Promise((resolve, reject) => {
      const probe = net.createServer();
      probe.once('error', reject);
      probe.listen({ port: 0, host: '127.0.0.1' }, () => {
        const { port } = probe.address();
        probe.close(() => (taken.includes(port) ? freePort(0, taken).then(resolve, reject) : resolve(port)));
      });
    });
  }
  for (let port = wanted; port < Math.min(wanted + 200, 65_536); port += 1) {
    if (!taken.includes(port) && (await isFree(port))) return port;
  }
  throw new Error(`No port is free from ${wanted} to ${wanted + 199} on 127.0.0.1.`);
}
