import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { root } from './folders.mjs';
import { StepError } from './steps.mjs';

/**
 * Compiles the solver's kernels to WebAssembly and writes them as a module, so that server, browser
 * and command line load them alike, without a file to find.
 *
 * @param {string} result path of the module, from the root
 * @throws {StepError}
 */
export async function makeKernels(result) {
  const asc = await import('assemblyscript/asc');
  const folder = mkdtempSync(join(tmpdir(), 'kernels-'));
  const output = join(folder, 'kernels.wasm');
  try {
    const { error, stderr } = await asc.main([
      join(root, 'shared/numerics/kernels/assembly/index.ts'),
      ...['--outFile', output, '-O3', '--noAssert', '--runtime', 'stub', '--importMemory'],
      ...['--enable', 'simd', '--enable', 'bulk-memory'],
    ]);
    if (error) throw new StepError(`The solver's kernels do not compile: ${stderr.toString()}`);
    const text = readFileSync(output).toString('base64');
    writeFileSync(
      join(root, result),
      `// Made from assembly/index.ts by the build.\nexport const KERNELS_BASE64 =\n  '${text}';\n`,
    );
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
