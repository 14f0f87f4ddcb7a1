/** Where a square matrix may have entries: by rows, each place once, in any order within a row. */
export interface SparsePattern {
  readonly size: number;
  /** Row i has the places rowStart[i] to rowStart[i + 1] − 1; size + 1 numbers. */
  readonly rowStart: Int32Array;
  readonly column: Int32Array;
}

/**
 * A square complex matrix as a sum of contributions, each with its row and column; several may fall on one place. The
 * contributions are kept apart beside their sums, because a sum loses what is small in it: a residual that is taken
 * from the contributions still sees it. Rows beyond the size are no part of the matrix: a residual tells how far a
 * solution is from keeping them too.
 */
export class CoordinateMatrix {
  readonly pattern: SparsePattern;
  /** The contributions, to be filled in by the caller. */
  readonly re: Float64Array;
  readonly im: Float64Array;
  /** Their sums, one a place of the pattern; see `sum`. */
  readonly sumRe: Float64Array;
  readonly sumIm: Float64Array;
  /** The place of each contribution. */
  private readonly placeOf: Int32Array;
  private sizes: Float64Array | undefined;
  constructor(
    size: number,
    readonly row: Int32Array,
    readonly column: Int32Array,
    /** How many rows there are with those beyond the size. */
    readonly rowCount = size,
  ) {
    const count = row.length;
    this.re = new Float64Array(count);
    this.im = new Float64Array(count);
    this.placeOf = new Int32Array(count).fill(-1);
    const byRow: number[][] = Array.from({ length: size }, () => []);
    for (let at = 0; at < count; at++) byRow[row[at] ?? 0]?.push(at);
    const rowStart = new Int32Array(size + 1);
    const columns: number[] = [];
    const placeInRow = new Int32Array(size).fill(-1);
    for (const [index, contributions] of byRow.entries()) {
      const start = columns.length;
      for (const at of contributions) {
        const to = column[at] ?? 0;
        if ((placeInRow[to] ?? -1) < start) {
          placeInRow[to] = columns.length;
          columns.push(to);
        }
        this.placeOf[at] = placeInRow[to] ?? 0;
      }
      rowStart[index + 1] = columns.length;
    }
    this.pattern = { size, rowStart, column: Int32Array.from(columns) };
    this.sumRe = new Float64Array(columns.length);
    this.sumIm = new Float64Array(columns.length);
  }

  /** Adds the contributions up. */
  sum(): void {
    const { re, im, sumRe, sumIm, placeOf } = this;
    sumRe.fill(0);
    sumIm.fill(0);
    for (let at = 0; at < placeOf.length; at++) {
      const place = placeOf[at] ?? -1;
      if (place < 0) continue;
      sumRe[place] = (sumRe[place] ?? 0) + (re[at] ?? 0);
      sumIm[place] = (sumIm[place] ?? 0) + (im[at] ?? 0);
    }
  }

  /** The smallest sum against the sizes of what was added up: about ε where contributions cancel but for rounding. */
  cancellation(): number {
    const { re, im, sumRe, sumIm, placeOf } = this;
    this.sizes ??= new Float64Array(sumRe.length);
    const { sizes } = this;
    sizes.fill(0);
    for (let at = 0; at < placeOf.length; at++) {
      const place = placeOf[at] ?? -1;
      if (place >= 0) sizes[place] = (sizes[place] ?? 0) + Math.abs(re[at] ?? 0) + Math.abs(im[at] ?? 0);
    }
    let smallest = 1;
    for (let place = 0; place < sizes.length; place++) {
      const size = sizes[place] ?? 0;
      const sum = Math.abs(sumRe[place] ?? 0) + Math.abs(sumIm[place] ?? 0);
      if (sum < smallest * size) smallest = sum / size;
    }
    return smallest;
  }
}
