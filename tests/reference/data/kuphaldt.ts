import { capacitor, inductor, resistor, voltageSource } from '../../solver/support/networks';
import {
  across,
  amperes,
  extreme,
  ohms,
  phasor,
  polar,
  rectangular,
  seenBy,
  volts,
  watts,
  worked,
} from '../support/figures';
import { wire } from '../support/parts';
import type { Circuit } from '../support/records';

/**
 * Worked examples of a book under the Design Science License: values read from its circuit drawings and its author's
 * hand-calculated tables [found], each with the tolerance of its last digits; beside it an independent nodal solution to
 * six digits [computed].
 */
const KUPHALDT = 'Kuphaldt, Lessons In Electric Circuits, vol. II AC (Design Science License)';

export const KUPHALDT_EXAMPLES: readonly Circuit[] = [
  worked({
    id: 'K01',
    title: 'three series sources on a load',
    source: `${KUPHALDT}, ch. 2 "Some examples with AC circuits" (figs 02046,12012)`,
    mark: 'found',
    frequency: 60,
    elements: [
      voltageSource('E3', '1', '0', 15),
      voltageSource('E2', '2', '1', 12, 35),
      voltageSource('E1', '3', '2', 22, -64),
      resistor('R', '3', '0', 10000),
    ],
    figures: [phasor(volts('3'), rectangular(34.474, -12.8906, 0.00689), 34.474, -12.8906)],
  }),
  worked({
    id: 'K03',
    title: 'series RL',
    source: `${KUPHALDT}, ch. 3 "Series resistor-inductor circuits"`,
    mark: 'found',
    frequency: 60,
    elements: [
      voltageSource('V1', '1', '0', 10),
      resistor('R', '1', '2', 5),
      inductor('L', '2', '0', 0.01),
    ],
    figures: [
      phasor(seenBy('V1'), polar(6.262, 0.0125, 37.016, 0.15), 5, 3.76991),
      phasor(amperes('R'), polar(1.597, 0.00319, -37.016, 0.15), 1.27511, -0.961412),
      phasor(across('R'), polar(7.9847, 0.016, -37.016, 0.15), 6.37556, -4.80706),
      phasor(across('L'), polar(6.0203, 0.012, 52.984, 0.15), 3.62444, 4.80706),
    ],
  }),
  worked({
    id: 'K05',
    title: 'series RC',
    source: `${KUPHALDT}, ch. 4 "Series resistor-capacitor circuits"`,
    mark: 'found',
    frequency: 60,
    elements: [
      voltageSource('V1', '1', '0', 10),
      resistor('R', '1', '2', 5),
      capacitor('C', '2', '0', 0.0001),
    ],
    figures: [
      phasor(seenBy('V1'), polar(26.993, 0.054, -79.325, 0.15), 5, -26.5258),
      phasor(amperes('R'), polar(0.3705, 0.000741, 79.325, 0.15), 0.0686229, 0.364056),
      phasor(across('R'), polar(1.8523, 0.0037, 79.325, 0.15), 0.343115, 1.82028),
      phasor(across('C'), polar(9.8269, 0.0197, -10.675, 0.15), 9.65689, -1.82028),
    ],
  }),
  worked({
    id: 'K07',
    title: 'series RLC',
    source: `${KUPHALDT}, ch. 5 "Series R, L, and C"`,
    mark: 'found',
    frequency: 60,
    elements: [
      voltageSource('V1', '1', '0', 120),
      resistor('R', '1', '2', 250),
      inductor('L', '2', '3', 0.65),
      capacitor('C', '3', '0', 1.5e-6),
    ],
    figures: [
      phasor(seenBy('V1'), polar(1543.7, 3.09, -80.68, 0.15), 250, -1523.34),
      phasor(amperes('R'), polar(0.077734, 0.000155, 80.68, 0.15), 0.0125888, 0.0767081),
      phasor(across('R'), polar(19.434, 0.0389, 80.68, 0.15), 3.14719, 19.177),
      phasor(across('L'), polar(19.048, 0.0381, 170.68, 0.15), -18.7969, 3.0848),
      phasor(across('C'), polar(137.46, 0.275, -9.3199, 0.15), 135.65, -22.2618),
    ],
  }),
  worked({
    id: 'K09',
    title: 'C1 in series with R || (L + C2)',
    source: `${KUPHALDT}, ch. 5 "Series-parallel R, L, and C"`,
    mark: 'found',
    frequency: 60,
    elements: [
      voltageSource('V1', '1', '0', 120),
      capacitor('C1', '1', '2', 4.7e-6),
      inductor('L', '2', '3', 0.65),
      capacitor('C2', '3', '0', 1.5e-6),
      resistor('R', '2', '0', 470),
    ],
    figures: [
      phasor(seenBy('V1'), polar(818.34, 1.64, -58.371, 0.15), 429.149, -696.785),
      phasor(amperes('C1'), polar(0.14664, 0.000293, 58.371, 0.15), 0.0768994, 0.124857),
      phasor(across('C1'), polar(82.76, 0.166, -31.629, 0.15), 70.4669, -43.4004),
      phasor(across('R'), polar(65.857, 0.132, 41.225, 0.15), 49.5331, 43.4004),
      phasor(amperes('R'), polar(0.14012, 0.00028, 41.225, 0.15), 0.10539, 0.0923413),
      phasor(amperes('L'), polar(0.043232, 8.65e-5, 131.22, 0.15), -0.0284902, 0.032516),
      phasor(across('L'), polar(10.594, 0.0212, 221.22, 0.15), -7.96787, -6.98136),
      phasor(across('C2'), polar(76.451, 0.153, 41.225, 0.15), 57.501, 50.3818),
    ],
  }),
  worked({
    id: 'K11',
    title: 'RL load, powers (rms phasors)',
    source: `${KUPHALDT}, ch. 11 "True, Reactive, and Apparent power"`,
    mark: 'found',
    frequency: 60,
    elements: [
      voltageSource('V1', '1', '0', 120),
      inductor('L', '1', '2', 0.16),
      resistor('R', '2', '0', 60),
    ],
    figures: [
      phasor(seenBy('V1'), polar(85.078, 0.17, 45.152, 0.15), 60, 60.3186),
      phasor(amperes('R'), polar(1.41, 0.00282, -45.152, 0.15), 0.994704, -0.999986),
      phasor(watts('R'), rectangular(119.365, 0, 0.0239), 119.365, 0),
      phasor(watts('L'), rectangular(0, 119.998, 0.024), 0, 119.998),
    ],
  }),
  worked({
    id: 'K13',
    title: 'two sources 120 deg apart, two 10 kW 120 V loads, shared neutral',
    source: `${KUPHALDT}, ch. 10 "Three-phase power systems"/single-phase section (fig 12112-12113)`,
    mark: 'found',
    frequency: 60,
    elements: [
      voltageSource('VA', 'a', '0', 120),
      voltageSource('VB', 'b', '0', 120, 120),
      resistor('RA', 'a', 'n', 1.44),
      resistor('RB', 'b', 'n', 1.44),
      wire('WN', 'n', '0'),
    ],
    figures: [
      phasor(volts('a', 'b'), polar(207.85, 0.416, -30, 0.15), 180, -103.923),
      phasor(amperes('RA'), polar(83.33, 0.167, 0, 0.15), 83.3333, 0),
      phasor(amperes('RB'), polar(83.33, 0.167, 120, 0.15), -41.6667, 72.1688),
      phasor(amperes('WN'), polar(83.33, 0.167, 60, 0.15), 41.6667, 72.1688),
    ],
  }),
  worked({
    id: 'K11 corrected',
    title: 'the same load with 22 µF beside it',
    // In rectangular form the book has 120.64 − j0.57358; its polar form is the right one.
    source: `${KUPHALDT}, ch. 11 "True, Reactive, and Apparent power"`,
    mark: 'corrected',
    frequency: 60,
    elements: [
      voltageSource('V1', '1', '0', 120),
      inductor('L', '1', '2', 0.16),
      resistor('R', '2', '0', 60),
      capacitor('C', '1', '0', 22e-6),
    ],
    figures: [phasor(seenBy('V1'), polar(120.64, 0.005, 0.2724, 0.00005), 120.636, 0.573577)],
  }),
  {
    id: 'K tank, coil damped',
    title: '100 mH with 100 Ω in series, beside 10 µF',
    // The book states 136.8 Hz and about 180 Hz for this tank and the next: grid points of a coarse sweep.
    source: `${KUPHALDT}, ch. 6, damped tank circuits`,
    mark: 'corrected',
    elements: [resistor('R', '1', '2', 100), inductor('L', '2', '0', 0.1), capacitor('C', '1', '0', 1e-5)],
    figures: [extreme('largest', ohms('1'), [100, 250], '136.173', '146.789')],
  },
  {
    id: 'K tank, capacitor damped',
    title: '100 mH beside 10 µF with 100 Ω in series',
    source: `${KUPHALDT}, ch. 6, damped tank circuits`,
    mark: 'corrected',
    elements: [inductor('L', '1', '0', 0.1), resistor('R', '1', '2', 100), capacitor('C', '2', '0', 1e-5)],
    figures: [extreme('largest', ohms('1'), [100, 250], '186.016', '146.789')],
  },
];
