import { munkres } from 'munkres';
import { commonPoints, extentOf, shapeVectors } from './comparablePoints.ts';
import { mac, macWithSpace } from './mac.ts';
import type { ModeShapes } from './shapesFile.ts';

/** Frequencies further apart than this, over their mean, are not the same mode whatever their shapes: common practice. */
const FREQUENCY_WINDOW = 0.3;
/** Neighbouring frequencies within this, relative, count as close: their shapes may be mixed at will. */
const CLOSE = 5e-3;
/** A pair with less in common is none. Common practice calls 0.7 acceptable; this only keeps unlike shapes apart. */
const LEAST_MAC = 0.5;
/** Cost of a pair that may not be: above that of any number of allowed ones. */
const FORBIDDEN = 1e6;
/** Among equal spaces the pair of more similar single shapes is preferred. */
const SINGLE_SHAPE_SHARE = 1e-3;

/** One solve as far as pairing needs it. */
export interface ComparableModes {
  readonly shapes: ModeShapes;
  /** Hz, one per mode of `shapes`, ascending. */
  readonly frequenciesHz: readonly number[];
}

export interface ModePair {
  /** 0-based mode of the first and of the second solve. */
  readonly a: number;
  readonly b: number;
  /** MAC, or where `subspace`, how much of one shape lies in the space of the other's close modes; 0 … 1. */
  readonly mac: number;
  readonly subspace: boolean;
}

export interface ModePairing {
  /** Ascending in `a`. */
  readonly pairs: readonly ModePair[];
  readonly unpairedA: readonly number[];
  readonly unpairedB: readonly number[];
}

/**
 * Pairs the modes of two solves by shape: the assignment with the largest sum of MAC (Kuhn 1955, Munkres
 * 1957) among pairs within ±30 % in frequency; each mode in one pair at most.
 * Shapes are compared at the points that both have (`commonPoints`). Modes closer than 0.5 % to a neighbour
 * are compared as spaces.
 */
export function pairModes(a: ComparableModes, b: ComparableModes): ModePairing {
  const points = commonPoints(a.shapes, b.shapes);
  const extent = Math.max(extentOf(a.shapes), extentOf(b.shapes));
  const vectorsA = shapeVectors(a.shapes, points.inA, extent);
  const vectorsB = shapeVectors(b.shapes, points.inB, extent);
  const closeA = closeModes(a.frequenciesHz);
  const closeB = closeModes(b.frequenciesHz);
  const candidates = vectorsA.map((vectorA, i) =>
    vectorsB.map((vectorB, j): Candidate | null => {
      if (!comparable(a.frequenciesHz[i]!, b.frequenciesHz[j]!)) return null;
      const single = mac(vectorA, vectorB);
      const subspace = closeA[i]!.length > 1 || closeB[j]!.length > 1;
      const value = subspace
        ? Math.max(
            macWithSpace(
              vectorA,
              closeB[j]!.map((k) => vectorsB[k]!),
            ),
            macWithSpace(
              vectorB,
              closeA[i]!.map((k) => vectorsA[k]!),
            ),
          )
        : single;
      if (value < LEAST_MAC) return null;
      const cost = 1 - value - SINGLE_SHAPE_SHARE * single;
      return { pair: { a: i, b: j, mac: value, subspace }, cost };
    }),
  );
  const pairs = assign(candidates);
  const without = (count: number, taken: ReadonlySet<number>) =>
    Array.from({ length: count }, (_, i) => i).filter((i) => !taken.has(i));
  return {
    pairs,
    unpairedA: without(vectorsA.length, new Set(pairs.map((pair) => pair.a))),
    unpairedB: without(vectorsB.length, new Set(pairs.map((pair) => pair.b))),
  };
}

interface Candidate {
  readonly pair: ModePair;
  readonly cost: number;
}

function assign(candidates: readonly (readonly (Candidate | null)[])[]): ModePair[] {
  if (candidates.length === 0 || candidates[0]!.length === 0) return [];
  const costs = candidates.map((row) => row.map((candidate) => candidate?.cost ?? FORBIDDEN));
  return munkres(costs)
    .flatMap(([i, j]) => candidates[i]![j]?.pair ?? [])
    .sort((p, q) => p.a - q.a);
}

/** Rigid-body modes, at 0 Hz, compare with each other only. */
function comparable(f: number, g: number): boolean {
  if (f === 0 || g === 0) return f === g;
  return Math.abs(f - g) <= (FREQUENCY_WINDOW * (f + g)) / 2;
}

/** For each mode, all modes of the run of close neighbours that it belongs to, itself included. */
function closeModes(frequenciesHz: readonly number[]): number[][] {
  const runs: number[][] = [];
  frequenciesHz.forEach((frequency, i) => {
    const last = runs.at(-1);
    if (last && frequency - frequenciesHz[i - 1]! <= CLOSE * frequency) last.push(i);
    else runs.push([i]);
  });
  return runs.flatMap((run) => run.map(() => run));
}
