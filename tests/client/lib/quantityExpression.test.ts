import { describe, expect, it } from 'vitest';
import { readQuantity } from '#src/lib/quantityExpression.ts';
import type { QuantityKind } from '#shared/units/quantities.ts';

// Factors: NIST SP 811 (2008), Appendix B: 1 in = 0.0254 m, 1 lb = 0.45359237 kg, 1 lbf = 4.4482216152605 N,
// all exact; 1 rpm = 1/60 s⁻¹.
const READ: readonly [string, QuantityKind, number][] = [
  ['450', 'length', 0.45],
  ['2*450 mm + 1/2 in', 'length', 0.9127],
  ['3\' 4"', 'length', 1.016],
  ['1.2 m − 20 mm', 'length', 1.18],
  ['12 in', 'length', 0.3048],
  ['80 kN/mm', 'stiffness', 8e7],
  ['100 lbf/in', 'stiffness', (100 * 4.4482216152605) / 0.0254],
  ['50 N m', 'rotationalStiffness', 50],
  ['50 N m/rad', 'rotationalStiffness', 50],
  ['2.1 × 10²', 'pressure', 210e9],
  ['1500 rpm', 'frequency', 25],
  ['25 Hz', 'speed', 25],
  ['90°', 'angle', Math.PI / 2],
  ['2.5 cm²', 'area', 2.5e-4],
  ['10 lbm', 'mass', 4.5359237],
  ['1/2', 'ratio', 0.5],
];

const REFUSED: readonly [string, QuantityKind, RegExp][] = [
  ['', 'mass', /Enter a mass/],
  ['2 kg', 'length', /a length is wanted/],
  ['450 + 2 mm', 'length', /give each a unit, or none/],
  ['3 mmm', 'length', /“mmm” is no unit/],
  ['1,5 mm', 'length', /point before decimals/],
  ['(1+2', 'ratio', /can’t be read/],
  ['1/0', 'ratio', /no finite number/],
  ['a = 3', 'length', /Only numbers/],
  ['import("x")', 'length', /“import” can’t be used/],
  ['createUnit("x")', 'length', /“createUnit” can’t be used/],
  ['[1, 2]', 'length', /Only numbers/],
  ['3 mm', 'ratio', /a number without a unit/],
  ['1'.repeat(201), 'length', /at most 200/],
];

describe('readQuantity', () => {
  it.each(READ)('reads %s as %s', (text, kind, value) => {
    const reading = readQuantity(text, kind, 'mm-kg-N');
    expect(reading).toMatchObject({ ok: true });
    if (reading.ok) expect(Math.abs(reading.value / value - 1)).toBeLessThan(1e-12);
  });

  it.each(REFUSED)('refuses “%s” as %s', (text, kind, sentence) => {
    const reading = readQuantity(text, kind, 'mm-kg-N');
    expect(reading.ok).toBe(false);
    if (!reading.ok) expect(reading.message).toMatch(sentence);
  });

  it('takes a bare number in the unit of the person’s system', () => {
    expect(readQuantity('10', 'length', 'm-kg-N')).toEqual({ ok: true, value: 10 });
    expect(readQuantity('10', 'length', 'in-lbm-lbf')).toEqual({ ok: true, value: 0.254 });
  });
});
