import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { capacitor, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import {
  crossing,
  decibels,
  degrees,
  expectFigure,
  impedance,
  level,
  logarithmic,
  magnitude,
  peak,
  power,
  voltage,
} from './support/measure';

/**
 * Starter networks of the library, loudspeaker crossovers and equivalents. Figures computed with an independent
 * modified-nodal phasor solver [computed].
 */

/** The smallest and the largest size of an impedance over a band. */
function extremes(elements: readonly Element[], node: string, low: number, high: number): [number, number] {
  const sizes = logarithmic(low, high, 2001).map((f) => magnitude(impedance(elements, f, node)));
  return [Math.min(...sizes), Math.max(...sizes)];
}

describe('ST-20 two-way second-order crossover, 6 Ω, 2.2 kHz (Linkwitz 1976)', () => {
  const low = [inductor('L1', 's', 'lp', 0.86e-3), capacitor('C1', 'lp', '0', 6e-6), resistor('R1', 'lp', '0', 6)];
  const high = [capacitor('C2', 's', 'hp', 6e-6), inductor('L2', 'hp', '0', 0.86e-3), resistor('R2', 'hp', '0', 6)];
  const list = network(voltageSource('V1', 's', '0', 1), ...low, ...high);

  it('has both ways some 6 dB down and a half turn apart at the crossing', () => {
    const lp = voltage(list, 2200, 'lp');
    const hp = voltage(list, 2200, 'hp');
    expectFigure(decibels(magnitude(lp)), '-5.94');
    expectFigure(degrees(lp), '-89.6');
    expectFigure(decibels(magnitude(hp)), '-6.06');
    expectFigure(degrees(hp), '90.4');
    expectFigure(decibels(magnitude({ re: lp.re - hp.re, im: lp.im - hp.im })), '0.020');
    expectFigure(decibels(magnitude({ re: lp.re + hp.re, im: lp.im + hp.im })), '-42.99');
  });

  it('loads the amplifier with 6.0 to 11.9 Ω, and with 0.30 Ω when a way is left open', () => {
    const [smallest, largest] = extremes([...low, ...high], 's', 20, 20e3);
    expectFigure(smallest, '6.0');
    expectFigure(largest, '11.9');
    const open = [resistor('DCR', 's', 'x', 0.3), inductor('L1', 'x', 'lp', 0.86e-3), capacitor('C1', 'lp', '0', 6e-6)];
    const worst = crossing((f) => impedance(open, f, 's').im, 1000, 4000);
    expectFigure(worst, '2216');
    expectFigure(magnitude(impedance(open, worst, 's')), '0.30');
  });
});

describe('ST-21 two-way third-order Butterworth crossover, 8 Ω, 1.6 kHz', () => {
  it('has both ways some 3 dB down and sums to −0.079 dB', () => {
    const list = network(
      voltageSource('V1', 's', '0', 1),
      inductor('L1', 's', 'a', 1.2e-3),
      capacitor('C1', 'a', '0', 16.5e-6),
      inductor('L2', 'a', 'lp', 0.4e-3),
      resistor('R1', 'lp', '0', 8),
      capacitor('C2', 's', 'b', 8.2e-6),
      inductor('L3', 'b', '0', 0.6e-3),
      capacitor('C3', 'b', 'hp', 25e-6),
      resistor('R2', 'hp', '0', 8),
    );
    const lp = voltage(list, 1600, 'lp');
    const hp = voltage(list, 1600, 'hp');
    expectFigure(decibels(magnitude(lp)), '-3.04');
    expectFigure(decibels(magnitude(hp)), '-3.12');
    expectFigure(decibels(magnitude({ re: lp.re + hp.re, im: lp.im + hp.im })), '-0.079');
  });
});

describe('ST-22 voice-coil impedance compensation', () => {
  const coil = [resistor('Re', 's', 'x', 5.6), inductor('Le', 'x', '0', 0.62e-3)];
  it('holds 5.568 to 5.60 Ω from 100 Hz to 20 kHz, where the coil alone has 78.1 Ω', () => {
    expectFigure(magnitude(impedance(coil, 20e3, 's')), '78.1');
    const [smallest, largest] = extremes(
      [...coil, resistor('R1', 's', 'y', 5.6), capacitor('C1', 'y', '0', 20e-6)],
      's',
      100,
      20e3,
    );
    expectFigure(smallest, '5.568');
    expectFigure(largest, '5.60');
  });
});

describe('ST-23 moving-coil driver (Small 1972)', () => {
  it('peaks at 59.93 Ω at 47.98 Hz and dips to 5.849 Ω at 397 Hz', () => {
    const driver = [
      resistor('Re', 's', 'x', 5.8),
      inductor('Le', 'x', 'm', 0.7e-3),
      resistor('Res', 'm', '0', 54.13),
      inductor('Lces', 'm', '0', 42.74e-3),
      capacitor('Cmes', 'm', '0', 257.3e-6),
    ];
    const size = (f: number): number => magnitude(impedance(driver, f, 's'));
    const top = peak(size, 40, 60);
    expectFigure(top, '47.98');
    expectFigure(size(top), '59.93');
    const bottom = peak((f) => -size(f), 200, 800);
    expectFigure(bottom, '397');
    expectFigure(size(bottom), '5.849');
  });
});

describe('ST-24 resonance compensation of a tweeter', () => {
  const [re, fs, qms, qes] = [3.4, 900, 2.1, 1.3];
  const omega = 2 * Math.PI * fs;
  const tweeter = [
    resistor('Re', 's', 'm', re),
    resistor('Res', 'm', '0', (re * qms) / qes),
    capacitor('Cmes', 'm', '0', qes / (omega * re)),
    inductor('Lces', 'm', '0', re / (omega * qes)),
  ];
  const compensated = (r: number, l: number, c: number): Element[] => [
    ...tweeter,
    resistor('R1', 's', 'x', r),
    inductor('L1', 'x', 'y', l),
    capacitor('C1', 'y', '0', c),
  ];
  it('has 8.89 Ω at 900 Hz alone, 3.4 Ω at all frequencies with the ideal arm, and little more with standard values', () => {
    expectFigure(magnitude(impedance(tweeter, fs, 's')), '8.89');
    const ideal = compensated(re * (1 + qes / qms), (qes / (omega * re)) * re ** 2, re / (omega * qes) / re ** 2);
    const [least, most] = extremes(ideal, 's', 100, 10e3);
    expect(Math.abs(least / re - 1)).toBeLessThanOrEqual(64 * Number.EPSILON);
    expect(Math.abs(most / re - 1)).toBeLessThanOrEqual(64 * Number.EPSILON);
    const [smallest, largest] = extremes(compensated(5.6, 0.82e-3, 39e-6), 's', 100, 10e3);
    expectFigure(largest, '3.47');
    expect(smallest).toBeGreaterThan(3.3995);
  });
});

describe('ST-25 L-pad of −4.5 dB, 6 Ω', () => {
  it('loses 4.422 dB, shows 6.016 Ω, and shares 20 W as 7.98 + 4.78 + 7.24 W', () => {
    const pad = [resistor('R1', 's', 'out', 2.4), resistor('R2', 'out', '0', 9.1), resistor('RL', 'out', '0', 6)];
    const input = magnitude(impedance(pad, 1000, 's'));
    expectFigure(input, '6.016');
    const list = network(voltageSource('V1', 's', '0', Math.sqrt(20 * input)), ...pad);
    expectFigure(level(list, 1000, 'out', Math.sqrt(20 * input)), '-4.422');
    expectFigure(power(list, 1000, 'R1').re, '7.98');
    expectFigure(power(list, 1000, 'R2').re, '4.78');
    expectFigure(power(list, 1000, 'RL').re, '7.24');
  });
});

describe('ST-26 baffle-step shelf, 6 Ω', () => {
  it('loses 4.082 dB above and half of that at 377.5 Hz', () => {
    const list = network(
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'out', 3.6),
      inductor('L1', 's', 'out', 1.2e-3),
      resistor('RL', 'out', '0', 6),
    );
    expectFigure(level(list, 1e7, 'out', 1), '-4.082');
    expectFigure(level(list, 377.5, 'out', 1), '-2.041');
    expectFigure(
      crossing((f) => level(list, f, 'out', 1) + (20 * Math.log10(1.6)) / 2, 100, 1000),
      '377.5',
    );
  });
});
