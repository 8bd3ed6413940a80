import { mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { sourceStamp } from '#scripts/lib/builds.mjs';

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'ringstead-stamp-'));
  mkdirSync(join(folder, 'src/deep'), { recursive: true });
  writeFileSync(join(folder, 'src/deep/a.ts'), 'one');
  writeFileSync(join(folder, 'src/b.ts'), 'two');
});

afterEach(() => {
  rmSync(folder, { recursive: true });
});

const stamp = () => sourceStamp(folder, ['src', 'not-there.ts']);

test('unchanged sources keep their stamp', () => {
  expect(stamp()).toBe(stamp());
});

test('a changed, an added, a removed and a renamed file each change the stamp', () => {
  const seen = [stamp()];
  utimesSync(join(folder, 'src/deep/a.ts'), 1_000_000, 1_000_000);
  seen.push(stamp());
  writeFileSync(join(folder, 'src/c.ts'), 'three');
  seen.push(stamp());
  rmSync(join(folder, 'src/b.ts'));
  seen.push(stamp());
  writeFileSync(join(folder, 'not-there.ts'), '');
  seen.push(stamp());
  expect(new Set(seen).size).toBe(seen.length);
});

test('files beside the sources do not count', () => {
  const before = stamp();
  writeFileSync(join(folder, 'README.md'), 'text');
  expect(stamp()).toBe(before);
});
