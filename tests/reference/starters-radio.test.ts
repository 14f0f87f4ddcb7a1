import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { solve } from '@/solver';
import { solved } from '../solver/support/expect';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import {
  crossing,
  current,
  decibels,
  degrees,
  expectFigure,
  impedance,
  level,
  magnitude,
  peak,
  power,
  reflection,
  voltage,
} from './support/measure';

/**
 * Starter networks of the library, matching and attenuation up to VHF. Figures computed with an independent
 * modified-nodal phasor solver [computed].
 */
const HALF_POWER = -10 * Math.log10(2);

function returnLoss(elements: readonly Element[], frequency: number, node: string, reference: number): number {
  return -decibels(magnitude(reflection(impedance(elements, frequency, node), reference)));
}

/** The level of the power in a load against what the source could give, dB. */
function transducerGain(elements: readonly Element[], frequency: number, source: number, load: string): number {
  const list = network(voltageSource('V1', 's', '0', 2), resistor('Rs', 's', 'in', source), ...elements);
  return 10 * Math.log10(power(list, frequency, load).re * source);
}

describe('ST-33 L match, 50 to 12.5 Ω, 27.12 MHz', () => {
  const f0 = 27.12e6;
  const match = (c: number, l: number): Element[] => [
    capacitor('C1', 'in', '0', c),
    inductor('L1', 'in', 'out', l),
    resistor('RL', 'out', '0', 12.5),
  ];
  const omega = 2 * Math.PI * f0;
  const q = Math.sqrt(50 / 12.5 - 1);
  const [c, l] = [q / (omega * 50), (q * 12.5) / omega];
  const ideal = match(c, l);

  it('has no reflection with the ideal values, and a return loss over 20 dB from 25.24 to 28.88 MHz', () => {
    expectFigure(q, '1.732');
    expectFigure(c * 1e12, '203.29');
    expectFigure(l * 1e9, '127.06');
    expect(magnitude(reflection(impedance(ideal, f0, 'in'), 50))).toBeLessThanOrEqual(16 * Number.EPSILON);
    const edge = (f: number): number => returnLoss(ideal, f, 'in', 50) - 20;
    expectFigure(crossing(edge, 20e6, 0.999 * f0) / 1e6, '25.24');
    expectFigure(crossing(edge, 1.001 * f0, 35e6) / 1e6, '28.88');
  });

  it('has a return loss of 35.0 dB with standard values', () => {
    expectFigure(returnLoss(match(200e-12, 130e-9), f0, 'in', 50), '35.0');
  });

  it('loses 0.0625 dB with an inductor of Q 120, and 7.85 dB at twice the frequency', () => {
    const lossy = [
      ...ideal.filter(({ id }) => id !== 'L1'),
      inductor('L1', 'in', 'x', l),
      resistor('Rq', 'x', 'out', (omega * l) / 120),
    ];
    expectFigure(transducerGain(lossy, f0, 50, 'RL'), '-0.0625');
    expectFigure(transducerGain(lossy, 2 * f0, 50, 'RL'), '-7.85');
  });

  it('carries, with 10 W, 0.775 A rms in the capacitor, 1.265 A peak in the inductor, 31.6 V peak', () => {
    const list = network(voltageSource('V1', 's', '0', 2 * Math.sqrt(500)), resistor('Rs', 's', 'in', 50), ...ideal);
    expectFigure(power(list, f0, 'RL').re, '10.0');
    expectFigure(magnitude(current(list, f0, 'C1')), '0.775');
    expectFigure(magnitude(current(list, f0, 'L1')) * Math.SQRT2, '1.265');
    expectFigure(magnitude(voltage(list, f0, 'in')) * Math.SQRT2, '31.6');
  });
});

describe('ST-34 L match to 18 − j35 Ω, 7.1 MHz', () => {
  it('reflects 0.0274 with standard values', () => {
    const load = [resistor('RL', 'out', 'x', 18), capacitor('CL', 'x', '0', 1 / (2 * Math.PI * 7.1e6 * 35))];
    const match = [capacitor('C1', 'in', '0', 600e-12), inductor('L1', 'in', 'out', 1.3e-6), ...load];
    expectFigure(magnitude(reflection(impedance(match, 7.1e6, 'in'), 50)), '0.0274');
    expectFigure(returnLoss(match, 7.1e6, 'in', 50), '31.2');
  });
});

describe('ST-35 π match, 50 to 800 Ω, 10.1 MHz', () => {
  const match = (c1: number, l: number, c2: number): Element[] => [
    capacitor('C1', 'in', '0', c1),
    inductor('L1', 'in', 'out', l),
    capacitor('C2', 'out', '0', c2),
    resistor('RL', 'out', '0', 800),
  ];
  it('matches with the worked-out values and loses 28.2 dB at twice the frequency', () => {
    const omega = 2 * Math.PI * 10.1e6;
    const inner = 800 / (8 ** 2 + 1);
    const q1 = Math.sqrt(50 / inner - 1);
    const ideal = match(q1 / (omega * 50), ((8 + q1) * inner) / omega, 8 / (omega * 800));
    expect(magnitude(reflection(impedance(ideal, 10.1e6, 'in'), 50))).toBeLessThanOrEqual(128 * Number.EPSILON);
    expectFigure((q1 / (omega * 50)) * 1e12, '551.5');
    expectFigure((((8 + q1) * inner) / omega) * 1e6, '1.8909');
    expectFigure((8 / (omega * 800)) * 1e12, '157.6');
    expectFigure(transducerGain(ideal, 20.2e6, 50, 'RL'), '-28.2');
  });
  it('has a return loss of only 2.9 dB with the nearest coarse values', () => {
    expectFigure(returnLoss(match(620e-12, 2.2e-6, 160e-12), 10.1e6, 'in', 50), '2.9');
  });
});

describe('resistive pads', () => {
  it('ST-37 π 95.3–71.5–95.3 loses 10.067 dB, return loss 53.8 dB', () => {
    const pi = [
      resistor('R1', 'in', '0', 95.3),
      resistor('R2', 'in', 'out', 71.5),
      resistor('R3', 'out', '0', 95.3),
      resistor('RL', 'out', '0', 50),
    ];
    expectFigure(transducerGain(pi, 1e6, 50, 'RL'), '-10.067');
    expectFigure(returnLoss(pi, 1e6, 'in', 50), '53.8');
  });
  it('ST-37 T 26.1–35.7–26.1 loses 9.950 dB, return loss 48.0 dB', () => {
    const tee = [
      resistor('R1', 'in', 'x', 26.1),
      resistor('R2', 'x', '0', 35.7),
      resistor('R3', 'x', 'out', 26.1),
      resistor('RL', 'out', '0', 50),
    ];
    expectFigure(transducerGain(tee, 1e6, 50, 'RL'), '-9.950');
    expectFigure(returnLoss(tee, 1e6, 'in', 50), '48.0');
  });
  it('ST-38 minimum-loss pad 75/50 Ω loses 5.714 dB, return loss 63 dB', () => {
    const pad = [resistor('R1', 'in', 'out', 43.2), resistor('R2', 'out', '0', 86.6), resistor('RL', 'out', '0', 50)];
    expectFigure(transducerGain(pad, 1e6, 75, 'RL'), '-5.714');
    expectFigure(returnLoss(pad, 1e6, 'in', 75), '63');
  });
  it('ST-40 bridged T of four 49.9 Ω loses 6.021 dB, return loss 62.5 dB', () => {
    const bridged = [
      resistor('R1', 'in', 'x', 49.9),
      resistor('R2', 'x', 'out', 49.9),
      resistor('R3', 'x', '0', 49.9),
      resistor('R4', 'in', 'out', 49.9),
      resistor('RL', 'out', '0', 50),
    ];
    expectFigure(transducerGain(bridged, 1e6, 50, 'RL'), '-6.021');
    expectFigure(returnLoss(bridged, 1e6, 'in', 50), '62.5');
  });
});

describe('ST-41 lattice balun, 50 to 2 × 100 Ω, 50 MHz', () => {
  const omega = 2 * Math.PI * 50e6;
  const [l, c] = [100 / omega, 1 / (100 * omega)];
  const lattice = [
    inductor('L1', 'in', 'a', l),
    capacitor('C1', 'a', '0', c),
    capacitor('C2', 'in', 'b', c),
    inductor('L2', 'b', '0', l),
  ];
  const source = [voltageSource('V1', 's', '0', 2), resistor('Rs', 's', 'in', 50)];

  it('is matched, and gives 1.000 V at ∓90° on its outputs', () => {
    const loads = [resistor('Ra', 'a', '0', 100), resistor('Rb', 'b', '0', 100)];
    expect(magnitude(reflection(impedance([...lattice, ...loads], 50e6, 'in'), 50))).toBeLessThanOrEqual(
      64 * Number.EPSILON,
    );
    const list = network(...source, ...lattice, ...loads);
    const [a, b] = [voltage(list, 50e6, 'a'), voltage(list, 50e6, 'b')];
    expectFigure(magnitude(a), '1.000');
    expectFigure(degrees(a), '-90.0');
    expectFigure(magnitude(b), '1.000');
    expectFigure(degrees(b), '90.0');
    expectFigure(l * 1e9, '318.31');
    expectFigure(c * 1e12, '31.831');
  });

  it('is exactly singular with one floating 200 Ω load: the difference stands at 2.000 V, the common voltage does not', () => {
    const list = network(...source, ...lattice, resistor('RL', 'a', 'b', 200));
    const solution = solved(solve(list, { frequency: 50e6 }));
    expect(solution.problems).toHaveLength(1);
    expect(solution.problems[0]).toMatchObject({
      kind: 'resonance',
      nodes: ['a', 'b'],
      elements: ['L1', 'C1', 'C2', 'L2'],
    });
    expect(solution.voltage('a')).toBeUndefined();
    expect(solution.voltage('b')).toBeUndefined();
    expectFigure(magnitude(solution.elementVoltage('RL') ?? { re: 0, im: 0 }), '2.000');
    expectFigure(magnitude(solution.voltage('in') ?? { re: 0, im: 0 }), '1.000');
  });

  it('has a unique solution a millionth beside that frequency, with a condition of some 1e9', () => {
    const list = network(...source, ...lattice, resistor('RL', 'a', 'b', 200));
    const solution = solved(solve(list, { frequency: 50e6 * (1 + 1e-6) }));
    expect(solution.problems).toEqual([]);
    expect(magnitude(solution.elementVoltage('RL') ?? { re: 0, im: 0 })).toBeCloseTo(2, 4);
  });
});

describe('ST-42 double-tuned, top-capacitor coupled, 2 MHz', () => {
  it('is 60.03 kHz wide and lossless at 2.0000 MHz', () => {
    const ends = 13.03e3;
    const list = network(
      currentSource('I1', '0', 'a', 2 / Math.sqrt(ends)),
      resistor('Rs', 'a', '0', ends),
      inductor('L1', 'a', '0', 22e-6),
      capacitor('C1', 'a', '0', 281.74e-12),
      capacitor('Cc', 'a', 'b', 6.106e-12),
      inductor('L2', 'b', '0', 22e-6),
      capacitor('C2', 'b', '0', 281.74e-12),
      resistor('RL', 'b', '0', ends),
    );
    const gain = (f: number): number => level(list, f, 'b', Math.sqrt(ends));
    const top = peak(gain, 1.97e6, 2.03e6);
    // At critical coupling the top is flat, so its place is not sharp; its level is.
    expectFigure(gain(top), '0.0');
    expect(Math.abs(top / 2e6 - 1)).toBeLessThanOrEqual(2e-3);
    expect(gain(2.0e6)).toBeGreaterThanOrEqual(-0.005);
    const low = crossing((f) => gain(f) - HALF_POWER, 1.9e6, 2e6);
    const high = crossing((f) => gain(f) - HALF_POWER, 2e6, 2.1e6);
    expectFigure((high - low) / 1000, '60.03');
  });
});

describe('ST-43 quartz resonator, 6 MHz', () => {
  const series = 6e6;
  const inductance = 1 / ((2 * Math.PI * series) ** 2 * 12e-15);
  const motional = [
    capacitor('Cm', 'n', 'x', 12e-15),
    inductor('Lm', 'x', 'y', inductance),
    resistor('Rm', 'y', '0', 22),
  ];
  const lossless = motional.map((element) => (element.kind === 'resistor' ? { ...element, resistance: 0 } : element));

  it('has Q = 100 477, its parallel resonance at 6.011239 MHz, and is pulled by 283 ppm by 18 pF', () => {
    expectFigure(inductance * 1e3, '58.635');
    const list = network(voltageSource('V1', 'n', '0', 1), ...motional);
    const atResonance = crossing((f) => degrees(current(list, f, 'Rm')), 5.99e6, 6.01e6);
    expect(Math.abs(atResonance / series - 1)).toBeLessThanOrEqual(1e-12);
    const across = power(list, atResonance, 'Lm').im / power(list, atResonance, 'Rm').re;
    expect(Math.abs(across - 100477)).toBeLessThanOrEqual(1);
    const shunt = capacitor('C0', 'n', '0', 3.2e-12);
    const admittance = (f: number): number =>
      current(network(voltageSource('V1', 'n', '0', 1), ...lossless, shunt), f, 'V1').im;
    expectFigure(crossing(admittance, series * 1.0001, series * 1.01) / 1e6, '6.011239');
    const loaded = (f: number): number =>
      current(network(voltageSource('V1', 'n', '0', 1), ...lossless, shunt, capacitor('CL', 'n', '0', 18e-12)), f, 'V1')
        .im;
    expectFigure((crossing(loaded, series * 1.00001, series * 1.005) / series - 1) * 1e6, '283');
  });
});
