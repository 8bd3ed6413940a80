import { checkDocument } from '#shared/frame/checkDocument.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { aRack } from '#tests/builders/aFrame.ts';

/**
 * A frame of the benchmark. Racks have `bays` × `bays` bays of 1 m by 0.7 m and storeys of 1.2 m; a tower is one bay
 * wide, and square: its modes come in pairs.
 */
export interface BenchFrame {
  readonly name: string;
  /** Free unknowns in round figures: what `--size` asks for. */
  readonly size: number;
  readonly bays: number;
  readonly storeys: number;
  readonly square?: boolean;
  readonly massKinds: readonly MassKind[];
  /** Timed runs, of which the median counts, where the command line names no number. */
  readonly runs: number;
}

export type MassKind = 'consistent' | 'lumped';

/** Numbers of modes that every frame is solved for. */
export const MODE_COUNTS = [12, 24] as const;

/** 4 elements a member: 6 unknowns per joint above the ground and 18 per member. */
export const FRAMES: readonly BenchFrame[] = [
  { name: 'rack 600', size: 600, bays: 1, storeys: 4, massKinds: ['consistent'], runs: 5 },
  {
    name: 'rack 3k',
    size: 3_000,
    bays: 3,
    storeys: 4,
    massKinds: ['consistent', 'lumped'],
    runs: 5,
  },
  {
    name: 'rack 12k',
    size: 12_000,
    bays: 5,
    storeys: 6,
    massKinds: ['consistent', 'lumped'],
    runs: 5,
  },
  {
    name: 'tower 12k',
    size: 12_000,
    bays: 1,
    storeys: 72,
    square: true,
    massKinds: ['consistent'],
    runs: 5,
  },
  { name: 'rack 30k', size: 30_000, bays: 8, storeys: 7, massKinds: ['consistent'], runs: 5 },
  { name: 'rack 100k', size: 100_000, bays: 10, storeys: 15, massKinds: ['consistent'], runs: 3 },
];

/** About 500 members, for the mesh-free method, which needs no elements. */
export const MESH_FREE_RACK = { bays: 4, storeys: 8 } as const;

/** About 300 members, for a press of Solve on the running product. */
export const PRESS_RACK = { bays: 3, storeys: 8 } as const;

/** The frame's document as the product stores it: Bernoulli members, 4 elements each. */
export function documentOf(frame: {
  bays: number;
  storeys: number;
  square?: boolean;
}): FrameDocument {
  const { bays, storeys, square = false } = frame;
  const input = aRack({ bays, storeys, storey: 1.2, divisions: 4, theory: 'bernoulli' });
  if (!square) for (const node of input.nodes) node.y = 0.7 * (node.y ?? 0);
  const { document, errors } = checkDocument(input);
  if (document === null) {
    throw new Error(`A frame of the benchmark is refused: ${errors[0]?.message ?? 'no reason'}`);
  }
  return document;
}

/** Throws RangeError where there is no frame of that name. */
export function frameNamed(name: string | undefined): BenchFrame {
  const frame = FRAMES.find((candidate) => candidate.name === name);
  if (frame === undefined) throw new RangeError(`No frame of the benchmark is called ${name}.`);
  return frame;
}
