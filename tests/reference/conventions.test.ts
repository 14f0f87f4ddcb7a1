import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { capacitor, currentSource, inductor, resistor, voltageSource } from '../solver/support/networks';
import { expectPrinted } from './support/expect-figure';
import { bySolver, degrees, magnitude } from './support/measure';

/** To two units of rounding. */
function expectEqual(value: number, expected: number): void {
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(2 * Number.EPSILON * Math.abs(expected));
}

/** The conventions of signs and sizes, each by a case that comes out otherwise if it is broken [computed by hand]. */
const FREQUENCY = 50;
const OMEGA = 2 * Math.PI * FREQUENCY;

function on(...elements: readonly Element[]) {
  return bySolver(elements, FREQUENCY);
}

describe('conventions', () => {
  it('has phasors rms: 10 V peak across 50 Ω are 1.000 W', () => {
    const power = on(voltageSource('V1', '1', '0', 10 / Math.SQRT2), resistor('R1', '1', '0', 50)).power('R1');
    expect(Math.abs(power.re - 1)).toBeLessThanOrEqual(4 * Number.EPSILON);
    expect(power.im).toBe(0);
  });

  it('has phases on the cosine: 10 cos(ωt − 30°) is 7.0711 V at −30°', () => {
    const v = on(voltageSource('V1', '1', '0', 10 / Math.SQRT2, -30), resistor('R1', '1', '0', 50)).voltage('1');
    expectPrinted(magnitude(v), { printed: '7.0711' });
    expect(Math.abs(degrees(v) + 30)).toBeLessThanOrEqual(30 * 4 * Number.EPSILON);
  });

  it('has a capacitor deliver reactive power, an inductor absorb it: S = V·I*', () => {
    const solution = on(
      voltageSource('V1', '1', '0', 100),
      capacitor('C1', '1', '0', 1 / (OMEGA * 50)),
      inductor('L1', '1', '0', 100 / OMEGA),
    );
    expect(Math.abs(solution.power('C1').im / -200 - 1)).toBeLessThanOrEqual(4 * Number.EPSILON);
    expect(Math.abs(solution.power('L1').im / 100 - 1)).toBeLessThanOrEqual(4 * Number.EPSILON);
  });

  it('has the time go as e^(+jωt): the current of an inductor lags, of a capacitor leads', () => {
    const solution = on(
      voltageSource('V1', '1', '0', 1),
      capacitor('C1', '1', '0', 1e-6),
      inductor('L1', '1', '0', 1),
    );
    expect(degrees(solution.current('C1'))).toBe(90);
    expect(degrees(solution.current('L1'))).toBe(-90);
  });

  it('has a current enter at the first node, of a source too, so that a source that delivers absorbs less than nothing', () => {
    const solution = on(voltageSource('V1', '1', '0', 10), resistor('R1', '1', '0', 5));
    expectEqual(solution.current('R1').re, 2);
    expectEqual(solution.current('V1').re, -2);
    expectEqual(solution.power('V1').re, -20);
    const driven = on(currentSource('I1', '0', '1', 2), resistor('R1', '1', '0', 5));
    expectEqual(driven.current('I1').re, 2);
    expectEqual(driven.voltage('1').re, 10);
    expectEqual(driven.power('I1').re, -20);
  });

  it('has the sensed current enter at the first node of the sensed element', () => {
    const solution = on(
      voltageSource('V1', '1', '0', 10),
      resistor('R1', '1', '0', 5),
      { id: 'X1', kind: 'currentControlledVoltageSource', nodes: ['2', '0'], sensedElement: 'R1', transresistance: 3 },
      { id: 'X2', kind: 'currentControlledCurrentSource', nodes: ['0', '3'], sensedElement: 'V1', gain: 2 },
      resistor('R2', '2', '0', 1),
      resistor('R3', '3', '0', 1),
    );
    expectEqual(solution.voltage('2').re, 6);
    expectEqual(solution.voltage('3').re, -4);
  });

  it('has dots: coils coupled positively have voltages of one sign at their dots, an ideal transformer v₁ = n·v₂', () => {
    const solution = on(
      voltageSource('V1', '1', '0', 10),
      { id: 'TR1', kind: 'coupledInductors', nodes: ['1', '0', '2', '0'], inductances: [1, 4], coupling: 0.5 },
      resistor('R2', '2', '0', 1e15),
      { id: 'T1', kind: 'idealTransformer', nodes: ['1', '0', '3', '0'], ratio: 4 },
      resistor('R3', '3', '0', 5),
    );
    // M/L1 = 0.5·√(1·4)/1.
    expect(Math.abs(solution.voltage('2').re / 10 - 1)).toBeLessThanOrEqual(1e-12);
    expectEqual(solution.voltage('3').re, 2.5);
  });
});
