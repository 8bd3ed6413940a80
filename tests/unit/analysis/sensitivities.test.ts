import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LiveFrame } from '#shared/analysis/LiveFrame.ts';
import { parametersOf, withParameter } from '#shared/analysis/sensitivity/Parameter.ts';
import type { Parameter } from '#shared/analysis/sensitivity/Parameter.ts';
import type { Sensitivities } from '#shared/analysis/sensitivity/sensitivities.ts';
import { solveSensitivities } from '#shared/analysis/sensitivity/solveSensitivities.ts';
import { SharedWork } from '#shared/analysis/SharedWork.ts';
import { solveMeshed } from '#shared/analysis/solveMeshed.ts';
import type { MassKind } from '#shared/frame/assembly/FrameModel.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { aCantilever, aStand } from '#tests/builders/aFrame.ts';
import { accepted, aLine } from '#tests/builders/aLine.ts';
import { randomFrame, SEED } from './properties/aRandomFrame.ts';

const STEPS = {
  clock: () => 0,
  progress: () => undefined,
  shouldStop: () => false,
  stopIfAsked: () => undefined,
};
function solve(document: FrameDocument, modes: number, massKind: MassKind = 'consistent') {
  return solveMeshed(document, massKind, { modes }, STEPS, new SharedWork());
}
function sensitivitiesOf(
  document: FrameDocument,
  modes: number,
  method: MassKind = 'consistent',
): Sensitivities {
  return solveSensitivities({ document, method, stateId: null, settings: { modes } });
}
function perUnit(result: Sensitivities, list: Parameter['list'], id: string, field: string) {
  const found = result.parameters.find(
    (one) => one.list === list && one.id === id && one.field === field,
  );
  if (!found) throw new Error(`No ${list} ${id} ${field}.`);
  return found.perUnit;
}

/** What a parameter's step is a share of: its own size, or a length of the frame. */
const sizeOf = ({ list, field, value }: Parameter) =>
  list === 'nodes' || field.startsWith('offset') ? 0.05 : Math.abs(value) > 0 ? Math.abs(value) : 1;

/**
 * df/dp of the elastic modes by central differences of whole solves, extrapolated once (Richardson): error h⁴ of
 * steps of 2e-3 and 1e-3, rounding 1e-12 over the step.
 */
function byDifferences(
  document: FrameDocument,
  parameter: Parameter,
  modes: number,
  massKind?: MassKind,
): number[] {
  const slope = (step: number): number[] => {
    const at = (value: number) => {
      const solved = solve(withParameter(document, parameter, value), modes, massKind);
      return solved.modes.slice(solved.rigidBodyModes).map(({ frequencyHz }) => frequencyHz);
    };
    const [high, low] = [at(parameter.value + step), at(parameter.value - step)];
    return high.map((hz, i) => (hz - low[i]!) / (2 * step));
  };
  const h = 2e-3 * sizeOf(parameter);
  const [coarse, fine] = [slope(h), slope(h / 2)];
  return fine.map((value, i) => value + (value - coarse[i]!) / 3);
}
/** Of the frequency, for a change of the parameter by its size: what the differences leave. */
const TOLERANCE = 1e-8;

function expectSlopes(
  result: Sensitivities,
  document: FrameDocument,
  parameters: readonly Parameter[],
  massKind?: MassKind,
): void {
  const modes = result.modes.at(-1)!;
  for (const parameter of parameters) {
    const { list, id, field } = parameter;
    const own = perUnit(result, list, id, field);
    byDifferences(document, parameter, modes, massKind).forEach((expected, i) => {
      const off = (Math.abs(own[i]! - expected) * sizeOf(parameter)) / result.frequenciesHz[i]!;
      expect(off, `${list} ${id} ${field}, mode ${result.modes[i]}`).toBeLessThan(TOLERANCE);
    });
  }
}

/** Hundreds of whole solves: more than the usual time on a busy machine [ms]. */
const PATIENCE = 60_000;

describe('sensitivities against central differences of whole solves', { timeout: PATIENCE }, () => {
  it('every number of a frame with everything in it', () => {
    const [input] = fc.sample(randomFrame, { numRuns: 1, seed: SEED });
    const document = accepted(input!);
    expectSlopes(sensitivitiesOf(document, 5), document, parametersOf(document));
  });

  it('of random frames, consistent and lumped', () => {
    fc.assert(
      fc.property(
        randomFrame,
        fc.constantFrom<MassKind>('consistent', 'lumped'),
        fc.integer({ min: 0, max: 1e6 }),
        (input, massKind, pick) => {
          const document = accepted(input);
          const all = parametersOf(document);
          const chosen = [0, 1, 2].map((k) => all[(pick + 29 * k) % all.length]!);
          expectSlopes(sensitivitiesOf(document, 4, massKind), document, chosen, massKind);
        },
      ),
      { numRuns: 20, seed: SEED },
    );
  });

  it.each(['round-tube', 'rectangular-tube', 'i-section', 'channel', 'angle'] as const)(
    'dimensions of a section, %s',
    (kind) => {
      const open = { width: 0.1, height: 0.14, web: 0.006, flange: 0.009, radius: 0.008 };
      const shape = {
        'round-tube': { kind: 'round-tube', diameter: 0.1, wall: 0.006 },
        'rectangular-tube': {
          kind: 'rectangular-tube',
          width: 0.08,
          height: 0.12,
          wall: 0.006,
          radius: 0.012,
        },
        'i-section': { kind: 'i-section', ...open },
        channel: { kind: 'channel', ...open },
        angle: { kind: 'angle', width: 0.08, height: 0.12, wall: 0.008, radius: 0.006 },
      } as const;
      const document = accepted(aStand({ divisions: 2, shape: shape[kind] }));
      const dimensions = parametersOf(document).filter(({ list }) => list === 'sections');
      expect(dimensions.length).toBeGreaterThan(1);
      expectSlopes(sensitivitiesOf(document, 4), document, dimensions);
    },
  );

  it('nodes of a rigid link that a foot holds somewhere else', () => {
    const input = aStand({ divisions: 2 });
    input.nodes.push({ id: 'pad', x: 0.05, y: -0.1, z: -0.08 });
    input.rigidLinks = [{ id: 'shoe', main: 'front left foot', others: ['pad'] }];
    input.supports[0] = { node: 'pad', fixed: ['u', 'v', 'w'] };
    const document = accepted(input);
    const moves = parametersOf(document).filter(
      ({ list, id }) => list === 'nodes' && (id === 'pad' || id === 'front left foot'),
    );
    expect(moves).toHaveLength(6);
    expectSlopes(sensitivitiesOf(document, 4), document, moves);
  });

  it('two sections, and two materials, of the same figures', () => {
    const input = aStand({ divisions: 2 });
    input.sections.push({ ...input.sections[0]!, id: 'rail tube' });
    input.materials.push({ ...input.materials[0]!, id: 'rail steel' });
    for (const member of input.members) {
      if (member.id.startsWith('rail')) member.section = 'rail tube';
      if (member.id.startsWith('cross')) member.material = 'rail steel';
    }
    const document = accepted(input);
    const chosen = parametersOf(document).filter(({ field }) => field === 'wall' || field === 'E');
    expect(chosen).toHaveLength(4);
    expectSlopes(sensitivitiesOf(document, 4), document, chosen);
  });

  it('elastic modes of a free frame', () => {
    const document = accepted({ ...aStand({ divisions: 2 }), supports: [] });
    const result = sensitivitiesOf(document, 9);
    expect(result.modes).toEqual([7, 8, 9]);
    const chosen = parametersOf(document).filter(
      ({ id, field }) => field === 'E' || field === 'mass' || (id === 'centre' && field === 'z'),
    );
    expect(chosen).toHaveLength(3);
    expectSlopes(result, document, chosen);
  });
});

describe('sensitivities against the laws of scale', () => {
  // f ∝ √(EI/m)/L² of a Bernoulli-Euler beam (Thomson, Theory of Vibration with Applications, App. D).
  const line = accepted(aLine({ ends: ['clamped', 'free'], divisions: 8 }));
  const result = sensitivitiesOf(line, 3);

  it.each<[Parameter['list'], string, string, number]>([
    ['materials', 'unit', 'E', 1 / 2],
    ['materials', 'unit', 'density', -1 / 2],
    ['sections', 'unit', 'Iy', 1 / 2],
    ['sections', 'unit', 'A', -1 / 2],
    ['members', 'line', 'massPerLength', -1 / 2],
    ['nodes', 'b', 'x', -2],
    ['nodes', 'a', 'x', 2],
  ])('%s %s %s', (list, id, field, power) => {
    perUnit(result, list, id, field).forEach((slope, i) => {
      // Every parameter is 1 or changes what is 1.
      expect(slope / result.frequenciesHz[i]!).toBeCloseTo(power, 9);
    });
  });

  it('parts a repeated frequency: of two equal planes one alone feels Iy', () => {
    const square = accepted(
      aCantilever({
        divisions: 4,
        theory: 'bernoulli',
        shape: { kind: 'custom', A: 1e-3, Iy: 1e-7, Iz: 1e-7, J: 2e-7, ky: 0.85, kz: 0.85 },
      }),
    );
    const found = sensitivitiesOf(square, 2);
    expect(found.repeated).toEqual([true, true]);
    const slopes = perUnit(found, 'sections', 'tube', 'Iy');
    expect(slopes[0]! * 1e-7).toBeCloseTo(0, 6);
    expect((slopes[1]! * 1e-7) / found.frequenciesHz[1]!).toBeCloseTo(0.5, 8);
  });
});

describe('the predicted effect of a finite change', () => {
  it.each([0.5, 0.8, 1.25, 2])('%f times a number, within the error it states', (factor) => {
    const input = aStand({ divisions: 2, shape: tube() });
    input.supports = input.supports.map(({ node }) => ({
      node,
      fixed: ['u', 'v', 'w'],
      stiffness: { rx: 1e6, ry: 1e6, rz: 1e6 },
    }));
    const document = accepted(input);
    const frame = new LiveFrame({ massKind: 'consistent', stateId: null, modes: 4 });
    frame.solve(document);
    const changes = parametersOf(document).filter(({ field }) =>
      ['wall', 'E', 'mass', 'stiffness.ry', 'offset.2'].includes(field),
    );
    expect(changes.length).toBeGreaterThan(5);
    for (const parameter of changes) {
      const changed = withParameter(document, parameter, factor * parameter.value);
      const predicted = frame.follow(changed, false);
      solve(changed, 4).modes.forEach(({ frequencyHz }, i) => {
        const off = Math.abs(predicted.frequenciesHz[i]! - frequencyHz);
        // 1e-9: rounding of both solves.
        expect(off, `${parameter.id} ${parameter.field}`).toBeLessThanOrEqual(
          predicted.errorsHz[i]! + 1e-9 * frequencyHz,
        );
      });
    }
  });
});

const tube = (): NonNullable<FrameInput['sections'][number]>['shape'] => ({
  kind: 'rectangular-tube',
  width: 0.08,
  height: 0.1,
  wall: 0.004,
  radius: 0.008,
});
