import { describe, expect, it } from 'vitest';
import { AppError } from '#shared/errors/AppError.ts';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import { refineFrame } from '#shared/analysis/refineFrame.ts';
import type { Refinement } from '#shared/analysis/refineFrame.ts';
import { aStand } from '#tests/builders/aFrame.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { aLine } from '#tests/builders/aLine.ts';
import type { End } from '#tests/builders/aLine.ts';

function accepted(frame: FrameInput) {
  const { document } = checkDocument(frame);
  if (document === null) throw new Error('The frame is refused.');
  return document;
}

function refined(frame: FrameInput, modes: number, divisions?: readonly number[]): Refinement {
  const result = refineFrame({ document: accepted(frame), stateId: null, modes }, divisions);
  expect(result.complete).toBe(true);
  return result;
}

const line = (start: End, end: End) => aLine({ ends: [start, end], divisions: 1 });
const omega = (hz: number | null | undefined) => 2 * Math.PI * (hz ?? NaN);

function rod(): FrameInput {
  const frame = aLine({ ends: ['clamped', 'free'], divisions: 1, unknowns: ['u'] });
  frame.supports = [{ node: 'a', fixed: ['u'] }];
  return frame;
}

describe('a frame refined', () => {
  // ω√(mL⁴/EI) of a cantilever [computed independently; exact: Thomson, Theory of Vibration, App. D]; five decimals.
  it('a cantilever in 1, 2, 3, 4, 10 and 20 elements', () => {
    const { consistent, lumped, meshFreeHz } = refined(
      line('clamped', 'free'),
      3,
      [1, 2, 3, 4, 10, 20],
    );
    const table = {
      consistent: [
        [3.53273, 34.80689],
        [3.51772, 22.22147, 75.15708],
        [3.51637, 22.10686, 62.46598],
        [3.51613, 22.06017, 62.17489],
        [3.51602, 22.03522, 61.71292],
        [3.51602, 22.03454, 61.69822],
      ],
      lumped: [
        [2.44949],
        [3.15623, 16.25804],
        [3.34568, 18.88592, 47.02836],
        [3.41804, 20.09035, 53.20174],
        [3.49996, 21.68978, 60.12387],
        [3.51199, 21.94711, 61.29603],
      ],
    };
    const expectClose = (hz: readonly number[], expected: readonly number[]) => {
      expect(hz.length).toBe(expected.length);
      expected.forEach((value, i) => expect(omega(hz[i])).toBeCloseTo(value, 4.9));
    };
    table.consistent.forEach((row, i) => expectClose(consistent.frequenciesHz[i]!, row));
    table.lumped.forEach((row, i) => expectClose(lumped.frequenciesHz[i]!, row));
    expectClose(meshFreeHz, [3.51602, 22.03449, 61.69721]);
    // The lowest mode keeps its shape on every mesh.
    expect(lumped.followedHz[0]!.map(omega).map((value) => value.toFixed(3))).toEqual(
      table.lumped.map(([first]) => first!.toFixed(3)),
    );
  });

  it('a free end: order 2 with lumped mass, 4 with consistent', () => {
    const { consistent, lumped } = refined(line('clamped', 'free'), 2);
    for (const mode of [0, 1]) {
      expect(Math.abs(lumped.order[mode]! - 2)).toBeLessThan(0.1);
      expect(Math.abs(consistent.order[mode]! - 4)).toBeLessThan(0.1);
    }
  });

  // Exact discrete dispersion, φ = nπ/N, derived by hand from the element matrices; the stretching one also in Bathe,
  // Finite Element Procedures, §9.3. 1e-9: the promise of either method.
  it('pinned bending follows the dispersion of both mass kinds at every N, of order 4', () => {
    const divisions = [2, 4, 8, 16];
    const { consistent, lumped } = refined(line('pinned', 'pinned'), 2, divisions);
    for (const n of [1, 2]) {
      divisions.forEach((N, at) => {
        const phi = (n * Math.PI) / N;
        const [c, s] = [Math.cos(phi), Math.sin(phi)];
        // With n = N every node is at rest: lumped mass has no such mode.
        if (n < N) {
          const square = (12 * N ** 4 * (1 - c) ** 2) / (2 + c);
          const value = omega(lumped.followedHz[n - 1]![at]);
          expect(Math.abs(value / Math.sqrt(square) - 1)).toBeLessThan(1e-9);
        }
        // (24 − 24c − μ(312 + 108c)) (8 + 4c − μ(8 − 6c)) = (12s + 26μs)², λ = 420 N⁴ μ; the lower root.
        const [a0, a1, b0, b1] = [24 - 24 * c, 312 + 108 * c, 8 + 4 * c, 8 - 6 * c];
        const A = a1 * b1 - (26 * s) ** 2;
        const B = -(a0 * b1 + a1 * b0) - 2 * 12 * 26 * s * s;
        const C = a0 * b0 - (12 * s) ** 2;
        // … and consistent mass one in which the nodes turn.
        const mu = n === N ? b0 / b1 : (2 * C) / (-B + Math.sqrt(B * B - 4 * A * C));
        const found = omega(consistent.followedHz[n - 1]![at]);
        expect(Math.abs(found / Math.sqrt(420 * N ** 4 * mu) - 1)).toBeLessThan(1e-9);
      });
      // φ⁴/1440 and terms of φ⁶: φ = 0.4 n at N = 8.
      expect(Math.abs(lumped.order[n - 1]! - 4)).toBeLessThan(0.06 * n * n);
      expect(Math.abs(consistent.order[n - 1]! - 4)).toBeLessThan(0.06 * n * n);
    }
  });

  it('stretching follows the dispersion of both mass kinds at every N, of order 2', () => {
    const { divisions, consistent, lumped } = refined(rod(), 1);
    divisions.forEach((N, at) => {
      const phi = Math.PI / (2 * N);
      const expected = {
        lumped: 2 * N * Math.sin(phi / 2),
        consistent: N * Math.sqrt((6 * (1 - Math.cos(phi))) / (2 + Math.cos(phi))),
      };
      expect(Math.abs(omega(lumped.followedHz[0]![at]) / expected.lumped - 1)).toBeLessThan(1e-9);
      expect(Math.abs(omega(consistent.followedHz[0]![at]) / expected.consistent - 1)).toBeLessThan(
        1e-9,
      );
    });
    expect(Math.abs(lumped.order[0]! - 2)).toBeLessThan(0.01);
    expect(Math.abs(consistent.order[0]! - 2)).toBeLessThan(0.01);
  });

  it('says from which division both mass kinds agree', () => {
    // Rod, mode 1: ±φ²/24, φ = π/2N, so they differ by φ²/12: 1.3 % at N = 4, 0.3 % at N = 8.
    expect(refined(rod(), 1).agreement).toEqual({ tolerance: 0.01, divisions: 8 });
    const document = accepted(rod());
    const strict = refineFrame({ document, stateId: null, modes: 1, tolerance: 1e-6 });
    expect(strict.agreement).toEqual({ tolerance: 1e-6, divisions: null });
  });

  it('rigid modes stay at 0 and have no order', () => {
    const { meshFreeHz, consistent, lumped } = refined(line('free', 'free'), 3);
    expect(meshFreeHz.slice(0, 2)).toEqual([0, 0]);
    for (const kind of [consistent, lumped]) {
      expect(kind.followedHz[0]!.slice(1)).toEqual([0, 0, 0, 0]);
      expect(kind.order.slice(0, 2)).toEqual([null, null]);
      expect(kind.order[2]).not.toBeNull();
    }
  });

  it('stops between solves when asked, and never goes back in its progress', () => {
    const document = accepted(aStand());
    const fractions: number[] = [];
    let last = 0;
    const stopped = () =>
      refineFrame({ document, stateId: null, modes: 3 }, [1, 2], {
        onProgress: (fraction) => {
          fractions.push(fraction);
          last = fraction;
        },
        shouldStop: () => last >= 0.4,
      });
    expect(stopped).toThrow(AppError);
    expect(fractions).toEqual([...fractions].sort((a, b) => a - b));
    expect(last).toBeLessThan(0.8);
  });

  it.each([[[]], [[0, 1]], [[2, 1]], [[1.5]], [[201]]])('refuses divisions %j', (divisions) => {
    const document = accepted(rod());
    expect(() => refineFrame({ document, stateId: null, modes: 1 }, divisions)).toThrow(
      /ascending whole numbers of divisions from 1 to 200/,
    );
  });
});
