import type { SparsePattern } from './sparse-matrix';

/** Passes of scaling; each halves, in decades, how far rows and columns are from one. */
const PASSES = 4;

/**
 * Factors for rows and columns that bring the largest entry of each near one, all powers of two, so that scaling
 * rounds nothing (Ruiz's simultaneous scaling by the square roots of the largest entries, RAL-TR-2001-034). A row or
 * column without entries keeps its factor of one.
 */
export function equilibrate(
  { size, rowStart, column }: SparsePattern,
  re: Float64Array,
  im: Float64Array,
  rowScale: Float64Array,
  columnScale: Float64Array,
): void {
  rowScale.fill(1);
  columnScale.fill(1);
  const largestInColumn = new Float64Array(size);
  const largestInRow = new Float64Array(size);
  for (let pass = 0; pass < PASSES; pass++) {
    largestInColumn.fill(0);
    for (let row = 0; row < size; row++) {
      let largest = 0;
      const scale = rowScale[row] ?? 1;
      for (let at = rowStart[row] ?? 0; at < (rowStart[row + 1] ?? 0); at++) {
        const to = column[at] ?? 0;
        const entry = scale * (columnScale[to] ?? 1) * (Math.abs(re[at] ?? 0) + Math.abs(im[at] ?? 0));
        if (entry > largest) largest = entry;
        if (entry > (largestInColumn[to] ?? 0)) largestInColumn[to] = entry;
      }
      largestInRow[row] = largest;
    }
    for (let line = 0; line < size; line++) {
      rowScale[line] = (rowScale[line] ?? 1) * inverseRoot(largestInRow[line] ?? 0);
      columnScale[line] = (columnScale[line] ?? 1) * inverseRoot(largestInColumn[line] ?? 0);
    }
  }
}

/** The power of two nearest to 1/√x; 1 where x is nothing or not finite. */
function inverseRoot(x: number): number {
  return x > 0 && x < Infinity ? 2 ** -Math.round(Math.log2(x) / 2) : 1;
}
