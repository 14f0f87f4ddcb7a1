/**
 * Dense complex elimination with complete pivoting that knows how far each of its entries can be trusted.
 *
 * Beside every entry runs a bound on its error: that of the data it came from, carried through the same operations,
 * and the rounding of the operations (running error analysis; Wilkinson 1963, Higham 2002 section 3.3). An entry no
 * larger than its bound may as well be zero, and when all that remain are so, the rank is found: singularity is
 * judged against the sizes of the terms that cancelled, never by a test for zero. Complete pivoting takes the largest
 * entry that remains.
 *
 * Cost: about n³/3 complex multiplications and as many comparisons; for some hundreds of unknowns, when the sparse
 * way cannot be trusted.
 */
export interface DenseSystem {
  readonly size: number;
  /** Row by row; overwritten. */
  readonly re: Float64Array;
  readonly im: Float64Array;
  /** Bound on the error of each entry; 0 for an exact one. Overwritten. */
  readonly error: Float64Array;
  /** Right-hand side, with the bound on its error; overwritten. */
  readonly rightRe: Float64Array;
  readonly rightIm: Float64Array;
  readonly rightError: Float64Array;
}

export interface NullVector {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export interface DenseOutcome {
  readonly rank: number;
  /** Whether the right-hand side agrees with the equations that depend on others; true at full rank. */
  readonly consistent: boolean;
  /** A solution; of many, the one with the free unknowns at zero. Of no use unless `consistent`. */
  readonly re: Float64Array;
  readonly im: Float64Array;
  /** A bound on the error of each unknown, but for what the null vectors leave free. */
  readonly error: Float64Array;
  /** A basis of what may be added to a solution; empty at full rank. */
  readonly nullVectors: readonly NullVector[];
  /** The equations that follow from the others, and the unknowns that they leave free: as many, in no order. */
  readonly dependentRows: Int32Array;
  readonly freeColumns: Int32Array;
}

/** Solves the system, or says in which directions it has no unique solution. */
export function solveDense(system: DenseSystem): DenseOutcome {
  const { size } = system;
  const rowOf = Int32Array.from({ length: size }, (_, i) => i);
  const columnOf = Int32Array.from({ length: size }, (_, i) => i);
  let rank = 0;
  while (rank < size && takePivot(system, rowOf, columnOf, rank)) rank++;
  let consistent = true;
  for (let k = rank; k < size; k++) {
    const row = rowOf[k] ?? 0;
    const left = Math.abs(system.rightRe[row] ?? 0) + Math.abs(system.rightIm[row] ?? 0);
    if (left > (system.rightError[row] ?? 0)) consistent = false;
  }
  const solution = backSubstitute(system, rowOf, columnOf, rank, -1);
  const bound = boundErrors(system, rowOf, columnOf, rank, solution);
  const nullVectors: NullVector[] = [];
  for (let free = rank; free < size; free++) {
    nullVectors.push(backSubstitute(system, rowOf, columnOf, rank, columnOf[free] ?? 0));
  }
  return { rank, consistent, ...solution, error: bound, nullVectors, dependentRows: rowOf.slice(rank), freeColumns: columnOf.slice(rank) };
}

/** Finds the pivot of step k and eliminates with it; false when no entry that remains can be told from zero. */
function takePivot(system: DenseSystem, rowOf: Int32Array, columnOf: Int32Array, k: number): boolean {
  const { size, re, im, error } = system;
  let best = 0;
  let bestRow = -1;
  let bestColumn = -1;
  for (let i = k; i < size; i++) {
    const base = (rowOf[i] ?? 0) * size;
    for (let j = k; j < size; j++) {
      const at = base + (columnOf[j] ?? 0);
      const entry = Math.abs(re[at] ?? 0) + Math.abs(im[at] ?? 0);
      if (entry > best && entry > (error[at] ?? 0)) {
        best = entry;
        bestRow = i;
        bestColumn = j;
      }
    }
  }
  if (bestRow < 0) return false;
  swap(rowOf, k, bestRow);
  swap(columnOf, k, bestColumn);
  const pivotRow = rowOf[k] ?? 0;
  const pivotColumn = columnOf[k] ?? 0;
  for (let i = k + 1; i < size; i++) {
    eliminateRow(system, rowOf[i] ?? 0, pivotRow, pivotColumn, columnOf, k);
  }
  return true;
}

function eliminateRow(
  system: DenseSystem,
  row: number,
  pivotRow: number,
  pivotColumn: number,
  columnOf: Int32Array,
  k: number,
): void {
  const { size, re, im, error, rightRe, rightIm, rightError } = system;
  const head = row * size + pivotColumn;
  const headRe = re[head] ?? 0;
  const headIm = im[head] ?? 0;
  const headError = error[head] ?? 0;
  if (headRe === 0 && headIm === 0 && headError === 0) return;
  const pivot = pivotRow * size + pivotColumn;
  const pRe = re[pivot] ?? 0;
  const pIm = im[pivot] ?? 0;
  const square = pRe * pRe + pIm * pIm;
  const lRe = (headRe * pRe + headIm * pIm) / square;
  const lIm = (headIm * pRe - headRe * pIm) / square;
  const l = Math.abs(lRe) + Math.abs(lIm);
  const lError = (headError + l * (error[pivot] ?? 0)) / Math.sqrt(square) + ROUNDING * l;
  for (let j = k + 1; j < size; j++) {
    const column = columnOf[j] ?? 0;
    const from = pivotRow * size + column;
    const uRe = re[from] ?? 0;
    const uIm = im[from] ?? 0;
    const uError = error[from] ?? 0;
    if (uRe === 0 && uIm === 0 && uError === 0) continue;
    const to = row * size + column;
    re[to] = (re[to] ?? 0) - (lRe * uRe - lIm * uIm);
    im[to] = (im[to] ?? 0) - (lRe * uIm + lIm * uRe);
    const u = Math.abs(uRe) + Math.abs(uIm);
    error[to] = (error[to] ?? 0) + l * uError + u * lError + ROUNDING * l * u;
  }
  const bRe = rightRe[pivotRow] ?? 0;
  const bIm = rightIm[pivotRow] ?? 0;
  const b = Math.abs(bRe) + Math.abs(bIm);
  rightRe[row] = (rightRe[row] ?? 0) - (lRe * bRe - lIm * bIm);
  rightIm[row] = (rightIm[row] ?? 0) - (lRe * bIm + lIm * bRe);
  rightError[row] = (rightError[row] ?? 0) + l * (rightError[pivotRow] ?? 0) + b * lError + ROUNDING * l * b;
}

/** A complex product and a sum round by some three units in the last place. */
const ROUNDING = 3 * Number.EPSILON;

/**
 * Solves the upper triangle: for the right-hand side with all free unknowns zero (`free` −1), or for a right-hand
 * side of zero with the free unknown of that column at one.
 */
function backSubstitute(
  system: DenseSystem,
  rowOf: Int32Array,
  columnOf: Int32Array,
  rank: number,
  free: number,
): NullVector {
  const { size, re, im, rightRe, rightIm } = system;
  const xRe = new Float64Array(size);
  const xIm = new Float64Array(size);
  if (free >= 0) xRe[free] = 1;
  for (let k = rank - 1; k >= 0; k--) {
    const row = rowOf[k] ?? 0;
    const base = row * size;
    let sumRe = free < 0 ? (rightRe[row] ?? 0) : 0;
    let sumIm = free < 0 ? (rightIm[row] ?? 0) : 0;
    for (let j = k + 1; j < size; j++) {
      const column = columnOf[j] ?? 0;
      const aRe = re[base + column] ?? 0;
      const aIm = im[base + column] ?? 0;
      sumRe -= aRe * (xRe[column] ?? 0) - aIm * (xIm[column] ?? 0);
      sumIm -= aRe * (xIm[column] ?? 0) + aIm * (xRe[column] ?? 0);
    }
    const column = columnOf[k] ?? 0;
    const pRe = re[base + column] ?? 0;
    const pIm = im[base + column] ?? 0;
    const square = pRe * pRe + pIm * pIm;
    xRe[column] = (sumRe * pRe + sumIm * pIm) / square;
    xIm[column] = (sumIm * pRe - sumRe * pIm) / square;
  }
  return { re: xRe, im: xIm };
}

/** The back substitution once more, on the bounds of the errors of what went into it. */
function boundErrors(
  { size, re, im, error, rightError }: DenseSystem,
  rowOf: Int32Array,
  columnOf: Int32Array,
  rank: number,
  { re: xRe, im: xIm }: NullVector,
): Float64Array {
  const bound = new Float64Array(size);
  for (let k = rank - 1; k >= 0; k--) {
    const row = rowOf[k] ?? 0;
    const base = row * size;
    let sum = rightError[row] ?? 0;
    for (let j = k; j < size; j++) {
      const column = columnOf[j] ?? 0;
      const a = Math.hypot(re[base + column] ?? 0, im[base + column] ?? 0);
      const x = Math.abs(xRe[column] ?? 0) + Math.abs(xIm[column] ?? 0);
      sum += ((error[base + column] ?? 0) + ROUNDING * a) * x + (j > k ? a * (bound[column] ?? 0) : 0);
    }
    const pivot = base + (columnOf[k] ?? 0);
    bound[columnOf[k] ?? 0] = sum / Math.hypot(re[pivot] ?? 0, im[pivot] ?? 0);
  }
  return bound;
}

function swap(order: Int32Array, one: number, other: number): void {
  const kept = order[one] ?? 0;
  order[one] = order[other] ?? 0;
  order[other] = kept;
}
