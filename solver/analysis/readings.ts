/**
 * Everything that a solution holds, in typed arrays by node and by element row. A `…Known` flag of 0 says that the
 * value beside it is not determined; a value may stand there all the same, of a particular solution that the power
 * balance is summed from. A `…Error` is an estimate of how far off the value may be, in its own unit.
 */
export class Readings {
  /** Node voltages over the reference node (over the root in a component without it), V rms. */
  readonly vRe: Float64Array;
  readonly vIm: Float64Array;
  readonly vKnown: Uint8Array;
  /** Element voltages, first node over second, V rms. */
  readonly dRe: Float64Array;
  readonly dIm: Float64Array;
  readonly dKnown: Uint8Array;
  /** Element currents, first node to second, A rms. */
  readonly iRe: Float64Array;
  readonly iIm: Float64Array;
  readonly iKnown: Uint8Array;
  readonly vError: Float64Array;
  readonly dError: Float64Array;
  readonly iError: Float64Array;

  constructor(nodeCount: number, rowCount: number) {
    this.vRe = new Float64Array(nodeCount);
    this.vIm = new Float64Array(nodeCount);
    this.vKnown = new Uint8Array(nodeCount);
    this.dRe = new Float64Array(rowCount);
    this.dIm = new Float64Array(rowCount);
    this.dKnown = new Uint8Array(rowCount);
    this.iRe = new Float64Array(rowCount);
    this.iIm = new Float64Array(rowCount);
    this.iKnown = new Uint8Array(rowCount);
    this.vError = new Float64Array(nodeCount);
    this.dError = new Float64Array(rowCount);
    this.iError = new Float64Array(rowCount);
  }

  /** Takes a row's voltage from those of its nodes. */
  readDifference(first: Int32Array, second: Int32Array, row: number): void {
    const a = first[row] ?? 0;
    const b = second[row] ?? 0;
    this.dRe[row] = (this.vRe[a] ?? 0) - (this.vRe[b] ?? 0);
    this.dIm[row] = (this.vIm[a] ?? 0) - (this.vIm[b] ?? 0);
    this.dError[row] = a === b ? 0 : (this.vError[a] ?? 0) + (this.vError[b] ?? 0);
  }

  /** Forgets everything, for the next frequency. */
  clear(): void {
    for (const values of [this.vRe, this.vIm, this.dRe, this.dIm, this.iRe, this.iIm]) values.fill(0);
    for (const errors of [this.vError, this.dError, this.iError]) errors.fill(0);
    for (const flags of [this.vKnown, this.dKnown, this.iKnown]) flags.fill(0);
  }
}
