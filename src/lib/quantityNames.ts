import type { QuantityKind } from '#shared/units/quantities.ts';

/** Each kind of quantity as it stands in a sentence. */
export const QUANTITY_NAMES: Readonly<Record<QuantityKind, string>> = {
  length: 'a length',
  sectionLength: 'a length',
  area: 'an area',
  secondMoment: 'a second moment of area',
  mass: 'a mass',
  massPerLength: 'a mass per length',
  density: 'a density',
  pressure: 'a modulus',
  force: 'a force',
  stiffness: 'a stiffness',
  rotationalStiffness: 'a rotational stiffness',
  damping: 'a damping coefficient',
  rotationalDamping: 'a rotational damping coefficient',
  massMoment: 'a mass moment of inertia',
  angle: 'an angle',
  frequency: 'a frequency',
  speed: 'a speed',
  ratio: 'a ratio',
};
