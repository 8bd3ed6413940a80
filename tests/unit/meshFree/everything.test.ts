import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { randomFrame, SEED } from '#tests/unit/analysis/properties/aRandomFrame.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { solved } from './meshFreeFrames.ts';

// Each case solves several frames; a busy machine takes its time.
vi.setConfig({ testTimeout: 120_000 });

const MODES = 12;
/** The promise of either method. */
const PROMISED = 1e-9;

/** Mesh-free leaves out shear that couples the principal planes: with ky = kz there is none. */
function withoutCrossShear(frame: FrameInput): FrameInput {
  const shape = frame.sections[0]!.shape;
  if (shape.kind === 'custom') frame.sections[0]!.shape = { ...shape, kz: shape.ky };
  return frame;
}

const withoutBar = (frame: FrameInput): FrameInput => ({
  ...frame,
  members: frame.members.filter(({ kind }) => kind !== 'bar'),
});

function hertz(frame: FrameInput, divisions?: number): number[] {
  const { summary } = divisions
    ? solved(frame, { modes: MODES, divisions }, 'consistent')
    : solved(frame, { modes: MODES });
  expect(summary.complete).toBe(true);
  expect(summary.count.below).toBe(summary.count.found);
  return summary.modes.map(({ frequencyHz }) => frequencyHz);
}

describe('random frames with everything in them, mesh-free', () => {
  it('lie where consistent meshes of 8 and 16 elements extrapolate to, mode by mode', () => {
    fc.assert(
      fc.property(randomFrame, (random) => {
        const frame = withoutBar(withoutCrossShear(random));
        const [exact, coarse, fine] = [hertz(frame), hertz(frame, 8), hertz(frame, 16)];
        exact.forEach((value, i) => {
          // Halving h takes the error of stretching and twisting to 1/4, of bending to 1/16, so what is left is between
          // 1/3 and 1/15 of the difference (Richardson); a tenth of room for terms of higher order.
          const difference = coarse[i]! - fine[i]!;
          const left = fine[i]! - value;
          const room = 2 * PROMISED * value;
          expect(left).toBeLessThanOrEqual((1.1 * difference) / 3 + room);
          expect(left).toBeGreaterThanOrEqual((0.9 * difference) / 15 - room);
        });
      }),
      { seed: SEED, numRuns: 15 },
    );
  });

  it('stay below consistent mass where a bar carries too, by what one element of the bar errs', () => {
    fc.assert(
      fc.property(randomFrame, (random) => {
        const frame = withoutCrossShear(random);
        const [exact, fine] = [hertz(frame), hertz(frame, 16)];
        exact.forEach((value, i) => {
          expect(value).toBeLessThanOrEqual(fine[i]! * (1 + PROMISED));
          // A bar is one element on every mesh: φ²/24 with φ = ωL/c, L up to 1.7 m, of its small share of the energy.
          const phi = (2 * Math.PI * value * 1.7) / Math.sqrt(210e9 / 7850);
          expect(fine[i]! / value - 1).toBeLessThan(phi ** 2 / 24 + 1e-4);
        });
      }),
      { seed: SEED, numRuns: 10 },
    );
  });

  it('give the same bits again, and the same modes when members are numbered backwards', () => {
    fc.assert(
      fc.property(randomFrame, (random) => {
        const frame = withoutCrossShear(random);
        const first = hertz(frame);
        expect(hertz(frame)).toEqual(first);
        const backwards = hertz({
          ...frame,
          members: frame.members.toReversed(),
          nodes: frame.nodes.toReversed(),
        });
        first.forEach((value, i) => {
          expect(Math.abs(backwards[i]! / value - 1)).toBeLessThan(1e-10);
        });
      }),
      { seed: SEED, numRuns: 6 },
    );
  });
});
