import { halfWavesBelow } from './DynamicElement.ts';
import type { DynamicElement, Wave } from './DynamicElement.ts';
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
  const wavesAt = (omega: number) => flexuralWaves(slowness * omega, r2, s2);
  const atEnd = new Float64Array(16);
  const at = new Float64Array(16);

  return {
    rows: 4,
    massPerLength: mass,
    inertiaPerLength: inertia,
    stiffness(omega, k) {
      const waves = wavesAt(omega);
      flexuralWave(waves, 0.5, atEnd);
      const even = halfStiffness(endMatrix(atEnd, 0));
      const odd = halfStiffness(endMatrix(atEnd, 8));
      setFromHalves(k, even, odd, bending / length, length);
      return pinnedBelow(waves) - (even[2] < 0 ? 1 : 0) - (odd[2] < 0 ? 1 : 0);
    },
    mass(omega, m) {
      const waves = wavesAt(omega);
      flexuralWave(waves, 0.5, atEnd);
      const gram = [0, 0, 0, 0, 0, 0];
      integrate(0.5, 0.5 * Math.sqrt(waves.e), (xi, weight) => {
        flexuralWave(waves, xi, at);
        for (const family of [0, 1]) {
          const w1 = at[family * 8]!;
          const psi1 = at[family * 8 + 1]!;
          const w2 = at[family * 8 + 4]!;
          const psi2 = at[family * 8 + 5]!;
          gram[family * 3]! += weight * (w1 * w1 + r2 * psi1 * psi1);
          gram[family * 3 + 1]! += weight * (w1 * w2 + r2 * psi1 * psi2);
          gram[family * 3 + 2]! += weight * (w2 * w2 + r2 * psi2 * psi2);
        }
      });
      const halves = [0, 1].map((family) => {
        const [a, b, c, d] = endMatrix(atEnd, family * 8).inverse;
        const [p, q, r] = [gram[family * 3]!, gram[family * 3 + 1]!, gram[family * 3 + 2]!];
        return [
          p * a * a + 2 * q * a * c + r * c * c,
          p * a * b + q * (a * d + b * c) + r * c * d,
          p * b * b + 2 * q * b * d + r * d * d,
        ] as const;
      });
      setFromHalves(m, halves[0]!, halves[1]!, mass * length ** 3, length);
    },
    wave(omega, d): Wave {
      const waves = wavesAt(omega);
      flexuralWave(waves, 0.5, atEnd);
      const amplitude = [
        ...amplitudes(endMatrix(atEnd, 0), (d[2]! + d[0]!) / (2 * length), 0.5 * (d[3]! - d[1]!)),
        ...amplitudes(endMatrix(atEnd, 8), (d[2]! - d[0]!) / (2 * length), 0.5 * (d[3]! + d[1]!)),
      ] as const;
      return {
        phase: Math.sqrt(waves.e),
        at(xi, point) {
          flexuralWave(waves, xi, at);
          const sum = (value: number) =>
            amplitude[0] * at[value]! +
            amplitude[1] * at[4 + value]! +
            amplitude[2] * at[8 + value]! +
            amplitude[3] * at[12 + value]!;
          point.displacement = length * sum(0);
          point.rotation = sum(1);
          point.strain = (bending / (length * length)) * (sum(2) ** 2 + s2 * sum(3) ** 2);
        },
      };
    },
  };
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

function amplitudes({ inverse: [a, b, c, d] }: EndMatrix, w: number, psi: number) {
  return [a * w + b * psi, c * w + d * psi] as const;
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
