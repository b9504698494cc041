import { createServer } from 'node:net';

/** Whether this process could listen there now: null when it could, else the error's code. */
export function whyNotListen(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const server = createServer();
    server.once('error', (error) => resolve(error.code));
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(null)));
  });
}

/**
 * A port on loopback that is free now. Below the range from which the kernel takes the near ends of outgoing
 * connections, so that it is likely still free at the next start.
 */
export async function freePort() {
  for (let attempt = 0; attempt < 50; attempt += 1) {
    const port = 20_000 + Math.floor(Math.random() * 12_000);
    if ((await whyNotListen(port)) === null) return port;
  }
  throw new Error('no free port found between 20000 and 32000');
}
