import type { ElementList, SourceValue } from '../elements/element-list';
import { isLive, phasorIm, phasorRe } from '../elements/source-value';
import { validateElementList } from '../elements/validate-element-list';
import { ExtendedSolver, ExtendedVector } from '../linear/extended';
import { SparseLu } from '../linear/sparse-lu';
import { faultOfFrequency } from './frequency';
import type { Network } from './network';
import { elementAt, toNetwork } from './network';
import type { Problem } from './problem';
import { listNames, nodeWords, problem } from './problem';
import { BY_ADMITTANCE, BY_BRANCH, ResponseLayout } from './response-layout';

/** A linear form of the unknowns: Σ coefficient · unknown. An unknown of −1 is the reference node's voltage, 0. */
export interface LinearForm {
  readonly unknowns: readonly number[];
  readonly re: readonly number[];
  readonly im: readonly number[];
}

/** The factors of a new frequency are taken along the old order unless a pivot is smaller than this in its row. */
const GOOD_PIVOT = 1e-4;

/** So small against its terms, a sum is nothing but rounding. */
const ROUNDING = 1e-10;

interface Prepared {
  readonly layout: ResponseLayout;
  readonly lu: SparseLu;
  readonly solver: ExtendedSolver;
  readonly bRe: Float64Array;
  readonly bIm: Float64Array;
  isOrdered: boolean;
}

/**
 * What a network answers, at one frequency after another, to a current sent into any pair of nodes, and what any of its
 * outputs depends on. `prepare` sets the frequency; all else speaks of that. Every solution is refined in extended
 * arithmetic against the elements' own values (see `ExtendedSolver`), so that it is as good as those unless the network
 * is within rounding of having no unique solution, which is told.
 *
 * Independent sources are dead but in `exciteSources`. In a part that nothing ties to the rest, differences are
 * answered, and what depends on its common mode is told to be undetermined. Phasors are rms; signs as everywhere: a
 * port's current enters at its first node.
 */
export class ResponseOperator {
  readonly network: Network;
  private readonly direct: { prepared?: Prepared } = {};
  private readonly alternating: { prepared?: Prepared } = {};
  private current: Prepared | undefined;
  private modes: ExtendedVector[] | undefined;
  /** Hertz; the frequency that is prepared. */
  frequency = 0;

  private constructor(list: ElementList) {
    this.network = toNetwork(list);
  }

  static of(list: ElementList): ResponseOperator | Problem {
    const checked = validateElementList(list);
    if (!checked.ok) return problem('invalid', [], [], checked.message);
    return new ResponseOperator(checked.list);
  }

  /** The equations at the frequency that is prepared. */
  get layout(): ResponseLayout {
    return this.now().layout;
  }

  /** The equations at that frequency, also where they have no unique solution. */
  get layoutAt(): ResponseLayout {
    const { prepared } = this.frequency === 0 ? this.direct : this.alternating;
    if (prepared === undefined) throw new Error('no frequency is prepared');
    return prepared.layout;
  }

  /** rad/s. */
  get omega(): number {
    return 2 * Math.PI * this.frequency;
  }

  /** Sets the frequency, hertz, and answers what stands in the way of solving there. */
  prepare(frequency: number): Problem | undefined {
    this.current = undefined;
    const fault = faultOfFrequency(frequency);
    if (fault !== undefined) return problem('invalid', [], [], fault);
    this.frequency = frequency;
    this.modes = undefined;
    const kept = frequency === 0 ? this.direct : this.alternating;
    const prepared = (kept.prepared ??= prepareLayout(new ResponseLayout(this.network, frequency === 0)));
    const { layout, lu } = prepared;
    const beyond = layout.fill(frequency);
    if (beyond >= 0) return this.tableProblem(beyond);
    const { sumRe, sumIm } = layout.matrix;
    if (!sumRe.every(Number.isFinite) || !sumIm.every(Number.isFinite)) {
      return problem('notFinite', [], [], `At ${frequency} Hz some admittances are too large for the arithmetic; change the values.`);
    }
    const isGood = prepared.isOrdered && lu.factor(sumRe, sumIm) >= GOOD_PIVOT;
    if (!isGood) {
      prepared.isOrdered = lu.analyse(sumRe, sumIm);
      if (!prepared.isOrdered) return this.singularProblem(layout, [...lu.dependent.columns]);
      if (lu.factor(sumRe, sumIm) === 0) return this.singularProblem(layout, []);
    }
    this.current = prepared;
    return undefined;
  }

  /** x ← the unknowns with one ampere that enters the network at `plus` and leaves it at `minus`. */
  inject(plus: number, minus: number, x: ExtendedVector): Problem | undefined {
    const prepared = this.now();
    prepared.bRe.fill(0);
    prepared.bIm.fill(0);
    prepared.layout.addCurrent(plus, 1, 1, 0, prepared.bRe, prepared.bIm);
    prepared.layout.addCurrent(minus, -1, 1, 0, prepared.bRe, prepared.bIm);
    return this.solve(prepared, x);
  }

  /** x ← the unknowns with a source of one volt, or one ampere, at the place of the source whose port has the row. */
  exciteSource(row: number, x: ExtendedVector): Problem | undefined {
    const prepared = this.now();
    prepared.bRe.fill(0);
    prepared.bIm.fill(0);
    prepared.layout.addSource(row, 1, 0, prepared.bRe, prepared.bIm);
    return this.solve(prepared, x);
  }

  /** x ← the unknowns with the independent sources as they are at this frequency. */
  exciteSources(x: ExtendedVector): Problem | undefined {
    const prepared = this.now();
    prepared.bRe.fill(0);
    prepared.bIm.fill(0);
    this.network.laws.forEach((law, row) => {
      if (law.law !== 'voltage' && law.law !== 'current') return;
      const value = this.phasorOf(law.value);
      prepared.layout.addSource(row, value[0], value[1], prepared.bRe, prepared.bIm);
    });
    return this.solve(prepared, x);
  }

  /** What a source delivers at this frequency, rms. */
  phasorOf(value: SourceValue): readonly [re: number, im: number] {
    return isLive(value, this) ? [phasorRe(value), phasorIm(value)] : [0, 0];
  }

  /**
   * x̂ ← the adjoint of an output Σ c·x: the multipliers of the equations, by which it depends on what stands on their
   * right-hand sides, and on a coefficient of the matrix by −x̂[row]·x[column] (Director and Rohrer, IEEE Trans. Circuit
   * Theory 16 (1969) 318, doi 10.1109/TCT.1969.1082965). Of an equation that was left out the multiplier is 0.
   */
  adjoint(output: LinearForm, x: ExtendedVector): Problem | undefined {
    const prepared = this.now();
    const { layout, solver, bRe, bIm } = prepared;
    const free = this.freedomOf(output);
    if (free !== undefined) return free;
    bRe.fill(0);
    bIm.fill(0);
    output.unknowns.forEach((unknown, place) => {
      if (unknown < 0) return;
      bRe[unknown] = (bRe[unknown] ?? 0) + (output.re[place] ?? 0);
      bIm[unknown] = (bIm[unknown] ?? 0) + (output.im[place] ?? 0);
    });
    if (!solver.solve(bRe, bIm, x, true)) return this.singularProblem(layout, []);
    for (const { unknown } of layout.pins) {
      for (const part of [x.re, x.im, x.reLow, x.imLow]) part[unknown] = 0;
    }
    return undefined;
  }

  /** The voltage of a pair of nodes, as a form. */
  voltageForm(plus: number, minus: number): LinearForm {
    return { unknowns: [plus - 1, minus - 1], re: [1, -1], im: [0, 0] };
  }

  /**
   * The current of a port, as a form. An independent current source's is given, and none of the unknowns: the form is
   * empty then, and `phasorOf` answers it.
   */
  currentForm(row: number): LinearForm {
    const { network } = this;
    const { form, branchOf } = this.layout;
    if (form[row] === BY_BRANCH) return { unknowns: [branchOf[row] ?? -1], re: [1], im: [0] };
    if (form[row] !== BY_ADMITTANCE) return { unknowns: [], re: [], im: [] };
    const [re, im] = this.admittanceOf(row);
    return {
      unknowns: [(network.first[row] ?? 0) - 1, (network.second[row] ?? 0) - 1],
      re: [re, -re],
      im: [im, -im],
    };
  }

  /** The admittance of a port that has one, siemens. */
  admittanceOf(row: number): readonly [re: number, im: number] {
    const law = this.network.laws[row];
    if (law?.law === 'resistance') return [1 / law.resistance, 0];
    if (law?.law === 'capacitance') return [0, this.omega * law.capacitance];
    if (law?.law === 'inductance') return [0, -1 / (this.omega * law.inductance)];
    return [0, 0];
  }

  /** The voltage of a pair of nodes in a solution, by parts. */
  voltageRe(x: ExtendedVector, plus: number, minus: number): number {
    return x.differenceRe(plus - 1, minus - 1);
  }

  voltageIm(x: ExtendedVector, plus: number, minus: number): number {
    return x.differenceIm(plus - 1, minus - 1);
  }

  /** The voltage of a port. */
  portVoltage(x: ExtendedVector, row: number): readonly [re: number, im: number] {
    const { first, second } = this.network;
    const [a, b] = [first[row] ?? 0, second[row] ?? 0];
    return [this.voltageRe(x, a, b), this.voltageIm(x, a, b)];
  }

  /** The current of a port; of a source's own given current nothing, see `phasorOf`. */
  portCurrent(x: ExtendedVector, row: number): readonly [re: number, im: number] {
    const { form, branchOf } = this.layout;
    if (form[row] === BY_BRANCH) return [x.re[branchOf[row] ?? 0] ?? 0, x.im[branchOf[row] ?? 0] ?? 0];
    if (form[row] !== BY_ADMITTANCE) return [0, 0];
    const [yRe, yIm] = this.admittanceOf(row);
    const [vRe, vIm] = this.portVoltage(x, row);
    return [yRe * vRe - yIm * vIm, yRe * vIm + yIm * vRe];
  }

  /** The multiplier of a port's own equation in an adjoint solution. */
  multiplier(x: ExtendedVector, row: number): readonly [re: number, im: number] {
    const { equationOf, size } = this.layout;
    const equation = equationOf[row] ?? -1;
    return equation < 0 || equation >= size ? [0, 0] : [x.re[equation] ?? 0, x.im[equation] ?? 0];
  }

  /** Σ c·x; exact differences where the form is a voltage. */
  valueOf({ unknowns, re, im }: LinearForm, x: ExtendedVector): readonly [re: number, im: number] {
    const [one, other] = unknowns;
    if (unknowns.length === 2 && one !== undefined && other !== undefined && re[0] === -(re[1] ?? 0) && im[0] === -(im[1] ?? 0)) {
      const [dRe, dIm] = [x.differenceRe(one, other), x.differenceIm(one, other)];
      const [cRe, cIm] = [re[0] ?? 0, im[0] ?? 0];
      return [cRe * dRe - cIm * dIm, cRe * dIm + cIm * dRe];
    }
    let sumRe = 0;
    let sumIm = 0;
    unknowns.forEach((unknown, place) => {
      if (unknown < 0) return;
      const [cRe, cIm] = [re[place] ?? 0, im[place] ?? 0];
      sumRe += cRe * (x.re[unknown] ?? 0) - cIm * (x.im[unknown] ?? 0);
      sumIm += cRe * (x.im[unknown] ?? 0) + cIm * (x.re[unknown] ?? 0);
    });
    return [sumRe, sumIm];
  }

  /** Why an output is not determined, or undefined. */
  freedomOf({ unknowns, re, im }: LinearForm): Problem | undefined {
    const { layout } = this.now();
    if (layout.pins.length === 0) return undefined;
    const modes = this.freeModes();
    if (modes === undefined) return this.singularProblem(layout, []);
    for (const [place, mode] of modes.entries()) {
      let sumRe = 0;
      let sumIm = 0;
      let size = 0;
      unknowns.forEach((unknown, term) => {
        if (unknown < 0) return;
        const [cRe, cIm] = [re[term] ?? 0, im[term] ?? 0];
        const [nRe, nIm] = [mode.re[unknown] ?? 0, mode.im[unknown] ?? 0];
        sumRe += cRe * nRe - cIm * nIm;
        sumIm += cRe * nIm + cIm * nRe;
        size += (Math.abs(cRe) + Math.abs(cIm)) * (Math.abs(nRe) + Math.abs(nIm));
      });
      if (Math.abs(sumRe) + Math.abs(sumIm) > ROUNDING * size) return this.freeProblem(place);
    }
    return undefined;
  }

  private now(): Prepared {
    if (this.current === undefined) throw new Error('no frequency is prepared');
    return this.current;
  }

  private solve({ layout, solver, bRe, bIm }: Prepared, x: ExtendedVector): Problem | undefined {
    if (!solver.solve(bRe, bIm, x)) return this.singularProblem(layout, []);
    for (const [place, { outerRow }] of layout.pins.entries()) {
      const off = Math.abs(solver.outerRe(outerRow)) + Math.abs(solver.outerIm(outerRow));
      if (off > ROUNDING * this.sizeOfRow(layout, outerRow, x, bRe, bIm)) return this.contradictionProblem(place);
    }
    return undefined;
  }

  /** Σ of the sizes of an equation's terms. */
  private sizeOfRow({ matrix }: ResponseLayout, row: number, x: ExtendedVector, bRe: Float64Array, bIm: Float64Array): number {
    let size = Math.abs(bRe[row] ?? 0) + Math.abs(bIm[row] ?? 0);
    for (let at = 0; at < matrix.row.length; at++) {
      if (matrix.row[at] !== row) continue;
      const from = matrix.column[at] ?? 0;
      const entry = Math.abs(matrix.re[at] ?? 0) + Math.abs(matrix.im[at] ?? 0);
      size += entry * (Math.abs(x.re[from] ?? 0) + Math.abs(x.im[from] ?? 0));
    }
    return size;
  }

  /** For each pin what may be added to a solution without breaking any equation. */
  private freeModes(): readonly ExtendedVector[] | undefined {
    if (this.modes !== undefined) return this.modes;
    const { layout, solver, lu } = this.now();
    const isPlain = !layout.isCrossed && layout.pins.every(({ cause }) => cause === 'part');
    const modes: ExtendedVector[] = [];
    const bRe = new Float64Array(layout.size);
    const bIm = new Float64Array(layout.size);
    for (const { unknown, of } of layout.pins) {
      const mode = new ExtendedVector(layout.size);
      modes.push(mode);
      if (isPlain) {
        layout.partOf.forEach((part, node) => {
          if (part === layout.partOf[of]) mode.re[node - 1] = 1;
        });
        continue;
      }
      bRe.fill(0);
      bRe[unknown] = 1;
      if (!solver.solve(bRe, bIm, mode)) return undefined;
      clean(mode, lu.columnScale);
    }
    this.modes = modes;
    return modes;
  }

  private freeProblem(place: number): Problem {
    const { layout } = this.now();
    const pin = layout.pins[place];
    if (pin?.cause === 'loop') return this.loopProblem(pin.of, 'so the currents in it are not determined.');
    const nodes = this.nodesOfPart(layout, pin?.of ?? 0);
    return problem(
      'floatingNode',
      [],
      nodes,
      `Nothing ties ${nodeWords(nodes)} to the rest of the network at ${this.frequency} Hz, so the voltage between them and ` +
        'the rest is not determined. Connect one of them to the reference node, or read between two of them.',
    );
  }

  private contradictionProblem(place: number): Problem {
    const { layout } = this.now();
    const pin = layout.pins[place];
    if (pin?.cause === 'loop') return this.loopProblem(pin.of, 'and the voltages around it do not add up to zero.');
    const nodes = this.nodesOfPart(layout, pin?.of ?? 0);
    return problem(
      'floatingNode',
      [],
      nodes,
      `A current is driven into ${nodeWords(nodes)} at ${this.frequency} Hz and has no way back from there. ` +
        'Give it one, or take the current source out.',
    );
  }

  private loopProblem(row: number, consequence: string): Problem {
    const { network } = this;
    const id = elementAt(network, row)?.id ?? '';
    const nodes = [network.first[row] ?? 0, network.second[row] ?? 0].map((node) => network.nodeNames[node] ?? '');
    return problem(
      'voltageLoop',
      [id],
      nodes,
      `${id} closes a loop with no impedance in it at ${this.frequency} Hz, ${consequence} ` +
        'Put a small resistance in series, or open the loop.',
    );
  }

  private nodesOfPart({ partOf }: ResponseLayout, of: number): string[] {
    return this.network.nodeNames.filter((_, node) => partOf[node] === partOf[of]);
  }

  private tableProblem(row: number): Problem {
    const id = elementAt(this.network, row)?.id ?? '';
    return problem(
      'noData',
      [id],
      [],
      `The table of ${id} does not reach ${this.frequency} Hz. Choose a frequency within it, or give it more points.`,
    );
  }

  /** `unknowns` are those that the equations leave free, where that is known. */
  private singularProblem({ branchOf }: ResponseLayout, unknowns: readonly number[]): Problem {
    const { network } = this;
    const nodeCount = network.nodeNames.length;
    const nodes = unknowns.flatMap((unknown) => (unknown < nodeCount - 1 ? [network.nodeNames[unknown + 1] ?? ''] : []));
    const elements = unknowns.flatMap((unknown) => {
      const row = unknown < nodeCount - 1 ? -1 : branchOf.indexOf(unknown);
      return row < 0 ? [] : [elementAt(network, row)?.id ?? ''];
    });
    const free = [
      ...(nodes.length === 0 ? [] : [`the voltage of ${nodeWords(nodes)}`]),
      ...(elements.length === 0 ? [] : [`the current of ${listNames(elements)}`]),
    ];
    const what = free.length === 0 ? 'some of its voltages and currents' : free.join(' and ');
    return problem(
      'singular',
      elements,
      nodes,
      `At ${this.frequency} Hz the equations of the network have no unique solution, or are within rounding of having none: ` +
        `they leave ${what} free. Look for a lossless resonance, a loop of ideal elements, or an amplifier without feedback there.`,
    );
  }
}

function prepareLayout(layout: ResponseLayout): Prepared {
  const { matrix } = layout;
  const lu = new SparseLu(matrix.pattern);
  const bRe = new Float64Array(matrix.rowCount);
  const bIm = new Float64Array(matrix.rowCount);
  return { layout, lu, solver: new ExtendedSolver(matrix, lu), bRe, bIm, isOrdered: false };
}

/** What is nothing but rounding against the largest, each in the scale of its own unknown, becomes nothing. */
function clean({ re, im }: ExtendedVector, scale: Float64Array): void {
  const sizeAt = (at: number): number => (Math.abs(re[at] ?? 0) + Math.abs(im[at] ?? 0)) / (scale[at] ?? 1);
  let largest = 0;
  for (let at = 0; at < re.length; at++) largest = Math.max(largest, sizeAt(at));
  for (let at = 0; at < re.length; at++) {
    if (sizeAt(at) > Number.EPSILON * largest) continue;
    re[at] = 0;
    im[at] = 0;
  }
}

