import { describe, expect, it } from 'vitest';
import type { Sweep, SweepOutput } from '@/solver';
import { solve, sweep } from '@/solver';
import { expectClose, solved } from './support/expect';
import { capacitor, inductor, network, resistor, voltageSource } from './support/networks';

const list = network(
  voltageSource('V1', '1', '0', 1),
  voltageSource('V50', '4', '1', 1, 0, 50),
  resistor('R1', '4', '2', 100),
  inductor('L1', '2', '3', 1e-3),
  capacitor('C1', '3', '0', 1e-6),
  resistor('R2', '3', '0', 1000),
);
const outputs: readonly SweepOutput[] = [
  { quantity: 'voltage', node: '3' },
  { quantity: 'current', element: 'L1' },
  { quantity: 'elementVoltage', element: 'R1' },
];

function swept(frequencies: readonly number[], of: readonly SweepOutput[] = outputs, network = list): Sweep {
  const result = sweep(network, { frequencies, outputs: of });
  if (!result.ok) throw new Error(result.message);
  return result;
}

describe('sweep', () => {
  it('is what solve gives at each frequency, to rounding, in any order and with repeats', () => {
    const frequencies = [1e3, 50, 0, 1e5, 50, 5032.9, 0.001];
    const result = swept(frequencies);
    expect([...result.frequencies]).toEqual(frequencies);
    for (const [place, frequency] of frequencies.entries()) {
      const one = solved(solve(list, { frequency }));
      const [voltage, current, across] = result.traces.map(({ re, im }) => ({ re: re[place] ?? NaN, im: im[place] ?? NaN }));
      expectClose(voltage, one.voltage('3') ?? { re: NaN, im: NaN }, 20);
      expectClose(current, one.current('L1') ?? { re: NaN, im: NaN }, 20);
      expectClose(across, one.elementVoltage('R1') ?? { re: NaN, im: NaN }, 20);
    }
  });

  it('marks where there is no value, and says why and where', () => {
    const tank = network(
      voltageSource('V1', '1', '0', 1),
      inductor('L1', '1', '2', 1e-3),
      capacitor('C1', '2', '0', 1e-6),
    );
    const f0 = 1 / (2 * Math.PI * Math.sqrt(1e-9));
    const result = swept([f0 / 2, f0, f0 * 2], [{ quantity: 'voltage', node: '2' }], tank);
    const [trace] = result.traces;
    expect([...(trace?.determined ?? [])]).toEqual([1, 0, 1]);
    expect(trace?.re[1]).toBe(0);
    expect(result.problems).toHaveLength(1);
    expect(result.problems[0]).toMatchObject({ problem: { kind: 'resonance' }, at: [1] });
  });

  it('gathers a problem that stands at all frequencies into one', () => {
    const floating = network(voltageSource('V1', 'a', 'b', 1), resistor('R1', 'a', 'b', 1));
    const result = swept([1, 2, 3], [{ quantity: 'current', element: 'R1' }], floating);
    expect(result.problems).toHaveLength(1);
    expect(result.problems[0]).toMatchObject({ problem: { kind: 'noReference' }, at: [0, 1, 2] });
  });

  it('gives the problem itself where nothing that was asked for is determined', () => {
    const floating = network(voltageSource('V1', 'a', 'b', 1), resistor('R1', 'a', 'b', 1));
    const result = sweep(floating, { frequencies: [1, 2], outputs: [{ quantity: 'voltage', node: 'a' }] });
    expect(result).toMatchObject({ ok: false, kind: 'noReference' });
  });

  it('refuses outputs that are not in the list', () => {
    expect(sweep(list, { frequencies: [1], outputs: [{ quantity: 'voltage', node: 'x' }] })).toMatchObject({
      ok: false,
      kind: 'invalid',
    });
    expect(sweep(list, { frequencies: [1], outputs: [{ quantity: 'current', element: 'x' }] })).toMatchObject({
      ok: false,
      kind: 'invalid',
    });
  });

  it('takes no frequencies for no values', () => {
    expect(swept([]).traces[0]?.re).toHaveLength(0);
  });
});
