import { describe, expect, it } from 'vitest';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import { crossing, current, degrees, expectFigure, impedance, magnitude, peak, voltage } from './support/measure';

/**
 * f0 = 1/(2π√(LC)), Q = ω0·L/R, bandwidth f0/Q, half-power frequencies (±B + √(B² + 4·f0²))/2 [memory, textbook].
 */
const R = 10;
const L = 1e-3;
const C = 1e-8;
const f0 = 1 / (2 * Math.PI * Math.sqrt(L * C));
const bandwidth = R / (2 * Math.PI * L);
const half = (sign: 1 | -1): number => (sign * bandwidth + Math.sqrt(bandwidth ** 2 + 4 * f0 ** 2)) / 2;
const Q = f0 / bandwidth;

describe('a series resonance', () => {
  const list = network(
    voltageSource('V1', '1', '0', 1),
    resistor('R1', '1', '2', R),
    inductor('L1', '2', '3', L),
    capacitor('C1', '3', '0', C),
  );

  it('has the whole voltage across the resistance at f0, and Q times it across the capacitor', () => {
    expect(Math.abs(magnitude(current(list, f0, 'R1')) * R - 1)).toBeLessThanOrEqual(8 * Number.EPSILON);
    expect(Math.abs(magnitude(voltage(list, f0, '3')) / Q - 1)).toBeLessThanOrEqual(8 * Number.EPSILON);
    // The phase turns by 2Q radians for a relative change of frequency.
    expect(Math.abs(degrees(current(list, f0, 'R1')))).toBeLessThanOrEqual(8 * Number.EPSILON * Q * 57.3);
  });

  it('has half the power at the exact half-power frequencies, at 45° either way', () => {
    for (const sign of [1, -1] as const) {
      const i = current(list, half(sign), 'R1');
      expect(Math.abs(magnitude(i) * R * Math.SQRT2 - 1)).toBeLessThanOrEqual(16 * Q * Number.EPSILON);
      expect(Math.abs(degrees(i) + sign * 45)).toBeLessThanOrEqual(16 * Q * Number.EPSILON * 57.3);
    }
    expect(Math.abs((half(1) - half(-1)) / bandwidth - 1)).toBeLessThanOrEqual(4 * Q * Number.EPSILON);
  });
});

describe('a parallel resonance', () => {
  const Rp = 1e4;
  const list = network(
    currentSource('I1', '0', '1', 1),
    resistor('R1', '1', '0', Rp),
    inductor('L1', '1', '0', L),
    capacitor('C1', '1', '0', C),
  );
  const width = 1 / (2 * Math.PI * Rp * C);

  it('has the resistance alone at f0, and Q times the current in the inductor', () => {
    const quality = f0 / width;
    expect(Math.abs(magnitude(voltage(list, f0, '1')) / Rp - 1)).toBeLessThanOrEqual(8 * Number.EPSILON);
    expect(Math.abs(magnitude(current(list, f0, 'L1')) / quality - 1)).toBeLessThanOrEqual(8 * Number.EPSILON);
  });

  it('has half the power at the exact half-power frequencies', () => {
    for (const sign of [1, -1]) {
      const frequency = (sign * width + Math.sqrt(width ** 2 + 4 * f0 ** 2)) / 2;
      expect(Math.abs((magnitude(voltage(list, frequency, '1')) / Rp) * Math.SQRT2 - 1)).toBeLessThanOrEqual(
        (16 * f0 * Number.EPSILON) / width,
      );
    }
  });
});

/** Bird, *Electrical Circuit Theory and Technology*, 2nd ed. 2003, ch. 28 and 29 [found: executed notebook]. */
describe('printed resonances', () => {
  const series = (r: number, l: number, c: number, volts = 1) =>
    network(
      voltageSource('V1', '1', '0', volts),
      resistor('R1', '1', '2', r),
      inductor('L1', '2', '3', l),
      capacitor('C1', '3', '0', c),
    );
  const maximum = (list: ReturnType<typeof series>, low: number, high: number): number =>
    crossing((f) => -degrees(current(list, f, 'R1')), low, high);

  it('ch. 28 ex. 1: 91.89 Hz, 20 A at 200 V', () => {
    const list = series(10, 0.075, 4e-5, 200);
    const frequency = maximum(list, 50, 150);
    expectFigure(frequency, '91.89');
    expectFigure(frequency, '91.888');
    expectFigure(magnitude(current(list, frequency, 'R1')), '20.0');
  });

  it('ch. 28 ex. 5: the capacitor’s voltage is largest below resonance', () => {
    const list = series(80, 0.02, 4e-7, 12);
    const across = (f: number): number => magnitude(voltage(list, f, '3'));
    const resonance = maximum(list, 1000, 3000);
    expectFigure(resonance, '1779.41');
    expectFigure(across(resonance), '33.54');
    const top = peak(across, 1500, 1900);
    // 34.67 V in the notebook is wrong; 34.09 V is Q·V/√(1 − 1/(4Q²)).
    expectFigure(across(top), '34.091');
    expect(Math.abs(top - 1721.52)).toBeLessThanOrEqual(0.02);
  });

  it('ch. 28 ex. 8: f0 1200 Hz, Q 30, 50 Ω: half-power at 1180.17 and 1220.17 Hz', () => {
    const l = (30 * 50) / (2 * Math.PI * 1200);
    const c = 1 / (2 * Math.PI * 1200 * 30 * 50);
    expectFigure(l, '0.198944');
    expectFigure(c, '8.8419e-8');
    const list = series(50, l, c);
    const off = (f: number): number => magnitude(current(list, f, 'R1')) * 50 - Math.SQRT1_2;
    expectFigure(crossing(off, 1100, 1200), '1180.17');
    expectFigure(crossing(off, 1200, 1300), '1220.17');
  });

  it('ch. 28 ex. 10: 60 Hz, bandwidth 4 Hz', () => {
    const list = series(8.84, 0.3518, 2e-5);
    const frequency = maximum(list, 40, 80);
    expectFigure(frequency, '60.0');
    expectFigure(frequency, '60.001');
    const off = (f: number): number => magnitude(current(list, f, 'R1')) * 8.84 - Math.SQRT1_2;
    expectFigure(crossing(off, 60, 70) - crossing(off, 50, 60), '4.0');
  });

  it.each([
    ['ch. 29 ex. 1', 10, 0.005, 2.5e-7, 0, '4490.31'],
    ['ch. 29 ex. 2, 0 Ω', 0, 0.1, 4e-5, 0, '79.58'],
    ['ch. 29 ex. 2, 30 Ω', 30, 0.1, 4e-5, 0, '63.66'],
    ['ch. 29 ex. 4, 3 Ω beside the capacitor', 5, 0.002, 2.5e-5, 3, '626.45'],
  ] as const)('%s: a coil of %d Ω, %d H beside %d F', (_, rl, l, c, rc, printed) => {
    const tank = [
      resistor('RL', '1', '2', rl),
      inductor('L1', '2', '0', l),
      resistor('RC', '1', '3', rc),
      capacitor('C1', '3', '0', c),
      resistor('R9', '1', '0', 1e9),
    ];
    const reactance = (f: number): number => impedance(tank, f, '1').im;
    const frequency = crossing(reactance, Number(printed) * 0.9, Number(printed) * 1.1);
    expectFigure(frequency, printed);
    if (printed === '4490.31')
      expect(Math.abs(magnitude(impedance(tank, frequency, '1')) / 2000 - 1)).toBeLessThanOrEqual(1e-5);
  });

  // Kuphaldt, Lessons In Electric Circuits II, ch. 6; the exact maxima are computed, the book's are grid points.
  it.each([
    ['in series with the coil', 100, 0, 136.173],
    ['in series with the capacitor', 0, 100, 186.016],
  ] as const)('a damped tank, 100 Ω %s, has its largest impedance, 146.789 Ω, there', (_, rl, rc, printed) => {
    const tank = [
      resistor('RL', '1', '2', rl),
      inductor('L1', '2', '0', 0.1),
      resistor('RC', '1', '3', rc),
      capacitor('C1', '3', '0', 1e-5),
    ];
    const size = (f: number): number => magnitude(impedance(tank, f, '1'));
    const top = peak(size, 100, 250);
    expect(Math.abs(top - printed)).toBeLessThanOrEqual(0.002);
    expectFigure(size(top), '146.789');
  });
});
