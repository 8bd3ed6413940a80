import { once } from 'node:events';
import { createServer, type AddressInfo } from 'node:net';
import { expect, test } from 'vitest';
import { freePort, probePort } from '#scripts/lib/ports.mjs';

test('a port that something listens on is taken, and free again when that stops', async () => {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  expect(await probePort(port)).toBeUndefined();
  server.close();
  await once(server, 'close');
  expect(await probePort(port)).toBe(port);
});

test('a free port can be listened on', async () => {
  const port = await freePort();
  const server = createServer().listen(port, '127.0.0.1');
  await once(server, 'listening');
  server.close();
});
