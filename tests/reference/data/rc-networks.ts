import type { Element } from '@/solver';
import { capacitor, resistor, voltageSource } from '../../solver/support/networks';
import { phase, size, volts } from '../support/figures';
import { amplifier } from '../support/parts';
import type { Circuit, ExactFigure, Figure } from '../support/records';

/**
 * RC networks and active filters with closed forms: textbook formulas [memory, each confirmed by a modified-nodal
 * calculation with an ideal amplifier], and figures of them to six digits [computed].
 */
const [R, C] = [10e3, 1e-8];
/** 1/(2πRC), 1591.5494 Hz. */
const F0 = 1 / (2 * Math.PI * R * C);

type Row = readonly [timesF0: number, magnitude: string, degrees: string];

function rows(of: readonly Row[]): readonly Figure[] {
  return of.flatMap(([u, magnitude, degrees]) => [
    size('out', u * F0, magnitude),
    ...(degrees === '' ? [] : [phase('out', u * F0, degrees)]),
  ]);
}

function exactly(frequency: number, re: number, im: number, units: number): ExactFigure {
  return { kind: 'exact', output: volts('out'), frequency, value: { re, im }, units };
}

function network(id: string, title: string, source: string, elements: readonly Element[], figures: readonly Figure[]): Circuit {
  return { id, title, source, mark: 'computed', elements: [voltageSource('V1', 'in', '0', 1), ...elements], figures };
}

/** (1 − u²)/(1 − u² + 4ju). */
function twinT(u: number): ExactFigure {
  const [a, b] = [1 - u * u, 4 * u];
  const square = a * a + b * b;
  return exactly(u * F0, (a * a) / square, (-a * b) / square, 32);
}

const PASSIVE: readonly Circuit[] = [
  network(
    'twin T',
    '10 kΩ, 10 kΩ, 20 nF and 10 nF, 10 nF, 5 kΩ, open',
    'H(u) = (1 − u²)/(1 − u² + 4ju); Kuphaldt ch. 8 has f = 1/(4π·R3·C3), the same [found]',
    [
      resistor('R1', 'in', 'a', R),
      resistor('R2', 'a', 'out', R),
      capacitor('C3', 'a', '0', 2 * C),
      capacitor('C1', 'in', 'b', C),
      capacitor('C2', 'b', 'out', C),
      resistor('R3', 'b', '0', R / 2),
    ],
    [
      ...rows([
        [0.5, '0.351123', '-69.444'],
        [0.9, '0.0527044', '-86.9789'],
        [1.1, '0.047673', '87.2675'],
        [2, '0.351123', '69.444'],
        [0.236068, '0.707107', '-45.0000'],
        [4.236068, '0.707107', '45.0000'],
      ]),
      ...[0.5, 2, Math.sqrt(5) - 2, Math.sqrt(5) + 2].map(twinT),
      { kind: 'exact', output: volts('out'), frequency: F0, value: { re: 0, im: 0 }, units: 4 },
      { kind: 'smallest', read: 'magnitude', output: volts('out'), between: [1000, 2500], at: { printed: '1591.5494', within: 0.001 } },
    ],
  ),
  network(
    'series–parallel arm',
    '10 kΩ and 10 nF in series, then 10 kΩ beside 10 nF (Wien)',
    'H(f₀) = 1/3, phase 0',
    [resistor('R1', 'in', 'a', R), capacitor('C1', 'a', 'out', C), resistor('R2', 'out', '0', R), capacitor('C2', 'out', '0', C)],
    [
      ...rows([
        [0.1, '0.0966691', '73.1416'],
        [0.5, '0.298142', '26.5651'],
        [1, '0.333333', '0.0000'],
        [2, '0.298142', '-26.5651'],
        [10, '0.0966691', '-73.1416'],
      ]),
      exactly(F0, 1 / 3, 0, 8),
    ],
  ),
  network(
    'bridged T',
    '10 nF, 10 nF, 1 kΩ from their middle, 100 kΩ across',
    'f₀ = 1/(2πC√(R1·R2)), H(f₀) = 2R2/(2R2 + R1)',
    [
      capacitor('C1', 'in', 'a', C),
      capacitor('C2', 'a', 'out', C),
      resistor('R2', 'a', '0', 1000),
      resistor('R1', 'in', 'out', 100e3),
    ],
    [...rows([[1, '0.0196078', '0.0000']]), exactly(F0, 2000 / 102e3, 0, 256)],
  ),
  network(
    'all-pass',
    '10 kΩ, 10 kΩ about the minus input, 10 kΩ and 10 nF at the plus input',
    '|H| = 1, phase −2 arctan ωRC',
    [
      resistor('R1', 'in', 'm', 10e3),
      resistor('R2', 'm', 'out', 10e3),
      resistor('R3', 'in', 'p', R),
      capacitor('C1', 'p', '0', C),
      amplifier('A1', 'p', 'm', 'out'),
    ],
    [
      ...rows([
        [0.1, '1.000000', '-11.4212'],
        [1, '1.000000', '-90.0000'],
        [10, '1.000000', '-168.5788'],
      ]),
      exactly(F0, 0, -1, 16),
    ],
  ),
];

/** A gain of 1 + (K − 1) about an amplifier whose plus input is `p`. */
function gain(k: number): readonly Element[] {
  return k === 1
    ? [amplifier('A1', 'p', 'out', 'out')]
    : [resistor('RB', 'out', 'm', (k - 1) * 10e3), resistor('RA', 'm', '0', 10e3), amplifier('A1', 'p', 'm', 'out')];
}

interface Section {
  readonly r1: number;
  readonly r2: number;
  readonly c1: number;
  readonly c2: number;
  readonly k: number;
}

/** A low-pass; the high-pass has resistors and capacitors changed about. At f₀ the gain is K·Q, at ∓90°. */
function sallenKey(id: string, isLowPass: boolean, { r1, r2, c1, c2, k }: Section): Circuit {
  const f0 = 1 / (2 * Math.PI * Math.sqrt(r1 * r2 * c1 * c2));
  const spread = isLowPass
    ? Math.sqrt((r2 * c2) / (r1 * c1)) + Math.sqrt((r1 * c2) / (r2 * c1)) + (1 - k) * Math.sqrt((r1 * c1) / (r2 * c2))
    : Math.sqrt((r1 * c1) / (r2 * c2)) + Math.sqrt((r1 * c2) / (r2 * c1)) + (1 - k) * Math.sqrt((r2 * c2) / (r1 * c1));
  const quality = 1 / spread;
  const frame = isLowPass
    ? [resistor('R1', 'in', 'a', r1), resistor('R2', 'a', 'p', r2), capacitor('C1', 'a', 'out', c1), capacitor('C2', 'p', '0', c2)]
    : [capacitor('C1', 'in', 'a', c1), capacitor('C2', 'a', 'p', c2), resistor('R1', 'a', 'out', r1), resistor('R2', 'p', '0', r2)];
  return network(
    id,
    `Q ${quality.toPrecision(4)}, gain ${k}`,
    'Sallen and Key, IRE Trans. CT-2 (1955) 74',
    [...frame, ...gain(k)],
    // Near f₀ the response turns 2Q times as fast as the values move.
    [exactly(f0, 0, (isLowPass ? -1 : 1) * k * quality, 64 * (1 + k * quality))],
  );
}

/** H₀ = −R3/R1, w₀ = 1/√(R2·R3·C1·C2), Q = √(C1/C2)/(√(R2·R3)/R1 + √(R3/R2) + √(R2/R3)). */
function multipleFeedbackLowPass(r1: number, r2: number, r3: number, c1: number, c2: number): Circuit {
  const f0 = 1 / (2 * Math.PI * Math.sqrt(r2 * r3 * c1 * c2));
  const quality = Math.sqrt(c1 / c2) / (Math.sqrt(r2 * r3) / r1 + Math.sqrt(r3 / r2) + Math.sqrt(r2 / r3));
  return network(
    'multiple feedback, low-pass',
    `Q ${quality.toPrecision(4)}`,
    '|H(f₀)| = |H₀|·Q at 90°',
    [
      resistor('R1', 'in', 'a', r1),
      capacitor('C1', 'a', '0', c1),
      resistor('R3', 'a', 'out', r3),
      resistor('R2', 'a', 'm', r2),
      capacitor('C2', 'm', 'out', c2),
      amplifier('A1', '0', 'm', 'out'),
    ],
    [exactly(0, -r3 / r1, 0, 4), exactly(f0, 0, (r3 / r1) * quality, 64 * quality)],
  );
}

/** w₀ = 1/(C√((R1A‖R1B)·R2)), Q = ½√(R2/(R1A‖R1B)), H(f₀) = −R2/(2·R1A). */
function multipleFeedbackBandPass(r1a: number, r1b: number, r2: number, c: number): Circuit {
  const both = (r1a * r1b) / (r1a + r1b);
  const f0 = 1 / (2 * Math.PI * c * Math.sqrt(both * r2));
  const quality = Math.sqrt(r2 / both) / 2;
  return network(
    'multiple feedback, band-pass',
    `Q ${quality.toPrecision(4)}`,
    'H(f₀) = −R2/(2·R1A)',
    [
      resistor('R1A', 'in', 'a', r1a),
      resistor('R1B', 'a', '0', r1b),
      capacitor('C1', 'a', 'm', c),
      capacitor('C2', 'a', 'out', c),
      resistor('R2', 'm', 'out', r2),
      amplifier('A1', '0', 'm', 'out'),
    ],
    [
      exactly(f0, -r2 / (2 * r1a), 0, 64 * quality),
      { kind: 'resonance', output: volts('out'), source: 'V1', quality: { printed: quality.toFixed(9) } },
    ],
  );
}

const EQUAL = { r1: R, r2: R, c1: C, c2: C };

export const RC_NETWORKS: readonly Circuit[] = [
  ...PASSIVE,
  // Equal parts have Q = 1/(3 − K); at a gain of 1, Q = √(R1·R2·C1·C2)/(C2(R1 + R2)).
  sallenKey('Sallen–Key low-pass, equal parts', true, { ...EQUAL, k: 2 }),
  sallenKey('Sallen–Key low-pass, equal parts, Q 10', true, { ...EQUAL, k: 2.9 }),
  sallenKey('Sallen–Key low-pass, unity gain', true, { r1: 12e3, r2: 8.2e3, c1: 4.7e-8, c2: 3.3e-9, k: 1 }),
  sallenKey('Sallen–Key low-pass, general', true, { r1: 12e3, r2: 8.2e3, c1: 2.2e-8, c2: 6.8e-9, k: 1.2 }),
  sallenKey('Sallen–Key high-pass, equal parts', false, { ...EQUAL, k: 2 }),
  sallenKey('Sallen–Key high-pass, unity gain', false, { r1: 2.7e3, r2: 22e3, c1: 1e-8, c2: 1.5e-8, k: 1 }),
  multipleFeedbackLowPass(7.5e3, 2.21e3, 15e3, 47e-9, 10e-9),
  multipleFeedbackBandPass(18.2e3, 523, 71.5e3, 22e-9),
];
