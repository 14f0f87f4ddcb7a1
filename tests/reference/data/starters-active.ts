import { capacitor, currentSource, resistor, voltageSource } from '../../solver/support/networks';
import { crossing, extreme, halfPower, level, phase, root, shown, size, volts } from '../support/figures';
import { amplifier } from '../support/parts';
import type { Circuit } from '../support/records';

/**
 * Starter networks of the library with ideal operational amplifiers. The values are the project's own; each figure was
 * computed with an independent modified-nodal phasor solver [computed]. Formulas are the published classics named with
 * them [memory].
 */
const out = volts('out');

export const ACTIVE_STARTERS: readonly Circuit[] = [
  {
    id: 'ST-06',
    title: 'first-order all-pass phase shifter',
    source: 'φ = −2 arctan ωRC',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'm', 10e3),
      resistor('R2', 'm', 'out', 10e3),
      resistor('R3', 's', 'p', 12e3),
      capacitor('C1', 'p', '0', 4.7e-9),
      amplifier('A1', 'p', 'm', 'out'),
    ],
    figures: [
      crossing('degrees', 'out', -90, [500, 20e3], '2821.9'),
      level('out', 2821.9, '0.000'),
      phase('out', 1 / (2 * Math.PI * 12e3 * 4.7e-9), '-90.000'),
      { kind: 'groupDelay', output: out, frequency: 0, printed: '112.8e-6' },
    ],
  },
  {
    id: 'ST-07',
    title: 'second-order low-pass, near Butterworth',
    source: 'f₀ = 1/(2πR√(C₁C₂)), Q = ½√(C₁/C₂) (Sallen and Key, IRE Trans. CT-2, 1955) [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', 15e3),
      resistor('R2', 'a', 'p', 15e3),
      capacitor('C1', 'a', 'out', 4.7e-9),
      capacitor('C2', 'p', '0', 2.2e-9),
      amplifier('A1', 'p', 'out', 'out'),
    ],
    figures: [
      crossing('degrees', 'out', -90, [1e3, 10e3], '3299.66'),
      level('out', 3299.66, '-2.724'),
      phase('out', 3299.66, '-90.00'),
      { kind: 'poles', output: out, source: 'V1', roots: [root('-14184', '15121')] },
      { kind: 'resonance', output: out, source: 'V1', frequency: shown('3299.66'), quality: shown('0.7308') },
    ],
  },
  {
    id: 'ST-08',
    title: 'second-order low-pass, multiple feedback, Bessel, gain −2',
    source: 'ω₀² = 1/(R2·R3·C1·C2); Bessel: f₀ = 1.27202 f₃, Q = 0.57735 [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', 7.5e3),
      resistor('R2', 'a', 'out', 15e3),
      resistor('R3', 'a', 'm', 2.21e3),
      capacitor('C1', 'a', '0', 47e-9),
      capacitor('C2', 'm', 'out', 10e-9),
      amplifier('A1', '0', 'm', 'out'),
    ],
    figures: [
      level('out', 0, '6.021'),
      level('out', 1e3, '-2.9998', { frequency: 0 }),
      { kind: 'groupDelay', output: out, frequency: 0, printed: '216.30e-6' },
      { kind: 'groupDelay', output: out, frequency: 500, printed: '211.88e-6' },
    ],
  },
  {
    id: 'ST-09',
    title: 'band-pass, multiple feedback',
    source: 'Q = πf₀R2C; H₀ = R2/2R1',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', 18.2e3),
      resistor('R3', 'a', '0', 523),
      capacitor('C1', 'a', 'm', 22e-9),
      capacitor('C2', 'a', 'out', 22e-9),
      resistor('R2', 'm', 'out', 71.5e3),
      amplifier('A1', '0', 'm', 'out'),
    ],
    figures: [
      extreme('largest', 'out', [1e3, 1.5e3], '1199.9'),
      size('out', 1199.9, '1.9643'),
      level('out', 1199.9, '5.864'),
      phase('out', 1199.9, '180'),
      { kind: 'resonance', output: out, source: 'V1', quality: shown('5.930') },
    ],
  },
  {
    id: 'ST-10',
    title: 'two-integrator loop',
    source: 'f₀ = 1/2πRC, Q = R_Q/R (Tow 1968, Thomas 1971) [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('Rg', 's', 'm1', 6.34e3),
      resistor('RQ', 'm1', 'bp', 51.1e3),
      capacitor('C1', 'm1', 'bp', 10e-9),
      amplifier('A1', '0', 'm1', 'bp'),
      resistor('R2', 'bp', 'm2', 6.34e3),
      capacitor('C2', 'm2', 'lp', 10e-9),
      amplifier('A2', '0', 'm2', 'lp'),
      resistor('R3', 'lp', 'm3', 10e3),
      resistor('R4', 'm3', 'x', 10e3),
      amplifier('A3', '0', 'm3', 'x'),
      resistor('R1', 'x', 'm1', 6.34e3),
    ],
    figures: [
      extreme('largest', 'bp', [2e3, 3e3], '2510.3'),
      level('bp', 2510.3, '18.127'),
      level('lp', 2510.3, '18.127'),
      { kind: 'resonance', output: volts('bp'), source: 'V1', frequency: shown('2510.3'), quality: shown('8.060') },
    ],
  },
  {
    id: 'ST-18',
    title: 'transimpedance stage for a photocurrent',
    source: 'f₃ = 1/(2πR_fC_f)',
    mark: 'computed',
    elements: [
      currentSource('I1', '0', 'm', 1e-6),
      capacitor('Ci', 'm', '0', 47e-12),
      resistor('Rf', 'm', 'out', 1e6),
      capacitor('Cf', 'm', 'out', 1.5e-12),
      amplifier('A1', '0', 'm', 'out'),
    ],
    figures: [
      size('out', 1, '1.000'),
      phase('out', 1, '180'),
      halfPower('out', [1e4, 1e6], '106.10e3', { frequency: 0 }),
    ],
  },
  {
    id: 'ST-19',
    title: 'charge amplifier',
    // A charge of 1 pC is 1 mV behind 1 nF, and 1 mV/pC then a voltage of as much as was put in.
    source: '1/C_f; f_l = 1/(2πR_fC_f)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1e-3),
      capacitor('Cq', 's', 'm', 1e-9),
      capacitor('Cf', 'm', 'out', 1e-9),
      resistor('Rf', 'm', 'out', 330e6),
      amplifier('A1', '0', 'm', 'out'),
    ],
    figures: [
      // The figure is 1 mV: it is held to what the resistor leaves of it at 1 kHz.
      { kind: 'reading', output: out, read: 'magnitude', frequency: 1e3, printed: '1e-3', within: 1.2e-10 },
      halfPower('out', [0.01, 100], '0.4823', { frequency: 1e6 }),
    ],
  },
];
