import { describe, expect, it } from 'vitest';
import type { Element, Sweep, SweepOutput } from '@/solver';
import { sweep } from '@/solver';
import type { AdaptiveOptions } from '@/solver/analysis/adaptive-frequencies';
import { adaptiveFrequencies } from '@/solver/analysis/adaptive-frequencies';
import { linearFrequencies, listedFrequencies, logarithmicFrequencies } from '@/solver/analysis/frequency-grid';
import { capacitor, inductor, network, resistor, voltageSource } from './support/networks';

/** A trap that takes the output down to a half in a band of f0/Q about f0. */
function trap(q: number, f0: number): Element[] {
  const l = 1e-3;
  const omega = 2 * Math.PI * f0;
  const r = (omega * l) / q;
  return [
    voltageSource('V', '1', '0', 1),
    resistor('Rs', '1', '2', r),
    resistor('R', '2', '3', r),
    inductor('L', '3', '4', l),
    capacitor('C', '4', '0', 1 / (omega * omega * l)),
  ];
}

const output: SweepOutput = { quantity: 'voltage', node: '2' };

function swept(elements: readonly Element[], frequencies: ArrayLike<number>, adaptive?: AdaptiveOptions): Sweep {
  const result = sweep(network(...elements), { frequencies, outputs: [output], adaptive });
  if (!result.ok) throw new Error(result.message);
  return result;
}

function lowest({ traces }: Sweep): number {
  const [trace] = traces;
  return Math.min(...Array.from(trace?.re ?? [], (re, place) => Math.hypot(re, trace?.im[place] ?? NaN)));
}

describe('adaptive points', () => {
  const grid = logarithmicFrequencies(100, 100_000, 151);
  const f0 = 3217.3;

  it.each([10, 1000, 10_000, 100_000])('find a resonance of Q = %d between the points of a grid of 50 a decade', (q) => {
    const plain = swept(trap(q, f0), grid);
    if (q >= 1000) expect(lowest(plain)).toBeGreaterThan(0.7);
    const found = swept(trap(q, f0), grid, {});
    expect(Math.abs(lowest(found) - 0.5)).toBeLessThan(0.005);
    expect(found.frequencies.length).toBeLessThan(grid.length + 300);
    expect([...grid].every((frequency) => found.frequencies.includes(frequency))).toBe(true);
    expect([...found.frequencies]).toEqual([...found.frequencies].sort((a, b) => a - b));
  });

  it('leave a smooth response as it is', () => {
    const elements = [voltageSource('V', '1', '0', 1), resistor('R', '1', '2', 1000), capacitor('C', '2', '0', 1e-7)];
    expect(swept(elements, grid, {}).frequencies).toHaveLength(grid.length);
  });

  it('take hints of resonances so narrow that nothing of them is seen beside them', () => {
    const q = 1e9;
    const found = swept(trap(q, f0), grid, { hints: [{ frequency: f0, width: f0 / q }] });
    expect(Math.abs(lowest(found) - 0.5)).toBeLessThan(0.005);
  });

  it('draw within the tolerance: halfway between any two neighbours the response is near the line between them', () => {
    const elements = trap(200, f0);
    const found = swept(elements, grid, { tolerance: 0.003 });
    const between = Float64Array.from(found.frequencies.subarray(1), (high, place) => Math.sqrt(high * (found.frequencies[place] ?? high)));
    const check = swept(elements, between);
    const [trace] = found.traces;
    const [middle] = check.traces;
    for (const place of between.keys()) {
      const near = Math.hypot(
        ((trace?.re[place] ?? NaN) + (trace?.re[place + 1] ?? NaN)) / 2 - (middle?.re[place] ?? NaN),
        ((trace?.im[place] ?? NaN) + (trace?.im[place + 1] ?? NaN)) / 2 - (middle?.im[place] ?? NaN),
      );
      expect(near / Math.hypot(middle?.re[place] ?? NaN, middle?.im[place] ?? NaN)).toBeLessThan(0.0031);
    }
  });

  it('keep 0 Hz, and come to an end at a resonance without losses', () => {
    const lossless = [voltageSource('V', '1', '0', 1), inductor('L', '1', '2', 1e-3), capacitor('C', '2', '0', 1e-6)];
    const found = swept(lossless, [0, ...logarithmicFrequencies(1000, 10_000, 40)], { mostPoints: 3000 });
    expect(found.frequencies[0]).toBe(0);
    expect(found.frequencies.length).toBeLessThanOrEqual(3000);
  });

  it('add nothing where there is nothing between', () => {
    const none = { re: new Float64Array(1), im: new Float64Array(1), determined: new Uint8Array(1) };
    expect([...adaptiveFrequencies([5], () => [none], {})]).toEqual([5]);
    expect([...adaptiveFrequencies([], () => [none], {})]).toEqual([]);
  });
});

describe('frequency grids', () => {
  it('begin and end where they are told to, evenly', () => {
    expect([...linearFrequencies(0, 10, 5)]).toEqual([0, 2.5, 5, 7.5, 10]);
    const decades = logarithmicFrequencies(1, 1000, 4);
    expect([decades[0], decades[3]]).toEqual([1, 1000]);
    expect(decades[1]).toBeCloseTo(10, 12);
    expect([...linearFrequencies(3, 5, 1)]).toEqual([3]);
    expect([...logarithmicFrequencies(3, 5, 0)]).toEqual([]);
  });

  it('are made of lists, rising, each frequency once', () => {
    expect([...listedFrequencies([50, 10], [10, 20])]).toEqual([10, 20, 50]);
  });
});
