import { Complex } from 'complex.js';
import type { ElementList } from '../elements/element-list';
import { ExtendedVector } from '../linear/extended';
import { portNamed } from './network-reading';
import type { Problem } from './problem';
import { isProblem } from './problem';
import { ResponseOperator } from './response-operator';
import type { PortNodes } from './two-port';

/** A load and the power that it takes. */
export interface BestLoad {
  /** Ω. */
  readonly impedance: Complex;
  /** Active power in it, W. */
  readonly power: number;
}

/** A network with its sources as seen from a pair of nodes (Helmholtz 1853, Thévenin 1883; Mayer and Norton 1926). */
export interface Equivalent {
  readonly ok: true;
  /** Hertz. */
  readonly frequency: number;
  /** The voltage of the first node over the second with nothing connected, V rms; undefined for a pure current source. */
  readonly openCircuitVoltage: Complex | undefined;
  /** The current through a short circuit from the first node to the second, A rms; undefined for a pure voltage source. */
  readonly shortCircuitCurrent: Complex | undefined;
  /** The impedance between the nodes with the independent sources dead, Ω; undefined where it is infinite. */
  readonly impedance: Complex | undefined;
  /**
   * The load that takes the most power of all, the conjugate of the impedance; undefined where the impedance has no
   * positive real part, so that there is no most.
   */
  readonly conjugateLoad: BestLoad | undefined;
  /** The resistance that takes the most power of all resistances, |Z|; undefined under the same condition, and for Z = 0. */
  readonly resistiveLoad: BestLoad | undefined;
}

/** Of an ampere sent in, so much must go through the network for its impedance to be told from none at all. */
const NOTHING = 64 * Number.EPSILON;

/**
 * The equivalent source of a network at a pair of nodes and one frequency. The nodes may lie in a part that nothing
 * ties to the reference node.
 *
 * Open-circuit voltage and impedance are found with nothing connected. Where the network has no unique solution so (a
 * current source into an open node), it is solved with a resistance across the pair instead, whose share is taken off.
 */
export function equivalent(list: ElementList, pair: PortNodes, frequency: number): Equivalent | Problem {
  const operator = ResponseOperator.of(list);
  if (isProblem(operator)) return operator;
  const nodes = portNamed(operator.network, pair);
  if (isProblem(nodes)) return nodes;
  const [first, second] = nodes;
  const stuck = operator.prepare(frequency);
  if (stuck?.kind === 'invalid' || stuck?.kind === 'noData' || stuck?.kind === 'notFinite') return stuck;
  const x = new ExtendedVector();
  const failed = stuck ?? operator.freedomOf(operator.voltageForm(first, second)) ?? operator.exciteSources(x);
  if (failed !== undefined) return withShunt(list, pair, frequency, failed);
  const open = new Complex(operator.voltageRe(x, first, second), operator.voltageIm(x, first, second));
  const found = operator.inject(first, second, x);
  if (found !== undefined) return found;
  const impedance = new Complex(operator.voltageRe(x, first, second), operator.voltageIm(x, first, second));
  const short = impedance.isZero() ? undefined : open.div(impedance);
  return answer(frequency, open, short, impedance);
}

/** The network closed by 1 Ω, chosen only for being neither nothing nor infinite. */
function withShunt(list: ElementList, pair: PortNodes, frequency: number, failed: Problem): Equivalent | Problem {
  let id = 'a load';
  while (list.elements.some((element) => element.id === id)) id += '′';
  const points = [0, Number.MAX_VALUE].map((at) => ({ frequency: at, resistance: 1, reactance: 0 }));
  const operator = ResponseOperator.of({ version: 1, elements: [...list.elements, { id, kind: 'impedance', nodes: pair, points }] });
  if (isProblem(operator)) return operator;
  // What is wrong with the network by itself is said of that, without the resistance.
  if (operator.prepare(frequency) !== undefined) return failed;
  const [first = 0, second = 0] = pair.map((node) => operator.network.nodeIndex.get(node) ?? 0);
  const x = new ExtendedVector();
  const through = operator.layout.branchOf[operator.network.rowCount - 1] ?? -1;
  if (operator.inject(first, second, x) !== undefined) return failed;
  // What the ampere leaves to the network, and the voltage that it does it by: the admittance is their ratio.
  const left = new Complex(-x.differenceRe(through, -1, 1), -x.differenceIm(through, -1));
  const voltage = new Complex(operator.voltageRe(x, first, second), operator.voltageIm(x, first, second));
  if (voltage.isZero()) return failed;
  const admittance = left.div(voltage);
  if (operator.exciteSources(x) !== undefined) return failed;
  const loaded = new Complex(operator.voltageRe(x, first, second), operator.voltageIm(x, first, second));
  const current = new Complex(x.re[through] ?? 0, x.im[through] ?? 0);
  const short = current.add(admittance.mul(loaded));
  if (left.abs() > NOTHING) {
    const impedance = admittance.inverse();
    return answer(frequency, short.mul(impedance), short, impedance);
  }
  return answer(frequency, undefined, short, undefined);
}

function answer(
  frequency: number,
  openCircuitVoltage: Complex | undefined,
  shortCircuitCurrent: Complex | undefined,
  impedance: Complex | undefined,
): Equivalent {
  const loads = { conjugateLoad: undefined, resistiveLoad: undefined };
  const base = { ok: true, frequency, openCircuitVoltage, shortCircuitCurrent, impedance } as const;
  if (openCircuitVoltage === undefined || impedance === undefined || !(impedance.re > 0)) return { ...base, ...loads };
  const square = openCircuitVoltage.abs() ** 2;
  const size = impedance.abs();
  return {
    ...base,
    conjugateLoad: { impedance: impedance.conjugate(), power: square / (4 * impedance.re) },
    // |V|²·R/|Z + R|² with R = |Z|
    resistiveLoad: { impedance: new Complex(size, 0), power: square / (2 * (size + impedance.re)) },
  };
}
