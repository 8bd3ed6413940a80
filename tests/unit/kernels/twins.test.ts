import { describe, expect, it } from 'vitest';
import { buildModel } from '#shared/frame/assembly/buildModel.ts';
import { chainedPair } from '#shared/frame/assembly/chainedPair.ts';
import { analyseChains } from '#shared/numerics/chains/analyseChains.ts';
import { unchained } from '#shared/numerics/chains/ChainedPair.ts';
import type { ChainedPair } from '#shared/numerics/chains/ChainedPair.ts';
import { ChainedPencil } from '#shared/numerics/chains/ChainedPencil.ts';
import { findModes } from '#shared/numerics/eigen/lowestModes.ts';
import { newArena, type KernelChoice } from '#shared/numerics/kernels/Arena.ts';
import { kernelBytes } from '#shared/numerics/kernels/kernelBytes.ts';
import { webAssembly } from '#shared/numerics/kernels/webAssembly.ts';
import { aRack } from '#tests/builders/aFrame.ts';
import { accepted } from '#tests/builders/aLine.ts';
import { rackPair } from '#tests/unit/numerics/rackPair.ts';

/** Modes of a pair found with one implementation of the kernels. */
function modesWith(choice: KernelChoice, { pair, nullVectors }: Subject, count: number) {
  const pencil = new ChainedPencil(newArena(choice), pair, analyseChains(pair));
  const options = { count, seed: 31, nullVectors };
  const { lambda, phi, below, found, complete } = findModes(pencil, options);
  return { lambda, phi, below, found, complete };
}

interface Subject {
  readonly pair: ChainedPair;
  readonly nullVectors: Float64Array[];
}

function framePair(massKind: 'consistent' | 'lumped', divisions: number): Subject {
  const document = accepted(aRack({ bays: 2, storeys: 3, bay: 1.3, storey: 0.9 }));
  const model = buildModel(document, { massKind, divisionsOf: () => divisions });
  return { pair: chainedPair(model), nullVectors: [] };
}

describe('kernels in WebAssembly and in JavaScript', () => {
  it('are tested on an engine that has SIMD', () => {
    expect(webAssembly.validate(kernelBytes())).toBe(true);
  });

  // Numbers of inner unknowns and of ends differ, so that whole and partial tiles are met.
  it.each([
    ['a rack of whole members', framePair('consistent', 1)],
    ['a divided rack', framePair('consistent', 4)],
    ['chains of unlike length', framePair('consistent', 7)],
    ['lumped mass', framePair('lumped', 3)],
    ['a plain pair', plainPair({ clamped: true })],
    ['a free rack', plainPair({ clamped: false })],
  ])('give the same bits for %s', (_, subject) => {
    const simd = modesWith('auto', subject, 9);
    expect(simd.complete).toBe(true);
    expect(modesWith('script', subject, 9)).toEqual(simd);
  });
});

function plainPair({ clamped }: { clamped: boolean }): Subject {
  const { K, M, unknowns } = rackPair({ bays: [2, 1], storeys: 2, divisions: 2, clamped });
  // Six rigid motions: three translations, and ω × r with the rotation itself.
  const nullVectors = [0, 1, 2, 3, 4, 5].map((motion) =>
    Float64Array.from(unknowns, ({ at, displacement }) => {
      if (displacement === motion) return 1;
      if (motion < 3 || displacement > 2 || displacement === motion - 3) return 0;
      const other = 3 - (motion - 3) - displacement;
      return at[other]! * ((displacement - (motion - 3) + 3) % 3 === 2 ? 1 : -1);
    }),
  );
  return { pair: unchained(K, M), nullVectors: clamped ? [] : nullVectors };
}
