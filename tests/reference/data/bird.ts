import { capacitor, currentSource, inductor, resistor, voltageSource } from '../../solver/support/networks';
import {
  across,
  amperes,
  ONE_RADIAN,
  phasor,
  polar,
  rectangular,
  seenBy,
  volts,
  worked,
} from '../support/figures';
import { coils, fixedImpedance } from '../support/parts';
import type { Circuit, Figure } from '../support/records';

/**
 * Worked examples of a textbook, as an executed notebook of its figures prints them, with the tolerance of the last
 * digits [found]; beside each an independent nodal solution to six digits [computed]. Where the notebook is wrong, the
 * figure is the computed one [corrected].
 */
const BIRD = 'Bird, Electrical Circuit Theory and Technology, 2nd ed. 2003';

/** Matched, a tenth of the voltage, and the two resistances to the digits given. */
function padOf20Decibels(series: string, shunt: string): readonly Figure[] {
  return [
    { kind: 'value', element: 'Ra', printed: series },
    { kind: 'value', element: 'Rb', printed: shunt },
    { kind: 'exact', output: volts('in'), frequency: 1000, value: { re: 1, im: 0 }, units: 4 },
    { kind: 'exact', output: volts('out'), frequency: 1000, value: { re: 0.1, im: 0 }, units: 4 },
  ];
}

export const BIRD_EXAMPLES: readonly Circuit[] = [
  worked({
    id: 'B02',
    title: 'three-phase star load, no neutral (3+j4 per phase, 415 V line)',
    source: `${BIRD}, ch. 31 ex. 3`,
    mark: 'found',
    frequency: ONE_RADIAN,
    elements: [
      voltageSource('V1', 'r', 'y', 415, 120),
      voltageSource('V2', 'y', 'b', 415),
      fixedImpedance('ZR', 'r', 'n', 3, 4, ONE_RADIAN),
      fixedImpedance('ZY', 'y', 'n', 3, 4, ONE_RADIAN),
      fixedImpedance('ZB', 'b', 'n', 3, 4, ONE_RADIAN),
      // Only a reference for the floating star point; it carries no current.
      resistor('RG', 'n', '0', 1e9),
    ],
    figures: [
      phasor(amperes('ZR'), rectangular(38.34, 28.75, 0.00767), 38.3361, 28.752),
      phasor(amperes('ZY'), rectangular(5.73, -47.58, 0.00952), 5.73197, -47.576),
      phasor(amperes('ZB'), rectangular(-44.07, 18.82, 0.00881), -44.068, 18.824),
    ],
  }),
  worked({
    id: 'B04',
    title: 'two sources, one node',
    source: `${BIRD}, ch. 30 ex. 1 and ch. 31 ex. 6`,
    mark: 'found',
    frequency: ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 100),
      resistor('R1', '1', 'n', 25),
      resistor('R2', 'n', '0', 20),
      voltageSource('V2', '2', '0', 50, 90),
      resistor('R3', '2', 'n', 10),
    ],
    figures: [
      phasor(amperes('R1'), rectangular(3.16, -1.05, 0.006), 3.15789, -1.05263),
      phasor(amperes('R2'), rectangular(1.05, 1.32, 0.006), 1.05263, 1.31579),
      phasor(amperes('R3'), rectangular(-2.11, 2.37, 0.006), -2.10526, 2.36842),
    ],
  }),
  worked({
    id: 'B06',
    title: 'current source, two nodes, open-circuit p.d.',
    source: `${BIRD}, ch. 31 ex. 8`,
    mark: 'found',
    frequency: ONE_RADIAN,
    elements: [
      currentSource('I1', '0', '1', 25),
      resistor('R1', '1', 'x', 4),
      fixedImpedance('Z2', 'x', '0', 0, 3, ONE_RADIAN),
      resistor('R3', '1', '2', 5),
      fixedImpedance('Z4', '2', '0', 0, 10, ONE_RADIAN),
      fixedImpedance('Z5', '2', '0', 0, 20, ONE_RADIAN),
    ],
    figures: [phasor(volts('x', '2'), rectangular(-16.16, -15.05, 0.006), -16.1624, -15.0478)],
  }),
  worked({
    id: 'B08',
    title: 'divider with complex load',
    source: `${BIRD}, ch. 33 ex. 1`,
    mark: 'found',
    frequency: ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 200),
      resistor('R1', '1', '2', 5000),
      resistor('R2', '2', '0', 20000),
      resistor('R4', '2', '3', 150000),
      fixedImpedance('ZC', '3', '0', 0, -120000, ONE_RADIAN),
    ],
    figures: [
      phasor(amperes('R4'), polar(0.00082, 1.64e-6), 0.000646448, 0.000503725),
      phasor(across('R4'), polar(122.93, 0.246), 96.9672, 75.5588),
    ],
  }),
  worked({
    id: 'B10',
    title: 'mutual inductor, open secondary',
    source: `${BIRD}, ch. 43 ex. 8`,
    mark: 'found',
    frequency: 2500 * ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 8),
      resistor('R', '1', '2', 15),
      coils('M1', ['2', '0', '3', '0'], 0.005, 0.005, 0.0001),
      resistor('RL', '3', '0', 1e12),
    ],
    figures: [phasor(volts('3'), polar(0.102, 0.0005, 50.19, 0.15), 0.0655738, 0.0786885)],
  }),
  worked({
    id: 'B12',
    title: 'coupled coils with capacitor in secondary, reflected impedance',
    source: `${BIRD}, ch. 43 ex. 11`,
    mark: 'found',
    frequency: 500 * ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 50),
      resistor('R1', '1', '2', 300),
      inductor('L1', '2', '3', 0.5),
      coils('M1', ['3', '0', '4', '0'], 0.2, 0.3, 0.2),
      resistor('R2', '4', '5', 500),
      capacitor('C', '5', '0', 5e-6),
    ],
    figures: [
      phasor(seenBy('V1'), rectangular(316, 358, 0.0716), 316, 358),
      // The currents are printed to two decimals; the impedance and the angles carry the precision.
      phasor(amperes('R1'), polar(0.1, 0.006, -48.57, 0.15), 0.0692922, -0.0785019),
      phasor(amperes('R2'), polar(0.02, 0.002, 68, 0.15), 0.00701693, 0.0173669),
    ],
  }),
  worked({
    id: 'B14',
    title: 'coupled coils, ex. 15',
    source: `${BIRD}, ch. 43 ex. 15`,
    mark: 'found',
    frequency: 150 * ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 50),
      resistor('R1', '1', '2', 25),
      coils('M1', ['2', '0', '3', '0'], 0.2, 0.4, 0.1),
      resistor('R2', '3', '0', 45),
    ],
    figures: [
      phasor(amperes('R1'), polar(1.3, 0.05, -45.84, 0.15), 0.905405, -0.932432),
      phasor(amperes('R2'), polar(0.26, 0.005, -8.97, 0.15), 0.256757, -0.0405405),
    ],
  }),
  worked({
    id: 'B15b',
    title: 'same, one winding reversed',
    source: `${BIRD}, ch. 43 ex. 16(b)`,
    mark: 'found',
    frequency: 150 * ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 50),
      resistor('R1', '1', '2', 25),
      coils('M1', ['2', 'c', '3', 'c'], 0.2, 0.4, -0.1),
      resistor('R2', '3', '0', 45),
      resistor('RC', 'c', 'd', 8),
      inductor('LC', 'd', '0', 0.1),
    ],
    figures: [
      phasor(amperes('R1'), polar(0.89, 0.005, -54.42, 0.15), 0.519212, -0.725817),
      phasor(amperes('R2'), polar(0.08, 0.005, -109.17, 0.15), -0.0255328, -0.0734258),
    ],
  }),
  worked({
    id: 'B18',
    title: 'series RLC, p.d. across C at resonance',
    source: `${BIRD}, ch. 28 ex. 5`,
    mark: 'found',
    frequency: 11180.339887498949 * ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 12),
      resistor('R', '1', '2', 80),
      inductor('L', '2', '3', 0.02),
      capacitor('C', '3', '0', 4e-7),
    ],
    figures: [phasor(across('C'), polar(33.54, 0.0671), 0, -33.541)],
  }),
  worked({
    id: 'B20',
    title: 'parallel (coil 10 ohm 5 mH) || 0.25 uF at its unity-power-factor frequency',
    source: `${BIRD}, ch. 29 ex. 1`,
    mark: 'found',
    frequency: 4490.31,
    elements: [
      voltageSource('V1', '1', '0', 50),
      resistor('R', '1', '2', 10),
      inductor('L', '2', '0', 0.005),
      capacitor('C', '1', '0', 2.5e-7),
    ],
    figures: [phasor(seenBy('V1'), polar(2000, 4, 0, 0.05), 2000, 0.0440638)],
  }),
  worked({
    id: 'B22',
    title: 'symmetrical T pad 300/450/300 between 600 ohm: image-matched, 9.54 dB',
    source: `${BIRD}, ch. 41 ex. 10`,
    mark: 'found',
    frequency: ONE_RADIAN,
    elements: [
      currentSource('I1', '0', '1', 1),
      resistor('Ra', '1', '2', 300),
      resistor('Rs', '2', '0', 450),
      resistor('Rb', '2', '3', 300),
      resistor('RL', '3', '0', 600),
    ],
    figures: [
      phasor(volts('1'), polar(600, 1.2, 0, 0.15), 600, 0),
      phasor(amperes('RL'), polar(0.3334264, 0.000667, 0, 0.15), 0.333333, 0),
    ],
  }),
  worked({
    id: 'B13',
    title: 'coupled coils, primary 10 + j50 Ω, secondary 60 + j50 Ω, j10 Ω between them',
    // The notebook prints 0.85 − j4.77 A and −0.54 + j0.31 A: it has Z1·Z2 − |ωM|² for Z1·Z2 + (ωM)².
    source: `${BIRD}, ch. 43 ex. 13`,
    mark: 'corrected',
    frequency: ONE_RADIAN,
    elements: [
      voltageSource('V1', '1', '0', 250),
      resistor('R1', '1', '2', 10),
      coils('M1', ['2', '0', '3', '0'], 50, 50, 10),
      resistor('R2', '3', '0', 60),
    ],
    figures: [
      phasor(amperes('R1'), rectangular(1.08134, -4.84183, 0.000005), 1.08134, -4.84183),
      phasor(amperes('R2'), rectangular(0.564881, -0.29051, 0.0000005), 0.564881, -0.29051),
    ],
  }),
  // The notebook computes these two with 2.3 for ln 10.
  {
    id: 'B41.8',
    title: 'symmetrical T pad of 20 dB, 600 Ω',
    source: `${BIRD}, ch. 41 ex. 8`,
    mark: 'corrected',
    elements: [
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'in', 600),
      resistor('Ra', 'in', 'x', (600 * 9) / 11),
      resistor('Rb', 'x', '0', (600 * 20) / 99),
      resistor('Rc', 'x', 'out', (600 * 9) / 11),
      resistor('RL', 'out', '0', 600),
    ],
    figures: padOf20Decibels('490.909', '121.212'),
  },
  {
    id: 'B41.9',
    title: 'symmetrical π pad of 20 dB, 600 Ω',
    source: `${BIRD}, ch. 41 ex. 9`,
    mark: 'corrected',
    elements: [
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'in', 600),
      resistor('Rb', 'in', '0', (600 * 11) / 9),
      resistor('Ra', 'in', 'out', (600 * 99) / 20),
      resistor('Rc', 'out', '0', (600 * 11) / 9),
      resistor('RL', 'out', '0', 600),
    ],
    figures: padOf20Decibels('2970', '733.333'),
  },
];
