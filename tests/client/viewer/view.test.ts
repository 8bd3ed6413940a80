import { describe, expect, it } from 'vitest';
import { frameDocument } from '#shared/schemas/frameDocument.ts';
import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import { createCameraStore } from '#src/viewer/camera/cameraStore.ts';
import { cameraKey } from '#src/viewer/camera/cameraKeys.ts';
import { NAMED_VIEWS } from '#src/viewer/camera/namedViews.ts';
import { makeProjection } from '#src/viewer/camera/projection.ts';
import { corners } from '#src/viewer/model/bounds.ts';
import { frameModel } from '#src/viewer/model/frameModel.ts';
import { roundLength } from '#src/viewer/overlay/drawMarks.ts';
import { placeBeside } from '#src/viewer/overlay/placeBeside.ts';
import { pick } from '#src/viewer/pick.ts';
import { pointUnder } from '#src/viewer/pointUnder.ts';
import { memberPlaces } from '#src/viewer/scene/memberPlaces.ts';
import { sampleMember } from '#src/viewer/scene/memberSamples.ts';

const SIZE = { width: 800, height: 600 };

const model = frameModel(
  frameDocument.parse({
    name: 'Portal',
    materials: [{ id: 'steel', name: 'Steel', E: 210e9, nu: 0.3, density: 7850 }],
    sections: [{ id: 's', name: 'Bar', shape: { kind: 'solid-round', diameter: 0.05 } }],
    nodes: [
      { id: 'a', x: 0, z: 0 },
      { id: 'b', x: 0, z: 1 },
      { id: 'c', x: 2, z: 1 },
      { id: 'd', x: 2, z: 0 },
    ],
    members: [
      { id: 'leg 1', kind: 'beam', start: 'a', end: 'b', material: 'steel', section: 's' },
      { id: 'rail', kind: 'beam', start: 'b', end: 'c', material: 'steel', section: 's' },
      { id: 'leg 2', kind: 'beam', start: 'd', end: 'c', material: 'steel', section: 's' },
      { id: 'lost', kind: 'beam', start: 'd', end: 'nowhere', material: 'steel', section: 's' },
    ],
    supports: [{ node: 'a', fixed: ['u', 'v', 'w', 'rx', 'ry', 'rz'] }],
    masses: [{ id: 'motor', name: 'Motor', node: 'c', mass: 30, offset: [0, 0, 0.4] }],
  }),
);

/** Looking from the front, 1 m = 200 px, the point (1, 0, 0.5) in the middle. */
const fromFront = () =>
  createCameraStore({ target: [1, 0, 0.5], azimuth: 0, elevation: 0, span: 3 });

describe('projection', () => {
  it('shows X to the right and Z up from the front, Y to the right from the right', () => {
    const front = makeProjection(fromFront().get(), SIZE);
    expect(front.project([2, 0, 0.5])).toMatchObject({ x: 600, y: 300 });
    expect(front.project([1, 0, 1.5])).toMatchObject({ x: 400, y: 100 });
    expect(front.project([1, -1, 0.5]).depth).toBeCloseTo(1);
    const camera = fromFront();
    camera.look(NAMED_VIEWS.find(({ name }) => name === 'Right')!);
    const right = makeProjection(camera.get(), SIZE);
    expect(right.project([1, 1, 0.5]).x).toBeCloseTo(600);
    expect(right.project([2, 0, 0.5]).depth).toBeCloseTo(1);
  });

  it('keeps X to the right and Y up seen from the top', () => {
    const camera = fromFront();
    camera.look(NAMED_VIEWS.find(({ name }) => name === 'Top')!);
    const top = makeProjection(camera.get(), SIZE);
    expect(top.project([2, 0, 0.5]).x).toBeCloseTo(600);
    expect(top.project([1, 1, 0.5]).y).toBeCloseTo(100);
  });

  it.each(NAMED_VIEWS)('fits the whole frame in the view: $name', (view) => {
    const camera = fromFront();
    camera.look(view);
    camera.fit(model.bounds, SIZE);
    const projection = makeProjection(camera.get(), SIZE);
    for (const corner of corners(model.bounds)) {
      const { x, y } = projection.project(corner);
      expect(x).toBeGreaterThan(40);
      expect(x).toBeLessThan(760);
      expect(y).toBeGreaterThan(40);
      expect(y).toBeLessThan(560);
    }
  });

  it('keeps what is under the pointer there while zooming', () => {
    const camera = fromFront();
    const before = makeProjection(camera.get(), SIZE).project([2, 0, 1]);
    camera.zoom(0.5, { dx: before.x - 400, dy: before.y - 300, size: SIZE });
    const after = makeProjection(camera.get(), SIZE).project([2, 0, 1]);
    expect(after.x).toBeCloseTo(before.x);
    expect(after.y).toBeCloseTo(before.y);
  });

  it('moves the frame with the pointer', () => {
    const camera = fromFront();
    camera.pan(50, -20, SIZE);
    const { x, y } = makeProjection(camera.get(), SIZE).project([1, 0, 0.5]);
    expect(x).toBeCloseTo(450);
    expect(y).toBeCloseTo(280);
  });

  it('takes every key of the view and no other', () => {
    const camera = fromFront();
    const press = (key: string, shiftKey = false) =>
      cameraKey({ key, shiftKey }, camera, model.bounds, SIZE);
    expect(press('ArrowLeft')).toBe(true);
    expect(camera.get().azimuth).toBeGreaterThan(0);
    expect(press('+')).toBe(true);
    expect(camera.get().span).toBeCloseTo(2.5);
    expect(press('ArrowRight', true)).toBe(true);
    expect(camera.get().target).not.toEqual([1, 0, 0.5]);
    expect(press('f')).toBe(true);
    expect(camera.get().target).toEqual([1, 0, 0.7]);
    expect(press('Enter')).toBe(false);
  });
});

describe('pick', () => {
  const projection = makeProjection(fromFront().get(), SIZE);
  it('hits a thin member up to 12 px beside it and nothing farther off', () => {
    expect(pick(model, projection, 400, 211)).toEqual({ list: 'members', id: 'rail' });
    expect(pick(model, projection, 400, 214)).toBeNull();
  });

  it('prefers the node where members meet, the mass above it, the support below', () => {
    expect(pick(model, projection, 203, 203)).toEqual({ list: 'nodes', id: 'b' });
    expect(pick(model, projection, 600, 120)).toEqual({ list: 'masses', id: 'motor' });
    expect(pick(model, projection, 200, 416)).toEqual({ list: 'supports', id: 'a' });
  });

  it('takes the nearer of two members that cover each other', () => {
    const camera = fromFront();
    camera.look(NAMED_VIEWS.find(({ name }) => name === 'Right')!);
    const right = makeProjection(camera.get(), SIZE);
    const { x, y } = right.project([2, 0, 0.5]);
    expect(pick(model, right, x, y)).toEqual({ list: 'members', id: 'leg 2' });
  });
});

describe('pointUnder', () => {
  const projection = makeProjection(fromFront().get(), SIZE);
  const pointing = { plane: { axis: 1 as const, at: 0.25 }, step: 0.1, from: null };
  it('takes a node that is there, else the nearest grid point of the plane', () => {
    expect(pointUnder(model, projection, 204, 204, pointing)).toEqual({
      at: [0, 0, 1],
      node: 'b',
    });
    const free = pointUnder(model, projection, 413, 300, pointing);
    expect(free).toEqual({ at: [1.1, 0.25, 0.5], node: null });
  });

  it('gives nothing on a plane seen edge on', () => {
    const level = { ...pointing, plane: { axis: 2 as const, at: 0 } };
    expect(pointUnder(model, projection, 413, 300, level)).toBeNull();
  });
});

describe('what is drawn', () => {
  it('places a prism of length 1 on the member, its height along global Z', () => {
    const rail = model.members.filter(({ member }) => member.id === 'rail');
    const [m] = [memberPlaces(rail)];
    expect([...m.subarray(0, 3)]).toEqual([2, 0, 0]);
    expect([...m.subarray(8, 11)]).toEqual([0, 0, 1]);
    expect([...m.subarray(12, 16)]).toEqual([0, 0, 1, 1]);
  });

  it('bends between stations as the beam of Bernoulli and Euler does', () => {
    // Cantilever with a tip load: w = t²(3 − t)/2, slope 3t(2 − t)/2 (textbook); rotation ry = −w′.
    const shapes: ModeShapes = {
      nodes: [],
      members: [{ id: 'm', first: 0, count: 2 }],
      points: 2,
      modes: 1,
      positions: new Float32Array([0, 0, 0, 1, 0, 0]),
      shapes: new Float32Array([0, 0, 0, 0, 0, 0, 0, 0, 1, 0, -1.5, 0]),
    };
    const samples = sampleMember(shapes, 0, shapes.members[0]!, 0.1);
    for (let s = 0; s < samples.count; s += 1) {
      const t = s / (samples.count - 1);
      expect(samples.position[3 * s]).toBeCloseTo(t, 6);
      expect(samples.swing[3 * s + 2]).toBeCloseTo((0.1 * t * t * (3 - t)) / 2, 6);
    }
  });

  it('stretches straight between stations', () => {
    const shapes: ModeShapes = {
      nodes: [],
      members: [{ id: 'm', first: 0, count: 2 }],
      points: 2,
      modes: 1,
      positions: new Float32Array([0, 0, 0, 0, 0, 2]),
      shapes: new Float32Array([0, 0, 1, 0, 0, 0, 0, 0, 3, 0, 0, 0]),
    };
    const { swing, count } = sampleMember(shapes, 0, shapes.members[0]!, 1);
    for (let s = 0; s < count; s += 1) {
      expect(swing[3 * s + 2]).toBeCloseTo(1 + (2 * s) / (count - 1), 6);
    }
  });

  it('opens details beside the thing and inside the view', () => {
    const panel = { width: 300, height: 400 };
    expect(placeBeside({ x: 100, y: 300 }, panel, SIZE).x).toBeGreaterThan(100);
    expect(placeBeside({ x: 700, y: 300 }, panel, SIZE).x).toBeLessThan(700 - panel.width);
    expect(placeBeside({ x: 100, y: 590 }, panel, SIZE).y).toBe(192);
  });

  it('takes round lengths for the bar', () => {
    expect([0.37, 0.5, 7.2, 0.021].map(roundLength)).toEqual([0.2, 0.5, 5, 0.02]);
  });
});
