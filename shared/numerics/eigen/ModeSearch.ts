import type { ChainedPencil } from '../chains/ChainedPencil.ts';
import { ZeroPivotError } from '../factor/ZeroPivotError.ts';
import { clearGap } from './clearGap.ts';
import { combineVectors } from './combineVectors.ts';
import { lanczos } from './lanczos.ts';
import { ModeSet } from './ModeSet.ts';
import type { ModesOptions, ModesTiming } from './ModesResult.ts';
import type { RitzPairs } from './RitzPairs.ts';
import { shiftBelow } from './shiftBelow.ts';

/**
 * Residual norm, relative to θ, at which a Ritz pair counts as converged: the error of λ is its
 * square over the gap, that of the shape falls by a further factor in the purification step.
 */
const CONVERGED_TOL = 1e-10;
/** The same for the neighbour beyond the wanted ones, which only places the gap (CLEAR_GAP). */
const NEIGHBOUR_TOL = 1e-4;
/**
 * From this residual on, relative to θ, a shape is sent through A once more by a solve: it shrinks the higher
 * modes in it. Where M is singular all are: what recurrence lets in of its null space is more than rounding.
 */
const PURE_TOL = 1e-13;
/** Dimension of one Krylov space: room for the wanted and their convergence, memory for the rest. */
const LEAST_DIMENSION = 100;
const MOST_DIMENSION = 1000;
/** Modes beyond those missing that one run may keep. */
const MOST_EXTRA = 24;
/** Runs of the search and of the recovery; each that finds nothing makes the next one larger. */
const MOST_RUNS = 60;
const MOST_BARREN_RUNS = 3;
/** Where in a clear gap the shift is tried, should a pivot vanish by accident. */
const GAP_SHARES = [0.5, 0.4, 0.6, 0.3];

type IsEnough = (converged: number, theta: Float64Array, residual: Float64Array) => boolean;

/** The state of one search: the pencil at some shift, eigenpairs found so far, clock. */
export class ModeSearch {
  /** M-orthonormal eigenvectors found, the null vectors first, and their λ (not sorted). */
  readonly modes: ModeSet;
  readonly lambda: number[] = [];
  readonly rigid: number;
  readonly timing: ModesTiming;
  /** λ of the nearest eigenvalue beyond those found, roughly; null when not known. */
  next: number | null = null;
  /** Every finite eigenvalue has been found. */
  exhausted = false;
  stopped = false;

  readonly #pencil: ChainedPencil;
  readonly #options: ModesOptions;
  readonly #clock: () => number;
  readonly #random: Uint32Array;
  #workingShift: number | null = null;
  #progress = 0;

  constructor(pencil: ChainedPencil, options: ModesOptions, timing: ModesTiming) {
    this.#pencil = pencil;
    this.#options = options;
    this.#clock = options.clock ?? (() => 0);
    this.timing = timing;
    this.#random = Uint32Array.of((options.seed ^ 0x9e3779b9) >>> 0 || 1);
    this.modes = new ModeSet(pencil);
    const motions = options.nullVectors ?? [];
    this.modes.reserve(motions.length);
    for (const motion of motions) {
      const room = pencil.arena.view(this.modes.next, pencil.size).fill(0);
      room.set(motion);
      if (this.modes.add() > 0) this.lambda.push(0);
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
      const isEnough: IsEnough = (c, theta, residual) => {
        const lambda = [...this.lambda];
        for (let i = 0; i < c; i++) lambda.push(this.#lambdaOf(theta[i]!));
        if (c < theta.length && residual[c]! <= NEIGHBOUR_TOL * theta[c]!) {
          lambda.push(this.#lambdaOf(theta[c]!));
        }
        this.#report(Math.min(this.lambda.length + c, wanted) / (wanted + 1));
        return clearGap(Float64Array.from(lambda).sort(), wanted, floor) >= 0;
      };
      const found = this.#run(missing, barren, isEnough, Infinity);
      if (this.exhausted || this.stopped) return;
      barren = found === 0 ? barren + 1 : 0;
    }
  }

  /**
   * Modes below `sigma` that the search left out: of an eigenvalue, one start vector sees one eigenvector. Each
   * run outside those found brings one more of every eigenvalue. True if all were found.
   */
  recover(missing: number, sigma: number): boolean {
    let left = missing;
    let barren = 0;
    for (let run = 0; run < MOST_RUNS && barren < MOST_BARREN_RUNS; run++) {
      const isEnough: IsEnough = (c, theta, residual) => {
        let below = 0;
        while (below < c && this.#lambdaOf(theta[below]!) < sigma) below += 1;
        if (below >= left) return true;
        return (
          below < theta.length &&
          this.#lambdaOf(theta[below]!) >= sigma &&
          residual[below]! <= NEIGHBOUR_TOL * theta[below]!
        );
      };
      const found = this.#run(left, barren, isEnough, sigma);
      left -= found;
      if (left <= 0) return left === 0;
      if (this.exhausted || this.stopped) return false;
      barren = found === 0 ? barren + 1 : 0;
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
    try {
      return this.#pencil.factorise(sigma);
    } catch (error) {
      if (!(error instanceof ZeroPivotError)) throw error;
      return null;
    } finally {
      this.timing.certify += this.#clock() - begin;
    }
  }

  /** Factors the pencil at the working shift unless it is. Returns that shift. */
  toWorkingShift(): number {
    const begin = this.#clock();
    if (this.#workingShift === null) this.#workingShift = this.#chooseShift();
    else if (this.#pencil.sigma !== this.#workingShift) this.#pencil.factorise(this.#workingShift);
    this.timing.factor += this.#clock() - begin;
    return this.#workingShift;
  }

  #chooseShift(): number {
    if (this.rigid === 0) {
      // K is semidefinite: a negative pivot is a motion whose stiffness rounding has eaten.
      const factored = this.#pencil.sigma === 0 ? this.#pencil.negativePivots : undefined;
      if ((factored ?? this.#pencil.factorise(0)) === 0) return 0;
    }
    shiftBelow(this.#pencil, this.modes, this.#random);
    return this.#pencil.sigma;
  }

  /** One Krylov space; keeps its converged pairs below `limit`. Returns how many are new. */
  #run(missing: number, barren: number, isEnough: IsEnough, limit: number): number {
    this.toWorkingShift();
    const { arena } = this.#pencil;
    const begin = this.#clock();
    const settings = {
      firstCheck: 2 * missing + 8,
      maxDimension: Math.min(
        MOST_DIMENSION,
        2 ** barren * Math.max(LEAST_DIMENSION, 3 * missing + 12),
      ),
      accept: (theta: Float64Array, residual: Float64Array) =>
        isEnough(convergedPairs(theta, residual), theta, residual),
      shouldStop: this.#options.shouldStop ?? (() => false),
    };
    // Room for the modes first, so that the space behind it can be given up.
    this.modes.reserve(missing + MOST_EXTRA);
    const kept = arena.used;
    const pairs = lanczos(this.#pencil, this.modes, this.#random, settings);
    this.timing.iterate += this.#clock() - begin;
    this.next = null;
    let count = 0;
    if (pairs === null) {
      this.exhausted = true;
    } else {
      this.stopped = pairs.stopped;
      count = this.#keep(pairs, missing, limit);
    }
    arena.rewind(kept);
    return count;
  }

  #keep(pairs: RitzPairs, missing: number, limit: number): number {
    const begin = this.#clock();
    const { theta, residual } = pairs;
    const converged = convergedPairs(theta, residual);
    const wanted: number[] = [];
    const most = Math.min(converged, missing + MOST_EXTRA);
    for (let i = 0; i < most && this.#lambdaOf(theta[i]!) < limit; i++) wanted.push(i);
    const candidates = this.#ritzVectors(pairs, wanted);
    const { arena, size } = this.#pencil;
    const image = arena.numbers(size);
    const singular = this.#pencil.diagonal('M').includes(0);
    let count = 0;
    wanted.forEach((i, c) => {
      const candidate = candidates + 8 * size * c;
      if (singular || residual[i]! > PURE_TOL * theta[i]!) {
        this.#pencil.multiplyMass(candidate, image);
        this.#pencil.solve(image, this.modes.next);
      } else {
        arena.view(this.modes.next, size).set(arena.view(candidate, size));
      }
      if (this.modes.add() === 0) return;
      this.lambda.push(this.#lambdaOf(theta[i]!));
      count += 1;
    });
    const beyond = wanted.length;
    if ((!pairs.invariant || beyond < converged) && beyond < theta.length) {
      if (residual[beyond]! <= NEIGHBOUR_TOL * theta[beyond]!) {
        this.next = this.#lambdaOf(theta[beyond]!);
      }
    }
    this.timing.finish += this.#clock() - begin;
    return count;
  }

  /** Address of the Ritz vectors, purified, one after the other. */
  #ritzVectors(pairs: RitzPairs, wanted: readonly number[]): number {
    const { arena, size } = this.#pencil;
    const address = arena.numbers(wanted.length * size);
    const coordinates = wanted.map((index) => {
      const all = pairs.coordinates(index);
      return pairs.beyond > 0 ? all : all.subarray(0, pairs.dimension);
    });
    combineVectors(arena, size, pairs.basis, coordinates, address);
    return address;
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
