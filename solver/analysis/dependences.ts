import { equilibrate } from '../linear/equilibrate';
import { solveDense } from '../linear/rank-revealing';
import type { Dependence, ResponseLayout } from './response-layout';

/** Above this the cube of the number of unknowns takes too long at each frequency. */
const MOST_UNKNOWNS = 300;

/** Element values are taken to be right to one unit in the last place or so: 2πf·L rounds twice. */
const DATA_ERROR = 4 * Number.EPSILON;

/**
 * The rows of the matrix, as filled for a frequency, that follow from the others as far as rounding lets tell, each with
 * an unknown that is left free; undefined where there are too many unknowns to look.
 *
 * By elimination with complete pivoting that knows how far each entry can be trusted (see `solveDense`). To be asked of
 * an expanded layout, whose entries are element values and not their sums, so that nothing small beside large is taken
 * for rounding.
 */
export function dependencesOf({ matrix, size, pins }: ResponseLayout): readonly Dependence[] | undefined {
  if (size > MOST_UNKNOWNS) return undefined;
  const rowScale = new Float64Array(size);
  const columnScale = new Float64Array(size);
  equilibrate(matrix.pattern, matrix.sumRe, matrix.sumIm, rowScale, columnScale);
  const square = (): Float64Array => new Float64Array(size * size);
  const line = (): Float64Array => new Float64Array(size);
  const dense = { size, re: square(), im: square(), error: square(), rightRe: line(), rightIm: line(), rightError: line() };
  for (let at = 0; at < matrix.row.length; at++) {
    const row = matrix.row[at] ?? 0;
    if (row >= size) continue;
    const column = matrix.column[at] ?? 0;
    const scale = (rowScale[row] ?? 1) * (columnScale[column] ?? 1);
    const re = matrix.re[at] ?? 0;
    const im = matrix.im[at] ?? 0;
    const to = row * size + column;
    dense.re[to] = (dense.re[to] ?? 0) + scale * re;
    dense.im[to] = (dense.im[to] ?? 0) + scale * im;
    // Kirchhoff's laws are exact.
    if (Math.abs(re) === 1 && im === 0) continue;
    dense.error[to] = (dense.error[to] ?? 0) + DATA_ERROR * scale * (Math.abs(re) + Math.abs(im));
  }
  const { dependentRows, freeColumns } = solveDense(dense);
  const replaced = new Set(pins.map(({ row }) => row));
  // What stands for a row that was left out already says nothing that could follow from others.
  if (dependentRows.some((row) => replaced.has(row))) return undefined;
  return Array.from(dependentRows, (row, place) => ({ row, unknown: freeColumns[place] ?? 0 }));
}
