import { describe, expect, it } from 'vitest';
import type { Element, ElementList, Problem } from '@/solver';
import { equivalent, matrixAt, noise, noiseTotal, sensitivity, solve, twoPort } from '@/solver';
import { BOLTZMANN } from '@/solver/analysis/noise';
import { isProblem } from '@/solver/analysis/problem';
import { ResponseOperator } from '@/solver/analysis/response-operator';
import type { SensitivityTrace } from '@/solver/analysis/sensitivity';
import { ExtendedVector } from '@/solver/linear/extended';
import { solved } from './support/expect';
import { randomLinearNetwork } from './support/linear-networks';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';
import { amplifier, refused } from './support/roots';

function fine<T extends { readonly ok: true }>(result: T | Problem): T {
  if (!result.ok) throw new Error(result.message);
  return result;
}

/** Networks whose equations have no unique solution at one frequency, by the numbers alone. */

// The lattice balun of 50 Ω to 200 Ω at 50 MHz: √(R₁·R₂) = ωL = 1/ωC = 100 Ω. Nothing holds the outputs' mean.
const F0 = 50e6;
const L = 100 / (2 * Math.PI * F0);
const C = 1 / (2 * Math.PI * F0 * 100);
const LATTICE = [inductor('L1', 'in', 'a', L), capacitor('C1', 'a', '0', C), capacitor('C2', 'in', 'b', C), inductor('L2', 'b', '0', L)];
const FED = [voltageSource('V1', 's', '0', 2), resistor('Rs', 's', 'in', 50), ...LATTICE];
const LOADED = network(...FED, resistor('RL', 'a', 'b', 200));
const BETWEEN = { quantity: 'voltageBetween', nodes: ['a', 'b'] } as const;
const MEAN_IS_FREE = { kind: 'resonance', elements: ['L1', 'C1', 'C2', 'L2'], nodes: ['a', 'b'] } as const;

function sizeAt(list: ElementList): readonly [number, number] {
  const { re, im } = fine(sensitivity(list, BETWEEN, [F0]));
  return [re[0] ?? NaN, im[0] ?? NaN];
}

/** p·∂H/∂p of the voltage between the outputs, by central differences, extrapolated twice. */
function byDifferences(list: ElementList, { element, field }: SensitivityTrace): readonly [number, number] {
  const scaled = (factor: number): readonly [number, number] =>
    sizeAt(
      network(
        ...list.elements.map((one): Element => {
          if (one.id !== element) return one;
          if (one.kind === 'resistor') return { ...one, resistance: one.resistance * factor };
          if (one.kind === 'capacitor') return { ...one, capacitance: one.capacitance * factor };
          if (one.kind === 'inductor') return { ...one, inductance: one.inductance * factor };
          throw new Error(`no ${field} to change`);
        }),
      ),
    );
  const at = (h: number, part: 0 | 1): number => (scaled(1 + h)[part] - scaled(1 - h)[part]) / (2 * h);
  const width = 2 ** -9;
  const mix = (part: 0 | 1): number => (64 * at(width / 4, part) - 20 * at(width / 2, part) + at(width, part)) / 45;
  return [mix(0), mix(1)];
}

describe('a balun whose outputs’ mean is free at its own frequency', () => {
  it('has its difference from solve, and its mean said to be free', () => {
    const solution = solved(solve(LOADED, { frequency: F0 }));
    expect(solution.elementVoltage('RL')?.abs()).toBeCloseTo(2, 13);
    expect(solution.voltage('a')).toBeUndefined();
    expect(solution.problems).toMatchObject([MEAN_IS_FREE]);
  });

  it('has an equivalent source between its outputs, and none from one of them to the reference', () => {
    const seen = fine(equivalent(LOADED, ['a', 'b'], F0));
    expect(seen.openCircuitVoltage?.abs()).toBeCloseTo(2, 13);
    expect(seen.impedance?.re).toBeCloseTo(100, 11);
    expect(seen.impedance?.im).toBeCloseTo(0, 11);
    expect(fine(equivalent(network(...FED), ['a', 'b'], F0)).impedance?.re).toBeCloseTo(200, 11);
    // A current into one output drives the mean without bound, but ends in any load: a current source with no voltage.
    const one = fine(equivalent(LOADED, ['a', '0'], F0));
    expect([one.openCircuitVoltage, one.impedance]).toEqual([undefined, undefined]);
  });

  it('is a matched two-port between its input and its outputs', () => {
    const found = fine(twoPort(network(...LATTICE), [['in', '0'], ['a', 'b']], { frequencies: [F0 / 2, F0], reference: [50, 200] }));
    const matrix = matrixAt(found.parameters('scattering'), 1);
    if (matrix === undefined) throw new Error('no matrix');
    const size = (at: number): number => Math.hypot(matrix[at] ?? NaN, matrix[at + 1] ?? NaN);
    for (const [at, expected] of [0, 1, 1, 0].entries()) expect(Math.abs(size(2 * at) - expected)).toBeLessThan(1e-14);
    expect(found.problems).toEqual([]);
  });

  it('has the sensitivities that differences show, those by the resonant elements too', () => {
    const { traces, re, im } = fine(sensitivity(LOADED, BETWEEN, [F0]));
    expect(Math.hypot(re[0] ?? NaN, im[0] ?? NaN)).toBeCloseTo(2, 13);
    expect(traces.map(({ element }) => element)).toEqual(['Rs', 'L1', 'C1', 'C2', 'L2', 'RL']);
    for (const trace of traces) {
      expect(trace.determined[0]).toBe(1);
      const [dRe, dIm] = byDifferences(LOADED, trace);
      expect(Math.abs(trace.value * (trace.re[0] ?? NaN) - dRe), trace.element).toBeLessThan(1e-9);
      expect(Math.abs(trace.value * (trace.im[0] ?? NaN) - dIm), trace.element).toBeLessThan(1e-9);
    }
    expect(refused(sensitivity(LOADED, { quantity: 'voltage', node: 'a' }, [F0]))).toMatchObject(MEAN_IS_FREE);
    expect(refused(sensitivity(LOADED, { quantity: 'impedance', nodes: ['a', '0'] }, [F0]))).toMatchObject(MEAN_IS_FREE);
  });

  it('has the noise of its resistance between the outputs, beside frequencies where the mean is known', () => {
    const frequencies = [F0 * 0.9, F0];
    const found = fine(noise(LOADED, ['a', 'b'], { frequencies, temperature: 300 }));
    expect([...found.determined]).toEqual([1, 1]);
    expect((found.density[1] ?? NaN) / Math.sqrt(4 * BOLTZMANN * 300 * 100)).toBeCloseTo(1, 13);
    const mean = fine(noise(LOADED, ['a', '0'], { frequencies, temperature: 300 }));
    expect([...mean.determined]).toEqual([1, 0]);
    expect(mean.problems).toMatchObject([{ at: [1], problem: MEAN_IS_FREE }]);
    fine(noiseTotal(LOADED, ['a', 'b'], { from: F0 / 2, to: 2 * F0, tolerance: 1e-6 }));
  });

  it('is told when something drives the mean', () => {
    const driven = network(...LOADED.elements, currentSource('J', '0', 'a', 1e-3));
    const problem = refused(sensitivity(driven, BETWEEN, [F0]));
    expect(problem).toMatchObject(MEAN_IS_FREE);
    expect(problem.message).toMatch(/grows without bound/);
    // The noise of R3, by way of what senses it: none of the passive ones can.
    const sensing: Element = { id: 'CS1', kind: 'voltageControlledCurrentSource', nodes: ['a', '0', 'x', '0'], transconductance: 1e-3 };
    const noisy = noise(network(...LOADED.elements, resistor('R3', 'x', '0', 1e3), sensing), ['a', 'b'], { frequencies: [F0] });
    expect(refused(noisy)).toMatchObject({ ...MEAN_IS_FREE, message: problem.message });
  });
});

describe('what is wrong', () => {
  const [l, c] = [1e-3, 1e-6];
  const resonant = 1 / (2 * Math.PI * Math.sqrt(l * c));
  it.each([
    ['a series circuit on an EMF', [voltageSource('V1', '1', '0', 1), inductor('L1', '1', '2', l), capacitor('C1', '2', '0', c)], resonant, 'resonance'],
    ['a parallel circuit on a current', [currentSource('I1', '0', '1', 1), inductor('L1', '1', '0', l), capacitor('C1', '1', '0', c)], resonant, 'resonance'],
    [
      'an amplifier without feedback',
      [voltageSource('V1', 'p', '0', 1), amplifier('A1', 'p', 'm', 'o'), resistor('R1', 'm', '0', 1), resistor('RL', 'o', '0', 1)],
      50,
      'noFeedback',
    ],
    [
      'a negative resistance that cancels another',
      [currentSource('I1', '0', '1', 1), resistor('R1', '1', '0', 0.3), resistor('R2', '1', '0', -0.1), resistor('R3', '1', '0', 0.15)],
      50,
      'singular',
    ],
  ] as const)('is said with the names that solve gives: %s', (_, elements, frequency, kind) => {
    const list = network(...elements);
    const by = refused(solve(list, { frequency }));
    const operator = ResponseOperator.of(list);
    if (isProblem(operator)) throw new Error(operator.message);
    const found = operator.prepare(frequency) ?? operator.exciteSources(new ExtendedVector());
    expect(by.kind).toBe(kind);
    expect(found).toMatchObject({ kind, elements: by.elements, nodes: by.nodes, message: by.message });
  });
});

describe('a lossless circuit that hangs on one node, at its resonance', () => {
  it('changes nothing of what any network answers elsewhere', () => {
    const random = new Random(77);
    for (let round = 0; round < 30; round++) {
      const list = randomLinearNetwork(random, { nodes: 4, elements: 8, decades: 4 });
      const frequency = 10 ** random.between(1, 5);
      const l = 10 ** random.between(-6, 0);
      const tank = [inductor('tank L', '2', 'free', l), capacitor('tank C', '2', 'free', 1 / ((2 * Math.PI * frequency) ** 2 * l))];
      const hung = network(...list.elements, ...tank);
      const near = (one: ArrayLike<number>, other: ArrayLike<number>): void => {
        const scale = Math.max(...Array.from(one, Math.abs));
        expect(other.length).toBe(one.length);
        for (let at = 0; at < one.length; at++) {
          expect(Math.abs((one[at] ?? NaN) - (other[at] ?? NaN))).toBeLessThanOrEqual(64 * Number.EPSILON * scale);
        }
      };
      const ports = [['1', '0'], ['2', '3']] as const;
      const options = { frequencies: [frequency], reference: 50 };
      near(fine(twoPort(list, ports, options)).parameters('scattering').values, fine(twoPort(hung, ports, options)).parameters('scattering').values);
      const heard = [list, hung].map((one) => fine(noise(one, ['2', '3'], { frequencies: [frequency] })));
      near(heard[0]?.density ?? [], heard[1]?.density ?? []);
      const output = { quantity: 'voltageBetween', nodes: ['1', '3'] } as const;
      const [alone, beside] = [list, hung].map((one) => fine(sensitivity(one, output, [frequency])));
      const numbersOf = (traces: readonly SensitivityTrace[] = []): readonly number[] =>
        traces.flatMap(({ relativeRe, relativeIm }) => [relativeRe[0] ?? NaN, relativeIm[0] ?? NaN]);
      near(numbersOf(alone?.traces), numbersOf(beside?.traces.slice(0, -2)));
      const [tankL, tankC] = beside?.traces.slice(-2) ?? [];
      expect([tankL?.re[0], tankL?.im[0], tankC?.re[0], tankC?.im[0]]).toEqual([0, 0, 0, 0]);
      expect(refused(sensitivity(hung, { quantity: 'voltage', node: 'free' }, [frequency]))).toMatchObject({
        kind: 'resonance',
        elements: ['tank L', 'tank C'],
        nodes: ['free'],
      });
    }
  });
});
