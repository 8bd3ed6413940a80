import { describe, expect, it } from 'vitest';
import { mac, macWithSpace } from '#shared/analysis/mac.ts';
import { pairModes } from '#shared/analysis/pairModes.ts';
import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import { aStand } from '#tests/builders/aFrame.ts';
import { aLine, solved } from '#tests/builders/aLine.ts';

/** Shapes over `points` nodes from the translations along Z of each mode. */
function alongZ(modes: readonly (readonly number[])[]): ModeShapes {
  const points = modes[0]!.length;
  return {
    points,
    modes: modes.length,
    nodes: Array.from({ length: points }, (_, i) => `node ${i}`),
    members: [],
    positions: Float32Array.from({ length: points * 3 }, (_, i) => (i % 3 === 0 ? i : 0)),
    shapes: Float32Array.from(modes.flatMap((mode) => mode.flatMap((w) => [0, 0, w, 0, 0, 0]))),
  };
}

function comparable({ summary, shapes }: ReturnType<typeof solved>) {
  return { shapes, frequenciesHz: summary.modes.map((mode) => mode.frequencyHz) };
}

describe('modal assurance criterion (Allemang)', () => {
  it('is 1 for multiples, 0 for perpendicular shapes, cos² of the angle between others', () => {
    const a = Float64Array.of(1, 2, 2);
    expect(mac(a, Float64Array.of(-3, -6, -6))).toBeCloseTo(1, 14);
    expect(mac(a, Float64Array.of(2, -1, 0))).toBe(0);
    expect(mac(Float64Array.of(1, 0), Float64Array.of(1, 1))).toBeCloseTo(0.5, 14);
    expect(mac(a, new Float64Array(3))).toBe(0);
  });

  it('with a space is 1 for any mixture of what spans it', () => {
    const space = [Float64Array.of(1, 0, 0), Float64Array.of(1, 1, 0)];
    expect(macWithSpace(Float64Array.of(0.3, -2, 0), space)).toBeCloseTo(1, 14);
    expect(macWithSpace(Float64Array.of(0, 3, 4), space)).toBeCloseTo(0.36, 14);
  });
});

describe('pairing modes by shape', () => {
  it('finds modes that changed places, and leaves what has no like unpaired', () => {
    const a = {
      shapes: alongZ([
        [1, 1, 1, 1],
        [1, -1, 1, -1],
        [1, 1, -1, -1],
      ]),
      frequenciesHz: [10, 11, 12],
    };
    const b = {
      shapes: alongZ([
        [-1, 1, -1, 1],
        [2, 2, 2, 2],
        [1, -1, -1, 1],
      ]),
      frequenciesHz: [10.5, 11.2, 12],
    };
    const { pairs, unpairedA, unpairedB } = pairModes(a, b);
    expect(pairs.map(({ a: i, b: j }) => [i, j])).toEqual([
      [0, 1],
      [1, 0],
    ]);
    expect(unpairedA).toEqual([2]);
    expect(unpairedB).toEqual([2]);
  });

  it('does not pair like shapes more than 30 % apart in frequency', () => {
    const shapes = alongZ([[1, 2, 3]]);
    const at = (hz: number) => ({ shapes, frequenciesHz: [hz] });
    expect(pairModes(at(10), at(13)).pairs).toHaveLength(1);
    expect(pairModes(at(10), at(14)).pairs).toHaveLength(0);
  });

  it('compares close modes as a space, however they are mixed', () => {
    const [c, s] = [Math.cos(0.8), Math.sin(0.8)];
    const a = {
      shapes: alongZ([
        [1, 0, 0],
        [0, 1, 0],
      ]),
      frequenciesHz: [10, 10],
    };
    const b = {
      shapes: alongZ([
        [c, s, 0],
        [-s, c, 0],
      ]),
      frequenciesHz: [10.1, 10.1],
    };
    const { pairs } = pairModes(a, b);
    expect(pairs).toHaveLength(2);
    for (const pair of pairs) {
      expect(pair.subspace).toBe(true);
      expect(pair.mac).toBeCloseTo(1, 6);
    }
  });

  it('pairs lumped with consistent modes of a frame one to one', () => {
    const frame = aStand({ divisions: 8 });
    const [consistent, lumped] = (['consistent', 'lumped'] as const).map((method) =>
      comparable(solved(frame, method, { modes: 5 })),
    );
    const { pairs } = pairModes(consistent!, lumped!);
    expect(pairs.map(({ a, b }) => [a, b])).toEqual([0, 1, 2, 3, 4].map((i) => [i, i]));
    for (const pair of pairs) expect(pair.mac).toBeGreaterThan(0.99);
  });

  it('compares meshes of one frame at the points that both have', () => {
    const at = (divisions: number) =>
      comparable(
        solved(aLine({ ends: ['clamped', 'free'], divisions }), 'consistent', { modes: 3 }),
      );
    const { pairs } = pairModes(at(6), at(9));
    expect(pairs.map(({ a, b }) => [a, b])).toEqual([
      [0, 0],
      [1, 1],
      [2, 2],
    ]);
    for (const pair of pairs) expect(pair.mac).toBeGreaterThan(0.999);
  });
});
