import { expect } from '@playwright/test';

/** A figure as shown: its value in SI units, and half a unit of its last digit, which is all that rounding may take. */
export type Figure = { readonly value: number; readonly halfDigit: number; readonly unit: string };

const PREFIXES: Readonly<Record<string, number>> = {
  a: -18, f: -15, p: -12, n: -9, µ: -6, m: -3, '': 0, k: 3, M: 6, G: 9, T: 12, P: 15, E: 18,
};
const FIGURE = /^([−-]?)(\d+)(?:\.(\d+))?(?:e([−-]?\d+))?\s*([afpnµmkMGTPE]??)(Ω|A|V|W|var|VA|Hz|F|H|J|°|rad\/s)$/u;

/** Reads a figure such as `532 µA` or `−57.9°`. @throws when it is none. */
export function readFigure(text: string): Figure {
  const found = FIGURE.exec(text.trim());
  if (!found) throw new Error(`“${text}” is not a figure`);
  const [, sign = '', whole = '', decimals = '', power = '0', prefix = '', unit = ''] = found;
  const exponent = Number(power.replace('−', '-')) + (PREFIXES[prefix] ?? 0);
  const value = Number(`${sign === '' ? '' : '-'}${whole}.${decimals}e${exponent}`);
  return { value, halfDigit: 0.5 * 10 ** (exponent - decimals.length), unit };
}

/** A phasor as shown: `532 µA ∠ 57.9°`. */
export function readPolar(text: string): { readonly size: Figure; readonly angle: Figure } {
  const [size = '', angle = ''] = text.split('∠');
  return { size: readFigure(size), angle: readFigure(angle) };
}

/** Room for the rounding of the expectation itself, in doubles. */
const ROUNDING = 1e-9;

/** Holds a shown figure to a computed value: equal but for the rounding to the digits that are shown. */
export function expectFigure(shown: Figure, expected: number, what: string): void {
  const off = Math.abs(shown.value - expected);
  expect(off, `${what}: shown ${shown.value} ${shown.unit}, computed ${expected}`).toBeLessThanOrEqual(
    shown.halfDigit + ROUNDING * Math.abs(expected),
  );
}

/** A phasor as computed: rms and degrees. */
export type Polar = { readonly size: number; readonly degrees: number };

export function expectPolar(text: string, expected: Polar, what: string): void {
  const { size, angle } = readPolar(text);
  expectFigure(size, expected.size, `size of ${what}`);
  expectFigure(angle, expected.degrees, `angle of ${what}`);
}
