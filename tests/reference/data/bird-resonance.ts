import { capacitor, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { amperes, crossing, halfPower, halfPowerWidth, ohms, shown, size, volts } from '../support/figures';
import type { Circuit, Figure } from '../support/records';

/**
 * Resonance in a textbook’s worked examples: printed figures [found: executed notebook], and beside them the same to
 * more digits [computed].
 */
const BIRD = 'Bird, Electrical Circuit Theory and Technology, 2nd ed. 2003';

interface Series {
  readonly r: number;
  readonly l: number;
  readonly c: number;
  readonly volts?: number;
}

function series(example: string, { r, l, c, volts: volts_ = 1 }: Series, figures: readonly Figure[]): Circuit {
  return {
    id: `B28.${example}`,
    title: 'resistance, inductance and capacitance in series',
    source: `${BIRD}, ch. 28 ex. ${example}`,
    mark: 'found',
    elements: [
      voltageSource('V1', '1', '0', volts_),
      resistor('R1', '1', '2', r),
      inductor('L1', '2', '3', l),
      capacitor('C1', '3', '0', c),
    ],
    figures,
  };
}

function computed(figure: Figure): Figure {
  return { ...figure, mark: 'computed' };
}

function inPhase(between: readonly [number, number], printed: string): Figure {
  return crossing('degrees', amperes('R1'), 0, between, printed);
}

const [L8, C8] = [(30 * 50) / (2 * Math.PI * 1200), 1 / (2 * Math.PI * 1200 * 30 * 50)];
const OMEGA_7 = 2 * Math.PI * 10e3;

/** A coil and a capacitor beside each other, each with its resistance. */
function parallel(example: string, rl: number, l: number, rc: number, c: number, figures: readonly Figure[]): Circuit {
  return {
    id: `B29.${example}`,
    title: 'a coil beside a capacitor',
    source: `${BIRD}, ch. 29 ex. ${example}`,
    mark: 'found',
    elements: [
      resistor('RL', '1', '2', rl),
      inductor('L1', '2', '0', l),
      resistor('RC', '1', '3', rc),
      capacitor('C1', '3', '0', c),
      // Only so that a lossless one has an impedance at resonance.
      resistor('R9', '1', '0', 1e12),
    ],
    figures,
  };
}

function unity(between: readonly [number, number], printed: string, digits: string): readonly Figure[] {
  return [
    crossing('im', ohms('1'), 0, between, printed),
    computed(crossing('im', ohms('1'), 0, between, digits)),
  ];
}

export const BIRD_RESONANCE: readonly Circuit[] = [
  series('1', { r: 10, l: 0.075, c: 4e-5, volts: 200 }, [
    inPhase([50, 150], '91.89'),
    computed(inPhase([50, 150], '91.888')),
    size(amperes('R1'), 91.888, '20.0'),
  ]),
  series('5', { r: 80, l: 0.02, c: 4e-7, volts: 12 }, [
    inPhase([1000, 3000], '1779.41'),
    computed(inPhase([1000, 3000], '1779.406')),
    size('3', 1779.406, '33.54'),
    computed(size('3', 1779.406, '33.541')),
    {
      // The notebook has 34.67 V, which is wrong: Q·V/√(1 − 1/(4Q²)) is 34.09 V.
      kind: 'largest',
      mark: 'corrected',
      read: 'magnitude',
      output: volts('3'),
      between: [1500, 1900],
      at: shown('1721.52'),
      value: shown('34.091'),
    },
    { kind: 'largest', mark: 'computed', read: 'magnitude', output: volts('3'), between: [1500, 1900], at: shown('1721.524') },
  ]),
  series('7', { r: 5, l: 0.01, c: 1 / (OMEGA_7 ** 2 * 0.01) }, [
    halfPowerWidth(amperes('R1'), [9e3, 10e3, 11e3], '79.58', 1 / 5),
    computed(halfPowerWidth(amperes('R1'), [9e3, 10e3, 11e3], '79.577', 1 / 5)),
  ]),
  series('8', { r: 50, l: L8, c: C8 }, [
    { kind: 'value', element: 'L1', printed: '0.19894' },
    { kind: 'value', mark: 'computed', element: 'L1', printed: '0.198944' },
    { kind: 'value', element: 'C1', printed: '8.842e-8' },
    { kind: 'value', mark: 'computed', element: 'C1', printed: '8.8419e-8' },
    halfPowerWidth(amperes('R1'), [1100, 1200, 1300], '40.0', 1 / 50),
    halfPower(amperes('R1'), [1200, 1300], '1220.17', 1 / 50),
    halfPower(amperes('R1'), [1100, 1200], '1180.17', 1 / 50),
    computed(halfPower(amperes('R1'), [1200, 1300], '1220.167', 1 / 50)),
    computed(halfPower(amperes('R1'), [1100, 1200], '1180.167', 1 / 50)),
  ]),
  series('10', { r: 8.84, l: 0.3518, c: 2e-5 }, [
    inPhase([40, 80], '60.0'),
    computed(inPhase([40, 80], '60.001')),
    halfPowerWidth(amperes('R1'), [50, 60, 70], '4.0', 1 / 8.84),
    halfPower(amperes('R1'), [50, 60], '58.0', 1 / 8.84),
    halfPower(amperes('R1'), [60, 70], '62.0', 1 / 8.84),
    { kind: 'resonance', output: amperes('R1'), source: 'V1', quality: shown('15.0') },
    { kind: 'resonance', mark: 'computed', output: amperes('R1'), source: 'V1', quality: shown('15.003') },
  ]),
  parallel('1', 10, 0.005, 0, 2.5e-7, [
    ...unity([4000, 5000], '4490.31', '4490.314'),
    size(ohms('1'), 4490.314, '2000.0'),
  ]),
  parallel('2, 0 Ω', 0, 0.1, 0, 4e-5, unity([70, 90], '79.58', '79.577')),
  parallel('2, 30 Ω', 30, 0.1, 0, 4e-5, unity([50, 75], '63.66', '63.662')),
  parallel('4', 5, 0.002, 3, 2.5e-5, unity([500, 700], '626.45', '626.451')),
];
