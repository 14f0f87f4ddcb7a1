import { Complex } from 'complex.js';
import { describe, expect, it } from 'vitest';
import type { Element, ElementList } from '@/solver';
import { equivalent } from '@/solver/analysis/equivalent';
import { nodalEquations } from '@/solver/analysis/nodal-equations';
import { noise } from '@/solver/analysis/noise';
import { sensitivity } from '@/solver/analysis/sensitivity';
import { twoPort } from '@/solver/analysis/two-port';
import { network, resistor } from './support/networks';
import { Random } from './support/random';

/** Everything that can be wrong with a network at once: loops, cut sets, floating parts, zeros, negative values, resonances. */
function randomTangle(random: Random): ElementList {
  const node = (): string => String(random.whole(0, 4));
  const two = (): [string, string] => [node(), node()];
  const four = (): [string, string, string, string] => [node(), node(), node(), node()];
  const value = (): number => random.pick([0, 1, 1, 2, -1, 1e-12, 1e12, 1 / (2 * Math.PI)]);
  const one = (id: string): Element => {
    switch (random.whole(0, 13)) {
      case 0:
      case 1:
        return { id, kind: 'resistor', nodes: two(), resistance: value() };
      case 2:
        return { id, kind: 'capacitor', nodes: two(), capacitance: value() };
      case 3:
        return { id, kind: 'inductor', nodes: two(), inductance: value() };
      case 4:
      case 5: {
        const delivered = { rms: random.pick([0, 1, 2]), phase: random.pick([0, 90, 30]), frequency: random.pick([null, 0, 1]) };
        return { id, kind: random.pick(['voltageSource', 'currentSource'] as const), nodes: two(), value: delivered };
      }
      case 6:
        return { id, kind: 'coupledInductors', nodes: four(), inductances: [1, random.pick([1, 1e-9, 1e9])], coupling: random.pick([0, 0.5, 1, -1]) };
      case 7:
        return { id, kind: 'idealTransformer', nodes: four(), ratio: random.pick([1, 2, -1]) };
      case 8:
        return { id, kind: 'voltageControlledVoltageSource', nodes: four(), gain: value() };
      case 9:
        return { id, kind: 'voltageControlledCurrentSource', nodes: four(), transconductance: value() };
      case 10:
        return { id, kind: 'currentControlledCurrentSource', nodes: two(), sensedElement: 'first', gain: value() };
      case 11:
        return { id, kind: 'operationalAmplifier', nodes: [node(), node(), node()], ...(random.whole(0, 1) === 0 ? {} : { openLoopGain: 1e5, gainBandwidth: 1e6 }) };
      case 12:
        return { id, kind: 'line', nodes: four(), impedance: 50, delay: random.pick([0, 0.25, 1]), loss: random.pick([0, 1]), lossFrequency: 1 };
      default: {
        const wave = (): [number, number] => [random.pick([0, 0.5, 1, -1]), 0];
        const points = [0, 10].map((frequency) => ({ frequency, s11: wave(), s12: wave(), s21: wave(), s22: wave() }));
        return { id, kind: 'twoPort', nodes: four(), reference: 50, points };
      }
    }
  };
  const elements = Array.from({ length: random.whole(1, 8) }, (_, place) => one(`e${place}`));
  return network({ ...resistor('first', ...two(), value()) }, ...elements);
}

/** Whether every number in a result is one. */
function isFinite(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value);
  if (value instanceof Complex) return Number.isFinite(value.re) && Number.isFinite(value.im);
  if (value instanceof Float64Array) return value.every(Number.isFinite);
  return typeof value === 'object' && value !== null ? Object.values(value).every(isFinite) : true;
}

describe('the analyses of a network, whatever it is', () => {
  it('neither throw nor answer with a number that is none', () => {
    const random = new Random(991);
    const frequencies = [0, 1, 1e-6, 1e3];
    let answered = 0;
    let refused = 0;
    for (let round = 0; round < 300; round++) {
      const list = randomTangle(random);
      const two = twoPort(list, [['1', '0'], ['2', '3']], { frequencies, reference: [50, 75] });
      const results = [
        two,
        ...(two.ok ? (['impedance', 'admittance', 'hybrid', 'inverseHybrid', 'chain', 'scattering'] as const).map((kind) => ({ ok: true, ...two.parameters(kind) })) : []),
        sensitivity(list, { quantity: 'voltageBetween', nodes: ['1', '2'] }, frequencies),
        sensitivity(list, { quantity: 'current', element: 'first' }, frequencies),
        sensitivity(list, { quantity: 'impedance', nodes: ['1', '0'] }, frequencies),
        noise(list, ['1', '2'], { frequencies }),
        ...[0, 1].flatMap((frequency) => [equivalent(list, ['1', '2'], frequency), equivalent(list, ['1', '0'], frequency), nodalEquations(list, frequency)]),
      ];
      for (const result of results) {
        expect(isFinite(result), JSON.stringify(list)).toBe(true);
        if (result.ok) answered++;
        else {
          refused++;
          expect('message' in result ? result.message : '').toMatch(/^\S.*\.$/);
        }
      }
    }
    expect(answered).toBeGreaterThan(1000);
    expect(refused).toBeGreaterThan(1000);
  });
});
