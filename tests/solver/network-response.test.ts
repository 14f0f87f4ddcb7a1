import { describe, expect, it } from 'vitest';
import type { Element, NetworkResponse, Scan, SweepTransfer } from '@/solver';
import { extremesOf, networkResponse, passBand, scanResponse, solve } from '@/solver';
import { solved } from './support/expect';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';
import { refused } from './support/roots';

function responseOf(elements: readonly Element[], output: SweepTransfer): NetworkResponse {
  const response = networkResponse(network(...elements), output);
  if (!response.ok) throw new Error(response.message);
  return response;
}

const OUT = { quantity: 'voltage', node: 'out' } as const;
const BAND = { low: 10, high: 10e6, perDecade: 10 };

/** A series circuit at f₀ with so much resistance that its quality is Q. */
function resonator(f0: number, q: number): readonly Element[] {
  const l = 1e-3;
  const c = 1 / ((2 * Math.PI * f0) ** 2 * l);
  return [inductor('L1', 's', 'a', l), capacitor('C1', 'a', 'out', c), resistor('R1', 'out', '0', (2 * Math.PI * f0 * l) / q)];
}

describe('the response of a network', () => {
  it('has a resonance of quality 10 000 found by a scan of ten points a decade, by its own hints', () => {
    const [f0, q] = [123_456.789, 10_000];
    const elements = [voltageSource('V1', 's', '0', 1), ...resonator(f0, q)];
    const response = responseOf(elements, OUT);
    const scan = scanResponse(response, BAND);
    if (!scan.ok) throw new Error(scan.message);
    const [peak, ...more] = extremesOf(scan);
    expect(more).toEqual([]);
    expect(Math.abs((peak?.frequency ?? 0) / f0 - 1)).toBeLessThanOrEqual(1e-11);
    expect(Math.abs((passBand(scan)?.q ?? 0) / q - 1)).toBeLessThanOrEqual(1e-7);
    // The slopes give such a one away; of a dip of five per cent no grid shows anything.
    const dip = [voltageSource('V1', 's', '0', 1), resistor('R2', 's', 'out', 1e3), resistor('R3', 'out', '0', 1e3), ...shallow(f0, q)];
    const withHints = scanResponse(responseOf(dip, OUT), BAND);
    const without = scanResponse(responseOf(dip, OUT), { ...BAND, hints: [] });
    if (!withHints.ok || !without.ok) throw new Error('no scan');
    const leastOf = ({ re, im }: Scan): number => Math.min(...Array.from(re, (part, k) => Math.hypot(part, im[k] ?? NaN)));
    expect(leastOf(without)).toBeGreaterThan(0.4999);
    expect(leastOf(withHints)).toBeLessThan(0.4763);
    const [lowest, ...others] = extremesOf(withHints);
    expect(others).toEqual([]);
    expect(lowest?.kind).toBe('minimum');
    // 10 kΩ beside 500 Ω.
    expect((lowest?.magnitude ?? 0) / (0.5 / 1.05)).toBeCloseTo(1, 12);
    expect(Math.abs((lowest?.frequency ?? 0) / f0 - 1)).toBeLessThanOrEqual(1e-11);
  });

  /** Across the output, 10 kΩ at f₀ and next to nothing beside it. */
  function shallow(f0: number, q: number): readonly Element[] {
    const reactance = 1e4 * q;
    const omega = 2 * Math.PI * f0;
    return [inductor('L1', 'out', 'a', reactance / omega), capacitor('C1', 'a', 'b', 1 / (reactance * omega)), resistor('R1', 'b', '0', 1e4)];
  }

  it('is what solve answers, one at a time and all at once, for every kind of transfer', () => {
    const random = new Random(5);
    const elements = [voltageSource('V1', 's', '0', 2, 30), resistor('R2', 's', 'out', 50), ...resonator(1e5, 3), currentSource('J', '0', 'a', 1e-3)];
    const frequencies = Float64Array.from({ length: 40 }, () => 10 ** random.between(3, 7));
    const outputs: readonly SweepTransfer[] = [
      OUT,
      { quantity: 'voltageBetween', nodes: ['s', 'a'] },
      { quantity: 'elementVoltage', element: 'L1' },
      { quantity: 'current', element: 'C1' },
      { quantity: 'ratio', of: OUT, to: { quantity: 'voltage', node: 's' } },
    ];
    for (const output of outputs) {
      const response = responseOf(elements, output);
      expect(response.hints.length).toBeGreaterThan(0);
      const all = response.evaluateAll(frequencies);
      for (const [place, frequency] of frequencies.entries()) {
        const solution = solved(solve(network(...elements), { frequency }));
        const volts = (node: string) => solution.voltage(node) ?? NaN;
        const expected = {
          voltage: () => solution.voltage('out'),
          voltageBetween: () => solution.voltage('s')?.sub(volts('a')),
          elementVoltage: () => solution.elementVoltage('L1'),
          current: () => solution.current('C1'),
          ratio: () => solution.voltage('out')?.div(volts('s')),
        };
        const of = expected[output.quantity as keyof typeof expected]();
        const one = response.evaluate(frequency);
        expect(all.determined[place]).toBe(1);
        expect([all.re[place], all.im[place]]).toEqual([one?.re, one?.im]);
        expect(Math.hypot((one?.re ?? NaN) - (of?.re ?? NaN), (one?.im ?? NaN) - (of?.im ?? NaN))).toBeLessThanOrEqual(1e-13 * (of?.abs() ?? NaN));
      }
    }
    const impedance = responseOf(elements, { quantity: 'impedance', nodes: ['s', 'out'] });
    const admittance = responseOf(elements, { quantity: 'admittance', nodes: ['s', 'out'] });
    // Beside the resonance: at it the impedance is what rounding leaves of nothing.
    const [z, y] = [impedance.evaluate(1.2e5), admittance.evaluate(1.2e5)];
    expect((z?.re ?? NaN) * (y?.re ?? NaN) - (z?.im ?? NaN) * (y?.im ?? NaN)).toBeCloseTo(1, 12);
    expect(impedance.hints).toEqual(admittance.hints);
  });

  it('has no value at a lossless resonance, and no hints of a network with a line', () => {
    const f0 = 1e3;
    const tank = [currentSource('J', '0', 'out', 1), inductor('L', 'out', '0', 1), capacitor('C', 'out', '0', 1 / (2 * Math.PI * f0) ** 2)];
    const response = responseOf(tank, OUT);
    expect(response.evaluate(f0)).toBeUndefined();
    expect(response.evaluate(-1)).toBeUndefined();
    expect([...response.evaluateAll(Float64Array.of(f0, 2 * f0)).determined]).toEqual([0, 1]);
    expect([...response.evaluateAll(Float64Array.of(f0)).determined]).toEqual([0]);
    expect(response.hints).toMatchObject([{ frequency: expect.closeTo(f0, 6) as unknown }]);
    const line: Element = { id: 'T', kind: 'line', nodes: ['s', '0', 'out', '0'], impedance: 50, delay: 1e-9 };
    expect(responseOf([voltageSource('V1', 's', '0', 1), line, resistor('RL', 'out', '0', 75)], OUT).hints).toEqual([]);
  });

  it('takes the poles of all sources, and zeros only where one drives alone', () => {
    const one = [voltageSource('V1', 's', '0', 1), resistor('R1', 's', 'out', 1e3), capacitor('C1', 'out', 'm', 1e-9), resistor('R2', 'm', '0', 10)];
    const own = currentSource('J1', '0', 'out', 1, 0, 50);
    const dead = currentSource('J2', '0', 'm', 0);
    expect(responseOf([...one, own, dead], OUT).hints).toHaveLength(2);
    expect(responseOf([...one, currentSource('J3', '0', 'm', 1)], OUT).hints).toHaveLength(2);
    const frequencies = responseOf([...one, currentSource('J3', '0', 'm', 1)], OUT).hints.map(({ frequency }) => frequency);
    expect(new Set(frequencies.map((f) => f.toPrecision(10))).size).toBe(1);
  });

  it('says what is wrong with a request', () => {
    expect(refused(networkResponse(network(resistor('R', '1', '0', 1)), { quantity: 'voltage', node: 'x' })).message).toMatch(/no node x/);
  });
});
