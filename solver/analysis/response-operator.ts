import type { ElementList, SourceValue } from '../elements/element-list';
import { isLive, phasorIm, phasorRe } from '../elements/source-value';
import { validateElementList } from '../elements/validate-element-list';
import type { ExtendedVector } from '../linear/extended';
import { dependencesOf } from './dependences';
import { amplifiersWithoutFeedback } from './feedback';
import { faultOfFrequency } from './frequency';
import type { Network } from './network';
import { branchTableOf, toNetwork } from './network';
import type { Problem } from './problem';
import { problem } from './problem';
import type { LinearForm } from './response-equations';
import { isMovedBy, ResponseEquations } from './response-equations';
import { BY_ADMITTANCE, BY_BRANCH, ResponseLayout } from './response-layout';
import { contradictionProblem, dependenceProblem, freeProblem, noSolutionProblem, tableProblem } from './response-problems';

/**
 * Where a pivot, or a sum of admittances, has cancelled to this against its terms, it is asked whether some equations
 * follow from others; where a trial solution does not converge, too, which is tried below the second figure.
 */
const CANCELLED = 64 * Number.EPSILON;
const DOUBTFUL = 2 ** -30;

/** The equations of 0 Hz, or of all other frequencies: as they are solved, and expanded, to be looked at with care. */
interface Kept {
  plain?: ResponseEquations;
  expanded?: ResponseEquations;
}

/**
 * What a network answers, at one frequency after another, to a current sent into any pair of nodes, and what any of its
 * outputs depends on. `prepare` sets the frequency; all else speaks of that. Every solution is refined in extended
 * arithmetic against the elements' own values (see `ExtendedSolver`), so that it is as good as those unless the network
 * is within rounding of having no unique solution, which is told.
 *
 * Independent sources are dead but in `exciteSources`. In a part that nothing ties to the rest, differences are
 * answered, and what depends on its common mode is told to be undetermined; just so at a resonance without losses, or
 * where impedances cancel, what does not take part in it is answered (up to some hundreds of unknowns). Phasors are rms;
 * signs as everywhere: a port's current enters at its first node.
 */
export class ResponseOperator {
  readonly network: Network;
  private readonly direct: Kept = {};
  private readonly alternating: Kept = {};
  private current: ResponseEquations | undefined;
  /** Hertz; the frequency that is prepared. */
  frequency = 0;

  private constructor(list: ElementList) {
    this.network = toNetwork(list);
  }

  static of(list: ElementList): ResponseOperator | Problem {
    const checked = validateElementList(list);
    if (!checked.ok) return problem('invalid', checked.elements, [], checked.message);
    return new ResponseOperator(checked.list);
  }

  /** The equations at the frequency that is prepared. */
  get layout(): ResponseLayout {
    return this.now().layout;
  }

  /** The equations at that frequency, also where they have no unique solution. */
  get layoutAt(): ResponseLayout {
    const { plain } = this.frequency === 0 ? this.direct : this.alternating;
    if (plain === undefined) throw new Error('no frequency is prepared');
    return plain.layout;
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
    const kept = frequency === 0 ? this.direct : this.alternating;
    const plain = (kept.plain ??= new ResponseEquations(new ResponseLayout(this.network, frequency === 0)));
    const beyond = plain.fill(frequency);
    if (beyond >= 0) return tableProblem(this.network, beyond, frequency);
    const { sumRe, sumIm } = plain.layout.matrix;
    if (!sumRe.every(Number.isFinite) || !sumIm.every(Number.isFinite)) {
      return problem('notFinite', [], [], `At ${frequency} Hz some admittances are too large for the arithmetic; change the values.`);
    }
    const cancellation = plain.factor() ? plain.cancellation() : 0;
    const isSolvable = cancellation > DOUBTFUL || (cancellation > 0 && plain.converges());
    if (!isSolvable || cancellation <= CANCELLED) return this.prepareWithCare(kept, plain, isSolvable);
    this.current = plain;
    return undefined;
  }

  /** Looks for an amplifier without feedback and for equations that follow from others, and leaves those out. */
  private prepareWithCare(kept: Kept, plain: ResponseEquations, isSolvable: boolean): Problem | undefined {
    const { network, frequency } = this;
    const isDirect = frequency === 0;
    const branches = branchTableOf(network);
    branches.evaluate({ frequency, omega: this.omega });
    const equations = network.laws.flatMap((law, row) => (law.law === 'equation' ? [row] : []));
    const [open] = amplifiersWithoutFeedback(network, equations, branches);
    if (open !== undefined) return open;
    const expanded = (kept.expanded ??= new ResponseEquations(new ResponseLayout(network, isDirect, true)));
    expanded.fill(frequency);
    const dependences = dependencesOf(expanded.layout);
    if (isSolvable && (dependences === undefined || dependences.length === 0)) {
      this.current = plain;
      return undefined;
    }
    const { lu, layout } = plain;
    const failed = noSolutionProblem(network, layout, lu.rank < layout.size ? [...lu.dependent.columns] : [], frequency);
    if (dependences === undefined) return failed;
    const careful =
      dependences.length === 0 ? expanded : new ResponseEquations(new ResponseLayout(network, isDirect, true, dependences));
    careful.fill(frequency);
    if (!careful.factor() || !careful.converges()) return failed;
    this.current = careful;
    return undefined;
  }

  /** x ← the unknowns with one ampere that enters the network at `plus` and leaves it at `minus`. */
  inject(plus: number, minus: number, x: ExtendedVector): Problem | undefined {
    const { layout, bRe, bIm } = this.cleared();
    layout.addCurrent(plus, 1, 1, 0, bRe, bIm);
    layout.addCurrent(minus, -1, 1, 0, bRe, bIm);
    return this.solve(x);
  }

  /** x ← the unknowns with a source of one volt, or one ampere, at the place of the source whose port has the row. */
  exciteSource(row: number, x: ExtendedVector): Problem | undefined {
    const { layout, bRe, bIm } = this.cleared();
    layout.addSource(row, 1, 0, bRe, bIm);
    return this.solve(x);
  }

  /** x ← the unknowns with the independent sources as they are at this frequency. */
  exciteSources(x: ExtendedVector): Problem | undefined {
    const { layout, bRe, bIm } = this.cleared();
    this.network.laws.forEach((law, row) => {
      if (law.law !== 'voltage' && law.law !== 'current') return;
      const value = this.phasorOf(law.value);
      layout.addSource(row, value[0], value[1], bRe, bIm);
    });
    return this.solve(x);
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
    const free = this.freedomOf(output);
    if (free !== undefined) return free;
    return this.now().solveAdjoint(output, x) ? undefined : this.noSolution();
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
    const equation = this.layout.branchOf[row] ?? -1;
    return equation < 0 ? [0, 0] : [x.re[equation] ?? 0, x.im[equation] ?? 0];
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
  freedomOf(output: LinearForm): Problem | undefined {
    const { layout, modes } = this.now();
    if (layout.pins.length === 0) return undefined;
    if (modes === undefined) return this.noSolution();
    const place = modes.findIndex((mode) => isMovedBy(output, mode));
    return place < 0 ? undefined : this.pinProblem(place, true);
  }

  /** What floating parts and loops leave free: may be added to a solution without breaking any equation. */
  get structuralModes(): readonly ExtendedVector[] {
    return this.now().structuralModes;
  }

  /** What is left free at this one frequency, as by a resonance without losses. */
  get resonantModes(): readonly ExtendedVector[] {
    return this.now().resonantModes;
  }

  /** The multipliers by which what drives the network must add up to nothing, for each of `resonantModes`. */
  get resonantDuals(): readonly ExtendedVector[] {
    return this.now().resonantDuals;
  }

  /** The problem that a resonance is when something in it drives it. */
  drivenProblem(): Problem {
    return dependenceProblem(this.network, this.layout, this.resonantModes, this.frequency, false);
  }

  private now(): ResponseEquations {
    if (this.current === undefined) throw new Error('no frequency is prepared');
    return this.current;
  }

  private cleared(): ResponseEquations {
    const equations = this.now();
    equations.clear();
    return equations;
  }

  private solve(x: ExtendedVector): Problem | undefined {
    const equations = this.now();
    if (!equations.solve(x)) return this.noSolution();
    const broken = equations.layout.pins.length === 0 ? -1 : equations.brokenPin(x);
    return broken < 0 ? undefined : this.pinProblem(broken, false);
  }

  private pinProblem(place: number, isConsistent: boolean): Problem {
    const { network, frequency } = this;
    const { layout } = this.now();
    const pin = layout.pins[place];
    if (pin === undefined) return this.noSolution();
    if (pin.cause === 'dependence') return dependenceProblem(network, layout, this.resonantModes, frequency, isConsistent);
    return (isConsistent ? freeProblem : contradictionProblem)(network, layout, pin, frequency);
  }

  private noSolution(): Problem {
    return noSolutionProblem(this.network, this.layout, [], this.frequency);
  }
}
