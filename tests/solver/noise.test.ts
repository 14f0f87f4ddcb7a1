import { describe, expect, it } from 'vitest';
import type { ElementList } from '@/solver';
import { equivalent } from '@/solver/analysis/equivalent';
import type { Noise } from '@/solver/analysis/noise';
import { BOLTZMANN, noise, noiseTotal, STANDARD_TEMPERATURE } from '@/solver/analysis/noise';
import { integrate } from '@/solver/linear/quadrature';
import { randomLinearNetwork } from './support/linear-networks';
import { capacitor, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';

function found(list: ElementList, pair: readonly [string, string], frequency: number, temperature?: number): Noise {
  const result = noise(list, pair, { frequencies: [frequency], temperature });
  if (!result.ok) throw new Error(result.message);
  return result;
}

describe('integrate', () => {
  it('finds integrals of smooth and of sharp functions', () => {
    const smooth = integrate((x, out) => ((out[0] = Math.exp(x)), (out[1] = x ** 3), true), 2, 0, 1, 1e-14, 1);
    expect(smooth?.values[0]).toBeCloseTo(Math.E - 1, 14);
    expect(smooth?.values[1]).toBeCloseTo(0.25, 15);
    const width = 1e-5;
    const sharp = integrate((x, out) => ((out[0] = width / ((x - 0.3) ** 2 + width ** 2)), true), 1, 0, 1, 1e-10, 4);
    expect(sharp?.values[0]).toBeCloseTo(Math.atan(0.7 / width) + Math.atan(0.3 / width), 9);
    expect(sharp?.isConverged).toBe(true);
    expect(integrate(() => false, 1, 0, 1, 1e-10, 4)).toBeUndefined();
  });
});

describe('noise', () => {
  it('of a passive network of one temperature is 4kT times the real part of its impedance', () => {
    const random = new Random(71);
    const active = ['impedance', 'twoPort', 'voltageControlledVoltageSource', 'voltageControlledCurrentSource', 'currentControlledVoltageSource', 'currentControlledCurrentSource', 'operationalAmplifier'] as const;
    const met = new Set<string>();
    for (let round = 0; round < 60; round++) {
      const list = randomLinearNetwork(random, { nodes: 4, elements: 8, decades: 3, without: active });
      const small = (): [number, number] => [random.between(-0.35, 0.35), random.between(-0.35, 0.35)];
      const point = { s11: small(), s12: small(), s21: small(), s22: small() };
      const full = network(
        ...list.elements,
        { id: 'Z', kind: 'impedance', nodes: ['1', '3'], points: [{ frequency: 0, resistance: 300, reactance: -50 }, { frequency: 1e7, resistance: 900, reactance: 2000 }] },
        { id: 'N', kind: 'twoPort', nodes: ['2', '0', '4', '0'], reference: 600, points: [{ frequency: 0, ...point }, { frequency: 1e7, ...point }] },
      );
      const frequency = round % 6 === 0 ? 0 : 10 ** random.between(0, 6);
      const { density, contributions, notCounted } = found(full, ['2', '1'], frequency, 300);
      const seen = equivalent(full, ['2', '1'], frequency);
      if (!seen.ok || seen.impedance === undefined) throw new Error('no impedance');
      const expected = 4 * BOLTZMANN * 300 * seen.impedance.re;
      // The block N is passive without being reciprocal, and by Bosma keeps to Nyquist all the same.
      expect((density[0] ?? NaN) ** 2 / expected).toBeCloseTo(1, 11);
      expect(contributions.reduce((sum, one) => sum + (one.density[0] ?? NaN) ** 2, 0) / expected).toBeCloseTo(1, 11);
      expect(notCounted).toEqual([]);
      for (const { element, density: own } of contributions) if ((own[0] ?? 0) > 0.01 * (density[0] ?? 0)) met.add(full.elements.find(({ id }) => id === element)?.kind ?? '');
    }
    expect([...met].sort()).toEqual(['impedance', 'line', 'resistor', 'twoPort']);
  });

  it('comes of resistances alone: negative ones, sources and amplifiers make none, and are named', () => {
    const list = network(
      voltageSource('E', 's', '0', 10),
      resistor('R1', 's', 'm', 1000),
      resistor('R2', 'm', 'o', 10_000),
      resistor('Rneg', 's', 'o', -500),
      { id: 'A', kind: 'operationalAmplifier', nodes: ['0', 'm', 'o'] },
    );
    const { density, contributions, notCounted, temperature } = found(list, ['o', '0'], 1000);
    expect(temperature).toBe(STANDARD_TEMPERATURE);
    expect(contributions.map(({ element }) => element)).toEqual(['R1', 'R2']);
    expect(notCounted).toEqual(['Rneg', 'A']);
    // R1's is amplified ten times, R2's appears as it is.
    const square = 4 * BOLTZMANN * 290 * (100 * 1000 + 10_000);
    expect((density[0] ?? NaN) ** 2 / square).toBeCloseTo(1, 13);
  });

  it('of a resistance whose current is sensed is that of any other', () => {
    const plain = network(resistor('R', 'a', '0', 1e4), capacitor('C', 'a', '0', 1e-9));
    const sensed = network(...plain.elements, { id: 'CS', kind: 'currentControlledCurrentSource', nodes: ['b', '0'], sensedElement: 'R', gain: 5 }, resistor('Rb', 'b', '0', 1));
    expect(found(sensed, ['a', '0'], 1e4).density[0]).toBeCloseTo(found(plain, ['a', '0'], 1e4).density[0] ?? NaN, 22);
  });

  it('in all of a band is √(kT/C) on a capacitance, whatever the resistance', () => {
    for (const resistance of [1, 1e6]) {
      const list = network(resistor('R', 'a', '0', resistance), capacitor('C', 'a', '0', 1e-9));
      const corner = 1 / (2 * Math.PI * resistance * 1e-9);
      const total = noiseTotal(list, ['a', '0'], { from: 0, to: corner * 1e6, temperature: 300, tolerance: 1e-12 });
      if (!total.ok) throw new Error(total.message);
      // Beyond the end of the band 2/π·10⁻⁶ of the square is left.
      expect(total.total ** 2 / ((BOLTZMANN * 300) / 1e-9)).toBeCloseTo(1 - 2e-6 / Math.PI, 11);
    }
  });

  it('in a band with a sharp resonance is found too', () => {
    // Parallel R, L, C of quality 10⁴: the voltage across has kT/C in all.
    const [r, c] = [1e6, 1e-9];
    const l = (r / 1e4) ** 2 * c;
    const list = network(resistor('R', 'a', '0', r), capacitor('C', 'a', '0', c), inductor('L', 'a', '0', l));
    const f0 = 1 / (2 * Math.PI * Math.sqrt(l * c));
    const total = noiseTotal(list, ['a', '0'], { from: f0 * 1e-3, to: f0 * 1e3, temperature: 290 });
    if (!total.ok) throw new Error(total.message);
    expect(total.total ** 2 / ((BOLTZMANN * 290) / c)).toBeCloseTo(1, 6);
    expect(total.contributions).toEqual([{ element: 'R', total: total.total }]);
  });

  it('of an integrator grows without bound towards 0 Hz, and no number is infinite', () => {
    const list = network(
      voltageSource('VS1', 'in', '0', 1),
      resistor('R1', 'in', 'm', 1000),
      capacitor('C1', 'm', 'out', 1e-9),
      { id: 'U1', kind: 'operationalAmplifier', nodes: ['0', 'm', 'out'] },
    );
    const result = noise(list, ['out', '0'], { frequencies: [1e-200, 1] });
    expect(result.ok && [...result.determined]).toEqual([0, 1]);
    expect(result.ok && result.problems.map(({ problem: { kind }, at }) => [kind, at])).toEqual([['notFinite', [0]]]);
    expect(noiseTotal(list, ['out', '0'], { from: 0, to: 1e6 })).toMatchObject({ ok: false, kind: 'notFinite' });
    expect(noiseTotal(list, ['out', '0'], { from: 1e-3, to: 1e6 })).toMatchObject({ ok: true });
  });

  it('says what is wrong', () => {
    const list = network(resistor('R', 'a', '0', 1), capacitor('C', 'a', 'b', 1));
    const message = (result: { readonly ok: boolean; readonly message?: string }) => (result.ok ? undefined : result.message);
    expect(message(noise(list, ['x', '0'], { frequencies: [1] }))).toMatch(/no node x/);
    expect(message(noise(list, ['a', '0'], { frequencies: [1], temperature: -1 }))).toMatch(/kelvins/);
    expect(message(noise(list, ['b', '0'], { frequencies: [0] }))).toMatch(/node b/);
    expect(message(noiseTotal(list, ['a', '0'], { from: 2, to: 1 }))).toMatch(/end above/);
    expect(message(noiseTotal(list, ['a', '0'], { from: 0, to: Infinity }))).toMatch(/finite/);
    expect(message(noiseTotal(list, ['a', '0'], { from: 0, to: 1, tolerance: 0 }))).toMatch(/tolerance/);
    const partly = noise(list, ['b', '0'], { frequencies: [0, 1] });
    if (!partly.ok) throw new Error(partly.message);
    expect([...partly.determined]).toEqual([0, 1]);
    expect(partly.problems[0]).toMatchObject({ at: [0], problem: { kind: 'floatingNode', nodes: ['b'] } });
  });
});
