import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The checkout. */
export const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');

/** Git-ignored folder for all that belongs to this machine: secrets, the private cluster, stamps. */
export const stateFolder = process.env['RINGSTEAD_STATE'] ?? join(root, '.ringstead');

/** Makes the state folder. Others may pass through it (PostgreSQL runs as another user), not list it. */
export function makeStateFolder() {
  mkdirSync(stateFolder, { recursive: true, mode: 0o711 });
}
