import type { Element } from '@/solver';
import { capacitor, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { crossing, extreme, level, ohms, phase, reading, root, shown, size, volts, watts } from '../support/figures';
import type { Circuit, Figure } from '../support/records';

/**
 * Starter networks of the library: loudspeaker crossovers and equivalents. The values are the project's own; each figure
 * was computed with an independent modified-nodal phasor solver [computed]. Formulas are the published classics named
 * with them [memory] unless another mark is said.
 */

/** A tweeter: 3.4 Ω, resonant at 900 Hz, Q_ms 2.1, Q_es 1.3. */
const [RE, QMS, QES] = [3.4, 2.1, 1.3];
const OMEGA_S = 2 * Math.PI * 900;
const [C_MES, L_CES] = [QES / (OMEGA_S * RE), RE / (OMEGA_S * QES)];
const TWEETER: readonly Element[] = [
  resistor('Re', 's', 'm', RE),
  resistor('Res', 'm', '0', (RE * QMS) / QES),
  capacitor('Cmes', 'm', '0', C_MES),
  inductor('Lces', 'm', '0', L_CES),
];

/** Whatever a passive arm compensates, both ends of the band show R_e alone. */
function compensated(id: string, title: string, r: number, l: number, c: number, figures: Circuit['figures']): Circuit {
  return {
    id,
    title: `resonance compensation of a tweeter, ${title}`,
    source: 'R = Re(1 + Qes/Qms), L = Cmes·Re², C = Lces/Re² [found]',
    mark: 'computed',
    elements: [...TWEETER, resistor('R1', 's', 'x', r), inductor('L1', 'x', 'y', l), capacitor('C1', 'y', '0', c)],
    figures,
  };
}

const OMEGA_48 = 2 * Math.PI * 48;

const OMEGA_2200 = 2 * Math.PI * 2200;

/** 20 W into the pad of 6.016 Ω. */
const PAD_OHMS = 2.4 + (9.1 * 6) / (9.1 + 6);

export const LOUDSPEAKER_STARTERS: readonly Circuit[] = [
  {
    id: 'ST-20',
    title: 'two-way second-order Linkwitz–Riley, 6 Ω, 2.2 kHz',
    source: 'L = 2R/ω, C = 1/(2Rω) (Linkwitz, JAES 1976) [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      inductor('L1', 's', 'lp', 0.86e-3),
      capacitor('C1', 'lp', '0', 6e-6),
      resistor('R1', 'lp', '0', 6),
      capacitor('C2', 's', 'hp', 6e-6),
      inductor('L2', 'hp', '0', 0.86e-3),
      resistor('R2', 'hp', '0', 6),
    ],
    figures: [
      level('lp', 2200, '-5.94'),
      phase('lp', 2200, '-89.6'),
      level('hp', 2200, '-6.06'),
      phase('hp', 2200, '90.4'),
      level(volts('lp', 'hp'), 2200, '0.020'),
      level({ of: 'sum', nodes: ['lp', 'hp'] }, 2200, '-42.99'),
      extreme('smallest', { of: 'impedanceSeen', element: 'V1' }, [20, 20e3], undefined, '6.0'),
      extreme('largest', { of: 'impedanceSeen', element: 'V1' }, [20, 20e3], undefined, '11.9'),
    ],
  },
  {
    id: 'ST-20 ideal',
    title: 'the same with ideal values',
    source: 'L = 2R/ω, C = 1/(2Rω) (Linkwitz, JAES 1976) [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      inductor('L1', 's', 'lp', 12 / OMEGA_2200),
      capacitor('C1', 'lp', '0', 1 / (12 * OMEGA_2200)),
      resistor('R1', 'lp', '0', 6),
      capacitor('C2', 's', 'hp', 1 / (12 * OMEGA_2200)),
      inductor('L2', 'hp', '0', 12 / OMEGA_2200),
      resistor('R2', 'hp', '0', 6),
    ],
    figures: [
      { kind: 'value', element: 'L1', printed: '0.8681e-3' },
      { kind: 'value', element: 'C1', printed: '6.0286e-6' },
      // The ways with one reversed sum to an all-pass, of one voltage at all frequencies.
      ...[100, 1000, 2200, 5000, 20e3].map(
        (frequency): Figure => level(volts('lp', 'hp'), frequency, '0.000000000000'),
      ),
    ],
  },
  {
    id: 'ST-20 open',
    title: 'the low-pass way with its driver disconnected, 0.3 Ω in the inductor',
    source: 'series resonance',
    mark: 'computed',
    elements: [
      resistor('Rdc', 's', 'x', 0.3),
      inductor('L1', 'x', 'lp', 0.86e-3),
      capacitor('C1', 'lp', '0', 6e-6),
    ],
    figures: [extreme('smallest', ohms('s'), [1e3, 4e3], '2216', '0.30')],
  },
  {
    id: 'ST-21',
    title: 'two-way third-order Butterworth, 8 Ω, 1.6 kHz',
    source: 'LP 3R/2ω, 4/(3Rω), R/2ω; HP 2/(3Rω), 3R/4ω, 2/(Rω)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      inductor('L1', 's', 'a', 1.2e-3),
      capacitor('C1', 'a', '0', 16.5e-6),
      inductor('L2', 'a', 'lp', 0.4e-3),
      resistor('R1', 'lp', '0', 8),
      capacitor('C2', 's', 'b', 8.2e-6),
      inductor('L3', 'b', '0', 0.6e-3),
      capacitor('C3', 'b', 'hp', 25e-6),
      resistor('R2', 'hp', '0', 8),
    ],
    figures: [
      level('lp', 1600, '-3.04'),
      level('hp', 1600, '-3.12'),
      level({ of: 'sum', nodes: ['lp', 'hp'] }, 1600, '-0.079'),
    ],
  },
  {
    id: 'ST-22',
    title: 'voice-coil impedance compensation',
    source: 'R = Re, C = Le/Re²',
    mark: 'computed',
    elements: [
      resistor('Re', 's', 'x', 5.6),
      inductor('Le', 'x', '0', 0.62e-3),
      resistor('R1', 's', 'y', 5.6),
      capacitor('C1', 'y', '0', 20e-6),
    ],
    figures: [
      extreme('smallest', ohms('s'), [100, 20e3], undefined, '5.568'),
      extreme('largest', ohms('s'), [100, 20e3], undefined, '5.60'),
    ],
  },
  {
    id: 'ST-22 ideal',
    title: 'the same with the ideal capacitor',
    source: 'R = Re, C = Le/Re²',
    mark: 'computed',
    elements: [
      resistor('Re', 's', 'x', 5.6),
      inductor('Le', 'x', '0', 0.62e-3),
      resistor('R1', 's', 'y', 5.6),
      capacitor('C1', 'y', '0', 0.62e-3 / 5.6 ** 2),
    ],
    figures: [
      { kind: 'value', element: 'C1', printed: '19.77e-6' },
      ...[100, 1e3, 20e3].map(
        (frequency): Figure => ({ kind: 'exact', output: ohms('s'), frequency, value: { re: 5.6, im: 0 }, units: 16 }),
      ),
    ],
  },
  {
    id: 'ST-22 coil',
    title: 'the voice coil without compensation',
    source: '√(Re² + (ωLe)²)',
    mark: 'computed',
    elements: [resistor('Re', 's', 'x', 5.6), inductor('Le', 'x', '0', 0.62e-3)],
    figures: [size(ohms('s'), 20e3, '78.1')],
  },
  {
    id: 'ST-23',
    title: 'moving-coil driver equivalent circuit (48 Hz, Q_ms 4.2, Q_es 0.45)',
    source: 'Res = Re·Qms/Qes, C = Qes/(ωs·Re), L = Re/(ωs·Qes) (Small, JAES 1972) [memory]',
    mark: 'computed',
    elements: [
      resistor('Re', 's', 'x', 5.8),
      inductor('Le', 'x', 'm', 0.7e-3),
      resistor('Res', 'm', '0', 54.13),
      inductor('Lces', 'm', '0', 42.74e-3),
      capacitor('Cmes', 'm', '0', 257.3e-6),
    ],
    figures: [
      extreme('largest', ohms('s'), [40, 60], '47.98', '59.93'),
      extreme('smallest', ohms('s'), [200, 800], '397', '5.849'),
    ],
  },
  {
    id: 'ST-23 ideal',
    title: 'the same driver with its values by the formulas',
    source: 'Res = Re·Qms/Qes, C = Qes/(ωs·Re), L = Re/(ωs·Qes) (Small, JAES 1972) [memory]',
    mark: 'computed',
    elements: [
      resistor('Re', 's', 'm', 5.8),
      resistor('Res', 'm', '0', (5.8 * 4.2) / 0.45),
      inductor('Lces', 'm', '0', 5.8 / (OMEGA_48 * 0.45)),
      capacitor('Cmes', 'm', '0', 0.45 / (OMEGA_48 * 5.8)),
    ],
    figures: [
      { kind: 'value', element: 'Res', printed: '54.13' },
      { kind: 'value', element: 'Lces', printed: '42.74e-3' },
      { kind: 'value', element: 'Cmes', printed: '257.3e-6' },
    ],
  },
  {
    id: 'ST-23 without Le',
    title: 'the same driver below its voice coil’s frequency, on an amplifier',
    source: 'Qts = Qms·Qes/(Qms + Qes)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('Re', 's', 'm', 5.8),
      resistor('Res', 'm', '0', 54.13),
      inductor('Lces', 'm', '0', 42.74e-3),
      capacitor('Cmes', 'm', '0', 257.3e-6),
    ],
    figures: [{ kind: 'resonance', output: volts('m'), source: 'V1', quality: shown('0.4065') }],
  },
  {
    id: 'ST-24 tweeter',
    title: 'a tweeter without compensation',
    source: 'Re(1 + Qms/Qes)',
    mark: 'computed',
    elements: TWEETER,
    figures: [size(ohms('s'), 900, '8.89')],
  },
  compensated('ST-24 ideal', 'ideal', RE * (1 + QES / QMS), C_MES * RE ** 2, L_CES / RE ** 2, [
    { kind: 'value', element: 'R1', printed: '5.505' },
    { kind: 'value', element: 'L1', printed: '0.7816e-3' },
    { kind: 'value', element: 'C1', printed: '40.01e-6' },
    ...[100, 500, 900, 2000, 10e3].map(
      (frequency): Figure => ({ kind: 'exact', output: ohms('s'), frequency, value: { re: RE, im: 0 }, units: 32 }),
    ),
  ]),
  compensated('ST-24', 'standard values', 5.6, 0.82e-3, 39e-6, [
    // From 200 Hz to 5 kHz; beyond, it goes to the 3.4 Ω of R_e.
    extreme('smallest', ohms('s'), [200, 5e3], undefined, '3.405'),
    extreme('largest', ohms('s'), [200, 5e3], undefined, '3.47'),
  ]),
  {
    id: 'ST-25',
    title: 'L-pad, −4.5 dB, 6 Ω',
    source: 'Rs = R(k − 1)/k, Rp = R/(k − 1)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', Math.sqrt(20 * PAD_OHMS)),
      resistor('R1', 's', 'out', 2.4),
      resistor('R2', 'out', '0', 9.1),
      resistor('RL', 'out', '0', 6),
    ],
    figures: [
      size({ of: 'impedanceSeen', element: 'V1' }, 1e3, '6.016'),
      level('out', 1e3, '-4.422', Math.sqrt(20 * PAD_OHMS)),
      reading('re', watts('R1'), 1e3, '7.98'),
      reading('re', watts('R2'), 1e3, '4.78'),
      reading('re', watts('RL'), 1e3, '7.24'),
    ],
  },
  {
    id: 'ST-25 ideal',
    title: 'the same with ideal values',
    source: 'Rs = R(k − 1)/k, Rp = R/(k − 1)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'out', 6 * (1 - 10 ** (-4.5 / 20))),
      resistor('R2', 'out', '0', 6 / (10 ** (4.5 / 20) - 1)),
      resistor('RL', 'out', '0', 6),
    ],
    figures: [
      { kind: 'value', element: 'R1', printed: '2.426' },
      { kind: 'value', element: 'R2', printed: '8.839' },
      { kind: 'exact', output: { of: 'impedanceSeen', element: 'V1' }, frequency: 1e3, value: { re: 6, im: 0 }, units: 8 },
      level('out', 1e3, '-4.500000000000'),
    ],
  },
  {
    id: 'ST-26',
    title: 'baffle-step shelf, 6 Ω',
    source: 'f_z = R/2πL, f_p = (R‖RL)/2πL',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'out', 3.6),
      inductor('L1', 's', 'out', 1.2e-3),
      resistor('RL', 'out', '0', 6),
    ],
    figures: [
      level('out', 1e7, '-4.082'),
      level('out', 377.5, '-2.041'),
      crossing('decibels', 'out', -10 * Math.log10(1.6), [100, 1000], '377.5'),
      { kind: 'poles', output: volts('out'), source: 'V1', roots: [root('-1875.0')] },
      { kind: 'zeros', output: volts('out'), source: 'V1', roots: [root('-3000.0')] },
    ],
  },
];
