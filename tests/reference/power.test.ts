import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { capacitor, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import { current, expectFigure, magnitude, power, voltage } from './support/measure';

const FREQUENCY = 1000;
const OMEGA = 2 * Math.PI * FREQUENCY;

/** An impedance as resistor and reactance in series. */
function load(id: string, a: string, b: string, re: number, im: number, omega = OMEGA): Element[] {
  const middle = `${id} inside`;
  const reactance =
    im < 0 ? capacitor(`${id} X`, middle, b, -1 / (omega * im)) : inductor(`${id} X`, middle, b, im / omega);
  return [resistor(id, a, middle, re), reactance];
}

describe('the maximum power transfer theorem', () => {
  const source = (re: number, im: number, volts: number): Element[] => [
    voltageSource('V1', '1', '0', volts),
    ...load('Zs', '1', '2', re, im),
  ];
  const delivered = (re: number, im: number, of: Element[]): number =>
    power(network(...of, ...load('ZL', '2', '0', re, im)), FREQUENCY, 'ZL').re;

  it('gives |V|²/4R to the conjugate impedance, and less to every other', () => {
    const from = source(15, 20, 120);
    const most = delivered(15, -20, from);
    expect(Math.abs(most / 240 - 1)).toBeLessThanOrEqual(32 * Number.EPSILON);
    for (const dr of [-0.01, 0, 0.01]) {
      for (const dx of [-0.01, 0, 0.01])
        if (dr !== 0 || dx !== 0) expect(delivered(15 + dr, -20 + dx, from)).toBeLessThan(most);
    }
  });

  it('gives most to a resistance of |Zs|, among resistances', () => {
    const from = source(15, 20, 120);
    const most = delivered(25, 0, from);
    expect(Math.abs(most / 180 - 1)).toBeLessThanOrEqual(32 * Number.EPSILON);
    expect(delivered(25.01, 0, from)).toBeLessThan(most);
    expect(delivered(24.99, 0, from)).toBeLessThan(most);
  });

  // Bird, Electrical Circuit Theory and Technology, 2nd ed. 2003, ch. 35 [found: executed notebook].
  it.each([
    ['ex. 1', 120, 15, 20, 25, 0, '180.0'],
    ['ex. 2', 120, 15, 20, 15, -20, '240.0'],
    ['ex. 3', 200, 71.696, -45.048, 84.67, 0, '127.9'],
    ['ex. 4', 60, 4, 3, 5, 0, '200.0'],
    ['ex. 5', 15, 3.75, 0, 3.75, 0, '15.0'],
    ['ex. 6', 79.0569, 3.75, 1.25, 3.75, -1.25, '416.67'],
  ] as const)('Bird ch. 35 %s: %d V behind %d + j%d Ω into %d + j%d Ω', (_, volts, rs, xs, rl, xl, printed) => {
    expectFigure(delivered(rl, xl, source(rs, xs, volts)), printed);
  });
});

describe('power factor correction', () => {
  /** The multiplier kvar per kW, by solving a load of 1 kW with and without its capacitor. */
  function multiplier(before: number, after: number): number {
    const volts = 230;
    const watts = 1000;
    const reactive = watts * Math.tan(Math.acos(before));
    const wanted = watts * Math.tan(Math.acos(after));
    const omega = 2 * Math.PI * 50;
    const parts = [
      voltageSource('V1', '1', '0', volts),
      resistor('R1', '1', '0', volts ** 2 / watts),
      inductor('L1', '1', '0', volts ** 2 / (omega * reactive)),
      capacitor('C1', '1', '0', (reactive - wanted) / (omega * volts ** 2)),
    ];
    const list = network(...parts);
    const supplied = power(list, 50, 'V1');
    expect(Math.abs(-supplied.re / magnitude(supplied) - after)).toBeLessThanOrEqual(16 * Number.EPSILON);
    return -power(list, 50, 'C1').im / watts;
  }

  /** Eaton SA02607001E (Nov. 2010), table 6 [found]; a few printed entries are off by one in the third decimal. */
  const CORRECTED = [
    0.8, 0.81, 0.82, 0.83, 0.84, 0.85, 0.86, 0.87, 0.88, 0.89, 0.9, 0.91, 0.92, 0.93, 0.94, 0.95, 0.96, 0.97, 0.98,
    0.99, 1,
  ];
  it.each([
    [
      0.5,
      [
        0.982, 1.008, 1.034, 1.06, 1.086, 1.112, 1.139, 1.165, 1.192, 1.22, 1.248, 1.276, 1.306, 1.337, 1.369, 1.403,
        1.44, 1.481, 1.529, 1.589, 1.732,
      ],
    ],
    [
      0.55,
      [
        0.769, 0.795, 0.821, 0.847, 0.873, 0.899, 0.926, 0.952, 0.979, 1.007, 1.035, 1.063, 1.093, 1.124, 1.156, 1.19,
        1.227, 1.268, 1.316, 1.376, 1.519,
      ],
    ],
    [
      0.6,
      [
        0.583, 0.609, 0.635, 0.661, 0.687, 0.713, 0.74, 0.766, 0.793, 0.821, 0.849, 0.877, 0.907, 0.938, 0.97, 1.004,
        1.041, 1.082, 1.13, 1.19, 1.333,
      ],
    ],
  ] as const)('from a power factor of %d, the table’s row', (before, printed) => {
    CORRECTED.forEach((after, k) =>
      expect(Math.abs(multiplier(before, after) - (printed[k] ?? 0))).toBeLessThanOrEqual(0.0009),
    );
  });

  it('Bird ch. 26 ex. 6: 210 kW from 0.7 to 0.9 takes 112.54 kvar', () => {
    expect(Math.abs(210 * multiplier(0.7, 0.9) - 112.54)).toBeLessThanOrEqual(0.006);
    expectFigure(210 * multiplier(0.7, 0.9), '112.535');
  });

  it('Kuphaldt II ch. 11: 1.5 kW at 240 V, 9.615 A, and 80 µF', () => {
    const omega = 2 * Math.PI * 60;
    const q = Math.sqrt((240 * 9.615) ** 2 - 1500 ** 2);
    expect(Math.abs(q - 1754)).toBeLessThanOrEqual(0.5);
    const motor = [
      voltageSource('V1', '1', '0', 240),
      resistor('R1', '1', '0', 240 ** 2 / 1500),
      inductor('L1', '1', '0', 240 ** 2 / (omega * q)),
    ];
    expectFigure(power(network(...motor), 60, 'L1').im, '1753.57');
    expectFigure(magnitude(current(network(...motor), 60, 'V1')), '9.615');
    const corrected = network(...motor, capacitor('C1', '1', '0', 80e-6));
    expectFigure(-power(corrected, 60, 'C1').im, '1737');
    expectFigure(magnitude(power(corrected, 60, 'V1')), '1500.09');
  });

  it('Bird ch. 26 ex. 7 and Hambley ex. 5.9: the capacitor', () => {
    const capacitance = (volts: number, frequency: number, watts: number, reactive: number, after: number): number =>
      (reactive - watts * Math.tan(Math.acos(after))) / (2 * Math.PI * frequency * volts ** 2);
    const check = (volts: number, frequency: number, watts: number, reactive: number, after: number): number => {
      const c = capacitance(volts, frequency, watts, reactive, after);
      const omega = 2 * Math.PI * frequency;
      const list = network(
        voltageSource('V1', '1', '0', volts),
        resistor('R1', '1', '0', volts ** 2 / watts),
        inductor('L1', '1', '0', volts ** 2 / (omega * reactive)),
        capacitor('C1', '1', '0', c),
      );
      const supplied = power(list, frequency, 'V1');
      expect(Math.abs(-supplied.re / magnitude(supplied) - after)).toBeLessThanOrEqual(16 * Number.EPSILON);
      return c;
    };
    expectFigure(check(50, 1500, 300, 400, 0.966), '1.3569e-5');
    expectFigure(check(1e4, 60, 5e4, 5e4 * Math.tan(Math.acos(0.6)), 0.9), '1.126e-6');
  });
});

describe('three phases', () => {
  const star = (volts: number): Element[] =>
    [0, -120, 120].map((phase, k) => voltageSource(`V${k}`, `p${k}`, '0', volts, phase));
  const omega = 2 * Math.PI * 50;

  // Bird, 2nd ed. 2003, ch. 19 [found: executed notebook].
  it('Bird ch. 19 ex. 1: 415 V, a star of 30 Ω takes 7.99 A', () => {
    const list = network(...star(415 / Math.sqrt(3)), ...[0, 1, 2].map((k) => resistor(`R${k}`, `p${k}`, 'n', 30)));
    expectFigure(magnitude(current(list, 50, 'R0')), '7.987');
    expectFigure(magnitude(voltage(list, 50, 'p1')), '239.6');
    expect(magnitude(voltage(list, 50, 'n'))).toBeLessThanOrEqual(240 * 4 * Number.EPSILON);
  });

  it('Bird ch. 19 ex. 4: 24, 18 and 12 kW at 240 V leave 43.3 A in the neutral', () => {
    const loads = [24e3, 18e3, 12e3].map((watts, k) => resistor(`R${k}`, `p${k}`, 'n', 240 ** 2 / watts));
    const list = network(...star(240), ...loads, resistor('N', 'n', '0', 0));
    expectFigure(magnitude(current(list, 50, 'N')), '43.301');
    expectFigure(magnitude(current(list, 50, 'R0')), '100');
  });

  it('Bird ch. 19 ex. 5: 440 V, a delta of 30 Ω and 0.1273 H takes 8.8 A a phase, 15.24 A a line', () => {
    const delta = [0, 1, 2].flatMap((k) => load(`Z${k}`, `p${k}`, `p${(k + 1) % 3}`, 30, omega * 0.1273, omega));
    const list = network(...star(440 / Math.sqrt(3)), ...delta);
    expectFigure(magnitude(current(list, 50, 'Z0')), '8.801');
    expectFigure(magnitude(current(list, 50, 'V0')), '15.244');
  });

  it('Bird ch. 19 ex. 7: 3 + j4 Ω a phase on 415 V takes 47.92 A in star, 143.76 A in delta', () => {
    const inStar = [0, 1, 2].flatMap((k) => load(`Z${k}`, `p${k}`, 'n', 3, 4, omega));
    const inDelta = [0, 1, 2].flatMap((k) => load(`Z${k}`, `p${k}`, `p${(k + 1) % 3}`, 3, 4, omega));
    const lines = star(415 / Math.sqrt(3));
    expectFigure(magnitude(current(network(...lines, ...inStar), 50, 'V0')), '47.92');
    expectFigure(magnitude(current(network(...lines, ...inDelta), 50, 'Z0')), '83.0');
    expectFigure(magnitude(current(network(...lines, ...inDelta), 50, 'V0')), '143.76');
  });

  it('Bird ch. 19 ex. 10: 10 Ω and 0.042 H on 415 V take 6283.29 W in star, 18849.88 W in delta', () => {
    const total = (elements: Element[]): number =>
      [0, 1, 2].reduce((sum, k) => sum + power(network(...elements), 50, `Z${k}`).re, 0);
    const lines = star(415 / Math.sqrt(3));
    const inStar = [0, 1, 2].flatMap((k) => load(`Z${k}`, `p${k}`, 'n', 10, omega * 0.042, omega));
    const inDelta = [0, 1, 2].flatMap((k) => load(`Z${k}`, `p${k}`, `p${(k + 1) % 3}`, 10, omega * 0.042, omega));
    expectFigure(total([...lines, ...inStar]), '6283.295');
    expectFigure(total([...lines, ...inDelta]), '18849.885');
  });
});
