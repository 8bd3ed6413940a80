import { halfWavesBelow } from './DynamicElement.ts';
import type { DynamicElement, MotionIntegrals } from './DynamicElement.ts';
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

  return {
    rows: 2,
    twists,
    stiffness(omega, k) {
      const phase = slowness * omega;
      const tangent = Math.tan(0.5 * phase);
      setFromHalves(k, -phase * tangent * k0, (phase === 0 ? 2 : phase / tangent) * k0);
      return halfWavesBelow(phase);
    },
    mass(omega, m) {
      const [even, odd] = massHalves(slowness * omega);
      setFromHalves(m, even * inertia * length, odd * inertia * length);
    },
    integrals(omega): MotionIntegrals {
      const phase = slowness * omega;
      const [even, odd] = massHalves(phase);
      const mass = new Float64Array(4);
      setFromHalves(mass, even * inertia * length, odd * inertia * length);
      let evenStrain = 0;
      let oddStrain = 0;
      let evenSum = 0;
      let oddMoment = 0;
      integrate(0.5, 0.5 * phase, (xi, weight) => {
        evenStrain += 2 * weight * evenSlope(phase, xi) ** 2;
        oddStrain += 2 * weight * oddSlope(phase, xi) ** 2;
        evenSum += 2 * weight * evenAt(phase, xi);
        oddMoment += 2 * weight * oddAt(phase, xi) * xi;
      });
      const a = 0.5 * Math.sqrt(k0 * evenStrain);
      const b = 0.5 * Math.sqrt(k0 * oddStrain);
      const momenta = new Float64Array(6);
      const sum = 0.5 * inertia * length * evenSum;
      const moment = 0.5 * inertia * length * length * oddMoment;
      if (twists) momenta.set([sum, sum], 4);
      else momenta.set([sum, sum, -moment, moment]);
      return { mass, strain: Float64Array.of(a, a, -b, b), momenta };
    },
    shape(omega, xi, N) {
      const phase = slowness * omega;
      const even = 0.5 * evenAt(phase, xi);
      const odd = 0.5 * oddAt(phase, xi);
      N.fill(0, 0, 4);
      const at = twists ? 2 : 0;
      N[at] = even - odd;
      N[at + 1] = even + odd;
    },
  };
}

function evenAt(phase: number, xi: number): number {
  return Math.cos(phase * xi) / Math.cos(0.5 * phase);
}

function oddAt(phase: number, xi: number): number {
  return phase === 0 ? 2 * xi : Math.sin(phase * xi) / Math.sin(0.5 * phase);
}

function evenSlope(phase: number, xi: number): number {
  return (-phase * Math.sin(phase * xi)) / Math.cos(0.5 * phase);
}

function oddSlope(phase: number, xi: number): number {
  return phase === 0 ? 2 : (phase * Math.cos(phase * xi)) / Math.sin(0.5 * phase);
}

/** ∫ of the squares of the even and the odd motion from the middle to the end. */
function massHalves(phase: number): [number, number] {
  let even = 0;
  let odd = 0;
  integrate(0.5, 0.5 * phase, (xi, weight) => {
    even += weight * evenAt(phase, xi) ** 2;
    odd += weight * oddAt(phase, xi) ** 2;
  });
  return [even, odd];
}

/** 2×2 from what an even (d, d) and an odd (−d, d) motion meet at each end. */
function setFromHalves(k: Float64Array, even: number, odd: number): void {
  k[0] = k[3] = 0.5 * (even + odd);
  k[1] = k[2] = 0.5 * (even - odd);
}
