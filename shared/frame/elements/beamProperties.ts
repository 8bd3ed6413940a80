/** What a beam or bar element is made of; SI. */
export interface BeamProperties {
  /** Young's and shear modulus [Pa]. */
  readonly E: number;
  readonly G: number;
  /** Density [kg/m³]. */
  readonly rho: number;
  /** Area [m²], ∫z² dA, ∫y² dA, ∫yz dA and St Venant torsion constant [m⁴]. */
  readonly A: number;
  readonly Iy: number;
  readonly Iz: number;
  readonly Iyz: number;
  readonly J: number;
  /** Shear coefficients along y and z [–]. */
  readonly ky: number;
  readonly kz: number;
  /** Mass carried besides the member's own, translation only [kg/m]. */
  readonly massPerLength: number;
  readonly theory: 'timoshenko' | 'bernoulli';
}

/** Symmetric 2×2 tensor over the two bending planes: v (along y) first, w (along z) second. */
export interface PlaneTensor {
  readonly vv: number;
  readonly vw: number;
  readonly ww: number;
}

/** Bending inertia in the order of the planes: deflection v bends about z, w about y [m⁴]. */
export function bendingInertia({ Iy, Iz, Iyz }: BeamProperties): PlaneTensor {
  return { vv: Iz, vw: Iyz, ww: Iy };
}

/** T⁻¹; T positive definite. */
export function inverse({ vv, vw, ww }: PlaneTensor): PlaneTensor {
  const determinant = vv * ww - vw * vw;
  return { vv: ww / determinant, vw: -vw / determinant, ww: vv / determinant };
}
