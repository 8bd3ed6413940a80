import { analyseChains } from '../chains/analyseChains.ts';
import { ChainedPencil } from '../chains/ChainedPencil.ts';
import { unchained } from '../chains/ChainedPair.ts';
import { withArena } from '../kernels/Arena.ts';
import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { clearGap } from './clearGap.ts';
import { ModeSearch } from './ModeSearch.ts';
import type { ModesOptions, ModesResult, ModesTiming } from './ModesResult.ts';

/** Shifts that may be tried to lower a count check that takes in far more than was asked for. */
const MOST_LOWERINGS = 4;

/**
 * Lowest eigenpairs of  K φ = λ M φ,  none missed:  φᵀMφ = 1, λ ascending.
 *   K        n×n, symmetric positive semidefinite [N/m, N, N·m]
 *   M        n×n, symmetric positive semidefinite, may be singular [kg, kg·m, kg·m²]
 *   options  how many or up to which λ [rad²/s²], null vectors of K, seed, hooks
 * All modes up to the first clear gap above the wanted ones are found by shift-invert Lanczos; the
 * negative pivots of K − σM at a σ in that gap count the eigenvalues below it (Sylvester). Where
 * the count says that some are missing (several equal frames in one), they are looked for outside the
 * space of those found. A run that cannot find them, or is stopped, returns what
 * it has with complete = false.
 * Throws ZeroPivotError when K has a null vector that is not among `nullVectors` (its `motion` is
 * that vector) or K and M have one in common; RangeError for impossible options.
 * Source: Ericsson and Ruhe 1980, Math. Comp. 35, 1251–1268; Grimes, Lewis and Simon 1994, SIAM J.
 * Matrix Anal. Appl. 15(1), 228–272; Bathe, Finite Element Procedures, section 11.3 (Sturm check).
 */
export function lowestModes(K: SymmetricCsc, M: SymmetricCsc, options: ModesOptions): ModesResult {
  checkOptions(options);
  const pair = unchained(K, M);
  return withArena((arena) => {
    const analysis = analyseChains(pair, options.clock);
    const result = findModes(new ChainedPencil(arena, pair, analysis), options);
    const { order, symbolic } = analysis.symbolic.timing;
    return { ...result, timing: { ...result.timing, order, symbolic } };
  });
}

/** The same for a pencil that is there, factored at 0 or not at all; order and analysis are not timed. */
export function findModes(pencil: ChainedPencil, options: ModesOptions): ModesResult {
  checkOptions(options);
  const { count, upToLambda } = options;
  const timing: ModesTiming = {
    order: 0,
    symbolic: 0,
    factor: 0,
    iterate: 0,
    finish: 0,
    certify: 0,
  };
  const search = new ModeSearch(pencil, options, timing);
  const floor = upToLambda ?? -Infinity;
  let wanted = Math.min(count ?? 0, pencil.n);
  if (upToLambda !== undefined) {
    // How many there are is known before any is found; an eigenvalue at the limit itself is settled
    // by the gap above it.
    wanted = search.inertia(upToLambda) ?? search.inertia(upToLambda * (1 + 1e-6)) ?? search.rigid;
  }
  search.findLowest(wanted, floor);

  let sigma = search.toWorkingShift();
  let below = pencil.negativePivots;
  let certain = false;
  if (!search.stopped) {
    const lambda = search.ascending();
    let gap = clearGap(lambda, wanted, floor);
    const atEnd = gap < 0 && search.exhausted;
    if (atEnd) gap = lambda.length;
    let check = gap >= 0 ? search.certify(gap, floor) : null;
    if (check !== null) {
      check = lower(search, lambda, wanted, floor, gap, check);
      sigma = check.sigma;
      below = check.negativePivots;
      const missing = below - search.countBelow(sigma);
      certain = missing === 0 || (missing > 0 && search.recover(missing, sigma));
    }
  }
  return finish(pencil, search, options, wanted, { sigma, below, certain });
}

/**
 * Where each eigenvalue is multiple, the modes found reach much higher than the wanted count needs:
 * a lower gap then does with fewer to recover.
 */
function lower(
  search: ModeSearch,
  lambda: Float64Array,
  wanted: number,
  floor: number,
  gap: number,
  check: { sigma: number; negativePivots: number },
): { sigma: number; negativePivots: number } {
  let best = check;
  let high = gap;
  let low = 0;
  for (let k = 0; k < MOST_LOWERINGS && best.negativePivots > 2 * wanted; k++) {
    if (best.negativePivots === search.countBelow(best.sigma)) break;
    const aim = Math.ceil((high * wanted) / best.negativePivots);
    const middle = clearGap(lambda, Math.max(low + 1, aim), floor);
    if (middle < 0 || middle >= high) break;
    const tried = search.certify(middle, floor);
    if (tried === null) break;
    if (tried.negativePivots >= wanted) {
      best = tried;
      high = middle;
    } else {
      low = middle;
    }
  }
  return best;
}

function checkOptions({ count, upToLambda }: ModesOptions): void {
  if ((count === undefined) === (upToLambda === undefined)) {
    throw new RangeError('Give either count or upToLambda.');
  }
  if (count !== undefined && !(Number.isInteger(count) && count >= 1)) {
    throw new RangeError(`count must be a whole number from 1, not ${count}.`);
  }
  if (upToLambda !== undefined && !(upToLambda >= 0 && upToLambda < Infinity)) {
    throw new RangeError(`upToLambda must be a finite number from 0, not ${upToLambda}.`);
  }
}

/** Rayleigh quotients, order, and the modes asked for. */
function finish(
  pencil: ChainedPencil,
  search: ModeSearch,
  options: ModesOptions,
  wanted: number,
  check: { sigma: number; below: number; certain: boolean },
): ModesResult {
  const clock = options.clock ?? (() => 0);
  const begin = clock();
  const { modes, timing } = search;
  const { arena, size } = pencil;
  const image = arena.numbers(size);
  const quotient = new Float64Array(modes.count);
  for (let r = search.rigid; r < modes.count; r++) {
    const phi = modes.vectors + r * modes.stride;
    if (options.refineLambda === undefined) {
      pencil.multiplyStiffness(phi, image);
      quotient[r] = arena.kernels.dot(size, phi, image);
    } else {
      quotient[r] = options.refineLambda(phi);
    }
  }
  const order = Int32Array.from(quotient, (_, r) => r).sort(
    (a, b) => quotient[a]! - quotient[b]! || a - b,
  );
  const found = search.countBelow(check.sigma);
  const limit = options.upToLambda ?? Infinity;
  const most = options.count === undefined ? modes.count : wanted;
  const returned = Array.from(order)
    .filter((r) => !check.certain || search.lambda[r]! < check.sigma)
    .filter((r) => quotient[r]! <= limit)
    .slice(0, most);
  timing.finish += clock() - begin;
  options.onProgress?.(1);
  return {
    lambda: Float64Array.from(returned, (r) => quotient[r]!),
    phi: returned.map((r) => modes.vector(r)),
    addresses: returned.map((r) => ({
      vector: modes.vectors + r * modes.stride,
      image: modes.images + r * modes.stride,
    })),
    sigma: check.sigma,
    below: check.below,
    found,
    complete: check.certain,
    status: check.certain ? 'complete' : 'partial',
    timing,
  };
}
