import { analyseChains } from '#shared/numerics/chains/analyseChains.ts';
import { buildModel } from '#shared/frame/assembly/buildModel.ts';
import { chainedPair } from '#shared/frame/assembly/chainedPair.ts';
import { divisionsOf } from '#shared/frame/assembly/divisions.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { MassKind } from './frames.ts';

/** Multiplications and additions of one factorisation, those of padding and of chains left out. */
export function operations(document: FrameDocument, massKind: MassKind): number {
  const model = buildModel(document, {
    massKind,
    divisionsOf: (part) => divisionsOf(part, undefined, undefined),
  });
  return analyseChains(chainedPair(model)).symbolic.operations;
}
