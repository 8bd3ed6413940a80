import { describe, expect, it } from 'vitest';
import { VALUES_PER_POINT } from '#shared/analysis/shapesFile.ts';
import { aCantilever } from '#tests/builders/aFrame.ts';
import { aLine, solved } from '#tests/builders/aLine.ts';

describe('shapes at nodes and stations', () => {
  it('follow the cantilever’s first mode (Thomson, Appendix D) in every station, φᵀMφ = 1', () => {
    const { shapes } = solved(aLine({ ends: ['clamped', 'free'], divisions: 10 }), 'consistent', {
      modes: 1,
    });
    expect(shapes.nodes).toEqual(['a', 'b']);
    expect(shapes.members).toEqual([{ id: 'line', first: 2, count: 11 }]);
    const beta = 1.87510407;
    const ratio = (Math.cosh(beta) + Math.cos(beta)) / (Math.sinh(beta) + Math.sin(beta));
    const exact = (x: number) =>
      Math.cosh(beta * x) - Math.cos(beta * x) - ratio * (Math.sinh(beta * x) - Math.sin(beta * x));
    const sign = Math.sign(shapes.shapes[1 * VALUES_PER_POINT + 2]!);
    for (let station = 0; station <= 10; station++) {
      const point = 2 + station;
      const x = station / 10;
      expect(shapes.positions[3 * point]).toBeCloseTo(x, 6);
      // Of mass 1, the exact shape has ∫φ² dx = 1 in this form.
      expect(sign * shapes.shapes[point * VALUES_PER_POINT + 2]!).toBeCloseTo(exact(x), 4);
    }
  });

  it('carry arms rigidly, and show the member’s side of a joint', () => {
    const frame = aCantilever({ divisions: 2, length: 1 });
    frame.nodes.push({ id: 'end', x: 2, y: 0, z: 0 });
    frame.members.push({
      ...frame.members[0]!,
      id: 'hung',
      start: 'tip',
      end: 'end',
      startArm: [0, 0, -0.2],
      joints: { start: { ry: 1e3 } },
    });
    const { shapes } = solved(frame, 'consistent', { modes: 4 });
    const [tip, station] = [1, shapes.members[1]!.first];
    expect(
      [...shapes.positions.slice(3 * station, 3 * station + 3)].map((v) => v.toFixed(6)),
    ).toEqual(['1.000000', '0.000000', '-0.200000']);
    for (let mode = 0; mode < 4; mode++) {
      const at = (point: number, k: number) =>
        shapes.shapes[(mode * shapes.points + point) * VALUES_PER_POINT + k]!;
      expect(at(station, 0)).toBeCloseTo(at(tip, 0) - 0.2 * at(tip, 4), 5);
      expect(at(station, 1)).toBeCloseTo(at(tip, 1) + 0.2 * at(tip, 3), 5);
      expect(at(station, 2)).toBeCloseTo(at(tip, 2), 5);
      expect(at(station, 5)).toBeCloseTo(at(tip, 5), 5);
    }
    const turnsApart = [0, 1, 2, 3].some((mode) => {
      const base = mode * shapes.points * VALUES_PER_POINT;
      const [a, b] = [tip, station].map(
        (point) => shapes.shapes[base + point * VALUES_PER_POINT + 4]!,
      );
      return Math.abs(a! - b!) > 1e-3;
    });
    expect(turnsApart).toBe(true);
  });
});
