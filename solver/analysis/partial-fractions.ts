import type { PolesAndZeros, Root } from './poles-and-zeros';

/** One pole with the terms that belong to it: Σ residues[j] / (s − pole)^(j+1), j from 0. */
export interface PoleTerms {
  /** rad/s. */
  readonly pole: { readonly re: number; readonly im: number };
  /** As many as the pole counts. Units: that of H times (rad/s)^(j+1). */
  readonly residues: readonly { readonly re: number; readonly im: number }[];
  /** How far the pole may be off, rad/s, and by what part of it each residue may. */
  readonly uncertainty: number;
  readonly relativeError: number;
}

/** H(s) = Σ polynomial[k]·s^k + the terms of all poles, each pole once. */
export interface PartialFractions {
  /** The direct term H(∞) first; more only where H grows without bound. Empty where H(∞) is 0. */
  readonly polynomial: readonly number[];
  readonly terms: readonly PoleTerms[];
  /** The coefficient of 1/s for large s: where the impulse response begins. */
  readonly initialSlope: number;
}

type Pair = readonly [re: number, im: number];

/**
 * Partial fractions of a transfer function, from its poles and zeros: residues of single poles as products of
 * distances; of multiple ones, the Taylor coefficients of (s − p)^m·H at p, by the recurrence that its logarithmic
 * derivative gives; the polynomial in the same way at infinity (Henrici, *Applied and Computational Complex Analysis* 1,
 * 1974). Nothing is subtracted but poles and zeros from each other, so that a residue is as exact
 * as those distances: `relativeError` is their uncertainties over them. Close poles that do not coincide have residues
 * that are huge and opposite; what they add up to has lost as much.
 */
export function partialFractions(transfer: PolesAndZeros): PartialFractions {
  const { omega, scaledGain } = transfer;
  if (scaledGain === 0) return { polynomial: [], terms: [], initialSlope: 0 };
  const poles = transfer.poles.map((root) => scaled(root, omega));
  const zeros = transfer.zeros.map((root) => scaled(root, omega));
  const degree = zeros.length - poles.length;
  const atInfinity = seriesAtInfinity(poles, zeros, degree + 2);
  const polynomial = Array.from({ length: Math.max(0, degree + 1) }, (_, k) => (scaledGain * (atInfinity[degree - k] ?? 0)) / omega ** k);
  const initialSlope = degree >= -1 ? scaledGain * (atInfinity[degree + 1] ?? 0) * omega : 0;
  const terms = transfer.poles.flatMap((pole, k): PoleTerms[] => {
    // Members of a multiple pole stand in exactly one place, the first for all; the upper one of a pair for both.
    const isSame = ({ s }: Root): boolean => s.re === pole.s.re && s.im === pole.s.im;
    if (pole.s.im < 0 || transfer.poles.findIndex(isSame) !== k) return [];
    const order = transfer.poles.filter(isSame).length;
    const others = poles.filter((_, other) => !isSame(transfer.poles[other] ?? pole));
    const taylor = taylorAt(poles[k] ?? [0, 0], others, zeros, scaledGain, order);
    // The coefficient of (s − p)^i belongs to (s − p)^(i − m). Those of a real pole are real.
    const residues = Array.from({ length: order }, (_, j) => {
      const [re, im] = taylor[order - 1 - j] ?? [0, 0];
      return { re: re * omega ** (j + 1), im: pole.s.im === 0 ? 0 : im * omega ** (j + 1) };
    });
    const upper = {
      pole: { re: pole.s.re, im: pole.s.im },
      residues,
      uncertainty: pole.uncertainty,
      relativeError: order * relativeErrorOf(pole, transfer),
    };
    if (pole.s.im === 0) return [upper];
    return [upper, { ...upper, pole: conjugate(upper.pole), residues: residues.map(conjugate) }];
  });
  return { polynomial, terms, initialSlope };
}

function scaled({ s }: Root, omega: number): Pair {
  return [s.re / omega, s.im / omega];
}

/** Coefficients of Π(1 − zμ)/Π(1 − pμ) in powers of μ: k·a_k = Σ_j (Σp^j − Σz^j)·a_(k−j). They are real. */
function seriesAtInfinity(poles: readonly Pair[], zeros: readonly Pair[], count: number): number[] {
  const powers = { poles: poles.map((): Pair => [1, 0]), zeros: zeros.map((): Pair => [1, 0]) };
  const sums: number[] = [];
  const series: number[] = [1];
  for (let k = 1; k < count; k++) {
    powers.poles = powers.poles.map((power, i) => times(power, poles[i] ?? [0, 0]));
    powers.zeros = powers.zeros.map((power, i) => times(power, zeros[i] ?? [0, 0]));
    sums.push(powers.poles.reduce((sum, [re]) => sum + re, 0) - powers.zeros.reduce((sum, [re]) => sum + re, 0));
    series.push(sums.reduce((sum, part, j) => sum + part * (series[k - 1 - j] ?? 0), 0) / k);
  }
  return series;
}

/** The first coefficients of gain·Π(s − z)/Π(s − p) in powers of s − at: n·a_n = Σ_k c_k·a_(n−1−k), c of φ'/φ. */
function taylorAt(at: Pair, poles: readonly Pair[], zeros: readonly Pair[], gain: number, count: number): Pair[] {
  let value: Pair = [gain, 0];
  // In turns, so that the product stays within range.
  for (let k = 0; k < Math.max(poles.length, zeros.length); k++) {
    const zero = zeros[k];
    const pole = poles[k];
    if (zero !== undefined) value = times(value, minus(at, zero));
    if (pole !== undefined) value = over(value, minus(at, pole));
  }
  const steps: Pair[] = [];
  for (let k = 0; k < count - 1; k++) {
    const sign = k % 2 === 0 ? 1 : -1;
    let sum: Pair = [0, 0];
    for (const zero of zeros) sum = plus(sum, inversePower(minus(at, zero), k + 1), sign);
    for (const pole of poles) sum = plus(sum, inversePower(minus(at, pole), k + 1), -sign);
    steps.push(sum);
  }
  const series: Pair[] = [value];
  for (let n = 1; n < count; n++) {
    let sum: Pair = [0, 0];
    for (let k = 0; k < n; k++) sum = plus(sum, times(steps[k] ?? [0, 0], series[n - 1 - k] ?? [0, 0]), 1);
    series.push([sum[0] / n, sum[1] / n]);
  }
  return series;
}

function conjugate({ re, im }: { readonly re: number; readonly im: number }): { readonly re: number; readonly im: number } {
  return { re, im: -im };
}

function relativeErrorOf(pole: Root, { poles, zeros }: PolesAndZeros): number {
  let sum = 4 * Number.EPSILON * (poles.length + zeros.length);
  for (const other of [...poles, ...zeros]) {
    const distance = Math.hypot(other.s.re - pole.s.re, other.s.im - pole.s.im);
    if (distance > 0) sum += (other.uncertainty + pole.uncertainty) / distance;
  }
  return sum;
}

function times(a: Pair, b: Pair): Pair {
  return [a[0] * b[0] - a[1] * b[1], a[0] * b[1] + a[1] * b[0]];
}

function over(a: Pair, b: Pair): Pair {
  const square = b[0] * b[0] + b[1] * b[1];
  return [(a[0] * b[0] + a[1] * b[1]) / square, (a[1] * b[0] - a[0] * b[1]) / square];
}

function minus(a: Pair, b: Pair): Pair {
  return [a[0] - b[0], a[1] - b[1]];
}

function plus(a: Pair, b: Pair, factor: number): Pair {
  return [a[0] + factor * b[0], a[1] + factor * b[1]];
}

function inversePower(a: Pair, power: number): Pair {
  let value: Pair = [1, 0];
  for (let k = 0; k < power; k++) value = over(value, a);
  return value;
}
