import type { ElementList, Impedance } from '../elements/element-list';
import { ExtendedVector } from '../linear/extended';
import { faultOfFrequency } from './frequency';
import { portNamed } from './network-reading';
import type { Problem } from './problem';
import { isProblem, problem } from './problem';
import { ProblemPlaces } from './problem-places';
import { ResponseOperator } from './response-operator';
import type { SweepProblem } from './sweep';
import type { PortReferences, TwoPortKind, TwoPortMatrix } from './two-port-parameters';
import { fromPortSolutions, newMatrix, newPortSolutions } from './two-port-parameters';

/** The nodes of a port: first and second; the voltage is of the first over the second, the current enters at the first. */
export type PortNodes = readonly [string, string];

export interface TwoPortOptions {
  /** Hertz, in any order. */
  readonly frequencies: ArrayLike<number>;
  /** Reference resistance of the scattering parameters, Ω, positive: one for both ports or one for each. */
  readonly reference: number | PortReferences;
}

/** Matrices over the frequencies: eight numbers each, re and im of 11, 12, 21, 22; zeros where `exists` is 0. */
export interface TwoPortTable {
  readonly kind: TwoPortKind;
  readonly values: Float64Array;
  readonly exists: Uint8Array;
}

export interface TwoPortSweep {
  readonly ok: true;
  readonly frequencies: Float64Array;
  readonly references: PortReferences;
  /** The parameters of a kind; where they do not exist at a frequency, or nothing was found there, `exists` is 0. */
  parameters(kind: TwoPortKind): TwoPortTable;
  readonly problems: readonly SweepProblem[];
}

/**
 * The two-port that a network is between two pairs of nodes, all independent sources dead. The network is solved with
 * both ports closed by their reference resistances, where it is well conditioned and has an answer also without an
 * impedance or an admittance matrix; every kind of parameters is read off the port voltages and currents found so. An
 * impedance far from the references has all its digits too, as the small current or voltage that tells it is found as a
 * difference in extended arithmetic.
 *
 * A port may be any pair of nodes, also of a part that nothing else ties to the reference node. That the current which
 * enters a port leaves it at its other node is taken for granted, as in every two-port.
 */
export function twoPort(
  list: ElementList,
  ports: readonly [PortNodes, PortNodes],
  options: TwoPortOptions,
): TwoPortSweep | Problem {
  const references = referencesOf(options.reference);
  const faulty = references.find((value) => !(value > 0 && value < Infinity));
  if (faulty !== undefined) {
    return problem('invalid', [], [], 'A reference resistance must be a number of ohms above zero.');
  }
  const frequencies = Float64Array.from(options.frequencies);
  for (const frequency of frequencies) {
    const fault = faultOfFrequency(frequency);
    if (fault !== undefined) return problem('invalid', [], [], fault);
  }
  // Asked of the network as given first, so that no name of what is added to it stands in a message.
  const plain = ResponseOperator.of(list);
  if (isProblem(plain)) return plain;
  for (const port of ports) {
    const nodes = portNamed(plain.network, port);
    if (isProblem(nodes)) return nodes;
  }
  const operator = ResponseOperator.of(terminated(list, ports, references));
  if (isProblem(operator)) return operator;
  const solutions = new Float64Array(16 * frequencies.length);
  const determined = new Uint8Array(frequencies.length);
  const problems = new ProblemPlaces();
  const x = new ExtendedVector();
  for (const [place, frequency] of frequencies.entries()) {
    const found = solveAt(operator, ports, frequency, x, solutions.subarray(16 * place, 16 * place + 16));
    if (found === undefined) determined[place] = 1;
    else problems.note(found, place);
  }
  if (problems.first !== undefined && !determined.includes(1)) return problems.first;
  const parameters = (kind: TwoPortKind): TwoPortTable => {
    const values = new Float64Array(8 * frequencies.length);
    const exists = new Uint8Array(frequencies.length);
    const solution = newPortSolutions();
    for (let place = 0; place < frequencies.length; place++) {
      if (determined[place] === 0) continue;
      solution.set(solutions.subarray(16 * place, 16 * place + 16));
      exists[place] = fromPortSolutions(kind, solution, references, values.subarray(8 * place, 8 * place + 8)) ? 1 : 0;
    }
    return { kind, values, exists };
  };
  return { ok: true, frequencies, references, parameters, problems: problems.list };
}

/** One matrix of a table, or undefined where it does not exist. */
export function matrixAt({ values, exists }: TwoPortTable, place: number): TwoPortMatrix | undefined {
  if (exists[place] !== 1) return undefined;
  const matrix = newMatrix();
  matrix.set(values.subarray(8 * place, 8 * place + 8));
  return matrix;
}

function referencesOf(reference: number | PortReferences): PortReferences {
  return typeof reference === 'number' ? [reference, reference] : reference;
}

/**
 * The network with each port closed by its reference. The references are written as tabulated impedances, the same at
 * all frequencies, because the current of such an element is an unknown of its own and so has all its digits.
 */
function terminated(list: ElementList, ports: readonly [PortNodes, PortNodes], references: PortReferences): ElementList {
  const taken = new Set(list.elements.map(({ id }) => id));
  const closing = ports.map((nodes, port): Impedance => {
    let id = `the reference of port ${port + 1}`;
    while (taken.has(id)) id += '′';
    const resistance = references[port] ?? 1;
    const points = [0, Number.MAX_VALUE].map((frequency) => ({ frequency, resistance, reactance: 0 }));
    return { id, kind: 'impedance', nodes, points };
  });
  return { version: 1, elements: [...list.elements, ...closing] };
}

/** Port voltages and currents with one ampere sent into each port in turn: what its reference leaves of that goes in. */
function solveAt(
  operator: ResponseOperator,
  ports: readonly [PortNodes, PortNodes],
  frequency: number,
  x: ExtendedVector,
  out: Float64Array,
): Problem | undefined {
  const stuck = operator.prepare(frequency);
  if (stuck !== undefined) return stuck;
  const { nodeIndex, rowCount } = operator.network;
  const nodes = ports.map((pair) => pair.map((node) => nodeIndex.get(node) ?? 0));
  for (const [plus = 0, minus = 0] of nodes) {
    const free = operator.freedomOf(operator.voltageForm(plus, minus));
    if (free !== undefined) return free;
  }
  for (let driven = 0; driven < 2; driven++) {
    const [plus = 0, minus = 0] = nodes[driven] ?? [];
    const found = operator.inject(plus, minus, x);
    if (found !== undefined) return found;
    for (let port = 0; port < 2; port++) {
      const [a = 0, b = 0] = nodes[port] ?? [];
      const through = operator.layout.branchOf[rowCount - 2 + port] ?? -1;
      const at = 8 * driven + 4 * port;
      out[at] = operator.voltageRe(x, a, b);
      out[at + 1] = operator.voltageIm(x, a, b);
      out[at + 2] = -x.differenceRe(through, -1, port === driven ? 1 : 0);
      out[at + 3] = -x.differenceIm(through, -1);
    }
  }
  return undefined;
}
