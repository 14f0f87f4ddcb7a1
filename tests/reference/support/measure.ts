import type { Element } from '@/solver';
import { solve } from '@/solver';
import type { ComplexLike } from '../../solver/support/expect';
import { solved } from '../../solver/support/expect';
import { currentSource, network, resistor, voltageSource } from '../../solver/support/networks';
import { solveExactly } from './exact-solver';
import type { Against, Output, Reading } from './records';

/** What one measures on a network at one frequency, by way of a solution alone. */

/** What a solution has to answer. Throws where a quantity is not determined. */
export interface Phasors {
  voltage(node: string): ComplexLike;
  current(element: string): ComplexLike;
  /** Of an element's first node over its second; where it stands alone it needs no node voltages. */
  elementVoltage(element: string): ComplexLike;
  power(element: string): ComplexLike;
}

export type SolveAt = (elements: readonly Element[], frequency: number) => Phasors;

export const NOTHING: ComplexLike = { re: 0, im: 0 };

export function add(a: ComplexLike, b: ComplexLike): ComplexLike {
  return { re: a.re + b.re, im: a.im + b.im };
}

export function difference(a: ComplexLike, b: ComplexLike): ComplexLike {
  return { re: a.re - b.re, im: a.im - b.im };
}

export function quotient(a: ComplexLike, b: ComplexLike): ComplexLike {
  const square = b.re ** 2 + b.im ** 2;
  return { re: (a.re * b.re + a.im * b.im) / square, im: (a.im * b.re - a.re * b.im) / square };
}

export function magnitude({ re, im }: ComplexLike): number {
  return Math.hypot(re, im);
}

export function degrees({ re, im }: ComplexLike): number {
  return (Math.atan2(im, re) * 180) / Math.PI;
}

/** By the solver. */
export const bySolver: SolveAt = (elements, frequency) => {
  const solution = solved(solve(network(...elements), { frequency }));
  const determined = (name: string, value: ComplexLike | undefined): ComplexLike => {
    if (value === undefined) throw new Error(`${name} is not determined at ${frequency} Hz`);
    return value;
  };
  return {
    voltage: (node) => determined(`the voltage of node ${node}`, solution.voltage(node)),
    current: (id) => determined(`the current of ${id}`, solution.current(id)),
    elementVoltage: (id) => determined(`the voltage of ${id}`, solution.elementVoltage(id)),
    power: (id) => determined(`the power of ${id}`, solution.power(id)),
  };
};

/** By the dense equations with 64 digits. */
export const byDenseEquations: SolveAt = (elements, frequency) => {
  const solution = solveExactly(network(...elements), frequency);
  const voltage = (node: string): ComplexLike => (node === '0' ? NOTHING : solution.voltage(node));
  const elementVoltage = (id: string): ComplexLike => {
    const [a = '0', b = '0'] = elements.find((element) => element.id === id)?.nodes ?? [];
    return difference(voltage(a), voltage(b));
  };
  return {
    voltage,
    current: (id) => solution.current(id),
    elementVoltage,
    power: (id) => {
      const [v, i] = [elementVoltage(id), solution.current(id)];
      return { re: v.re * i.re + v.im * i.im, im: v.im * i.re - v.re * i.im };
    },
  };
};

/** The network with every source dead: a voltage source is an ideal connection, a current source is open. */
export function withSourcesDead(elements: readonly Element[]): Element[] {
  return elements.flatMap((element) => {
    if (element.kind === 'currentSource') return [];
    return element.kind === 'voltageSource' ? [resistor(element.id, ...element.nodes, 0)] : [element];
  });
}

/** The impedance between a node and another with all sources dead: 1 A is sent in. */
export function impedance(
  elements: readonly Element[],
  frequency: number,
  node: string,
  over = '0',
  solveAt: SolveAt = bySolver,
): ComplexLike {
  const solution = solveAt([...withSourcesDead(elements), currentSource('probe', over, node, 1)], frequency);
  // The probe's first node is the one that the current leaves.
  return difference(NOTHING, solution.elementVoltage('probe'));
}

/** What an output of a network comes to at a frequency. */
export function valueOf(
  elements: readonly Element[],
  output: Output,
  frequency: number,
  solveAt: SolveAt = bySolver,
): ComplexLike {
  switch (output.of) {
    case 'voltage': {
      const solution = solveAt(elements, frequency);
      const own = solution.voltage(output.node);
      return output.over === undefined ? own : difference(own, solution.voltage(output.over));
    }
    case 'sum': {
      const solution = solveAt(elements, frequency);
      return output.nodes.map((node) => solution.voltage(node)).reduce(add);
    }
    case 'ratio': {
      const solution = solveAt(elements, frequency);
      return quotient(solution.voltage(output.node), solution.voltage(output.to));
    }
    case 'current':
      return solveAt(elements, frequency).current(output.element);
    case 'elementVoltage':
      return solveAt(elements, frequency).elementVoltage(output.element);
    case 'power': {
      const solution = solveAt(elements, frequency);
      return output.elements.map((element) => solution.power(element)).reduce(add, NOTHING);
    }
    case 'powerShare': {
      const solution = solveAt(elements, frequency);
      return { re: -solution.power(output.element).re / solution.power(output.source).re, im: 0 };
    }
    case 'impedance':
      return impedance(elements, frequency, output.node, output.over, solveAt);
    case 'impedanceSeen': {
      const solution = solveAt(elements, frequency);
      return difference(NOTHING, quotient(solution.elementVoltage(output.element), solution.current(output.element)));
    }
    case 'reflection': {
      // (Z − R)/(Z + R), the source seeing Z + R.
      const seen = valueOf(elements, { of: 'impedanceSeen', element: output.source }, frequency, solveAt);
      return quotient({ re: seen.re - 2 * output.reference, im: seen.im }, seen);
    }
    case 'insertion': {
      const { from, to, source, load } = output;
      const terminated = [
        voltageSource('insertion source', 'insertion', '0', 1),
        resistor('insertion source resistance', 'insertion', from, source),
        ...withSourcesDead(elements),
        resistor('insertion load', to, '0', load),
      ];
      const without = { re: load / (source + load), im: 0 };
      return quotient(without, solveAt(terminated, frequency).voltage(to));
    }
  }
}

/** A complex value as it is read, against a size. */
export function read(value: ComplexLike, reading: Reading, against = 1): number {
  switch (reading) {
    case 'magnitude':
      return magnitude(value) / against;
    case 'degrees':
      return degrees(value);
    case 're':
      return value.re / against;
    case 'im':
      return value.im / against;
    case 'decibels':
      return 20 * Math.log10(magnitude(value) / against);
    case 'powerDecibels':
      return 10 * Math.log10(magnitude(value) / against);
  }
}

/** A reading of a network as a function of frequency. */
export function readingOf(
  elements: readonly Element[],
  { output, read: reading, against = 1 }: { readonly output: Output; readonly read: Reading; readonly against?: Against },
  solveAt: SolveAt = bySolver,
): (frequency: number) => number {
  const size = typeof against === 'number' ? against : magnitude(valueOf(elements, output, against.frequency, solveAt));
  return (frequency) => read(valueOf(elements, output, frequency, solveAt), reading, size);
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

/** The frequency of the largest value between two: the best of a fine grid, then by the golden section. */
export function peak(of: (frequency: number) => number, low: number, high: number): number {
  const grid = logarithmic(low, high, 201);
  const sizes = grid.map(of);
  const best = sizes.indexOf(Math.max(...sizes));
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [grid[Math.max(best - 1, 0)] ?? low, grid[Math.min(best + 1, 200)] ?? high];
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
