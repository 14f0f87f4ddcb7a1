import type { SparseLu } from './sparse-lu';
import type { SparsePattern } from './sparse-matrix';

/** Complex numbers in two arrays. */
export interface ComplexVector {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** A sparse complex matrix: one value a place of its pattern. */
export interface SparseMatrix extends ComplexVector {
  readonly pattern: SparsePattern;
}

export function zeros(size: number): ComplexVector {
  return { re: new Float64Array(size), im: new Float64Array(size) };
}

/** r ← b − A·x. */
export function residual(matrix: SparseMatrix, x: ComplexVector, b: ComplexVector, r: ComplexVector): void {
  const { size, rowStart, column } = matrix.pattern;
  for (let row = 0; row < size; row++) {
    let re = b.re[row] ?? 0;
    let im = b.im[row] ?? 0;
    for (let at = rowStart[row] ?? 0; at < (rowStart[row + 1] ?? 0); at++) {
      const from = column[at] ?? 0;
      const aRe = matrix.re[at] ?? 0;
      const aIm = matrix.im[at] ?? 0;
      const xRe = x.re[from] ?? 0;
      const xIm = x.im[from] ?? 0;
      re -= aRe * xRe - aIm * xIm;
      im -= aRe * xIm + aIm * xRe;
    }
    r.re[row] = re;
    r.im[row] = im;
  }
}

/** One step of iterative refinement: x ← x + A⁻¹·(b − A·x). `r` is work space, and holds the correction afterwards. */
export function refine(lu: SparseLu, matrix: SparseMatrix, x: ComplexVector, b: ComplexVector, r: ComplexVector): void {
  residual(matrix, x, b, r);
  lu.solve(r.re, r.im, r.re, r.im);
  for (let at = 0; at < matrix.pattern.size; at++) {
    x.re[at] = (x.re[at] ?? 0) + (r.re[at] ?? 0);
    x.im[at] = (x.im[at] ?? 0) + (r.im[at] ?? 0);
  }
}

/**
 * The componentwise backward error of a solution: the smallest ω such that x solves exactly a system whose every entry,
 * and every entry of whose right-hand side, is relatively no further off than ω (Oettli and Prager, Numer. Math. 6
 * (1964) 405, doi 10.1007/BF01386090). For a row whose terms vanish, its size against the largest of x takes the
 * place of the right-hand side (Arioli, Demmel and Duff, SIAM J. Matrix Anal. Appl. 10 (1989) 165,
 * doi 10.1137/0610013). It tells of the solution, not of the matrix: multiply by the condition for the error.
 */
export function backwardError(matrix: SparseMatrix, x: ComplexVector, b: ComplexVector): number {
  const { size, rowStart, column } = matrix.pattern;
  const r = zeros(size);
  residual(matrix, x, b, r);
  let largest = 0;
  for (let at = 0; at < size; at++) largest = Math.max(largest, sizeAt(x, at));
  let worst = 0;
  for (let row = 0; row < size; row++) {
    let terms = 0;
    let norm = 0;
    for (let at = rowStart[row] ?? 0; at < (rowStart[row + 1] ?? 0); at++) {
      const entry = sizeAt(matrix, at);
      norm += entry;
      terms += entry * sizeAt(x, column[at] ?? 0);
    }
    const right = sizeAt(b, row);
    const least = 1000 * size * Number.EPSILON * (norm * largest + right);
    const against = terms + right > least ? terms + right : terms + norm * largest;
    const off = sizeAt(r, row);
    if (off > 0) worst = Math.max(worst, off / against);
  }
  return worst;
}

/**
 * An estimate, seldom more than some times too small, of ‖A‖₁·‖A⁻¹‖₁ for the matrix as equilibrated: by Hager's method
 * (SIAM J. Sci. Stat. Comput. 5 (1984) 311, doi 10.1137/0905023) with Higham's changes (ACM Trans. Math. Softw. 14
 * (1988) 381, doi 10.1145/50063.214386). The factors must be those of the matrix. Some ten solutions.
 */
export function estimateCondition(lu: SparseLu, matrix: SparseMatrix): number {
  const { size, rowStart, column } = matrix.pattern;
  if (size === 0) return 1;
  const { rowScale, columnScale } = lu;
  const columnSum = new Float64Array(size);
  for (let row = 0; row < size; row++) {
    for (let at = rowStart[row] ?? 0; at < (rowStart[row + 1] ?? 0); at++) {
      const to = column[at] ?? 0;
      columnSum[to] = (columnSum[to] ?? 0) + Math.hypot(matrix.re[at] ?? 0, matrix.im[at] ?? 0) * (rowScale[row] ?? 1);
    }
  }
  let norm = 0;
  for (let to = 0; to < size; to++) norm = Math.max(norm, (columnSum[to] ?? 0) * (columnScale[to] ?? 1));
  return norm * estimateInverseNorm(lu);
}

/** ‖(R·A·C)⁻¹‖₁, with R and C the scales of the factors. */
function estimateInverseNorm(lu: SparseLu): number {
  const { size } = lu.pattern;
  const y = zeros(size);
  const z = zeros(size);
  // (RAC)⁻¹ = C⁻¹·A⁻¹·R⁻¹; its transpose the other way round.
  const apply = (): void => {
    divide(y, lu.rowScale);
    lu.solve(y.re, y.im, y.re, y.im);
    divide(y, lu.columnScale);
  };
  y.re.fill(1 / size);
  apply();
  let estimate = oneNorm(y);
  let chosen = -1;
  for (let round = 0; round < 5; round++) {
    for (let at = 0; at < size; at++) {
      const length = Math.hypot(y.re[at] ?? 0, y.im[at] ?? 0);
      z.re[at] = length === 0 ? 1 : (y.re[at] ?? 0) / length;
      // Conjugated before and after, which makes the transpose the conjugate transpose.
      z.im[at] = length === 0 ? 0 : -(y.im[at] ?? 0) / length;
    }
    divide(z, lu.columnScale);
    lu.solveTransposed(z.re, z.im, z.re, z.im);
    divide(z, lu.rowScale);
    let next = 0;
    for (let at = 1; at < size; at++) if (lengthAt(z, at) > lengthAt(z, next)) next = at;
    if (next === chosen) break;
    chosen = next;
    y.re.fill(0);
    y.im.fill(0);
    y.re[chosen] = 1;
    apply();
    const found = oneNorm(y);
    if (found <= estimate) break;
    estimate = found;
  }
  for (let at = 0; at < size; at++) {
    y.re[at] = (at % 2 === 0 ? 1 : -1) * (1 + at / Math.max(1, size - 1));
    y.im[at] = 0;
  }
  apply();
  return Math.max(estimate, (2 * oneNorm(y)) / (3 * size));
}

function divide(x: ComplexVector, scale: Float64Array): void {
  for (let at = 0; at < scale.length; at++) {
    x.re[at] = (x.re[at] ?? 0) / (scale[at] ?? 1);
    x.im[at] = (x.im[at] ?? 0) / (scale[at] ?? 1);
  }
}

function oneNorm(x: ComplexVector): number {
  let sum = 0;
  for (let at = 0; at < x.re.length; at++) sum += lengthAt(x, at);
  return sum;
}

function lengthAt(x: ComplexVector, at: number): number {
  return Math.hypot(x.re[at] ?? 0, x.im[at] ?? 0);
}

function sizeAt(x: ComplexVector, at: number): number {
  return Math.abs(x.re[at] ?? 0) + Math.abs(x.im[at] ?? 0);
}
