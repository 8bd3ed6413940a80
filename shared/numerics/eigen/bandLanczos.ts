import { denseEigen, type DenseEigen } from './denseEigen.ts';
import { fillRandom } from './fillRandom.ts';
import { OrthonormalSet } from './OrthonormalSet.ts';
import type { ShiftedPencil } from './ShiftedPencil.ts';

/** Approximate eigenpairs of A = (K − σM)⁻¹ M out of a Krylov space of dimension m. */
export interface RitzPairs {
  readonly basis: OrthonormalSet;
  /** θ descending and coordinates in the basis. */
  readonly eigen: DenseEigen;
  /** m: residual norms ‖A y − θ y‖_M, which bound the error of θ. */
  readonly residual: Float64Array;
  /** The space is invariant: these are eigenvalues, and nothing else can be reached from it. */
  readonly invariant: boolean;
  readonly stopped: boolean;
}

export interface LanczosSettings {
  /** Vectors that start the space; an eigenvalue of multiplicity up to this is found whole. */
  readonly block: number;
  /** Largest dimension of the space. */
  readonly maxDimension: number;
  /** Dimension at which Ritz values are looked at first. */
  readonly firstCheck: number;
  /** Tells whether they are good enough. */
  readonly accept: (theta: Float64Array, residual: Float64Array) => boolean;
  readonly shouldStop: () => boolean;
}

/**
 * Band Lanczos with full reorthogonalisation in M:  A V_m = V_m T_m + V_{m+1…m+b} C,  Vᵀ M V = I.
 *   pencil   the operator A and M
 *   locked   known eigenvectors; the space stays M-orthogonal to them
 *   random   state of the start vectors, 1 word, overwritten
 * Residual norms are judged on T and C alone: ‖A y − θ y‖_M = ‖C s‖ for y = V_m s.
 * Returns null when nothing with a finite eigenvalue is left outside `locked`.
 * Source: Ericsson and Ruhe 1980, The spectral transformation Lanczos method, Math. Comp. 35,
 * 1251–1268; Ruhe 1979, Implementation aspects of band Lanczos algorithms, Math. Comp. 33,
 * 680–687; Grimes, Lewis and Simon 1994, SIAM J. Matrix Anal. Appl. 15(1), 228–272.
 */
export function bandLanczos(
  pencil: ShiftedPencil,
  locked: OrthonormalSet,
  random: Uint32Array,
  settings: LanczosSettings,
): RitzPairs | null {
  const { n } = pencil;
  const { block, maxDimension, accept, shouldStop } = settings;
  const basis = new OrthonormalSet(pencil.M);
  for (let b = 0; b < block; b++) {
    const v = startVector(pencil, locked, random);
    if (v === null) break;
    basis.add(v, locked);
  }
  if (basis.count === 0) return null;

  // Row j of T holds the products with A v_j; the part beyond column m is C.
  const stride = maxDimension + block + 1;
  const T = new Float64Array(maxDimension * stride);
  const column = new Float64Array(stride);
  let nextCheck = settings.firstCheck;
  for (let j = 0; ; j++) {
    const w = new Float64Array(n);
    pencil.apply(basis.images[j]!, w);
    column.fill(0);
    // T is a band: w has large components in the last 2b + 1 vectors, rounding in the others.
    const beta = basis.add(w, locked, Math.min(basis.count, 2 * block + 1), column);
    if (beta > 0) column[basis.count - 1] = beta;
    for (let i = 0; i < basis.count; i++) {
      T[j * stride + i] = column[i]!;
      // Symmetric but for rounding: the later product stands for both.
      if (i < j) T[i * stride + j] = column[i]!;
    }
    const m = j + 1;
    const invariant = basis.count === m;
    const stopped = shouldStop();
    if (m < nextCheck && m < maxDimension && !invariant && !stopped) continue;
    // Solving for T costs m³: looked at less often as it grows.
    nextCheck = m + Math.max(3, m < 100 ? m >> 3 : m >> 2);
    const eigen = denseEigen(T, stride, m);
    const residual = residuals(T, stride, m, basis.count, eigen);
    if (invariant || stopped || m === maxDimension || accept(eigen.values, residual)) {
      return { basis, eigen, residual, invariant, stopped };
    }
  }
}

/**
 * A random vector in the range of A, where eigenvectors with finite λ lie even if M is singular.
 * Known eigenvectors are taken out first: A would make them drown the rest.
 */
function startVector(
  pencil: ShiftedPencil,
  locked: OrthonormalSet,
  random: Uint32Array,
): Float64Array | null {
  const start = new Float64Array(pencil.n);
  fillRandom(start, random);
  const fresh = new OrthonormalSet(pencil.M);
  if (fresh.add(start, locked) === 0) return null;
  const v = new Float64Array(pencil.n);
  pencil.apply(fresh.images[0]!, v);
  return v;
}

/** ‖C s_j‖ for each eigenvector s_j of T; C is what stands beyond column m in the last rows. */
function residuals(
  T: Float64Array,
  stride: number,
  m: number,
  count: number,
  eigen: DenseEigen,
): Float64Array {
  const result = new Float64Array(m);
  for (let r = 0; r < m; r++) {
    let square = 0;
    for (let c = m; c < count; c++) {
      let sum = 0;
      for (let i = 0; i < m; i++) sum += T[i * stride + c]! * eigen.vectors[r * m + i]!;
      square += sum * sum;
    }
    result[r] = Math.sqrt(square);
  }
  return result;
}
