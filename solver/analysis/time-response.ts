import type { PartialFractions, PoleTerms } from './partial-fractions';
import { partialFractions } from './partial-fractions';
import type { PolesAndZeros } from './poles-and-zeros';
import type { Problem } from './problem';
import { problem } from './problem';

/** A response in time, from rest, to something that happens at t = 0. In the unit of the transfer function times that of the source (and per second, for an impulse). */
export interface TimeResponse {
  /** The value just after t = 0. */
  readonly initial: number;
  /** The value after a long time; undefined where it grows or keeps oscillating. */
  readonly final: number | undefined;
  /** Weights of δ(t), δ'(t) … at t = 0, beside the values; empty for most networks. */
  readonly impulses: readonly number[];
  /** The values at many times, seconds, in any order; 0 before t = 0, and `initial` at 0. */
  evaluate(times: ArrayLike<number>): TimeValues | Problem;
}

export interface TimeValues {
  readonly ok: true;
  readonly values: Float64Array;
  /**
   * How far each value may be off: the uncertainties of poles and zeros and the rounding of the terms. Values are sums of
   * terms that may cancel, as at the beginning of a response that starts flat; there this bound, and not the value, says
   * what is known.
   */
  readonly bounds: Float64Array;
}

/** The response to a unit step at t = 0 of a transfer function, from its partial fractions, in closed form. */
export function stepResponse(transfer: PolesAndZeros): TimeResponse {
  const fractions = partialFractions(transfer);
  const [direct = 0, ...impulses] = fractions.polynomial;
  return {
    initial: direct,
    final: transfer.stability === 'stable' ? valueAtZero(transfer) : undefined,
    impulses,
    evaluate: (times) => evaluate(fractions, times, direct, direct, integralTerm),
  };
}

/** The response to a unit impulse at t = 0, the same way: the slope of the step response. */
export function impulseResponse(transfer: PolesAndZeros): TimeResponse {
  const fractions = partialFractions(transfer);
  const { polynomial, initialSlope } = fractions;
  return {
    initial: initialSlope,
    final: finalOfImpulse(transfer, fractions),
    impulses: polynomial,
    evaluate: (times) => evaluate(fractions, times, 0, initialSlope, directTerm),
  };
}

/** H(0) of a stable transfer function. */
function valueAtZero({ poles, zeros, scaledGain, omega }: PolesAndZeros): number {
  let value = scaledGain;
  const count = Math.max(poles.length, zeros.length);
  for (let k = 0; k < count; k++) {
    const zero = zeros[k]?.s;
    const pole = poles[k]?.s;
    // A pair gives the product of two sizes, a real root its own factor.
    if (zero !== undefined) value *= zero.im === 0 ? -zero.re / omega : Math.hypot(zero.re, zero.im) / omega;
    if (pole !== undefined) value /= pole.im === 0 ? -pole.re / omega : Math.hypot(pole.re, pole.im) / omega;
  }
  // Not −0.
  return value + 0;
}

/** Nothing, or what a single integrator keeps. */
function finalOfImpulse({ stability }: PolesAndZeros, { terms }: PartialFractions): number | undefined {
  if (stability === 'stable') return 0;
  const keeping = terms.filter(({ pole, uncertainty }) => pole.re >= -8 * uncertainty);
  const [one, ...more] = keeping;
  const isIntegrator = one !== undefined && one.pole.re === 0 && one.pole.im === 0 && one.residues.length === 1;
  return isIntegrator && more.length === 0 ? one.residues[0]?.re : undefined;
}

/** x^(j−1)/(j−1)!·e^(px), or its integral from 0 to x, into `into` as real and imaginary part. */
type TermOf = (re: number, im: number, x: number, j: number, into: Float64Array) => void;

function evaluate(
  { terms }: PartialFractions,
  times: ArrayLike<number>,
  constant: number,
  initial: number,
  term: TermOf,
): TimeValues | Problem {
  const values = new Float64Array(times.length);
  const bounds = new Float64Array(times.length);
  const part = new Float64Array(2);
  // The lower ones of the pairs are the conjugates of the upper ones.
  const upper = terms.filter(({ pole }) => pole.im >= 0);
  for (let k = 0; k < times.length; k++) {
    const t = times[k] ?? 0;
    if (Number.isNaN(t) || t === Infinity) {
      return problem('invalid', [], [], 'A response is asked for at times in seconds, and one of them is not a finite number.');
    }
    if (t < 0) continue;
    values[k] = constant;
    bounds[k] = ROUNDING * Math.abs(constant);
    for (const one of upper) addTerms(one, t, term, part, values, bounds, k);
    if (t === 0) values[k] = initial;
    if (!Number.isFinite(values[k] ?? 0) || !Number.isFinite(bounds[k] ?? 0)) {
      return problem('notFinite', [], [], `The response grows beyond what can be computed with by ${t} s: the network is unstable. Ask for shorter times.`);
    }
  }
  return { ok: true, values, bounds };
}

const ROUNDING = 8 * Number.EPSILON;

function addTerms(
  { pole, residues, uncertainty, relativeError }: PoleTerms,
  t: number,
  term: TermOf,
  part: Float64Array,
  values: Float64Array,
  bounds: Float64Array,
  k: number,
): void {
  const pairs = pole.im === 0 ? 1 : 2;
  const size = Math.hypot(pole.re, pole.im);
  const isIntegral = term === integralTerm;
  // The pole's own uncertainty, and the rounding of p·t.
  const doubt = uncertainty + 2 * Number.EPSILON * size;
  let front = Math.exp(pole.re * t);
  for (let j = 1; j <= residues.length; j++) {
    const residue = residues[j - 1];
    if (residue === undefined) continue;
    term(pole.re, pole.im, t, j, part);
    const [re = 0, im = 0] = part;
    values[k] = (values[k] ?? 0) + pairs * (residue.re * re - residue.im * im);
    // An integral may pass zero where what it adds up does not.
    const most = isIntegral && size > 0 ? Math.max(Math.hypot(re, im), Math.min(front / size, front * t)) : Math.hypot(re, im);
    // What e^(pt) changes by when p is off: t times as much; of what has died away no more than it had gathered.
    const reach = isIntegral && pole.re < 0 ? Math.min(t, (j + 1) / -pole.re) : t;
    const relative = relativeError + ROUNDING + doubt * reach;
    bounds[k] = (bounds[k] ?? 0) + pairs * Math.hypot(residue.re, residue.im) * most * relative;
    front *= t / j;
  }
}

function directTerm(re: number, im: number, x: number, j: number, into: Float64Array): void {
  let size = Math.exp(re * x);
  for (let k = 1; k < j; k++) size *= x / k;
  into[0] = size * Math.cos(im * x);
  into[1] = size * Math.sin(im * x);
}

/**
 * ∫₀ˣ y^(j−1)/(j−1)!·e^(py) dy. For j = 1 (e^(px) − 1)/p without its cancellation. Beyond, where |px| is no larger than
 * some j, by the series for which the terms do not cancel (Abramowitz and Stegun 1964, 6.5.4 and 6.5.29); else downward
 * in j by parts.
 */
function integralTerm(re: number, im: number, x: number, j: number, into: Float64Array): void {
  if (re === 0 && im === 0) {
    let power = 1;
    for (let k = 1; k <= j; k++) power *= x / k;
    into[0] = power;
    into[1] = 0;
    return;
  }
  const near = Math.hypot(re, im) * x <= 2 * j + 2;
  if (j > 1 && near) {
    seriesTerm(re, im, x, j, into);
    return;
  }
  const square = re * re + im * im;
  const growth = Math.exp(re * x);
  const c = Math.cos(im * x);
  const s = Math.sin(im * x);
  const half = Math.sin((im * x) / 2);
  // e^(px) − 1 = (e^(σx) − 1)·cos ωx − 2·sin²(ωx/2) + j·e^(σx)·sin ωx.
  let lessRe = Math.expm1(re * x) * c - 2 * half * half;
  let lessIm = growth * s;
  let power = 1;
  for (let k = 1; ; k++) {
    const nextRe = (lessRe * re + lessIm * im) / square;
    const nextIm = (lessIm * re - lessRe * im) / square;
    if (k === j) {
      into[0] = nextRe;
      into[1] = nextIm;
      return;
    }
    // I_(k+1) = (x^k/k!·e^(px) − I_k)/p.
    power *= x / k;
    lessRe = power * growth * c - nextRe;
    lessIm = power * growth * s - nextIm;
  }
}

/** x^j·e^(px)/j!·(1 − px/(j+1) + (px)²/((j+1)(j+2)) − …) to the left, and its like without e^(px) to the right. */
function seriesTerm(re: number, im: number, x: number, j: number, into: Float64Array): void {
  const left = re <= 0;
  const zRe = left ? -re * x : re * x;
  const zIm = left ? -im * x : im * x;
  let termRe = 1;
  let termIm = 0;
  let sumRe = left ? 1 : 1 / j;
  let sumIm = 0;
  for (let k = 1; k < MOST_TERMS; k++) {
    const by = left ? 1 / (j + k) : 1 / k;
    [termRe, termIm] = [(termRe * zRe - termIm * zIm) * by, (termRe * zIm + termIm * zRe) * by];
    const weight = left ? 1 : 1 / (j + k);
    sumRe += termRe * weight;
    sumIm += termIm * weight;
    if (Math.abs(termRe) + Math.abs(termIm) <= (Number.EPSILON / 8) * (Math.abs(sumRe) + Math.abs(sumIm))) break;
  }
  // x^j/j! to the left, x^j/(j − 1)! to the right.
  let front = x;
  for (let k = 1; k < j; k++) front *= x / k;
  if (!left) {
    into[0] = front * sumRe;
    into[1] = front * sumIm;
    return;
  }
  const size = (front / j) * Math.exp(re * x);
  const c = Math.cos(im * x);
  const s = Math.sin(im * x);
  into[0] = size * (sumRe * c - sumIm * s);
  into[1] = size * (sumRe * s + sumIm * c);
}

const MOST_TERMS = 200;
