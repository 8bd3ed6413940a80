import { createServer } from 'node:net';

/**
 * @param {number} port 0 asks for any free one
 * @returns {Promise<number | undefined>} the port, free on loopback a moment ago; undefined when taken
 */
export function probePort(port) {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', (/** @type {NodeJS.ErrnoException} */ error) => {
      if (error.code === 'EADDRINUSE' || error.code === 'EACCES') resolve(undefined);
      else reject(error);
    });
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => {
      const address = server.address();
      const bound = typeof address === 'object' && address !== null ? address.port : port;
      server.close(() => resolve(bound));
    });
  });
}

/** @returns {Promise<number>} a port that is free on loopback */
export async function freePort() {
  const port = await probePort(0);
  if (port === undefined) throw new Error('The system gives no free port on loopback.');
  return port;
}
