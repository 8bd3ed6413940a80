import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decodeShapes, encodeShapes, type ModeShapes } from '#shared/analysis/shapesFile.ts';

const someShapes = fc
  .record({
    nodes: fc.array(fc.string({ unit: 'grapheme', minLength: 1, maxLength: 8 }), { maxLength: 4 }),
    counts: fc.array(fc.integer({ min: 2, max: 5 }), { maxLength: 3 }),
    modes: fc.integer({ min: 0, max: 3 }),
    seed: fc.float({ noNaN: true, noDefaultInfinity: true }),
  })
  .map(({ nodes, counts, modes, seed }): ModeShapes => {
    let points = nodes.length;
    const members = counts.map((count, i) => {
      const first = points;
      points += count;
      return { id: `rail ${i + 1}`, first, count };
    });
    return {
      points,
      modes,
      nodes,
      members,
      positions: Float32Array.from({ length: points * 3 }, (_, i) => seed + i),
      shapes: Float32Array.from({ length: modes * points * 6 }, (_, i) => Math.sin(seed + i)),
    };
  });

describe('shapes file', () => {
  it('gives back what was written, names in any script included', () => {
    fc.assert(
      fc.property(someShapes, (shapes) => {
        expect(decodeShapes(encodeShapes(shapes))).toEqual(shapes);
      }),
      { seed: 1852 },
    );
  });

  it('holds its numbers as little-endian float32 after a header on an 8-byte boundary', () => {
    const bytes = encodeShapes({
      points: 1,
      modes: 0,
      nodes: ['foot'],
      members: [],
      positions: new Float32Array([1, -2, 0.5]),
      shapes: new Float32Array(0),
    });
    const view = new DataView(bytes.buffer);
    const headerBytes = view.getUint32(4, true);
    expect(headerBytes % 8).toBe(0);
    expect([0, 4, 8].map((at) => view.getFloat32(8 + headerBytes + at, true))).toEqual([
      1, -2, 0.5,
    ]);
  });

  it.each([
    ['nothing', new Uint8Array(0)],
    ['other bytes', new TextEncoder().encode('not a file of this kind')],
    [
      'a file cut short',
      encodeShapes({
        points: 1,
        modes: 1,
        nodes: ['foot'],
        members: [],
        positions: new Float32Array(3),
        shapes: new Float32Array(6),
      }).slice(0, -4),
    ],
  ])('refuses %s', (_, bytes) => {
    expect(() => decodeShapes(Uint8Array.from(bytes))).toThrow('mode shapes file');
  });
});
