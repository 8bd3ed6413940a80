import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { makeStateFolder, stateFolder } from './folders.mjs';

/**
 * Made once per checkout, kept in a file that only its owner can read.
 * @typedef {object} Secrets
 * @property {string} superuserPassword
 * @property {string} ownerPassword
 * @property {string} runTimePassword
 * @property {string} sessionSecret
 */

const file = join(stateFolder, 'secrets.json');

/** @returns {Secrets} */
export function provideSecrets() {
  if (existsSync(file)) return JSON.parse(readFileSync(file, 'utf8'));
  const password = () => randomBytes(24).toString('hex');
  /** @type {Secrets} */
  const secrets = {
    superuserPassword: password(),
    ownerPassword: password(),
    runTimePassword: password(),
    sessionSecret: randomBytes(32).toString('hex'),
  };
  makeStateFolder();
  // Renaming is atomic: an interrupted start leaves the whole file or none.
  writeFileSync(`${file}.new`, JSON.stringify(secrets), { mode: 0o600 });
  renameSync(`${file}.new`, file);
  return secrets;
}
