import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { documentOf, frameNamed } from './frames.ts';
import type { MassKind } from './frames.ts';
import { solveOnce } from './measureSolve.ts';

/**
 * The first solve of a process, which pays for compilation, and the memory the process took in all.
 * Run as a program with `--cold`, this file is that process.
 */
export interface ColdSolve {
  /** Of the solve alone: starting Node and reading the modules are left out. */
  readonly totalMs: number;
  readonly peakBytes: number;
}

const FILE = fileURLToPath(import.meta.url);

/** Solves the frame once in a fresh process. Throws Error where that process fails. */
export function coldSolve(name: string, massKind: MassKind, modes: number): ColdSolve {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', 'tsx', FILE, '--cold', name, massKind, String(modes)],
    { encoding: 'utf8' },
  );
  if (status !== 0) throw new Error(`The cold solve of ${name} failed: ${stderr}`);
  return JSON.parse(stdout) as ColdSolve;
}

if (process.argv[1] === FILE && process.argv[2] === '--cold') {
  const [name, massKind, modes] = process.argv.slice(3);
  const { timing } = solveOnce(
    documentOf(frameNamed(name)),
    massKind === 'lumped' ? 'lumped' : 'consistent',
    Number(modes),
  );
  // Node gives the greatest resident set in KiB.
  const peakBytes = process.resourceUsage().maxRSS * 1024;
  console.log(JSON.stringify({ totalMs: timing.total, peakBytes } satisfies ColdSolve));
}
