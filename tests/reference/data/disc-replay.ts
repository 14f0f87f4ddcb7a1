import { capacitor, resistor, voltageSource } from '../../solver/support/networks';
import { level, phase, root, volts } from '../support/figures';
import { buffer } from '../support/parts';
import type { Circuit, Figure } from '../support/records';

/**
 * Disc replay after IEC 60098: H(s) = (1 + s·T2)/((1 + s·T1)(1 + s·T3)), and a high-pass of 7950 µs that its amendment
 * adds. Time constants [memory]; decibels against 1 kHz, and the phase of H itself [computed]; they agree with the
 * usual printed table [memory]. The passive network by Lipshitz, JAES 27 (1979) 458 [memory, confirmed by calculation].
 */

/** Seconds. */
const [T1, T2, T3, T4] = [3180e-6, 318e-6, 75e-6, 7950e-6];

const ROWS: readonly (readonly [frequency: number, decibels: string, degrees: string, amended: string])[] = [
  [20, '19.274', '-20.034', '16.261'],
  [25, '18.954', '-24.358', '16.804'],
  [31.5, '18.478', '-29.435', '17.006'],
  [40, '17.792', '-35.143', '16.823'],
  [50, '16.946', '-40.617', '16.302'],
  [63, '15.852', '-46.062', '15.436'],
  [80, '14.506', '-51.047', '14.244'],
  [100, '13.088', '-54.811', '12.920'],
  [125, '11.563', '-57.527', '11.454'],
  [160, '9.809', '-59.213', '9.743'],
  [200, '8.219', '-59.553', '8.178'],
  [250, '6.677', '-58.856', '6.651'],
  [315, '5.179', '-57.230', '5.163'],
  [400, '3.784', '-54.910', '3.775'],
  [500, '2.648', '-52.570', '2.642'],
  [630, '1.642', '-50.457', '1.639'],
  [800, '0.751', '-49.107', '0.750'],
  [1000, '0.000', '-48.954', '0.000'],
  [1250, '-0.744', '-50.028', '-0.743'],
  [1600, '-1.643', '-52.594', '-1.642'],
  [2000, '-2.589', '-55.920', '-2.587'],
  [2500, '-3.700', '-59.848', '-3.699'],
  [3150, '-5.038', '-64.151', '-5.036'],
  [4000, '-6.605', '-68.468', '-6.604'],
  [5000, '-8.210', '-72.146', '-8.208'],
  [6300, '-9.980', '-75.472', '-9.979'],
  [8000, '-11.894', '-78.365', '-11.892'],
  [10000, '-13.734', '-80.598', '-13.733'],
  [12500, '-15.609', '-82.428', '-15.607'],
  [16000, '-17.708', '-84.057', '-17.706'],
  [20000, '-19.620', '-85.234', '-19.619'],
];

export const DISC_REPLAY: readonly Circuit[] = [
  {
    id: 'disc replay',
    title: 'passive network of exactly this shape, and the amendment’s high-pass behind a buffer',
    source: 'IEC 60098; R1·C1 = 2187 µs, R1·C2 = 750 µs, R2·C1 = 318 µs (Lipshitz 1979) [memory]',
    mark: 'computed',
    elements: [
      voltageSource('V1', 'in', '0', 1),
      resistor('R1', 'in', 'out', 100e3),
      resistor('R2', 'out', 'x', 14540.466392318243),
      capacitor('C1', 'x', '0', 21.87e-9),
      capacitor('C2', 'out', '0', 7.5e-9),
      buffer('B1', 'out', 'b'),
      capacitor('C3', 'b', 'amended', T4 / 10e3),
      resistor('R3', 'amended', '0', 10e3),
    ],
    figures: [
      ...ROWS.flatMap(([frequency, decibels, degrees, amended]): Figure[] => [
        level('out', frequency, decibels, { frequency: 1000 }),
        phase('out', frequency, degrees),
        level('amended', frequency, amended, { frequency: 1000 }),
      ]),
      // The formula itself, to rounding.
      ...ROWS.map(([frequency]): Figure => ({ kind: 'exact', output: volts('out'), frequency, value: shape(frequency), units: 16 })),
      { kind: 'poles', output: volts('out'), source: 'V1', roots: [root((-1 / T1).toFixed(3)), root((-1 / T3).toFixed(2))] },
      { kind: 'zeros', output: volts('out'), source: 'V1', roots: [root((-1 / T2).toFixed(3))] },
    ],
  },
];

function shape(frequency: number): { readonly re: number; readonly im: number } {
  const omega = 2 * Math.PI * frequency;
  const [p, q] = [1 - omega ** 2 * T1 * T3, omega * (T1 + T3)];
  const square = p * p + q * q;
  return { re: (p + omega * T2 * q) / square, im: (omega * T2 * p - q) / square };
}
