import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { assembleMatrices } from '#shared/frame/assembly/assembleMatrices.ts';
import { buildModel } from '#shared/frame/assembly/buildModel.ts';
import { divisionsOf } from '#shared/frame/assembly/divisions.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { MassKind } from './frames.ts';

/** What `reference.py` prints for each number of modes. */
export interface ScipyTimes {
  readonly modes: number;
  readonly totalMs: number;
  readonly factorMs: number;
  readonly iterateMs: number;
  readonly ncv: number;
  readonly tol: number;
  /** `eigsh(K, k, M, sigma=0)` with nothing chosen for it; null where it was not run. */
  readonly plainMs: number | null;
  /** Ascending [rad²/s²]. */
  readonly lambda: readonly number[];
}

/** The BLAS libraries that SciPy may have been built with each read their own. */
const ONE_THREAD = { OMP_NUM_THREADS: '1', OPENBLAS_NUM_THREADS: '1', MKL_NUM_THREADS: '1' };
const SCRIPT = fileURLToPath(new URL('./reference.py', import.meta.url));
const VERSIONS =
  'import sys, numpy, scipy; print("Python %s, NumPy %s, SciPy %s" % ' +
  '(sys.version.split()[0], numpy.__version__, scipy.__version__))';

/** Versions in words, or null where `python3` or its SciPy is missing. */
export function scipyVersions(): string | null {
  const { status, stdout } = spawnSync('python3', ['-c', VERSIONS], { encoding: 'utf8' });
  return status === 0 ? stdout.trim() : null;
}

/**
 * SciPy's best on the very matrices that our solver stands for, an entry per number of modes.
 *   plain  whether to time the plain call once as well
 * Throws Error where the script fails.
 */
export function scipyTimes(
  document: FrameDocument,
  massKind: MassKind,
  modeCounts: readonly number[],
  runs: number,
  plain: boolean,
): ScipyTimes[] {
  const folder = mkdtempSync(join(tmpdir(), 'frame-bench-'));
  try {
    writeMatrices(folder, document, massKind);
    const { status, stdout, stderr } = spawnSync(
      'python3',
      [SCRIPT, folder, String(runs), plain ? '1' : '0', ...modeCounts.map(String)],
      { encoding: 'utf8', env: { ...process.env, ...ONE_THREAD } },
    );
    if (status !== 0) throw new Error(`The SciPy reference failed: ${stderr}`);
    return JSON.parse(stdout) as ScipyTimes[];
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function writeMatrices(folder: string, document: FrameDocument, massKind: MassKind): void {
  const model = buildModel(document, {
    massKind,
    divisionsOf: (part) => divisionsOf(part, undefined, undefined),
  });
  for (const [name, matrix] of Object.entries(assembleMatrices(model))) {
    // Typed arrays are little-endian on every processor Node runs on here, as the script reads them.
    writeFileSync(join(folder, `${name}.colPtr`), matrix.colPtr);
    writeFileSync(join(folder, `${name}.rowIdx`), matrix.rowIdx);
    writeFileSync(join(folder, `${name}.values`), matrix.values);
  }
}
