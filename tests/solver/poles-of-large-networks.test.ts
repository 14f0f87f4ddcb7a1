import { describe, expect, it } from 'vitest';
import type { Element, ElementList } from '@/solver';
import { solve } from '@/solver';
import { polesAndZeros } from '@/solver/analysis/poles-and-zeros';
import { solved } from './support/expect';
import { randomLinearNetwork } from './support/linear-networks';
import { capacitor, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';
import { buffer, evaluate, expectRoots, found, toNode } from './support/roots';

describe('many and far apart', () => {
  it('a uniform R-C ladder of 40 sections has its closed form', () => {
    const elements: Element[] = [voltageSource('V1', 'n0', '0', 1)];
    const n = 40;
    for (let k = 0; k < n; k++) elements.push(resistor(`R${k}`, `n${k}`, `n${k + 1}`, 1e3), capacitor(`C${k}`, `n${k + 1}`, '0', 1e-9));
    const { poles, zeros, gain } = found(polesAndZeros(network(...elements), toNode(`n${n}`)));
    // Eigenvalues of the second difference, one end held and one free: 4·sin²((2k − 1)π/(4n + 2)).
    expectRoots(
      poles,
      Array.from({ length: n }, (_, k) => [-4e6 * Math.sin(((2 * k + 1) * Math.PI) / (4 * n + 2)) ** 2, 0] as const),
      8,
    );
    expect(zeros).toEqual([]);
    // The product of all rates.
    expect(Math.abs(Math.log10(gain ?? 0) - 6 * n)).toBeLessThanOrEqual(1e-10);
  });

  it('a high-pass ladder of order 12 has twelve zeros at the origin, all exactly there', () => {
    const elements: Element[] = [voltageSource('V1', 's', '0', 1), resistor('Rs', 's', 'n0', 50)];
    for (let k = 0; k < 6; k++) elements.push(capacitor(`C${k}`, `n${k}`, `n${k + 1}`, 1e-9 * (1 + k / 7)), inductor(`L${k}`, `n${k + 1}`, '0', 2e-6 * (1 + k / 9)));
    elements.push(resistor('RL', 'n6', '0', 50));
    const { zeros, poles } = found(polesAndZeros(network(...elements), toNode('n6')));
    expect(poles.length).toBe(12);
    expect(zeros.map(({ s, multiplicity }) => [s.re, s.im, multiplicity])).toEqual(Array.from({ length: 12 }, () => [0, 0, 12]));
  });

  it.each([6, 9, 12])('time constants over %d decades are each as exact as their own elements', (decades) => {
    const elements: Element[] = [voltageSource('V1', 'n0', '0', 1)];
    const n = 6;
    const rates = Array.from({ length: n }, (_, k) => 10 ** ((k * decades) / (n - 1)));
    rates.forEach((rate, k) => {
      const c = 1e-9 / (k + 1);
      elements.push(resistor(`R${k}`, `n${k}`, `m${k}`, 1 / (rate * c)), capacitor(`C${k}`, `m${k}`, '0', c), buffer(`E${k}`, `m${k}`, `n${k + 1}`));
    });
    const { poles } = found(polesAndZeros(network(...elements), toNode(`n${n}`)));
    expect(poles.length).toBe(n);
    rates.forEach((rate) => {
      expect(Math.min(...poles.map(({ s }) => Math.abs(s.re / rate + 1)))).toBeLessThanOrEqual(8 * Number.EPSILON);
    });
  });
});

/** Networks of every kind that has a pencil. */
function randomNetworks(seed: number, count: number): ElementList[] {
  const random = new Random(seed);
  return Array.from({ length: count }, () => {
    const { elements } = randomLinearNetwork(random, {
      nodes: random.whole(2, 5),
      elements: random.whole(2, 6),
      decades: 2,
      without: ['impedance', 'twoPort', 'line', 'voltageSource', 'currentSource'],
    });
    return network(voltageSource('drive', 'in', '0', 1), resistor('feed', 'in', '1', 1e3), ...elements);
  });
}

describe('random networks of all kinds that have poles', () => {
  it('answer over the frequencies as the steady state does, to the precision of either', () => {
    let compared = 0;
    for (const list of randomNetworks(31, 60)) {
      const result = polesAndZeros(list, toNode('2', 'drive'));
      if (!result.ok || result.scaledGain === 0) continue;
      for (const frequency of [3, 40, 500, 7000]) {
        const solution = solve(list, { frequency });
        const expected = solution.ok ? solved(solution).voltage('2') : undefined;
        if (expected === undefined) continue;
        const h = evaluate(result, frequency);
        const s = 2 * Math.PI * frequency;
        // How far each root may be off, against its distance from where H is evaluated.
        const doubt = [...result.poles, ...result.zeros].reduce((sum, root) => sum + (8 * root.uncertainty + Number.EPSILON * Math.hypot(root.s.re, s - root.s.im)) / Math.hypot(root.s.re, s - root.s.im), 0);
        expect(Math.hypot(h.re - expected.re, h.im - expected.im) / Math.hypot(expected.re, expected.im)).toBeLessThanOrEqual(32 * doubt + 1e-12);
        compared++;
      }
    }
    expect(compared).toBeGreaterThan(150);
  });

  it('have poles that move no further than their uncertainty says when the values move', () => {
    const random = new Random(32);
    const change = 1e-7;
    let compared = 0;
    for (const list of randomNetworks(33, 40)) {
      const before = polesAndZeros(list, toNode('2', 'drive'));
      const moved = network(
        ...list.elements.map((element): Element => {
          const by = 1 + change * random.pick([-1, 1]);
          if (element.kind === 'resistor') return { ...element, resistance: element.resistance * by };
          if (element.kind === 'capacitor') return { ...element, capacitance: element.capacitance * by };
          if (element.kind === 'inductor') return { ...element, inductance: element.inductance * by };
          return element;
        }),
      );
      const after = polesAndZeros(moved, toNode('2', 'drive'));
      if (!before.ok || !after.ok || before.poles.length !== after.poles.length) continue;
      for (const { s, uncertainty, multiplicity } of before.poles) {
        // Near a multiple one the change is not of first order.
        const relative = uncertainty / (Number.EPSILON * Math.hypot(s.re, s.im));
        if (multiplicity > 1 || !(relative < 1e3)) continue;
        const least = Math.min(...after.poles.map((pole) => Math.hypot(pole.s.re - s.re, pole.s.im - s.im)));
        expect(least).toBeLessThanOrEqual(1.01 * (change / Number.EPSILON) * uncertainty);
        compared++;
      }
    }
    expect(compared).toBeGreaterThan(50);
  });

  it('do not change when impedances and frequencies are scaled, but by the scales', () => {
    for (const list of randomNetworks(34, 20)) {
      const plain = list.elements.filter(({ kind }) => ['resistor', 'capacitor', 'inductor', 'voltageSource'].includes(kind));
      const scaled = plain.map((element): Element => {
        if (element.kind === 'resistor') return { ...element, resistance: element.resistance * 37 };
        if (element.kind === 'capacitor') return { ...element, capacitance: element.capacitance / (37 * 1e4) };
        if (element.kind === 'inductor') return { ...element, inductance: (element.inductance * 37) / 1e4 };
        return element;
      });
      const before = found(polesAndZeros(network(...plain), toNode('2', 'drive')));
      const after = found(polesAndZeros(network(...scaled), toNode('2', 'drive')));
      expect(after.poles.length).toBe(before.poles.length);
      for (const { s, uncertainty } of before.poles) {
        const least = Math.min(...after.poles.map((pole) => Math.hypot(pole.s.re / 1e4 - s.re, pole.s.im / 1e4 - s.im)));
        expect(least).toBeLessThanOrEqual(8 * uncertainty);
      }
    }
  });
});
