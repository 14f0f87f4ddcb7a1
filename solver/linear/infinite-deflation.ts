import type { PencilMatrices } from './pencil-matrices';
import { copyOfPencil, emptyPencil } from './pencil-matrices';

/** A pencil without its infinite eigenvalues, and how many they were; or the finding that det(A − λB) is 0 for all λ. */
export type Deflated =
  | { readonly kind: 'regular'; readonly pencil: PencilMatrices; readonly removed: number }
  | { readonly kind: 'singular' };

/**
 * Takes the infinite eigenvalues out of a pencil A − λB, of any index, before they can disturb the finite ones: a block
 * of index k would come out of the QZ iteration as finite values of the size ε^(−1/k).
 *
 * In turns: the rows of B are compressed to its rank; a row that has nothing left in B is an equation without λ, and
 * takes one unknown out of all others; that may lower the rank of what is left of B, so it begins again (the staircase
 * of Van Dooren 1979, doi 10.1016/0024-3795(79)90035-1, with elimination in place of rotations). Whether an entry is
 * zero is judged against its own error, carried along with it. Errors are added as independent ones are, by their
 * squares: strict bounds, as in `solveDense`, double with every step of a full matrix and soon take all for zero; an
 * entry counts when it is `SIGNIFICANT` times its error. What is left has a B of full rank.
 */
export function deflateInfinite(given: PencilMatrices): Deflated {
  const pencil = copyOfPencil(given);
  const rows = Array.from({ length: given.size }, (_, i) => i);
  const columns = Array.from({ length: given.size }, (_, i) => i);
  for (;;) {
    const rank = compress(pencil, rows, columns);
    if (rank === rows.length) break;
    while (rows.length > rank) {
      if (!removeConstraint(pencil, rows, columns, rank)) return { kind: 'singular' };
    }
  }
  return { kind: 'regular', pencil: extract(pencil, rows, columns), removed: given.size - rows.length };
}

/** A complex product rounds by less than two units in the last place. */
const ROUNDING = 2 * Number.EPSILON;

const SIGNIFICANT = 8;

/** Brings B to upper triangular form over the rows and columns in the order it leaves them in; answers the rank. */
function compress(pencil: PencilMatrices, rows: number[], columns: number[]): number {
  const { size, bRe, bIm, bError } = pencil;
  const count = rows.length;
  let rank = 0;
  for (; rank < count; rank++) {
    const pivot = largest(bRe, bIm, bError, size, rows, columns, rank, rank);
    if (pivot === undefined) break;
    swap(rows, rank, pivot.row);
    swap(columns, rank, pivot.column);
    const pivotRow = rows[rank] ?? 0;
    const head = columns[rank] ?? 0;
    for (let i = rank + 1; i < count; i++) {
      const row = rows[i] ?? 0;
      const l = quotient(bRe, bIm, bError, row * size + head, bRe, bIm, bError, pivotRow * size + head);
      if (l === undefined) continue;
      subtract(bRe, bIm, bError, row * size, bRe, bIm, bError, pivotRow * size, columns, rank + 1, l);
      subtract(pencil.aRe, pencil.aIm, pencil.aError, row * size, pencil.aRe, pencil.aIm, pencil.aError, pivotRow * size, columns, 0, l);
      clear(bRe, bIm, bError, row * size + head);
    }
  }
  // What is left cannot be told from zero.
  for (let i = rank; i < count; i++) {
    for (let j = 0; j < count; j++) clear(bRe, bIm, bError, (rows[i] ?? 0) * size + (columns[j] ?? 0));
  }
  return rank;
}

/** Uses up one equation without λ, of those from place `rank` on, and one unknown; false when none has anything left. */
function removeConstraint(pencil: PencilMatrices, rows: number[], columns: number[], rank: number): boolean {
  const { size, aRe, aIm, aError, bRe, bIm, bError } = pencil;
  const pivot = largest(aRe, aIm, aError, size, rows, columns, rank, 0);
  if (pivot === undefined) return false;
  const from = rows[pivot.row] ?? 0;
  const head = columns[pivot.column] ?? 0;
  const at = from * size + head;
  rows.splice(pivot.row, 1);
  columns.splice(pivot.column, 1);
  for (const row of rows) {
    const forA = quotient(aRe, aIm, aError, row * size + head, aRe, aIm, aError, at);
    if (forA !== undefined) subtract(aRe, aIm, aError, row * size, aRe, aIm, aError, from * size, columns, 0, forA);
    const forB = quotient(bRe, bIm, bError, row * size + head, aRe, aIm, aError, at);
    if (forB !== undefined) subtract(bRe, bIm, bError, row * size, aRe, aIm, aError, from * size, columns, 0, forB);
  }
  return true;
}

/** The largest entry that can be told from zero, by places in `rows` and `columns`. */
function largest(
  re: Float64Array,
  im: Float64Array,
  error: Float64Array,
  size: number,
  rows: readonly number[],
  columns: readonly number[],
  fromRow: number,
  fromColumn: number,
): { readonly row: number; readonly column: number } | undefined {
  let best = 0;
  let row = -1;
  let column = -1;
  for (let i = fromRow; i < rows.length; i++) {
    const base = (rows[i] ?? 0) * size;
    for (let j = fromColumn; j < columns.length; j++) {
      const at = base + (columns[j] ?? 0);
      const entry = Math.abs(re[at] ?? 0) + Math.abs(im[at] ?? 0);
      if (entry > best && entry > SIGNIFICANT * (error[at] ?? 0)) {
        best = entry;
        row = i;
        column = j;
      }
    }
  }
  return row < 0 ? undefined : { row, column };
}

interface Quotient {
  readonly re: number;
  readonly im: number;
  readonly error: number;
}

/** One entry over another, with its error; undefined for exactly nothing. */
function quotient(
  re: Float64Array,
  im: Float64Array,
  error: Float64Array,
  at: number,
  underRe: Float64Array,
  underIm: Float64Array,
  underError: Float64Array,
  under: number,
): Quotient | undefined {
  const x = re[at] ?? 0;
  const y = im[at] ?? 0;
  const e = error[at] ?? 0;
  if (x === 0 && y === 0 && e === 0) return undefined;
  const u = underRe[under] ?? 0;
  const v = underIm[under] ?? 0;
  // Without an imaginary part, division alone: it rounds once.
  if (v === 0) {
    const l = { re: x / u, im: y / u };
    const most = Math.abs(l.re) + Math.abs(l.im);
    return { ...l, error: Math.hypot(e / u, (most * (underError[under] ?? 0)) / u, ROUNDING * most) };
  }
  const square = u * u + v * v;
  const l = { re: (x * u + y * v) / square, im: (y * u - x * v) / square };
  const most = Math.abs(l.re) + Math.abs(l.im);
  return { ...l, error: Math.hypot(Math.hypot(e, most * (underError[under] ?? 0)) / Math.sqrt(square), ROUNDING * most) };
}

/** row −= l·other over the columns from a place on, with the errors. */
function subtract(
  re: Float64Array,
  im: Float64Array,
  error: Float64Array,
  row: number,
  otherRe: Float64Array,
  otherIm: Float64Array,
  otherError: Float64Array,
  other: number,
  columns: readonly number[],
  from: number,
  l: Quotient,
): void {
  const size = Math.abs(l.re) + Math.abs(l.im);
  for (let j = from; j < columns.length; j++) {
    const column = columns[j] ?? 0;
    const x = otherRe[other + column] ?? 0;
    const y = otherIm[other + column] ?? 0;
    const e = otherError[other + column] ?? 0;
    if (x === 0 && y === 0 && e === 0) continue;
    const at = row + column;
    const u = Math.abs(x) + Math.abs(y);
    const nextRe = (re[at] ?? 0) - (l.re * x - l.im * y);
    const nextIm = (im[at] ?? 0) - (l.re * y + l.im * x);
    re[at] = nextRe;
    im[at] = nextIm;
    const rounding = ROUNDING * size * u + (Number.EPSILON / 2) * (Math.abs(nextRe) + Math.abs(nextIm));
    const before = error[at] ?? 0;
    const carried = size * e;
    const ofFactor = u * l.error;
    error[at] = Math.sqrt(before * before + carried * carried + ofFactor * ofFactor + rounding * rounding);
  }
}

function clear(re: Float64Array, im: Float64Array, error: Float64Array, at: number): void {
  re[at] = 0;
  im[at] = 0;
  error[at] = 0;
}

function swap(order: number[], one: number, other: number): void {
  const kept = order[one] ?? 0;
  order[one] = order[other] ?? 0;
  order[other] = kept;
}

function extract(pencil: PencilMatrices, rows: readonly number[], columns: readonly number[]): PencilMatrices {
  const size = rows.length;
  const small = emptyPencil(size);
  for (const [i, row] of rows.entries()) {
    for (const [j, column] of columns.entries()) {
      const from = row * pencil.size + column;
      const to = i * size + j;
      small.aRe[to] = pencil.aRe[from] ?? 0;
      small.aIm[to] = pencil.aIm[from] ?? 0;
      small.aError[to] = pencil.aError[from] ?? 0;
      small.bRe[to] = pencil.bRe[from] ?? 0;
      small.bIm[to] = pencil.bIm[from] ?? 0;
      small.bError[to] = pencil.bError[from] ?? 0;
    }
  }
  return small;
}
