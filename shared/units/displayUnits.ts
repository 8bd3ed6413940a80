import { si, type QuantityKind, type Si } from './quantities.ts';

/** The systems of units a person can choose; each names its units of length, mass and force. */
export const UNIT_SYSTEMS = ['m-kg-N', 'mm-kg-N', 'in-lbm-lbf'] as const;
export type UnitSystem = (typeof UNIT_SYSTEMS)[number];

/** How one kind of quantity is shown in one system. */
export interface DisplayUnit {
  /** As it stands after the number; empty for a pure ratio. */
  readonly symbol: string;
  /** SI units in one of this unit. */
  readonly factor: number;
  /** Significant digits that such a quantity is worth on screen. */
  readonly digits: number;
  /** The same unit as mathjs reads it (see `MATHJS_UNITS`); empty for a pure ratio. */
  readonly mathjsName: string;
}

/** Units mathjs does not know by itself: name and definition for its `createUnit`. */
export const MATHJS_UNITS: Readonly<Record<string, string>> = {
  rpm: '1 / minute',
  ksi: '1000 psi',
};

/** Exact: NIST SP 811 (2008), Appendix B, boldface factors. */
const INCH = 0.0254;
const FOOT = 12 * INCH;
const POUND = 0.45359237;
/** Exact: the pound × standard gravity 9.80665 m/s². */
const POUND_FORCE = POUND * 9.80665;

type BySystem = Readonly<Record<UnitSystem, DisplayUnit>>;

function unit(symbol: string, factor: number, digits: number, mathjsName: string): DisplayUnit {
  return { symbol, factor, digits, mathjsName };
}

function units(metre: DisplayUnit, millimetre: DisplayUnit, inch: DisplayUnit): BySystem {
  return { 'm-kg-N': metre, 'mm-kg-N': millimetre, 'in-lbm-lbf': inch };
}

function everywhere(one: DisplayUnit): BySystem {
  return units(one, one, one);
}

const MILLIMETRE = unit('mm', 1e-3, 6, 'mm');
const KILOGRAM = unit('kg', 1, 5, 'kg');
const KILOGRAM_PER_METRE = unit('kg/m', 1, 4, 'kg/m');
const KILOGRAM_PER_CUBIC_METRE = unit('kg/m³', 1, 5, 'kg/m^3');
const GIGAPASCAL = unit('GPa', 1e9, 4, 'GPa');
const NEWTON = unit('N', 1, 5, 'N');
const NEWTON_METRE_PER_RADIAN = unit('N·m/rad', 1, 4, 'N m/rad');
const NEWTON_METRE_SECOND_PER_RADIAN = unit('N·m·s/rad', 1, 4, 'N m s/rad');
const KILOGRAM_SQUARE_METRE = unit('kg·m²', 1, 5, 'kg m^2');
const INCH_UNIT = unit('in', INCH, 6, 'in');

const DISPLAY_UNITS: Readonly<Record<QuantityKind, BySystem>> = {
  length: units(unit('m', 1, 6, 'm'), MILLIMETRE, INCH_UNIT),
  sectionLength: units(MILLIMETRE, MILLIMETRE, INCH_UNIT),
  area: units(
    unit('cm²', 1e-4, 5, 'cm^2'),
    unit('mm²', 1e-6, 5, 'mm^2'),
    unit('in²', INCH ** 2, 5, 'in^2'),
  ),
  secondMoment: units(
    unit('cm⁴', 1e-8, 5, 'cm^4'),
    unit('mm⁴', 1e-12, 5, 'mm^4'),
    unit('in⁴', INCH ** 4, 5, 'in^4'),
  ),
  mass: units(KILOGRAM, KILOGRAM, unit('lbm', POUND, 5, 'lbm')),
  massPerLength: units(
    KILOGRAM_PER_METRE,
    KILOGRAM_PER_METRE,
    unit('lbm/ft', POUND / FOOT, 4, 'lbm/ft'),
  ),
  density: units(
    KILOGRAM_PER_CUBIC_METRE,
    KILOGRAM_PER_CUBIC_METRE,
    unit('lbm/in³', POUND / INCH ** 3, 4, 'lbm/in^3'),
  ),
  pressure: units(GIGAPASCAL, GIGAPASCAL, unit('ksi', (1000 * POUND_FORCE) / INCH ** 2, 5, 'ksi')),
  force: units(NEWTON, NEWTON, unit('lbf', POUND_FORCE, 5, 'lbf')),
  stiffness: units(
    unit('N/m', 1, 4, 'N/m'),
    unit('N/mm', 1e3, 4, 'N/mm'),
    unit('lbf/in', POUND_FORCE / INCH, 4, 'lbf/in'),
  ),
  rotationalStiffness: units(
    NEWTON_METRE_PER_RADIAN,
    NEWTON_METRE_PER_RADIAN,
    unit('lbf·in/rad', POUND_FORCE * INCH, 4, 'lbf in/rad'),
  ),
  damping: units(
    unit('N·s/m', 1, 4, 'N s/m'),
    unit('N·s/mm', 1e3, 4, 'N s/mm'),
    unit('lbf·s/in', POUND_FORCE / INCH, 4, 'lbf s/in'),
  ),
  rotationalDamping: units(
    NEWTON_METRE_SECOND_PER_RADIAN,
    NEWTON_METRE_SECOND_PER_RADIAN,
    unit('lbf·in·s/rad', POUND_FORCE * INCH, 4, 'lbf in s/rad'),
  ),
  massMoment: units(
    KILOGRAM_SQUARE_METRE,
    KILOGRAM_SQUARE_METRE,
    unit('lbm·in²', POUND * INCH ** 2, 5, 'lbm in^2'),
  ),
  angle: everywhere(unit('°', Math.PI / 180, 5, 'deg')),
  frequency: everywhere(unit('Hz', 1, 5, 'Hz')),
  speed: everywhere(unit('rpm', 1 / 60, 5, 'rpm')),
  ratio: everywhere(unit('', 1, 4, '')),
};

/** The unit in which a kind of quantity is shown and typed in one system. */
export function displayUnit(kind: QuantityKind, system: UnitSystem): DisplayUnit {
  return DISPLAY_UNITS[kind][system];
}

/** A stored SI value in the unit shown. */
export function toDisplay(valueSi: number, kind: QuantityKind, system: UnitSystem): number {
  return valueSi / displayUnit(kind, system).factor;
}

/** A value in the unit shown as the stored SI value. */
export function fromDisplay<Kind extends QuantityKind>(
  value: number,
  kind: Kind,
  system: UnitSystem,
): Si<Kind> {
  return si(kind, value * displayUnit(kind, system).factor);
}
