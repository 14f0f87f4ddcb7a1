import type { Element } from '@/solver';
import { capacitor, currentSource, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { amperes, crossing, extreme, level, ohms, reading, shown, size, watts } from '../support/figures';
import type { Circuit, Figure, Output } from '../support/records';

/**
 * Starter networks of the library: interference filters and power entry. The values are the project's own; each figure
 * was computed with an independent modified-nodal phasor solver [computed].
 */

/** The converter's own input resistance, 18 V² / 40 W: 8.1 Ω. */
const CONVERTER_OHMS = 18 ** 2 / 40;

function insertion(source: number, load: number): Output {
  return { of: 'insertion', from: 'in', to: 'out', source, load };
}

const MAINS_FILTER: readonly Element[] = [
  capacitor('C1', 'in', '0', 470e-9),
  inductor('L1', 'in', 'x', 1e-3),
  resistor('Rl', 'x', 'out', 0.15),
  capacitor('C2', 'out', '0', 470e-9),
];

/** Where a reading in decibels is smallest: an insertion loss below zero is a gain. */
function leastDecibels(output: Output, between: readonly [number, number], at: string, value: string): Figure {
  return { kind: 'smallest', read: 'decibels', output, between, at: shown(at), value: shown(value) };
}

export const INTERFERENCE_STARTERS: readonly Circuit[] = [
  {
    id: 'ST-28',
    title: 'LC filter with parallel R–C damping for a 40 W converter, 18 to 32 V',
    source: 'Middlebrook 1976; Erickson [memory]',
    mark: 'computed',
    elements: [
      inductor('L1', '0', 'out', 22e-6),
      capacitor('C1', 'out', '0', 10e-6),
      resistor('Rd', 'out', 'x', 1.2),
      capacitor('Cd', 'x', '0', 47e-6),
    ],
    figures: [
      extreme('largest', ohms('out'), [2e3, 20e3], '8.29e3', '1.328'),
      { kind: 'largest', read: 'decibels', output: ohms('out'), against: CONVERTER_OHMS, between: [2e3, 20e3], value: shown('-15.7') },
    ],
  },
  {
    id: 'ST-28 undamped',
    title: 'the same without damping, 20 mΩ in the inductor and 5 mΩ in the capacitor',
    source: 'Middlebrook 1976 [memory]',
    mark: 'computed',
    elements: [
      resistor('Rl', '0', 'y', 20e-3),
      inductor('L1', 'y', 'out', 22e-6),
      capacitor('C1', 'out', 'z', 10e-6),
      resistor('Rc', 'z', '0', 5e-3),
    ],
    figures: [
      extreme('largest', ohms('out'), [5e3, 20e3], '10.73e3', '88'),
      { kind: 'largest', read: 'decibels', output: ohms('out'), against: CONVERTER_OHMS, between: [5e3, 20e3], value: shown('20.7') },
    ],
  },
  {
    id: 'ST-28 current',
    title: 'what of the converter’s current gets into the supply',
    source: 'current divider',
    mark: 'computed',
    elements: [
      currentSource('I1', 'out', '0', 1),
      inductor('L1', '0', 'out', 22e-6),
      capacitor('C1', 'out', '0', 10e-6),
      resistor('Rd', 'out', 'x', 1.2),
      capacitor('Cd', 'x', '0', 47e-6),
    ],
    figures: [level(amperes('L1'), 150e3, '-45.82')],
  },
  {
    id: 'ST-29',
    title: 'single-stage π mains filter, three termination sets',
    source: 'insertion loss as CISPR 17 defines it',
    mark: 'computed',
    elements: MAINS_FILTER,
    figures: [
      level(insertion(50, 50), 150e3, '73.28'),
      level(insertion(0.1, 100), 150e3, '52.39'),
      leastDecibels(insertion(0.1, 100), [5e3, 9e3], '6.94e3', '-6.86'),
      leastDecibels(insertion(100, 0.1), [5e3, 9e3], '6.94e3', '-6.86'),
      // Between equal resistances nothing passive amplifies: the least loss is that of 0.15 Ω, 20 lg 1.0015.
      {
        kind: 'smallest',
        mark: 'corrected',
        read: 'decibels',
        output: insertion(50, 50),
        between: [10, 1e6],
        value: shown('0.0130'),
      },
    ],
  },
  {
    id: 'ST-30',
    title: 'common-mode filter, 25 Ω, noise through 100 pF',
    source: 'common-mode equivalent',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      capacitor('Cp', 's', 'a', 100e-12),
      capacitor('Cy', 'a', '0', 4.4e-9),
      inductor('Lcm', 'a', 'out', 4.7e-3),
      resistor('RL', 'out', '0', 25),
      // The same noise without the filter.
      capacitor('Cp2', 's', 'bare', 100e-12),
      resistor('RL2', 'bare', '0', 25),
    ],
    figures: [level({ of: 'ratio', node: 'bare', to: 'out' }, 150e3, '25.00')],
  },
  {
    id: 'ST-30 resonance',
    title: 'its choke with its capacitors',
    source: '1/(2π√(LC))',
    mark: 'computed',
    elements: [capacitor('Cy', 'a', '0', 4.4e-9), inductor('Lcm', 'a', '0', 4.7e-3), resistor('R9', 'a', '0', 1e9)],
    figures: [crossing('im', ohms('a'), 0, [20e3, 50e3], '35.0e3')],
  },
  {
    id: 'ST-30 earth current',
    title: 'one capacitor of 2.2 nF + 20 % at 253 V, 60 Hz',
    source: 'I = ωCU',
    mark: 'computed',
    elements: [voltageSource('V1', '1', '0', 253), capacitor('C1', '1', '0', 1.2 * 2.2e-9)],
    figures: [size(amperes('C1'), 60, '251.8e-6')],
  },
  {
    id: 'ST-31',
    title: 'bleeder of two X capacitors of 470 nF + 20 %, 264 V',
    source: 't = RC ln(U/U_lim)',
    mark: 'computed',
    elements: [
      voltageSource('V1', '1', '0', 264),
      capacitor('C1', '1', '0', 1.2 * 2 * 470e-9),
      resistor('R1', '1', '0', 820e3),
    ],
    figures: [reading('re', watts('R1'), 50, '0.085')],
  },
  {
    id: 'ST-31 unplugged',
    title: 'the same left to itself at the crest of 264 V',
    source: 't = RC ln(U/U_lim)',
    mark: 'computed',
    elements: [capacitor('C1', '1', '0', 1.2 * 2 * 470e-9), resistor('R1', '1', '0', 820e3)],
    figures: [{ kind: 'decay', node: '1', from: 264 * Math.SQRT2, to: 60, printed: '1.691' }],
  },
  {
    id: 'ST-31 to 34 V',
    title: 'the same with the largest bleeder that reaches 34 V in 1 s',
    source: 't = RC ln(U/U_lim)',
    mark: 'computed',
    elements: [capacitor('C1', '1', '0', 1.2 * 2 * 470e-9), resistor('R1', '1', '0', 370e3)],
    figures: [{ kind: 'decay', node: '1', from: 264 * Math.SQRT2, to: 34, printed: '1.00' }],
  },
  {
    id: 'ST-32',
    title: 'RC snubber on an 18 MHz ringing node',
    source: 'R ≈ √(L/C), C ≈ 3Cp',
    mark: 'computed',
    elements: [
      capacitor('Cp', 'n', '0', 150e-12),
      inductor('Lp', 'n', '0', 521e-9),
      resistor('Rd', 'n', 'x', 56),
      capacitor('Cd', 'x', '0', 470e-12),
    ],
    figures: [extreme('largest', ohms('n'), [5e6, 30e6], '13.9e6', '65.8')],
  },
  {
    id: 'ST-32 bare',
    title: 'the ringing node without its snubber',
    source: '1/(2π√(LC)), √(L/C)',
    mark: 'computed',
    elements: [capacitor('Cp', 'n', '0', 150e-12), inductor('Lp', 'n', '0', 521e-9), resistor('R9', 'n', '0', 1e9)],
    figures: [crossing('im', ohms('n'), 0, [10e6, 30e6], '18e6')],
  },
  {
    id: 'ST-32 reactance',
    title: 'its inductance at that frequency',
    source: '√(L/C)',
    mark: 'computed',
    elements: [inductor('Lp', 'n', '0', 521e-9)],
    figures: [size(ohms('n'), 1 / (2 * Math.PI * Math.sqrt(521e-9 * 150e-12)), '58.9')],
  },
];
