import { describe, expect, it } from 'vitest';
import type { Element, ElementList } from '@/solver';
import type { Sensitivity, SensitivityOutput, SensitivityTrace } from '@/solver/analysis/sensitivity';
import { decibelsPerPercent, degreesPerPercent, sensitivity } from '@/solver/analysis/sensitivity';
import { randomLinearNetwork } from './support/linear-networks';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';

function found(list: ElementList, output: SensitivityOutput, frequency: number): Sensitivity {
  const result = sensitivity(list, output, [frequency]);
  if (!result.ok) throw new Error(result.message);
  return result;
}

function outputOf(list: ElementList, output: SensitivityOutput, frequency: number): readonly [number, number] {
  const { re, im } = found(list, output, frequency);
  return [re[0] ?? NaN, im[0] ?? NaN];
}

/** The list with one value changed by a factor. */
function scaled(list: ElementList, { element, field, index, value }: SensitivityTrace, factor: number): ElementList {
  const change = (one: Element): Element => {
    if (one.id !== element) return one;
    const before = (one as unknown as Record<string, unknown>)[field];
    const after = Array.isArray(before) ? before.map((each: number, at) => (at === index ? each * factor : each)) : value * factor;
    return { ...one, [field]: after } as Element;
  };
  return network(...list.elements.map(change));
}

/** p·∂H/∂p by central differences at three widths, extrapolated twice (Richardson 1911): what is left is of the sixth order. */
function byDifferences(list: ElementList, output: SensitivityOutput, frequency: number, trace: SensitivityTrace): readonly [number, number] {
  const width = 2 ** -12;
  const at = (h: number): readonly [number, number] => {
    const above = outputOf(scaled(list, trace, 1 + h), output, frequency);
    const below = outputOf(scaled(list, trace, 1 - h), output, frequency);
    return [(above[0] - below[0]) / (2 * h), (above[1] - below[1]) / (2 * h)];
  };
  const [one, two, four] = [at(width / 4), at(width / 2), at(width)];
  const mix = (part: 0 | 1): number => (64 * one[part] - 20 * two[part] + four[part]) / 45;
  return [mix(0), mix(1)];
}

describe('sensitivity', () => {
  it('is the derivative by every value of every kind, as differences show it', () => {
    const random = new Random(61);
    const seen = new Set<string>();
    for (let round = 0; round < 60; round++) {
      const list = randomLinearNetwork(random, { nodes: 4, elements: 8, decades: 2 });
      const live = network(...list.elements, voltageSource('E', 'live', '0', 1), resistor('Re', 'live', '3', 1e3));
      const frequency = 10 ** random.between(0, 5);
      const element = random.pick(list.elements.filter(({ kind }) => kind !== 'operationalAmplifier')).id;
      const output = random.pick<SensitivityOutput>([
        { quantity: 'voltageBetween', nodes: ['1', '2'] },
        { quantity: 'current', element },
        { quantity: 'impedance', nodes: ['2', '3'] },
        { quantity: 'transfer', source: 'E', reading: { quantity: 'voltage', node: '2' } },
        { quantity: 'transfer', source: 'E', reading: { quantity: 'current', element } },
      ]);
      const { traces, re, im } = found(live, output, frequency);
      const size = Math.hypot(re[0] ?? 0, im[0] ?? 0);
      for (const trace of traces) {
        // A wave on a long line turns too fast for differences.
        if (trace.field === 'delay' && trace.value * frequency > 0.1) continue;
        expect(trace.determined[0]).toBe(1);
        const [dRe, dIm] = byDifferences(live, output, frequency, trace);
        const off = Math.hypot(trace.value * (trace.re[0] ?? NaN) - dRe, trace.value * (trace.im[0] ?? NaN) - dIm);
        expect(off, `${trace.element} ${trace.field}`).toBeLessThanOrEqual(1e-10 * (size + Math.hypot(dRe, dIm)));
        if (Math.hypot(dRe, dIm) > 1e-6 * size) seen.add(trace.field);
      }
    }
    expect([...seen].sort()).toEqual([
      'capacitance',
      'coupling',
      'delay',
      'gain',
      'gainBandwidth',
      'impedance',
      'inductance',
      'inductances',
      'loss',
      'openLoopGain',
      'outputResistance',
      'ratio',
      'resistance',
      'transconductance',
      'transresistance',
    ]);
  });

  it('is the derivative by each inductance and coupling of three coupled coils', () => {
    const list = network(
      voltageSource('E', 'a', '0', 1),
      resistor('R1', 'a', 'b', 10),
      { id: 'TR', kind: 'coupledInductors', nodes: ['b', '0', 'c', '0', 'd', '0'], inductances: [1e-3, 2e-3, 3e-3], coupling: [0.3, -0.2, 0.4] },
      resistor('R2', 'c', '0', 20),
      resistor('R3', 'd', '0', 30),
    );
    const output = { quantity: 'voltageBetween', nodes: ['d', 'c'] } as const;
    const { traces } = found(list, output, 1000);
    expect(traces.map(({ element, field, index }) => [element, field, index])).toEqual([
      ['R1', 'resistance', undefined],
      ['TR', 'inductances', 0],
      ['TR', 'inductances', 1],
      ['TR', 'inductances', 2],
      ['TR', 'coupling', 0],
      ['TR', 'coupling', 1],
      ['TR', 'coupling', 2],
      ['R2', 'resistance', undefined],
      ['R3', 'resistance', undefined],
    ]);
    for (const trace of traces) {
      const [re, im] = byDifferences(list, output, 1000, trace);
      expect(Math.hypot(trace.value * (trace.re[0] ?? NaN) - re, trace.value * (trace.im[0] ?? NaN) - im)).toBeLessThan(1e-11);
    }
  });

  it('is of the voltage of a port as of that between its nodes', () => {
    const list = network(
      voltageSource('E', 'a', '0', 1),
      resistor('R1', 'a', 'b', 10),
      { id: 'TR', kind: 'coupledInductors', nodes: ['b', '0', 'c', 'd'], inductances: [1e-3, 2e-3], coupling: 0.3 },
      resistor('R2', 'c', 'd', 20),
    );
    const between = found(list, { quantity: 'voltageBetween', nodes: ['c', 'd'] }, 1000);
    expect(found(list, { quantity: 'elementVoltage', element: 'TR', port: 1 }, 1000)).toEqual(between);
    expect(found(list, { quantity: 'transfer', source: 'E', reading: { quantity: 'elementVoltage', element: 'R2' } }, 1000)).toEqual(between);
  });

  const sum = (traces: readonly SensitivityTrace[], fields: Readonly<Record<string, number>>): readonly [number, number] => {
    let re = 0;
    let im = 0;
    for (const { field, relativeRe, relativeIm } of traces) {
      re += (fields[field] ?? 0) * (relativeRe[0] ?? NaN);
      im += (fields[field] ?? 0) * (relativeIm[0] ?? NaN);
    }
    return [re, im];
  };

  it('adds up to nothing when all impedances change alike, for a transfer without a unit', () => {
    const random = new Random(62);
    for (let round = 0; round < 40; round++) {
      const list = randomLinearNetwork(random, { nodes: 4, elements: 8, decades: 3, without: ['impedance', 'twoPort', 'voltageSource', 'currentSource'] });
      const live = network(...list.elements, voltageSource('E', 'live', '0', 1), resistor('Re', 'live', '3', 1e3));
      const { traces } = found(live, { quantity: 'voltageBetween', nodes: ['3', '1'] }, 10 ** random.between(0, 5));
      const impedances = { resistance: 1, inductance: 1, inductances: 1, transresistance: 1, outputResistance: 1, impedance: 1, capacitance: -1, transconductance: -1 };
      const scale = traces.reduce((total, { relativeRe, relativeIm }) => total + Math.hypot(relativeRe[0] ?? 0, relativeIm[0] ?? 0), 0);
      expect(Math.hypot(...sum(traces, impedances))).toBeLessThanOrEqual(32 * Number.EPSILON * (1 + scale));
    }
  });

  it('adds up to the slope over the logarithm of the frequency when all times change alike', () => {
    const list = network(
      voltageSource('E', 's', '0', 1),
      resistor('Rs', 's', 'a', 600),
      capacitor('C1', 'a', '0', 82e-9),
      inductor('L', 'a', 'b', 60e-3),
      capacitor('C2', 'b', '0', 82e-9),
      resistor('RL', 'b', '0', 600),
    );
    const output = { quantity: 'voltage', node: 'b' } as const;
    const f = 2500;
    const total = sum(found(list, output, f).traces, { capacitance: 1, inductance: 1 });
    // H(f) is the same as H with all times scaled, so the slope comes of the frequency itself, by differences.
    const logarithm = (of: number): readonly [number, number] => {
      const [re, im] = outputOf(list, output, of);
      return [Math.log(Math.hypot(re, im)), Math.atan2(im, re)];
    };
    const slope = (h: number, part: 0 | 1): number => (logarithm(f * Math.exp(h))[part] - logarithm(f * Math.exp(-h))[part]) / (2 * h);
    for (const part of [0, 1] as const) {
      const extrapolated = (64 * slope(1e-3, part) - 20 * slope(2e-3, part) + slope(4e-3, part)) / 45;
      expect(Math.abs(total[part] - extrapolated)).toBeLessThan(1e-11);
    }
  });

  it('is known where a value is zero, and at 0 Hz', () => {
    const divider = network(voltageSource('E', 'a', '0', 10), resistor('R0', 'a', 'b', 0), resistor('R1', 'b', 'c', 1), resistor('R2', 'c', '0', 1), capacitor('C0', 'c', '0', 0), inductor('L', 'c', 'd', 1), resistor('R3', 'd', '0', 2));
    const at0 = found(divider, { quantity: 'voltage', node: 'c' }, 0);
    const of = (from: Sensitivity, id: string) => from.traces.find(({ element }) => element === id);
    // H = 10·g/(R0 + R1 + g) with g = R2 ‖ R3 = 2/3: ∂H/∂R0 = −10·g/(5/3)².
    expect(of(at0, 'R0')?.re[0]).toBeCloseTo(-2.4, 14);
    expect(of(at0, 'R0')?.relativeRe[0]).toBe(0);
    expect([of(at0, 'C0')?.re[0], of(at0, 'L')?.re[0], of(at0, 'L')?.im[0]]).toEqual([0, 0, 0]);
    const f = 1 / (2 * Math.PI);
    const at1 = found(divider, { quantity: 'voltage', node: 'c' }, f);
    // 1 Ω above, Y = 1 + 1/(2 + j) below: ∂H/∂C = −jω·H²/10.
    const [re, im] = [at1.re[0] ?? NaN, at1.im[0] ?? NaN];
    expect(of(at1, 'C0')?.re[0]).toBeCloseTo((2 * re * im) / 10, 13);
    expect(of(at1, 'C0')?.im[0]).toBeCloseTo(-(re * re - im * im) / 10, 13);
  });

  it('turns into decibels and degrees for one per cent', () => {
    expect(decibelsPerPercent(1)).toBeCloseTo(0.0868588964, 10);
    expect(degreesPerPercent(1)).toBeCloseTo(0.5729577951, 10);
  });

  it('says what is wrong, and where', () => {
    const list = network(voltageSource('E', 'a', '0', 1), resistor('R', 'a', 'b', 1), capacitor('C', 'b', 'c', 1), currentSource('J', 'c', '0', 0));
    const message = (output: SensitivityOutput) => {
      const result = sensitivity(list, output, [1]);
      return result.ok ? undefined : result.message;
    };
    expect(message({ quantity: 'voltage', node: 'x' })).toMatch(/no node x/);
    expect(message({ quantity: 'current', element: 'R', port: 1 })).toMatch(/R has no port 1/);
    expect(message({ quantity: 'transfer', source: 'R', reading: { quantity: 'current', element: 'R' } })).toMatch(/R is not an independent source/);
    const partly = sensitivity(list, { quantity: 'voltage', node: 'c' }, [0, 1]);
    if (!partly.ok) throw new Error(partly.message);
    expect([...partly.determined]).toEqual([0, 1]);
    expect(partly.problems).toEqual([{ at: [0], problem: expect.objectContaining({ kind: 'floatingNode', nodes: ['c'] }) as unknown }]);
  });
});
