import { readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { makeStateFolder, stateFolder } from './folders.mjs';

/**
 * @param {string} name
 * @returns {unknown} what was written last; undefined when nothing was, or when it cannot be read
 */
export function readState(name) {
  try {
    return JSON.parse(readFileSync(join(stateFolder, name), 'utf8'));
  } catch {
    return undefined;
  }
}

/**
 * @param {string} name
 * @param {unknown} value
 */
export function writeState(name, value) {
  makeStateFolder();
  const file = join(stateFolder, name);
  writeFileSync(`${file}.new`, JSON.stringify(value));
  renameSync(`${file}.new`, file);
}

/** @param {string} name */
export function removeState(name) {
  rmSync(join(stateFolder, name), { force: true });
}
