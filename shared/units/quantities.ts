/** Kinds of quantity the product shows. The SI unit in which each is stored stands beside it. */
export const QUANTITY_KINDS = [
  'length', // m: coordinates, offsets, arms
  'sectionLength', // m: dimensions of a section, shown small
  'area', // m²
  'secondMoment', // m⁴
  'mass', // kg
  'massPerLength', // kg/m
  'density', // kg/m³
  'pressure', // Pa: moduli
  'force', // N
  'stiffness', // N/m
  'rotationalStiffness', // N·m/rad
  'damping', // N·s/m
  'rotationalDamping', // N·m·s/rad
  'massMoment', // kg·m²
  'angle', // rad
  'frequency', // Hz
  'speed', // revolutions per second
  'ratio', // –
] as const;
export type QuantityKind = (typeof QUANTITY_KINDS)[number];

declare const kindOf: unique symbol;

/** A number known to be in the SI unit of its kind: `Si<'pressure'>` is in Pa. */
export type Si<Kind extends QuantityKind> = number & { readonly [kindOf]: Kind };

/** Marks a number that is already in the SI unit of its kind. */
export function si<Kind extends QuantityKind>(_kind: Kind, value: number): Si<Kind> {
  return value as Si<Kind>;
}

/** Millimetres as metres; divided, so that 100 mm is the same double as 0.1 m. */
export function fromMillimetres(value: number): Si<'sectionLength'> {
  return si('sectionLength', value / 1000);
}

/** Gigapascals as pascals. */
export function fromGigapascals(value: number): Si<'pressure'> {
  return si('pressure', value * 1e9);
}
