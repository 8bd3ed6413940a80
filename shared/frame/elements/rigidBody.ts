import type { Inertia } from '../../schemas/frameDocument.ts';

/**
 * Mass matrix of a rigid body about its centre of gravity, 6×6 over u v w rx ry rz in global axes.
 *   mass     [kg]
 *   inertia  elements of the tensor about that centre [kg·m²] (Ixy = −∫xy dm); absent = 0
 */
export function rigidBodyMass(mass: number, inertia: Inertia | undefined): Float64Array {
  const m = new Float64Array(36);
  m[0] = m[7] = m[14] = mass;
  if (inertia) {
    m[21] = inertia.Ixx;
    m[28] = inertia.Iyy;
    m[35] = inertia.Izz;
    m[22] = m[27] = inertia.Ixy ?? 0;
    m[23] = m[33] = inertia.Ixz ?? 0;
    m[29] = m[34] = inertia.Iyz ?? 0;
  }
  return m;
}
