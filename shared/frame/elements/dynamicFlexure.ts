import { halfWavesBelow } from './DynamicElement.ts';
import type { DynamicElement, MotionIntegrals } from './DynamicElement.ts';
import { flexuralWave, flexuralWaves } from './flexuralWaves.ts';
import type { FlexuralWaves } from './flexuralWaves.ts';
import { integrate } from './gaussPanels.ts';

export interface FlexureProperties {
  /** EI [N·m²] of the plane. */
  readonly bending: number;
  /** κGA [N]; Infinity leaves shear strain out (Bernoulli-Euler). */
  readonly shear: number;
  /** Mass per length, translation [kg/m]; rotary inertia per length ρI [kg·m], 0 for Bernoulli-Euler. */
  readonly mass: number;
  readonly inertia: number;
  /** [m] */
  readonly length: number;
}

/** Rows of one even or odd family at an end: what its two functions displace and what they meet. */
interface EndMatrix {
  /** [w₁ w₂; ψ₁ ψ₂]⁻¹, row by row. */
  readonly inverse: readonly [number, number, number, number];
  /** Force and moment of either function. */
  readonly Q: readonly [number, number];
  readonly M: readonly [number, number];
}

/**
 * A beam in bending in one principal plane, over deflection and slope at its start, then at its end
 * (w₁ ψ₁ w₂ ψ₂): Timoshenko theory, or Bernoulli-Euler with no shear strain and no rotary inertia.
 *
 * Split into motions even and odd about the middle, each has a 2×2 dynamic stiffness that is linear in the
 * hyperbolic functions, so nothing overflows or cancels at high frequency; see `flexuralWaves` for low ones.
 * J₀ follows Howson and Williams: with the ends pinned instead of clamped the frequencies are known, nπ < β for
 * the first spectrum and nπ < |α|, n from 0, for the second once it travels; clamping both slopes takes away
 * one for every negative eigenvalue of the slope stiffness.
 * Source: Howson and Williams 1973, J. Sound Vib. 26(4), 503–515; Wittrick and Williams 1971.
 */
export function dynamicFlexure(properties: FlexureProperties): DynamicElement {
  const { bending, shear, mass, inertia, length } = properties;
  const slowness = length * length * Math.sqrt(mass / bending);
  const r2 = inertia / (mass * length * length);
  const s2 = bending / (shear * length * length);
  const atEnd = new Float64Array(16);
  const at = new Float64Array(16);

  return {
    rows: 4,
    twists: false,
    stiffness(omega, k) {
      const waves = flexuralWaves(slowness * omega, r2, s2);
      flexuralWave(waves, 0.5, atEnd);
      const even = halfStiffness(endMatrix(atEnd, 0));
      const odd = halfStiffness(endMatrix(atEnd, 8));
      setFromHalves(k, even, odd, bending / length, length);
      return pinnedBelow(waves) - (even[2] < 0 ? 1 : 0) - (odd[2] < 0 ? 1 : 0);
    },
    mass(omega, m) {
      const waves = flexuralWaves(slowness * omega, r2, s2);
      flexuralWave(waves, 0.5, atEnd);
      const gram = massGram(waves, r2, at);
      const even = halfMass(endMatrix(atEnd, 0).inverse, gram, 0);
      const odd = halfMass(endMatrix(atEnd, 8).inverse, gram, 3);
      setFromHalves(m, even, odd, mass * length ** 3, length);
    },
    integrals(omega): MotionIntegrals {
      const waves = flexuralWaves(slowness * omega, r2, s2);
      const m = new Float64Array(16);
      this.mass(omega, m);
      flexuralWave(waves, 0.5, atEnd);
      const even = amplitudes(endMatrix(atEnd, 0).inverse, length, 1);
      const odd = amplitudes(endMatrix(atEnd, 8).inverse, length, -1);
      const gram = new Float64Array(6);
      // Per function: ∫ w over the even, ∫ w ξ and ∫ ψ over the odd ones.
      const sums = new Float64Array(6);
      integrate(0.5, 0.5 * Math.sqrt(waves.e), (xi, weight) => {
        flexuralWave(waves, xi, at);
        for (let family = 0; family < 2; family++) {
          const from = family * 8;
          for (let i = 0; i < 2; i++) {
            const first = from + 4 * i;
            for (let j = i; j < 2; j++) {
              const second = from + 4 * j;
              gram[family * 3 + i + j]! +=
                2 *
                weight *
                (at[first + 2]! * at[second + 2]! + s2 * at[first + 3]! * at[second + 3]!);
            }
          }
        }
        for (let i = 0; i < 2; i++) {
          sums[i]! += 2 * weight * at[4 * i]!;
          sums[2 + i]! += 2 * weight * at[8 + 4 * i]! * xi;
          sums[4 + i]! += 2 * weight * at[8 + 4 * i + 1]!;
        }
      });
      const strain = new Float64Array(16);
      setStrain(strain, 0, even, gram.subarray(0, 3), bending / length);
      setStrain(strain, 8, odd, gram.subarray(3), bending / length);
      const momenta = new Float64Array(12);
      for (let d = 0; d < 4; d++) {
        const line = mass * length * length;
        momenta[d] = line * (sums[0]! * even[d]! + sums[1]! * even[4 + d]!);
        momenta[4 + d] = line * length * (sums[2]! * odd[d]! + sums[3]! * odd[4 + d]!);
        momenta[8 + d] = inertia * length * (sums[4]! * odd[d]! + sums[5]! * odd[4 + d]!);
      }
      return { mass: m, strain, momenta };
    },
    shape(omega, xi, N) {
      const waves = flexuralWaves(slowness * omega, r2, s2);
      flexuralWave(waves, 0.5, atEnd);
      const even = amplitudes(endMatrix(atEnd, 0).inverse, length, 1);
      const odd = amplitudes(endMatrix(atEnd, 8).inverse, length, -1);
      flexuralWave(waves, xi, at);
      for (let value = 0; value < 2; value++) {
        const unit = value === 0 ? length : 1;
        for (let d = 0; d < 4; d++) {
          N[value * 4 + d] =
            unit *
            (at[value]! * even[d]! +
              at[4 + value]! * even[4 + d]! +
              at[8 + value]! * odd[d]! +
              at[12 + value]! * odd[4 + d]!);
        }
      }
    },
  };
}

/** ∫ w² + r²ψ² of each family's two functions from the middle to the end: 11, 12, 22 of the even, of the odd. */
function massGram(waves: FlexuralWaves, r2: number, at: Float64Array): Float64Array {
  const gram = new Float64Array(6);
  integrate(0.5, 0.5 * Math.sqrt(waves.e), (xi, weight) => {
    flexuralWave(waves, xi, at);
    for (let family = 0; family < 2; family++) {
      const w1 = at[family * 8]!;
      const psi1 = at[family * 8 + 1]!;
      const w2 = at[family * 8 + 4]!;
      const psi2 = at[family * 8 + 5]!;
      gram[family * 3]! += weight * (w1 * w1 + r2 * psi1 * psi1);
      gram[family * 3 + 1]! += weight * (w1 * w2 + r2 * psi1 * psi2);
      gram[family * 3 + 2]! += weight * (w2 * w2 + r2 * psi2 * psi2);
    }
  });
  return gram;
}

function halfMass([a, b, c, d]: EndMatrix['inverse'], gram: Float64Array, from: number) {
  const p = gram[from]!;
  const q = gram[from + 1]!;
  const r = gram[from + 2]!;
  return [
    p * a * a + 2 * q * a * c + r * c * c,
    p * a * b + q * (a * d + b * c) + r * c * d,
    p * b * b + 2 * q * b * d + r * d * d,
  ] as const;
}

/**
 * Amplitudes of a family's two functions for unit displacements of the ends, 2 × 4: an even motion (1) has
 * (w₂ + w₁)/2L and (ψ₂ − ψ₁)/2 at the end, an odd one (−1) has (w₂ − w₁)/2L and (ψ₂ + ψ₁)/2.
 */
function amplitudes(
  [a, b, c, d]: EndMatrix['inverse'],
  length: number,
  parity: 1 | -1,
): Float64Array {
  const w = 0.5 / length;
  return Float64Array.of(
    ...[parity * a * w, -parity * b * 0.5, a * w, b * 0.5],
    ...[parity * c * w, -parity * d * 0.5, c * w, d * 0.5],
  );
}

/** Two rows of R: p a₁² + 2q a₁a₂ + r a₂² = r (a₂ + q/r a₁)² + (p − q²/r) a₁²; a rigid function has p = 0. */
function setStrain(
  R: Float64Array,
  from: number,
  amplitude: Float64Array,
  [p, q, r]: Float64Array,
  unit: number,
): void {
  const share = q! / r!;
  const outer = Math.sqrt(unit * r!);
  const inner = Math.sqrt(unit * Math.max(p! - q! * share, 0));
  for (let d = 0; d < 4; d++) {
    R[from + d] = outer * (amplitude[4 + d]! + share * amplitude[d]!);
    R[from + 4 + d] = inner * amplitude[d]!;
  }
}

/** Natural frequencies below ω of the piece with both ends pinned. */
function pinnedBelow({ a, e }: FlexuralWaves): number {
  const second = a < 0 ? 1 + halfWavesBelow(Math.sqrt(-a)) : 0;
  return halfWavesBelow(Math.sqrt(e)) + second;
}

function endMatrix(at: Float64Array, from: number): EndMatrix {
  const w1 = at[from]!;
  const psi1 = at[from + 1]!;
  const w2 = at[from + 4]!;
  const psi2 = at[from + 5]!;
  const determinant = w1 * psi2 - w2 * psi1;
  return {
    inverse: [psi2 / determinant, -w2 / determinant, -psi1 / determinant, w1 / determinant],
    M: [at[from + 2]!, at[from + 6]!],
    Q: [at[from + 3]!, at[from + 7]!],
  };
}

/** Force by deflection, moment by deflection (= force by slope), moment by slope; dimensionless. */
function halfStiffness({ inverse: [a, b, c, d], Q, M }: EndMatrix) {
  return [Q[0] * a + Q[1] * c, M[0] * a + M[1] * c, M[0] * b + M[1] * d] as const;
}

/** 4×4 from what an even (w, −ψ, w, ψ) and an odd (−w, ψ, w, ψ) motion meet at the end; `unit` [N·m]. */
function setFromHalves(
  k: Float64Array,
  even: readonly [number, number, number],
  odd: readonly [number, number, number],
  unit: number,
  length: number,
): void {
  const half = 0.5 * unit;
  const ww = half / (length * length);
  const wp = half / length;
  k[0] = k[10] = ww * (even[0] + odd[0]);
  k[2] = k[8] = ww * (even[0] - odd[0]);
  k[11] = k[14] = wp * (even[1] + odd[1]);
  k[1] = k[4] = -k[11];
  k[3] = k[12] = wp * (even[1] - odd[1]);
  k[6] = k[9] = -k[3];
  k[5] = k[15] = half * (even[2] + odd[2]);
  k[7] = k[13] = half * (odd[2] - even[2]);
}
