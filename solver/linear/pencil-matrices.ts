/** A square complex pencil A − λB, row by row, with a bound on the error of each entry (0 for an exact one). */
export interface PencilMatrices {
  readonly size: number;
  readonly aRe: Float64Array;
  readonly aIm: Float64Array;
  readonly aError: Float64Array;
  readonly bRe: Float64Array;
  readonly bIm: Float64Array;
  readonly bError: Float64Array;
}

/** A pencil of zeros. */
export function emptyPencil(size: number): PencilMatrices {
  const zeros = (): Float64Array => new Float64Array(size * size);
  return { size, aRe: zeros(), aIm: zeros(), aError: zeros(), bRe: zeros(), bIm: zeros(), bError: zeros() };
}

/** The pencil with its entries its own, so that they may be overwritten. */
export function copyOfPencil(pencil: PencilMatrices): PencilMatrices {
  const { size, aRe, aIm, aError, bRe, bIm, bError } = pencil;
  return {
    size,
    aRe: aRe.slice(),
    aIm: aIm.slice(),
    aError: aError.slice(),
    bRe: bRe.slice(),
    bIm: bIm.slice(),
    bError: bError.slice(),
  };
}

/** B − λA, whose eigenvalues are the reciprocals; it shares the entries. */
export function reversed({ size, aRe, aIm, aError, bRe, bIm, bError }: PencilMatrices): PencilMatrices {
  return { size, aRe: bRe, aIm: bIm, aError: bError, bRe: aRe, bIm: aIm, bError: aError };
}

/** Powers of two by which rows and columns were multiplied. */
export interface Scales {
  readonly rows: Float64Array;
  readonly columns: Float64Array;
}

const ROUNDS = 8;

/**
 * Multiplies rows and columns by powers of two, which is exact, until the largest entry of each, over both matrices, is
 * near one (Ruiz, RAL-TR-2001-034: square roots of the largest entries, in turns). In the equations of a network this
 * takes the level of the impedances out. Overwrites the pencil; the eigenvalues stay what they are.
 */
export function balance(pencil: PencilMatrices): Scales {
  const { size } = pencil;
  const rows = new Float64Array(size).fill(1);
  const columns = new Float64Array(size).fill(1);
  const rowMost = new Float64Array(size);
  const columnMost = new Float64Array(size);
  for (let round = 0; round < ROUNDS; round++) {
    rowMost.fill(0);
    columnMost.fill(0);
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) {
        const most = largestAt(pencil, i * size + j);
        if (most > (rowMost[i] ?? 0)) rowMost[i] = most;
        if (most > (columnMost[j] ?? 0)) columnMost[j] = most;
      }
    }
    let changed = false;
    for (let i = 0; i < size; i++) {
      rowMost[i] = rootScale(rowMost[i] ?? 0);
      columnMost[i] = rootScale(columnMost[i] ?? 0);
      if (rowMost[i] !== 1 || columnMost[i] !== 1) changed = true;
      rows[i] = (rows[i] ?? 1) * (rowMost[i] ?? 1);
      columns[i] = (columns[i] ?? 1) * (columnMost[i] ?? 1);
    }
    if (!changed) break;
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) scaleEntry(pencil, i * size + j, (rowMost[i] ?? 1) * (columnMost[j] ?? 1));
    }
  }
  return { rows, columns };
}

function largestAt({ aRe, aIm, bRe, bIm }: PencilMatrices, at: number): number {
  return Math.max(Math.abs(aRe[at] ?? 0), Math.abs(aIm[at] ?? 0), Math.abs(bRe[at] ?? 0), Math.abs(bIm[at] ?? 0));
}

/** The power of two nearest to 1/√most. */
function rootScale(most: number): number {
  return most > 0 && most < Infinity ? 2 ** Math.round(-0.5 * Math.log2(most)) : 1;
}

function scaleEntry({ aRe, aIm, aError, bRe, bIm, bError }: PencilMatrices, at: number, by: number): void {
  if (by === 1) return;
  aRe[at] = (aRe[at] ?? 0) * by;
  aIm[at] = (aIm[at] ?? 0) * by;
  aError[at] = (aError[at] ?? 0) * by;
  bRe[at] = (bRe[at] ?? 0) * by;
  bIm[at] = (bIm[at] ?? 0) * by;
  bError[at] = (bError[at] ?? 0) * by;
}
