import type { Element } from '@/solver';
import { capacitor, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { amperes, crossing, level, phase, reading, size, volts, watts } from '../support/figures';
import { fixedImpedance } from '../support/parts';
import type { Circuit, ExactFigure, Figure, Output, Printed, ScatteringFigure, ValueFigure } from '../support/records';

/**
 * Starter networks of the library: matching up to VHF. The values are the project's own; each figure was computed with
 * an independent modified-nodal phasor solver [computed].
 */

/** Decibels of a reflection: the return loss is their negative. */
function reflectionIn(reference: number): Output {
  return { of: 'reflection', source: 'V1', reference };
}

/** No reflection, to so many units of ε. */
function matched(reference: number, frequency: number, units: number): ExactFigure {
  return { kind: 'exact', output: reflectionIn(reference), frequency, value: { re: 0, im: 0 }, units };
}

function valued(element: string, printed: string): ValueFigure {
  return { kind: 'value', element, printed };
}

interface Match {
  readonly id: string;
  readonly title: string;
  readonly source: string;
  readonly from: number;
  readonly elements: readonly Element[];
  readonly figures: readonly Figure[];
}

/** A network between `in` and `out`, on an EMF of 2 V behind its resistance. */
function match({ from, elements, ...circuit }: Match): Circuit {
  return {
    ...circuit,
    mark: 'computed',
    elements: [voltageSource('V1', 's', '0', 2), resistor('Rs', 's', 'in', from), ...elements],
  };
}

/** The voltage of a load when it takes all that a source of 2 V EMF can give: `level` against it is the gain. */
function all(from: number, load: number): number {
  return Math.sqrt(load / from);
}

function scattering(parameter: ScatteringFigure['parameter'], re: string, im: string): ScatteringFigure {
  return {
    kind: 'scattering',
    ports: ['a', 'b'],
    reference: 50,
    frequency: 1e6,
    parameter,
    re: { printed: re },
    im: { printed: im },
  };
}

function lMatch(c: number, l: number): readonly Element[] {
  return [capacitor('C1', 'in', '0', c), inductor('L1', 'in', 'out', l), resistor('RL', 'out', '0', 12.5)];
}

const F33 = 27.12e6;
const W33 = 2 * Math.PI * F33;
const Q33 = Math.sqrt(50 / 12.5 - 1);
const [C33, L33] = [Q33 / (W33 * 50), (Q33 * 12.5) / W33];

const F34 = 7.1e6;
const W34 = 2 * Math.PI * F34;
const Q34 = Math.sqrt(50 / 18 - 1);
function match34(c: number, l: number): readonly Element[] {
  return [capacitor('C1', 'in', '0', c), inductor('L1', 'in', 'out', l), fixedImpedance('ZL', 'out', '0', 18, -35, F34)];
}

const F35 = 10.1e6;
const W35 = 2 * Math.PI * F35;
/** The resistance between the halves of the π. */
const R35 = 800 / (8 ** 2 + 1);
const Q35 = Math.sqrt(50 / R35 - 1);
function match35(c1: number, l: number, c2: number): readonly Element[] {
  return [
    capacitor('C1', 'in', '0', c1),
    inductor('L1', 'in', 'out', l),
    capacitor('C2', 'out', '0', c2),
    resistor('RL', 'out', '0', 800),
  ];
}

const F41 = 50e6;
const W41 = 2 * Math.PI * F41;
export const LATTICE: readonly Element[] = [
  inductor('L1', 'in', 'a', 100 / W41),
  capacitor('C1', 'a', '0', 1 / (100 * W41)),
  capacitor('C2', 'in', 'b', 1 / (100 * W41)),
  inductor('L2', 'b', '0', 100 / W41),
];

const L_MATCH = { source: 'Q = √(Rh/Rl − 1)', from: 50 };

export const RADIO_STARTERS: readonly Circuit[] = [
  match({
    ...L_MATCH,
    id: 'ST-33 ideal',
    title: 'L match, 50 to 12.5 Ω, 27.12 MHz, low-pass, ideal',
    elements: lMatch(C33, L33),
    figures: [
      valued('C1', '203.29e-12'),
      valued('L1', '127.06e-9'),
      matched(50, F33, 16),
      crossing('decibels', reflectionIn(50), -20, [20e6, 0.999 * F33], '25.24e6'),
      crossing('decibels', reflectionIn(50), -20, [1.001 * F33, 35e6], '28.88e6'),
    ],
  }),
  match({
    ...L_MATCH,
    id: 'ST-33',
    title: 'the same, standard values',
    elements: lMatch(200e-12, 130e-9),
    figures: [level(reflectionIn(50), F33, '-35.0')],
  }),
  match({
    ...L_MATCH,
    id: 'ST-33 lossy',
    title: 'the ideal one with an inductor of Q 120',
    elements: [
      capacitor('C1', 'in', '0', C33),
      inductor('L1', 'in', 'x', L33),
      resistor('Rq', 'x', 'out', (W33 * L33) / 120),
      resistor('RL', 'out', '0', 12.5),
    ],
    figures: [level('out', F33, '-0.0625', all(50, 12.5)), level('out', 2 * F33, '-7.85', all(50, 12.5))],
  }),
  {
    id: 'ST-33 at 10 W',
    title: 'the ideal one at 10 W',
    source: 'Q = √(Rh/Rl − 1)',
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 2 * Math.sqrt(500)),
      resistor('Rs', 's', 'in', 50),
      ...lMatch(C33, L33),
    ],
    figures: [
      reading('re', watts('RL'), F33, '10.0'),
      size(amperes('C1'), F33, '0.775'),
      // Crest values.
      reading('magnitude', amperes('L1'), F33, '1.265', Math.SQRT1_2),
      reading('magnitude', 'in', F33, '31.6', Math.SQRT1_2),
    ],
  },
  match({
    id: 'ST-34 ideal',
    title: 'L match to 18 − j35 Ω, 7.1 MHz, ideal',
    source: 'Q = √(Rh/Rl − 1), and the load’s reactance taken into the inductor',
    from: 50,
    elements: match34(Q34 / (W34 * 50), (Q34 * 18 + 35) / W34),
    figures: [valued('C1', '597.8e-12'), valued('L1', '1.3226e-6'), matched(50, F34, 16)],
  }),
  match({
    id: 'ST-34',
    title: 'the same, standard values',
    source: 'Q = √(Rh/Rl − 1)',
    from: 50,
    elements: match34(600e-12, 1.3e-6),
    figures: [size(reflectionIn(50), F34, '0.0274'), level(reflectionIn(50), F34, '-31.2')],
  }),
  match({
    id: 'ST-35 ideal',
    title: 'π match, 50 to 800 Ω, 10.1 MHz, loaded Q 8 on the 800 Ω side, ideal',
    source: 'virtual R = R₂/(Q² + 1)',
    from: 50,
    elements: match35(Q35 / (W35 * 50), ((8 + Q35) * R35) / W35, 8 / (W35 * 800)),
    figures: [
      valued('C1', '551.5e-12'),
      valued('L1', '1.8909e-6'),
      valued('C2', '157.6e-12'),
      matched(50, F35, 128),
      level('out', 2 * F35, '-28.2', all(50, 800)),
    ],
  }),
  match({
    id: 'ST-35',
    title: 'the same, nearest coarse values',
    source: 'virtual R = R₂/(Q² + 1)',
    from: 50,
    elements: match35(620e-12, 2.2e-6, 160e-12),
    figures: [level(reflectionIn(50), F35, '-2.9')],
  }),
  match({
    id: 'ST-41',
    title: 'lattice LC balun, 50 to 2 × 100 Ω, 50 MHz, ideal',
    source: 'X = √(R₁R₂)',
    from: 50,
    elements: [...LATTICE, resistor('Ra', 'a', '0', 100), resistor('Rb', 'b', '0', 100)],
    figures: [
      valued('L1', '318.31e-9'),
      valued('C1', '31.831e-12'),
      matched(50, F41, 64),
      size('a', F41, '1.000'),
      phase('a', F41, '-90.000'),
      size('b', F41, '1.000'),
      phase('b', F41, '90.000'),
      size(volts('a', 'b'), F41, '2.000'),
    ],
  }),
];

/** Two tuned circuits, each loaded, coupled at their tops. */
const DOUBLE_TUNED: readonly Element[] = [
  resistor('Rs', 's', 'a', 13.03e3),
  inductor('L1', 'a', '0', 22e-6),
  capacitor('C1', 'a', '0', 281.74e-12),
  capacitor('Cc', 'a', 'out', 6.106e-12),
  inductor('L2', 'out', '0', 22e-6),
  capacitor('C2', 'out', '0', 281.74e-12),
  resistor('RL', 'out', '0', 13.03e3),
];

const SERIES_43 = 6e6;
const L43 = 1 / ((2 * Math.PI * SERIES_43) ** 2 * 12e-15);
function resonator(resistance: number): readonly Element[] {
  return [capacitor('Cm', 'n', 'x', 12e-15), inductor('Lm', 'x', 'y', L43), resistor('Rm', 'y', '0', resistance)];
}
/** The reactive current of a source through these is nothing at parallel resonance. */
function parallelResonance(title: string, extra: readonly Element[], at: Printed): Circuit {
  return {
    id: `ST-43 ${title}`,
    title: `quartz resonator, 6 MHz, ${title}`,
    source: 'f_p = f_s√(1 + C₁/C₀)',
    mark: 'computed',
    elements: [voltageSource('V1', 'n', '0', 1), ...resonator(0), capacitor('C0', 'n', '0', 3.2e-12), ...extra],
    figures: [{ ...crossing('im', amperes('V1'), 0, [SERIES_43 * 1.00001, SERIES_43 * 1.005], at.printed), ...at }],
  };
}

export const RESONANT_RADIO_STARTERS: readonly Circuit[] = [
  {
    id: 'ST-42',
    title: 'double-tuned, top-capacitor coupled, 2 MHz, 60 kHz',
    source: 'q = 1.4142, k = 0.7071',
    mark: 'computed',
    elements: [voltageSource('V1', 's', '0', 2), ...DOUBLE_TUNED],
    figures: [
      {
        kind: 'width',
        read: 'decibels',
        output: volts('out'),
        level: -10 * Math.log10(2),
        between: [1.9e6, 2e6, 2.1e6],
        printed: '60.03e3',
      },
      { kind: 'largest', read: 'decibels', output: volts('out'), between: [1.97e6, 2.03e6], value: { printed: '0.000' } },
      level('out', 2.0e6, '0.0'),
    ],
  },
  {
    id: 'ST-43',
    title: 'quartz resonator, 6 MHz',
    source: 'Q = ωL₁/R₁',
    mark: 'computed',
    elements: [voltageSource('V1', 'n', '0', 1), ...resonator(22)],
    figures: [
      valued('Lm', '58.635e-3'),
      crossing('degrees', amperes('Rm'), 0, [5.99e6, 6.01e6], '6.00000000e6'),
      { kind: 'resonance', output: amperes('Rm'), source: 'V1', quality: { printed: '100477' } },
    ],
  },
  parallelResonance('parallel resonance', [], { printed: '6.011239e6' }),
  // 283 parts in a million above 6 MHz, to half a part.
  parallelResonance('with 18 pF', [capacitor('CL', 'n', '0', 18e-12)], { printed: '6.001698e6', within: 3 }),
];

/** A two-port that has no impedance matrix. */
export const SERIES_ARM: Circuit = {
  id: 'series arm',
  title: 'a two-port of 50 + j25 Ω in series, in 50 Ω',
  source: 'S11 = Z/(Z + 2R), S21 = 2R/(Z + 2R)',
  mark: 'computed',
  elements: [fixedImpedance('Z1', 'a', 'b', 50, 25, 1e6)],
  figures: [
    scattering('s11', '0.351351', '0.108108'),
    scattering('s21', '0.648649', '-0.108108'),
    scattering('s12', '0.648649', '-0.108108'),
    scattering('s22', '0.351351', '0.108108'),
  ],
};
