import { equilibrate } from './equilibrate';
import type { PivotOrder } from './markowitz-order';
import { orderByMarkowitz } from './markowitz-order';
import type { SparsePattern } from './sparse-matrix';

/**
 * L·U factors of a sparse complex matrix without symmetry, in three separate steps:
 *
 * - `analyse` finds an order of pivots for the values at hand, and with it the pattern of the factors;
 * - `factor` computes the factors along that order, for these values or others of the same pattern;
 * - `solve` and `solveTransposed` use them, as often as wanted.
 *
 * With P and Q the order's permutations and R and C powers of two that equilibrate, P·R·A·C·Q = L·U; U has a diagonal
 * of ones. Cost of `factor`: one multiplication and subtraction for each entry of L and entry of U that meet; of a
 * solution: one for each entry of the factors. Nothing is allocated after the analysis.
 *
 * Duff, Erisman and Reid, Direct Methods for Sparse Matrices, Oxford 1986.
 */
export class SparseLu {
  /** R and C, by row and by column of the matrix. */
  readonly rowScale: Float64Array;
  readonly columnScale: Float64Array;
  /** The row of the smallest pivot that `factor` met, by its number in the matrix; −1 before. */
  weakestRow = -1;
  /**
   * The smallest size of a pivot against the largest number that its row has held, equilibrated: about ε where
   * rounding is all that keeps the matrix from being singular.
   */
  cancellation = 1;
  private order: PivotOrder;
  private stepOfColumn: Int32Array;
  private lRe = new Float64Array(0);
  private lIm = new Float64Array(0);
  private uRe = new Float64Array(0);
  private uIm = new Float64Array(0);
  private readonly inverseRe: Float64Array;
  private readonly inverseIm: Float64Array;
  private readonly workRe: Float64Array;
  private readonly workIm: Float64Array;

  constructor(readonly pattern: SparsePattern) {
    const { size } = pattern;
    const of = (): Float64Array => new Float64Array(size);
    [this.rowScale, this.columnScale, this.inverseRe, this.inverseIm, this.workRe, this.workIm] = [of(), of(), of(), of(), of(), of()];
    this.order = { rank: 0, rowAt: none(size), columnAt: none(size), upperStart: none(1), upper: none(0), lowerStart: none(1), lower: none(0) };
    this.stepOfColumn = none(size);
  }

  /** How many pivots the last analysis found; where fewer than the size, nothing can be factored. */
  get rank(): number {
    return this.order.rank;
  }

  /** The rows and the columns that the last analysis found no pivot for, by their numbers in the matrix. */
  get dependent(): { readonly rows: Int32Array; readonly columns: Int32Array } {
    const { rank, rowAt, columnAt } = this.order;
    return { rows: rowAt.slice(rank), columns: columnAt.slice(rank) };
  }

  /** Entries of L and U together. */
  get entries(): number {
    return this.order.lower.length + this.order.upper.length + this.order.rank;
  }

  /** Finds an order for the values, one a place of the pattern, and answers whether every row has a pivot. */
  analyse(re: Float64Array, im: Float64Array): boolean {
    const { pattern, rowScale, columnScale } = this;
    const { size, rowStart, column } = pattern;
    equilibrate(pattern, re, im, rowScale, columnScale);
    const scaledRe = new Float64Array(re.length);
    const scaledIm = new Float64Array(im.length);
    for (let row = 0; row < size; row++) {
      for (let at = rowStart[row] ?? 0; at < (rowStart[row + 1] ?? 0); at++) {
        const scale = (rowScale[row] ?? 1) * (columnScale[column[at] ?? 0] ?? 1);
        scaledRe[at] = (re[at] ?? 0) * scale;
        scaledIm[at] = (im[at] ?? 0) * scale;
      }
    }
    const order = orderByMarkowitz(pattern, scaledRe, scaledIm);
    this.order = order;
    order.columnAt.forEach((at, step) => {
      this.stepOfColumn[at] = step;
    });
    [this.lRe, this.lIm] = [new Float64Array(order.lower.length), new Float64Array(order.lower.length)];
    [this.uRe, this.uIm] = [new Float64Array(order.upper.length), new Float64Array(order.upper.length)];
    return order.rank === size;
  }

  /**
   * Factors along the order. Answers the smallest size of a pivot against the largest entry of its row as it is then;
   * an analysis makes that at least 0.1, and where other values have made it much less, so many digits may be lost and
   * they want an analysis of their own. 0 where a pivot is zero or not finite, and nothing may be solved then.
   */
  factor(re: Float64Array, im: Float64Array): number {
    const { order, pattern, rowScale, columnScale, stepOfColumn, workRe, workIm, lRe, lIm, uRe, uIm } = this;
    const { size, rowStart, column } = pattern;
    const { rowAt, upperStart, upper, lowerStart, lower } = order;
    this.weakestRow = -1;
    this.cancellation = 1;
    if (order.rank < size) return 0;
    equilibrate(pattern, re, im, rowScale, columnScale);
    let smallest = 1;
    for (let step = 0; step < size; step++) {
      const row = rowAt[step] ?? 0;
      const scale = rowScale[row] ?? 1;
      let held = 0;
      for (let at = rowStart[row] ?? 0; at < (rowStart[row + 1] ?? 0); at++) {
        const to = column[at] ?? 0;
        const factor = scale * (columnScale[to] ?? 1);
        const entryRe = (re[at] ?? 0) * factor;
        const entryIm = (im[at] ?? 0) * factor;
        workRe[stepOfColumn[to] ?? 0] = entryRe;
        workIm[stepOfColumn[to] ?? 0] = entryIm;
        held = Math.max(held, Math.abs(entryRe) + Math.abs(entryIm));
      }
      for (let at = lowerStart[step] ?? 0; at < (lowerStart[step + 1] ?? 0); at++) {
        const earlier = lower[at] ?? 0;
        const re1 = workRe[earlier] ?? 0;
        const im1 = workIm[earlier] ?? 0;
        workRe[earlier] = 0;
        workIm[earlier] = 0;
        lRe[at] = re1;
        lIm[at] = im1;
        if (re1 === 0 && im1 === 0) continue;
        held = Math.max(held, Math.abs(re1) + Math.abs(im1));
        for (let place = upperStart[earlier] ?? 0; place < (upperStart[earlier + 1] ?? 0); place++) {
          const to = upper[place] ?? 0;
          const re2 = uRe[place] ?? 0;
          const im2 = uIm[place] ?? 0;
          workRe[to] = (workRe[to] ?? 0) - (re1 * re2 - im1 * im2);
          workIm[to] = (workIm[to] ?? 0) - (re1 * im2 + im1 * re2);
        }
      }
      const ratio = this.takePivot(step, row, held);
      if (ratio < smallest) smallest = ratio;
      if (smallest === 0) {
        this.weakestRow = row;
        this.cancellation = 0;
        workRe.fill(0);
        workIm.fill(0);
        return 0;
      }
    }
    return smallest;
  }

  /** A·x = b; the right-hand side may be the same arrays as the solution. */
  solve(bRe: Float64Array, bIm: Float64Array, xRe: Float64Array, xIm: Float64Array): void {
    const { order, rowScale, columnScale, workRe, workIm, lRe, lIm, uRe, uIm, inverseRe, inverseIm } = this;
    const { size } = this.pattern;
    const { rowAt, columnAt, upperStart, upper, lowerStart, lower } = order;
    for (let step = 0; step < size; step++) {
      const row = rowAt[step] ?? 0;
      let re = (bRe[row] ?? 0) * (rowScale[row] ?? 1);
      let im = (bIm[row] ?? 0) * (rowScale[row] ?? 1);
      for (let at = lowerStart[step] ?? 0; at < (lowerStart[step + 1] ?? 0); at++) {
        const from = lower[at] ?? 0;
        const yRe = workRe[from] ?? 0;
        const yIm = workIm[from] ?? 0;
        re -= (lRe[at] ?? 0) * yRe - (lIm[at] ?? 0) * yIm;
        im -= (lRe[at] ?? 0) * yIm + (lIm[at] ?? 0) * yRe;
      }
      const invRe = inverseRe[step] ?? 0;
      const invIm = inverseIm[step] ?? 0;
      workRe[step] = re * invRe - im * invIm;
      workIm[step] = re * invIm + im * invRe;
    }
    for (let step = size - 1; step >= 0; step--) {
      let re = workRe[step] ?? 0;
      let im = workIm[step] ?? 0;
      for (let at = upperStart[step] ?? 0; at < (upperStart[step + 1] ?? 0); at++) {
        const from = upper[at] ?? 0;
        const zRe = workRe[from] ?? 0;
        const zIm = workIm[from] ?? 0;
        re -= (uRe[at] ?? 0) * zRe - (uIm[at] ?? 0) * zIm;
        im -= (uRe[at] ?? 0) * zIm + (uIm[at] ?? 0) * zRe;
      }
      workRe[step] = re;
      workIm[step] = im;
    }
    for (let step = 0; step < size; step++) {
      const to = columnAt[step] ?? 0;
      const scale = columnScale[to] ?? 1;
      xRe[to] = (workRe[step] ?? 0) * scale;
      xIm[to] = (workIm[step] ?? 0) * scale;
    }
    workRe.fill(0);
    workIm.fill(0);
  }

  /** Aᵀ·x = b: the plain transpose, not the conjugate one, which is what the adjoint of a network wants. */
  solveTransposed(bRe: Float64Array, bIm: Float64Array, xRe: Float64Array, xIm: Float64Array): void {
    const { order, rowScale, columnScale, workRe, workIm, lRe, lIm, uRe, uIm, inverseRe, inverseIm } = this;
    const { size } = this.pattern;
    const { rowAt, columnAt, upperStart, upper, lowerStart, lower } = order;
    for (let step = 0; step < size; step++) {
      const from = columnAt[step] ?? 0;
      workRe[step] = (bRe[from] ?? 0) * (columnScale[from] ?? 1);
      workIm[step] = (bIm[from] ?? 0) * (columnScale[from] ?? 1);
    }
    for (let step = 0; step < size; step++) {
      const re = workRe[step] ?? 0;
      const im = workIm[step] ?? 0;
      if (re === 0 && im === 0) continue;
      for (let at = upperStart[step] ?? 0; at < (upperStart[step + 1] ?? 0); at++) {
        const to = upper[at] ?? 0;
        workRe[to] = (workRe[to] ?? 0) - ((uRe[at] ?? 0) * re - (uIm[at] ?? 0) * im);
        workIm[to] = (workIm[to] ?? 0) - ((uRe[at] ?? 0) * im + (uIm[at] ?? 0) * re);
      }
    }
    for (let step = size - 1; step >= 0; step--) {
      const invRe = inverseRe[step] ?? 0;
      const invIm = inverseIm[step] ?? 0;
      const re = (workRe[step] ?? 0) * invRe - (workIm[step] ?? 0) * invIm;
      const im = (workRe[step] ?? 0) * invIm + (workIm[step] ?? 0) * invRe;
      workRe[step] = re;
      workIm[step] = im;
      if (re === 0 && im === 0) continue;
      for (let at = lowerStart[step] ?? 0; at < (lowerStart[step + 1] ?? 0); at++) {
        const to = lower[at] ?? 0;
        workRe[to] = (workRe[to] ?? 0) - ((lRe[at] ?? 0) * re - (lIm[at] ?? 0) * im);
        workIm[to] = (workIm[to] ?? 0) - ((lRe[at] ?? 0) * im + (lIm[at] ?? 0) * re);
      }
    }
    for (let step = 0; step < size; step++) {
      const to = rowAt[step] ?? 0;
      xRe[to] = (workRe[step] ?? 0) * (rowScale[to] ?? 1);
      xIm[to] = (workIm[step] ?? 0) * (rowScale[to] ?? 1);
    }
    workRe.fill(0);
    workIm.fill(0);
  }

  /** Stores the row of U that stands in the work space and clears that; answers how large the pivot is in it. */
  private takePivot(step: number, row: number, heldBefore: number): number {
    const { order, workRe, workIm, uRe, uIm } = this;
    const { upperStart, upper } = order;
    const re = workRe[step] ?? 0;
    const im = workIm[step] ?? 0;
    workRe[step] = 0;
    workIm[step] = 0;
    const square = re * re + im * im;
    if (!(square > 0) || square === Infinity) return 0;
    const invRe = re / square;
    const invIm = -im / square;
    this.inverseRe[step] = invRe;
    this.inverseIm[step] = invIm;
    const size = Math.abs(re) + Math.abs(im);
    let largest = size;
    for (let at = upperStart[step] ?? 0; at < (upperStart[step + 1] ?? 0); at++) {
      const from = upper[at] ?? 0;
      const entryRe = workRe[from] ?? 0;
      const entryIm = workIm[from] ?? 0;
      workRe[from] = 0;
      workIm[from] = 0;
      largest = Math.max(largest, Math.abs(entryRe) + Math.abs(entryIm));
      uRe[at] = entryRe * invRe - entryIm * invIm;
      uIm[at] = entryRe * invIm + entryIm * invRe;
    }
    if (!(largest < Infinity)) return 0;
    const against = size / Math.max(largest, heldBefore);
    if (against < this.cancellation) {
      this.cancellation = against;
      this.weakestRow = row;
    }
    return size / largest;
  }
}

function none(size: number): Int32Array {
  return new Int32Array(size);
}
