import { bendingInertia, inverse } from './beamProperties.ts';
import type { BeamProperties, PlaneTensor } from './beamProperties.ts';

/** What resists each of a beam's six deformations; see `beamDeformations`. */
export interface BeamRigidity {
  /** EA/L [N/m] against extension. */
  readonly axial: number;
  /** GJ/L [N·m/rad] against twist. */
  readonly torsion: number;
  /** EI/L [N·m/rad] against the difference of the end rotations. */
  readonly bending: PlaneTensor;
  /** 12/L (EI⁻¹ + Φ-part)⁻¹ [N·m/rad] against the mean end rotation relative to the chord. */
  readonly sway: PlaneTensor;
}

/** Deformations of a beam, in this order. */
export const BEAM_DEFORMATIONS = 6;

/**
 * Rigidities of a prismatic beam whose two bending planes may be coupled by Iyz.
 *   With B = E [Iz Iyz; Iyz Iy] and S = G A diag(ky, kz) over the planes (v, w):
 *     bending = B / L,      sway = (12 / L) (B⁻¹ + (12 / L²) S⁻¹)⁻¹
 *   In one plane sway is 12 EI / L(1 + Φ), Φ = 12 EI / κGAL²: Friedman and Kosmatka 1993, eq. (17).
 *   The tensor form is their static solution with B and S as matrices: moments vary linearly, shear is
 *   constant, so the flexibilities of bending and of shear add. No turn to principal axes is needed, and
 *   both shear coefficients keep their own axes. Bernoulli: S⁻¹ = 0.
 */
export function beamRigidity(properties: BeamProperties, length: number): BeamRigidity {
  const { E, G, A, J, ky, kz, theory } = properties;
  const I = bendingInertia(properties);
  const B: PlaneTensor = { vv: E * I.vv, vw: E * I.vw, ww: E * I.ww };
  const flexibility = inverse(B);
  const shear = theory === 'timoshenko' ? 12 / (G * A * length * length) : 0;
  const sway = inverse({
    vv: flexibility.vv + shear / ky,
    vw: flexibility.vw,
    ww: flexibility.ww + shear / kz,
  });
  return {
    axial: (E * A) / length,
    torsion: (G * J) / length,
    bending: { vv: B.vv / length, vw: B.vw / length, ww: B.ww / length },
    sway: { vv: (12 * sway.vv) / length, vw: (12 * sway.vw) / length, ww: (12 * sway.ww) / length },
  };
}

/**
 * Deformations g of a beam from the displacements of its ends, in member axes.
 *   d       12: u v w rx ry rz at the start, then at the end [m, rad]
 *   length  [m]
 *   g       6, overwritten: extension [m]; twist; difference of end slopes in the v and the w plane;
 *           mean end slope relative to the chord in the v and the w plane [rad]
 * A slope is that of the deflection: ψv = rz, ψw = −ry. Differences are taken first, so that a rigid
 * motion, however large, leaves only rounding of its own size.
 */
export function beamDeformations(d: Float64Array, length: number, g: Float64Array): void {
  g[0] = d[6]! - d[0]!;
  g[1] = d[9]! - d[3]!;
  g[2] = d[11]! - d[5]!;
  g[3] = d[4]! - d[10]!;
  g[4] = 0.5 * (d[5]! + d[11]!) - (d[7]! - d[1]!) / length;
  g[5] = -0.5 * (d[4]! + d[10]!) - (d[8]! - d[2]!) / length;
}

/** Rows of g = G d: 6×12, row by row; `length` [m]. */
export function beamDeformationRows(length: number): Float64Array {
  const rows = new Float64Array(BEAM_DEFORMATIONS * 12);
  const unit = new Float64Array(12);
  const g = new Float64Array(BEAM_DEFORMATIONS);
  for (let j = 0; j < 12; j++) {
    unit.fill(0);
    unit[j] = 1;
    beamDeformations(unit, length, g);
    for (let i = 0; i < BEAM_DEFORMATIONS; i++) rows[i * 12 + j] = g[i]!;
  }
  return rows;
}

/**
 * Stiffness matrix k = Gᵀ diag(axial, torsion, bending, sway) G of a beam, 12×12 in member axes [N, m, rad].
 * In one plane it is the matrix of Friedman and Kosmatka 1993, eq. (16), and with Φ = 0 the Hermite one.
 */
export function beamStiffness(rigidity: BeamRigidity, length: number): Float64Array {
  const G = beamDeformationRows(length);
  const { axial, torsion, bending, sway } = rigidity;
  const k = new Float64Array(144);
  for (let i = 0; i < 12; i++) {
    // Forces of the six deformations that displacement i causes.
    const extension = axial * G[i]!;
    const twist = torsion * G[12 + i]!;
    const bendV = bending.vv * G[24 + i]! + bending.vw * G[36 + i]!;
    const bendW = bending.vw * G[24 + i]! + bending.ww * G[36 + i]!;
    const swayV = sway.vv * G[48 + i]! + sway.vw * G[60 + i]!;
    const swayW = sway.vw * G[48 + i]! + sway.ww * G[60 + i]!;
    for (let j = 0; j < 12; j++) {
      k[i * 12 + j] =
        extension * G[j]! +
        twist * G[12 + j]! +
        bendV * G[24 + j]! +
        bendW * G[36 + j]! +
        swayV * G[48 + j]! +
        swayW * G[60 + j]!;
    }
  }
  return k;
}
