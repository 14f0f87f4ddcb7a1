import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import {
  crossing,
  current,
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
 * Starter networks of the library: interference filters, power entry and power. Figures computed with an independent
 * modified-nodal phasor solver [computed].
 */
const OMEGA = 2 * Math.PI * 50;

/** How much less voltage a load gets with the filter in between than without it, dB (CISPR 17). */
function insertionLoss(filter: readonly Element[], frequency: number, source: number, load: number): number {
  const parts = [voltageSource('V1', 's', '0', 1), resistor('Rs', 's', 'in', source), resistor('RL', 'out', '0', load)];
  const without = level(network(...parts, resistor('through', 'in', 'out', 0)), frequency, 'out', 1);
  return without - level(network(...parts, ...filter), frequency, 'out', 1);
}

describe('ST-28 filter with parallel R–C damping for a 40 W converter (Middlebrook 1976)', () => {
  const damped = [
    inductor('L1', '0', 'out', 22e-6),
    capacitor('C1', 'out', '0', 10e-6),
    resistor('Rd', 'out', 'x', 1.2),
    capacitor('Cd', 'x', '0', 47e-6),
  ];
  const sizeOf =
    (parts: readonly Element[]) =>
    (f: number): number =>
      magnitude(impedance(parts, f, 'out'));

  it('has its largest output impedance, 1.328 Ω, at 8.29 kHz', () => {
    const top = peak(sizeOf(damped), 2e3, 20e3);
    expectFigure(top / 1000, '8.29');
    expectFigure(sizeOf(damped)(top), '1.328');
    expectFigure(decibels(8.1 / sizeOf(damped)(top)), '15.7');
  });

  it('has 88 Ω at 10.73 kHz without damping, above the converter’s 8.1 Ω', () => {
    const bare = [
      resistor('Rl', '0', 'y', 20e-3),
      inductor('L1', 'y', 'out', 22e-6),
      capacitor('C1', 'out', 'z', 10e-6),
      resistor('Rc', 'z', '0', 5e-3),
    ];
    const top = peak(sizeOf(bare), 5e3, 20e3);
    expectFigure(top / 1000, '10.73');
    expectFigure(sizeOf(bare)(top), '88');
    expectFigure(decibels(8.1 / sizeOf(bare)(top)), '-20.7');
  });

  it('passes −45.82 dB of the converter’s current at 150 kHz', () => {
    const list = network(currentSource('I1', 'out', '0', 1), ...damped);
    expectFigure(decibels(magnitude(current(list, 150e3, 'L1'))), '-45.82');
  });
});

describe('ST-29 single-stage π mains filter', () => {
  const filter = [
    capacitor('C1', 'in', '0', 470e-9),
    inductor('L1', 'in', 'x', 1e-3),
    resistor('Rl', 'x', 'out', 0.15),
    capacitor('C2', 'out', '0', 470e-9),
  ];
  it('attenuates 150 kHz by 73.28 dB in 50/50 Ω and 52.39 dB in 0.1/100 Ω', () => {
    expectFigure(insertionLoss(filter, 150e3, 50, 50), '73.28');
    expectFigure(insertionLoss(filter, 150e3, 0.1, 100), '52.39');
  });
  it('amplifies by 6.86 dB at 6.94 kHz in 0.1/100 Ω, and never in 50/50 Ω', () => {
    const worst = peak((f) => -insertionLoss(filter, f, 0.1, 100), 5e3, 9e3);
    expectFigure(worst / 1000, '6.94');
    expectFigure(insertionLoss(filter, worst, 0.1, 100), '-6.86');
    // Between equal resistances a passive network cannot amplify.
    const least = Math.min(...logarithmic(100, 1e6, 401).map((f) => insertionLoss(filter, f, 50, 50)));
    expect(least).toBeGreaterThan(0);
  });
});

describe('ST-30 common-mode filter', () => {
  const noise = [voltageSource('V1', 's', '0', 1), capacitor('Cp', 's', 'a', 100e-12)];
  const lossAt = (f: number): number =>
    level(network(...noise, resistor('RL', 'a', '0', 25)), f, 'a', 1) -
    level(
      network(
        ...noise,
        capacitor('Cy', 'a', '0', 4.4e-9),
        inductor('Lcm', 'a', 'out', 4.7e-3),
        resistor('RL', 'out', '0', 25),
      ),
      f,
      'out',
      1,
    );
  it('attenuates 150 kHz by 25.00 dB, and resonates at 35.0 kHz', () => {
    expectFigure(lossAt(150e3), '25.00');
    const trap = [capacitor('Cy', 'a', '0', 4.4e-9), inductor('Lcm', 'a', '0', 4.7e-3), resistor('R9', 'a', '0', 1e9)];
    expectFigure(crossing((f) => impedance(trap, f, 'a').im, 20e3, 50e3) / 1000, '35.0');
  });
  it('lets 251.8 µA to earth through 2.2 nF + 20 % at 253 V, 60 Hz', () => {
    const list = network(voltageSource('V1', '1', '0', 253), capacitor('C1', '1', '0', 2.64e-9));
    expectFigure(magnitude(current(list, 60, 'C1')) * 1e6, '251.8');
  });
});

describe('ST-31 bleeder of an X capacitor', () => {
  it('takes 0.085 W at 264 V', () => {
    const list = network(
      voltageSource('V1', '1', '0', 264),
      capacitor('C1', '1', '0', 940e-9),
      resistor('R1', '1', '0', 820e3),
    );
    expectFigure(power(list, 50, 'R1').re, '0.085');
  });
});

describe('ST-32 snubber on an 18 MHz ringing node', () => {
  it('holds the node’s impedance to 65.8 Ω, at 13.9 MHz', () => {
    const node = [
      capacitor('Cp', 'n', '0', 150e-12),
      inductor('Lp', 'n', '0', 521e-9),
      resistor('Rd', 'n', 'x', 56),
      capacitor('Cd', 'x', '0', 470e-12),
    ];
    const size = (f: number): number => magnitude(impedance(node, f, 'n'));
    const top = peak(size, 5e6, 30e6);
    expectFigure(top / 1e6, '13.9');
    expectFigure(size(top), '65.8');
  });
});

describe('ST-45 supply inductance with a capacitor bank', () => {
  const reactance = OMEGA * 56.59e-6;
  const bus = [
    resistor('Rs', 'b', 'x', reactance / 8),
    inductor('Ls', 'x', '0', 56.59e-6),
    capacitor('Cq', 'b', '0', 1989.4e-6),
  ];
  const load = resistor('Rload', 'b', '0', 400 ** 2 / 200e3);
  const amplification = (parts: readonly Element[], f: number): number =>
    magnitude(current(network(currentSource('I1', '0', 'b', 1), ...parts), f, 'Ls'));

  it('resonates at 474.3 Hz, the 9.487th harmonic', () => {
    const tank = [
      inductor('Ls', 'b', '0', 56.59e-6),
      capacitor('Cq', 'b', '0', 1989.4e-6),
      resistor('R9', 'b', '0', 1e9),
    ];
    const resonance = crossing((f) => impedance(tank, f, 'b').im, 300, 700);
    expectFigure(resonance, '474.3');
    expectFigure(Math.round((resonance / 50) * 1000) / 1000, '9.487');
  });

  it('amplifies a harmonic’s current 75.9 times without the load, 4.46 times with it, 2.33 times at the 11th', () => {
    const resonance = 50 * Math.sqrt(9e6 / 100e3);
    expectFigure(amplification(bus, resonance), '75.9');
    expectFigure(amplification([...bus, load], resonance), '4.46');
    expectFigure(amplification([...bus, load], 550), '2.33');
  });
});

describe('ST-46 detuned step, p = 7 %, 25 kvar, 400 V', () => {
  const p = 0.07;
  const capacitive = 400 ** 2 / 25e3 / (1 - p);
  const c = 1 / (OMEGA * capacitive);
  const l = (p * capacitive) / OMEGA;
  const tuning = (farads: number): number =>
    crossing((f) => impedance([inductor('L1', '1', 'x', l), capacitor('C1', 'x', '0', farads)], f, '1').im, 100, 400);

  it('takes 36.08 A with 430.1 V on its capacitors, and is tuned to 188.98 Hz', () => {
    const list = network(
      voltageSource('V1', '1', '0', 400 / Math.sqrt(3)),
      inductor('L1', '1', 'x', l),
      capacitor('C1', 'x', '0', c),
    );
    expectFigure(magnitude(current(list, 50, 'C1')), '36.08');
    expectFigure(magnitude(voltage(list, 50, 'x')) * Math.sqrt(3), '430.1');
    expectFigure(power(list, 50, 'V1').im * 3, '25000');
    expectFigure(tuning(c), '188.98');
    expectFigure(tuning(0.8 * c), '211.3');
    expectFigure(l * 1e3, '1.53');
  });
});

describe('ST-49 T-equivalent of a 10 kVA, 400 V transformer', () => {
  const core = [resistor('Rfe', 'm', '0', 2667), inductor('Lm', 'm', '0', 2.0985)];
  const arms = [
    resistor('R1', 'p', 'a', 0.144),
    inductor('L1', 'a', 'm', 0.9167e-3),
    resistor('R2', 'm', 'b', 0.144),
    inductor('L2', 'b', 'out', 0.9167e-3),
  ];
  it('drops 1.877 % and is 97.634 % efficient at full load, unity power factor', () => {
    const full = network(voltageSource('V1', 'p', '0', 400), ...arms, ...core, resistor('RL', 'out', '0', 16));
    const loaded = magnitude(voltage(full, 50, 'out'));
    expectFigure((100 * (400 - loaded)) / 400, '1.877');
    expectFigure((100 * power(full, 50, 'RL').re) / -power(full, 50, 'V1').re, '97.634');
  });
});

describe('ST-50 nominal-π line, 12 km, 20 kV', () => {
  it('drops 4.267 % and turns by −1.016°', () => {
    const sent = 20e3 / Math.sqrt(3);
    const list = network(
      voltageSource('V1', 's', '0', sent),
      capacitor('C1', 's', '0', 61.12e-9),
      resistor('R1', 's', 'x', 3.84),
      inductor('L1', 'x', 'r', 13.751e-3),
      capacitor('C2', 'r', '0', 61.12e-9),
      resistor('RL', 'r', 'y', 108),
      inductor('LL', 'y', '0', 166.5e-3),
    );
    const received = voltage(list, 50, 'r');
    expectFigure((100 * (sent - magnitude(received))) / sent, '4.267');
    expectFigure(degrees(received), '-1.016');
    expect(list.elements).toHaveLength(7);
  });
});
