import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LiveFrame } from '#shared/analysis/LiveFrame.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { aStand } from '#tests/builders/aFrame.ts';
import { accepted, frequencies } from '#tests/builders/aLine.ts';
import { randomFrame, SEED } from './properties/aRandomFrame.ts';

/**
 * What an estimated error may be short of: rounding of both solves, which the estimate does not count. Of the
 * frequency, on small frames.
 */
const ROUNDING = 1e-8;

const live = (modes = 6) => new LiveFrame({ massKind: 'consistent', stateId: null, modes });
const edited = (document: FrameDocument, edit: (copy: FrameDocument) => void): FrameDocument => {
  const copy = structuredClone(document);
  edit(copy);
  return copy;
};
/** Every frequency of a step lies within its own error of a certified solve's. */
function expectTrue(
  step: { frequenciesHz: Float64Array; errorsHz: Float64Array },
  document: FrameDocument,
): void {
  const exact = frequencies(document, 'consistent', { modes: step.frequenciesHz.length });
  expect(step.frequenciesHz).toHaveLength(exact.length);
  exact.forEach((hz, i) => {
    const off = Math.abs(step.frequenciesHz[i]! - hz);
    expect(off, `mode ${i + 1}`).toBeLessThanOrEqual(step.errorsHz[i]! + ROUNDING * exact.at(-1));
  });
}

describe('a frame that is being edited', () => {
  it('begins with a certified solve', () => {
    const document = accepted(aStand({ divisions: 2 }));
    const first = live().solve(document);
    expect(first.certified).toBe(true);
    expectTrue(first, document);
  });

  it('is followed while a node is dragged across the frame', () => {
    const frame = live();
    let document = accepted(aStand({ divisions: 4 }));
    frame.solve(document);
    for (let step = 1; step <= 10; step++) {
      document = edited(document, ({ nodes }) => {
        nodes[4]!.x += 0.02;
        nodes[4]!.z += 0.01;
      });
      const followed = frame.follow(document);
      expect(followed.certified).toBe(false);
      expect(Math.max(...followed.errorsHz) / followed.frequenciesHz[0]!).toBeLessThan(1e-4);
      expectTrue(followed, document);
    }
  });

  it('is followed through any edit of a frame with everything in it', () => {
    const factor = fc.double({ min: 0.8, max: 1.25, noNaN: true });
    const change = fc.record({ E: factor, density: factor, foot: factor, mass: factor });
    fc.assert(
      fc.property(randomFrame, change, (input, { E, density, foot, mass }) => {
        const document = accepted(input);
        const frame = live();
        frame.solve(document);
        const other = edited(document, (copy) => {
          copy.materials[0]!.E *= E;
          copy.materials[0]!.density *= density;
          copy.masses[0]!.mass *= mass;
          for (const support of copy.supports) {
            for (const d of ['u', 'v', 'w', 'rx', 'ry', 'rz'] as const) {
              if (support.stiffness?.[d] !== undefined) support.stiffness[d] *= foot;
            }
          }
        });
        expectTrue(frame.follow(other), other);
      }),
      { numRuns: 40, seed: SEED },
    );
  });

  it('follows a free frame with its rigid motions at 0 Hz', () => {
    const frame = live(10);
    const document = accepted({ ...aStand({ divisions: 2 }), supports: [] });
    expect(frame.solve(document).frequenciesHz.filter((hz) => hz === 0)).toHaveLength(6);
    const heavier = edited(document, ({ masses }) => (masses[0]!.mass *= 1.3));
    const followed = frame.follow(heavier);
    const exact = frequencies(heavier, 'consistent', { modes: 10 });
    followed.frequenciesHz.forEach((hz, i) => {
      // Near 0 Hz rounding of ω² shows: 1e-8 of it is 1e-4 of the frequency.
      expect(Math.abs(hz - exact[i]!)).toBeLessThan(1e-4 * exact[9]!);
    });
  });

  it('solves afresh, certified, when a member is added', () => {
    const frame = live();
    const document = accepted(aStand({ divisions: 2 }));
    frame.solve(document);
    const braced = edited(document, ({ members }) => {
      members.push({
        ...members[0]!,
        id: 'brace',
        start: 'front left foot',
        end: 'back right corner',
      });
    });
    const again = frame.follow(braced);
    expect(again.certified).toBe(true);
    expectTrue(again, braced);
  });

  it('gives the effect of a change without making it', () => {
    const frame = live();
    const document = accepted(aStand({ divisions: 2 }));
    const before = frame.solve(document);
    const lighter = edited(document, ({ masses }) => (masses[0]!.mass = 60));
    expectTrue(frame.follow(lighter, false), lighter);
    expect(frame.follow(document).frequenciesHz[0]).toBeCloseTo(before.frequenciesHz[0]!, 9);
  });

  it('says how far off it may be after a change that its modes do not span', () => {
    const frame = live(2);
    const document = accepted(aStand({ divisions: 2 }));
    frame.solve(document);
    const other = edited(document, ({ masses }) => {
      masses[0]!.mass = 1;
      masses[0]!.offset = [0, 0, 2];
    });
    const followed = frame.follow(other);
    expect(followed.certified).toBe(false);
    expectTrue(followed, other);
  });

  it('stops between steps when asked to', () => {
    let stop = false;
    const options = {
      massKind: 'lumped',
      stateId: null,
      modes: 4,
      shouldStop: () => stop,
    } as const;
    const frame = new LiveFrame(options);
    const document = accepted(aStand({ divisions: 2 }));
    frame.solve(document);
    stop = true;
    expect(() => frame.follow(document)).toThrowError(/cancelled/);
  });
});
