import { describe, expect, it } from 'vitest';
import { polesAndZeros } from '@/solver';
import { network } from '../solver/support/networks';
import {
  BESSEL,
  BESSEL_3_DECIBELS,
  BESSEL_HALF_POWER,
  BESSEL_SINGLE,
  PRINTED_BESSEL,
  PRINTED_BESSEL_3_DECIBELS,
} from './data/bessel-prototypes';
import {
  BUTTERWORTH,
  BUTTERWORTH_QUALITIES,
  BUTTERWORTH_SINGLE,
  CHEBYSHEV,
  CHEBYSHEV_SINGLE,
  PRINTED_CHEBYSHEV,
  PRINTED_EVEN_LOAD,
} from './data/ladder-prototypes';
import { atHalfPower, bessel, besselHalfPower, besselOnVoltageSource } from './support/bessel-ladders';
import {
  butterworth,
  butterworthOnVoltageSource,
  chebyshev,
  chebyshevOnVoltageSource,
  ladderNetwork,
} from './support/ladders';

/** The published tables against the closed forms that the ladders of the other tests are built by. */

/** Half a unit of the sixth decimal, and of the fourth; half a unit in decimals is not exactly so in binary. */
const SIX = 0.5e-6 * (1 + 1e-9);
const FOUR = 0.5e-4 * (1 + 1e-9);

function expectTable(values: readonly number[], printed: readonly number[], within: number): void {
  expect(values).toHaveLength(printed.length);
  values.forEach((value, k) => expect(Math.abs(value - (printed[k] ?? NaN)), `g${k + 1}`).toBeLessThanOrEqual(within));
}

function rowsOf<T>(table: Readonly<Record<string, Readonly<Record<number, T>>>>): readonly (readonly [string, string, T])[] {
  return Object.entries(table).flatMap(([ripple, orders]) =>
    Object.entries(orders).map(([order, row]) => [ripple, order, row] as const),
  );
}

describe('Butterworth', () => {
  it.each(Object.entries(BUTTERWORTH))('order %s', (order, row) => {
    expectTable(butterworth(Number(order)).g, row, SIX);
  });

  it.each(Object.entries(BUTTERWORTH_SINGLE))('order %s on a voltage source', (order, row) => {
    expectTable(butterworthOnVoltageSource(Number(order)).g, row, SIX);
  });

  it.each(Object.entries(BUTTERWORTH_QUALITIES))('order %s: the qualities of its stages', (order, row) => {
    const n = Number(order);
    // Q = 1/(2 sin((2k − 1)π/2n)), the poles being spread evenly over half a circle; the largest last.
    const qualities = Array.from({ length: Math.floor(n / 2) }, (_, k) => 1 / (2 * Math.sin(((2 * k + 1) * Math.PI) / (2 * n))));
    expectTable(qualities.reverse(), row, FOUR);
  });

  it.each(Object.entries(BUTTERWORTH_QUALITIES))('order %s: the same qualities of the poles of its ladder', (order, row) => {
    const { elements, out } = ladderNetwork(butterworth(Number(order)), true);
    const found = polesAndZeros(network(...elements), { kind: 'transfer', source: 'V1', output: { quantity: 'voltage', node: out } });
    if (!found.ok) throw new Error(found.message);
    const qualities = found.poles.flatMap(({ s, q }) => (s.im > 0 ? [q ?? Infinity] : []));
    expectTable(
      qualities.sort((a, b) => a - b),
      row,
      FOUR,
    );
    // One stage of the first order is left of an odd order, at 1 rad/s.
    const alone = found.poles.filter(({ s }) => s.im === 0);
    expect(alone).toHaveLength(Number(order) % 2);
    for (const { s } of alone) expect(Math.abs(s.re + 1)).toBeLessThanOrEqual(1e-12);
  });
});

describe('Chebyshev', () => {
  it.each(rowsOf(CHEBYSHEV))('%s dB, order %s, to six decimals', (ripple, order, row) => {
    const { g, load } = chebyshev(Number(order), Number(ripple));
    expectTable([...g, load], [...row.g, row.load], SIX);
  });

  it.each(rowsOf(CHEBYSHEV_SINGLE))('%s dB, order %s, on a voltage source', (ripple, order, row) => {
    expectTable(chebyshevOnVoltageSource(Number(order), Number(ripple)).g, row, SIX);
  });

  it.each(rowsOf(PRINTED_CHEBYSHEV))('%s dB, order %s, as printed', (ripple, order, row) => {
    const { g, load } = chebyshev(Number(order), Number(ripple));
    expectTable([...g, load], [...row.g, row.load], row.within ?? FOUR);
  });

  it('has the load of even orders as printed', () => {
    const { ripple, load, within } = PRINTED_EVEN_LOAD;
    for (const order of [2, 4, 6, 8, 10]) expectTable([chebyshev(order, ripple).load], [load], within);
  });
});

describe('Bessel', () => {
  it.each(Object.entries(BESSEL))('order %s, a delay of 1 s', (order, row) => {
    expectTable(bessel(Number(order)).g, row, SIX);
  });

  it.each(Object.entries(BESSEL_HALF_POWER))('order %s has half its power there', (order, omega) => {
    expectTable([besselHalfPower(Number(order))], [omega], SIX);
  });

  it.each(Object.entries(BESSEL_3_DECIBELS))('order %s, half power at 1 rad/s', (order, row) => {
    expectTable(atHalfPower(bessel(Number(order)), Number(order)).g, row, SIX);
  });

  it.each(Object.entries(BESSEL_SINGLE))('order %s on a voltage source', (order, row) => {
    expectTable(besselOnVoltageSource(Number(order)).g, row, SIX);
  });

  it.each(Object.entries(PRINTED_BESSEL))('order %s, a delay of 1 s, as printed', (order, row) => {
    expectTable(bessel(Number(order)).g, row, FOUR);
  });

  it.each(Object.entries(PRINTED_BESSEL_3_DECIBELS))('order %s, half power at 1 rad/s, as printed', (order, row) => {
    expectTable([...atHalfPower(bessel(Number(order)), Number(order)).g].reverse(), row, FOUR);
  });
});
