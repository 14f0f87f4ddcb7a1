import { describe, expect, it } from 'vitest';
import type { ElementList, Problem } from '@/solver';
import { ExtendedVector } from '@/solver/linear/extended';
import { nodeNamed } from '@/solver/analysis/network-reading';
import { isProblem } from '@/solver/analysis/problem';
import { ResponseOperator } from '@/solver/analysis/response-operator';
import { solveExactly } from '../reference/support/exact-solver';
import { unitsOff } from './support/exact-units';
import { randomLinearNetwork } from './support/linear-networks';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';

const SOURCES = [
  'voltageSource',
  'currentSource',
  'voltageControlledVoltageSource',
  'voltageControlledCurrentSource',
  'currentControlledVoltageSource',
  'currentControlledCurrentSource',
  'operationalAmplifier',
  'twoPort',
  'line',
] as const;

function operatorOf(list: ElementList): ResponseOperator {
  const operator = ResponseOperator.of(list);
  if (isProblem(operator)) throw new Error(operator.message);
  return operator;
}

function fine(result: Problem | undefined): void {
  if (result !== undefined) throw new Error(result.message);
}

function node(operator: ResponseOperator, name: string): number {
  const at = nodeNamed(operator.network, name);
  if (isProblem(at)) throw new Error(at.message);
  return at;
}

describe('ResponseOperator', () => {
  it('solves networks of all kinds as 64-digit arithmetic does, within rounding times the condition', () => {
    const random = new Random(21);
    let worst = 0;
    for (let round = 0; round < 40; round++) {
      const list = randomLinearNetwork(random, { nodes: random.whole(2, 5), elements: random.whole(3, 10), decades: random.between(0, 8) });
      const operator = operatorOf(list);
      const x = new ExtendedVector();
      for (const frequency of [0, 10 ** random.between(0, 6)]) {
        const exact = solveExactly(list, frequency);
        fine(operator.prepare(frequency));
        fine(operator.exciteSources(x));
        for (const name of operator.network.nodeNames.slice(1)) {
          const of = exact.voltage(name);
          const at = node(operator, name);
          worst = Math.max(worst, unitsOff(of, { re: operator.voltageRe(x, at, 0), im: operator.voltageIm(x, at, 0) }));
        }
      }
    }
    expect(worst).toBeLessThanOrEqual(4);
  });

  it('loses nothing small beside large: passive networks over 16 decades', () => {
    const random = new Random(22);
    // Between points of a table that lie decades apart, interpolation has a condition of its own.
    const passive = { nodes: 4, elements: 6, decades: 16, without: [...SOURCES, 'impedance'] as const };
    let worst = 0;
    for (let round = 0; round < 40; round++) {
      const frequency = 10 ** random.between(1, 5);
      const drawn = randomLinearNetwork(random, passive);
      const list = network(...drawn.elements, currentSource('J', '0', '4', 1));
      const operator = operatorOf(list);
      // Some differ by more than 1/ε, and are told to.
      if (isProblem(operator.prepare(frequency))) continue;
      const x = new ExtendedVector();
      if (isProblem(operator.exciteSources(x))) continue;
      const exact = solveExactly(list, frequency);
      for (const name of ['1', '2', '3', '4']) {
        const of = exact.voltage(name);
        const at = node(operator, name);
        worst = Math.max(worst, unitsOff(of, { re: operator.voltageRe(x, at, 0), im: operator.voltageIm(x, at, 0) }));
      }
    }
    expect(worst).toBeGreaterThan(0);
    expect(worst).toBeLessThanOrEqual(4);
  });

  it('has an adjoint that tells the same of an output as the excitation does', () => {
    const random = new Random(23);
    for (let round = 0; round < 40; round++) {
      const list = randomLinearNetwork(random, { nodes: 5, elements: 10, decades: 2 });
      const operator = operatorOf(list);
      fine(operator.prepare(10 ** random.between(0, 6)));
      const x = new ExtendedVector();
      const adjoint = new ExtendedVector();
      const [a, b, c, d] = [1, 2, 3, 4].map((name) => node(operator, String(name))) as [number, number, number, number];
      fine(operator.inject(a, b, x));
      fine(operator.adjoint(operator.voltageForm(c, d), adjoint));
      const [re, im] = [operator.voltageRe(x, c, d), operator.voltageIm(x, c, d)];
      const off = Math.hypot(re - operator.voltageRe(adjoint, a, b), im - operator.voltageIm(adjoint, a, b));
      expect(off).toBeLessThanOrEqual(4 * Number.EPSILON * Math.hypot(re, im));
    }
  });

  const floating = network(
    voltageSource('V', 's', '0', 10),
    resistor('R1', 's', 'p', 50),
    { id: 'T', kind: 'coupledInductors', nodes: ['p', '0', 'a', 'b'], inductances: [1, 0.25], coupling: 0.9 },
    resistor('R2', 'a', 'b', 75),
  );

  it('answers the differences within a part that floats, and says that its common mode is not determined', () => {
    const operator = operatorOf(floating);
    fine(operator.prepare(50));
    const x = new ExtendedVector();
    fine(operator.exciteSources(x));
    const [a, b] = [node(operator, 'a'), node(operator, 'b')];
    const grounded = solveExactly(network(...floating.elements, resistor('tie', 'b', '0', 1)), 50).voltage('a');
    expect(grounded.errorOf({ re: operator.voltageRe(x, a, b), im: operator.voltageIm(x, a, b) })).toBeLessThanOrEqual(
      4 * Number.EPSILON * (1 + grounded.condition),
    );
    const adjoint = new ExtendedVector();
    fine(operator.adjoint(operator.voltageForm(a, b), adjoint));
    expect(operator.adjoint(operator.voltageForm(a, 0), adjoint)).toMatchObject({ kind: 'floatingNode', nodes: ['a', 'b'] });
    expect(operator.inject(a, 0, x)).toMatchObject({ kind: 'floatingNode', nodes: ['a', 'b'] });
    fine(operator.inject(a, b, x));
  });

  it('does not take for determined what an amplifier makes of a floating part’s common mode', () => {
    const sense = { id: 'CS', kind: 'voltageControlledVoltageSource', nodes: ['out', '0', 'a', '0'], gain: 2 } as const;
    const operator = operatorOf(network(...floating.elements, sense, resistor('RL', 'out', '0', 100)));
    fine(operator.prepare(50));
    const [a, b, out] = [node(operator, 'a'), node(operator, 'b'), node(operator, 'out')];
    const adjoint = new ExtendedVector();
    fine(operator.adjoint(operator.voltageForm(a, b), adjoint));
    expect(operator.adjoint(operator.voltageForm(out, 0), adjoint)).toMatchObject({ kind: 'floatingNode' });
  });

  it('answers around a loop of ideal connections, but not the currents in it', () => {
    const list = network(
      voltageSource('V', 's', '0', 1),
      resistor('R', 's', 'a', 10),
      resistor('W1', 'a', 'b', 0),
      inductor('W2', 'a', 'b', 1),
      resistor('RL', 'b', '0', 10),
    );
    const operator = operatorOf(list);
    fine(operator.prepare(0));
    const x = new ExtendedVector();
    fine(operator.exciteSources(x));
    expect(operator.voltageRe(x, node(operator, 'b'), 0)).toBe(0.5);
    const row = operator.network.rowStart[operator.network.elementIndex.get('W1') ?? 0] ?? 0;
    expect(operator.freedomOf(operator.currentForm(row))).toMatchObject({ kind: 'voltageLoop', elements: ['W2'] });
    const source = operator.network.rowStart[operator.network.elementIndex.get('V') ?? 0] ?? 0;
    expect(operator.freedomOf(operator.currentForm(source))).toBeUndefined();
  });

  it.each([
    ['voltage sources that contradict each other', network(voltageSource('V1', 'a', '0', 1), voltageSource('V2', 'a', '0', 2)), 50, 'voltageLoop'],
    ['a current without a way back', network(currentSource('J', '0', 'a', 1), capacitor('C', 'a', '0', 1e-6)), 0, 'floatingNode'],
    [
      'a lossless resonance',
      network(currentSource('J', '0', 'a', 1), capacitor('C', 'a', '0', 1), inductor('L', 'a', '0', 1 / (2 * Math.PI) ** 2)),
      1,
      'resonance',
    ],
    [
      'an amplifier without feedback',
      network(
        voltageSource('V', 'p', '0', 1),
        { id: 'A', kind: 'operationalAmplifier', nodes: ['p', 'm', 'o'] },
        resistor('R', 'm', '0', 1),
        resistor('RL', 'o', '0', 1),
      ),
      50,
      'noFeedback',
    ],
    [
      'a table that does not reach',
      network(
        currentSource('J', '0', 'a', 1),
        { id: 'Z', kind: 'impedance', nodes: ['a', '0'], points: [{ frequency: 10, resistance: 1, reactance: 0 }] },
      ),
      50,
      'noData',
    ],
    ['values beyond the arithmetic', network(currentSource('J', '0', 'a', 1), resistor('R', 'a', '0', 1e-310)), 50, 'notFinite'],
    ['a frequency that is none', network(resistor('R', 'a', '0', 1)), -1, 'invalid'],
  ] as const)('says what is wrong: %s', (_, list, frequency, kind) => {
    const operator = operatorOf(list);
    const result = operator.prepare(frequency) ?? operator.exciteSources(new ExtendedVector());
    expect(result?.kind).toBe(kind);
    expect(result?.message).toMatch(/^[A-Z].*\.$/);
  });

  it('follows the pivots from one end of a sweep to the other', () => {
    const list = network(
      currentSource('J', '0', 'a', 1),
      resistor('R1', 'a', 'b', 1),
      inductor('L', 'b', 'c', 1e-3),
      capacitor('C', 'c', '0', 1e-6),
      resistor('R2', 'b', '0', 1e3),
    );
    const operator = operatorOf(list);
    const x = new ExtendedVector();
    for (let decade = -3; decade <= 9; decade++) {
      fine(operator.prepare(10 ** decade));
      fine(operator.exciteSources(x));
      const of = solveExactly(list, 10 ** decade).voltage('a');
      const at = node(operator, 'a');
      expect(of.errorOf({ re: operator.voltageRe(x, at, 0), im: operator.voltageIm(x, at, 0) })).toBeLessThanOrEqual(
        4 * Number.EPSILON * (1 + of.condition),
      );
    }
  });
});
