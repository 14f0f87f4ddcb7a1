import { capacitor, currentSource, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { amperes, crossing, ohms, phase, reading, size, watts } from '../support/figures';
import type { Circuit } from '../support/records';

/**
 * Starter networks of the library: power at 50 Hz, by phase. The values are the project's own; each figure was computed
 * with an independent modified-nodal phasor solver [computed].
 */
const OMEGA = 2 * Math.PI * 50;

const SUPPLY = [
  resistor('Rs', 'b', 'x', (OMEGA * 56.59e-6) / 8),
  inductor('Ls', 'x', '0', 56.59e-6),
  capacitor('Cq', 'b', '0', 1989.4e-6),
];
const HARMONIC = { source: 'h = √(S_sc/Q_c) [found]', mark: 'computed' } as const;

/** p = 7 %, 25 kvar net on 400 V. */
const P46 = 0.07;
const X46 = 400 ** 2 / 25e3 / (1 - P46);
const [C46, L46] = [1 / (OMEGA * X46), (P46 * X46) / OMEGA];
const SENT = 20e3 / Math.sqrt(3);

export const POWER_STARTERS: readonly Circuit[] = [
  {
    ...HARMONIC,
    id: 'ST-45',
    title: 'supply inductance with a capacitor bank, 9 MVA, 100 kvar, 400 V: parallel resonance',
    elements: [
      inductor('Ls', 'b', '0', 400 ** 2 / 9e6 / OMEGA),
      capacitor('Cq', 'b', '0', 100e3 / (OMEGA * 400 ** 2)),
      // Only so that there is an impedance at resonance.
      resistor('R9', 'b', '0', 1e9),
    ],
    figures: [
      { kind: 'value', element: 'Ls', printed: '56.59e-6' },
      { kind: 'value', element: 'Cq', printed: '1989.4e-6' },
      crossing('im', ohms('b'), 0, [300, 700], '474.3'),
      // The 9.487th harmonic, to half a thousandth.
      { ...crossing('im', ohms('b'), 0, [300, 700], '474.35'), within: 0.0005 * 50 },
    ],
  },
  {
    ...HARMONIC,
    id: 'ST-45 without load',
    title: 'the same with its losses: how much a harmonic’s current is amplified',
    elements: [currentSource('I1', '0', 'b', 1), ...SUPPLY],
    figures: [size(amperes('Ls'), 50 * Math.sqrt(90), '75.9')],
  },
  {
    ...HARMONIC,
    id: 'ST-45 with load',
    title: 'the same with a load of 200 kW',
    elements: [currentSource('I1', '0', 'b', 1), ...SUPPLY, resistor('RL', 'b', '0', 400 ** 2 / 200e3)],
    figures: [size(amperes('Ls'), 50 * Math.sqrt(90), '4.46'), size(amperes('Ls'), 550, '2.33')],
  },
  {
    id: 'ST-46',
    title: 'detuned step, p = 7 %, 25 kvar net, 400 V',
    source: 'f_t = f/√p; U_C = U/(1 − p) [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', '1', '0', 400 / Math.sqrt(3)),
      inductor('L1', '1', 'x', L46),
      capacitor('C1', 'x', '0', C46),
    ],
    figures: [
      { kind: 'value', element: 'L1', printed: '1.53e-3' },
      size(amperes('C1'), 50, '36.08'),
      // From line to line.
      reading('magnitude', 'x', 50, '430.1', 1 / Math.sqrt(3)),
      // Of three phases.
      reading('im', watts('V1'), 50, '25000', 1 / 3),
    ],
  },
  {
    id: 'ST-46 tuning',
    title: 'its tuning',
    source: 'f_t = f/√p',
    mark: 'computed',
    elements: [inductor('L1', '1', 'x', L46), capacitor('C1', 'x', '0', C46)],
    figures: [crossing('im', ohms('1'), 0, [100, 400], '188.98')],
  },
  {
    id: 'ST-46 aged',
    title: 'its tuning with 20 % of the capacitance lost',
    source: 'f_t = f/√p',
    mark: 'computed',
    elements: [inductor('L1', '1', 'x', L46), capacitor('C1', 'x', '0', 0.8 * C46)],
    figures: [crossing('im', ohms('1'), 0, [100, 400], '211.3')],
  },
  {
    id: 'ST-49',
    title: 'transformer T-equivalent, 10 kVA, 400 V, at full load and unity power factor',
    source: 'short-circuit and no-load test',
    mark: 'computed',
    elements: [
      voltageSource('V1', 'p', '0', 400),
      resistor('R1', 'p', 'a', 0.144),
      inductor('L1', 'a', 'm', 0.9167e-3),
      resistor('Rfe', 'm', '0', 2667),
      inductor('Lm', 'm', '0', 2.0985),
      resistor('R2', 'm', 'b', 0.144),
      inductor('L2', 'b', 'out', 0.9167e-3),
      resistor('RL', 'out', '0', 16),
    ],
    figures: [
      // 1.877 % less than the 400 V sent.
      reading('magnitude', 'out', 50, '98.123', 4),
      // The efficiency in per cent: the power of the load against that delivered.
      reading('re', { of: 'powerShare', element: 'RL', source: 'V1' }, 50, '97.634', 0.01),
    ],
  },
  {
    id: 'ST-49 by its tests',
    title: 'the values of the same: 1.8 % + j3.6 % of 16 Ω in two halves, 60 W and 2.5 % of 25 A without load',
    source: 'short-circuit and no-load test',
    mark: 'computed',
    elements: [
      resistor('R1', 'p', 'a', (0.018 * 16) / 2),
      inductor('L1', 'a', 'm', (0.036 * 16) / 2 / OMEGA),
      resistor('Rfe', 'm', '0', 400 ** 2 / 60),
      inductor('Lm', 'm', '0', 400 / (OMEGA * Math.sqrt((0.025 * 25) ** 2 - (60 / 400) ** 2))),
    ],
    figures: [
      { kind: 'value', element: 'R1', printed: '0.144' },
      { kind: 'value', element: 'L1', printed: '0.9167e-3' },
      { kind: 'value', element: 'Rfe', printed: '2.667e3' },
      { kind: 'value', element: 'Lm', printed: '2.0985' },
    ],
  },
  {
    id: 'ST-50',
    title: 'nominal-π line, 12 km, 20 kV',
    source: 'nominal π',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', SENT),
      capacitor('C1', 's', '0', 61.12e-9),
      resistor('R1', 's', 'x', 3.84),
      inductor('L1', 'x', 'r', 13.751e-3),
      capacitor('C2', 'r', '0', 61.12e-9),
      resistor('RL', 'r', 'y', 108),
      inductor('LL', 'y', '0', 166.5e-3),
    ],
    figures: [
      // 4.267 % less than the voltage sent.
      reading('magnitude', 'r', 50, '95.733', SENT / 100),
      phase('r', 50, '-1.016'),
    ],
  },
];
