import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';
import { canonicalJson } from './canonicalJson.ts';

/** SHA-256 (FIPS 180-4) of the canonical JSON of a value, 64 lower-case hexadecimal digits. */
export function fingerprint(value: unknown): string {
  return bytesToHex(sha256(utf8ToBytes(canonicalJson(value))));
}
