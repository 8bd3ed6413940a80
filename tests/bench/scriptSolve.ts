import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { documentOf, frameNamed } from './frames.ts';
import type { MassKind } from './frames.ts';
import { comparedTime, medianSolve } from './measureSolve.ts';

const FILE = fileURLToPath(import.meta.url);

/**
 * Milliseconds of the compared stages where the engine has no WebAssembly SIMD, so that the JavaScript kernels run: the
 * median of some solves in a process of their own. Run as a program with `--script`, this file is that process.
 * Throws Error where that process fails.
 */
export function scriptSolve(name: string, massKind: MassKind, modes: number, runs: number): number {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', 'tsx', FILE, '--script', name, massKind, String(modes), String(runs)],
    { encoding: 'utf8' },
  );
  if (status !== 0) throw new Error(`The JavaScript solve of ${name} failed: ${stderr}`);
  return Number(stdout);
}

if (process.argv[1] === FILE && process.argv[2] === '--script') {
  const [name, massKind, modes, runs] = process.argv.slice(3);
  // What such an engine answers when it is asked whether it can take the kernels.
  WebAssembly.validate = () => false;
  const method = massKind === 'lumped' ? 'lumped' : 'consistent';
  const document = documentOf(frameNamed(name));
  const { timing } = medianSolve(document, method, Number(modes), Number(runs), comparedTime);
  console.log(comparedTime(timing));
}
