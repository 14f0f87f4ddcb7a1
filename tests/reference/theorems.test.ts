import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { capacitor, currentSource, inductor, resistor, voltageSource } from '../solver/support/networks';
import { fixedImpedance } from './support/parts';
import { bySolver, degrees, magnitude } from './support/measure';

/** Closed forms of resonance and of power transfer [memory, textbook], to rounding. */

const [R, L, C] = [10, 1e-3, 1e-8];
/** f0 = 1/(2π√(LC)). */
const F0 = 1 / (2 * Math.PI * Math.sqrt(L * C));

/** (±B + √(B² + 4·f0²))/2. */
function halfPowerAt(sign: 1 | -1, bandwidth: number): number {
  return (sign * bandwidth + Math.sqrt(bandwidth ** 2 + 4 * F0 ** 2)) / 2;
}

describe('a series resonance', () => {
  const elements = [
    voltageSource('V1', '1', '0', 1),
    resistor('R1', '1', '2', R),
    inductor('L1', '2', '3', L),
    capacitor('C1', '3', '0', C),
  ];
  const bandwidth = R / (2 * Math.PI * L);
  const quality = F0 / bandwidth;

  it('has the whole voltage across the resistance at f0, and Q times it across the capacitor', () => {
    const solution = bySolver(elements, F0);
    expect(Math.abs(magnitude(solution.current('R1')) * R - 1)).toBeLessThanOrEqual(8 * Number.EPSILON);
    expect(Math.abs(magnitude(solution.voltage('3')) / quality - 1)).toBeLessThanOrEqual(8 * Number.EPSILON);
    // The phase turns by 2Q radians for a relative change of frequency.
    expect(Math.abs(degrees(solution.current('R1')))).toBeLessThanOrEqual(8 * Number.EPSILON * quality * 57.3);
  });

  it('has half the power at the exact half-power frequencies, at 45° either way', () => {
    for (const sign of [1, -1] as const) {
      const i = bySolver(elements, halfPowerAt(sign, bandwidth)).current('R1');
      expect(Math.abs(magnitude(i) * R * Math.SQRT2 - 1)).toBeLessThanOrEqual(16 * quality * Number.EPSILON);
      expect(Math.abs(degrees(i) + sign * 45)).toBeLessThanOrEqual(16 * quality * Number.EPSILON * 57.3);
    }
  });

  it('has its largest capacitor voltage at f0·√(1 − 1/(2Q²)): Q·V/√(1 − 1/(4Q²))', () => {
    const at = F0 * Math.sqrt(1 - 1 / (2 * quality ** 2));
    const top = magnitude(bySolver(elements, at).voltage('3'));
    expect(Math.abs(top / (quality / Math.sqrt(1 - 1 / (4 * quality ** 2))) - 1)).toBeLessThanOrEqual(8 * quality * Number.EPSILON);
    for (const beside of [1 - 1e-4, 1 + 1e-4]) {
      expect(magnitude(bySolver(elements, at * beside).voltage('3'))).toBeLessThan(top);
    }
  });
});

describe('a parallel resonance', () => {
  const parallel = 1e4;
  const elements = [
    currentSource('I1', '0', '1', 1),
    resistor('R1', '1', '0', parallel),
    inductor('L1', '1', '0', L),
    capacitor('C1', '1', '0', C),
  ];
  const bandwidth = 1 / (2 * Math.PI * parallel * C);
  const quality = F0 / bandwidth;

  it('has the resistance alone at f0, and Q times the current in the inductor', () => {
    const solution = bySolver(elements, F0);
    expect(Math.abs(magnitude(solution.voltage('1')) / parallel - 1)).toBeLessThanOrEqual(8 * Number.EPSILON);
    expect(Math.abs(magnitude(solution.current('L1')) / quality - 1)).toBeLessThanOrEqual(8 * Number.EPSILON);
  });

  it('has half the power at the exact half-power frequencies', () => {
    for (const sign of [1, -1] as const) {
      const v = bySolver(elements, halfPowerAt(sign, bandwidth)).voltage('1');
      expect(Math.abs((magnitude(v) / parallel) * Math.SQRT2 - 1)).toBeLessThanOrEqual(16 * quality * Number.EPSILON);
    }
  });
});

describe('the greatest power', () => {
  const FREQUENCY = 1000;
  const source: readonly Element[] = [
    voltageSource('V1', '1', '0', 120),
    fixedImpedance('Zs', '1', '2', 15, 20, FREQUENCY),
  ];
  const delivered = (re: number, im: number): number =>
    bySolver([...source, fixedImpedance('ZL', '2', '0', re, im, FREQUENCY)], FREQUENCY).power('ZL').re;

  it('is |V|²/4R, into the conjugate impedance, and less into every other', () => {
    const most = delivered(15, -20);
    expect(Math.abs(most / 240 - 1)).toBeLessThanOrEqual(32 * Number.EPSILON);
    for (const dr of [-0.01, 0, 0.01]) {
      for (const dx of [-0.01, 0, 0.01]) {
        if (dr !== 0 || dx !== 0) expect(delivered(15 + dr, -20 + dx)).toBeLessThan(most);
      }
    }
  });

  it('goes, among resistances, into one of |Zs|', () => {
    const most = delivered(25, 0);
    expect(Math.abs(most / 180 - 1)).toBeLessThanOrEqual(32 * Number.EPSILON);
    expect(delivered(25.01, 0)).toBeLessThan(most);
    expect(delivered(24.99, 0)).toBeLessThan(most);
  });
});
