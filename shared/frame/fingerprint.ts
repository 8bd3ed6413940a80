import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';
import canonicalize from 'canonicalize';

import { AppError } from '../errors/AppError.ts';

/**
 * Canonical JSON of a value, RFC 8785 (JSON Canonicalization Scheme): keys sorted, no white space, numbers as
 * ECMAScript writes them. Throws `invalid-document` for what JSON cannot hold (NaN, infinities, functions).
 */
export function canonicalJson(value: unknown): string {
  let json: string | undefined;
  try {
    json = canonicalize(value);
  } catch (cause) {
    throw new AppError('invalid-document', 'A value holds something JSON cannot write.', {}, cause);
  }
  if (json === undefined) {
    throw new AppError('invalid-document', 'A value holds something JSON cannot write.');
  }
  return json;
}

/** SHA-256 (FIPS 180-4) of the canonical JSON of a value, 64 lower-case hexadecimal digits. */
export function fingerprint(value: unknown): string {
  return bytesToHex(sha256(utf8ToBytes(canonicalJson(value))));
}
