import { expect, test } from 'vitest';
import { formatDuration } from '#scripts/lib/steps.mjs';

test.each([
  [0, '0.0 s'],
  [1_249, '1.2 s'],
  [59_949, '59.9 s'],
  [59_950, '1 min 0 s'],
  [125_000, '2 min 5 s'],
  [3_599_600, '60 min 0 s'],
])('%d ms reads %s', (ms, text) => {
  expect(formatDuration(ms)).toBe(text);
});
