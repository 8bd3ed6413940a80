/**
 * Waves of a beam in one plane at one frequency, lengths over L, b = ωL² √(m̄/EI), r² = ρI/m̄L²,
 * s² = EI/κGAL². The general solution is cosh αξ, sinh αξ, cos βξ, sin βξ with
 *   a = α²,  e = β²:  roots of  λ² + b²(r² + s²)λ − b²(1 − b²r²s²) = 0,  λ = a and −e;
 * a turns negative, and its functions into cosines, at b r s = 1. The slope goes with the deflection by
 * g = a + b²s² and h = e − b²s²; g h = b² and a + e = g + h.
 */
export interface FlexuralWaves {
  readonly b: number;
  readonly r2: number;
  readonly s2: number;
  readonly a: number;
  readonly e: number;
  readonly g: number;
  readonly h: number;
  /** Whether functions are formed from power series. */
  readonly low: boolean;
}

/**
 * e = β² up to which functions are formed from power series. Each is then its leading power of ξ times 1 within
 * a factor of two, so that nothing cancels however small b is.
 */
const SERIES_LIMIT = 4;
/** Terms of the series: |a ξ²|, e ξ² ≤ 1, and 1/(2·9 + 2)! is below rounding. */
const TERMS = 9;

/**
 * Wave numbers of Timoshenko's theory; r² = s² = 0 is Bernoulli-Euler.
 * Source: Huang 1961, J. Appl. Mech. 28, 579–584; Howson and Williams 1973, J. Sound Vib. 26(4), eqs. (6)–(10).
 */
export function flexuralWaves(b: number, r2: number, s2: number): FlexuralWaves {
  // g/b and h/b are inverses of each other: the larger is formed without cancellation.
  const difference = 0.5 * b * (r2 - s2);
  const larger = Math.abs(difference) + Math.sqrt(difference * difference + 1);
  const hOverB = difference >= 0 ? larger : 1 / larger;
  const g = b / hOverB;
  const h = b * hOverB;
  const e = h + b * b * s2;
  const a = b === 0 ? 0 : (b * b * (1 - b * b * r2 * s2)) / e;
  return { b, r2, s2, a, e, g, h, low: e <= SERIES_LIMIT };
}

/**
 * Two even, then two odd solutions at ξ, four values each: deflection w, slope ψ, moment M = ψ′ and shear
 * force Q = −(ψ″ + b²r²ψ), dimensionless (w over L, M over EI/L, Q over EI/L²).
 *   xi   −½ … ½ from the middle
 *   out  16, overwritten: even 1, even 2, odd 1, odd 2
 * At low frequency they tend to the rigid and the statically bent motions 1, ξ²/2, ξ and ξ³/6 − s²ξ. At others
 * they are the waves themselves, the hyperbolic ones scaled by their value at the end, so that nothing overflows.
 */
export function flexuralWave(waves: FlexuralWaves, xi: number, out: Float64Array): void {
  if (waves.low) lowFrequency(waves, xi, out);
  else highFrequency(waves, xi, out);
}

function lowFrequency(
  { b, r2, s2, a, e, g, h }: FlexuralWaves,
  xi: number,
  out: Float64Array,
): void {
  const x = a * xi * xi;
  const y = -e * xi * xi;
  // c = Σ xⁿ/(2n)!, S = Σ xⁿ/(2n+1)!, and their divided differences E between x and y.
  let c1 = 1;
  let c2 = 1;
  let S1 = 1;
  let S2 = 1;
  let E2 = 0;
  let E3 = 0;
  let xn = 1;
  let yn = 1;
  let divided = 0;
  let factorial = 1;
  for (let n = 1; n <= TERMS; n++) {
    divided = x * divided + yn;
    xn *= x;
    yn *= y;
    factorial *= (2 * n - 1) * (2 * n);
    c1 += xn / factorial;
    c2 += yn / factorial;
    E2 += divided / factorial;
    const odd = factorial * (2 * n + 1);
    S1 += xn / odd;
    S2 += yn / odd;
    E3 += divided / odd;
  }
  S1 *= xi;
  S2 *= xi;
  E2 *= xi * xi;
  E3 *= xi * xi * xi;
  const ratio = b === 0 ? 1 : h / b;
  const inG = 1 / (1 + ratio * ratio); // g / (g + h)
  const inH = 1 - inG;
  const aShare = b === 0 ? 0.5 : a / (a + e);
  const F0 = inH * c1 + inG * c2;
  const F1 = inH * S1 + inG * S2;
  const G0 = inG * c1 + inH * c2;
  const G1 = aShare * S1 + (1 - aShare) * S2;
  const b2 = b * b;
  out[0] = F0;
  out[1] = b2 * E3;
  out[2] = b2 * E2;
  out[3] = -b2 * F1;
  out[4] = E2;
  out[5] = inG * S1 + inH * S2;
  out[6] = G0;
  out[7] = -b2 * E3;
  out[8] = G1;
  out[9] = G0;
  out[10] = 0.5 * (g * a + h * e) * E3 - 0.5 * b2 * r2 * (S1 + S2);
  out[11] = -b2 * E2;
  out[12] = E3 - s2 * F1;
  out[13] = E2;
  out[14] = G1;
  out[15] = -F0;
}

function highFrequency({ b, a, e, g, h }: FlexuralWaves, xi: number, out: Float64Array): void {
  const beta = Math.sqrt(e);
  const c2 = Math.cos(beta * xi);
  const S2 = Math.sin(beta * xi) / beta;
  let c1: number;
  let S1: number;
  if (a > 0) {
    const alpha = Math.sqrt(a);
    // e^(α(|ξ| − ½)) (1 ± e^(−2α|ξ|)) / (1 + e^(−α)): cosh and sinh over cosh(α/2).
    const size = Math.abs(xi);
    const growth = Math.exp(alpha * (size - 0.5)) / (1 + Math.exp(-alpha));
    const decay = Math.exp(-2 * alpha * size);
    c1 = growth * (1 + decay);
    // −expm1 keeps sinh's digits where α|ξ| is small.
    S1 = (Math.sign(xi) * growth * -Math.expm1(-2 * alpha * size)) / alpha;
  } else {
    const alpha = Math.sqrt(-a);
    c1 = Math.cos(alpha * xi);
    S1 = alpha === 0 ? xi : Math.sin(alpha * xi) / alpha;
  }
  const b2 = b * b;
  out[0] = c1;
  out[1] = g * S1;
  out[2] = g * c1;
  out[3] = -b2 * S1;
  out[4] = c2;
  out[5] = -h * S2;
  out[6] = -h * c2;
  out[7] = -b2 * S2;
  out[8] = a * S1;
  out[9] = g * c1;
  out[10] = g * a * S1;
  out[11] = -b2 * c1;
  out[12] = e * S2;
  out[13] = h * c2;
  out[14] = -h * e * S2;
  out[15] = b2 * c2;
}
