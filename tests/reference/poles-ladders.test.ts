import { describe, expect, it } from 'vitest';
import type { Element, ElementList } from '@/solver';
import type { PolesAndZeros } from '@/solver/analysis/poles-and-zeros';
import { polesAndZeros } from '@/solver/analysis/poles-and-zeros';
import { capacitor, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import { found, toNode } from '../solver/support/roots';
import { besselLadder, besselRoot } from './support/bessel';

/**
 * The poles of the classic ladders to order 10 against the closed forms from which they come. Ladder elements by
 * Matthaei, Young and Jones, *Microwave Filters, Impedance-Matching Networks, and Coupling Structures* (1964) [memory,
 * confirmed by calculation]. The unit of comparison is a pole's own uncertainty: what one unit of rounding in every
 * element moves it by.
 */
const UNITS = 4;

const ORDERS = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10];

/** A source of 1 V with its resistance, a ladder whose first element is a shunt capacitor, a load. */
function doublyTerminated(g: readonly number[], load: number): ElementList {
  const elements: Element[] = [voltageSource('V1', 'emf', '0', 1), resistor('Rs', 'emf', 'n0', 1)];
  let node = 0;
  g.forEach((value, k) => {
    if (k % 2 === 0) elements.push(capacitor(`C${k}`, `n${node}`, '0', value));
    else elements.push(inductor(`L${k}`, `n${node}`, `n${++node}`, value));
  });
  elements.push(resistor('RL', `n${node}`, '0', load));
  return network(...elements);
}

function lastNode(list: ElementList): string {
  return list.elements.find(({ id }) => id === 'RL')?.nodes[0] ?? '';
}

function rootsOf(list: ElementList): PolesAndZeros {
  const result = found(polesAndZeros(list, toNode(lastNode(list))));
  expect(result.zeros).toEqual([]);
  expect(result.stability).toBe('stable');
  return result;
}

/** In units of each pole's uncertainty, the worst distance to the expected ones; each is taken once. */
function worst({ poles }: PolesAndZeros, expected: readonly (readonly [number, number])[]): number {
  expect(poles.length).toBe(expected.length);
  const left = [...expected];
  return poles.reduce((most, { s, uncertainty }) => {
    const distances = left.map(([re, im]) => Math.hypot(s.re - re, s.im - im));
    const least = Math.min(...distances);
    left.splice(distances.indexOf(least), 1);
    return Math.max(most, least / uncertainty);
  }, 0);
}

describe('Butterworth ladders', () => {
  it.each(ORDERS)('of order %d have their poles on the unit circle, (2k + n − 1)·90°/n apart', (n) => {
    const g = Array.from({ length: n }, (_, k) => 2 * Math.sin(((2 * k + 1) * Math.PI) / (2 * n)));
    const result = rootsOf(doublyTerminated(g, 1));
    const expected = Array.from({ length: n }, (_, k): [number, number] => {
      const angle = ((2 * k + 1) * Math.PI) / (2 * n);
      return [-Math.sin(angle), Math.cos(angle)];
    });
    expect(worst(result, expected)).toBeLessThanOrEqual(UNITS);
    // |H| at 0 Hz is a half.
    expect(Math.abs((result.gain ?? 0) - 0.5)).toBeLessThanOrEqual(64 * n * Number.EPSILON);
  });

  // Q of each pair as printed in tables of filter stages [found: several public transcriptions].
  it.each([
    [2, [0.7071]],
    [3, [1.0]],
    [4, [0.5412, 1.3066]],
    [5, [0.618, 1.618]],
    [6, [0.5176, 0.7071, 1.9319]],
    [7, [0.555, 0.8019, 2.247]],
    [8, [0.5098, 0.6013, 0.9, 2.5629]],
    [9, [0.5321, 0.6527, 1.0, 2.8794]],
    [10, [0.5062, 0.5612, 0.7071, 1.1013, 3.1962]],
  ] as const)('of order %d have the printed qualities %s', (n, printed) => {
    const g = Array.from({ length: n }, (_, k) => 2 * Math.sin(((2 * k + 1) * Math.PI) / (2 * n)));
    const { poles } = rootsOf(doublyTerminated(g, 1));
    const qualities = poles.filter(({ s }) => s.im > 0).map(({ q }) => q ?? 0).sort((a, b) => a - b);
    expect(qualities.length).toBe(printed.length);
    qualities.forEach((q, k) => expect(Math.abs(q - (printed[k] ?? 0))).toBeLessThanOrEqual(0.5e-4 * (1 + 1e-9)));
    for (const { frequency } of poles) expect(Math.abs(frequency * 2 * Math.PI - 1)).toBeLessThanOrEqual(1e-13);
  });
});

describe('Chebyshev ladders', () => {
  const cases = [0.1, 0.5, 1, 3].flatMap((ripple) => ORDERS.map((n) => [ripple, n] as const));
  it.each(cases)('of %d dB and order %s have their poles on the ellipse', (ripple, n) => {
    const beta = Math.log(1 / Math.tanh((ripple * Math.LN10) / 40));
    const gamma = Math.sinh(beta / (2 * n));
    const a = (k: number): number => Math.sin(((2 * k - 1) * Math.PI) / (2 * n));
    const b = (k: number): number => gamma ** 2 + Math.sin((k * Math.PI) / n) ** 2;
    const g: number[] = [];
    for (let k = 1; k <= n; k++) g.push(k === 1 ? (2 * a(1)) / gamma : (4 * a(k - 1) * a(k)) / (b(k - 1) * (g[k - 2] ?? 1)));
    const load = n % 2 === 1 ? 1 : 1 / Math.tanh(beta / 4) ** 2;
    // A resistance after a shunt capacitor, a conductance after a series inductor.
    const result = rootsOf(doublyTerminated(g, n % 2 === 1 ? load : 1 / load));
    const expected = Array.from({ length: n }, (_, k): [number, number] => {
      const angle = ((2 * k + 1) * Math.PI) / (2 * n);
      return [-gamma * Math.sin(angle), Math.sqrt(1 + gamma ** 2) * Math.cos(angle)];
    });
    // Each element is itself a chain of products, k long, of sines and hyperbolic functions.
    expect(worst(result, expected)).toBeLessThanOrEqual(UNITS * 4);
  });
});

describe('Bessel ladders', () => {
  // Driven by an ideal source, loaded with 1 Ω, unit delay; the elements of Matthaei, Young and Jones, table 4.07 [number from memory], to its digits.
  it.each([
    [2, [1.0, 0.333333]],
    [3, [0.833333, 0.48, 0.166667]],
    [5, [0.623077, 0.421499, 0.310256, 0.194805, 0.066667]],
    [10, [0.416971, 0.279741, 0.23105, 0.202103, 0.176979, 0.150399, 0.12092, 0.088605, 0.054081, 0.018182]],
  ] as const)('of order %d have the elements that were computed elsewhere, %s', (n, printed) => {
    besselLadder(n).forEach((value, k) => expect(Math.abs(value - (printed[k] ?? 0))).toBeLessThanOrEqual(0.5e-6));
  });

  it.each(ORDERS)('of order %d have the roots of the reverse Bessel polynomial for poles', (n) => {
    const elements: Element[] = [voltageSource('V1', 'n0', '0', 1)];
    let node = 0;
    besselLadder(n).forEach((value, k) => {
      if (k % 2 === 0) elements.push(inductor(`L${k}`, `n${node}`, `n${++node}`, value));
      else elements.push(capacitor(`C${k}`, `n${node}`, '0', value));
    });
    elements.push(resistor('RL', `n${node}`, '0', 1));
    const result = rootsOf(network(...elements));
    // Newton's step from each pole, with 200 bits: the exact root beside it.
    const exact = result.poles.map(({ s }) => besselRoot(n, s.re, s.im));
    expect(new Set(exact.map(([re, im]) => `${re.toFixed(6)} ${im.toFixed(6)}`)).size).toBe(n);
    expect(worst(result, exact)).toBeLessThanOrEqual(UNITS);
  });
});
