import { expect, test } from 'vitest';
import { differs } from '#scripts/lib/packages.mjs';

const wanted = {
  packages: {
    '': { version: '0.1.0' },
    'node_modules/a': { version: '1.0.0' },
    'node_modules/for-another-system': { version: '2.0.0', optional: true },
  },
};

test('an installation with every package of this system is up to date', () => {
  expect(differs(wanted, { packages: { 'node_modules/a': { version: '1.0.0' } } })).toBe(false);
});

test('a missing package, and one of another version, make it stale', () => {
  expect(differs(wanted, { packages: {} })).toBe(true);
  expect(differs(wanted, { packages: { 'node_modules/a': { version: '1.0.1' } } })).toBe(true);
});

test('an optional package of another version makes it stale', () => {
  const installed = {
    packages: {
      'node_modules/a': { version: '1.0.0' },
      'node_modules/for-another-system': { version: '1.9.0' },
    },
  };
  expect(differs(wanted, installed)).toBe(true);
});
