import type { ChainAnalysis } from '../numerics/chains/analyseChains.ts';
import type { ChainedPair } from '../numerics/chains/ChainedPair.ts';
import { sameMass, sameTopology } from '../numerics/chains/compare.ts';
import type { Six } from './massProperties.ts';

/**
 * What solves of one frame share: the analysis while the topology stays, and what all modes reach of the mass while
 * the mass does. Each solve looks whether it still fits, so it may be handed from any solve to any other.
 */
export class SharedWork {
  #last: { pair: ChainedPair; analysis: ChainAnalysis; attainable: Six } | undefined;

  /** Of the last solve. */
  get topology(): { readonly pair: ChainedPair; readonly analysis: ChainAnalysis } | undefined {
    return this.#last && { pair: this.#last.pair, analysis: this.#last.analysis };
  }

  analysisFor(pair: ChainedPair): ChainAnalysis | undefined {
    return this.#last && sameTopology(this.#last.pair, pair) ? this.#last.analysis : undefined;
  }

  attainableFor(pair: ChainedPair): Six | undefined {
    const last = this.#last;
    if (!last || !sameTopology(last.pair, pair) || !sameMass(last.pair, pair)) return undefined;
    return last.attainable;
  }

  keep(pair: ChainedPair, analysis: ChainAnalysis, attainable: Six): void {
    this.#last = { pair, analysis, attainable };
  }
}
