import { describe, expect, it } from 'vitest';

import { AppError } from '#shared/errors/AppError.ts';
import { canonicalJson } from '#shared/frame/canonicalJson.ts';
import { fingerprint } from '#shared/frame/fingerprint.ts';

describe('canonical JSON, RFC 8785', () => {
  it('writes the sample of §3.2.2 as §3.2.3 shows it', () => {
    const sample = {
      numbers: [Number('333333333.33333329'), 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
      string: '\u20ac$\u000F\u000aA\'\u0042\u0022\u005c\\"/',
      literals: [null, true, false],
    };
    expect(canonicalJson(sample)).toBe(
      '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],' +
        '"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    );
  });

  it('sorts keys by UTF-16 code units, as in §3.2.3', () => {
    const keys = ['\u20ac', '\r', '\ufb33', '1', '\ud83d\ude00', '\u0080', '\u00f6'];
    const sorted = ['\r', '1', '\u0080', '\u00f6', '\u20ac', '\ud83d\ude00', '\ufb33'];
    const json = canonicalJson(Object.fromEntries(keys.map((key) => [key, 0])));
    expect(json).toBe(`{${sorted.map((key) => `${JSON.stringify(key)}:0`).join(',')}}`);
  });

  // Appendix B, number serialisation samples.
  it.each([
    [-0, '0'],
    [5e-324, '5e-324'],
    [1.7976931348623157e308, '1.7976931348623157e+308'],
    [9007199254740992, '9007199254740992'],
    [295147905179352830000, '295147905179352830000'],
    [1e23, '1e+23'],
    [9.999999999999997e-7, '9.999999999999997e-7'],
    [0.000001, '0.000001'],
  ])('writes %d as Appendix B does', (value, text) => {
    expect(canonicalJson(value)).toBe(text);
  });

  it.each([Number.NaN, Infinity, undefined])('refuses %s', (value) => {
    expect(() => canonicalJson(value)).toThrow(AppError);
  });
});

describe('fingerprint', () => {
  it('is SHA-256: the canonical JSON of a text is the text in quotes', () => {
    // FIPS 180-4 through an implementation of its own: WebCrypto.
    const text = 'abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq';
    return crypto.subtle.digest('SHA-256', new TextEncoder().encode(`"${text}"`)).then((digest) => {
      expect(fingerprint(text)).toBe(Buffer.from(digest).toString('hex'));
    });
  });

  it('does not depend on the order of keys', () => {
    expect(fingerprint({ a: 1, b: { c: 2, d: 3 } })).toBe(fingerprint({ b: { d: 3, c: 2 }, a: 1 }));
    expect(fingerprint({ a: 1 })).not.toBe(fingerprint({ a: 2 }));
  });
});
