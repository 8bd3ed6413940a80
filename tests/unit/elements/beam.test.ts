import { describe, expect, it } from 'vitest';
import { beamConsistentMass, beamLumpedMass } from '#shared/frame/elements/beamMass.ts';
import type { BeamProperties } from '#shared/frame/elements/beamProperties.ts';
import {
  beamDeformations,
  beamRigidity,
  beamStiffness,
} from '#shared/frame/elements/beamStiffness.ts';

const L = 1.7;
const PROPERTIES: BeamProperties = {
  E: 210e9,
  G: 81e9,
  rho: 7850,
  A: 2e-3,
  Iy: 3e-6,
  Iz: 1e-6,
  Iyz: 0.4e-6,
  J: 2e-6,
  ky: 0.6,
  kz: 0.4,
  massPerLength: 3,
  theory: 'timoshenko',
};
const BERNOULLI: BeamProperties = { ...PROPERTIES, Iyz: 0, massPerLength: 0, theory: 'bernoulli' };
const STRAIGHT: BeamProperties = { ...PROPERTIES, Iyz: 0, massPerLength: 0 };

/** Displacements of both ends in a rigid motion: translation t and rotation ω about the start. */
function rigid(t: readonly number[], omega: readonly number[]): Float64Array {
  const [tx, ty, tz] = t as [number, number, number];
  const [rx, ry, rz] = omega as [number, number, number];
  return Float64Array.of(tx, ty, tz, rx, ry, rz, tx, ty + rz * L, tz - ry * L, rx, ry, rz);
}

const AXES = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
] as const;
const RIGID = [
  ...AXES.map((axis) => rigid(axis, [0, 0, 0])),
  ...AXES.map((axis) => rigid([0, 0, 0], axis)),
];

function quadratic(m: Float64Array, a: Float64Array, b = a): number {
  let sum = 0;
  for (let i = 0; i < 12; i++) for (let j = 0; j < 12; j++) sum += a[i]! * m[i * 12 + j]! * b[j]!;
  return sum;
}

const at = (m: Float64Array, i: number, j: number) => m[i * 12 + j]!;

describe('beam element', () => {
  it.each(['timoshenko', 'bernoulli'] as const)(
    'stores nothing in a rigid motion (%s)',
    (theory) => {
      const rigidity = beamRigidity({ ...PROPERTIES, theory }, L);
      const k = beamStiffness(rigidity, L);
      const largest = Math.max(...k);
      const g = new Float64Array(6);
      for (const d of RIGID) {
        beamDeformations(d, L, g);
        expect(Math.max(...g.map(Math.abs))).toBeLessThan(1e-15);
        for (let i = 0; i < 12; i++) {
          const force = k
            .subarray(i * 12, i * 12 + 12)
            .reduce((sum, kij, j) => sum + kij * d[j]!, 0);
          expect(Math.abs(force)).toBeLessThan(1e-14 * largest);
        }
      }
    },
  );

  it('has the stiffness of Friedman and Kosmatka 1993, eq. (16), in either plane', () => {
    const { E, G, A, Iy, Iz, ky, kz } = STRAIGHT;
    const k = beamStiffness(beamRigidity(STRAIGHT, L), L);
    const planes = [
      { I: Iz, kappa: ky, w: 1, r: 5, sign: 1 },
      { I: Iy, kappa: kz, w: 2, r: 4, sign: -1 },
    ];
    for (const { I, kappa, w, r, sign } of planes) {
      const phi = (12 * E * I) / (kappa * G * A * L * L);
      const c = (E * I) / (L ** 3 * (1 + phi));
      expect(at(k, w, w)).toBeCloseTo(12 * c, 3);
      expect(at(k, w, w + 6)).toBeCloseTo(-12 * c, 3);
      expect(at(k, w, r)).toBeCloseTo(sign * 6 * L * c, 3);
      expect(at(k, r, r)).toBeCloseTo((4 + phi) * L * L * c, 3);
      expect(at(k, r, r + 6)).toBeCloseTo((2 - phi) * L * L * c, 3);
    }
    expect(at(k, 0, 0)).toBeCloseTo((E * A) / L, 3);
    expect(at(k, 3, 9)).toBeCloseTo((-G * STRAIGHT.J) / L, 3);
  });

  it('has the Hermite mass matrix in Bernoulli theory (Thomson, Theory of Vibration, §10.4)', () => {
    const m = beamConsistentMass(BERNOULLI, L);
    const unit = (BERNOULLI.rho * BERNOULLI.A * L) / 420;
    expect(at(m, 2, 2) / unit).toBeCloseTo(156, 10);
    expect(at(m, 2, 8) / unit).toBeCloseTo(54, 10);
    expect(at(m, 2, 4) / unit).toBeCloseTo(-22 * L, 10);
    expect(at(m, 2, 10) / unit).toBeCloseTo(13 * L, 10);
    expect(at(m, 4, 4) / unit).toBeCloseTo(4 * L * L, 10);
    expect(at(m, 4, 10) / unit).toBeCloseTo(-3 * L * L, 10);
    expect(at(m, 1, 5) / unit).toBeCloseTo(22 * L, 10);
    expect(at(m, 0, 6) / unit).toBeCloseTo(70, 10);
    const polar = (BERNOULLI.rho * (BERNOULLI.Iy + BERNOULLI.Iz) * L) / 6;
    expect(at(m, 3, 9) / polar).toBeCloseTo(1, 12);
  });

  it('has the mass of Friedman and Kosmatka 1993, eq. (18) and (19), translation and rotary inertia', () => {
    const { E, G, A, Iz, ky, rho } = STRAIGHT;
    const m = beamConsistentMass(STRAIGHT, L);
    const phi = (12 * E * Iz) / (ky * G * A * L * L);
    const translation = (rho * A * L) / (210 * (1 + phi) ** 2);
    const rotary = (rho * Iz) / (30 * L * (1 + phi) ** 2);
    expect(at(m, 1, 1)).toBeCloseTo(
      translation * (70 * phi * phi + 147 * phi + 78) + rotary * 36,
      10,
    );
    expect(at(m, 5, 5)).toBeCloseTo(
      (translation * L * L * (7 * phi * phi + 14 * phi + 8)) / 4 +
        rotary * L * L * (10 * phi * phi + 5 * phi + 4),
      10,
    );
  });

  it.each([
    ['consistent', beamConsistentMass],
    ['lumped', beamLumpedMass],
  ] as const)('carries its whole mass in every translation (%s)', (_, massOf) => {
    const total = (PROPERTIES.rho * PROPERTIES.A + PROPERTIES.massPerLength) * L;
    for (const d of RIGID.slice(0, 3)) {
      expect(quadratic(massOf(PROPERTIES, L), d) / total).toBeCloseTo(1, 12);
    }
  });

  it('has the moments of inertia of a solid rod when it turns about its start', () => {
    const m = beamConsistentMass(PROPERTIES, L);
    const perLength = PROPERTIES.rho * PROPERTIES.A + PROPERTIES.massPerLength;
    const expected = (I: number) => (perLength * L ** 3) / 3 + PROPERTIES.rho * I * L;
    expect(quadratic(m, RIGID[4]!) / expected(PROPERTIES.Iy)).toBeCloseTo(1, 12);
    expect(quadratic(m, RIGID[5]!) / expected(PROPERTIES.Iz)).toBeCloseTo(1, 12);
  });

  it('bends alike whether Iyz is stated or the section is turned to its principal axes', () => {
    // κ equal in both directions, so that turning the axes leaves the shear stiffness as it is.
    const isotropic = { ...PROPERTIES, ky: 0.5, kz: 0.5 };
    const { Iy, Iz, Iyz } = isotropic;
    const mean = (Iy + Iz) / 2;
    const radius = Math.hypot((Iy - Iz) / 2, Iyz);
    const principal = { ...isotropic, Iy: mean + radius, Iz: mean - radius, Iyz: 0 };
    // ∫y'z' dA vanishes when z' is turned from z towards y by half of atan2(2Iyz, Iy − Iz).
    const alpha = 0.5 * Math.atan2(2 * Iyz, Iy - Iz);
    const [cos, sin] = [Math.cos(alpha), Math.sin(alpha)];
    const d = Float64Array.from({ length: 12 }, (_, i) => Math.sin(3 * i + 1));
    const turned = d.slice();
    for (const i of [1, 4, 7, 10]) {
      turned[i] = cos * d[i]! - sin * d[i + 1]!;
      turned[i + 1] = sin * d[i]! + cos * d[i + 1]!;
    }
    for (const matrix of [
      (p: BeamProperties) => beamStiffness(beamRigidity(p, L), L),
      (p: BeamProperties) => beamConsistentMass(p, L),
    ]) {
      const stated = quadratic(matrix(isotropic), d);
      expect(quadratic(matrix(principal), turned) / stated).toBeCloseTo(1, 12);
    }
  });
});
