import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { capacitor, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import { BUTTERWORTH, BUTTERWORTH_SINGLE, CHEBYSHEV, PRINTED_CHEBYSHEV } from './data/ladder-prototypes';
import { logarithmic, magnitude, power, voltage } from './support/measure';

/**
 * Ladders by the closed forms of Matthaei, Young and Jones, *Microwave Filters, Impedance-Matching Networks, and
 * Coupling Structures* (1964) [memory, confirmed by calculation], against the attenuation that they promise.
 */
interface Ladder {
  readonly g: readonly number[];
  /** A resistance if the last element is a shunt capacitor, a conductance if it is a series inductor. */
  readonly load: number;
}

/** g_k = 2 sin((2k − 1)π/2n). */
function butterworth(n: number): Ladder {
  return { g: Array.from({ length: n }, (_, k) => 2 * Math.sin(((2 * k + 1) * Math.PI) / (2 * n))), load: 1 };
}

/** With β = ln coth(ripple/17.37…), γ = sinh(β/2n), a_k = sin((2k − 1)π/2n), b_k = γ² + sin²(kπ/n). */
function chebyshev(n: number, rippleDecibels: number): Ladder {
  const beta = Math.log(1 / Math.tanh((rippleDecibels * Math.LN10) / 40));
  const gamma = Math.sinh(beta / (2 * n));
  const a = (k: number): number => Math.sin(((2 * k - 1) * Math.PI) / (2 * n));
  const b = (k: number): number => gamma ** 2 + Math.sin((k * Math.PI) / n) ** 2;
  const g: number[] = [];
  let last = 0;
  for (let k = 1; k <= n; k++) {
    last = k === 1 ? (2 * a(1)) / gamma : (4 * a(k - 1) * a(k)) / (b(k - 1) * last);
    g.push(last);
  }
  return { g, load: n % 2 === 1 ? 1 : 1 / Math.tanh(beta / 4) ** 2 };
}

/** 1 rad/s and 1 Ω, from an electromotive force of 1 V; `shuntFirst` or its dual. */
function build({ g, load }: Ladder, shuntFirst: boolean, source = 1): { elements: Element[]; loadOhms: number } {
  const elements: Element[] = [voltageSource('V1', 'emf', '0', 1), resistor('Rs', 'emf', 'n0', source)];
  g.forEach((value, k) => {
    const isShunt = (k % 2 === 0) === shuntFirst;
    if (isShunt) elements.push(resistor(`W${k}`, `n${k}`, `n${k + 1}`, 0), capacitor(`C${k}`, `n${k + 1}`, '0', value));
    else elements.push(inductor(`L${k}`, `n${k}`, `n${k + 1}`, value));
  });
  const lastIsShunt = (g.length % 2 === 1) === shuntFirst;
  const loadOhms = lastIsShunt ? load : 1 / load;
  elements.push(resistor('RL', `n${g.length}`, '0', loadOhms));
  return { elements, loadOhms };
}

const ONE_RADIAN = 1 / (2 * Math.PI);
const OMEGAS = logarithmic(0.1, 10, 25);

/** Power in the load over the power that the source could give, 1/4 W. */
function transfer(ladder: Ladder, shuntFirst: boolean, omega: number): number {
  return 4 * power(network(...build(ladder, shuntFirst).elements), omega * ONE_RADIAN, 'RL').re;
}

/** T_n(ω)² without the cancellation of the polynomial's terms. */
function chebyshevSquared(n: number, omega: number): number {
  return omega <= 1 ? Math.cos(n * Math.acos(omega)) ** 2 : Math.cosh(n * Math.acosh(omega)) ** 2;
}

const ORDERS = [2, 3, 4, 5, 6, 7, 8, 9];

/**
 * A ladder of n elements between terminations has relative sensitivities that add up to some 2n, more beside the edge
 * of a Chebyshev band: this many units of rounding for each element, for the power and for the formula together.
 */
const UNITS = 32;

describe.each([true, false])('doubly terminated ladders, shunt first: %s', (shuntFirst) => {
  it.each(ORDERS)('Butterworth of order %d follows 1/(1 + ω^2n)', (n) => {
    for (const omega of OMEGAS) {
      const promised = 1 / (1 + omega ** (2 * n));
      expect(Math.abs(transfer(butterworth(n), shuntFirst, omega) / promised - 1)).toBeLessThanOrEqual(
        UNITS * n * Number.EPSILON,
      );
    }
  });

  it.each(ORDERS.flatMap((n) => [0.01, 0.1, 0.5, 1, 3].map((ripple) => [n, ripple] as const)))(
    'Chebyshev of order %d and %d dB ripple follows 1/(1 + ε²T²)',
    (n, ripple) => {
      const epsilonSquared = Math.expm1((ripple * Math.LN10) / 10);
      for (const omega of OMEGAS) {
        const promised = 1 / (1 + epsilonSquared * chebyshevSquared(n, omega));
        const actual = transfer(chebyshev(n, ripple), shuntFirst, omega);
        expect(Math.abs(actual / promised - 1), `at ${omega}`).toBeLessThanOrEqual(UNITS * n * Number.EPSILON);
      }
    },
  );

  it.each(ORDERS)('Butterworth of order %d has half the power at 1 rad/s', (n) => {
    expect(Math.abs(transfer(butterworth(n), shuntFirst, 1) - 0.5)).toBeLessThanOrEqual(UNITS * n * Number.EPSILON);
  });
});

describe('a ladder on an ideal voltage source', () => {
  it.each(Object.entries(BUTTERWORTH_SINGLE))('Butterworth of order %s follows 1/√(1 + ω^2n)', (order, g) => {
    const n = Number(order);
    for (const omega of OMEGAS) {
      const { elements } = build({ g, load: 1 }, false, 0);
      const actual = magnitude(voltage(network(...elements), omega * ONE_RADIAN, `n${n}`));
      const promised = 1 / Math.sqrt(1 + omega ** (2 * n));
      // The table has six decimals, and each element acts on the response once or, near the edge, a few times.
      expect(Math.abs(actual / promised - 1)).toBeLessThanOrEqual(1e-6 * n * 4);
    }
  });
});

describe('tables', () => {
  it.each(Object.entries(BUTTERWORTH))('Butterworth of order %s', (order, printed) => {
    butterworth(Number(order)).g.forEach((g, k) =>
      expect(Math.abs(g - (printed[k] ?? 0))).toBeLessThanOrEqual(0.51e-6),
    );
  });

  it.each(
    Object.entries(CHEBYSHEV).flatMap(([ripple, orders]) =>
      Object.entries(orders).map(([n, ladder]) => [ripple, n, ladder] as const),
    ),
  )('Chebyshev of %s dB, order %s, to six decimals', (ripple, order, printed) => {
    const { g, load } = chebyshev(Number(order), Number(ripple));
    g.forEach((value, k) => expect(Math.abs(value - (printed.g[k] ?? 0))).toBeLessThanOrEqual(0.51e-6));
    expect(Math.abs(load - printed.load)).toBeLessThanOrEqual(0.51e-6);
  });

  it.each(
    Object.entries(PRINTED_CHEBYSHEV).flatMap(([ripple, orders]) =>
      Object.entries(orders).map(([n, ladder]) => [ripple, n, ladder] as const),
    ),
  )('Chebyshev of %s dB, order %s, as printed to four digits', (ripple, order, printed) => {
    const { g, load } = chebyshev(Number(order), Number(ripple));
    g.forEach((value, k) => expect(Math.abs(value - (printed.g[k] ?? 0))).toBeLessThanOrEqual(1e-3));
    expect(Math.abs(load - printed.load)).toBeLessThanOrEqual(1e-3);
  });
});
