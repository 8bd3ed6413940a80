import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { clientBuild, isStale, makeBuild, serverBuild } from './builds.mjs';
import { provideChromium } from './chromium.mjs';
import { root } from './folders.mjs';
import { providePostgres } from './postgres.mjs';
import { run } from './processes.mjs';

/**
 * What came of a stage. `passed` and `failed` count tests; stages that look at files have none.
 * @typedef {{ ok: boolean, count: string, passed?: number, failed?: number }} Outcome
 */

/**
 * The parts that are compiled apart, since each may use other things of its surroundings.
 */
const PARTS = ['shared', 'server', 'src', 'scripts', 'tests'];

/**
 * Runs a program of an installed package.
 *
 * @param {string} program path in node_modules
 * @param {string[]} args
 * @param {{ env?: NodeJS.ProcessEnv, quiet?: boolean }} [options]
 */
function runPackage(program, args, options) {
  return run(process.execPath, [join(root, 'node_modules', program), ...args], options);
}

/**
 * Runs a program that leaves a JSON report, and reads that.
 *
 * @template T
 * @param {(file: string) => Promise<{ status: number }>} work writes its report to the file
 * @returns {Promise<{ status: number, report: T | undefined }>} no report: it ended before it had one
 */
async function withReport(work) {
  const folder = mkdtempSync(join(tmpdir(), 'ringstead-report-'));
  const file = join(folder, 'report.json');
  try {
    const { status } = await work(file);
    return { status, report: readReport(file) };
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** @param {string} file */
function readReport(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return undefined;
  }
}

/** @returns {Promise<Outcome>} */
async function format() {
  const listed = await run('git', ['ls-files', '-co', '--exclude-standard', '--deduplicate'], {
    quiet: true,
  });
  const files = listed.output.split('\n').filter(Boolean);
  const args = ['--check', '--ignore-unknown', '--no-error-on-unmatched-pattern', ...files];
  const { status } = await runPackage('prettier/bin/prettier.cjs', args, { quiet: true });
  return { ok: status === 0, count: `${files.length} files` };
}

/** @returns {Promise<Outcome>} */
async function lint() {
  /** @typedef {{ filePath: string, messages: { line: number, column: number, message: string, ruleId: string | null }[] }} Linted */
  const args = ['.', '--max-warnings', '0', '--format', 'json', '--output-file'];
  const { status, report } = await withReport((file) =>
    runPackage('eslint/bin/eslint.js', [...args, file], { quiet: true }),
  );
  /** @type {Linted[]} */
  const files = report ?? [];
  for (const { filePath, messages } of files) {
    for (const { line, column, message, ruleId } of messages) {
      console.log(`${filePath}:${line}:${column} ${message} (${ruleId ?? 'syntax'})`);
    }
  }
  return { ok: status === 0, count: `${files.length} files` };
}

/** @returns {Promise<Outcome>} */
async function types() {
  let ok = true;
  const left = [...PARTS];
  const worker = async () => {
    for (let part = left.shift(); part !== undefined; part = left.shift()) {
      const args = ['-p', `${part}/tsconfig.json`, '--noEmit'];
      const { status } = await runPackage('typescript/bin/tsc', args, { quiet: true });
      if (status !== 0) ok = false;
    }
  };
  await Promise.all([worker(), worker()]);
  return { ok, count: `${PARTS.length} parts` };
}

/** @returns {Promise<Outcome>} */
async function dependencies() {
  const args = [...PARTS, 'migrations', 'seeders', '--config', '.dependency-cruiser.cjs'];
  const { status, output } = await runPackage(
    'dependency-cruiser/bin/dependency-cruise.mjs',
    args,
    { quiet: true },
  );
  const modules = /(\d+) modules/.exec(output)?.[1] ?? 'no';
  return { ok: status === 0, count: `${modules} modules` };
}

/**
 * @param {'unit' | 'api' | 'client'} project of vitest.config.ts
 * @returns {Promise<Outcome>}
 */
async function vitest(project) {
  const { status, report } = await withReport((file) =>
    runPackage('vitest/vitest.mjs', [
      ...['run', '--project', project],
      ...['--reporter=dot', '--reporter=json', `--outputFile.json=${file}`],
    ]),
  );
  const passed = report?.numPassedTests ?? 0;
  const failed = report?.numFailedTests ?? 0;
  return { ok: status === 0 && failed === 0, count: `${passed + failed} tests`, passed, failed };
}

/** @returns {Promise<Outcome>} */
async function api() {
  await providePostgres();
  return vitest('api');
}

/** @returns {Promise<Outcome>} */
async function build() {
  const builds = [clientBuild, serverBuild];
  for (const each of builds) await makeBuild(each);
  return { ok: true, count: `${builds.length} builds` };
}

/** @returns {Promise<Outcome>} */
async function e2e() {
  await providePostgres();
  const chromium = await provideChromium();
  for (const each of [clientBuild, serverBuild]) if (isStale(each)) await makeBuild(each);
  const { status, report } = await withReport((file) =>
    runPackage('@playwright/test/cli.js', ['test', '--reporter=list,json'], {
      env: { ...process.env, CHROMIUM_PATH: chromium, PLAYWRIGHT_JSON_OUTPUT_FILE: file },
    }),
  );
  const passed = report?.stats.expected ?? 0;
  const failed = (report?.stats.unexpected ?? 0) + (report?.stats.flaky ?? 0);
  return { ok: status === 0 && failed === 0, count: `${passed + failed} tests`, passed, failed };
}

/**
 * Every stage, in the order they run in: what fails fast comes first.
 *
 * @type {Record<string, () => Promise<Outcome>>}
 */
export const stages = {
  format,
  lint,
  types,
  dependencies,
  unit: () => vitest('unit'),
  api,
  client: () => vitest('client'),
  build,
  e2e,
};
