import { chmodSync, existsSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { usableFolder } from '#scripts/lib/cluster.mjs';

/** Another user than the one that runs the tests; only root may act as one. */
const somebody = process.getuid?.() === 0 ? { uid: 65_534, gid: 65_534 } : undefined;

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'ringstead-usable-'));
});

afterEach(() => {
  chmodSync(folder, 0o700);
  rmSync(folder, { recursive: true });
});

test('the first folder that the account can work in is taken and made', () => {
  chmodSync(folder, 0o711);
  const first = join(folder, 'first');
  expect(usableFolder([first, join(folder, 'second')], somebody)).toBe(first);
  expect(existsSync(join(folder, 'second'))).toBe(false);
});

test('a folder that the account cannot reach is passed over', () => {
  const shut = join(folder, 'shut');
  const open = join(folder, 'open');
  chmodSync(folder, 0o711);
  mkdirSync(shut, { mode: 0 });
  mkdirSync(open, { mode: 0o711 });
  const outOfReach = join(shut, 'postgres');
  expect(usableFolder([outOfReach, join(open, 'postgres')], somebody)).toBe(join(open, 'postgres'));
  chmodSync(shut, 0o700);
  expect(existsSync(outOfReach)).toBe(false);
});

test('a folder out of reach keeps what is in it', () => {
  const kept = join(folder, 'postgres', 'data');
  mkdirSync(kept, { recursive: true });
  writeFileSync(join(kept, 'PG_VERSION'), '15');
  chmodSync(folder, 0);
  expect(() => usableFolder([join(folder, 'postgres')], somebody)).toThrow(/can write to none of/);
  chmodSync(folder, 0o700);
  expect(existsSync(join(kept, 'PG_VERSION'))).toBe(true);
});
