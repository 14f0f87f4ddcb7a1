import { expect } from 'vitest';
import type { Element, ElementList, Solution } from '@/solver';
import { solve } from '@/solver';
import { solved } from '../../solver/support/expect';
import type { ComplexLike } from '../../solver/support/expect';
import { currentSource, network } from '../../solver/support/networks';

/** What one measures on a network, by way of the solver alone. */

export function at(list: ElementList, frequency: number): Solution {
  return solved(solve(list, { frequency }));
}

/** The voltage of a node; throws where it is not determined. */
export function voltage(list: ElementList, frequency: number, node: string): ComplexLike {
  const value = at(list, frequency).voltage(node);
  if (value === undefined) throw new Error(`the voltage of node ${node} is not determined`);
  return value;
}

export function current(list: ElementList, frequency: number, id: string): ComplexLike {
  const value = at(list, frequency).current(id);
  if (value === undefined) throw new Error(`the current of ${id} is not determined`);
  return value;
}

export function power(list: ElementList, frequency: number, id: string): ComplexLike {
  const value = at(list, frequency).power(id);
  if (value === undefined) throw new Error(`the power of ${id} is not determined`);
  return value;
}

export function magnitude({ re, im }: ComplexLike): number {
  return Math.hypot(re, im);
}

export function degrees({ re, im }: ComplexLike): number {
  return (Math.atan2(im, re) * 180) / Math.PI;
}

export function decibels(ratio: number): number {
  return 20 * Math.log10(ratio);
}

/** The level of a node's voltage against so many volts, dB. */
export function level(list: ElementList, frequency: number, node: string, volts: number): number {
  return decibels(magnitude(voltage(list, frequency, node)) / volts);
}

/** The impedance between a node and the reference of a network without live sources: 1 A is sent in. */
export function impedance(elements: readonly Element[], frequency: number, node: string): ComplexLike {
  return voltage(network(...elements, currentSource('probe', '0', node, 1)), frequency, node);
}

/** The reflection coefficient of an impedance at the end of a line of real impedance. */
export function reflection(z: ComplexLike, reference: number): ComplexLike {
  const square = (z.re + reference) ** 2 + z.im ** 2;
  return { re: (z.re ** 2 - reference ** 2 + z.im ** 2) / square, im: (2 * reference * z.im) / square };
}

/** The frequency at which something passes through zero, between two at which its signs differ; by halving. */
export function crossing(of: (frequency: number) => number, low: number, high: number): number {
  let [a, b] = [low, high];
  const sign = Math.sign(of(a));
  if (sign === Math.sign(of(b))) throw new Error('no crossing in between');
  for (let step = 0; step < 200 && b - a > 1e-14 * b; step++) {
    const middle = (a + b) / 2;
    if (Math.sign(of(middle)) === sign) a = middle;
    else b = middle;
  }
  return (a + b) / 2;
}

/** The frequency of the largest value between two, where there is one maximum; by the golden section. */
export function peak(of: (frequency: number) => number, low: number, high: number): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [low, high];
  while (b - a > 1e-9 * b) {
    const left = b - ratio * (b - a);
    const right = a + ratio * (b - a);
    if (of(left) > of(right)) b = right;
    else a = left;
  }
  return (a + b) / 2;
}

/** Frequencies from low to high, evenly spaced on a logarithmic scale. */
export function logarithmic(low: number, high: number, count: number): number[] {
  return Array.from({ length: count }, (_, k) => low * (high / low) ** (k / (count - 1)));
}

/** The value is the printed figure, to half a unit of its last digit. */
export function expectFigure(value: number, printed: string): void {
  const plain = printed.replace('\u2212', '-');
  const [mantissa = '', power = '0'] = plain.split('e');
  const decimals = (mantissa.split('.')[1] ?? '').length;
  const half = 0.5 * 10 ** (Number(power) - decimals);
  expect(Math.abs(value - Number(plain)), `${value} against ${printed}`).toBeLessThanOrEqual(half * (1 + 1e-9));
}
