import { capacitor, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { crossing, halfPower, level, phase, root, shown, size, volts } from '../support/figures';
import { chebyshev as ladderOfChebyshev } from '../support/ladders';
import type { Circuit, Figure } from '../support/records';

/**
 * Starter networks of the library: sensor, measuring and audio networks of resistors, capacitors and inductors. The
 * values are the project's own; each figure was computed with an independent modified-nodal phasor solver [computed].
 * Formulas are the published classics named with them [memory].
 */
const out = volts('out');

/** The time constants of the disc-replay equaliser, seconds (IEC 60098). */
const [T1, T2, T3] = [3180e-6, 318e-6, 75e-6];
const DISC_C1 = 33e-9;
const DISC_C2 = 2.916 * DISC_C1;

function chebyshev(id: string, title: string, c1: number, l2: number, c3: number, figures: Circuit['figures']): Circuit {
  return {
    id,
    title: `fifth-order Chebyshev, 0.5 dB, 75 Ω, 12 MHz, ${title}`,
    source: 'Matthaei, Young and Jones 1964 [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'a', 75),
      capacitor('C1', 'a', '0', c1),
      inductor('L2', 'a', 'b', l2),
      capacitor('C3', 'b', '0', c3),
      inductor('L4', 'b', 'out', l2),
      capacitor('C5', 'out', '0', c1),
      resistor('RL', 'out', '0', 75),
    ],
    figures,
  };
}

/** At 10 kHz. */
function sensitivity(element: string, re: string, im: string): Figure {
  return { kind: 'sensitivity', output: out, frequency: 10e3, element, re: shown(re), im: shown(im) };
}

const OMEGA_12 = 2 * Math.PI * 12e6;

/** 1.70582, 1.22961 and 2.54088: as the book has them, with its 17.37 dB for two nepers. */
const [G1 = 0, G2 = 0, G3 = 0] = ladderOfChebyshev(5, 0.5, 17.37).g;

export const SENSOR_AUDIO_STARTERS: readonly Circuit[] = [
  {
    id: 'ST-01',
    title: 'first-order low-pass, loaded',
    source: 'f₃ = 1/(2π·((Rs + R)‖RL)·C)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('Rs', 's', 'a', 600),
      resistor('R1', 'a', 'out', 4700),
      capacitor('C1', 'out', '0', 3.3e-9),
      resistor('RL', 'out', '0', 1e5),
    ],
    figures: [
      level('out', 0, '-0.449'),
      level('out', 100e3, '-20.859'),
      halfPower('out', [1e3, 1e5], '9582.1', { frequency: 0 }),
      size('out', 10e3, '0.657034'),
      phase('out', 10e3, '-46.2227'),
      sensitivity('Rs', '-0.061746', '-0.053706'),
      sensitivity('R1', '-0.483680', '-0.420696'),
      sensitivity('C1', '-0.521334', '-0.499545'),
      sensitivity('RL', '0.024092', '-0.025143'),
      { kind: 'noise', output: out, frequency: 10e3, temperature: 300, from: 'Rs', printed: '2.0716e-9' },
      { kind: 'noise', output: out, frequency: 10e3, temperature: 300, from: 'R1', printed: '5.7979e-9' },
      { kind: 'noise', output: out, frequency: 10e3, temperature: 300, from: 'RL', printed: '1.4174e-9' },
      { kind: 'noise', output: out, frequency: 10e3, temperature: 300, printed: '6.3179e-9' },
      { kind: 'totalNoise', output: out, temperature: 300, printed: '1.1203e-6' },
      { kind: 'noiseBandwidth', output: out, printed: '15051' },
    ],
  },
  {
    id: 'ST-01 R alone',
    title: 'the same without source resistance and load',
    source: 'f₃ = 1/(2πRC)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'out', 4700),
      capacitor('C1', 'out', '0', 3.3e-9),
    ],
    figures: [halfPower('out', [1e3, 1e5], '10261')],
  },
  {
    id: 'ST-02',
    title: 'coupling capacitor, first-order high-pass',
    source: 'f₃ = 1/(2π(Rs + R)C)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('Rs', 's', 'a', 1000),
      capacitor('C1', 'a', 'out', 2.2e-6),
      resistor('RL', 'out', '0', 47e3),
    ],
    figures: [
      level('out', 1e6, '-0.183'),
      halfPower('out', [0.1, 100], '1.5071', { frequency: 1e9 }),
      phase('out', 20, '4.31'),
    ],
  },
  {
    id: 'ST-03',
    title: 'two-section RC low-pass without a buffer',
    source: 'H = 1/(1 + 3sT + s²T²)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', 3900),
      capacitor('C1', 'a', '0', 6.8e-9),
      resistor('R2', 'a', 'out', 3900),
      capacitor('C2', 'out', '0', 6.8e-9),
    ],
    figures: [
      crossing('degrees', 'out', -90, [1e3, 1e5], '6001.3'),
      level('out', 1 / (2 * Math.PI * 3900 * 6.8e-9), '-9.542'),
      phase('out', 1 / (2 * Math.PI * 3900 * 6.8e-9), '-90.000'),
      halfPower('out', [100, 6000], '2245.9'),
      { kind: 'poles', output: out, source: 'V1', roots: [root('-14402.9'), root('-98719.2')] },
    ],
  },
  {
    id: 'ST-04',
    title: 'twin-T band-stop, mains hum',
    source: 'f_z = 1/(2πRC), Q = 1/4',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', 46.4e3),
      resistor('R2', 'a', 'out', 46.4e3),
      capacitor('C3', 'a', '0', 136e-9),
      capacitor('C1', 's', 'b', 68e-9),
      capacitor('C2', 'b', 'out', 68e-9),
      resistor('R3', 'b', '0', 23.2e3),
    ],
    figures: [
      { kind: 'smallest', read: 'magnitude', output: out, between: [40, 60], at: shown('50.442') },
      level('out', 50, '-47.13'),
      halfPower('out', [1, 50], '11.91'),
      halfPower('out', [51, 1000], '213.68'),
      { kind: 'zeros', output: out, source: 'V1', roots: [root('0.00', '316.94'), root('-316.94')] },
    ],
  },
  {
    id: 'ST-05',
    title: 'series–parallel RC arm (Wien)',
    source: '|H| = 1/3, 0° at 1/(2πRC)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', 1e4),
      capacitor('C1', 'a', 'out', 15e-9),
      resistor('R2', 'out', '0', 1e4),
      capacitor('C2', 'out', '0', 15e-9),
    ],
    figures: [
      crossing('degrees', 'out', 0, [500, 2000], '1061.03'),
      size('out', 1061.03, '0.33333'),
      { kind: 'largest', read: 'magnitude', output: out, between: [500, 2000], value: shown('0.33333') },
    ],
  },
  {
    id: 'ST-11',
    title: 'third-order Butterworth low-pass, 600 Ω both ends',
    source: 'g = 1, 2, 1',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'a', 600),
      capacitor('C1', 'a', '0', 82e-9),
      inductor('L1', 'a', 'out', 60e-3),
      capacitor('C2', 'out', '0', 82e-9),
      resistor('RL', 'out', '0', 600),
    ],
    figures: [halfPower('out', [1e3, 1e4], '3200.2'), level('out', 9600, '-28.51')],
  },
  chebyshev('ST-12 ideal', 'ideal', G1 / (OMEGA_12 * 75), (G2 * 75) / OMEGA_12, G3 / (OMEGA_12 * 75), [
    { kind: 'value', element: 'C1', printed: '301.66e-12' },
    { kind: 'value', element: 'L2', printed: '1.2231e-6' },
    { kind: 'value', element: 'C3', printed: '449.33e-12' },
    level('out', 12e6, '-0.5001'),
    level('out', 24e6, '-42.039'),
  ]),
  chebyshev('ST-12', 'standard values', 300e-12, 1.2e-6, 470e-12, [
    level('out', 12e6, '-0.668'),
    level('out', 24e6, '-42.00'),
  ]),
  {
    id: 'ST-13',
    title: 'third-order Butterworth high-pass (T), 50 Ω',
    source: 'C = 1/(ωR), L = R/(2ω)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'a', 50),
      capacitor('C1', 'a', 'b', 1.8e-9),
      inductor('L1', 'b', '0', 2.2e-6),
      capacitor('C2', 'b', 'out', 1.8e-9),
      resistor('RL', 'out', '0', 50),
    ],
    figures: [halfPower('out', [1e6, 3e6], '1.7952e6'), level('out', 600e3, '-28.39')],
  },
  {
    id: 'ST-14',
    title: 'm-derived T section (m = 0.6), trap above cut-off',
    source: 'Zobel, BSTJ 1923; f∞ = f_c/√(1 − m²) [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'a', 600),
      inductor('L1', 'a', 'b', 11.5e-3),
      capacitor('C1', 'b', 'x', 62e-9),
      inductor('L2', 'x', '0', 10e-3),
      inductor('L3', 'b', 'out', 11.5e-3),
      resistor('RL', 'out', '0', 600),
    ],
    figures: [
      { kind: 'smallest', read: 'magnitude', output: out, between: [5e3, 8e3], at: shown('6391.8') },
      level('out', 3e3, '-0.093'),
      level('out', 5e3, '-4.915'),
      level('out', 20e3, '-12.74'),
    ],
  },
  {
    id: 'ST-15',
    title: 'disc-replay equaliser, passive, 3180/318/75 µs',
    source: 'IEC 60098; R1·C1 = T1·T3/T2, R2·C2 = T2, C2/C1 = 2.916 (Lipshitz 1979) [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'out', (T1 * T3) / T2 / DISC_C1),
      capacitor('C1', 'out', '0', DISC_C1),
      resistor('R2', 'out', 'x', T2 / DISC_C2),
      capacitor('C2', 'x', '0', DISC_C2),
    ],
    figures: [
      { kind: 'value', element: 'R1', printed: '22.73e3' },
      { kind: 'value', element: 'R2', printed: '3.305e3' },
      { kind: 'value', element: 'C2', printed: '96.23e-9' },
      level('out', 1e3, '-19.911'),
      level('out', 20, '19.274', { frequency: 1e3 }),
      level('out', 20e3, '-19.620', { frequency: 1e3 }),
    ],
  },
  {
    id: 'ST-17',
    title: '350 Ω full bridge with cable capacitance',
    source: 'U = Ue·ΔR/R',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 5),
      resistor('R1', 's', 'p', 350 * 0.999),
      resistor('R2', 'p', '0', 350 * 1.001),
      resistor('R3', 's', 'n', 350 * 1.001),
      resistor('R4', 'n', '0', 350 * 0.999),
      capacitor('C1', 'p', 'n', 2.2e-9),
    ],
    figures: [
      size(volts('p', 'n'), 0, '5.000e-3'),
      size(volts('p', 'n'), 10e3, '4.9942e-3'),
      halfPower(volts('p', 'n'), [1e5, 1e6], '206.7e3', { frequency: 0 }),
    ],
  },
];
