import { describe, expect, it } from 'vitest';
import { frameDocument } from '#shared/schemas/frameDocument.ts';
import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import { modePicture, tiesOf } from '#src/features/modes/state/modePicture.ts';

/** A post along Z in the X–Z plane whose tip moves along X: foot, then stations at 0, 1 and 2 m. */
const post = (tip: number): ModeShapes => {
  const shapes = new Float32Array(4 * 6);
  shapes[2 * 6] = tip / 2;
  shapes[3 * 6] = tip;
  return {
    points: 4,
    modes: 1,
    nodes: ['foot'],
    members: [{ id: 'post', first: 1, count: 3 }],
    positions: new Float32Array([0, 0, 0, 0, 0, 0, 0, 0, 1, 0, 0, 2]),
    shapes,
  };
};

describe('small picture of a mode', () => {
  it('looks at a plane frame straight from the front, Z upwards', () => {
    const { still } = modePicture(post(1), 0, 200, 100);
    expect(still[2]).toBeCloseTo(still[6] ?? NaN, 4);
    expect(still[7]).toBeLessThan(still[3] ?? NaN);
  });

  it('keeps the frame, swung either way, inside the picture', () => {
    const { still, swing } = modePicture(post(1), 0, 200, 100);
    for (const factor of [-1, 0, 1]) {
      for (let i = 0; i < still.length; i += 2) {
        const x = (still[i] ?? 0) + factor * (swing[i] ?? 0);
        const y = (still[i + 1] ?? 0) + factor * (swing[i + 1] ?? 0);
        expect(x).toBeGreaterThanOrEqual(0);
        expect(x).toBeLessThanOrEqual(200);
        expect(y).toBeGreaterThanOrEqual(0);
        expect(y).toBeLessThanOrEqual(100);
      }
    }
  });

  it('draws the same swing whatever the scale of the shape: a shape is not an amplitude', () => {
    const small = modePicture(post(1e-4), 0, 200, 100);
    const large = modePicture(post(30), 0, 200, 100);
    small.swing.forEach((value, i) => expect(value).toBeCloseTo(large.swing[i] ?? NaN, 3));
  });

  it('gives more ink where the frame moves more', () => {
    const { segments } = modePicture(post(1), 0, 200, 100);
    expect([segments[2], segments[5]]).toEqual([1, 3]);
  });

  it('draws links and springs too, and leaves out those that lead nowhere', () => {
    const document = frameDocument.parse({
      name: 'Post',
      springs: [
        { id: 'mount', start: 'foot', end: 'head', stiffness: { w: 1 } },
        { id: 'loose', start: 'foot', end: 'nowhere', stiffness: { w: 1 } },
      ],
      rigidLinks: [{ id: 'casting', main: 'head', others: ['foot'] }],
    });
    const ties = tiesOf(document, { ...post(1), nodes: ['foot', 'head'] });
    expect(ties).toEqual([
      [0, 1],
      [1, 0],
    ]);
    expect(modePicture(post(1), 0, 200, 100, ties).segments.length).toBe(3 * (2 + 2));
  });

  it('stands still where nothing moves', () => {
    const { swing } = modePicture(post(0), 0, 200, 100);
    expect([...swing].every((value) => value === 0)).toBe(true);
  });
});
