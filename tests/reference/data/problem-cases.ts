import type { Element, ProblemKind } from '@/solver';
import { capacitor, currentSource, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { amplifier } from '../support/parts';
import type { ReadingFigure } from '../support/records';
import { size } from '../support/figures';
import { LATTICE } from './starters-radio';

/**
 * Networks that have to be diagnosed, and not to crash: what is at fault, by name, and what is determined all the same.
 */
export interface ProblemCase {
  readonly id: string;
  readonly title: string;
  readonly elements: readonly Element[];
  readonly frequency: number;
  /** What stands in the way, with the elements and nodes that have to be named; none if the network is solved. */
  readonly problem?: {
    readonly kind: ProblemKind;
    readonly elements: readonly string[];
    readonly nodes: readonly string[];
    /** Words that the sentence has to have. */
    readonly words: RegExp;
  };
  /** Whether there is a solution, with the problem in it if there is one. */
  readonly isSolved: boolean;
  /** What is determined. */
  readonly figures: readonly ReadingFigure[];
  readonly undetermined?: { readonly voltages?: readonly string[]; readonly currents?: readonly string[] };
}

const F41 = 50e6;
const [L, C] = [1e-3, 1e-6];
const RESONANT = 1 / (2 * Math.PI * Math.sqrt(L * C));

/** 10 V on 5 Ω: what is solved beside a fault elsewhere. */
const REST: readonly Element[] = [voltageSource('V9', '9', '0', 10), resistor('R9', '9', '0', 5)];
const SOLVED_REST = size({ of: 'current', element: 'R9' }, 50, '2.000000000000');
const AT_ZERO: ReadingFigure = { ...SOLVED_REST, frequency: 0 };

/** The lattice balun with one floating load between its outputs instead of one from each to the reference. */
const FLOATING_LOAD: readonly Element[] = [
  voltageSource('V1', 's', '0', 2),
  resistor('Rs', 's', 'in', 50),
  ...LATTICE,
  resistor('RL', 'a', 'b', 200),
];

function coupled(coupling: number): readonly Element[] {
  return [
    voltageSource('V1', '1', '0', 1),
    resistor('R1', '1', '2', 10),
    { id: 'TR1', kind: 'coupledInductors', nodes: ['2', '0', '3', '0'], inductances: [1e-3, 4e-3], coupling },
    resistor('R2', '3', '0', 100),
  ];
}

export const PROBLEM_CASES: readonly ProblemCase[] = [
  {
    id: 'a',
    title: 'no reference node: currents and voltages across elements stand, node voltages do not',
    elements: [voltageSource('V1', 'a', 'b', 10), resistor('R1', 'a', 'b', 5)],
    frequency: 50,
    problem: { kind: 'noReference', elements: ['V1', 'R1'], nodes: ['a', 'b'], words: /reference/ },
    isSolved: true,
    figures: [
      size({ of: 'current', element: 'R1' }, 50, '2.000000000000'),
      size({ of: 'elementVoltage', element: 'R1' }, 50, '10.00000000000'),
    ],
    undetermined: { voltages: ['a', 'b'] },
  },
  {
    id: 'b',
    title: 'two capacitors in series at 0 Hz, the node between them',
    elements: [...REST, capacitor('C1', '9', 'x', 1e-6), capacitor('C2', 'x', '0', 1e-6)],
    frequency: 0,
    problem: { kind: 'floatingNode', elements: ['C1', 'C2'], nodes: ['x'], words: /0 Hz/ },
    isSolved: true,
    figures: [AT_ZERO],
    undetermined: { voltages: ['x'] },
  },
  {
    id: 'c equal',
    title: 'two ideal EMFs in parallel, equal: their currents are not determined',
    elements: [...REST, voltageSource('V1', '9', '0', 10)],
    frequency: 50,
    problem: { kind: 'voltageLoop', elements: ['V9', 'V1'], nodes: ['0', '9'], words: /not determined/ },
    isSolved: true,
    figures: [SOLVED_REST, size('9', 50, '10.00000000000')],
    undetermined: { currents: ['V9', 'V1'] },
  },
  {
    id: 'c unequal',
    title: 'two ideal EMFs in parallel, unequal: there is no solution',
    elements: [...REST, voltageSource('V1', '9', '0', 11)],
    frequency: 50,
    problem: { kind: 'voltageLoop', elements: ['V9', 'V1'], nodes: ['0', '9'], words: /do not add up/ },
    isSolved: false,
    figures: [],
  },
  {
    id: 'd',
    title: 'a loop of ideal inductors and an EMF at 0 Hz',
    elements: [
      voltageSource('V1', '1', '0', 10),
      inductor('L1', '1', '2', 1e-3),
      inductor('L2', '2', '0', 1e-3),
      resistor('R1', '2', '0', 1),
    ],
    frequency: 0,
    problem: { kind: 'voltageLoop', elements: ['V1', 'L1', 'L2'], nodes: ['0', '1', '2'], words: /0 Hz/ },
    isSolved: false,
    figures: [],
  },
  {
    id: 'd above 0 Hz',
    title: 'the same above 0 Hz is solved',
    elements: [
      voltageSource('V1', '1', '0', 10),
      inductor('L1', '1', '2', 1e-3),
      inductor('L2', '2', '0', 1e-3),
    ],
    frequency: 50,
    isSolved: true,
    figures: [size('2', 50, '5.000000000000')],
  },
  {
    id: 'e',
    title: 'a current source into an open node',
    elements: [...REST, currentSource('I1', '0', 'x', 1)],
    frequency: 50,
    problem: { kind: 'floatingNode', elements: ['I1'], nodes: ['x'], words: /I1/ },
    isSolved: true,
    figures: [SOLVED_REST],
    undetermined: { voltages: ['x'] },
  },
  {
    id: 'f',
    title: 'ST-41 with one floating 200 Ω load, exactly at 50 MHz: the difference stands, the common voltage does not',
    elements: FLOATING_LOAD,
    frequency: F41,
    problem: { kind: 'resonance', elements: ['L1', 'C1', 'C2', 'L2'], nodes: ['a', 'b'], words: /resonate/ },
    isSolved: true,
    figures: [size({ of: 'elementVoltage', element: 'RL' }, F41, '2.000000000000'), size('in', F41, '1.000000000000')],
    undetermined: { voltages: ['a', 'b'] },
  },
  {
    id: 'f beside',
    title: 'the same a millionth beside that frequency has a unique solution',
    elements: FLOATING_LOAD,
    frequency: F41 * (1 + 1e-6),
    isSolved: true,
    figures: [
      // 2 V as long as the detuning squared does not show.
      { ...size({ of: 'elementVoltage', element: 'RL' }, F41 * (1 + 1e-6), '2'), within: 1e-9 },
    ],
  },
  {
    id: 'g series',
    title: 'a lossless series circuit driven by an EMF at its resonance',
    elements: [voltageSource('V1', '1', '0', 1), inductor('L1', '1', '2', L), capacitor('C1', '2', '0', C)],
    frequency: RESONANT,
    problem: { kind: 'resonance', elements: ['V1', 'L1', 'C1'], nodes: ['2'], words: /grows without bound/ },
    isSolved: false,
    figures: [],
  },
  {
    id: 'g parallel',
    title: 'a lossless parallel circuit driven by a current at its resonance',
    elements: [currentSource('I1', '0', '1', 1), inductor('L1', '1', '0', L), capacitor('C1', '1', '0', C)],
    frequency: RESONANT,
    problem: { kind: 'resonance', elements: ['L1', 'C1'], nodes: ['1'], words: /resonate/ },
    isSolved: false,
    figures: [],
  },
  {
    id: 'h',
    title: 'an ideal amplifier without a way from its output back to its inputs',
    elements: [
      ...REST,
      voltageSource('V1', 'in', '0', 1),
      resistor('R1', 'in', 'm', 1e3),
      resistor('R2', 'm', '0', 1e3),
      amplifier('A1', '0', 'm', 'out'),
      resistor('RL', 'out', '0', 1e3),
    ],
    frequency: 50,
    problem: { kind: 'noFeedback', elements: ['A1'], nodes: ['0', 'm', 'out'], words: /A1/ },
    isSolved: true,
    figures: [SOLVED_REST],
    undetermined: { voltages: ['out'] },
  },
  {
    id: 'i k = 1',
    title: 'complete coupling is legal: the secondary has √(L2/L1) times the voltage of the primary',
    elements: coupled(1),
    frequency: 1000,
    isSolved: true,
    figures: [
      { ...size({ of: 'ratio', node: '3', to: '2' }, 1000, '2'), within: 1e-12 },
    ],
  },
  {
    id: 'i k > 1',
    title: 'coupling beyond 1',
    elements: coupled(1.01),
    frequency: 1000,
    problem: { kind: 'invalid', elements: ['TR1'], nodes: [], words: /coupling/ },
    isSolved: false,
    figures: [],
  },
  {
    id: 'j',
    title: 'a zero resistance and inductance are ideal connections, a zero capacitance is open',
    elements: [
      voltageSource('V1', '1', '0', 10),
      resistor('R0', '1', '2', 0),
      inductor('L0', '2', '3', 0),
      capacitor('C0', '3', '0', 0),
      resistor('R1', '3', '0', 5),
    ],
    frequency: 50,
    isSolved: true,
    figures: [
      size('3', 50, '10.00000000000'),
      size({ of: 'current', element: 'R0' }, 50, '2.000000000000'),
      size({ of: 'current', element: 'L0' }, 50, '2.000000000000'),
      size({ of: 'current', element: 'C0' }, 50, '0.000000000000'),
    ],
  },
  {
    id: 'k',
    title: 'an island with a source of its own beside a solved network',
    elements: [...REST, voltageSource('V1', 'a', 'b', 10), resistor('R1', 'a', 'b', 5)],
    frequency: 50,
    problem: { kind: 'noReference', elements: ['V1', 'R1'], nodes: ['a', 'b'], words: /reference/ },
    isSolved: true,
    figures: [SOLVED_REST, size({ of: 'current', element: 'R1' }, 50, '2.000000000000')],
    undetermined: { voltages: ['a', 'b'] },
  },
  {
    id: 'sensed element not there',
    title: 'a controlled source that senses an element of no list',
    elements: [
      ...REST,
      { id: 'X1', kind: 'currentControlledVoltageSource', nodes: ['1', '0'], sensedElement: 'R7', transresistance: 10 },
      resistor('R1', '1', '0', 1),
    ],
    frequency: 50,
    problem: { kind: 'invalid', elements: ['X1'], nodes: [], words: /R7/ },
    isSolved: false,
    figures: [],
  },
  {
    id: 'two of one name',
    title: 'two elements of one name',
    elements: [...REST, resistor('R9', '9', '0', 7)],
    frequency: 50,
    problem: { kind: 'invalid', elements: ['R9'], nodes: [], words: /R9/ },
    isSolved: false,
    figures: [],
  },
  {
    id: 'missing value',
    title: 'a resistor without a value',
    elements: [...REST, resistor('R1', '9', '0', NaN)],
    frequency: 50,
    problem: { kind: 'invalid', elements: ['R1'], nodes: [], words: /R1/ },
    isSolved: false,
    figures: [],
  },
  {
    id: 'impossible value',
    title: 'coils of negative inductance',
    elements: [
      ...REST,
      { id: 'TR1', kind: 'coupledInductors', nodes: ['9', '0', '3', '0'], inductances: [-1e-3, 4e-3], coupling: 0.5 },
      resistor('R2', '3', '0', 100),
    ],
    frequency: 50,
    problem: { kind: 'invalid', elements: ['TR1'], nodes: [], words: /TR1/ },
    isSolved: false,
    figures: [],
  },
];
