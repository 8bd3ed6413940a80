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
