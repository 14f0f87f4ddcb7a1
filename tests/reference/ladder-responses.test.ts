import { describe, expect, it } from 'vitest';
import { polesAndZeros } from '@/solver';
import type { ComplexLike } from '../solver/support/expect';
import { network } from '../solver/support/networks';
import {
  atHalfPower,
  bessel,
  besselDelay,
  besselHalfPower,
  besselOnVoltageSource,
  besselTransfer,
} from './support/bessel-ladders';
import type { BuiltLadder, Ladder } from './support/ladders';
import {
  butterworth,
  butterworthOnVoltageSource,
  chebyshev,
  chebyshevOnVoltageSource,
  chebyshevSquared,
  ladderNetwork,
  rippleSquared,
} from './support/ladders';
import { bySolver, difference, logarithmic, magnitude } from './support/measure';

/** Ladders by their closed forms, to order 10: the solver has of them the response that the polynomial promises. */
const ORDERS = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10];
const RIPPLES = [0.1, 0.5, 1, 3];
const OMEGAS = logarithmic(0.1, 10, 25);

/**
 * The relative sensitivities of a ladder of n elements add up to some 2n, more beside the edge of a Chebyshev band: this
 * many units of rounding for each element, for the network and for the formula together; 7e-14 at order 10.
 */
const close = (order: number): number => 32 * order * Number.EPSILON;

function loadVoltage({ elements, out }: BuiltLadder, omega: number): ComplexLike {
  return bySolver(elements, omega / (2 * Math.PI)).voltage(out);
}

/** Power in the load over the power that the source of 1 V and 1 Ω could give, 1/4 W. */
function powerTransfer(built: BuiltLadder, omega: number): number {
  return (4 * magnitude(loadVoltage(built, omega)) ** 2) / built.loadOhms;
}

function expectPower(ladder: Ladder, shuntFirst: boolean, promised: (omega: number) => number): void {
  const built = ladderNetwork(ladder, shuntFirst);
  for (const omega of OMEGAS) {
    expect(Math.abs(powerTransfer(built, omega) / promised(omega) - 1), `at ${omega}`).toBeLessThanOrEqual(close(ladder.g.length));
  }
}

/** On an ideal voltage source a series inductor comes first. */
function expectVoltage(ladder: Ladder, promised: (omega: number) => number): void {
  const built = ladderNetwork(ladder, false, 0);
  for (const omega of OMEGAS) {
    const actual = magnitude(loadVoltage(built, omega));
    expect(Math.abs(actual / promised(omega) - 1), `at ${omega}`).toBeLessThanOrEqual(close(ladder.g.length));
  }
}

function expectPhasor(n: number, built: BuiltLadder, scale: number, promised: (omega: number) => ComplexLike): void {
  for (const omega of OMEGAS) {
    const { re, im } = loadVoltage(built, omega);
    const expected = promised(omega);
    const off = magnitude(difference({ re: scale * re, im: scale * im }, expected)) / magnitude(expected);
    expect(off, `at ${omega}`).toBeLessThanOrEqual(close(n));
  }
}

const butterworthPower = (n: number) => (omega: number) => 1 / (1 + omega ** (2 * n));
const chebyshevPower = (n: number, ripple: number) => (omega: number) =>
  1 / (1 + rippleSquared(ripple) * chebyshevSquared(n, omega));
const EACH_RIPPLE = ORDERS.flatMap((n) => RIPPLES.map((ripple) => [n, ripple] as const));

describe.each([true, false])('doubly terminated, shunt first: %s', (shuntFirst) => {
  it.each(ORDERS)('Butterworth of order %d follows 1/(1 + ω^2n)', (n) => {
    expectPower(butterworth(n), shuntFirst, butterworthPower(n));
  });

  it.each(EACH_RIPPLE)('Chebyshev of order %d and %d dB follows 1/(1 + ε²T²)', (n, ripple) => {
    expectPower(chebyshev(n, ripple), shuntFirst, chebyshevPower(n, ripple));
  });

  it.each(ORDERS)('Bessel of order %d follows θ(0)/θ(jω), in phase too', (n) => {
    expectPhasor(n, ladderNetwork(bessel(n), shuntFirst), 2, (omega) => besselTransfer(n, omega));
  });

  it.each(ORDERS)('Bessel of order %d has the group delay of its polynomial by its poles, 1 s at low frequencies', (n) => {
    const { elements, out } = ladderNetwork(bessel(n), shuntFirst);
    const found = polesAndZeros(network(...elements), {
      kind: 'transfer',
      source: 'V1',
      output: { quantity: 'voltage', node: out },
    });
    if (!found.ok) throw new Error(found.message);
    expect(found.zeros).toEqual([]);
    for (const omega of [0, ...OMEGAS]) {
      let [delay, bound] = [0, 0];
      for (const { s, uncertainty } of found.poles) {
        const square = s.re ** 2 + (omega - s.im) ** 2;
        delay += -s.re / square;
        bound += (4 * uncertainty) / square;
      }
      const promised = besselDelay(n, omega);
      expect(Math.abs(delay - promised), `at ${omega}`).toBeLessThanOrEqual(bound + 16 * Number.EPSILON * promised);
      expect(bound, 'the poles are sharp enough to tell').toBeLessThanOrEqual(1e-9);
    }
    expect(besselDelay(n, 0)).toBe(1);
  });

  it.each(ORDERS)('Bessel of order %d by half power has it at 1 rad/s, and the same shape', (n) => {
    const built = ladderNetwork(atHalfPower(bessel(n), n), shuntFirst);
    expect(Math.abs(powerTransfer(built, 1) - 0.5)).toBeLessThanOrEqual(close(n));
    expectPhasor(n, built, 2, (omega) => besselTransfer(n, omega * besselHalfPower(n)));
  });
});

describe('on an ideal voltage source', () => {
  it.each(ORDERS)('Butterworth of order %d follows 1/√(1 + ω^2n)', (n) => {
    expectVoltage(butterworthOnVoltageSource(n), (omega) => Math.sqrt(butterworthPower(n)(omega)));
  });

  it.each(EACH_RIPPLE)('Chebyshev of order %d and %d dB follows 1/√(1 + ε²T²), and is 1 at 0 Hz', (n, ripple) => {
    const whole = n % 2 === 1 ? 1 : 1 + rippleSquared(ripple);
    expectVoltage(chebyshevOnVoltageSource(n, ripple), (omega) => Math.sqrt(whole * chebyshevPower(n, ripple)(omega)));
  });

  it.each(ORDERS)('Bessel of order %d follows θ(0)/θ(jω), in phase too', (n) => {
    expectPhasor(n, ladderNetwork(besselOnVoltageSource(n), false, 0), 1, (omega) => besselTransfer(n, omega));
  });
});
