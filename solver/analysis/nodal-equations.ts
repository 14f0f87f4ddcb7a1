import { mutualInductance } from '../elements/coupled-inductors';
import type { Element, ElementList } from '../elements/element-list';
import type { Law, Tabulated } from '../elements/law';
import { ExtendedVector } from '../linear/extended';
import { elementAt, rowOf } from './network';
import type { Problem, ProblemKind } from './problem';
import { isProblem, problem } from './problem';
import { BY_ADMITTANCE, BY_BRANCH, BY_SOURCE } from './response-layout';
import { ResponseOperator } from './response-operator';
import type { Factor, Product, Sum } from './symbols';
import { admittanceSymbol, equationSymbols, negated, ONE, product } from './symbols';

/** What an equation is solved for. */
export type NodalUnknown =
  | { readonly quantity: 'voltage'; readonly node: string }
  /** Entering the port at its first node. */
  | { readonly quantity: 'current'; readonly element: string; readonly port: number };

/** A coefficient in symbols and in numbers. */
export interface NodalCoefficient {
  readonly sum: Sum;
  readonly re: number;
  readonly im: number;
}

/** A coefficient times an unknown, by its place among the unknowns. */
export interface NodalTerm extends NodalCoefficient {
  readonly unknown: number;
}

/** Σ terms = right. */
export interface NodalEquation {
  readonly about:
    /** The currents that leave a node add up to what is sent in. */
    | { readonly law: 'current'; readonly node: string }
    /** What a port of an element is. */
    | { readonly law: 'element'; readonly element: string; readonly port: number }
    /** A choice where the network leaves one: the voltage of a node in a part that floats, or a current in a loop, is 0. */
    | { readonly law: 'choice'; readonly unknown: number };
  readonly terms: readonly NodalTerm[];
  readonly right: NodalCoefficient;
}

export interface NodalEquations {
  readonly ok: true;
  /** Hertz. */
  readonly frequency: number;
  readonly unknowns: readonly NodalUnknown[];
  /** One for each unknown, in the same order. */
  readonly equations: readonly NodalEquation[];
}

/**
 * The modified nodal equations of a network at a frequency (Ho, Ruehli and Brennan, IEEE Trans. Circuits Syst. 22 (1975)
 * 504, doi 10.1109/TCS.1975.1084079), as a hand would write them and as the solver's `ResponseOperator` has them: a
 * current law for each node but the reference, then the law of each port whose current is an unknown. The independent
 * sources stand on the right. At 0 Hz what a capacitance or an inductance would add is left out, not written as zero.
 *
 * They are data, tokens and numbers; how they are set is another's business. Whether they have just one solution is not
 * asked, only that they do not contradict each other.
 */
export function nodalEquations(list: ElementList, frequency: number): NodalEquations | Problem {
  const operator = ResponseOperator.of(list);
  if (isProblem(operator)) return operator;
  const stuck = operator.prepare(frequency);
  // Equations without a unique solution can be written all the same; those that contradict each other cannot, as one of
  // them would have been left out for following from the others.
  const failed = stuck ?? operator.exciteSources(new ExtendedVector());
  if (failed !== undefined && !WITHOUT_UNIQUE_SOLUTION.has(failed.kind)) return failed;
  const writer = new Writer(operator);
  const equations = writer.write();
  if (equations.some(({ terms, right }) => [...terms, right].some(({ re, im }) => !Number.isFinite(re) || !Number.isFinite(im)))) {
    return problem('notFinite', [], [], `At ${frequency} Hz a coefficient is too large for the arithmetic; change the values.`);
  }
  return { ok: true, frequency, unknowns: writer.unknowns(), equations };
}

const WITHOUT_UNIQUE_SOLUTION: ReadonlySet<ProblemKind> = new Set(['singular', 'resonance', 'noFeedback']);

class Writer {
  private readonly elements: ReadonlyMap<string, Element>;
  /** For each row of the matrix, those beyond the size too: the sum at each unknown, and the right-hand side. */
  private readonly rows: Map<number, Product[]>[];
  private readonly rights: Product[][];

  constructor(private readonly operator: ResponseOperator) {
    const { rowCount } = operator.layoutAt.matrix;
    this.elements = new Map(operator.network.elements.map((element) => [element.id, element]));
    this.rows = Array.from({ length: rowCount }, () => new Map<number, Product[]>());
    this.rights = Array.from({ length: rowCount }, () => []);
  }

  unknowns(): readonly NodalUnknown[] {
    const { network, layoutAt } = this.operator;
    const nodes = network.nodeNames.slice(1).map((node): NodalUnknown => ({ quantity: 'voltage', node }));
    const currents = [...layoutAt.branchOf.keys()].flatMap((row): NodalUnknown[] =>
      (layoutAt.branchOf[row] ?? -1) < 0 ? [] : [{ quantity: 'current', element: elementAt(network, row)?.id ?? '', port: this.portOf(row) }],
    );
    return [...nodes, ...currents];
  }

  write(): readonly NodalEquation[] {
    const { network, layoutAt } = this.operator;
    network.laws.forEach((law, row) => {
      this.writePort(row, law);
    });
    const unknowns = this.unknowns();
    return unknowns.map((unknown, place): NodalEquation => {
      if (layoutAt.pins.some((pin) => pin.unknown === place)) {
        return { about: { law: 'choice', unknown: place }, terms: [{ unknown: place, ...this.coefficient([ONE]) }], right: this.coefficient([]) };
      }
      const terms = [...(this.rows[place] ?? new Map<number, Product[]>())].sort(([one], [other]) => one - other);
      return {
        about:
          unknown.quantity === 'voltage'
            ? { law: 'current', node: unknown.node }
            : { law: 'element', element: unknown.element, port: unknown.port },
        terms: terms.map(([at, sum]) => ({ unknown: at, ...this.coefficient(sum) })),
        right: this.coefficient(this.rights[place] ?? []),
      };
    });
  }

  private portOf(row: number): number {
    const { elementOf, rowStart } = this.operator.network;
    return row - (rowStart[elementOf[row] ?? 0] ?? 0);
  }

  private add(row: number, unknown: number, sum: Sum): void {
    if (row < 0 || unknown < 0) return;
    const known = this.rows[row]?.get(unknown);
    if (known === undefined) this.rows[row]?.set(unknown, [...sum]);
    else known.push(...sum);
  }

  private addVoltage(row: number, port: number, sum: Sum): void {
    const { first, second } = this.operator.network;
    const [a, b] = [(first[port] ?? 0) - 1, (second[port] ?? 0) - 1];
    if (a === b) return;
    this.add(row, a, sum);
    this.add(row, b, negated(sum));
  }

  private writePort(row: number, law: Law): void {
    const { network, layoutAt } = this.operator;
    const element = elementAt(network, row);
    if (element === undefined) return;
    const a = (network.first[row] ?? 0) - 1;
    const b = (network.second[row] ?? 0) - 1;
    if (layoutAt.form[row] === BY_ADMITTANCE) {
      const y = admittanceSymbol(element, law);
      this.addVoltage(a, row, y);
      this.addVoltage(b, row, negated(y));
      return;
    }
    if (layoutAt.form[row] === BY_SOURCE) {
      if (a === b) return;
      const delivered = [product({ symbol: 'source', element: element.id })];
      this.rights[a]?.push(...negated(delivered));
      this.rights[b]?.push(...delivered);
      return;
    }
    if (layoutAt.form[row] !== BY_BRANCH) return;
    const branch = layoutAt.branchOf[row] ?? -1;
    if (a !== b) {
      this.add(a, branch, [ONE]);
      this.add(b, branch, negated([ONE]));
    }
    if (law.law === 'voltage') this.rights[branch]?.push(product({ symbol: 'source', element: element.id }));
    for (const term of equationSymbols(element, this.portOf(row), law, layoutAt.isDirect)) {
      const port = typeof term.port === 'number' ? row - this.portOf(row) + term.port : rowOf(network, term.port.element);
      if (term.of === 'voltage') this.addVoltage(branch, port, term.coefficient);
      else if (layoutAt.form[port] === BY_SOURCE) this.moveToRight(branch, port, term.coefficient);
      else this.add(branch, layoutAt.branchOf[port] ?? -1, term.coefficient);
    }
  }

  /** The current of an independent source is known: its term goes to the other side. */
  private moveToRight(row: number, source: number, coefficient: Sum): void {
    const id = elementAt(this.operator.network, source)?.id ?? '';
    const moved = negated(coefficient).map((one) => ({ ...one, numerator: [...one.numerator, { symbol: 'source', element: id } as const] }));
    this.rights[row]?.push(...moved);
  }

  private coefficient(sum: Sum): NodalCoefficient {
    let re = 0;
    let im = 0;
    for (const one of sum) {
      const value = this.valueOf(one);
      re += value[0];
      im += value[1];
    }
    return { sum, re, im };
  }

  private valueOf({ sign, numerator, denominator }: Product): readonly [number, number] {
    let value: readonly [number, number] = [sign, 0];
    for (const factor of numerator) value = times(value, this.numberOf(factor));
    let divisor: readonly [number, number] = [1, 0];
    for (const factor of denominator) divisor = times(divisor, this.numberOf(factor));
    const square = divisor[0] * divisor[0] + divisor[1] * divisor[1];
    if (divisor[1] === 0) return [value[0] / divisor[0], value[1] / divisor[0]];
    return times(value, [divisor[0] / square, -divisor[1] / square]);
  }

  private numberOf(factor: Factor): readonly [number, number] {
    const { operator } = this;
    switch (factor.symbol) {
      case 'imaginaryUnit':
        return [0, 1];
      case 'angularFrequency':
        return [operator.omega, 0];
      case 'frequency':
        return [operator.frequency, 0];
      case 'value':
        return [fieldOf(this.elements.get(factor.element), factor.field, factor.index), 0];
      case 'mutualInductance': {
        const element = this.elements.get(factor.element);
        if (element?.kind !== 'coupledInductors') return [0, 0];
        return [mutualInductance(element.inductances, element.coupling, ...factor.coils), 0];
      }
      case 'source': {
        const law = operator.network.laws[rowOf(operator.network, factor.element)];
        return law?.law === 'voltage' || law?.law === 'current' ? operator.phasorOf(law.value) : [0, 0];
      }
      case 'impedance':
        return this.tabulated(factor.element, 0, (law) => (law.law === 'impedance' ? law.at : undefined));
      case 's11':
        return oneLess(this.wave(factor.element, 0, 0));
      case 's22':
        return oneLess(this.wave(factor.element, 1, 1));
      case 's12':
      case 'propagation':
        return minus(this.wave(factor.element, 0, 1));
      case 's21':
        return minus(this.wave(factor.element, 1, 0));
    }
  }

  /** The coefficient of the voltage of one port in the wave equation of another. */
  private wave(id: string, port: number, of: number): readonly [number, number] {
    return this.tabulated(id, port, (law) => {
      const term = law.law === 'equation' ? law.terms.find((one) => one.port === of && one.of === 'voltage') : undefined;
      return term !== undefined && 'at' in term.coefficient ? term.coefficient.at : undefined;
    });
  }

  private tabulated(id: string, port: number, pick: (law: Law) => Tabulated | undefined): readonly [number, number] {
    const { network, frequency } = this.operator;
    const law = network.laws[rowOf(network, id, port)];
    const at = law === undefined ? undefined : pick(law);
    return at?.(frequency) ?? [0, 0];
  }
}

function fieldOf(element: Element | undefined, field: string, index: number | undefined): number {
  const value = (element as unknown as Readonly<Record<string, unknown>> | undefined)?.[field];
  const one: unknown = index === undefined || !Array.isArray(value) ? value : value[index];
  return typeof one === 'number' ? one : NaN;
}

function times(one: readonly [number, number], other: readonly [number, number]): readonly [number, number] {
  return [one[0] * other[0] - one[1] * other[1], one[0] * other[1] + one[1] * other[0]];
}

function minus([re, im]: readonly [number, number]): readonly [number, number] {
  return [-re, -im];
}

/** 1 − x. */
function oneLess([re, im]: readonly [number, number]): readonly [number, number] {
  return [1 - re, -im];
}
