import { parseArgs } from 'node:util';
import { solveBrackets } from '#shared/analysis/solveBrackets.ts';
import { solveFrame } from '#shared/analysis/solveFrame.ts';
import type { SolveRequest } from '#shared/analysis/solveFrame.ts';
import { coldSolve } from './coldSolve.ts';
import { dragging } from './dragging.ts';
import { documentOf, frameNamed, FRAMES, MESH_FREE_RACK, MODE_COUNTS } from './frames.ts';
import type { BenchFrame } from './frames.ts';
import { comparedTime, medianSolve } from './measureSolve.ts';
import { operations } from './operations.ts';
import { productPress } from './productPress.ts';
import {
  growthLines,
  largestDifference,
  load,
  machineLine,
  scipyTable,
  stageTable,
} from './report.ts';
import type { BenchRow } from './report.ts';
import { scriptSolve } from './scriptSolve.ts';
import { scipyTimes, scipyVersions } from './scipy.ts';

/**
 * `npm run bench`: how long solves take on this machine, on one thread, and beside SciPy where python3 has
 * it. Measured here, never asserted in tests. Writes Markdown to stdout and its progress to stderr.
 *   -- --quick         only 3k and 12k
 *   -- --size 12000    only frames of that size
 *   -- --runs 9        timed runs of each, of which the median counts
 *   -- --product URL   only a press of Solve on a running product with the demo in it
 * Ends with code 1 where our frequencies differ from SciPy's.
 */
const QUICK = [3_000, 12_000];
/** Plain `eigsh` takes minutes beyond. */
const LARGEST_PLAIN = 12_000;
/** Relative difference of a frequency: two right answers agree to this. */
const SAME = 1e-8;

/** The frame that is dragged. */
const DRAGGED = 'rack 12k';

interface Choice {
  readonly product: string | null;
  readonly frames: readonly BenchFrame[];
  readonly runs: number | null;
}

function readChoice(): Choice {
  const { values } = parseArgs({
    options: {
      quick: { type: 'boolean' },
      size: { type: 'string' },
      runs: { type: 'string' },
      product: { type: 'string' },
    },
  });
  const runs = values.runs === undefined ? null : Number(values.runs);
  if (runs !== null && !(Number.isInteger(runs) && runs >= 1)) {
    throw new RangeError('--runs must be a whole number from 1.');
  }
  const sizes = [...new Set(FRAMES.map(({ size }) => size))];
  const wanted =
    values.size === undefined ? (values.quick === true ? QUICK : sizes) : [Number(values.size)];
  const frames = FRAMES.filter(({ size }) => wanted.includes(size));
  if (frames.length === 0) throw new RangeError(`--size must be one of ${sizes.join(', ')}.`);
  return { product: values.product ?? null, frames, runs };
}

function measure(frame: BenchFrame, runs: number, withScipy: boolean): BenchRow[] {
  const document = documentOf(frame);
  return frame.massKinds.flatMap((massKind) => {
    console.error(`${frame.name}, ${massKind}`);
    const plain = massKind === 'consistent' && frame.size <= LARGEST_PLAIN;
    const scipy = withScipy ? scipyTimes(document, massKind, MODE_COUNTS, runs, plain) : [];
    return MODE_COUNTS.map((modes) => ({
      frame,
      massKind,
      modes,
      warm: medianSolve(document, massKind, modes, runs, comparedTime),
      cold: coldSolve(frame.name, massKind, modes),
      script: scriptSolve(frame.name, massKind, modes, runs),
      operations: operations(document, massKind),
      scipy: scipy.find((times) => times.modes === modes) ?? null,
    }));
  });
}

function meshFreeLine(runs: number): string {
  console.error('mesh-free');
  const document = documentOf(MESH_FREE_RACK);
  const [modes] = MODE_COUNTS;
  const solved = medianSolve(document, 'mesh-free', modes, runs, ({ total }) => total);
  return (
    `Mesh-free, ${document.members.length} members, ${modes} modes: ` +
    `${solved.timing.total.toFixed(0)} ms, ${solved.complete ? 'certified' : 'not certified'}.`
  );
}

/** Soft, expected and stiff supports in one call, over one solve. */
function bracketsLine(runs: number): string {
  console.error('three brackets');
  const frame = frameNamed('rack 3k');
  const document = documentOf(frame);
  const [modes] = MODE_COUNTS;
  const request: SolveRequest = {
    document,
    method: 'consistent',
    stateId: null,
    settings: { modes },
  };
  const time = (work: () => unknown): number => {
    const times = Array.from({ length: runs + 2 }, () => {
      const began = performance.now();
      work();
      return performance.now() - began;
    });
    const counted = times.slice(2).toSorted((a, b) => a - b);
    return counted[Math.floor(runs / 2)]!;
  };
  const one = time(() => solveFrame(request));
  const three = time(() => solveBrackets(request));
  return (
    `Three brackets of the supports, ${frame.name}, ${modes} modes: ${three.toFixed(0)} ms, ` +
    `${(three / one).toFixed(1)} times one solve.`
  );
}

function draggingLine(): string {
  console.error('dragging');
  const [modes] = MODE_COUNTS;
  const { assemble, solve } = dragging(DRAGGED, modes);
  return (
    `A step of dragging a node, ${DRAGGED}, ${modes} modes: ${solve.toFixed(1)} ms besides ` +
    `${assemble.toFixed(1)} ms of assembly.`
  );
}

async function main(): Promise<void> {
  const { product, frames, runs } = readChoice();
  if (product !== null) {
    const { first, last, members } = await productPress(product);
    console.log(
      `- From the press of Solve, ${members} members: ${first.toFixed(0)} ms to the first result stored, ` +
        `${last.toFixed(0)} ms to both mass kinds.`,
    );
    return;
  }
  const scipy = scipyVersions();
  const loadBefore = load();
  const rows = frames.flatMap((frame) => measure(frame, runs ?? frame.runs, scipy !== null));
  const meshFree = meshFreeLine(runs ?? 5);
  const brackets = bracketsLine(runs ?? 5);
  const drag = draggingLine();

  console.log(
    `${machineLine(scipy)}. Milliseconds, one thread, median of warm runs; system load ${loadBefore} before, ${load()} after.\n`,
  );
  console.log(`${stageTable(rows)}\n`);
  if (scipy !== null) console.log(`${scipyTable(rows)}\n`);
  for (const line of [...growthLines(rows), meshFree, brackets, drag]) console.log(`- ${line}`);

  for (const row of rows.filter((candidate) => largestDifference(candidate) > SAME)) {
    console.error(
      `${row.frame.name}, ${row.massKind}, ${row.modes} modes: frequencies differ from SciPy's by ` +
        `${largestDifference(row).toExponential(1)}; its ratio says nothing.`,
    );
    process.exitCode = 1;
  }
}

await main();
