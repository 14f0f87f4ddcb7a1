import type { ElementList } from '../elements/element-list';
import { ExtendedVector } from '../linear/extended';
import { integrate } from '../linear/quadrature';
import { faultOfFrequency } from './frequency';
import { nodesNamed } from './network-reading';
import type { Problem } from './problem';
import { isProblem, problem } from './problem';
import { ProblemPlaces } from './problem-places';
import { BY_BRANCH } from './response-layout';
import { ResponseOperator } from './response-operator';
import type { SweepProblem } from './sweep';
import type { PortNodes } from './two-port';

/** Boltzmann's constant, J/K; exact since 2019. */
export const BOLTZMANN = 1.380649e-23;

/** The standard noise temperature, K, where none is given. */
export const STANDARD_TEMPERATURE = 290;

export interface NoiseOptions {
  /** Hertz, in any order. */
  readonly frequencies: ArrayLike<number>;
  /** Kelvin, of the whole network; 290 K where it is left out. */
  readonly temperature?: number;
}

/** What one element adds, V/√Hz over the frequencies: the squares of all contributions add up to that of the density. */
export interface NoiseContribution {
  readonly element: string;
  readonly density: Float64Array;
}

export interface Noise {
  readonly ok: true;
  readonly frequencies: Float64Array;
  /** K. */
  readonly temperature: number;
  /** V/√Hz, one-sided (all of it at positive frequencies), between the two nodes. */
  readonly density: Float64Array;
  readonly determined: Uint8Array;
  /** One for each element that makes noise, in the order of the list. */
  readonly contributions: readonly NoiseContribution[];
  /** Elements that would make noise of their own which is not known and not counted: see `noise`. */
  readonly notCounted: readonly string[];
  readonly problems: readonly SweepProblem[];
}

/**
 * Thermal noise of a network between two nodes (Johnson, Phys. Rev. 32 (1928) 97; Nyquist, ibid. 110): a resistance has
 * 4kT/R A²/Hz across it, and one solution of the adjoint tells what each of them does at the output.
 *
 * Counted: positive resistances; tabulated impedances by the real part of Z where it is positive; lines with loss and
 * two-port blocks that are passive, by Bosma's theorem for networks of one temperature: noise waves with the correlation
 * kT·(1 − S·S*ᵀ) (Bosma, Philips Res. Rep. Suppl. 10 (1967)). Not counted, as nothing in the list tells of it: the noise of
 * amplifiers and controlled sources, of negative resistances and of active blocks. Sources make none. The classical
 * law, for frequencies far below kT/h (6 THz at 290 K).
 */
export function noise(list: ElementList, pair: PortNodes, options: NoiseOptions): Noise | Problem {
  const meter = NoiseMeter.of(list, pair, options.temperature);
  if (isProblem(meter)) return meter;
  const frequencies = Float64Array.from(options.frequencies);
  for (const frequency of frequencies) {
    const fault = faultOfFrequency(frequency);
    if (fault !== undefined) return problem('invalid', [], [], fault);
  }
  const density = new Float64Array(frequencies.length);
  const determined = new Uint8Array(frequencies.length);
  const contributions = meter.elements.map((element) => ({ element, density: new Float64Array(frequencies.length) }));
  const squares = new Float64Array(1 + contributions.length);
  const problems = new ProblemPlaces();
  for (const [place, frequency] of frequencies.entries()) {
    const found = meter.measure(frequency, squares);
    if (found !== undefined) {
      problems.note(found, place);
      continue;
    }
    determined[place] = 1;
    density[place] = Math.sqrt(squares[0] ?? 0);
    contributions.forEach((one, at) => {
      one.density[place] = Math.sqrt(squares[1 + at] ?? 0);
    });
  }
  if (problems.first !== undefined && !determined.includes(1)) return problems.first;
  const { temperature, notCounted } = meter;
  return { ok: true, frequencies, temperature, density, determined, contributions, notCounted, problems: problems.list };
}

export interface NoiseBand {
  /** Hertz, 0 or more. */
  readonly from: number;
  /** Hertz, above `from`, finite. */
  readonly to: number;
  /** Kelvin; 290 K where it is left out. */
  readonly temperature?: number;
  /** The relative error allowed in the square of the total; 1e-9 where it is left out. */
  readonly tolerance?: number;
}

export interface NoiseTotal {
  readonly ok: true;
  /** K. */
  readonly temperature: number;
  /** V rms within the band. */
  readonly total: number;
  /** V rms that each element adds; their squares add up to that of the total. */
  readonly contributions: readonly { readonly element: string; readonly total: number }[];
  readonly notCounted: readonly string[];
}

/** How the band is cut before it is refined: pieces for each e-fold of frequency. */
const PIECES = 4;

/** Where a band begins at 0 Hz, frequency is linear below this part of its end, and logarithmic above. */
const LINEAR_PART = 1e-9;

/**
 * The thermal noise voltage between two nodes within a band: the square root of the integral of the density's square.
 * The integral is adaptive over arsinh(f/f₀), which is the frequency near 0 and its logarithm far above f₀.
 */
export function noiseTotal(list: ElementList, pair: PortNodes, band: NoiseBand): NoiseTotal | Problem {
  const { from, to, tolerance = 1e-9 } = band;
  const meter = NoiseMeter.of(list, pair, band.temperature);
  if (isProblem(meter)) return meter;
  const fault = faultOfFrequency(from) ?? faultOfFrequency(to) ?? (from < to ? undefined : 'A band must end above where it begins.');
  if (fault !== undefined) return problem('invalid', [], [], fault);
  if (!(tolerance > 0)) return problem('invalid', [], [], 'The tolerance of an integral must be a number above zero.');
  const scale = from > 0 ? from : LINEAR_PART * to;
  let met: Problem | undefined;
  const at = (u: number, out: Float64Array): boolean => {
    const stuck = meter.measure(Math.min(to, Math.max(from, scale * Math.sinh(u))), out);
    met ??= stuck;
    const step = scale * Math.cosh(u);
    for (let k = 0; k < out.length; k++) out[k] = (out[k] ?? 0) * step;
    return stuck === undefined;
  };
  const [low, high] = [Math.asinh(from / scale), Math.asinh(to / scale)];
  const pieces = Math.max(1, Math.ceil(PIECES * (high - low)));
  const found = integrate(at, 1 + meter.elements.length, low, high, tolerance, pieces);
  if (found === undefined) return met ?? problem('singular', [], [], 'The noise could not be found within the band.');
  if (!found.isConverged) {
    return problem(
      'notReliable',
      [],
      [],
      `The noise from ${from} to ${to} Hz could not be summed to one part in ${Math.round(1 / tolerance)}; ask for a narrower band or less accuracy.`,
    );
  }
  const { temperature, notCounted, elements } = meter;
  const root = (place: number): number => Math.sqrt(found.values[place] ?? 0);
  const contributions = elements.map((element, place) => ({ element, total: root(1 + place) }));
  return { ok: true, temperature, total: root(0), contributions, notCounted };
}

/** Writes 4kT·(what it is per kT) of one element: V²/Hz at the output. */
interface NoiseSource {
  readonly element: string;
  /** The ports at which it drives the network. */
  readonly rows: readonly number[];
  readonly square: (operator: ResponseOperator, adjoint: ExtendedVector) => number;
}

/** The squares of the noise density at one output, frequency by frequency. */
class NoiseMeter {
  private readonly adjoint = new ExtendedVector();

  private constructor(
    private readonly operator: ResponseOperator,
    private readonly plus: number,
    private readonly minus: number,
    readonly temperature: number,
    private readonly sources: readonly NoiseSource[],
    readonly notCounted: readonly string[],
  ) {}

  static of(list: ElementList, pair: PortNodes, temperature = STANDARD_TEMPERATURE): NoiseMeter | Problem {
    if (!(temperature >= 0 && temperature < Infinity)) {
      return problem('invalid', [], [], 'The temperature must be a number of kelvins, zero or more.');
    }
    const operator = ResponseOperator.of(list);
    if (isProblem(operator)) return operator;
    const nodes = nodesNamed(operator.network, pair);
    if (isProblem(nodes)) return nodes;
    const { sources, notCounted } = sourcesOf(operator);
    return new NoiseMeter(operator, nodes[0], nodes[1], temperature, sources, notCounted);
  }

  get elements(): readonly string[] {
    return this.sources.map(({ element }) => element);
  }

  /** Writes V²/Hz: the sum first, then that of each element. */
  measure(frequency: number, out: Float64Array): Problem | undefined {
    const { operator, adjoint, temperature } = this;
    const found = operator.prepare(frequency) ?? operator.adjoint(operator.voltageForm(this.plus, this.minus), adjoint);
    if (found !== undefined) return found;
    const { resonantDuals } = operator;
    const isDriven = this.sources.some(({ rows }) =>
      rows.some((row) => resonantDuals.some((dual) => operator.multiplier(dual, row).some((part) => part !== 0))),
    );
    if (isDriven) return operator.drivenProblem();
    let sum = 0;
    for (const [place, { square }] of this.sources.entries()) {
      const value = 4 * BOLTZMANN * temperature * square(operator, adjoint);
      out[1 + place] = value;
      sum += value;
    }
    out[0] = sum;
    return Number.isFinite(sum) ? undefined : beyondRange(frequency);
  }
}

function beyondRange(frequency: number): Problem {
  return problem(
    'notFinite',
    [],
    [],
    `At ${Number(frequency.toPrecision(12))} Hz the noise is too large to be computed with, as that of an integrator is towards 0 Hz. Take higher frequencies, or give what integrates a path at 0 Hz.`,
  );
}

function sourcesOf(operator: ResponseOperator): { sources: readonly NoiseSource[]; notCounted: readonly string[] } {
  const { network } = operator;
  const sources: NoiseSource[] = [];
  const notCounted: string[] = [];
  network.elements.forEach((element, place) => {
    const row = network.rowStart[place] ?? 0;
    switch (element.kind) {
      case 'resistor':
        if (element.resistance > 0) sources.push({ element: element.id, rows: [row], square: resistanceAt(row, element.resistance) });
        else if (element.resistance < 0) notCounted.push(element.id);
        return;
      case 'impedance':
        sources.push({ element: element.id, rows: [row], square: impedanceAt(row) });
        if (element.points.some(({ resistance }) => resistance < 0)) notCounted.push(element.id);
        return;
      case 'line':
        if (element.loss !== undefined && element.loss > 0) {
          sources.push({ element: element.id, rows: [row, row + 1], square: wavesAt(row, element.impedance) });
        }
        return;
      case 'twoPort': {
        const isPassive = element.points.every((point) => {
          const { m11, m22, m12Re, m12Im } = correlationOf([point.s11, point.s12, point.s21, point.s22]);
          return m11 >= -ROUNDING && m22 >= -ROUNDING && m11 * m22 - m12Re ** 2 - m12Im ** 2 >= -ROUNDING;
        });
        if (isPassive) sources.push({ element: element.id, rows: [row, row + 1], square: wavesAt(row, element.reference) });
        else notCounted.push(element.id);
        return;
      }
      case 'operationalAmplifier':
      case 'voltageControlledVoltageSource':
      case 'voltageControlledCurrentSource':
      case 'currentControlledVoltageSource':
      case 'currentControlledCurrentSource':
        notCounted.push(element.id);
        return;
      case 'capacitor':
      case 'inductor':
      case 'coupledInductors':
      case 'idealTransformer':
      case 'voltageSource':
      case 'currentSource':
        return;
    }
  });
  return { sources, notCounted };
}

const ROUNDING = 64 * Number.EPSILON;

function squareOf([re, im]: readonly [number, number]): number {
  return re * re + im * im;
}

function resistanceAt(row: number, resistance: number): NoiseSource['square'] {
  return (operator, adjoint) =>
    operator.layout.form[row] === BY_BRANCH
      ? resistance * squareOf(operator.multiplier(adjoint, row))
      : squareOf(operator.portVoltage(adjoint, row)) / resistance;
}

function impedanceAt(row: number): NoiseSource['square'] {
  return (operator, adjoint) => {
    const law = operator.network.laws[row];
    const [resistance] = law?.law === 'impedance' ? (law.at(operator.frequency) ?? [0]) : [0];
    return Math.max(0, resistance) * squareOf(operator.multiplier(adjoint, row));
  };
}

type Scattering = readonly [s11: Pair, s12: Pair, s21: Pair, s22: Pair];
type Pair = readonly [re: number, im: number];

/** 1 − S·S*ᵀ, which is Hermitian. */
function correlationOf([s11, s12, s21, s22]: Scattering): { m11: number; m22: number; m12Re: number; m12Im: number } {
  return {
    m11: 1 - squareOf(s11) - squareOf(s12),
    m22: 1 - squareOf(s21) - squareOf(s22),
    m12Re: -(s11[0] * s21[0] + s11[1] * s21[1] + s12[0] * s22[0] + s12[1] * s22[1]),
    m12Im: -(s11[1] * s21[0] - s11[0] * s21[1] + s12[1] * s22[0] - s12[0] * s22[1]),
  };
}

/**
 * A wave c that leaves a port besides S·a stands on the right-hand side of the port's equation as 2·√R·c; with the
 * multipliers x̂ the output has 4R·x̂ᵀ·⟨c·c*ᵀ⟩·x̂*.
 */
function wavesAt(row: number, reference: number): NoiseSource['square'] {
  return (operator, adjoint) => {
    const { m11, m22, m12Re, m12Im } = correlationOf(scatteringAt(operator, row));
    const [oneRe, oneIm] = operator.multiplier(adjoint, row);
    const [otherRe, otherIm] = operator.multiplier(adjoint, row + 1);
    // x̂₁·x̂₂*
    const re = oneRe * otherRe + oneIm * otherIm;
    const im = oneIm * otherRe - oneRe * otherIm;
    const sum = m11 * (oneRe ** 2 + oneIm ** 2) + m22 * (otherRe ** 2 + otherIm ** 2) + 2 * (m12Re * re - m12Im * im);
    return reference * Math.max(0, sum);
  };
}

/** The scattering parameters that the wave equations of an element hold: 1 − S on the own voltage, −S on the other. */
function scatteringAt(operator: ResponseOperator, row: number): Scattering {
  const { laws } = operator.network;
  const coefficient = (port: number, of: number): Pair => {
    const law = laws[row + port];
    const term = law?.law === 'equation' ? law.terms.find((one) => one.port === of && one.of === 'voltage') : undefined;
    if (term === undefined || !('at' in term.coefficient)) return [0, 0];
    const [re, im] = term.coefficient.at(operator.frequency) ?? [0, 0];
    return port === of ? [1 - re, -im] : [-re, -im];
  };
  return [coefficient(0, 0), coefficient(0, 1), coefficient(1, 0), coefficient(1, 1)];
}
