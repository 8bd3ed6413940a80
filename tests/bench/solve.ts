import { cpus, totalmem } from 'node:os';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import { solveFrame } from '#shared/analysis/solveFrame.ts';
import type { SolveSummary } from '#shared/schemas/solveResult.ts';
import { aRack } from '#tests/builders/aFrame.ts';

/**
 * `npm run bench`: how long solves take on this machine, on one thread, warm. Measured here, never asserted in
 * tests. `npm run bench -- 2` gives the median of two runs each instead of five.
 */
const RACKS = [
  { bays: 1, storeys: 3, divisions: 3 },
  { bays: 2, storeys: 5, divisions: 3 },
  { bays: 4, storeys: 5, divisions: 3 },
];
const MODES = 12;
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

function main(): void {
  const runs = Number(process.argv[2] ?? 5);
  const [processor] = cpus();
  console.log(
    `${processor?.model ?? 'unknown processor'}, ${cpus().length} cores, ` +
      `${(totalmem() / 2 ** 30).toFixed(0)} GiB, Node ${process.version}; ${MODES} modes, median of ${runs}, ms`,
  );
  console.log(['unknowns', 'members', 'mass kind', 'check', ...STAGES, 'complete'].join('\t'));
  for (const rack of RACKS) {
    for (const method of ['consistent', 'lumped'] as const) measure(rack, method, runs);
  }
}

function measure(
  rack: (typeof RACKS)[number],
  method: 'consistent' | 'lumped',
  runs: number,
): void {
  const input = aRack(rack);
  const started = performance.now();
  const { document } = checkDocument(input);
  const check = performance.now() - started;
  if (document === null) throw new Error('The rack of the benchmark is refused.');
  const summaries: SolveSummary[] = [];
  // The first run warms the compiler up and is not counted.
  for (let run = 0; run <= runs; run++) {
    const { summary } = solveFrame(
      { document, method, stateId: null, settings: { modes: MODES } },
      { now: () => performance.now() },
    );
    if (run > 0) summaries.push(summary);
  }
  const median = summaries.toSorted((a, b) => a.timing.total - b.timing.total)[
    Math.floor(summaries.length / 2)
  ];
  if (!median) throw new Error('Ask for at least one run.');
  console.log(
    [
      median.freeDof,
      input.members.length,
      method,
      check.toFixed(0),
      ...STAGES.map((stage) => median.timing[stage].toFixed(1)),
      median.complete ? 'yes' : 'no',
    ].join('\t'),
  );
}

main();
