import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { solve } from '@/solver';
import { solved } from '../solver/support/expect';
import type { ComplexLike } from '../solver/support/expect';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import type { WorkedElement, WorkedExample } from './data/worked-examples';
import { WORKED_EXAMPLES } from './data/worked-examples';
import { degrees, magnitude } from './support/measure';

function omegaOf({ omega, frequency }: WorkedExample): number {
  return omega ?? 2 * Math.PI * (frequency ?? 0);
}

/** A fixed impedance is a resistor and a reactance in series, with a node of its own between them. */
function toElements({ n, t, nodes, v }: WorkedElement, omega: number): Element[] {
  const [a, b] = nodes;
  const value = typeof v === 'number' ? v : 0;
  const [re, im] = typeof v === 'object' ? v : [0, 0];
  switch (t) {
    case 'R':
      return [resistor(n, a, b, value)];
    case 'L':
      return [inductor(n, a, b, value)];
    case 'C':
      return [capacitor(n, a, b, value)];
    case 'W':
      return [resistor(n, a, b, 0)];
    case 'V':
      return [voltageSource(n, a, b, re, im)];
    case 'I':
      return [currentSource(n, a, b, re, im)];
    case 'Z': {
      const middle = `${n} inside`;
      const reactance =
        im < 0
          ? capacitor(`${n} reactance`, middle, b, -1 / (omega * im))
          : inductor(`${n} reactance`, middle, b, im / omega);
      return [resistor(n, a, middle, re), reactance];
    }
  }
}

function quotient(a: ComplexLike, b: ComplexLike): ComplexLike {
  const square = b.re ** 2 + b.im ** 2;
  return { re: (a.re * b.re + a.im * b.im) / square, im: (a.im * b.re - a.re * b.im) / square };
}

function difference(a: ComplexLike | undefined, b: ComplexLike | undefined): ComplexLike {
  if (a === undefined || b === undefined) throw new Error('not determined');
  return { re: a.re - b.re, im: a.im - b.im };
}

/** What a quantity of the data comes to. */
function measure(example: WorkedExample, quantity: string): ComplexLike {
  const omega = omegaOf(example);
  const list = network(...example.elements.flatMap((element) => toElements(element, omega)));
  const solution = solved(solve(list, { frequency: omega / (2 * Math.PI) }));
  const match = /^(V|I|E|Zs|Sc)\(([^)]+)\)$/.exec(quantity);
  const [, kind = '', names = ''] = match ?? [];
  const [one = '', other = '0'] = names.split(',');
  const nodes = example.elements.find(({ n }) => n === one)?.nodes ?? ['0', '0'];
  const across = (): ComplexLike => difference(solution.voltage(nodes[0]), solution.voltage(nodes[1]));
  const through = (): ComplexLike => difference(solution.current(one), { re: 0, im: 0 });
  switch (kind) {
    case 'V':
      return difference(solution.voltage(one), solution.voltage(other));
    case 'I':
      return through();
    case 'E':
      return across();
    case 'Zs': {
      const z = quotient(across(), through());
      return { re: -z.re, im: -z.im };
    }
    case 'Sc': {
      const [v, i] = [across(), through()];
      return { re: v.re * i.re + v.im * i.im, im: v.im * i.re - v.re * i.im };
    }
    default:
      throw new Error(`no quantity ${quantity}`);
  }
}

/** The distance between two angles, degrees, the short way round. */
function apart(one: number, other: number): number {
  return Math.abs(((((one - other) % 360) + 540) % 360) - 180);
}

describe.each(WORKED_EXAMPLES)('$id: $title ($source)', (example) => {
  it.each(example.expect)('$q is as calculated, and as printed', ({ q, printed, computed }) => {
    const value = measure(example, q);
    // The calculation carries six digits of each part of a phasor of this size.
    expect(magnitude(difference(value, computed)) / magnitude(computed)).toBeLessThanOrEqual(1e-5);
    if ('re' in printed) {
      expect(magnitude(difference(value, printed))).toBeLessThanOrEqual(printed.within * Math.SQRT2);
      return;
    }
    expect(Math.abs(magnitude(value) - printed.magnitude)).toBeLessThanOrEqual(printed.within);
    if (printed.degrees === undefined) return;
    expect(apart(degrees(value), printed.degrees)).toBeLessThanOrEqual(printed.withinDegrees ?? 0);
  });
});
