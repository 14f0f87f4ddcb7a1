import type { Element } from '@/solver';
import { capacitor, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { amperes, reading, shown, size, volts, watts } from '../support/figures';
import { fixedImpedance, wire } from '../support/parts';
import type { Circuit, Figure, GreatestPowerFigure } from '../support/records';

/**
 * Power of a textbook’s worked examples: the greatest that a source can give, and three phases at 50 Hz. Printed figures
 * [found: executed notebook], and beside them the same to more digits [computed].
 */
const BIRD = 'Bird, Electrical Circuit Theory and Technology, 2nd ed. 2003';

function best(
  loads: GreatestPowerFigure['loads'],
  frequency: number,
  [re, im]: readonly [string, string],
  printed: string,
  mark: GreatestPowerFigure['mark'] = 'found',
): GreatestPowerFigure {
  return { kind: 'greatestPower', mark, node: 'out', frequency, loads, load: { re: shown(re), im: shown(im) }, printed };
}

function transfer(example: string, elements: readonly Element[], figures: readonly Figure[]): Circuit {
  return {
    id: `B35.${example}`,
    title: 'greatest power into a load',
    source: `${BIRD}, ch. 35 ex. ${example}`,
    mark: 'found',
    elements,
    figures,
  };
}

function behind(volts_: number, re: number, im: number): readonly Element[] {
  return [voltageSource('V1', 's', '0', volts_), fixedImpedance('Zs', 's', 'out', re, im, 50)];
}

const NONE = '0.0';

export const POWER_TRANSFER: readonly Circuit[] = [
  transfer('1', behind(120, 15, 20), [best('resistances', 50, ['25.0', NONE], '180.0')]),
  transfer('2', behind(120, 15, 20), [best('all', 50, ['15', '-20'], '240.0')]),
  transfer(
    '3',
    [voltageSource('V1', 's', '0', 200), resistor('R1', 's', 'out', 100), capacitor('C1', 's', 'out', 1e-6)],
    [
      reading('re', { of: 'impedance', node: 'out' }, 1000, '71.696'),
      reading('im', { of: 'impedance', node: 'out' }, 1000, '-45.048'),
      best('resistances', 1000, ['84.67', NONE], '127.9'),
      // From the impedance to three decimals.
      { ...best('resistances', 1000, ['84.67', NONE], '127.902', 'computed'), within: 0.001 },
    ],
  ),
  transfer('4', behind(60, 4, 3), [best('resistances', 50, ['5.0', NONE], '200.0')]),
  transfer(
    '5',
    [voltageSource('V1', 's', '0', 20), resistor('R1', 's', 'out', 5), resistor('R2', 'out', '0', 15)],
    [size('out', 50, '15'), best('resistances', 50, ['3.75', NONE], '15.0')],
  ),
  transfer(
    '6',
    [
      voltageSource('V1', 's', '0', 100, 30),
      resistor('R1', 's', 'out', 5),
      fixedImpedance('Z2', 'out', '0', 5, 10, 50),
    ],
    [
      size('out', 50, '79.0569'),
      best('all', 50, ['3.75', '-1.25'], '416.67'),
      // From the open voltage to six digits; the exact power is 416.6667 W.
      { ...best('all', 50, ['3.75', '-1.25'], '416.666', 'computed'), within: 0.001 },
    ],
  ),
];

const OMEGA = 2 * Math.PI * 50;

/** The phases of a source in star, one after the other by −120°. */
function star(volts_: number): readonly Element[] {
  return [0, -120, 120].map((degrees, k) => voltageSource(`V${k}`, `p${k}`, '0', volts_, degrees));
}

type Load = (id: string, a: string, b: string) => readonly Element[];

function resistance(value: number): Load {
  return (id, a, b) => [resistor(id, a, b, value)];
}

function coil(r: number, l: number): Load {
  return (id, a, b) => [resistor(id, a, `${id} x`, r), inductor(`${id} L`, `${id} x`, b, l)];
}

function inStar(load: Load): readonly Element[] {
  return [0, 1, 2].flatMap((k) => load(`Z${k}`, `p${k}`, 'n'));
}

function inDelta(load: Load): readonly Element[] {
  return [0, 1, 2].flatMap((k) => load(`Z${k}`, `p${k}`, `p${(k + 1) % 3}`));
}

function phases(id: string, title: string, elements: readonly Element[], figures: readonly Figure[], source?: string): Circuit {
  return { id: source === undefined ? `B19.${id}` : id, title, source: source ?? `${BIRD}, ch. 19 ex. ${id}`, mark: 'found', elements, figures };
}

function computed(figure: Figure): Figure {
  return { ...figure, mark: 'computed' };
}

const BY_PHASE = 1 / Math.sqrt(3);
const POWER_OF_ALL = watts('Z0', 'Z1', 'Z2');

export const THREE_PHASES: readonly Circuit[] = [
  phases('1', '415 V, a star of 30 Ω', [...star(415 * BY_PHASE), ...inStar(resistance(30))], [
    size('p1', 50, '239.6'),
    size(amperes('Z0'), 50, '7.99'),
    computed(size(amperes('Z0'), 50, '7.987')),
    { kind: 'exact', output: volts('n'), frequency: 50, value: { re: 0, im: 0 }, units: 1000 },
  ]),
  phases(
    '4',
    '24, 18 and 12 kW at 240 V and their neutral',
    [
      ...star(240),
      ...[24e3, 18e3, 12e3].map((power, k) => resistor(`Z${k}`, `p${k}`, 'n', 240 ** 2 / power)),
      wire('N', 'n', '0'),
    ],
    [
      size(amperes('Z0'), 50, '100'),
      size(amperes('Z1'), 50, '75'),
      size(amperes('Z2'), 50, '50'),
      size(amperes('N'), 50, '43.3'),
      computed(size(amperes('N'), 50, '43.301')),
    ],
  ),
  phases('5', '440 V, a delta of 30 Ω and 0.1273 H', [...star(440 * BY_PHASE), ...inDelta(coil(30, 0.1273))], [
    size(amperes('Z0'), 50, '8.8'),
    computed(size(amperes('Z0'), 50, '8.801')),
    size(amperes('V0'), 50, '15.24'),
    computed(size(amperes('V0'), 50, '15.244')),
  ]),
  phases('7 star', '415 V, a star of 3 + j4 Ω', [...star(415 * BY_PHASE), ...inStar(coil(3, 4 / OMEGA))], [
    size(amperes('V0'), 50, '47.92'),
  ]),
  phases('7 delta', '415 V, a delta of 3 + j4 Ω', [...star(415 * BY_PHASE), ...inDelta(coil(3, 4 / OMEGA))], [
    size(amperes('Z0'), 50, '83.0'),
    size(amperes('V0'), 50, '143.76'),
  ]),
  phases('8', '415 V, a star of 12 Ω', [...star(415 * BY_PHASE), ...inStar(resistance(12))], [
    reading('re', POWER_OF_ALL, 50, '14352.08'),
    computed(reading('re', POWER_OF_ALL, 50, '14352.083')),
  ]),
  phases('10 star', '415 V, a star of 10 Ω and 0.042 H', [...star(415 * BY_PHASE), ...inStar(coil(10, 0.042))], [
    reading('re', POWER_OF_ALL, 50, '6283.29'),
    computed(reading('re', POWER_OF_ALL, 50, '6283.295')),
  ]),
  phases('10 delta', '415 V, a delta of 10 Ω and 0.042 H', [...star(415 * BY_PHASE), ...inDelta(coil(10, 0.042))], [
    reading('re', POWER_OF_ALL, 50, '18849.88'),
    computed(reading('re', POWER_OF_ALL, 50, '18849.885')),
  ]),
  phases(
    'K10',
    'lines of 120 V with three loads of 10 kW in delta',
    [...star(120 * BY_PHASE), ...inDelta(resistance(120 ** 2 / 10e3))],
    [
      size(amperes('Z0'), 50, '83.33'),
      size(amperes('V0'), 50, '144.34'),
      computed(size(amperes('Z0'), 50, '83.333')),
      computed(size(amperes('V0'), 50, '144.338')),
    ],
    'Kuphaldt, Lessons In Electric Circuits, vol. II AC, ch. 10',
  ),
  phases(
    'K10 star',
    'phases of 120 V, from line to line',
    [...star(120), ...inStar(resistance(1.44))],
    [size(volts('p0', 'p1'), 50, '207.85'), computed(size(volts('p0', 'p1'), 50, '207.846'))],
    'Kuphaldt, Lessons In Electric Circuits, vol. II AC, ch. 10',
  ),
];
