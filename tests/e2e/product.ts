import { readFileSync, writeFileSync } from 'node:fs';
import { serverProgram, spawnServer, waitUntilReady } from '#scripts/lib/server.mjs';
import { stopProcess } from '#scripts/lib/processes.mjs';

/** The server under test. It outlives the process that started it, so it is known by a file. */
interface Product {
  readonly url: string;
  readonly env: Readonly<Record<string, string>>;
  readonly log: string;
  readonly pid?: number;
}

/** Long enough for a solve that is told to stop and for requests under way. */
const STOP_PATIENCE_MS = 20_000;

/** Names the file by which the test processes find the server, and its address, in the environment. */
export function rememberProduct(file: string, product: Product): void {
  process.env['RINGSTEAD_E2E_PRODUCT'] = file;
  process.env['RINGSTEAD_E2E_URL'] = product.url;
  writeProduct(product);
}

/** Starts the server and waits until it is ready. */
export async function startProduct(): Promise<void> {
  const product = readProduct();
  const env = { ...process.env, ...product.env };
  const server = spawnServer(['--enable-source-maps', serverProgram], env, product.log);
  writeProduct({ ...product, pid: server.pid });
  await waitUntilReady(server, product.url, product.log);
}

/**
 * Stops the server as an operator does: requests under way finish.
 *
 * @throws when it has to be ended by force
 */
export async function stopProduct(): Promise<void> {
  const { pid, log } = readProduct();
  if (pid === undefined) return;
  if (!(await stopProcess(pid, STOP_PATIENCE_MS))) {
    throw new Error(`The server did not stop by itself:\n${readFileSync(log, 'utf8')}`);
  }
}

/** Ends the server without a warning, as a power cut does. */
export function killProduct(): void {
  const { pid } = readProduct();
  if (pid === undefined) throw new Error('The server does not run.');
  process.kill(pid, 'SIGKILL');
}

function file(): string {
  const name = process.env['RINGSTEAD_E2E_PRODUCT'];
  if (name === undefined) throw new Error('The global set-up has not run.');
  return name;
}

function readProduct(): Product {
  return JSON.parse(readFileSync(file(), 'utf8')) as Product;
}

function writeProduct(product: Product): void {
  writeFileSync(file(), JSON.stringify(product));
}
