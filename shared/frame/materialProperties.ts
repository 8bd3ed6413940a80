import type { Material } from '../schemas/frameDocument.ts';

/** Shear modulus [Pa]: the one given, else E / 2(1+ν). A material has at least one of the two. */
export function shearModulus(material: Material): number {
  return material.G ?? material.E / (2 * (1 + (material.nu ?? 0)));
}

/** Poisson's ratio [–]: the one given, else E / 2G − 1. A material has at least one of the two. */
export function poissonRatio(material: Material): number {
  if (material.nu !== undefined) return material.nu;
  return material.G === undefined ? 0 : material.E / (2 * material.G) - 1;
}
