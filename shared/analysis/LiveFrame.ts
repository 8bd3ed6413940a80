import { AppError } from '../errors/AppError.ts';
import { applyState } from '../frame/applyState.ts';
import { buildModel } from '../frame/assembly/buildModel.ts';
import { chainedPair } from '../frame/assembly/chainedPair.ts';
import type { FrameModel, MassKind } from '../frame/assembly/FrameModel.ts';
import { analyseChains } from '../numerics/chains/analyseChains.ts';
import type { ChainAnalysis } from '../numerics/chains/analyseChains.ts';
import type { ChainedPair } from '../numerics/chains/ChainedPair.ts';
import { ChainedPencil } from '../numerics/chains/ChainedPencil.ts';
import { sameTopology } from '../numerics/chains/compare.ts';
import { followModes } from '../numerics/eigen/followModes.ts';
import { ZeroPivotError } from '../numerics/factor/ZeroPivotError.ts';
import { withArena } from '../numerics/kernels/Arena.ts';
import type { Arena } from '../numerics/kernels/Arena.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import type { SolveSettings } from '../schemas/solveResult.ts';
import { SharedWork } from './SharedWork.ts';
import { solveMeshed } from './solveMeshed.ts';

/** Modes followed beyond those asked for: an edit may bring them among the lowest. */
const GUARDS = 4;
/** Estimated relative error of ω² at which following ends: a mark on a screen moves by less. */
const TOLERANCE = 2e-5;
const MOST_SWEEPS = 4;
/** The shift of a frame with rigid motions, as a share of its lowest elastic ω². */
const SHIFT_SHARE = 0.1;

export interface LiveFrequencies {
  /** Ascending, rigid motions first [Hz]. */
  readonly frequenciesHz: Float64Array;
  /** Estimated error of each [Hz]; rounding of a certified solve is not counted. */
  readonly errorsHz: Float64Array;
  /** Whether a count says that none is missing: of a fresh solve, never of one that follows. */
  readonly certified: boolean;
  readonly timing: { readonly assemble: number; readonly solve: number; readonly sweeps: number };
}

export interface LiveOptions {
  readonly massKind: MassKind;
  readonly stateId: string | null;
  /** Number of modes wanted. */
  readonly modes: number;
  readonly supports?: NonNullable<SolveSettings['supports']>;
  /** Milliseconds; timings are 0 without it. */
  readonly now?: () => number;
  /** Asked between steps; true ends the step with AppError `cancelled`. */
  readonly shouldStop?: () => boolean;
}

/** The frame as it was solved or followed last. */
interface Followed {
  readonly model: FrameModel;
  readonly pair: ChainedPair;
  readonly analysis: ChainAnalysis;
  /** Modes over the unknowns in `lastingOrder`. */
  readonly modes: readonly Float64Array[];
  readonly sigma: number;
}

/**
 * Frequencies of a frame that is being edited: the first and every one of another topology by a certified solve, those
 * between by following the modes of the last one, which takes a fraction of it. A change's effect can be asked for in
 * the same way before it is made.
 */
export class LiveFrame {
  readonly #options: LiveOptions;
  readonly #clock: () => number;
  #last: Followed | undefined;

  constructor(options: LiveOptions) {
    this.#options = options;
    this.#clock = options.now ?? (() => 0);
  }

  /**
   * Solves afresh: certified.
   *   document  accepted by `checkDocument`
   * Throws AppError as `solveFrame` does.
   */
  solve(document: FrameDocument): LiveFrequencies {
    const { modes, massKind, shouldStop = () => false } = this.#options;
    this.#last = undefined;
    const began = this.#clock();
    const shared = new SharedWork();
    const solved = solveMeshed(
      this.#inState(document),
      massKind,
      { modes: modes + GUARDS },
      {
        clock: this.#clock,
        progress: () => undefined,
        shouldStop,
        stopIfAsked: () => this.#stopIfAsked(),
      },
      shared,
    );
    const { model, phi } = solved;
    const lambda = Float64Array.from(
      solved.modes,
      ({ frequencyHz }) => (2 * Math.PI * frequencyHz) ** 2,
    );
    const elastic = lambda[solved.rigidBodyModes];
    if (elastic !== undefined) {
      const order = lastingOrder(model);
      this.#last = {
        model,
        pair: shared.last!.pair,
        analysis: shared.last!.analysis,
        modes: phi.map((shape) => gathered(shape, order)),
        sigma: solved.rigidBodyModes > 0 ? -SHIFT_SHARE * elastic : 0,
      };
    }
    return {
      frequenciesHz: frequencies(lambda, modes),
      errorsHz: new Float64Array(Math.min(lambda.length, modes)),
      certified: solved.complete,
      timing: { assemble: solved.timing.assemble, solve: this.#clock() - began, sweeps: 0 },
    };
  }

  /**
   * Frequencies of the edited frame, by following the modes of the last one.
   *   keep  whether the next is followed from here; false to ask for the effect of a change only
   * Solves afresh where the topology changed, or where following does not settle.
   */
  follow(document: FrameDocument, keep = true): LiveFrequencies {
    const last = this.#last;
    const followed = last && withArena((arena) => this.#followIn(arena, last, document, keep));
    if (followed) return followed;
    if (keep) return this.solve(document);
    const other = new LiveFrame(this.#options);
    return other.solve(document);
  }

  #followIn(
    arena: Arena,
    last: Followed,
    document: FrameDocument,
    keep: boolean,
  ): LiveFrequencies | null {
    const began = this.#clock();
    const { massKind, modes: wanted } = this.#options;
    const model = buildModel(this.#inState(document), {
      massKind,
      // Lengths change while a node is dragged; the elements stay.
      divisionsOf: ({ index }) => last.model.parts[index]?.divisions ?? 1,
    });
    if (!sameUnknowns(model, last.model)) return null;
    const pair = chainedPair(model);
    const analysis = sameTopology(last.pair, pair)
      ? last.analysis
      : analyseChains(pair, undefined, last.analysis);
    if (analysis.symbolic !== last.analysis.symbolic) return null;
    const pencil = new ChainedPencil(arena, pair, analysis);
    const built = this.#clock();
    this.#stopIfAsked();
    if (!factorisedBelow(pencil, last.sigma)) return null;
    this.#stopIfAsked();

    const count = last.modes.length;
    const order = arena.placeIndices(lastingOrder(model));
    const shape = pencil.vector();
    const start = arena.numbers(count * pencil.size);
    arena.view(start, count * pencil.size).fill(0);
    last.modes.forEach((values, i) => {
      arena.view(shape, pencil.n).set(values);
      arena.kernels.scatter(pencil.n, order, shape, start + 8 * i * pencil.size);
    });
    const found = followModes(pencil, start, count, {
      wanted: Math.min(wanted, count),
      tolerance: TOLERANCE,
      mostSweeps: MOST_SWEEPS,
    });
    if (found === null) return null;
    if (keep) {
      this.#last = {
        model,
        pair,
        analysis,
        sigma: last.sigma,
        modes: last.modes.map((_, i) => {
          arena.kernels.gather(pencil.n, order, found.vectors + 8 * i * pencil.size, shape);
          return arena.view(shape, pencil.n).slice();
        }),
      };
    }
    const frequenciesHz = frequencies(found.lambda, wanted);
    return {
      frequenciesHz,
      // f = √λ / 2π; at 0 Hz the whole of what λ may be.
      errorsHz: frequenciesHz.map((hz, i) => {
        const error = found.error[i]! / (4 * Math.PI * Math.PI);
        return hz > Math.sqrt(error) ? error / (2 * hz) : Math.sqrt(error);
      }),
      certified: false,
      timing: {
        assemble: built - began,
        solve: this.#clock() - built,
        sweeps: found.sweeps,
      },
    };
  }

  #inState(document: FrameDocument): FrameDocument {
    return applyState(document, this.#options.stateId, this.#options.supports);
  }

  #stopIfAsked(): void {
    if (this.#options.shouldStop?.()) {
      throw new AppError('cancelled', 'The solve was cancelled.');
    }
  }
}

/** Whether K − σM could be factored and has no eigenvalue below σ. */
function factorisedBelow(pencil: ChainedPencil, sigma: number): boolean {
  try {
    return pencil.factorise(sigma) === 0;
  } catch (error) {
    if (error instanceof ZeroPivotError) return false;
    throw error;
  }
}

/** The same number of unknowns, of the same joints, inside the same members divided alike. */
function sameUnknowns(a: FrameModel, b: FrameModel): boolean {
  return (
    a.free === b.free &&
    a.joints === b.joints &&
    a.parts.length === b.parts.length &&
    a.parts.every(({ divisions, member }, i) => {
      const other = b.parts[i]!;
      return divisions === other.divisions && member.id === other.member.id;
    }) &&
    a.blockOf.every((block, i) => block === b.blockOf[i])
  );
}

/**
 * Unknowns in an order that outlasts edits: joints, then what is inside members, member by member. (The model's own
 * follows the makes, and a node that moves changes those.)
 */
function lastingOrder({ free, joints, chains }: FrameModel): Int32Array {
  const order = new Int32Array(free);
  for (let i = 0; i < joints; i++) order[i] = i;
  let at = joints;
  const sorted = chains.flat().sort((a, b) => a.part.index - b.part.index || a.from - b.from);
  for (const { inner, make } of sorted) {
    for (let i = 0; i < make.inner; i++) order[at++] = inner + i;
  }
  return order;
}

function gathered(shape: Float64Array, order: Int32Array): Float64Array {
  const result = new Float64Array(order.length);
  for (let k = 0; k < order.length; k++) result[k] = shape[order[k]!]!;
  return result;
}

const frequencies = (lambda: Float64Array, wanted: number): Float64Array =>
  lambda.slice(0, wanted).map((value) => Math.sqrt(Math.max(value, 0)) / (2 * Math.PI));
