import { halfWavesBelow } from './DynamicElement.ts';
import type { DynamicElement, Wave } from './DynamicElement.ts';
import { integrate } from './gaussPanels.ts';

export interface RodProperties {
  /** EA [N] of a rod that stretches, GJ [N·m²] of a shaft that twists. */
  readonly rigidity: number;
  /** Mass per length [kg/m], or inertia about its own axis per length [kg·m]. */
  readonly inertia: number;
  /** [m] */
  readonly length: number;
  readonly twists: boolean;
}

/**
 * A rod in stretching or a shaft in twisting: (EA u′)′ + ω² m̄ u = 0, with phase φ = ωL √(m̄/EA).
 * Motions even about the middle meet −φ tan(φ/2) EA/L at each end, odd ones φ cot(φ/2) EA/L, which together
 * are the known EA/L φ [cot φ, −csc φ]. J₀ counts nπ < φ.
 * Source: Wittrick and Williams 1971, Q. J. Mech. Appl. Math. 24(3), 263–284.
 */
export function dynamicRod({ rigidity, inertia, length, twists }: RodProperties): DynamicElement {
  const slowness = length * Math.sqrt(inertia / rigidity);
  const k0 = rigidity / length;
  const even = (phase: number, xi: number) => Math.cos(phase * xi) / Math.cos(0.5 * phase);
  const odd = (phase: number, xi: number) =>
    phase === 0 ? 2 * xi : Math.sin(phase * xi) / Math.sin(0.5 * phase);

  return {
    rows: 2,
    massPerLength: twists ? 0 : inertia,
    inertiaPerLength: twists ? inertia : 0,
    stiffness(omega, k) {
      const phase = slowness * omega;
      const tangent = Math.tan(0.5 * phase);
      setFromHalves(k, -phase * tangent * k0, (phase === 0 ? 2 : phase / tangent) * k0);
      return halfWavesBelow(phase);
    },
    mass(omega, m) {
      const phase = slowness * omega;
      let evenMass = 0;
      let oddMass = 0;
      integrate(0.5, 0.5 * phase, (xi, weight) => {
        evenMass += weight * even(phase, xi) ** 2;
        oddMass += weight * odd(phase, xi) ** 2;
      });
      setFromHalves(m, evenMass * inertia * length, oddMass * inertia * length);
    },
    wave(omega, d): Wave {
      const phase = slowness * omega;
      const mean = 0.5 * (d[1]! + d[0]!);
      const half = 0.5 * (d[1]! - d[0]!);
      return {
        phase,
        at(xi, point) {
          const value = mean * even(phase, xi) + half * odd(phase, xi);
          const slope =
            (-mean * phase * Math.sin(phase * xi)) / Math.cos(0.5 * phase) +
            half * (phase === 0 ? 2 : (phase * Math.cos(phase * xi)) / Math.sin(0.5 * phase));
          point.displacement = twists ? 0 : value;
          point.rotation = twists ? value : 0;
          point.strain = rigidity * (slope / length) ** 2;
        },
      };
    },
  };
}

/** 2×2 from what an even (d, d) and an odd (−d, d) motion meet at each end. */
function setFromHalves(k: Float64Array, even: number, odd: number): void {
  k[0] = k[3] = 0.5 * (even + odd);
  k[1] = k[2] = 0.5 * (even - odd);
}
