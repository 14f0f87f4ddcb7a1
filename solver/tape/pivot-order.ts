/** A square matrix at several frequencies: the numbers of an entry at all of them. */
export interface SampledEntry {
  readonly row: number;
  readonly column: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export interface PivotOrder {
  /** Row and column of each pivot. */
  readonly pivots: readonly (readonly [row: number, column: number])[];
  /** By what to multiply each row so that its entries are of the size of others', at a frequency in the middle. */
  readonly rowScale: Float64Array;
}

/** A pivot has to be this part of the largest entry of its row at every frequency, the matrix being equilibrated. */
const THRESHOLD = 0.1;
/** And this part of what it was summed of. */
const KEPT = 0.02;
/** Where no entry is so good, the best is taken that is not rounding. */
const LEAST = 1e-8;

const EQUILIBRATIONS = 4;

/**
 * An order of pivots for unsymmetric elimination: always one that would fill in least (Markowitz 1957, doi
 * 10.1287/mnsc.3.3.255) among those that are large enough at every frequency given. Undefined for a matrix that is
 * singular at one of them.
 */
export function choosePivots(size: number, entries: readonly SampledEntry[]): PivotOrder | undefined {
  const samples = entries[0]?.re.length ?? 0;
  const works = Array.from({ length: samples }, (_, sample) => new Sample(size, entries, sample));
  const present = new Uint8Array(size * size);
  for (const { row, column } of entries) present[row * size + column] = 1;
  const rows = new Set(Array.from({ length: size }, (_, k) => k));
  const columns = new Set(rows);
  const pivots: (readonly [number, number])[] = [];
  while (rows.size > 0) {
    const chosen = choose(size, works, present, rows, columns);
    if (chosen === undefined) return undefined;
    const [row, column] = chosen;
    pivots.push(chosen);
    rows.delete(row);
    columns.delete(column);
    for (const other of rows) {
      if (present[other * size + column] === 0) continue;
      for (const at of columns) if (present[row * size + at] === 1) present[other * size + at] = 1;
    }
    for (const work of works) work.eliminate(row, column, rows, columns);
  }
  const middle = works[samples >> 1];
  return middle === undefined ? undefined : { pivots, rowScale: middle.rowScale };
}

function choose(
  size: number,
  works: readonly Sample[],
  present: Uint8Array,
  rows: ReadonlySet<number>,
  columns: ReadonlySet<number>,
): readonly [number, number] | undefined {
  const inColumn = new Int32Array(size);
  for (const row of rows) for (const column of columns) if (present[row * size + column] === 1) inColumn[column] = (inColumn[column] ?? 0) + 1;
  let best: readonly [number, number] | undefined;
  let bestCost = Infinity;
  let largest: readonly [number, number] | undefined;
  let largestQuality = LEAST;
  for (const row of rows) {
    let inRow = 0;
    for (const column of columns) inRow += present[row * size + column] ?? 0;
    if (inRow === 0) return undefined;
    for (const work of works) work.measureRow(row, columns);
    for (const column of columns) {
      if (present[row * size + column] === 0) continue;
      let quality = Infinity;
      for (const work of works) quality = Math.min(quality, work.qualityOf(row, column));
      if (quality > largestQuality) {
        largestQuality = quality;
        largest = [row, column];
      }
      if (quality < 1) continue;
      const cost = (inRow - 1) * ((inColumn[column] ?? 0) - 1);
      if (cost < bestCost || (cost === bestCost && row === column && best?.[0] !== best?.[1])) {
        best = [row, column];
        bestCost = cost;
      }
    }
  }
  return best ?? largest;
}

/** The matrix at one frequency, equilibrated. */
class Sample {
  readonly rowScale: Float64Array;
  private readonly re: Float64Array;
  private readonly im: Float64Array;
  /** The sum of the sizes of all that an entry was made of. */
  private readonly mass: Float64Array;
  private largestOfRow = 0;

  constructor(
    private readonly size: number,
    entries: readonly SampledEntry[],
    sample: number,
  ) {
    this.re = new Float64Array(size * size);
    this.im = new Float64Array(size * size);
    this.mass = new Float64Array(size * size);
    const rowScale = new Float64Array(size).fill(1);
    const columnScale = new Float64Array(size).fill(1);
    const sizes = entries.map(({ re, im }) => Math.hypot(re[sample] ?? 0, im[sample] ?? 0));
    for (let round = 0; round < EQUILIBRATIONS; round++) {
      rescale(entries, sizes, rowScale, columnScale, ({ row }) => row, ({ column }) => column);
      rescale(entries, sizes, columnScale, rowScale, ({ column }) => column, ({ row }) => row);
    }
    this.rowScale = rowScale;
    for (const { row, column, re, im } of entries) {
      const scale = (rowScale[row] ?? 1) * (columnScale[column] ?? 1);
      const at = row * size + column;
      this.re[at] = scale * (re[sample] ?? 0);
      this.im[at] = scale * (im[sample] ?? 0);
      this.mass[at] = this.sizeAt(at);
    }
  }

  measureRow(row: number, columns: ReadonlySet<number>): void {
    this.largestOfRow = 0;
    for (const column of columns) this.largestOfRow = Math.max(this.largestOfRow, this.sizeAt(row * this.size + column));
  }

  /** At least 1 for an entry that is good enough; less in proportion. */
  qualityOf(row: number, column: number): number {
    const at = row * this.size + column;
    const size = this.sizeAt(at);
    if (!(size > 0)) return 0;
    return Math.min(size / (THRESHOLD * this.largestOfRow), size / (KEPT * (this.mass[at] ?? 0)));
  }

  eliminate(row: number, column: number, rows: ReadonlySet<number>, columns: ReadonlySet<number>): void {
    const { size, re, im, mass } = this;
    const pivot = row * size + column;
    const [pRe, pIm] = [re[pivot] ?? 0, im[pivot] ?? 0];
    const square = pRe * pRe + pIm * pIm;
    for (const other of rows) {
      const head = other * size + column;
      const [hRe, hIm] = [re[head] ?? 0, im[head] ?? 0];
      if (hRe === 0 && hIm === 0) continue;
      const fRe = (hRe * pRe + hIm * pIm) / square;
      const fIm = (hIm * pRe - hRe * pIm) / square;
      for (const at of columns) {
        const [uRe, uIm] = [re[row * size + at] ?? 0, im[row * size + at] ?? 0];
        if (uRe === 0 && uIm === 0) continue;
        const to = other * size + at;
        const [dRe, dIm] = [fRe * uRe - fIm * uIm, fRe * uIm + fIm * uRe];
        re[to] = (re[to] ?? 0) - dRe;
        im[to] = (im[to] ?? 0) - dIm;
        mass[to] = (mass[to] ?? 0) + Math.abs(dRe) + Math.abs(dIm);
      }
    }
  }

  private sizeAt(at: number): number {
    return Math.hypot(this.re[at] ?? 0, this.im[at] ?? 0);
  }
}

/** Makes the largest entry of each line one. */
function rescale(
  entries: readonly SampledEntry[],
  sizes: readonly number[],
  scale: Float64Array,
  across: Float64Array,
  line: (entry: SampledEntry) => number,
  crossing: (entry: SampledEntry) => number,
): void {
  const largest = new Float64Array(scale.length);
  for (const [place, entry] of entries.entries()) {
    largest[line(entry)] = Math.max(largest[line(entry)] ?? 0, (sizes[place] ?? 0) * (across[crossing(entry)] ?? 1));
  }
  for (let k = 0; k < scale.length; k++) if ((largest[k] ?? 0) > 0) scale[k] = 1 / (largest[k] ?? 1);
}
