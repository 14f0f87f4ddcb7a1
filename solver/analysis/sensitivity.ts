import type { ElementList } from '../elements/element-list';
import { ExtendedVector } from '../linear/extended';
import { faultOfFrequency } from './frequency';
import type { Network } from './network';
import { rowOf } from './network';
import type { NetworkReading, Phasor } from './network-reading';
import { portNamed, resolveReading, sourceNamed } from './network-reading';
import type { Problem } from './problem';
import { isProblem, problem } from './problem';
import { ProblemPlaces } from './problem-places';
import { BY_ADMITTANCE, BY_BRANCH, BY_SOURCE } from './response-layout';
import type { LinearForm } from './response-equations';
import { isMovedBy } from './response-equations';
import { ResponseOperator } from './response-operator';
import type { SweepProblem } from './sweep';
import type { Effect, ValueEffects, ValueField } from './value-fields';
import { valuesOf } from './value-fields';

/** What sensitivities are asked of. */
export type SensitivityOutput =
  /** As the independent sources make it. */
  | NetworkReading
  /** The impedance between two nodes, sources dead. */
  | { readonly quantity: 'impedance'; readonly nodes: readonly [string, string] }
  /** A reading over what one independent source delivers, the others dead. */
  | { readonly quantity: 'transfer'; readonly source: string; readonly reading: NetworkReading };

/** The sensitivity of the output to one value, over the frequencies. */
export interface SensitivityTrace extends ValueField {
  /** ∂H/∂p, in the output's unit over the value's. */
  readonly re: Float64Array;
  readonly im: Float64Array;
  /** S = (p/H)·∂H/∂p: its real part is for the magnitude, its imaginary part for the angle; 0 where H is 0. */
  readonly relativeRe: Float64Array;
  readonly relativeIm: Float64Array;
  /** 0 where the derivative is not determined; nothing stands there then. */
  readonly determined: Uint8Array;
}

export interface Sensitivity {
  readonly ok: true;
  readonly frequencies: Float64Array;
  /** The output H itself. */
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly determined: Uint8Array;
  /** One for every value of every element, in the order of the list. */
  readonly traces: readonly SensitivityTrace[];
  readonly problems: readonly SweepProblem[];
}

/** dB for one per cent more of the value, from the real part of a relative sensitivity. */
export function decibelsPerPercent(relativeRe: number): number {
  return (0.2 / Math.LN10) * relativeRe;
}

/** Degrees for one per cent more of the value, from the imaginary part of a relative sensitivity. */
export function degreesPerPercent(relativeIm: number): number {
  return (1.8 / Math.PI) * relativeIm;
}

/**
 * The derivatives of one output by every value of every element: two solutions a frequency, one of the network and one
 * of its adjoint, however many values there are (Director and Rohrer, IEEE Trans. Circuit Theory 16 (1969) 318, doi
 * 10.1109/TCT.1969.1082965). Not by what sources deliver, in which every output is linear, nor by points of tables.
 *
 * With î and v̂ of the adjoint: ∂H/∂R = î·i, ∂H/∂L = jω·î·i, ∂H/∂C = −jω·v̂·v; for a coefficient of an equation, the
 * equation's multiplier times what it multiplies, negative.
 */
export function sensitivity(
  list: ElementList,
  output: SensitivityOutput,
  frequencies: ArrayLike<number>,
): Sensitivity | Problem {
  const operator = ResponseOperator.of(list);
  if (isProblem(operator)) return operator;
  const places = Float64Array.from(frequencies);
  for (const frequency of places) {
    const fault = faultOfFrequency(frequency);
    if (fault !== undefined) return problem('invalid', [], [], fault);
  }
  const asked = resolve(operator.network, output);
  if (isProblem(asked)) return asked;
  const { elements, rowStart, laws } = operator.network;
  const values = elements.flatMap((element, place) =>
    valuesOf(element, laws.slice(rowStart[place], rowStart[place + 1])).map((value) => ({ value, row: rowStart[place] ?? 0 })),
  );
  const count = places.length;
  const result: Sensitivity = {
    ok: true,
    frequencies: places,
    re: new Float64Array(count),
    im: new Float64Array(count),
    determined: new Uint8Array(count),
    traces: values.map(({ value: { element, field, index, value } }) => ({
      element,
      field,
      index,
      value,
      re: new Float64Array(count),
      im: new Float64Array(count),
      relativeRe: new Float64Array(count),
      relativeIm: new Float64Array(count),
      determined: new Uint8Array(count),
    })),
    problems: [],
  };
  const problems = new ProblemPlaces();
  const derivative = new Derivative(operator, asked);
  for (const [place, frequency] of places.entries()) {
    const found = derivative.prepare(frequency);
    if (found !== undefined) {
      problems.note(found, place);
      continue;
    }
    const [hRe, hIm] = derivative.value();
    result.re[place] = hRe;
    result.im[place] = hIm;
    result.determined[place] = 1;
    for (const [at, { value, row }] of values.entries()) {
      const trace = result.traces[at];
      if (trace !== undefined) record(trace, place, value, derivative.by(value, row), hRe, hIm);
    }
  }
  if (problems.first !== undefined && !result.determined.includes(1)) return problems.first;
  return { ...result, problems: problems.list };
}

function record(
  trace: SensitivityTrace,
  place: number,
  { value }: ValueEffects,
  derivative: readonly [number, number] | undefined,
  hRe: number,
  hIm: number,
): void {
  if (derivative === undefined) return;
  const [re, im] = derivative;
  if (!Number.isFinite(re) || !Number.isFinite(im)) return;
  trace.re[place] = re + 0;
  trace.im[place] = im + 0;
  trace.determined[place] = 1;
  const square = hRe * hRe + hIm * hIm;
  const relativeRe = (value * (re * hRe + im * hIm)) / square;
  const relativeIm = (value * (im * hRe - re * hIm)) / square;
  if (!Number.isFinite(relativeRe) || !Number.isFinite(relativeIm)) return;
  // Adding zero makes −0 a plain 0.
  trace.relativeRe[place] = relativeRe + 0;
  trace.relativeIm[place] = relativeIm + 0;
}

/** An output by numbers: what is read, and what the network is driven by. */
interface Asked {
  readonly reading: Phasor;
  readonly drive: 'sources' | { readonly plus: number; readonly minus: number } | { readonly source: number };
}

function resolve(network: Network, output: SensitivityOutput): Asked | Problem {
  switch (output.quantity) {
    case 'impedance': {
      const pair = portNamed(network, output.nodes);
      if (isProblem(pair)) return pair;
      const [one, other] = pair;
      return { reading: { kind: 'between', one, other }, drive: { plus: one, minus: other } };
    }
    case 'transfer': {
      const source = sourceNamed(network, output.source);
      if (isProblem(source)) return source;
      const reading = resolveReading(network, output.reading);
      return isProblem(reading) ? reading : { reading, drive: { source } };
    }
    default: {
      const reading = resolveReading(network, output);
      return isProblem(reading) ? reading : { reading, drive: 'sources' };
    }
  }
}

/** A sum with the sizes of its terms. */
interface Bilinear {
  readonly re: number;
  readonly im: number;
  readonly size: number;
}

/** So small against its terms, a sum is nothing but rounding. */
const ROUNDING = 1e-10;

function isRounding({ re, im, size }: Bilinear): boolean {
  return Math.abs(re) + Math.abs(im) <= ROUNDING * size;
}

/** The output and its adjoint at one frequency. */
class Derivative {
  private readonly x = new ExtendedVector();
  private readonly adjoint = new ExtendedVector();
  private form: LinearForm = { unknowns: [], re: [], im: [] };
  private free: ReadonlySet<number> = new Set();

  constructor(
    private readonly operator: ResponseOperator,
    private readonly asked: Asked,
  ) {}

  prepare(frequency: number): Problem | undefined {
    const { operator, asked, x, adjoint } = this;
    const { reading, drive } = asked;
    const stuck = operator.prepare(frequency);
    if (stuck !== undefined) return stuck;
    this.form = reading.kind === 'current' ? operator.currentForm(reading.row) : operator.voltageForm(reading.one, reading.other);
    const found =
      drive === 'sources'
        ? operator.exciteSources(x)
        : 'source' in drive
          ? operator.exciteSource(drive.source, x)
          : operator.inject(drive.plus, drive.minus, x);
    this.free = this.freeRows();
    return found ?? operator.adjoint(this.form, adjoint);
  }

  /** H itself. */
  value(): readonly [number, number] {
    const { reading } = this.asked;
    if (reading.kind === 'current') return this.currentOf(reading.row);
    return this.operator.valueOf(this.form, this.x);
  }

  /**
   * ∂H/∂p for a value of the element whose first port has the row; undefined where it is not determined.
   *
   * At a resonance without losses the solution is x + α·n with any α, but a change of p leaves only one of them: the
   * equation that followed from the others, with multipliers m, asks that m·dA·(x + α·n) = 0.
   */
  by(value: ValueEffects, row: number): readonly [number, number] | undefined {
    const { x, adjoint, operator } = this;
    const along = this.along(value, row, adjoint, x);
    if (along === undefined) return undefined;
    const { resonantModes: modes, resonantDuals: duals } = operator;
    const [mode, ...others] = modes;
    const [dual] = duals;
    if (mode === undefined || dual === undefined) return [along.re, along.im];
    const onOutput = modes.map((one) => this.along(value, row, adjoint, one));
    const onEquation = duals.map((one) => this.along(value, row, one, x));
    if ([...onOutput, ...onEquation].every((part) => part === undefined || isRounding(part))) return [along.re, along.im];
    const [a, g, d] = [onOutput[0], onEquation[0], this.along(value, row, dual, mode)];
    if (others.length > 0 || a === undefined || g === undefined || d === undefined || isRounding(d)) return undefined;
    const square = d.re * d.re + d.im * d.im;
    const alphaRe = -(g.re * d.re + g.im * d.im) / square;
    const alphaIm = -(g.im * d.re - g.re * d.im) / square;
    return [along.re + alphaRe * a.re - alphaIm * a.im, along.im + alphaRe * a.im + alphaIm * a.re];
  }

  /** −(multipliers)·(what the value does to the matrix)·(solution), and what is read from the element itself. */
  private along(value: ValueEffects, row: number, adjoint: ExtendedVector, x: ExtendedVector): Bilinear | undefined {
    const sum = { re: 0, im: 0, size: 0 };
    for (const effect of value.effects(this.operator.frequency)) {
      const part =
        effect.of === 'term' ? this.byTerm(row, effect, adjoint, x) : this.byImmittance(row + effect.port, effect, adjoint, x);
      if (part === undefined) return undefined;
      sum.re += part[0];
      sum.im += part[1];
      sum.size += this.sizeOf(row, effect, adjoint, x, part);
    }
    return sum;
  }

  /** The size of a part before the voltage of a port came out as the difference of its nodes'. */
  private sizeOf(
    row: number,
    effect: Effect,
    adjoint: ExtendedVector,
    x: ExtendedVector,
    [re, im]: readonly [number, number],
  ): number {
    const { operator } = this;
    const size = Math.abs(re) + Math.abs(im);
    if (effect.of !== 'capacitance' && !(effect.of === 'term' && effect.term.of === 'voltage')) return size;
    const own = row + effect.port;
    const port = effect.of === 'term' && typeof effect.term.port === 'number' ? row + effect.term.port : own;
    const [mRe, mIm] = operator.multiplier(adjoint, own);
    const by = effect.of === 'term' ? Math.abs(effect.by[0]) + Math.abs(effect.by[1]) : operator.omega * Math.abs(effect.by);
    const { first, second } = operator.network;
    const volts = [(first[port] ?? 0) - 1, (second[port] ?? 0) - 1].reduce(
      (total, at) => total + (at < 0 ? 0 : Math.abs(x.re[at] ?? 0) + Math.abs(x.im[at] ?? 0)),
      0,
    );
    return Math.max(size, by * (Math.abs(mRe) + Math.abs(mIm)) * volts);
  }

  /** Ports whose currents a loop of ideal connections leaves free. */
  private freeRows(): ReadonlySet<number> {
    const { operator } = this;
    const { pins, form } = operator.layout;
    if (!pins.some(({ cause }) => cause === 'loop') && !operator.layout.isCrossed) return new Set();
    const modes = operator.structuralModes;
    return new Set(
      operator.network.laws.flatMap((_, row) =>
        form[row] === BY_BRANCH && modes.some((mode) => isMovedBy(operator.currentForm(row), mode)) ? [row] : [],
      ),
    );
  }

  private currentOf(row: number, x = this.x): readonly [number, number] {
    const { operator } = this;
    if (operator.layout.form[row] !== BY_SOURCE) return operator.portCurrent(x, row);
    if (x !== this.x) return [0, 0];
    const { drive } = this.asked;
    if (drive !== 'sources') return 'source' in drive && drive.source === row ? [1, 0] : [0, 0];
    const law = operator.network.laws[row];
    return law?.law === 'current' ? operator.phasorOf(law.value) : [0, 0];
  }

  /** −(multiplier)·(what the coefficient multiplies)·(its change). */
  private byTerm(
    row: number,
    { port, term, by }: Extract<Effect, { of: 'term' }>,
    adjoint: ExtendedVector,
    x: ExtendedVector,
  ): readonly [number, number] | undefined {
    if (by[0] === 0 && by[1] === 0) return [0, 0];
    const { operator } = this;
    const target = typeof term.port === 'number' ? row + term.port : rowOf(operator.network, term.port.element);
    if (term.of === 'current' && this.free.has(target)) return undefined;
    const [qRe, qIm] = term.of === 'voltage' ? operator.portVoltage(x, target) : this.currentOf(target, x);
    const [mRe, mIm] = operator.multiplier(adjoint, row + port);
    const re = mRe * qRe - mIm * qIm;
    const im = mRe * qIm + mIm * qRe;
    return [-(re * by[0] - im * by[1]), -(re * by[1] + im * by[0])];
  }

  private byImmittance(
    row: number,
    effect: Exclude<Effect, { of: 'term' }>,
    adjoint: ExtendedVector,
    x: ExtendedVector,
  ): readonly [number, number] | undefined {
    const { operator, asked } = this;
    const { omega } = operator;
    const isBranch = operator.layout.form[row] === BY_BRANCH;
    const isReadHere = asked.reading.kind === 'current' && asked.reading.row === row && !isBranch;
    if (effect.of === 'capacitance') {
      if (omega === 0) return [0, 0];
      if (this.isSensedOpen(row)) return undefined;
      // Admittance: −jω·v̂·v, and jω·v more where the current read is this one's; branch i − jωC·v = 0: jω·x̂·v.
      const [vRe, vIm] = operator.portVoltage(x, row);
      const [aRe, aIm] = isBranch ? operator.multiplier(adjoint, row) : operator.portVoltage(adjoint, row);
      const [bRe, bIm] = isBranch ? [aRe, aIm] : [(isReadHere ? 1 : 0) - aRe, -aIm];
      return [-omega * effect.by * (bRe * vIm + bIm * vRe), omega * effect.by * (bRe * vRe - bIm * vIm)];
    }
    if (this.free.has(row)) return undefined;
    const [iRe, iIm] = operator.portCurrent(x, row);
    const [aRe, aIm] = isBranch ? operator.multiplier(adjoint, row) : operator.portCurrent(adjoint, row);
    let re = aRe * iRe - aIm * iIm;
    let im = aRe * iIm + aIm * iRe;
    if (isReadHere && operator.layout.form[row] === BY_ADMITTANCE) {
      // The current read is y·v itself: d(y·v) = −y·i·dz at the voltage as it is.
      const [yRe, yIm] = operator.admittanceOf(row);
      re -= yRe * iRe - yIm * iIm;
      im -= yRe * iIm + yIm * iRe;
    }
    return effect.of === 'resistance' ? [effect.by * re, effect.by * im] : [-omega * effect.by * im, omega * effect.by * re];
  }

  /** A capacitance of zero whose current is sensed: what it would do there is in no equation. */
  private isSensedOpen(row: number): boolean {
    const { network } = this.operator;
    if (network.laws[row]?.law !== 'open') return false;
    const id = network.elements[network.elementOf[row] ?? -1]?.id;
    return network.elements.some((element) => 'sensedElement' in element && element.sensedElement === id);
  }
}
