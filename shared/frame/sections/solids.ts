import type { SectionShape } from '../../schemas/frameDocument.ts';
import type { SectionProperties } from './section.ts';

/** Terms of the torsion series; they fall as n⁻⁵, so the 25th odd one is below 1e-8 of the sum. */
const TORSION_TERMS = 25;

/**
 * Torsion constant of a solid rectangle, J = a b³ β with
 * β = ⅓ [1 − (192/π⁵)(b/a) Σ tanh(nπa/2b)/n⁵], n odd, a ≥ b [m⁴].
 * Timoshenko and Goodier, Theory of Elasticity, 3rd ed., §109.
 */
export function rectangleTorsion(width: number, height: number): number {
  const a = Math.max(width, height);
  const b = Math.min(width, height);
  let sum = 0;
  for (let n = 1; n < 2 * TORSION_TERMS; n += 2) {
    sum += Math.tanh((n * Math.PI * a) / (2 * b)) / n ** 5;
  }
  return ((a * b ** 3) / 3) * (1 - (192 / Math.PI ** 5) * (b / a) * sum);
}

/** Solid rectangle; κ = 10(1+ν)/(12+11ν) in both directions (Cowper 1966). Lengths m, nu –. */
export function solidRectangle(
  shape: Extract<SectionShape, { kind: 'solid-rectangle' }>,
  nu: number,
): SectionProperties {
  const { width, height } = shape;
  const kappa = (10 * (1 + nu)) / (12 + 11 * nu);
  return {
    A: width * height,
    Iy: (width * height ** 3) / 12,
    Iz: (height * width ** 3) / 12,
    Iyz: 0,
    J: rectangleTorsion(width, height),
    ky: kappa,
    kz: kappa,
    notes: [],
  };
}

/** Solid round; κ = 6(1+ν)/(7+6ν) (Cowper 1966). Lengths m, nu –. */
export function solidRound(
  shape: Extract<SectionShape, { kind: 'solid-round' }>,
  nu: number,
): SectionProperties {
  const I = (Math.PI * shape.diameter ** 4) / 64;
  const kappa = (6 * (1 + nu)) / (7 + 6 * nu);
  return {
    A: (Math.PI * shape.diameter ** 2) / 4,
    Iy: I,
    Iz: I,
    Iyz: 0,
    J: 2 * I,
    ky: kappa,
    kz: kappa,
    notes: [],
  };
}
