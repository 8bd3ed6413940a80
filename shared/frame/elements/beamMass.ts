import { bendingInertia } from './beamProperties.ts';
import type { BeamProperties } from './beamProperties.ts';
import { beamDeformationRows } from './beamStiffness.ts';

/** Gauss-Legendre points and weights of order 4 on −1 … 1: exact to degree 7; the integrand has degree 6. */
const INNER = Math.sqrt(3 / 7 - (2 / 7) * Math.sqrt(6 / 5));
const OUTER = Math.sqrt(3 / 7 + (2 / 7) * Math.sqrt(6 / 5));
const GAUSS = [
  [-OUTER, (18 - Math.sqrt(30)) / 36],
  [-INNER, (18 + Math.sqrt(30)) / 36],
  [INNER, (18 + Math.sqrt(30)) / 36],
  [OUTER, (18 - Math.sqrt(30)) / 36],
] as const;

/**
 * (I + Φ)⁻¹ with Φ = (12 / L²) S⁻¹ B over the planes (v, w), row by row; Φ = 0 for Bernoulli-Euler.
 * Φ is not symmetric where Iyz and unlike shear coefficients meet.
 */
function swayShare(properties: BeamProperties, length: number): [number, number, number, number] {
  const { E, G, A, ky, kz, theory } = properties;
  if (theory === 'bernoulli') return [1, 0, 0, 1];
  const I = bendingInertia(properties);
  const factor = (12 * E) / (G * A * length * length);
  const a = 1 + (factor * I.vv) / ky;
  const b = (factor * I.vw) / ky;
  const c = (factor * I.vw) / kz;
  const d = 1 + (factor * I.ww) / kz;
  const determinant = a * d - b * c;
  return [d / determinant, -b / determinant, -c / determinant, a / determinant];
}

/**
 * Consistent mass matrix of a beam, 12×12 in member axes [kg, kg·m, kg·m²]:
 *   m = ∫ Nᵀ diag(m̄, m̄, m̄, ρ(Iy + Iz), ρ[Iz Iyz; Iyz Iy]) N dx
 * over u, v, w, twist and the slopes ψv, ψw, with m̄ = ρA + massPerLength. u and twist are linear. With ξ
 * from −1 to 1, δ the difference of the end slopes, s their mean relative to the chord and
 * c = (3/2)(I + Φ)⁻¹ s, the bending interpolation is
 *   v = chord + (L/2)[δ(ξ² − 1)/4 + c(ξ³ − ξ)/3],   ψ = chord slope + s + δξ/2 + c(ξ² − 1)
 * which is the interdependent one of Friedman and Kosmatka 1993, eqs. (12)–(15), in both planes at once; with
 * Φ = 0 it is the Hermite cubic. Rotary inertia of bending is left out for Bernoulli-Euler.
 */
export function beamConsistentMass(properties: BeamProperties, length: number): Float64Array {
  const { rho, A, massPerLength, theory } = properties;
  const I = bendingInertia(properties);
  const perLength = rho * A + massPerLength;
  const polar = rho * (I.vv + I.ww);
  const rotary = theory === 'timoshenko' ? rho : 0;
  const G = beamDeformationRows(length);
  const C = swayShare(properties, length);
  const N = new Float64Array(6 * 12);
  const m = new Float64Array(144);
  for (const [xi, weight] of GAUSS) {
    const atStart = (1 - xi) / 2;
    const atEnd = (1 + xi) / 2;
    N.fill(0);
    N[0] = atStart;
    N[6] = atEnd;
    N[12 + 1] = atStart;
    N[12 + 7] = atEnd;
    N[24 + 2] = atStart;
    N[24 + 8] = atEnd;
    N[36 + 3] = atStart;
    N[36 + 9] = atEnd;
    N[48 + 1] = N[60 + 2] = -1 / length;
    N[48 + 7] = N[60 + 8] = 1 / length;
    for (let j = 0; j < 12; j++) {
      for (const plane of [0, 1] as const) {
        const difference = G[(2 + plane) * 12 + j]!;
        const mean = G[(4 + plane) * 12 + j]!;
        const c = 1.5 * (C[2 * plane]! * G[4 * 12 + j]! + C[2 * plane + 1]! * G[5 * 12 + j]!);
        const deflection = (difference * (xi * xi - 1)) / 4 + (c * (xi * xi * xi - xi)) / 3;
        N[(1 + plane) * 12 + j]! += 0.5 * length * deflection;
        N[(4 + plane) * 12 + j]! += mean + 0.5 * difference * xi + c * (xi * xi - 1);
      }
    }
    const dx = 0.5 * length * weight;
    for (let i = 0; i < 12; i++) {
      for (let j = 0; j < 12; j++) {
        const psiV = N[48 + i]!;
        const psiW = N[60 + i]!;
        m[i * 12 + j]! +=
          dx *
          (perLength * (N[i]! * N[j]! + N[12 + i]! * N[12 + j]! + N[24 + i]! * N[24 + j]!) +
            polar * N[36 + i]! * N[36 + j]! +
            rotary *
              (psiV * (I.vv * N[48 + j]! + I.vw * N[60 + j]!) +
                psiW * (I.vw * N[48 + j]! + I.ww * N[60 + j]!)));
      }
    }
  }
  return m;
}

/**
 * Lumped mass matrix of a beam, 12×12 diagonal in member axes: half the mass at each end in the three
 * translations [kg], half ρ(Iy + Iz)L at each end about the member's own axis [kg·m²], nothing in the
 * bending rotations.
 */
export function beamLumpedMass(properties: BeamProperties, length: number): Float64Array {
  const { rho, A, Iy, Iz, massPerLength } = properties;
  const m = new Float64Array(144);
  const half = 0.5 * (rho * A + massPerLength) * length;
  for (const end of [0, 6]) {
    for (let i = 0; i < 3; i++) m[(end + i) * 13] = half;
    m[(end + 3) * 13] = 0.5 * rho * (Iy + Iz) * length;
  }
  return m;
}
