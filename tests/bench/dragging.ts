import { LiveFrame } from '#shared/analysis/LiveFrame.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { documentOf, frameNamed } from './frames.ts';

const STEPS = 60;
/** Steps before those that count: the engine compiles what runs often. */
const WARM_UP = 20;

/** One node of a rack dragged step by step, each time with the modes of the step before: medians of a step [ms]. */
export function dragging(name: string, modes: number): { assemble: number; solve: number } {
  const live = new LiveFrame({
    massKind: 'consistent',
    stateId: null,
    modes,
    now: () => performance.now(),
  });
  let document = documentOf(frameNamed(name));
  live.solve(document);
  const timings = Array.from({ length: STEPS }, () => {
    document = dragged(document);
    return live.follow(document).timing;
  }).slice(WARM_UP);
  const median = (values: number[]): number => values.sort((a, b) => a - b)[values.length >> 1]!;
  return {
    assemble: median(timings.map(({ assemble }) => assemble)),
    solve: median(timings.map(({ solve }) => solve)),
  };
}

/** The node in the middle of the list a little farther on. */
function dragged(document: FrameDocument): FrameDocument {
  const middle = document.nodes.length >> 1;
  return {
    ...document,
    nodes: document.nodes.map((node, i) =>
      i === middle ? { ...node, x: node.x + 0.002, z: node.z + 0.003 } : node,
    ),
  };
}
