import type { SparseLu } from './sparse-lu';
import type { CoordinateMatrix } from './sparse-matrix';

/**
 * Complex numbers, each part a sum of two doubles that do not overlap (Dekker, Numer. Math. 18 (1971) 224,
 * doi 10.1007/BF01397083): some 32 digits, so that the difference of two that are nearly the same still has its 16.
 */
export class ExtendedVector {
  re = new Float64Array(0);
  im = new Float64Array(0);
  reLow = new Float64Array(0);
  imLow = new Float64Array(0);

  constructor(size = 0) {
    this.fit(size);
  }

  /** Makes room for so many numbers; forgets what it held where that is another size. */
  fit(size: number): void {
    if (this.re.length === size) return;
    this.re = new Float64Array(size);
    this.im = new Float64Array(size);
    this.reLow = new Float64Array(size);
    this.imLow = new Float64Array(size);
  }

  clear(): void {
    for (const part of [this.re, this.im, this.reLow, this.imLow]) part.fill(0);
  }

  /** Real part of one number less another's, less a double; −1 stands for nothing. */
  differenceRe(one: number, other: number, less = 0): number {
    return difference(this.re, this.reLow, one, other, less);
  }

  differenceIm(one: number, other: number): number {
    return difference(this.im, this.imLow, one, other, 0);
  }

  /** Adds a vector of plain doubles. */
  add(re: Float64Array, im: Float64Array): void {
    for (let at = 0; at < this.re.length; at++) {
      addTo(this.re, this.reLow, at, re[at] ?? 0);
      addTo(this.im, this.imLow, at, im[at] ?? 0);
    }
  }
}

function difference(high: Float64Array, low: Float64Array, one: number, other: number, less: number): number {
  const oneHigh = one < 0 ? 0 : (high[one] ?? 0);
  const oneLow = one < 0 ? 0 : (low[one] ?? 0);
  const otherHigh = other < 0 ? 0 : (high[other] ?? 0);
  const otherLow = other < 0 ? 0 : (low[other] ?? 0);
  const sum = oneHigh - otherHigh;
  const part = sum - oneHigh;
  const lost = oneHigh - (sum - part) + (-otherHigh - part) + (oneLow - otherLow);
  const rest = sum - less;
  const restPart = rest - sum;
  return rest + (sum - (rest - restPart) + (-less - restPart) + lost);
}

function addTo(high: Float64Array, low: Float64Array, at: number, value: number): void {
  const before = high[at] ?? 0;
  const sum = before + value;
  const part = sum - before;
  const rest = before - (sum - part) + (value - part) + (low[at] ?? 0);
  const rounded = sum + rest;
  high[at] = rounded;
  low[at] = rest - (rounded - sum);
}

const SPLIT = 134217729;

/** `high` + `low` += a·(x + xLow), with the product exact but for terms of the size of ε². */
function addProduct(high: Float64Array, low: Float64Array, at: number, a: number, x: number, xLow: number): void {
  const product = a * x;
  const aTimes = SPLIT * a;
  const aHigh = aTimes - (aTimes - a);
  const aLow = a - aHigh;
  const xTimes = SPLIT * x;
  const xHigh = xTimes - (xTimes - x);
  const xRest = x - xHigh;
  const lost = aHigh * xHigh - product + aHigh * xRest + aLow * xHigh + aLow * xRest;
  const before = high[at] ?? 0;
  const sum = before + product;
  const part = sum - before;
  high[at] = sum;
  low[at] = (low[at] ?? 0) + (before - (sum - part) + (product - part)) + (lost + a * xLow);
}

/**
 * b − A·x, or b − Aᵀ·x, from the matrix's contributions one by one and in extended arithmetic: what is small in a sum
 * of contributions counts as it stands.
 */
function extendedResidual(
  matrix: CoordinateMatrix,
  transposed: boolean,
  x: ExtendedVector,
  bRe: Float64Array,
  bIm: Float64Array,
  r: ExtendedVector,
): void {
  const { row, column, re, im } = matrix;
  const { size } = matrix.pattern;
  r.clear();
  r.re.set(bRe);
  r.im.set(bIm);
  for (let at = 0; at < row.length; at++) {
    const to = (transposed ? column[at] : row[at]) ?? 0;
    const from = (transposed ? row[at] : column[at]) ?? 0;
    if (transposed && from >= size) continue;
    const aRe = re[at] ?? 0;
    const aIm = im[at] ?? 0;
    const xRe = x.re[from] ?? 0;
    const xIm = x.im[from] ?? 0;
    const xReLow = x.reLow[from] ?? 0;
    const xImLow = x.imLow[from] ?? 0;
    if (aRe !== 0) {
      addProduct(r.re, r.reLow, to, -aRe, xRe, xReLow);
      addProduct(r.im, r.imLow, to, -aRe, xIm, xImLow);
    }
    if (aIm !== 0) {
      addProduct(r.re, r.reLow, to, aIm, xIm, xImLow);
      addProduct(r.im, r.imLow, to, -aIm, xRe, xReLow);
    }
  }
  for (let at = 0; at < r.re.length; at++) {
    r.re[at] = (r.re[at] ?? 0) + (r.reLow[at] ?? 0);
    r.im[at] = (r.im[at] ?? 0) + (r.imLow[at] ?? 0);
  }
}

const MOST_STEPS = 40;

/** Refinement ends when a correction is so small against the solution. */
const ENOUGH = 2 ** -80;

/** With no correction smaller than this the factors tell too little of the matrix to be trusted. */
const TRUSTED = 2 ** -40;

/**
 * Solves with factors that rounding has spoilt as if it had not: iterative refinement with residuals and solution in
 * extended arithmetic (Wilkinson 1963; Demmel, Hida, Kahan, Li, Mukherjee and Riedy, ACM Trans. Math. Softw. 32
 * (2006) 325, doi 10.1145/1141885.1141894). Each step wins the digits that the factors are good for, so that the
 * solution has full accuracy for the contributions as they stand, unless the condition is near 1/ε. Kept with its
 * work space.
 */
export class ExtendedSolver {
  private readonly r: ExtendedVector;
  private readonly bRe: Float64Array;
  private readonly bIm: Float64Array;

  /** The factors must be those of the matrix's sums whenever something is solved. */
  constructor(
    private readonly matrix: CoordinateMatrix,
    private readonly lu: SparseLu,
  ) {
    this.r = new ExtendedVector(matrix.rowCount);
    this.bRe = new Float64Array(matrix.rowCount);
    this.bIm = new Float64Array(matrix.rowCount);
  }

  /**
   * A·x = b, or Aᵀ·x = b. Answers whether refinement converged; if not, the matrix is singular but for rounding. For
   * rows beyond the size, see `outer`.
   */
  solve(bRe: Float64Array, bIm: Float64Array, x: ExtendedVector, transposed = false): boolean {
    const { matrix, lu, r } = this;
    const { size } = matrix.pattern;
    this.bRe.fill(0);
    this.bIm.fill(0);
    this.bRe.set(bRe);
    this.bIm.set(bIm);
    x.fit(size);
    x.clear();
    const scale = transposed ? lu.rowScale : lu.columnScale;
    let before = Infinity;
    r.clear();
    r.re.set(this.bRe);
    r.im.set(this.bIm);
    for (let step = 0; step < MOST_STEPS; step++) {
      if (transposed) lu.solveTransposed(r.re, r.im, r.re, r.im);
      else lu.solve(r.re, r.im, r.re, r.im);
      let correction = 0;
      let largest = 0;
      for (let at = 0; at < size; at++) {
        const by = scale[at] ?? 1;
        correction = Math.max(correction, (Math.abs(r.re[at] ?? 0) + Math.abs(r.im[at] ?? 0)) / by);
      }
      x.add(r.re, r.im);
      for (let at = 0; at < size; at++) {
        const by = scale[at] ?? 1;
        largest = Math.max(largest, (Math.abs(x.re[at] ?? 0) + Math.abs(x.im[at] ?? 0)) / by);
      }
      if (!(correction < Infinity) || !(largest < Infinity)) return false;
      extendedResidual(matrix, transposed, x, this.bRe, this.bIm, r);
      const against = correction / largest;
      if (correction === 0 || against <= ENOUGH) return true;
      // The first correction is the solution itself, and says nothing of the factors.
      if (step > 0 && against > before / 4) return against <= TRUSTED;
      before = step === 0 ? 1 : against;
    }
    return before <= TRUSTED;
  }

  /** How far the last solution is from keeping a row beyond the size, real part; `solve` must have come before. */
  outerRe(row: number): number {
    return this.r.re[row] ?? 0;
  }

  outerIm(row: number): number {
    return this.r.im[row] ?? 0;
  }
}
