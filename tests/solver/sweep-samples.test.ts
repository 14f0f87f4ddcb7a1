import { describe, expect, it } from 'vitest';
import type { Element, SweepOutput } from '@/solver';
import { sweep } from '@/solver';
import { sweepSamples } from '@/solver/analysis/sweep-samples';
import { capacitor, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';

const elements: readonly Element[] = [
  voltageSource('V', '1', '0', 1),
  resistor('R1', '1', '2', 100),
  inductor('L', '2', '3', 1e-3),
  capacitor('C', '3', '0', 1e-7),
  resistor('R2', '3', '0', 1000),
  capacitor('C2', '2', '0', 2e-8),
];
const outputs: readonly SweepOutput[] = [
  { quantity: 'voltage', node: '3' },
  { quantity: 'current', element: 'L' },
  { quantity: 'groupDelay', of: { quantity: 'voltage', node: '3' } },
];
const frequencies = [0, 100, 5000, 15_900, 40_000];

function randomValues(count: number): Record<string, number[]> {
  const random = new Random(5);
  const list = (nominal: number): number[] => Array.from({ length: count }, () => nominal * random.between(0.5, 1.5));
  return { R1: list(100), L: list(1e-3), C: list(1e-7), V: list(1) };
}

function withValues(values: Readonly<Record<string, readonly number[]>>, sample: number): Element[] {
  return elements.map((element): Element => {
    const value = values[element.id]?.[sample];
    if (value === undefined) return element;
    switch (element.kind) {
      case 'resistor':
        return { ...element, resistance: value };
      case 'capacitor':
        return { ...element, capacitance: value };
      case 'inductor':
        return { ...element, inductance: value };
      case 'voltageSource':
        return { ...element, value: { ...element.value, rms: value } };
      default:
        throw new Error(`no values for ${element.kind}`);
    }
  });
}

describe('samples', () => {
  it('are what sweeps of each give, to rounding, also where there are more of them than lanes', () => {
    const count = 150;
    const values = randomValues(count);
    const all = sweepSamples(network(...elements), { frequencies, outputs, values });
    if (!all.ok) throw new Error(all.message);
    expect(all.sampleCount).toBe(count);
    for (let sample = 0; sample < count; sample++) {
      const one = sweep(network(...withValues(values, sample)), { frequencies, outputs });
      if (!one.ok) throw new Error(one.message);
      for (const [index, trace] of all.traces.entries()) {
        for (const place of frequencies.keys()) {
          const at = place * count + sample;
          const expected = one.traces[index];
          expect(trace.determined[at]).toBe(expected?.determined[place]);
          const [re, im] = [expected?.re[place] ?? NaN, expected?.im[place] ?? NaN];
          const off = Math.hypot((trace.re[at] ?? NaN) - re, (trace.im[at] ?? NaN) - im);
          expect(off).toBeLessThanOrEqual(200 * Number.EPSILON * Math.hypot(re, im));
        }
      }
    }
  });

  it('of zero, where an element is open or closed, are right too', () => {
    const values = { R1: [0, 100], C: [1e-7, 0] };
    const all = sweepSamples(network(...elements), { frequencies: [5000], outputs: outputs.slice(0, 2), values });
    if (!all.ok) throw new Error(all.message);
    for (const sample of [0, 1]) {
      const one = sweep(network(...withValues(values, sample)), { frequencies: [5000], outputs: outputs.slice(0, 2) });
      if (!one.ok) throw new Error(one.message);
      for (const [index, trace] of all.traces.entries()) {
        expect(trace.determined[sample]).toBe(1);
        expect(Math.abs((trace.re[sample] ?? NaN) - (one.traces[index]?.re[0] ?? NaN))).toBeLessThan(1e-14);
        expect(Math.abs((trace.im[sample] ?? NaN) - (one.traces[index]?.im[0] ?? NaN))).toBeLessThan(1e-14);
      }
    }
  });

  it('are refused where they do not fit', () => {
    const ask = (values: Record<string, number[]>) => sweepSamples(network(...elements), { frequencies: [1], outputs, values });
    expect(ask({ R9: [1] })).toMatchObject({ ok: false, kind: 'invalid' });
    expect(ask({ R1: [1, 2], C: [1] })).toMatchObject({ ok: false, kind: 'invalid' });
    expect(ask({ R1: [NaN] })).toMatchObject({ ok: false, kind: 'invalid' });
  });

  it('write over a result that is no longer wanted', () => {
    const values = randomValues(20);
    const list = network(...elements);
    const first = sweepSamples(list, { frequencies, outputs, values });
    if (!first.ok) throw new Error(first.message);
    const copies = first.traces.map(({ re }) => re.slice());
    const again = sweepSamples(list, { frequencies, outputs, values: { ...values, V: values['V']?.map((value) => 2 * value) ?? [] }, reuse: first });
    if (!again.ok) throw new Error(again.message);
    expect(again.traces[0]?.re).toBe(first.traces[0]?.re);
    expect(again.traces[0]?.re[25]).toBeCloseTo(2 * (copies[0]?.[25] ?? NaN), 12);
    expect(again.traces[2]?.re[25]).toBeCloseTo(copies[2]?.[25] ?? NaN, 12);
  });
});
