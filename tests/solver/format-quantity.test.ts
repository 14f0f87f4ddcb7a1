import { describe, expect, it } from 'vitest';
import type { Unit } from '@/solver';
import { formatAngle, formatFull, formatPolar, formatQuantity, formatRectangular } from '@/solver';

const T = '\u2009';
const M = '\u2212';

const SET: readonly (readonly [number, Unit, number, string])[] = [
  [4700, 'Ω', 3, `4.70${T}kΩ`],
  [4700, 'Ω', 2, `4.7${T}kΩ`],
  [470, 'Ω', 2, `470${T}Ω`],
  [999.96, 'Ω', 3, `1.00${T}kΩ`],
  [999.4, 'Ω', 3, `999${T}Ω`],
  [999.96e-9, 'F', 4, `1.000${T}µF`],
  [0.99996, 'H', 3, `1.00${T}H`],
  [2.2e-6, 'F', 2, `2.2${T}µF`],
  [100e-9, 'F', 3, `100${T}nF`],
  [12e-15, 'F', 2, `12${T}fF`],
  [3e-18, 'F', 1, `3${T}aF`],
  [3e-19, 'F', 2, `3.0e${M}19${T}F`],
  [5e18, 'Hz', 2, `5.0${T}EHz`],
  [5e21, 'Hz', 2, `5.0e21${T}Hz`],
  [0, 'Ω', 3, `0${T}Ω`],
  [-0, 'V', 3, `0${T}V`],
  [0, '°', 3, '0°'],
  [0, '', 3, '0'],
  [-12.345, 'V', 3, `${M}12.3${T}V`],
  [0.732, 'A', 3, `0.732${T}A`],
  [0.09996, 'A', 3, `0.100${T}A`],
  [0.0999, 'A', 3, `99.9${T}mA`],
  [0.5, 'V', 2, `0.50${T}V`],
  [0.47, 'Ω', 2, `470${T}mΩ`],
  [2000, 'rad/s', 3, `2.00${T}krad/s`],
  [1500, 'var', 3, `1.50${T}kvar`],
  [30, '°', 3, '30.0°'],
  [270, '°', 3, '270°'],
  [-42.039, 'dB', 4, `${M}42.04${T}dB`],
  [12345, '', 4, '12350'],
  [0.25, '', 2, '0.25'],
  [1.5e-7, '', 2, `1.5e${M}7`],
  [Number.NaN, 'V', 3, '—'],
  [Infinity, 'V', 3, '—'],
];

describe('formatQuantity', () => {
  it.each(SET)('sets %d in %j at %d digits as %j', (value, unit, digits, text) => {
    expect(formatQuantity(value, unit, digits)).toBe(text);
  });

  it('bounds the digits to what a double holds', () => {
    expect(formatQuantity(1 / 3, 'Ω', 99)).toBe(`333.33333333333331${T}mΩ`);
    expect(formatQuantity(4700, 'Ω', 0)).toBe(`5${T}kΩ`);
    expect(formatQuantity(4700, 'Ω', Number.NaN)).toBe(`5${T}kΩ`);
  });
});

describe('formatAngle', () => {
  it.each([
    [-82.93, 1, `${M}82.9°`],
    [0, 1, '0.0°'],
    [-0.04, 1, '0.0°'],
    [-0, 2, '0.00°'],
    [180, 1, '180.0°'],
    [-180, 1, '180.0°'],
    [-179.96, 1, '180.0°'],
    [-179.94, 1, `${M}179.9°`],
    [190, 0, `${M}170°`],
    [540, 1, '180.0°'],
    [-270, 1, '90.0°'],
    [359.99, 1, '0.0°'],
    [Number.NaN, 1, '—'],
  ] as const)('sets %d at %d decimals as %j', (degrees, decimals, text) => {
    expect(formatAngle(degrees, decimals)).toBe(text);
  });
});

describe('formatPolar', () => {
  it.each([
    [0.0906, -0.7264, 'A', 3, `0.732${T}A ∠ ${M}82.9°`],
    [636.1e-6, -33.3e-6, 'A', 3, `637${T}µA ∠ ${M}3.0°`],
    [-10, 0, 'V', 3, `10.0${T}V ∠ 180.0°`],
    [-10, -0, 'V', 3, `10.0${T}V ∠ 180.0°`],
    [0, 0, 'A', 3, `0${T}A`],
    [3, 4, 'V', 5, `5.0000${T}V ∠ 53.130°`],
    [3e200, 4e200, '', 2, '5.0e200 ∠ 53°'],
  ] as const)('sets %d + j%d in %j at %d digits as %j', (re, im, unit, digits, text) => {
    expect(formatPolar(re, im, unit, digits)).toBe(text);
  });
});

describe('formatRectangular', () => {
  it.each([
    [0.0906, -0.7264, 'A', 3, `0.091 ${M} j0.726${T}A`],
    [0.00906, -0.07264, 'A', 3, `9.1 ${M} j72.6${T}mA`],
    [906, 0.4, 'A', 3, `906 + j0${T}A`],
    [-906, -0.6, 'A', 3, `${M}906 ${M} j1${T}A`],
    [3, 4, 'V', 2, `3.0 + j4.0${T}V`],
    [0, 4, 'V', 2, `0 + j4.0${T}V`],
    [0, 0, 'V', 2, `0${T}V`],
    [12.5, -2.5, '', 3, `12.5 ${M} j2.5`],
    [4700, 100, 'Ω', 3, `4.70 + j0.10${T}kΩ`],
    [Number.NaN, 0, 'V', 2, '—'],
  ] as const)('sets %d + j%d in %j at %d digits as %j', (re, im, unit, digits, text) => {
    expect(formatRectangular(re, im, unit, digits)).toBe(text);
  });
});

describe('formatFull', () => {
  it('gives all digits in plain characters, and reads back the same', () => {
    for (const value of [0.1, -1 / 3, 1e-7, 4700, 6.02214076e23, 5e-324]) {
      expect(Number(formatFull(value))).toBe(value);
    }
    expect(formatFull(-1.5e-7)).toBe('-1.5e-7');
    expect(formatFull(-0)).toBe('0');
    expect(formatFull(Infinity)).toBe('');
  });
});
