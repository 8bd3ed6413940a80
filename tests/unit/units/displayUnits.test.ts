import fc from 'fast-check';
import { createUnit, unit } from 'mathjs';
import { describe, expect, it } from 'vitest';

import {
  displayUnit,
  fromDisplay,
  MATHJS_UNITS,
  toDisplay,
  UNIT_SYSTEMS,
} from '#shared/units/displayUnits.ts';
import { QUANTITY_KINDS, type QuantityKind } from '#shared/units/quantities.ts';

for (const [name, definition] of Object.entries(MATHJS_UNITS)) createUnit(name, definition);

const SI_NAMES: Record<QuantityKind, string> = {
  length: 'm',
  sectionLength: 'm',
  area: 'm^2',
  secondMoment: 'm^4',
  mass: 'kg',
  massPerLength: 'kg/m',
  density: 'kg/m^3',
  pressure: 'Pa',
  force: 'N',
  stiffness: 'N/m',
  rotationalStiffness: 'N m/rad',
  damping: 'N s/m',
  rotationalDamping: 'N m s/rad',
  massMoment: 'kg m^2',
  angle: 'rad',
  frequency: 'Hz',
  speed: 's^-1',
  ratio: '',
};

const PAIRS = QUANTITY_KINDS.filter((kind) => kind !== 'ratio').flatMap((kind) =>
  UNIT_SYSTEMS.map((system) => [kind, system] as const),
);

describe('display units', () => {
  // NIST SP 811 (2008), Appendix B.8, to the seven digits it prints.
  it.each<[QuantityKind, string]>([
    ['length', '2.540000e-2'],
    ['area', '6.451600e-4'],
    ['secondMoment', '4.162314e-7'],
    ['mass', '4.535924e-1'],
    ['massPerLength', '1.488164e+0'],
    ['density', '2.767990e+4'],
    ['pressure', '6.894757e+6'],
    ['force', '4.448222e+0'],
    ['stiffness', '1.751268e+2'],
    ['rotationalStiffness', '1.129848e-1'],
    ['massMoment', '2.926397e-4'],
    ['angle', '1.745329e-2'],
  ])('take %s in inches and pounds as NIST SP 811 does', (kind, factor) => {
    expect(displayUnit(kind, 'in-lbm-lbf').factor.toExponential(6)).toBe(factor);
  });

  it.each(PAIRS)('agree with mathjs: %s in %s', (kind, system) => {
    const { factor, mathjsName } = displayUnit(kind, system);
    const theirs = unit(`1 ${mathjsName}`).toNumber(SI_NAMES[kind]);
    // mathjs derives some of its pounds from rounded constants.
    expect(Math.abs(theirs / factor - 1)).toBeLessThan(1e-6);
  });

  it('give back what was put in', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...PAIRS),
        fc.double({ min: 1e-6, max: 1e9, noNaN: true }),
        ([kind, system], value) => {
          const back = toDisplay(fromDisplay(value, kind, system), kind, system);
          expect(Math.abs(back / value - 1)).toBeLessThan(1e-15 * 4);
        },
      ),
      { seed: 1852 },
    );
  });
});
