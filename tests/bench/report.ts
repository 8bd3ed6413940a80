import { cpus, loadavg, totalmem } from 'node:os';
import type { SolveSummary } from '#shared/schemas/solveResult.ts';
import type { ColdSolve } from './coldSolve.ts';
import type { BenchFrame, MassKind } from './frames.ts';
import { comparedTime } from './measureSolve.ts';
import type { Timing } from './measureSolve.ts';
import type { ScipyTimes } from './scipy.ts';

/** One frame, mass kind and number of modes. */
export interface BenchRow {
  readonly frame: BenchFrame;
  readonly massKind: MassKind;
  readonly modes: number;
  readonly warm: SolveSummary;
  readonly cold: ColdSolve;
  /** Compared stages with the JavaScript kernels [ms]. */
  readonly script: number;
  /** Of one factorisation. */
  readonly operations: number;
  /** Null where SciPy is not installed. */
  readonly scipy: ScipyTimes | null;
}

const STAGES = [
  'assemble',
  'order',
  'symbolic',
  'factor',
  'iterate',
  'finish',
  'certify',
  'total',
] as const;

/** Growth and the share of assembly are judged from here up: below, fixed costs rule. */
const LARGE = 3_000;

export function machineLine(scipy: string | null): string {
  const processors = cpus();
  return (
    `${processors[0]?.model.trim() ?? 'Unknown processor'}, ${processors.length} cores, ` +
    `${(totalmem() / 2 ** 30).toFixed(0)} GiB; Node ${process.versions.node}; ` +
    (scipy ?? 'SciPy is not installed for python3, so nothing is compared')
  );
}

export function stageTable(rows: readonly BenchRow[]): string {
  return markdownTable(
    ['frame', 'unknowns', 'mass', 'modes', ...STAGES, 'GFLOP/s', 'cold', 'peak MiB', 'complete'],
    rows.map(({ frame, massKind, modes, warm, cold, operations }) => [
      frame.name,
      String(warm.freeDof),
      massKind,
      String(modes),
      ...STAGES.map((stage) => milliseconds(warm.timing[stage])),
      (operations / warm.timing.factor / 1e6).toFixed(1),
      milliseconds(cold.totalMs),
      (cold.peakBytes / 2 ** 20).toFixed(0),
      warm.complete ? 'yes' : 'no',
    ]),
  );
}

export function scipyTable(rows: readonly BenchRow[]): string {
  return markdownTable(
    [
      'frame',
      'unknowns',
      'mass',
      'modes',
      'ours',
      'SciPy best',
      'its factor',
      'its iteration',
      'ncv, tol',
      'plain eigsh',
      'ratio',
      'JavaScript',
      'its ratio',
      'largest difference',
    ],
    rows.flatMap((row) => {
      const { frame, massKind, modes, warm, scipy } = row;
      if (scipy === null) return [];
      const ours = comparedTime(warm.timing);
      return [
        [
          frame.name,
          String(warm.freeDof),
          massKind,
          String(modes),
          milliseconds(ours),
          milliseconds(scipy.totalMs),
          milliseconds(scipy.factorMs),
          milliseconds(scipy.iterateMs),
          `${scipy.ncv}, ${scipy.tol}`,
          scipy.plainMs === null ? '' : milliseconds(scipy.plainMs),
          (scipy.totalMs / ours).toFixed(1),
          milliseconds(row.script),
          (scipy.totalMs / row.script).toFixed(1),
          largestDifference(row).toExponential(1),
        ],
      ];
    }),
  );
}

/** Largest relative difference of a frequency from SciPy's; 0 without SciPy, Infinity where one is missing. */
export function largestDifference({ warm, scipy }: BenchRow): number {
  if (scipy === null) return 0;
  if (scipy.lambda.length !== warm.modes.length) return Infinity;
  return Math.max(
    ...warm.modes.map(({ frequencyHz }, i) =>
      Math.abs(frequencyHz / (Math.sqrt(scipy.lambda[i]!) / (2 * Math.PI)) - 1),
    ),
  );
}

/** Load average of the last minute. Where others work at the same time, before the run it is well above 0. */
export function load(): string {
  return loadavg()[0]!.toFixed(1);
}

/** How time grows with the unknowns of the racks, and the share of assembly, in sentences. */
export function growthLines(rows: readonly BenchRow[]): string[] {
  const racks = rows.filter(
    ({ frame, massKind }) => frame.bays > 1 && frame.size >= LARGE && massKind === 'consistent',
  );
  const lines = [...new Set(racks.map(({ modes }) => modes))].flatMap((modes) => {
    const points = racks.filter((row) => row.modes === modes);
    if (points.length < 3) return [];
    const power = (time: (row: BenchRow) => number): string =>
      exponent(points.map((row) => [row.warm.freeDof, time(row)])).toFixed(2);
    const stage = (name: keyof Timing): string =>
      `${name} n^${power((row) => row.warm.timing[name])}`;
    const scipy = points.every((row) => row.scipy !== null)
      ? `; SciPy n^${power((row) => row.scipy!.totalMs)}`
      : '';
    return [
      `Growth over the racks from ${points[0]!.frame.name.slice(5)}, ${modes} modes: compared stages ` +
        `n^${power(({ warm }) => comparedTime(warm.timing))}, ` +
        `${(['factor', 'iterate', 'total'] as const).map(stage).join(', ')}${scipy}.`,
    ];
  });
  const large = rows.filter(({ frame }) => frame.size >= LARGE);
  if (large.length > 0) {
    const share = Math.max(...large.map(({ warm }) => warm.timing.assemble / warm.timing.total));
    lines.push(`Assembly takes at most ${(100 * share).toFixed(0)} % of the total from 3k up.`);
  }
  return lines;
}

/** p of t ∝ n^p: slope of the least-squares line through log t over log n. */
function exponent(points: readonly (readonly [n: number, t: number])[]): number {
  const x = points.map(([n]) => Math.log(n));
  const y = points.map(([, t]) => Math.log(t));
  const mean = (values: number[]): number => values.reduce((a, b) => a + b, 0) / values.length;
  const [mx, my] = [mean(x), mean(y)];
  const along = x.reduce((sum, xi, i) => sum + (xi - mx) * (y[i]! - my), 0);
  return along / x.reduce((sum, xi) => sum + (xi - mx) ** 2, 0);
}

/** Three figures at most, never more than a hundredth of a millisecond. */
function milliseconds(ms: number): string {
  return ms >= 100 ? ms.toFixed(0) : ms >= 10 ? ms.toFixed(1) : ms.toFixed(2);
}

function markdownTable(head: readonly string[], rows: readonly (readonly string[])[]): string {
  const line = (cells: readonly string[]): string => `| ${cells.join(' | ')} |`;
  return [line(head), line(head.map(() => '---')), ...rows.map(line)].join('\n');
}
