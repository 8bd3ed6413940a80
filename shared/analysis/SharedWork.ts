import { onOtherSupports } from '../frame/assembly/onOtherSupports.ts';
import { stiffnessOfTies } from '../frame/assembly/chainedPair.ts';
import type { FrameModel, MassKind, MemberPart } from '../frame/assembly/FrameModel.ts';
import type { ChainAnalysis } from '../numerics/chains/analyseChains.ts';
import type { ChainedPair } from '../numerics/chains/ChainedPair.ts';
import { sameMass, sameTopology } from '../numerics/chains/compare.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import type { Six } from './massProperties.ts';

interface LastSolve {
  readonly model: FrameModel;
  readonly pair: ChainedPair;
  readonly analysis: ChainAnalysis;
  readonly attainable: Six;
}

/**
 * What solves of one frame share: the model while supports alone change, the analysis while the topology stays, and what
 * all modes reach of the mass while the mass does. Each solve looks whether it still fits, so it may be handed from any
 * solve to any other.
 */
export class SharedWork {
  #last: LastSolve | undefined;

  /** Of the last solve. */
  get last(): LastSolve | undefined {
    return this.#last;
  }

  /** The model and matrices of a frame that is the last one on supports of other stiffness. */
  modelFor(
    document: FrameDocument,
    massKind: MassKind,
    divisionsOf: (part: MemberPart) => number,
  ): { model: FrameModel; pair: ChainedPair } | null {
    const last = this.#last;
    if (last?.model.massKind !== massKind) return null;
    if (
      last.model.parts.some(
        (part) => part.member.kind === 'beam' && divisionsOf(part) !== part.divisions,
      )
    )
      return null;
    const model = onOtherSupports(last.model, document);
    return model && { model, pair: { ...last.pair, K: stiffnessOfTies(model) } };
  }

  analysisFor(pair: ChainedPair): ChainAnalysis | undefined {
    return this.#last && sameTopology(this.#last.pair, pair) ? this.#last.analysis : undefined;
  }

  attainableFor(pair: ChainedPair): Six | undefined {
    const last = this.#last;
    if (!last || !sameTopology(last.pair, pair) || !sameMass(last.pair, pair)) return undefined;
    return last.attainable;
  }

  keep(last: LastSolve): void {
    this.#last = last;
  }
}
