import { Complex } from 'complex.js';
import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { twoPort, matrixAt } from '@/solver/analysis/two-port';
import {
  imageParameters,
  insertionLoss,
  returnLoss,
  rollettStability,
  stabilityDistance,
  transducerLoss,
} from '@/solver/analysis/two-port-figures';
import type { PortReferences, TwoPortKind, TwoPortMatrix } from '@/solver/analysis/two-port-parameters';
import { capacitor, inductor, network, resistor } from '../solver/support/networks';
import { expectPrinted } from './support/expect-figure';
import { crossing, logarithmic } from './support/measure';

/**
 * Networks between two ports: attenuators and matching networks of the library of starters, with figures that were
 * computed by an independent modified-nodal phasor solver [computed], and worked examples that say their own source.
 */
function parameters(elements: readonly Element[], kind: TwoPortKind, frequency: number, references: PortReferences, nodes = ['in', 'out']): TwoPortMatrix {
  const [one = '', other = ''] = nodes;
  const found = twoPort(network(...elements), [[one, '0'], [other, '0']], { frequencies: [frequency], reference: references });
  if (!found.ok) throw new Error(found.message);
  const matrix = matrixAt(found.parameters(kind), 0);
  if (matrix === undefined) throw new Error(`no ${kind} parameters`);
  return matrix;
}

function scattering(elements: readonly Element[], frequency: number, references: PortReferences, nodes?: string[]): TwoPortMatrix {
  return parameters(elements, 'scattering', frequency, references, nodes);
}

function entry(matrix: TwoPortMatrix, at: 11 | 12 | 21 | 22): Complex {
  const place = { 11: 0, 12: 2, 21: 4, 22: 6 }[at];
  return new Complex(matrix[place] ?? NaN, matrix[place + 1] ?? NaN);
}

const MATCHED: PortReferences = [50, 50];
/** Attenuators are the same at all frequencies. */
const ANY = 1e6;

const pi = (a: number, b: number, c: number): Element[] => [resistor('R1', 'in', '0', a), resistor('R2', 'in', 'out', b), resistor('R3', 'out', '0', c)];
const tee = (a: number, b: number, c: number): Element[] => [resistor('R1', 'in', 'm', a), resistor('R2', 'm', '0', b), resistor('R3', 'm', 'out', c)];

/** Loss in dB, and return loss at port 1. */
function lossOf(elements: readonly Element[], frequency: number, references: PortReferences): readonly [number, number] {
  const s = scattering(elements, frequency, references);
  return [transducerLoss(s, references, references) ?? NaN, returnLoss(entry(s, 11)) ?? Infinity];
}

describe('attenuators', () => {
  it('ST-37: 10 dB, Π and T of preferred values between 50 Ω', () => {
    const [piLoss, piReturn] = lossOf(pi(95.3, 71.5, 95.3), ANY, MATCHED);
    expectPrinted(piLoss, { printed: '10.067' });
    expectPrinted(piReturn, { printed: '53.8' });
    const [teeLoss, teeReturn] = lossOf(tee(26.1, 35.7, 26.1), ANY, MATCHED);
    expectPrinted(teeLoss, { printed: '9.950' });
    expectPrinted(teeReturn, { printed: '48.0' });
    const k = Math.sqrt(10);
    const [idealPi, idealTee] = [[(50 * (k + 1)) / (k - 1), (50 * (k * k - 1)) / (2 * k)], [(50 * (k - 1)) / (k + 1), (100 * k) / (k * k - 1)]] as const;
    expectPrinted(idealPi[0] ?? NaN, { printed: '96.25' });
    expectPrinted(idealPi[1] ?? NaN, { printed: '71.15' });
    expectPrinted(idealTee[0] ?? NaN, { printed: '25.97' });
    expectPrinted(idealTee[1] ?? NaN, { printed: '35.14' });
    for (const ideal of [pi(idealPi[0] ?? 0, idealPi[1] ?? 0, idealPi[0] ?? 0), tee(idealTee[0] ?? 0, idealTee[1] ?? 0, idealTee[0] ?? 0)]) {
      const s = scattering(ideal, ANY, MATCHED);
      expect(entry(s, 11).abs()).toBeLessThan(2e-16);
      expect(entry(s, 21).sub(1 / k).abs()).toBeLessThan(2e-16);
      // A matched 10 dB pad: K = (1 + 0.01)/(2·0.1) = 5.05 [computed], and µ = 1/|S₁₂·S₂₁|.
      expectPrinted(rollettStability(s)?.factor ?? NaN, { printed: '5.05', within: 1e-13 });
      expectPrinted(stabilityDistance(s) ?? NaN, { printed: '10', within: 1e-13 });
    }
  });

  it('ST-38: the pad of least loss between 75 and 50 Ω', () => {
    const pad = [resistor('R1', 'in', 'out', 43.2), resistor('R2', 'out', '0', 86.6)];
    const [loss, returned] = lossOf(pad, ANY, [75, 50]);
    expectPrinted(loss, { printed: '5.714' });
    expectPrinted(returned, { printed: '63', within: 0.5 });
    const ideal = Math.sqrt(75 * 25);
    const [idealLoss] = lossOf([resistor('R1', 'in', 'out', ideal), resistor('R2', 'out', '0', 3750 / ideal)], ANY, [75, 50]);
    expectPrinted(idealLoss, { printed: '5.7195' });
  });

  it('ST-40: a bridged T of 6 dB, 50 Ω', () => {
    const bridged = [
      resistor('R1', 'in', 'm', 49.9),
      resistor('R2', 'm', 'out', 49.9),
      resistor('R3', 'm', '0', 49.9),
      resistor('R4', 'in', 'out', 49.9),
    ];
    const [loss, returned] = lossOf(bridged, ANY, MATCHED);
    expectPrinted(loss, { printed: '6.021' });
    expectPrinted(returned, { printed: '62.5' });
  });

  it('is image-matched: a T of 300, 450 and 300 Ω has 600 Ω and 9.54 dB (Bird, Electrical Circuit Theory and Technology, 2nd ed. 2003, chapter 41, example 10 [found])', () => {
    const pad = tee(300, 450, 300);
    const image = imageParameters(parameters(pad, 'chain', ANY, [600, 600]));
    expect(image?.impedances.map(({ re }) => re)).toEqual([expect.closeTo(600, 11), expect.closeTo(600, 11)]);
    expectPrinted((20 / Math.LN10) * (image?.transfer.re ?? NaN), { printed: '9.54' });
    expectPrinted(insertionLoss(scattering(pad, ANY, MATCHED), MATCHED, [600, 600]) ?? NaN, { printed: '9.54' });
  });

  it('20 dB, 600 Ω: T of 490.909 and 121.212 Ω, Π of 733.333 and 2970 Ω (ibid., examples 8 and 9, with the exact ln 10 [computed])', () => {
    for (const pad of [tee(490.909, 121.212, 490.909), pi(733.333, 2970, 733.333)]) {
      const [loss, returned] = lossOf(pad, ANY, [600, 600]);
      expect(loss).toBeCloseTo(20, 4);
      expect(returned).toBeGreaterThan(100);
    }
  });
});

describe('scattering parameters of a series impedance', () => {
  it('of 50 + j25 Ω in 50 Ω: S₁₁ = 0.351351 + j0.108108, S₂₁ = 0.648649 − j0.108108 [computed]', () => {
    const frequency = 1e6;
    const series = [resistor('R', 'in', 'm', 50), inductor('L', 'm', 'out', 25 / (2 * Math.PI * frequency)), resistor('far', 'x', '0', 1)];
    const s = scattering(series, frequency, MATCHED);
    expectPrinted(entry(s, 11).re, { printed: '0.351351' });
    expectPrinted(entry(s, 11).im, { printed: '0.108108' });
    expectPrinted(entry(s, 21).re, { printed: '0.648649' });
    expectPrinted(entry(s, 21).im, { printed: '-0.108108' });
  });
});

describe('matching networks', () => {
  const f33 = 27.12e6;
  const match33 = (c: number, l: number): Element[] => [capacitor('C', 'in', '0', c), inductor('L', 'in', 'out', l)];

  it('ST-33: L match from 50 to 12.5 Ω at 27.12 MHz', () => {
    const omega = 2 * Math.PI * f33;
    const q = Math.sqrt(3);
    const ideal = match33(q / (omega * 50), (12.5 * q) / omega);
    expect(entry(scattering(ideal, f33, [50, 12.5]), 11).abs()).toBeLessThan(4e-16);
    expectPrinted(lossOf(match33(200e-12, 130e-9), f33, [50, 12.5])[1], { printed: '35.0' });
    const edge = (frequency: number): number => lossOf(ideal, frequency, [50, 12.5])[1] - 20;
    expectPrinted(crossing(edge, 20e6, 0.999 * f33) / 1e6, { printed: '25.24' });
    expectPrinted(crossing(edge, 1.001 * f33, 35e6) / 1e6, { printed: '28.88' });
    const lossy = [capacitor('C', 'in', '0', q / (omega * 50)), inductor('L', 'in', 'x', (12.5 * q) / omega), resistor('RL', 'x', 'out', (12.5 * q) / 120)];
    expectPrinted(lossOf(lossy, f33, [50, 12.5])[0], { printed: '0.0625' });
    expectPrinted(lossOf(lossy, 2 * f33, [50, 12.5])[0], { printed: '7.85' });
  });

  it('ST-34: L match to 18 − j35 Ω at 7.1 MHz', () => {
    const frequency = 7.1e6;
    const load = capacitor('CL', 'm', 'out', 1 / (2 * Math.PI * frequency * 35));
    const gamma = (c: number, l: number): number =>
      entry(scattering([capacitor('C', 'in', '0', c), inductor('L', 'in', 'm', l), load], frequency, [50, 18]), 11).abs();
    expectPrinted(gamma(600e-12, 1.3e-6), { printed: '0.0274' });
    expect(gamma(597.8e-12, 1.3226e-6)).toBeLessThan(2e-4);
  });

  it('ST-35: Π match from 50 to 800 Ω at 10.1 MHz', () => {
    const match = (c1: number, l: number, c2: number): Element[] => [capacitor('C1', 'in', '0', c1), inductor('L', 'in', 'out', l), capacitor('C2', 'out', '0', c2)];
    const ideal = match(551.5e-12, 1.8909e-6, 157.6e-12);
    // The values are printed to four and five digits.
    expect(entry(scattering(ideal, 10.1e6, [50, 800]), 11).abs()).toBeLessThan(2e-3);
    expectPrinted(lossOf(ideal, 20.2e6, [50, 800])[0], { printed: '28.2' });
    expectPrinted(lossOf(match(620e-12, 2.2e-6, 160e-12), 10.1e6, [50, 800])[1], { printed: '2.9' });
  });

  it('ST-41: a lattice balun is matched, and drives both outputs alike and opposite', () => {
    const f = 50e6;
    const x = 2 * Math.PI * f;
    const balun = (load: string): Element[] => [
      inductor('L1', 'in', 'a', 100 / x),
      capacitor('C1', 'a', '0', 1 / (100 * x)),
      capacitor('C2', 'in', 'b', 1 / (100 * x)),
      inductor('L2', 'b', '0', 100 / x),
      resistor('RL', load, '0', 100),
    ];
    // From the input to one output, the other closed by 100 Ω: half the power each, at −90° and +90°.
    const toA = scattering(balun('b'), f, [50, 100], ['in', 'a']);
    const toB = scattering(balun('a'), f, [50, 100], ['in', 'b']);
    expect(entry(toA, 11).abs()).toBeLessThan(1e-15);
    expect(entry(toA, 21).sub(new Complex(0, -Math.SQRT1_2)).abs()).toBeLessThan(1e-15);
    expect(entry(toB, 21).sub(new Complex(0, Math.SQRT1_2)).abs()).toBeLessThan(1e-15);
  });
});

describe('insertion loss between unlike resistances', () => {
  const filter = [
    capacitor('C1', 'in', '0', 470e-9),
    inductor('L', 'in', 'm', 1e-3),
    resistor('RL', 'm', 'out', 0.15),
    capacitor('C2', 'out', '0', 470e-9),
  ];
  const loss = (frequency: number, terminations: PortReferences): number =>
    insertionLoss(scattering(filter, frequency, MATCHED), MATCHED, terminations) ?? NaN;

  it('ST-29: a mains filter has 73.28 dB at 150 kHz between 50 Ω, and 52.39 dB between 0.1 and 100 Ω', () => {
    expectPrinted(loss(150e3, MATCHED), { printed: '73.28' });
    expectPrinted(loss(150e3, [0.1, 100]), { printed: '52.39' });
  });

  it('ST-29: it makes the level rise by 6.86 dB at 6.94 kHz between 0.1 and 100 Ω', () => {
    const frequencies = logarithmic(6e3, 8e3, 2001);
    const losses = frequencies.map((frequency) => loss(frequency, [0.1, 100]));
    const least = Math.min(...losses);
    expectPrinted(least, { printed: '-6.86' });
    expectPrinted((frequencies[losses.indexOf(least)] ?? NaN) / 1e3, { printed: '6.94' });
  });
});

describe('a line', () => {
  it('of a quarter of a wave turns a load over its impedance: Z² / R', () => {
    const line: Element = { id: 'T', kind: 'line', nodes: ['in', '0', 'out', '0'], impedance: 75, delay: 2.5e-9 };
    const chain = parameters([line], 'chain', 100e6, MATCHED);
    expect(entry(chain, 11).abs()).toBeLessThan(1e-15);
    expect(entry(chain, 12).sub(new Complex(0, 75)).abs()).toBeLessThan(1e-13);
    expect(entry(chain, 21).sub(new Complex(0, 1 / 75)).abs()).toBeLessThan(1e-17);
    expect(entry(scattering([line], 100e6, [50, 112.5]), 11).abs()).toBeLessThan(1e-15);
    expect(imageParameters(chain)?.impedances[0].re).toBeCloseTo(75, 11);
    expect(imageParameters(chain)?.transfer.im).toBeCloseTo(Math.PI / 2, 13);
  });
});
