import { describe, expect, it } from 'vitest';
import type { ElementList } from '@/solver';
import type { PortNodes, TwoPortSweep } from '@/solver/analysis/two-port';
import { matrixAt, twoPort } from '@/solver/analysis/two-port';
import type { PortReferences, TwoPortKind } from '@/solver/analysis/two-port-parameters';
import { solveExactly } from '../reference/support/exact-solver';
import { randomLinearNetwork } from './support/linear-networks';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';

const PORTS: readonly [PortNodes, PortNodes] = [
  ['1', '0'],
  ['2', '0'],
];

function sweepOf(list: ElementList, ports: readonly [PortNodes, PortNodes], frequency: number, reference: number | PortReferences): TwoPortSweep {
  const result = twoPort(list, ports, { frequencies: [frequency], reference });
  if (!result.ok) throw new Error(result.message);
  return result;
}

function parametersOf(list: ElementList, kind: TwoPortKind, frequency = 1000, reference: number | PortReferences = 50): number[] | undefined {
  const matrix = matrixAt(sweepOf(list, PORTS, frequency, reference).parameters(kind), 0);
  return matrix === undefined ? undefined : [...matrix];
}

describe('twoPort', () => {
  it('finds the impedance matrix that currents sent into the open ports show, by 64-digit arithmetic', () => {
    const random = new Random(41);
    const sources = ['voltageSource', 'currentSource'] as const;
    const closed = { nodes: 4, elements: 8, decades: 4, without: sources };
    let worst = 0;
    for (let round = 0; round < 40; round++) {
      const list = randomLinearNetwork(random, closed);
      const frequency = round % 8 === 0 ? 0 : 10 ** random.between(0, 6);
      const references: PortReferences = [10 ** random.between(0, 4), 10 ** random.between(0, 4)];
      const z = matrixAt(sweepOf(list, PORTS, frequency, references).parameters('impedance'), 0);
      if (z === undefined) throw new Error('no impedance matrix');
      const size = Math.hypot(...z);
      for (const [column, from] of ['1', '2'].entries()) {
        const exact = solveExactly(network(...list.elements, currentSource('J', '0', from, 1)), frequency);
        for (const [row, to] of ['1', '2'].entries()) {
          const of = exact.voltage(to);
          const at = 4 * row + 2 * column;
          const off = Math.hypot((z[at] ?? 0) - of.re, (z[at + 1] ?? 0) - of.im);
          const own = Math.hypot(of.re, of.im);
          worst = Math.max(worst, off / (Number.EPSILON * (size + (own === 0 ? 0 : of.condition * own))));
        }
      }
    }
    // The inverse of a two-by-two matrix comes on top of the solution itself.
    expect(worst).toBeLessThanOrEqual(64);
  });

  it('keeps the digits of impedances far from the reference', () => {
    // A T of milliohms and a T of gigaohms between references of 50 Ω.
    for (const scale of [1e-9, 1e-3, 1, 1e9]) {
      const tee = network(resistor('Ra', '1', 'm', scale), resistor('Rb', 'm', '2', 2 * scale), resistor('Rc', 'm', '0', 3 * scale));
      const z = parametersOf(tee, 'impedance');
      [4, 0, 3, 0, 3, 0, 5, 0].forEach((expected, at) => {
        expect(Math.abs((z?.[at] ?? NaN) / scale - expected)).toBeLessThanOrEqual(64 * Number.EPSILON);
      });
    }
  });

  it('has all that exists of a series element, a through connection, an ideal transformer and an ideal amplifier', () => {
    const series = network(resistor('R', '1', '2', 100), resistor('far', 'x', '0', 1));
    expect(parametersOf(series, 'impedance')).toBeUndefined();
    expect(parametersOf(series, 'admittance')?.map((value) => value * 100)).toEqual([1, 0, -1, 0, -1, 0, 1, 0].map((value) => expect.closeTo(value, 14) as number));
    const through = network(resistor('W', '1', '2', 0), resistor('far', 'x', '0', 1));
    expect(parametersOf(through, 'admittance')).toBeUndefined();
    expect(parametersOf(through, 'chain')).toEqual([1, 0, 0, 0, 0, 0, 1, 0].map((value) => expect.closeTo(value, 14) as number));
    const transformer = network({ id: 'T', kind: 'idealTransformer', nodes: ['1', '0', '2', '0'], ratio: 4 });
    expect(parametersOf(transformer, 'impedance')).toBeUndefined();
    expect(parametersOf(transformer, 'admittance')).toBeUndefined();
    expect(parametersOf(transformer, 'hybrid')).toEqual([0, 0, 4, 0, -4, 0, 0, 0].map((value) => expect.closeTo(value, 13) as number));
    const amplifier = network(
      { id: 'A', kind: 'operationalAmplifier', nodes: ['1', 'm', '2'] },
      resistor('Rf', '2', 'm', 9),
      resistor('Rg', 'm', '0', 1),
    );
    // v₁ = v₂/10 and i₁ = 0, whatever the load.
    expect(parametersOf(amplifier, 'chain')).toEqual([0.1, 0, 0, 0, 0, 0, 0, 0].map((value) => expect.closeTo(value, 14) as number));
    expect(parametersOf(amplifier, 'inverseHybrid')).toEqual([0, 0, 0, 0, 10, 0, 0, 0].map((value) => expect.closeTo(value, 12) as number));
    expect(parametersOf(amplifier, 'impedance')).toBeUndefined();
  });

  it('has all independent sources dead', () => {
    const live = network(voltageSource('V', '1', 'a', 10), resistor('R', 'a', '2', 100), currentSource('J', '2', '0', 5), resistor('S', '2', '0', 25));
    const dead = network(resistor('R', '1', '2', 100), resistor('S', '2', '0', 25));
    expect(parametersOf(live, 'scattering')).toEqual(parametersOf(dead, 'scattering')?.map((value) => expect.closeTo(value, 14) as number));
  });

  it('takes ports anywhere, in parts that nothing else ties together too', () => {
    const list = network(
      { id: 'T', kind: 'coupledInductors', nodes: ['p', 'q', 'a', 'b'], inductances: [1e-3, 4e-3], coupling: 0.5 },
      resistor('Rp', 'q', '0', 1),
    );
    const found = sweepOf(list, [['p', 'q'], ['a', 'b']], 1000, [50, 600]);
    const z = matrixAt(found.parameters('impedance'), 0);
    const omega = 2 * Math.PI * 1000;
    [0, 1e-3, 0, 1e-3, 0, 1e-3, 0, 4e-3].forEach((expected, at) => {
      expect((z?.[at] ?? NaN) / omega).toBeCloseTo(expected, 17);
    });
    // Turned round, the mutual impedance turns its sign.
    const turned = matrixAt(sweepOf(list, [['q', 'p'], ['a', 'b']], 1000, 50).parameters('impedance'), 0);
    expect(turned?.[3]).toBeCloseTo(-omega * 1e-3, 12);
  });

  it('is reciprocal where nothing senses, and without loss where nothing is lost', () => {
    const ladder = network(inductor('L1', '1', 'a', 1e-6), capacitor('C1', 'a', '0', 1e-9), inductor('L2', 'a', '2', 2e-6), capacitor('C2', '1', '2', 1e-10));
    const s = parametersOf(ladder, 'scattering', 3e6, [50, 75]) ?? [];
    const [s11r = NaN, s11i = NaN, s12r = NaN, s12i = NaN, s21r = NaN, s21i = NaN, s22r = NaN, s22i = NaN] = s;
    expect(Math.hypot(s12r - s21r, s12i - s21i)).toBeLessThan(1e-15);
    expect(Math.abs(s11r ** 2 + s11i ** 2 + s21r ** 2 + s21i ** 2 - 1)).toBeLessThan(4e-15);
    expect(Math.abs(s22r ** 2 + s22i ** 2 + s12r ** 2 + s12i ** 2 - 1)).toBeLessThan(4e-15);
  });

  it('reads back the scattering parameters of a block that is given by them', () => {
    const points = [
      { frequency: 1e6, s11: [0.1, 0.2], s12: [0.01, -0.02], s21: [2, -1], s22: [-0.3, 0.1] },
      { frequency: 1e8, s11: [0.3, 0], s12: [0.03, 0], s21: [1, 1], s22: [-0.1, 0.3] },
    ] as const;
    const block = network({ id: 'N', kind: 'twoPort', nodes: ['1', '0', '2', '0'], reference: 75, points });
    const found = twoPort(block, PORTS, { frequencies: [1e6, 1e7, 1e8, 1e9], reference: 75 });
    if (!found.ok) throw new Error(found.message);
    const { values, exists } = found.parameters('scattering');
    expect([...exists]).toEqual([1, 1, 1, 0]);
    [...points[0].s11, ...points[0].s12, ...points[0].s21, ...points[0].s22].forEach((expected, at) => {
      expect(values[at]).toBeCloseTo(expected, 14);
    });
    // Halfway in log frequency.
    expect(values[8]).toBeCloseTo(0.2, 14);
    expect(found.problems).toEqual([{ problem: expect.objectContaining({ kind: 'noData', elements: ['N'] }) as unknown, at: [3] }]);
  });

  it('says what is wrong with a request', () => {
    const list = network(resistor('R', '1', '2', 100), resistor('S', '2', '0', 25));
    const asked = (ports: readonly [PortNodes, PortNodes], reference: number, frequency: number) => {
      const result = twoPort(list, ports, { frequencies: [frequency], reference });
      return result.ok ? undefined : result.message;
    };
    expect(asked(PORTS, 0, 1)).toMatch(/reference resistance/);
    expect(asked(PORTS, 50, -1)).toMatch(/negative/);
    expect(asked([['1', '0'], ['x', '0']], 50, 1)).toMatch(/no node x/);
    expect(asked([['1', '1'], ['2', '0']], 50, 1)).toMatch(/Both nodes are 1/);
  });
});
