import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import { fillRandom } from '../../numerics/eigen/fillRandom.ts';
import { analyse } from '../../numerics/factor/analyse.ts';
import { factorise } from '../../numerics/factor/factorise.ts';
import { solveLdlt } from '../../numerics/factor/solve.ts';
import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';
import type { DividedPart, FrameModel, Tie } from '../assembly/FrameModel.ts';
import { SymmetricTriplets } from '../assembly/SymmetricTriplets.ts';
import { barStiffness } from '../elements/bar.ts';
import { beamDeformations, beamStiffness } from '../elements/beamStiffness.ts';
import { displacements } from './Combination.ts';

/** Vectors iterated together. */
const BLOCK = 6;
/** Inverse iterations per block: each divides what is stiff by its eigenvalue over the shift. */
const ITERATIONS = 4;
/** Keeps the singular matrix factorisable, relative to its unit diagonal: far above rounding, far below frames. */
const SHIFT = 1e-11;
/**
 * Deformation of a unit motion under which it has none. Rounding leaves about 1e-15; the softest motion
 * of a line of 20,000 members deforms by about 1e-9.
 */
const STIFFNESS_FREE = 1e-11;
/** More independent motions are not looked for: naming so many already says where to begin. */
const MOST = 48;
/**
 * Part of a vector outside a basis under which it is dropped as rounding. Small, for one solve turns every
 * vector towards a motion without stiffness by the inverse of the shift; the little left over is the next start.
 */
const DEPENDENT = 1e-14;

/**
 * Motions of a frame that deform nothing, beyond the known ones, over the model's free unknowns.
 *   model  best with one element per member: dividing adds no such motion
 *   known  rigid motions; every result is orthogonal to them in the scaling below
 * Every deformation counts alike whatever stiffness resists it (extensions, and length × rotations, of members;
 * stretches of joints, supports and springs; all in metres), so that a support 1e-9 as stiff as its neighbours
 * is not taken for none. With G the deformations over unknowns scaled to (GᵀG)ᵢᵢ = 1: inverse iteration on
 * GᵀG + 1e-11 I, then a singular value decomposition of G X (Golub and Van Loan, Matrix Computations,
 * 4th ed., §8.6), whose small values GᵀG itself would lose.
 */
export function stiffnessFreeMotions(
  model: FrameModel,
  known: readonly Float64Array[],
): Float64Array[] {
  const n = model.free;
  if (n === 0) return [];
  const { A, scale } = scaledDeformations(model);
  const ldlt = factorise(analyse(A), A, null, 0);
  const basis: Float64Array[] = [];
  orthonormalise(
    known.map((x) => x.map((value, i) => value / scale[i]!)),
    basis,
  );
  const state = Uint32Array.of(1852);
  const found: Float64Array[] = [];
  while (found.length < MOST && basis.length < n) {
    let block: Float64Array[] = Array.from({ length: Math.min(BLOCK, n - basis.length) }, () => {
      const y = new Float64Array(n);
      fillRandom(y, state);
      return y;
    });
    block = orthonormalise(block, [...basis]);
    for (let step = 0; step < ITERATIONS; step++) {
      for (const y of block) solveLdlt(ldlt, y);
      block = orthonormalise(block, [...basis]);
    }
    const free = undeformed(model, block, scale);
    found.push(...free);
    orthonormalise(free, basis);
    if (free.length < block.length) break;
  }
  return found.map((y) => y.map((value, i) => value * scale[i]!));
}

/** GᵀG over scaled unknowns with the shift on its diagonal, and the scaling: x = scale · y. */
function scaledDeformations(model: FrameModel): { A: SymmetricCsc; scale: Float64Array } {
  const triplets = new SymmetricTriplets([...model.segments, ...model.ties]);
  const matrixOf = new Map(model.parts.map((part) => [part.index, unitStiffness(part)]));
  for (const { part, motion } of model.segments) triplets.add(motion, matrixOf.get(part.index)!);
  for (const tie of model.ties) {
    const weight = tieWeight(tie, model.scale);
    triplets.add(tie.motion, Float64Array.of(weight * weight));
  }
  const A = triplets.assemble(model.free);
  const scale = new Float64Array(A.n);
  for (let j = 0; j < A.n; j++) {
    const diagonal = A.values[A.colPtr[j]!]!;
    scale[j] = diagonal > 0 ? 1 / Math.sqrt(diagonal) : 1;
  }
  const values = A.values.slice();
  for (let j = 0; j < A.n; j++) {
    for (let p = A.colPtr[j]!; p < A.colPtr[j + 1]!; p++) {
      values[p]! *= scale[j]! * scale[A.rowIdx[p]!]!;
    }
    values[A.colPtr[j]!]! += SHIFT;
  }
  return { A: { ...A, values }, scale };
}

/** Element matrix that weighs every deformation alike, rotations by the length. */
function unitStiffness({ member, segmentLength: length }: DividedPart): Float64Array {
  if (member.kind === 'bar') return barStiffness(1);
  const square = length * length;
  const tensor = { vv: square, vw: 0, ww: square };
  return beamStiffness({ axial: 1, torsion: square, bending: tensor, sway: tensor }, length);
}

function tieWeight({ turns }: Tie, length: number): number {
  return turns ? length : 1;
}

/** All deformations of one motion, in metres. */
function deformations(model: FrameModel, x: Float64Array): number[] {
  const d = new Float64Array(12);
  const g = new Float64Array(6);
  const all: number[] = [];
  for (const { part, motion } of model.segments) {
    displacements(motion, x, d);
    if (part.member.kind === 'bar') {
      all.push(d[3]! - d[0]!);
    } else {
      beamDeformations(d, part.segmentLength, g);
      for (let i = 0; i < 6; i++) all.push(i === 0 ? g[i]! : part.segmentLength * g[i]!);
    }
  }
  for (const tie of model.ties) {
    displacements(tie.motion, x, d);
    all.push(tieWeight(tie, model.scale) * d[0]!);
  }
  return all;
}

/** Orthonormal motions in the span of the orthonormal block that deform nothing. */
function undeformed(
  model: FrameModel,
  block: readonly Float64Array[],
  scale: Float64Array,
): Float64Array[] {
  const columns = block.map((y) => {
    return deformations(
      model,
      y.map((value, i) => value * scale[i]!),
    );
  });
  // Rows of zeros keep a frame with fewer deformations than vectors from losing some of them.
  const rows = Math.max(columns[0]?.length ?? 0, block.length);
  const G = Matrix.zeros(rows, block.length);
  columns.forEach((column, j) => {
    column.forEach((value, i) => G.set(i, j, value));
  });
  const { diagonal, rightSingularVectors: V } = new SingularValueDecomposition(G, {
    computeLeftSingularVectors: false,
  });
  return diagonal.flatMap((sigma, k) => {
    if (sigma > STIFFNESS_FREE) return [];
    const y = new Float64Array(scale.length);
    block.forEach((vector, j) => {
      const share = V.get(j, k);
      for (let i = 0; i < y.length; i++) y[i]! += share * vector[i]!;
    });
    return [y];
  });
}

/**
 * Modified Gram-Schmidt, twice: `vectors` become orthonormal to each other and to `basis`, which takes them in. One
 * that depends on the others is dropped. Returns those kept.
 */
function orthonormalise(vectors: readonly Float64Array[], basis: Float64Array[]): Float64Array[] {
  const kept: Float64Array[] = [];
  for (const given of vectors) {
    const y = given.slice();
    const before = length(y);
    for (let pass = 0; pass < 2; pass++) {
      for (const q of basis) {
        let share = 0;
        for (let i = 0; i < y.length; i++) share += y[i]! * q[i]!;
        for (let i = 0; i < y.length; i++) y[i]! -= share * q[i]!;
      }
    }
    const left = length(y);
    if (!(left > DEPENDENT * before)) continue;
    for (let i = 0; i < y.length; i++) y[i]! /= left;
    basis.push(y);
    kept.push(y);
  }
  return kept;
}

function length(y: Float64Array): number {
  let square = 0;
  for (const value of y) square += value * value;
  return Math.sqrt(square);
}
