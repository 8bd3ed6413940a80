import { describe, expect, it } from 'vitest';
import { frameDocument } from '#shared/schemas/frameDocument.ts';
import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import { frameModel } from '#src/viewer/model/frameModel.ts';
import { modeScale, moveModel } from '#src/viewer/model/movedModel.ts';
import { aCantilever } from '#tests/builders/aFrame.ts';

/** A cantilever along X whose tip carries a mass 0.5 m above it. */
const model = frameModel(
  frameDocument.parse({
    ...aCantilever({ length: 1 }),
    masses: [{ id: 'motor', name: 'Motor', node: 'tip', mass: 50, offset: [0, 0, 0.5] }],
  }),
);

/** One mode in which the tip only turns about Y, by `ry`. */
const turning = (ry: number): ModeShapes => {
  const shapes = new Float32Array(2 * 6);
  shapes[6 + 4] = ry;
  return {
    points: 2,
    modes: 1,
    nodes: ['root', 'tip'],
    members: [],
    positions: new Float32Array([0, 0, 0, 1, 0, 0]),
    shapes,
  };
};

describe('a frame at one moment of a mode', () => {
  it('carries a mass with the rotation of its node: a turn about Y moves what is above along X', () => {
    const move = moveModel(model, { shapes: turning(0.2), mode: 0, amplitude: 0.1 });
    const [motor] = move(1).masses;
    // u = θ × r = (0, θ, 0) × (0, 0, 0.5) = (0.5 θ, 0, 0), drawn as the amplitude asked for.
    motor?.centre.forEach((value, i) => expect(value).toBeCloseTo([1.1, 0, 0.5][i] ?? NaN, 6));
    expect(motor?.node).toEqual([1, 0, 0]);
    expect(motor?.amount).toBeCloseTo(1, 6);
  });

  it('counts centres of gravity when it finds the largest displacement', () => {
    expect(modeScale(model, { shapes: turning(0.2), mode: 0, amplitude: 0.1 })).toBeCloseTo(1, 6);
  });

  it('swings to the other side half a turn later, and stands at rest between', () => {
    const move = moveModel(model, { shapes: turning(-3), mode: 0, amplitude: 0.1 });
    expect(move(1).masses[0]?.centre[0]).toBeCloseTo(0.9, 6);
    expect(move(-1).masses[0]?.centre[0]).toBeCloseTo(1.1, 6);
    expect(move(0).masses[0]?.centre).toEqual([1, 0, 0.5]);
  });

  it('stands still in a shape without motion', () => {
    const move = moveModel(model, { shapes: turning(0), mode: 0, amplitude: 0.1 });
    expect(move(1).masses[0]).toMatchObject({ centre: [1, 0, 0.5], amount: 0 });
  });
});
