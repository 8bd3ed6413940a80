import { factorise } from '../factor/factorise.ts';
import type { Ldlt } from '../factor/Ldlt.ts';
import type { SymbolicFactor } from '../factor/SymbolicFactor.ts';
import { ZeroPivotError } from '../factor/ZeroPivotError.ts';
import { multiplySymmetric, type SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { withoutZeros } from '../sparse/withoutZeros.ts';
import { bandLanczos, type RitzPairs } from './bandLanczos.ts';
import { clearGap } from './clearGap.ts';
import type { ModesOptions, ModesTiming } from './ModesResult.ts';
import { OrthonormalSet } from './OrthonormalSet.ts';
import { ritzVector } from './ritzVector.ts';
import { shiftBelow } from './shiftBelow.ts';
import { ShiftedPencil } from './ShiftedPencil.ts';

/**
 * Residual norm, relative to θ, at which a Ritz pair counts as converged: the error of λ is its
 * square over the gap, that of the shape falls by a further factor in the purification step.
 */
const CONVERGED_TOL = 1e-10;
/** The same for the neighbour beyond the wanted ones, which only places the gap (CLEAR_GAP). */
const NEIGHBOUR_TOL = 1e-4;
/** Dimension of one Krylov space: room for the wanted and their convergence, memory for the rest. */
const LEAST_DIMENSION = 100;
const MOST_DIMENSION = 1000;
/** Runs of the search and of the recovery; each that finds nothing makes the next one larger. */
const MOST_RUNS = 60;
const MOST_BARREN_RUNS = 3;
const LEAST_BLOCK = 4;
const MOST_BLOCK = 16;
/** Where in a clear gap the shift is tried, should a pivot vanish by accident. */
const GAP_SHARES = [0.5, 0.4, 0.6, 0.3];

/** The state of one search: factor at the working shift, eigenpairs found so far, clock. */
export class ModeSearch {
  /** M-orthonormal eigenvectors found, the null vectors first, and their λ (not sorted). */
  readonly modes: OrthonormalSet;
  readonly lambda: number[] = [];
  readonly rigid: number;
  readonly timing: ModesTiming;
  readonly random: Uint32Array;
  /** λ of the nearest eigenvalue beyond those found, roughly; null when not known. */
  next: number | null = null;
  /** Every finite eigenvalue has been found. */
  exhausted = false;
  stopped = false;

  readonly #K: SymmetricCsc;
  readonly #M: SymmetricCsc;
  /** M again, lean, for products. */
  readonly #mass: SymmetricCsc;
  readonly #options: ModesOptions;
  readonly #symbolic: SymbolicFactor;
  readonly #clock: () => number;
  #ldlt: Ldlt | undefined;
  #sigma: number | null = null;
  #progress = 0;

  constructor(
    K: SymmetricCsc,
    M: SymmetricCsc,
    options: ModesOptions,
    symbolic: SymbolicFactor,
    timing: ModesTiming,
  ) {
    this.#K = K;
    this.#M = M;
    this.#mass = withoutZeros(M);
    this.#options = options;
    this.#symbolic = symbolic;
    this.#clock = options.clock ?? (() => 0);
    this.timing = timing;
    this.random = Uint32Array.of((options.seed ^ 0x9e3779b9) >>> 0 || 1);
    this.modes = new OrthonormalSet(this.#mass);
    for (const motion of options.nullVectors ?? []) {
      if (this.modes.add(motion.slice(), null) > 0) this.lambda.push(0);
    }
    this.rigid = this.modes.count;
  }

  /** λ found, ascending, with the neighbour beyond at the end while there is one. */
  ascending(): Float64Array {
    const all = this.next === null ? this.lambda : [...this.lambda, this.next];
    return Float64Array.from(all).sort();
  }

  countBelow(sigma: number): number {
    let count = 0;
    for (const lambda of this.lambda) if (lambda < sigma) count += 1;
    return count;
  }

  /** Lowest modes one by one until a clear gap follows the first `wanted`, or none are left. */
  findLowest(wanted: number, floor: number): void {
    let barren = 0;
    for (let run = 0; run < MOST_RUNS && barren < MOST_BARREN_RUNS; run++) {
      if (clearGap(this.ascending(), wanted, floor) >= 0) return;
      const missing = Math.max(1, wanted + 1 - this.modes.count);
      const isEnough = (c: number, theta: Float64Array, residual: Float64Array) => {
        const lambda = [...this.lambda];
        for (let i = 0; i < c; i++) lambda.push(this.#lambdaOf(theta[i]!));
        if (c < theta.length && residual[c]! <= NEIGHBOUR_TOL * theta[c]!) {
          lambda.push(this.#lambdaOf(theta[c]!));
        }
        this.#report(Math.min(this.lambda.length + c, wanted) / (wanted + 1));
        return clearGap(Float64Array.from(lambda).sort(), wanted, floor) >= 0;
      };
      const found = this.#run(1, missing, barren, isEnough, Infinity);
      if (this.exhausted || this.stopped) return;
      barren = found === 0 ? barren + 1 : 0;
    }
  }

  /** Modes below `sigma` that a search with one start vector left out. True if all were found. */
  recover(missing: number, sigma: number): boolean {
    let left = missing;
    let barren = 0;
    let block = Math.min(Math.max(LEAST_BLOCK, missing), MOST_BLOCK);
    for (let run = 0; run < MOST_RUNS && barren < MOST_BARREN_RUNS; run++) {
      const isEnough = (c: number, theta: Float64Array, residual: Float64Array) => {
        let below = 0;
        while (below < c && this.#lambdaOf(theta[below]!) < sigma) below += 1;
        if (below >= left) return true;
        return (
          below < theta.length &&
          this.#lambdaOf(theta[below]!) >= sigma &&
          residual[below]! <= NEIGHBOUR_TOL * theta[below]!
        );
      };
      const found = this.#run(block, left, barren, isEnough, sigma);
      left -= found;
      if (left <= 0) return left === 0;
      if (this.exhausted || this.stopped) return false;
      barren = found === 0 ? barren + 1 : 0;
      if (found === 0) block = Math.min(2 * block, MOST_BLOCK);
    }
    return false;
  }

  /** Shift in the gap above the `below` lowest eigenvalues, and the negative pivots there. */
  certify(below: number, floor: number): { sigma: number; negativePivots: number } | null {
    const lambda = this.ascending();
    const low = Math.max(below > 0 ? lambda[below - 1]! : floor, floor);
    const from = Number.isFinite(low) ? low : 0;
    const high = below < lambda.length ? lambda[below]! : this.#beyond(from);
    for (const share of GAP_SHARES) {
      const sigma = from + share * (high - from);
      const count = this.inertia(sigma);
      if (count !== null) return { sigma, negativePivots: count };
    }
    return null;
  }

  /** Number of eigenvalues below sigma; null where K − sigma·M is singular within rounding. */
  inertia(sigma: number): number | null {
    const begin = this.#clock();
    const storage = this.#ldlt;
    this.#ldlt = undefined;
    this.#sigma = null;
    try {
      this.#ldlt = factorise(this.#symbolic, this.#K, this.#M, sigma, storage);
      return this.#ldlt.negativePivots;
    } catch (error) {
      if (!(error instanceof ZeroPivotError)) throw error;
      return null;
    } finally {
      this.timing.certify += this.#clock() - begin;
    }
  }

  /** The working shift; factors K − σM there unless that is done. */
  pencil(): ShiftedPencil {
    const begin = this.#clock();
    if (this.#ldlt === undefined || this.#sigma === null) {
      this.#ldlt = this.#factorAtWorkingShift(this.#ldlt);
      this.#sigma = this.#ldlt.sigma;
    }
    this.timing.factor += this.#clock() - begin;
    return new ShiftedPencil(this.#mass, this.#ldlt);
  }

  get negativePivots(): number {
    return this.#ldlt?.negativePivots ?? 0;
  }

  #workingShift: number | null = null;

  #factorAtWorkingShift(storage: Ldlt | undefined): Ldlt {
    const symbolic = this.#symbolic;
    if (this.#workingShift === null) {
      if (this.rigid === 0) {
        const ldlt = factorise(symbolic, this.#K, null, 0, storage);
        // K is semidefinite: a negative pivot is a motion whose stiffness rounding has eaten.
        if (ldlt.negativePivots === 0) {
          this.#workingShift = 0;
          return ldlt;
        }
      }
      const ldlt = shiftBelow(symbolic, this.#K, this.#M, this.modes, this.random);
      this.#workingShift = ldlt.sigma;
      return ldlt;
    }
    return factorise(symbolic, this.#K, this.#M, this.#workingShift, storage);
  }

  /** One Krylov space; keeps its converged pairs below `limit`. Returns how many are new. */
  #run(
    block: number,
    missing: number,
    barren: number,
    isEnough: (converged: number, theta: Float64Array, residual: Float64Array) => boolean,
    limit: number,
  ): number {
    const pencil = this.pencil();
    const shouldStop = this.#options.shouldStop ?? (() => false);
    const begin = this.#clock();
    const pairs = bandLanczos(pencil, this.modes, this.random, {
      block,
      firstCheck: 2 * missing + 4 + 4 * block,
      maxDimension: Math.min(
        MOST_DIMENSION,
        2 ** barren * Math.max(LEAST_DIMENSION, 3 * missing + 12 * block),
      ),
      accept: (theta, residual) => isEnough(convergedPairs(theta, residual), theta, residual),
      shouldStop,
    });
    this.timing.iterate += this.#clock() - begin;
    this.next = null;
    if (pairs === null) {
      this.exhausted = true;
      return 0;
    }
    this.stopped = pairs.stopped;
    return this.#keep(pencil, pairs, limit);
  }

  #keep(pencil: ShiftedPencil, pairs: RitzPairs, limit: number): number {
    const begin = this.#clock();
    const theta = pairs.eigen.values;
    const converged = convergedPairs(theta, pairs.residual);
    const n = pencil.n;
    const y = new Float64Array(n);
    const image = new Float64Array(n);
    let count = 0;
    for (let i = 0; i < converged; i++) {
      const lambda = this.#lambdaOf(theta[i]!);
      if (lambda >= limit) break;
      ritzVector(pairs, i, y);
      // One step of A takes out what an M that is singular lets in (Ericsson and Ruhe 1980,
      // section 4: purification) and shrinks the higher modes in y.
      multiplySymmetric(this.#mass, y, image);
      const pure = new Float64Array(n);
      pencil.apply(image, pure);
      if (this.modes.add(pure, null) === 0) continue;
      this.lambda.push(lambda);
      count += 1;
    }
    if (!pairs.invariant && converged < theta.length) {
      if (pairs.residual[converged]! <= NEIGHBOUR_TOL * theta[converged]!) {
        this.next = this.#lambdaOf(theta[converged]!);
      }
    }
    this.timing.finish += this.#clock() - begin;
    return count;
  }

  #lambdaOf(theta: number): number {
    return theta > 0 ? (this.#workingShift ?? 0) + 1 / theta : Infinity;
  }

  /** A shift well above the last eigenvalue there is. */
  #beyond(last: number): number {
    if (last > 0) return 3 * last;
    return this.#workingShift === null || this.#workingShift === 0 ? 1 : -this.#workingShift;
  }

  #report(fraction: number): void {
    if (fraction <= this.#progress) return;
    this.#progress = fraction;
    this.#options.onProgress?.(fraction);
  }
}

/** Number of leading pairs that have converged. */
function convergedPairs(theta: Float64Array, residual: Float64Array): number {
  let count = 0;
  while (count < theta.length && residual[count]! <= CONVERGED_TOL * theta[count]!) count += 1;
  return count;
}
