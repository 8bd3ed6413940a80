import type { BeamProperties } from './beamProperties.ts';

/**
 * Stiffness of a bar, 6×6 over u v w at the start, then at the end, in member axes: EA/L [1 −1; −1 1] along
 * x, nothing across [N/m].
 */
export function barStiffness(axial: number): Float64Array {
  const k = new Float64Array(36);
  k[0] = k[21] = axial;
  k[3] = k[18] = -axial;
  return k;
}

/** Consistent mass m̄L/6 [2 1; 1 2] in each of the three translations, 6×6 [kg]; length [m]. */
export function barConsistentMass(properties: BeamProperties, length: number): Float64Array {
  const sixth = ((properties.rho * properties.A + properties.massPerLength) * length) / 6;
  const m = new Float64Array(36);
  for (let i = 0; i < 3; i++) {
    m[i * 7] = m[(i + 3) * 7] = 2 * sixth;
    m[i * 6 + i + 3] = m[(i + 3) * 6 + i] = sixth;
  }
  return m;
}

/** Lumped mass m̄L/2 at each end in each translation, 6×6 diagonal [kg]; length [m]. */
export function barLumpedMass(properties: BeamProperties, length: number): Float64Array {
  const m = new Float64Array(36);
  const half = 0.5 * (properties.rho * properties.A + properties.massPerLength) * length;
  for (let i = 0; i < 6; i++) m[i * 7] = half;
  return m;
}
