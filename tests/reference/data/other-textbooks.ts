import { capacitor, currentSource, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { across, amperes, ONE_RADIAN, phasor, polar, volts, worked } from '../support/figures';
import { amplifier, coils, fixedImpedance } from '../support/parts';
import type { Circuit } from '../support/records';

/**
 * Worked examples of four more textbooks: printed figures with the tolerance of their last digits, or what a design
 * aims at; beside each an independent nodal solution to six digits [computed].
 */
const HAMBLEY = 'Hambley, Electrical Engineering: Principles and Applications, 5th ed. (executed notebook)';
const FRANCO =
  'Franco, Design with Operational Amplifiers and Analog Integrated Circuits, 3rd ed. (executed notebook)';

export const OTHER_EXAMPLES: readonly Circuit[] = [
  worked({
    id: 'H01',
    title: 'series RLC, peak phasors',
    source: `${HAMBLEY}, ex. 5.4`,
    mark: 'found',
    frequency: 500 * ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 100, 30),
      resistor('R', '1', '2', 100),
      inductor('L', '2', '3', 0.3),
      capacitor('C', '3', '0', 4e-5),
    ],
    figures: [
      phasor(across('R'), polar(70.71, 0.141, -15, 0.15), 68.3013, -18.3013),
      phasor(across('L'), polar(106.07, 0.212, 75, 0.15), 27.4519, 102.452),
      // The notebook has +75° by a wrong branch of the arctangent; the book's angle is this one.
      phasor(across('C'), polar(35.36, 0.0707, -105, 0.15), -9.15064, -34.1506),
    ],
  }),
  worked({
    id: 'H03',
    title: 'two-node with a voltage- and a current source',
    source: `${HAMBLEY}, ex. 5.6`,
    mark: 'found',
    frequency: 100 * ONE_RADIAN,
    elements: [
      currentSource('IS1', '0', '1', 2, -90),
      resistor('R', '1', '0', 10),
      fixedImpedance('C', '1', '2', 0, -5, 100 * ONE_RADIAN),
      fixedImpedance('L', '2', '0', 0, 10, 100 * ONE_RADIAN),
      currentSource('IS2', '0', '2', 1.5),
    ],
    figures: [phasor(volts('1'), polar(16.12, 0.0322, 29.74, 0.15), 14, 8)],
  }),
  worked({
    id: 'U01',
    title: 'inverting first-order low-pass, vin = 0.5 cos 2000t, R1 = 2k, R2 = 10k, C = 0.1 uF',
    source: 'Ulaby and Maharbiz, Circuits, problem 7.59 (published solution, excerpt)',
    mark: 'found',
    frequency: 2000 * ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 0.5),
      resistor('R1', '1', 'm', 2000),
      resistor('R2', 'm', 'o', 10000),
      capacitor('C', 'm', 'o', 1e-7),
      amplifier('A1', '0', 'm', 'o'),
    ],
    figures: [phasor(volts('o'), polar(1.12, 0.00224, 116.6, 0.15), -0.5, 1)],
  }),
  worked({
    id: 'S02',
    title: 'coupled coils j5/j6, M = j3, 12 V, -j4 in primary, 12 ohm in secondary',
    source: 'Alexander and Sadiku, Fundamentals of Electric Circuits, example 13.1',
    mark: 'memory',
    frequency: ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 12),
      fixedImpedance('C', '1', '2', 0, -4, ONE_RADIAN),
      coils('M1', ['2', '0', '3', '0'], 5, 6, 3),
      resistor('RL', '3', '0', 12),
    ],
    figures: [
      phasor(amperes('C'), polar(13.01, 0.026, -49.39, 0.15), 8.47059, -9.88235),
      phasor(amperes('RL'), polar(2.91, 0.00582, 14.04, 0.15), 2.82353, 0.705882),
    ],
  }),
  worked({
    id: 'F01',
    title: 'series RLC, output across R; vi = 10 cos(1000t + 45 deg)',
    source: `${FRANCO}, example 3.3`,
    mark: 'found',
    frequency: 1000 * ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 10, 45),
      inductor('L', '1', '2', 0.005),
      capacitor('C', '2', '3', 4e-5),
      resistor('R', '3', '0', 10),
    ],
    figures: [phasor(volts('3'), polar(4.472, 0.00894, 108.43, 0.15), -1.41421, 4.24264)],
  }),
  worked({
    id: 'F03',
    title: 'unity-gain KRC low-pass, f0 = 10 kHz, Q = 2: |H(f0)| = Q = 2, phase -90',
    source: `${FRANCO}, example 3.10`,
    mark: 'target',
    frequency: 10000,
    elements: [
      voltageSource('V1', '1', '0', 1),
      resistor('R1', '1', 'a', 5758.2799),
      capacitor('C1', 'a', 'o', 2e-8),
      resistor('R2', 'a', 'p', 2199.4672),
      capacitor('C2', 'p', '0', 1e-9),
      amplifier('A1', 'p', 'o', 'o'),
    ],
    figures: [phasor(volts('o'), polar(2, 0.004, -90, 0.05), 0, -2)],
  }),
  worked({
    id: 'F05',
    title: 'unity-gain KRC high-pass f0 = 200 Hz, Q = 1.5 (C 0.1 uF, R1 2.653 k, R2 23.87 k): |H(f0)| = 1.5, phase +90',
    source: `${FRANCO}, example 3.12`,
    mark: 'target',
    frequency: 200,
    elements: [
      voltageSource('V1', '1', '0', 1),
      capacitor('C1', '1', 'a', 1e-7),
      capacitor('C2', 'a', 'p', 1e-7),
      resistor('R1', 'a', 'o', 2652.582384864923),
      resistor('R2', 'p', '0', 23873.241463784303),
      amplifier('A1', 'p', 'o', 'o'),
    ],
    figures: [phasor(volts('o'), polar(1.5, 0.003, 90, 0.05), 0, 1.5)],
  }),
  worked({
    id: 'F07',
    title: 'multiple-feedback low-pass H0 = -2, f0 = 10 kHz, Q = 4 (R1 1.194 k, R2 530.5, R3 2.387 k, C1 0.2 uF, C2 1 nF): |H(f0)| = H0*Q = 8, phase +90',
    source: `${FRANCO}, example 3.16`,
    mark: 'target',
    frequency: 10000,
    elements: [
      voltageSource('V1', '1', '0', 1),
      resistor('R1', '1', 'a', 1193.662073189215),
      capacitor('C1', 'a', '0', 2.0000000000000002e-7),
      resistor('R3', 'a', 'o', 2387.32414637843),
      resistor('R2', 'a', 'm', 530.5164769729843),
      capacitor('C2', 'm', 'o', 1e-9),
      amplifier('A1', '0', 'm', 'o'),
    ],
    figures: [phasor(volts('o'), polar(8, 0.016, 90, 0.1), 0, 8)],
  }),
];
