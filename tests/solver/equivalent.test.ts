import { describe, expect, it } from 'vitest';
import type { ElementList } from '@/solver';
import type { Equivalent } from '@/solver/analysis/equivalent';
import { equivalent } from '@/solver/analysis/equivalent';
import { solveExactly } from '../reference/support/exact-solver';
import { expectPrinted } from '../reference/support/expect-figure';
import { unitsOff } from './support/exact-units';
import { randomLinearNetwork } from './support/linear-networks';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';

function found(list: ElementList, pair: readonly [string, string], frequency: number): Equivalent {
  const result = equivalent(list, pair, frequency);
  if (!result.ok) throw new Error(result.message);
  return result;
}

describe('equivalent', () => {
  it('tells what any load takes, by 64-digit arithmetic on the whole network', () => {
    const random = new Random(51);
    for (let round = 0; round < 30; round++) {
      const list = randomLinearNetwork(random, { nodes: 4, elements: 9, decades: 3 });
      const live = network(...list.elements, voltageSource('E', 'live', '0', 1), resistor('Re', 'live', '3', 1e3));
      const frequency = 10 ** random.between(0, 5);
      const { openCircuitVoltage: open, impedance, shortCircuitCurrent: short } = found(live, ['1', '2'], frequency);
      if (open === undefined || impedance === undefined || short === undefined) throw new Error('not defined');
      const load = 10 ** random.between(1, 5);
      const exact = solveExactly(network(...live.elements, resistor('load', '1', '2', load)), frequency).current('load');
      const current = open.div(impedance.add(load));
      expect(unitsOff(exact, current)).toBeLessThanOrEqual(64);
      expect(short.mul(impedance).sub(open).abs()).toBeLessThanOrEqual(8 * Number.EPSILON * open.abs());
    }
  });

  /** Bird, Electrical Circuit Theory and Technology, 2nd ed. 2003, chapter 35 [found]. */
  describe('gives the loads of greatest power of the worked examples', () => {
    const behind = (volts: number, resistance: number, reactance: number) =>
      network(
        voltageSource('E', 'a', '0', volts),
        resistor('R', 'a', 'b', resistance),
        reactance < 0
          ? capacitor('X', 'b', 'c', -1 / (2 * Math.PI * reactance))
          : inductor('X', 'b', 'c', reactance / (2 * Math.PI)),
      );

    it('example 1: 120 V behind 15 + j20 Ω gives a resistance 180 W at 25 Ω', () => {
      const { resistiveLoad } = found(behind(120, 15, 20), ['c', '0'], 1);
      expect(resistiveLoad?.impedance.re).toBeCloseTo(25, 12);
      expect(resistiveLoad?.power).toBeCloseTo(180, 11);
    });

    it('example 2: and 240 W to 15 − j20 Ω', () => {
      const { conjugateLoad } = found(behind(120, 15, 20), ['c', '0'], 1);
      expect(conjugateLoad?.impedance.re).toBeCloseTo(15, 12);
      expect(conjugateLoad?.impedance.im).toBeCloseTo(-20, 12);
      expect(conjugateLoad?.power).toBeCloseTo(240, 11);
    });

    it('example 3: 200 V behind 100 Ω beside 1 µF at 1 kHz gives a resistance of 84.67 Ω 127.9 W', () => {
      const list = network(voltageSource('E', 'a', '0', 200), resistor('R', 'a', 'b', 100), capacitor('C', 'a', 'b', 1e-6));
      const { impedance, resistiveLoad } = found(list, ['b', '0'], 1000);
      expectPrinted(impedance?.re ?? NaN, { printed: '71.696', within: 2e-3 });
      expectPrinted(impedance?.im ?? NaN, { printed: '-45.048', within: 2e-3 });
      expectPrinted(resistiveLoad?.impedance.re ?? NaN, { printed: '84.67' });
      expectPrinted(resistiveLoad?.power ?? NaN, { printed: '127.9' });
    });

    it('example 4: 60 V behind 4 + j3 Ω gives 5 Ω 200 W', () => {
      expect(found(behind(60, 4, 3), ['c', '0'], 1).resistiveLoad?.power).toBeCloseTo(200, 11);
    });

    it('example 5: 20 V behind 5 Ω with 15 Ω across gives 3.75 Ω 15 W', () => {
      const list = network(voltageSource('E', 'a', '0', 20), resistor('R1', 'a', 'b', 5), resistor('R2', 'b', '0', 15));
      const { openCircuitVoltage, impedance, conjugateLoad, resistiveLoad } = found(list, ['b', '0'], 50);
      expect([openCircuitVoltage?.re, impedance?.re]).toEqual([expect.closeTo(15, 13), expect.closeTo(3.75, 13)]);
      expect([conjugateLoad?.power, resistiveLoad?.power]).toEqual([expect.closeTo(15, 12), expect.closeTo(15, 12)]);
    });

    it('example 6: 100 V at 30° behind 5 Ω with 5 + j10 Ω across gives 3.75 − j1.25 Ω 416.67 W', () => {
      const list = network(
        voltageSource('E', 'a', '0', 100, 30),
        resistor('R1', 'a', 'b', 5),
        resistor('R2', 'b', 'c', 5),
        inductor('L', 'c', '0', 10 / (2 * Math.PI)),
      );
      const { openCircuitVoltage, conjugateLoad } = found(list, ['b', '0'], 1);
      expectPrinted(openCircuitVoltage?.abs() ?? NaN, { printed: '79.0569' });
      expectPrinted(conjugateLoad?.impedance.re ?? NaN, { printed: '3.75', within: 1e-12 });
      expectPrinted(conjugateLoad?.impedance.im ?? NaN, { printed: '-1.25', within: 1e-12 });
      expectPrinted(conjugateLoad?.power ?? NaN, { printed: '416.67' });
    });
  });

  it('has no short-circuit current of a pure voltage source, and no open-circuit voltage of a pure current source', () => {
    const stiff = found(network(voltageSource('E', 'a', '0', 5, 90)), ['a', '0'], 50);
    expect(stiff.openCircuitVoltage?.im).toBe(5);
    expect(stiff.impedance?.abs()).toBe(0);
    expect(stiff.shortCircuitCurrent).toBeUndefined();
    expect(stiff.conjugateLoad).toBeUndefined();
    const pure = found(network(currentSource('J', '0', 'a', 2)), ['a', '0'], 50);
    expect(pure.shortCircuitCurrent?.re).toBe(2);
    expect(pure.openCircuitVoltage).toBeUndefined();
    expect(pure.impedance).toBeUndefined();
    expect(pure.resistiveLoad).toBeUndefined();
  });

  it('works where only the load would close the circuit: two parts that nothing joins, a resonance', () => {
    const apart = found(network(voltageSource('E', 'a', '0', 1), resistor('R', 'a', 'b', 1), resistor('S', 'c', 'd', 1)), ['b', 'c'], 50);
    expect(apart.impedance).toBeUndefined();
    expect(apart.shortCircuitCurrent?.abs()).toBeLessThan(1e-15);
    const tank = network(currentSource('J', '0', 'a', 3), capacitor('C', 'a', '0', 1), inductor('L', 'a', '0', 1 / (2 * Math.PI) ** 2));
    const resonant = found(tank, ['a', '0'], 1);
    expect(resonant.shortCircuitCurrent?.re).toBeCloseTo(3, 13);
    expect(resonant.impedance).toBeUndefined();
  });

  it('does not promise a greatest power from a negative resistance', () => {
    const { impedance, conjugateLoad, resistiveLoad } = found(network(voltageSource('E', 'a', '0', 1), resistor('R', 'a', 'b', -50)), ['b', '0'], 1);
    expect(impedance?.re).toBeCloseTo(-50, 12);
    expect([conjugateLoad, resistiveLoad]).toEqual([undefined, undefined]);
  });

  it('says what is wrong', () => {
    const list = network(resistor('R', 'a', '0', 1));
    const message = (pair: readonly [string, string], frequency: number) => {
      const result = equivalent(list, pair, frequency);
      return result.ok ? undefined : result.message;
    };
    expect(message(['a', 'a'], 1)).toMatch(/two different nodes/);
    expect(message(['a', 'b'], 1)).toMatch(/no node b/);
    expect(message(['a', '0'], NaN)).toMatch(/finite/);
    const loop = equivalent(network(voltageSource('E', 'a', '0', 1), voltageSource('F', 'a', '0', 2), resistor('R', 'a', 'b', 1)), ['b', '0'], 1);
    expect(loop).toMatchObject({ ok: false, kind: 'voltageLoop' });
  });
});
