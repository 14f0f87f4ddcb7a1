import { describe, expect, it } from 'vitest';
import type { Element, ElementList } from '@/solver';
import { partialFractions } from '@/solver/analysis/partial-fractions';
import type { PolesAndZeros, Transfer } from '@/solver/analysis/poles-and-zeros';
import { polesAndZeros } from '@/solver/analysis/poles-and-zeros';
import type { TimeResponse, TimeValues } from '@/solver/analysis/time-response';
import { impulseResponse, stepResponse } from '@/solver/analysis/time-response';
import { capacitor, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';
import { amplifier, buffer, evaluate, found, refused, toNode } from './support/roots';

function transferOf(list: ElementList, to: Transfer): PolesAndZeros {
  return found(polesAndZeros(list, to));
}

function valuesOf(response: TimeResponse, times: ArrayLike<number>): TimeValues {
  const values = response.evaluate(times);
  if (!values.ok) throw new Error(values.message);
  return values;
}

/**
 * Values are the expected ones within their own bounds and the rounding of the closed form, whose terms are of the size
 * `scale`; and the bounds are as small as `tightness` says, against that.
 */
function expectCourse(response: TimeResponse, times: readonly number[], expected: (t: number) => number, scale: number, tightness: number): void {
  const { values, bounds } = valuesOf(response, times);
  times.forEach((t, k) => {
    const bound = bounds[k] ?? 0;
    expect(Math.abs((values[k] ?? Infinity) - expected(t)), `at ${t} s`).toBeLessThanOrEqual(bound + 2 * Number.EPSILON * scale);
    expect(bound).toBeLessThanOrEqual(tightness * scale * Number.EPSILON);
  });
}

const V1 = voltageSource('V1', 's', '0', 1);

/** n sections of one time constant, each behind a buffer. */
function buffered(n: number, tau: number): ElementList {
  const elements: Element[] = [voltageSource('V1', 'n0', '0', 1)];
  for (let k = 0; k < n; k++) {
    elements.push(resistor(`R${k}`, `n${k}`, `m${k}`, 1e3), capacitor(`C${k}`, `m${k}`, '0', tau / 1e3), buffer(`E${k}`, `m${k}`, `n${k + 1}`));
  }
  return network(...elements);
}

function spaced(low: number, high: number, count: number): number[] {
  return Array.from({ length: count }, (_, k) => low * (high / low) ** (k / (count - 1)));
}

describe('step and impulse responses in closed form', () => {
  const tau = 1e3 * 1e-6;
  it('of R-C: 1 − e^(−t/τ), and e^(−t/τ)/τ', () => {
    const transfer = transferOf(network(V1, resistor('R1', 's', 'o', 1e3), capacitor('C1', 'o', '0', 1e-6)), toNode('o'));
    const step = stepResponse(transfer);
    expect([step.initial, step.impulses]).toEqual([0, []]);
    expect(Math.abs((step.final ?? 0) - 1)).toBeLessThanOrEqual(4 * Number.EPSILON);
    expectCourse(step, spaced(1e-9, 0.1, 40), (t) => -Math.expm1(-t / tau), 1, 64);
    const impulse = impulseResponse(transfer);
    expect(Math.abs(impulse.initial * tau - 1)).toBeLessThanOrEqual(4 * Number.EPSILON);
    expect(impulse.final).toBe(0);
    expectCourse(impulse, spaced(1e-9, 0.02, 40), (t) => Math.exp(-t / tau) / tau, 1 / tau, 64);
    // To all digits, also at the beginning, where 1 − e would have lost them.
    const [early = 0] = valuesOf(step, [1e-15]).values;
    expect(Math.abs(early / (1e-15 / tau) - 1)).toBeLessThanOrEqual(1e-11);
  });

  it('of C-R: it jumps to one and goes to nothing, with an impulse in the impulse response', () => {
    const transfer = transferOf(network(V1, capacitor('C1', 's', 'o', 1e-6), resistor('R1', 'o', '0', 1e3)), toNode('o'));
    const step = stepResponse(transfer);
    expect(Math.abs(step.initial - 1)).toBeLessThanOrEqual(4 * Number.EPSILON);
    expect([step.final, step.impulses]).toEqual([0, []]);
    expectCourse(step, spaced(1e-9, 0.02, 40), (t) => Math.exp(-t / tau), 1, 64);
    const impulse = impulseResponse(transfer);
    expect(impulse.impulses.map((weight) => Math.abs(weight - 1) <= 4 * Number.EPSILON)).toEqual([true]);
    expect(Math.abs(impulse.initial * tau + 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
  });

  it.each([
    ['oscillating', 10],
    ['nearly critical', 199.99],
    ['overdamped', 1000],
  ] as const)('of R-L-C, %s, from its poles', (_, r) => {
    const [l, c] = [1e-3, 1e-7];
    const transfer = transferOf(network(V1, resistor('R1', 's', 'a', r), inductor('L1', 'a', 'o', l), capacitor('C1', 'o', '0', c)), toNode('o'));
    const sigma = r / (2 * l);
    const square = 1 / (l * c) - sigma ** 2;
    const w = Math.sqrt(Math.abs(square));
    const expected = (t: number): number => {
      if (square > 0) return 1 - Math.exp(-sigma * t) * (Math.cos(w * t) + (sigma / w) * Math.sin(w * t));
      return 1 - Math.exp(-sigma * t) * (Math.cosh(w * t) + (sigma / w) * Math.sinh(w * t));
    };
    const times = spaced(1e-7, 3e-4, 60);
    // Near critical damping both forms lose digits, by the quotient of σ and w; the bound says so.
    expectCourse(stepResponse(transfer), times, expected, (1 + sigma / w) ** 2, 512);
  });

  it('of an oscillating one overshoots by e^(−π·cot), 4.32 % for a Butterworth pair', () => {
    const transfer = transferOf(network(V1, resistor('R1', 's', 'a', Math.SQRT2), inductor('L1', 'a', 'o', 1), capacitor('C1', 'o', '0', 1)), toNode('o'));
    const [top = 0] = valuesOf(stepResponse(transfer), [Math.PI * Math.SQRT2]).values;
    expect(Math.abs(top - 1 - Math.exp(-Math.PI))).toBeLessThanOrEqual(16 * Number.EPSILON);
  });

  it.each([2, 3, 5, 8])('of %d equal sections behind buffers: one multiple pole, 1 − e^(−x)·Σ x^k/k!', (n) => {
    const transfer = transferOf(buffered(n, tau), toNode(`n${n}`));
    expect(transfer.poles.every(({ multiplicity }) => multiplicity === n)).toBe(true);
    const [terms, ...more] = partialFractions(transfer).terms;
    expect(more).toEqual([]);
    expect(terms?.residues.length).toBe(n);
    const rest = (x: number): number => {
      // What is beyond, as a series of positive terms: no cancellation at the beginning.
      let term = Math.exp(-x);
      for (let k = 1; k <= n; k++) term *= x / k;
      let sum = 0;
      for (let k = n; k < 400; k++) {
        sum += term;
        term *= x / (k + 1);
      }
      return sum;
    };
    const { values } = valuesOf(stepResponse(transfer), spaced(1e-3 * tau, 40 * tau, 40));
    spaced(1e-3, 40, 40).forEach((x, k) => {
      expect(Math.abs((values[k] ?? 0) / rest(x) - 1), `at x = ${x}`).toBeLessThanOrEqual(64 * n * n * Number.EPSILON);
    });
    const density = (x: number): number => {
      let term = Math.exp(-x) / tau;
      for (let k = 1; k < n; k++) term *= x / k;
      return term;
    };
    const slopes = valuesOf(impulseResponse(transfer), spaced(1e-3 * tau, 40 * tau, 40)).values;
    spaced(1e-3, 40, 40).forEach((x, k) => {
      expect(Math.abs((slopes[k] ?? 0) / density(x) - 1)).toBeLessThanOrEqual((64 * n * n + 16 * x) * Number.EPSILON);
    });
  });

  it('of an integrator, and of two, grow as t and t²/2', () => {
    const list = network(
      V1,
      resistor('R1', 's', 'm', 1e3),
      capacitor('C1', 'm', 'o', 1e-6),
      amplifier('A1', '0', 'm', 'o'),
      resistor('R2', 'o', 'n', 1e3),
      capacitor('C2', 'n', 'out', 1e-6),
      amplifier('A2', '0', 'n', 'out'),
    );
    const once = transferOf(list, toNode('o'));
    expectCourse(stepResponse(once), [0, 1e-3, 1, 50], (t) => -t / tau, 5e4, 64);
    expect(stepResponse(once).final).toBeUndefined();
    expect(Math.abs((impulseResponse(once).final ?? 0) * tau + 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
    const twice = transferOf(list, toNode('out'));
    expectCourse(stepResponse(twice), [0, 1e-3, 1, 50], (t) => (t / tau) ** 2 / 2, 1.25e9, 64);
    expect(impulseResponse(twice).final).toBeUndefined();
  });

  it('of a lossless tank keep oscillating: 1 − cos ω₀t', () => {
    const transfer = transferOf(network(V1, inductor('L1', 's', 'o', 1e-3), capacitor('C1', 'o', '0', 1e-7)), toNode('o'));
    expect(stepResponse(transfer).final).toBeUndefined();
    expectCourse(stepResponse(transfer), spaced(1e-6, 1e-3, 30), (t) => 1 - Math.cos(1e5 * t), 1, 1000);
  });

  it('of the current into a capacitor, and of the voltage of an inductor, have an impulse', () => {
    const current: Transfer = { kind: 'transfer', source: 'V1', output: { quantity: 'current', element: 'C1' } };
    const alone = transferOf(network(V1, capacitor('C1', 's', '0', 3e-6)), current);
    const step = stepResponse(alone);
    expect(step.impulses.map((weight) => Math.abs(weight / 3e-6 - 1) <= 4 * Number.EPSILON)).toEqual([true]);
    expect([...valuesOf(step, [-1, 0, 1]).values]).toEqual([0, 0, 0]);
    const impedance = transferOf(network(inductor('L1', '1', '2', 2), resistor('R1', '2', '0', 5)), { kind: 'impedance', nodes: ['1', '0'] });
    expect(partialFractions(impedance).polynomial.map((one) => Math.round(one * 1e12) / 1e12)).toEqual([5, 2]);
  });

  it('of an all-pass start at −1 and end at 1', () => {
    const list = network(V1, resistor('R1', 's', 'm', 1e4), resistor('R2', 'm', 'o', 1e4), resistor('R3', 's', 'p', 1e3), capacitor('C1', 'p', '0', 1e-6), amplifier('A1', 'p', 'm', 'o'));
    const step = stepResponse(transferOf(list, toNode('o')));
    expect(Math.abs(step.initial + 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
    expect(Math.abs((step.final ?? 0) - 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
    expectCourse(step, spaced(1e-6, 0.02, 30), (t) => 1 - 2 * Math.exp(-t / tau), 1, 128);
  });
});

/** Butterworth between 1 Ω. */
function butterworth(n: number): PolesAndZeros {
  const elements: Element[] = [V1, resistor('Rs', 's', 'n0', 1)];
  let node = 0;
  for (let k = 0; k < n; k++) {
    const g = 2 * Math.sin(((2 * k + 1) * Math.PI) / (2 * n));
    if (k % 2 === 0) elements.push(capacitor(`C${k}`, `n${node}`, '0', g));
    else elements.push(inductor(`L${k}`, `n${node}`, `n${++node}`, g));
  }
  elements.push(resistor('RL', `n${node}`, '0', 1));
  return transferOf(network(...elements), toNode(`n${node}`));
}

describe('partial fractions', () => {
  it.each([1, 2, 5, 10])('of a Butterworth ladder of order %d add up to it at every frequency', (n) => {
    const transfer = butterworth(n);
    const { terms, polynomial } = partialFractions(transfer);
    expect(polynomial).toEqual([]);
    for (const omega of [0, 0.3, 1, 1.7]) {
      let [re, im, size] = [0, 0, 0];
      for (const { pole, residues } of terms) {
        const residue = residues[0] ?? { re: 0, im: 0 };
        const d = { re: -pole.re, im: omega - pole.im };
        const square = d.re ** 2 + d.im ** 2;
        re += (residue.re * d.re + residue.im * d.im) / square;
        im += (residue.im * d.re - residue.re * d.im) / square;
        size += Math.hypot(residue.re, residue.im) / Math.sqrt(square);
      }
      const h = evaluate(transfer, omega / (2 * Math.PI));
      expect(Math.hypot(re - h.re, im - h.im)).toBeLessThanOrEqual(64 * n * Number.EPSILON * size);
    }
  });

  it('have residues of conjugate poles that are conjugates', () => {
    const { terms } = partialFractions(butterworth(4));
    for (const { pole, residues } of terms) {
      const other = terms.find((one) => one.pole.re === pole.re && one.pole.im === -pole.im);
      expect(other?.residues[0]?.re).toBe(residues[0]?.re);
      expect(other?.residues[0]?.im).toBe(-(residues[0]?.im ?? 0));
    }
  });
});

describe('courses of time of random transfer functions', () => {
  it('have the impulse response as slope of the step response', () => {
    const random = new Random(51);
    for (let round = 0; round < 30; round++) {
      const elements: Element[] = [voltageSource('V1', 'n0', '0', 1)];
      const n = random.whole(1, 5);
      for (let k = 0; k < n; k++) {
        elements.push(resistor(`R${k}`, `n${k}`, `n${k + 1}`, random.between(0.3, 3)));
        elements.push(random.next() < 0.5 ? capacitor(`C${k}`, `n${k + 1}`, '0', random.between(0.3, 3)) : inductor(`L${k}`, `n${k + 1}`, '0', random.between(0.3, 3)));
      }
      const transfer = transferOf(network(...elements), toNode(`n${n}`));
      const [step, impulse] = [stepResponse(transfer), impulseResponse(transfer)];
      const t = random.between(0.1, 5);
      // Gauss's rule of five points over ten steps is exact beyond rounding for so smooth a course.
      const nodes = [0, 0.5384693101056831, -0.5384693101056831, 0.906179845938664, -0.906179845938664];
      const weights = [0.5688888888888889, 0.47862867049936647, 0.47862867049936647, 0.23692688505618908, 0.23692688505618908];
      const steps = 40;
      const width = t / steps;
      const times = Array.from({ length: steps }, (_, k) => nodes.map((x) => width * (k + (1 + x) / 2))).flat();
      const { values, bounds } = valuesOf(impulse, times);
      const integral = values.reduce((sum, value, k) => sum + (value * (weights[k % 5] ?? 0) * width) / 2, 0);
      const doubt = bounds.reduce((sum, value) => sum + value * width, 0);
      const end = valuesOf(step, [t]);
      expect(Math.abs((end.values[0] ?? 0) - step.initial - integral)).toBeLessThanOrEqual(doubt + (end.bounds[0] ?? 0) + 1e-11);
    }
  });

  it('end where the transfer function is at 0 Hz, and begin where it is at the highest', () => {
    for (const n of [1, 3, 6, 10]) {
      const transfer = butterworth(n);
      const step = stepResponse(transfer);
      expect(step.initial).toBe(0);
      expect(Math.abs((step.final ?? 0) - 0.5)).toBeLessThanOrEqual(64 * n * Number.EPSILON);
      const { values, bounds } = valuesOf(step, [0, 500]);
      expect(values[0]).toBe(0);
      expect(Math.abs((values[1] ?? 0) - 0.5)).toBeLessThanOrEqual(bounds[1] ?? 0);
      expect(bounds[1]).toBeLessThanOrEqual(1e-10);
    }
  });
});

describe('what a response in time cannot say', () => {
  it('is said: beyond the range of numbers, and at no time', () => {
    const transfer = transferOf(network(V1, resistor('R1', 's', 'o', -1e3), capacitor('C1', 'o', '0', 1e-6)), toNode('o'));
    const step = stepResponse(transfer);
    expect(step.final).toBeUndefined();
    expectCourse(step, [1e-3, 2e-3], (t) => -Math.expm1(1e3 * t), 7, 512);
    expect(refused(step.evaluate([1, 2])).kind).toBe('notFinite');
    expect(refused(step.evaluate([Number.NaN])).kind).toBe('invalid');
  });

  it('is nothing for a transfer function that is 0', () => {
    const transfer = transferOf(network(V1, resistor('R1', 's', '0', 1), resistor('R2', 'x', '0', 1)), toNode('x'));
    const step = stepResponse(transfer);
    expect([step.initial, step.final, [...valuesOf(step, [1]).values]]).toEqual([0, 0, [0]]);
  });
});
