import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  readFileSync,
  readdirSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { root } from './folders.mjs';
import { makeKernels } from './kernels.mjs';
import { run } from './processes.mjs';
import { StepError } from './steps.mjs';

/**
 * One thing that is built: from which files, where to, and how.
 * @typedef {object} Build
 * @property {string} name
 * @property {string[]} sources files and folders, from the root
 * @property {string} result a file that exists when it is built
 * @property {() => Promise<void>} make
 */

const SERVER_ENTRIES = ['server/main.ts', 'server/workers/solveWorker.ts', 'server/runner.ts'];

const KERNELS = 'shared/numerics/kernels/kernels.generated.ts';

/** What every other build and every run from source stands on. @type {Build} */
export const kernelsBuild = {
  name: 'kernels',
  sources: ['shared/numerics/kernels/assembly', 'scripts/lib/kernels.mjs', 'package-lock.json'],
  result: KERNELS,
  make: () => makeKernels(KERNELS),
};

/** @type {Build} */
export const clientBuild = {
  name: 'client',
  sources: [
    ...['src', 'shared', 'public', 'index.html', 'package-lock.json', 'tsconfig.base.json'],
    ...['vite.config.ts', 'tailwind.config.ts', 'postcss.config.js'],
  ],
  result: 'dist/client/index.html',
  async make() {
    const vite = join(root, 'node_modules/vite/bin/vite.js');
    const { status } = await run(process.execPath, [vite, 'build', '--logLevel', 'warn'], {
      quiet: true,
    });
    if (status !== 0) throw new StepError('The client does not build: see the messages above.');
  },
};

/** @type {Build} */
export const serverBuild = {
  name: 'server',
  sources: ['server', 'shared', 'package-lock.json', 'tsconfig.base.json'],
  result: 'dist/server/main.js',
  async make() {
    const esbuild = await import('esbuild');
    try {
      await esbuild.build({
        absWorkingDir: root,
        entryPoints: SERVER_ENTRIES,
        outbase: 'server',
        outdir: 'dist/server',
        bundle: true,
        packages: 'external',
        platform: 'node',
        format: 'esm',
        target: 'node20',
        sourcemap: true,
        logLevel: 'warning',
      });
    } catch (cause) {
      throw new StepError('The server does not build: see the messages above.', { cause });
    }
  },
};

/**
 * What tells one state of the sources from another: every path with its size and time of change.
 *
 * @param {string} folder the checkout
 * @param {string[]} sources
 * @returns {string}
 */
export function sourceStamp(folder, sources) {
  const hash = createHash('sha256');
  const visit = (/** @type {string} */ path) => {
    const full = join(folder, path);
    if (!existsSync(full)) return;
    const { mtimeMs, size } = statSync(full);
    if (!statSync(full).isDirectory()) hash.update(`${path}\0${size}\0${mtimeMs}\n`);
    else for (const name of readdirSync(full).sort()) visit(join(path, name));
  };
  sources.forEach(visit);
  return hash.digest('hex');
}

/** @param {Build} build */
function stampFile({ name }) {
  return join(root, 'dist', `${name}.stamp`);
}

/**
 * @param {Build} build
 * @returns {boolean} whether the sources changed since it was built
 */
export function isStale(build) {
  const stamp = stampFile(build);
  if (!existsSync(stamp) || !existsSync(join(root, build.result))) return true;
  return readFileSync(stamp, 'utf8') !== sourceStamp(root, build.sources);
}

/**
 * Builds. The stamp goes first and comes back last, so that an interrupted build counts as stale.
 *
 * @param {Build} build
 * @throws {StepError}
 */
export async function makeBuild(build) {
  const stamp = sourceStamp(root, build.sources);
  rmSync(stampFile(build), { force: true });
  await build.make();
  mkdirSync(join(root, 'dist'), { recursive: true });
  writeFileSync(stampFile(build), stamp);
}
