import { describe, expect, it } from 'vitest';

import { formatFrequency } from '#shared/units/formatFrequency.ts';
import { formatNumber, formatQuantity } from '#shared/units/formatQuantity.ts';

describe('formatQuantity', () => {
  it.each([
    [0.8, 'length', 'm-kg-N', '0.8 m'],
    [0.8, 'length', 'mm-kg-N', '800 mm'],
    [0.0254, 'length', 'in-lbm-lbf', '1 in'],
    [210e9, 'pressure', 'm-kg-N', '210 GPa'],
    [2.71104e-6, 'secondMoment', 'm-kg-N', '271.1 cm⁴'],
    [1e9, 'stiffness', 'm-kg-N', '1 × 10⁹ N/m'],
    [-Math.PI / 4, 'angle', 'm-kg-N', '−45°'],
    [25, 'speed', 'm-kg-N', '1500 rpm'],
    [0.125, 'ratio', 'm-kg-N', '0.125'],
  ] as const)('%d as %s in %s reads %s', (value, kind, system, text) => {
    expect(formatQuantity(value, kind, system)).toBe(text);
  });

  it('writes small numbers with a power of ten, and what is no number as a dash', () => {
    expect(formatNumber(2.5e-7, 4)).toBe('2.5 × 10⁻⁷');
    expect(formatNumber(0, 4)).toBe('0');
    expect(formatNumber(Number.NaN, 4)).toBe('–');
    expect(formatNumber(9.9999999e6, 3)).toBe('1 × 10⁷');
  });
});

describe('formatFrequency', () => {
  it.each([
    [47.2119, 4, '47.21 Hz'],
    [47.2, 4, '47.20 Hz'],
    [120.6, 3, '121 Hz'],
    [0.51234, 3, '0.512 Hz'],
    [9.996, 3, '10.0 Hz'],
    [0, 4, '0 Hz'],
    [1234.5, 2, '1235 Hz'],
  ])('%d with %d digits reads %s', (hz, digits, text) => {
    expect(formatFrequency(hz, digits)).toBe(text);
  });
});
