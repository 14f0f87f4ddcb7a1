import type { SparsePattern } from './sparse-matrix';

/** An order of pivots with the pattern of the factors along it; steps count from 0, earlier ones are taken first. */
export interface PivotOrder {
  /** How many pivots were found; less than the size where the matrix is singular, in structure or but for rounding. */
  readonly rank: number;
  /** The row and the column of each step. Those without a pivot stand last, in no order that means anything. */
  readonly rowAt: Int32Array;
  readonly columnAt: Int32Array;
  /** For each step the later steps whose columns its row has, fill included. */
  readonly upperStart: Int32Array;
  readonly upper: Int32Array;
  /** For each step the earlier steps that its row is reduced by, in rising order. */
  readonly lowerStart: Int32Array;
  readonly lower: Int32Array;
}

/** A pivot may be so much smaller than the largest entry of its row, for the sake of less fill. */
const THRESHOLD = 0.1;

/** So many rows and columns are looked through for a pivot once one is found (Duff, Erisman and Reid 1986, section 9.2). */
const LINES_SEARCHED = 4;

/** An entry so small against the largest that its row has held is what rounding has left of nothing. */
const NOTHING = 16 * Number.EPSILON;

/**
 * Orders the pivots of a matrix by Markowitz's count (Management Science 3 (1957) 255, doi 10.1287/mnsc.3.3.255):
 * among the entries that are large enough in their row, the one with the least (r − 1)(c − 1), r and c being how many
 * entries its row and column still have. The matrix should be equilibrated. Rows keep the sizes of what was
 * subtracted in them, so that a row that only rounding has kept from vanishing is taken as vanished.
 */
export function orderByMarkowitz(pattern: SparsePattern, re: Float64Array, im: Float64Array): PivotOrder {
  return new Elimination(pattern, re, im).run();
}

/** The rows of the part that is not yet eliminated, with values; its columns, without. */
class Elimination {
  private readonly size: number;
  private readonly columnsOf: number[][];
  private readonly reOf: number[][];
  private readonly imOf: number[][];
  private readonly rowsOf: number[][];
  /** The largest entry that each row has now, and has ever held. */
  private readonly largest: Float64Array;
  private readonly held: Float64Array;
  private readonly rows: Buckets;
  private readonly columns: Buckets;
  /** The place of each column in the row that is worked upon, or −1. */
  private readonly place: Int32Array;
  private readonly reducedBy: number[][];

  constructor({ size, rowStart, column }: SparsePattern, re: Float64Array, im: Float64Array) {
    this.size = size;
    const lists = (): number[][] => Array.from({ length: size }, () => []);
    [this.columnsOf, this.reOf, this.imOf, this.rowsOf, this.reducedBy] = [lists(), lists(), lists(), lists(), lists()];
    this.largest = new Float64Array(size);
    this.held = new Float64Array(size);
    this.place = new Int32Array(size).fill(-1);
    for (let row = 0; row < size; row++) {
      for (let at = rowStart[row] ?? 0; at < (rowStart[row + 1] ?? 0); at++) {
        const to = column[at] ?? 0;
        this.columnsOf[row]?.push(to);
        this.reOf[row]?.push(re[at] ?? 0);
        this.imOf[row]?.push(im[at] ?? 0);
        this.rowsOf[to]?.push(row);
      }
      this.measure(row);
    }
    this.rows = new Buckets(this.columnsOf.map((list) => list.length));
    this.columns = new Buckets(this.rowsOf.map((list) => list.length));
  }

  run(): PivotOrder {
    const { size } = this;
    const rowAt = new Int32Array(size);
    const columnAt = new Int32Array(size);
    const stepOf = new Int32Array(size).fill(-1);
    const upperColumns: number[][] = [];
    let rank = 0;
    for (; rank < size; rank++) {
      const pivot = this.findPivot();
      if (pivot === undefined) break;
      rowAt[rank] = pivot.row;
      columnAt[rank] = pivot.column;
      stepOf[pivot.column] = rank;
      upperColumns.push((this.columnsOf[pivot.row] ?? []).filter((column) => column !== pivot.column));
      this.eliminate(rank, pivot.row, pivot.column);
    }
    appendMissing(rowAt, rank);
    appendMissing(columnAt, rank);
    const upper = flatten(upperColumns, size);
    for (let at = 0; at < upper.values.length; at++) upper.values[at] = stepOf[upper.values[at] ?? 0] ?? -1;
    const lower = flatten(
      Array.from(rowAt.subarray(0, rank), (row) => this.reducedBy[row] ?? []),
      size,
    );
    return {
      rank,
      rowAt,
      columnAt,
      upperStart: upper.start,
      upper: upper.values,
      lowerStart: lower.start,
      lower: lower.values,
    };
  }

  private measure(row: number): void {
    const re = this.reOf[row] ?? [];
    const im = this.imOf[row] ?? [];
    let largest = 0;
    for (let at = 0; at < re.length; at++) largest = Math.max(largest, Math.abs(re[at] ?? 0) + Math.abs(im[at] ?? 0));
    this.largest[row] = largest;
    if (largest > (this.held[row] ?? 0)) this.held[row] = largest;
  }

  /** Whether a row has anything left but rounding. */
  private isSound(row: number): boolean {
    const largest = this.largest[row] ?? 0;
    return largest > NOTHING * (this.held[row] ?? 0) && largest < Infinity;
  }

  private findPivot(): { readonly row: number; readonly column: number } | undefined {
    let best: { readonly row: number; readonly column: number } | undefined;
    let bestCount = Infinity;
    let bestSize = 0;
    let lines = 0;
    const offer = (row: number, column: number, size: number): void => {
      const count = ((this.columnsOf[row]?.length ?? 0) - 1) * ((this.rowsOf[column]?.length ?? 0) - 1);
      if (count > bestCount || (count === bestCount && size <= bestSize)) return;
      best = { row, column };
      bestCount = count;
      bestSize = size;
    };
    for (let length = 1; length <= this.size; length++) {
      if (bestCount <= (length - 1) ** 2) return best;
      for (let column = this.columns.first(length); column >= 0; column = this.columns.after(column)) {
        for (const row of this.rowsOf[column] ?? []) {
          const size = this.sizeAt(row, (this.columnsOf[row] ?? []).indexOf(column));
          if (size >= THRESHOLD * (this.largest[row] ?? 0) && this.isSound(row)) offer(row, column, size / (this.largest[row] ?? 1));
        }
        if (best !== undefined && ++lines >= LINES_SEARCHED) return best;
      }
      for (let row = this.rows.first(length); row >= 0; row = this.rows.after(row)) {
        if (!this.isSound(row)) continue;
        const columns = this.columnsOf[row] ?? [];
        for (let at = 0; at < columns.length; at++) {
          const size = this.sizeAt(row, at);
          if (size >= THRESHOLD * (this.largest[row] ?? 0)) offer(row, columns[at] ?? 0, size / (this.largest[row] ?? 1));
        }
        if (best !== undefined && ++lines >= LINES_SEARCHED) return best;
      }
    }
    return best;
  }

  private sizeAt(row: number, at: number): number {
    return Math.abs(this.reOf[row]?.[at] ?? 0) + Math.abs(this.imOf[row]?.[at] ?? 0);
  }

  private eliminate(step: number, pivotRow: number, pivotColumn: number): void {
    const columns = this.columnsOf[pivotRow] ?? [];
    const pivotRe = this.reOf[pivotRow] ?? [];
    const pivotIm = this.imOf[pivotRow] ?? [];
    const at = columns.indexOf(pivotColumn);
    const aRe = pivotRe[at] ?? 0;
    const aIm = pivotIm[at] ?? 0;
    const square = aRe * aRe + aIm * aIm;
    this.rows.remove(pivotRow);
    this.columns.remove(pivotColumn);
    for (const row of this.rowsOf[pivotColumn] ?? []) {
      if (row === pivotRow) continue;
      const [factorRe, factorIm] = this.takeOut(row, pivotColumn);
      this.reducedBy[row]?.push(step);
      const ratioRe = (factorRe * aRe + factorIm * aIm) / square;
      const ratioIm = (factorIm * aRe - factorRe * aIm) / square;
      this.subtract(row, columns, pivotRe, pivotIm, at, ratioRe, ratioIm);
      this.held[row] = Math.max(this.held[row] ?? 0, Math.abs(factorRe) + Math.abs(factorIm));
      this.measure(row);
      this.rows.move(row, this.columnsOf[row]?.length ?? 0);
    }
    for (const column of columns) {
      if (column === pivotColumn) continue;
      const rows = this.rowsOf[column] ?? [];
      removeAt(rows, rows.indexOf(pivotRow));
      this.columns.move(column, rows.length);
    }
  }

  /** Removes an entry from its row and answers it. */
  private takeOut(row: number, column: number): readonly [number, number] {
    const columns = this.columnsOf[row] ?? [];
    const re = this.reOf[row] ?? [];
    const im = this.imOf[row] ?? [];
    const at = columns.indexOf(column);
    const entry = [re[at] ?? 0, im[at] ?? 0] as const;
    removeAt(columns, at);
    removeAt(re, at);
    removeAt(im, at);
    return entry;
  }

  /** Subtracts a multiple of the pivot's row, but for the pivot's own column. */
  private subtract(
    row: number,
    pivotColumns: readonly number[],
    pivotRe: readonly number[],
    pivotIm: readonly number[],
    pivotAt: number,
    ratioRe: number,
    ratioIm: number,
  ): void {
    const columns = this.columnsOf[row] ?? [];
    const re = this.reOf[row] ?? [];
    const im = this.imOf[row] ?? [];
    const { place } = this;
    for (let at = 0; at < columns.length; at++) place[columns[at] ?? 0] = at;
    for (let at = 0; at < pivotColumns.length; at++) {
      if (at === pivotAt) continue;
      const column = pivotColumns[at] ?? 0;
      const uRe = pivotRe[at] ?? 0;
      const uIm = pivotIm[at] ?? 0;
      const termRe = ratioRe * uRe - ratioIm * uIm;
      const termIm = ratioRe * uIm + ratioIm * uRe;
      const to = place[column] ?? -1;
      if (to >= 0) {
        re[to] = (re[to] ?? 0) - termRe;
        im[to] = (im[to] ?? 0) - termIm;
      } else {
        columns.push(column);
        re.push(-termRe);
        im.push(-termIm);
        const rows = this.rowsOf[column] ?? [];
        rows.push(row);
      }
    }
    for (const column of columns) place[column] = -1;
  }
}

/** Lines by how many entries they have: each bucket a doubly linked list, so that a line moves without a search. */
class Buckets {
  private readonly head: Int32Array;
  private readonly next: Int32Array;
  private readonly before: Int32Array;
  private readonly bucketOf: Int32Array;

  constructor(lengths: readonly number[]) {
    this.head = new Int32Array(lengths.length + 1).fill(-1);
    this.next = new Int32Array(lengths.length).fill(-1);
    this.before = new Int32Array(lengths.length).fill(-1);
    this.bucketOf = new Int32Array(lengths.length).fill(-1);
    for (let line = lengths.length - 1; line >= 0; line--) this.insert(line, lengths[line] ?? 0);
  }

  first(length: number): number {
    return this.head[length] ?? -1;
  }

  after(line: number): number {
    return this.next[line] ?? -1;
  }

  move(line: number, length: number): void {
    if (this.bucketOf[line] === length) return;
    this.remove(line);
    this.insert(line, length);
  }

  remove(line: number): void {
    const next = this.next[line] ?? -1;
    const before = this.before[line] ?? -1;
    if (before >= 0) this.next[before] = next;
    else this.head[this.bucketOf[line] ?? 0] = next;
    if (next >= 0) this.before[next] = before;
  }

  private insert(line: number, length: number): void {
    const head = this.head[length] ?? -1;
    this.next[line] = head;
    this.before[line] = -1;
    this.bucketOf[line] = length;
    if (head >= 0) this.before[head] = line;
    this.head[length] = line;
  }
}

function removeAt(list: number[], at: number): void {
  const last = list.pop();
  if (last !== undefined && at < list.length) list[at] = last;
}

/** Fills in, from the rank on, the numbers that do not stand before it. */
function appendMissing(order: Int32Array, rank: number): void {
  const used = new Uint8Array(order.length);
  for (const line of order.subarray(0, rank)) used[line] = 1;
  let to = rank;
  for (let line = 0; line < order.length; line++) if (used[line] === 0) order[to++] = line;
}

function flatten(lists: readonly (readonly number[])[], size: number): { start: Int32Array; values: Int32Array } {
  const start = new Int32Array(size + 1);
  for (let at = 0; at < size; at++) start[at + 1] = (start[at] ?? 0) + (lists[at]?.length ?? 0);
  return { start, values: Int32Array.from(lists.flat()) };
}
