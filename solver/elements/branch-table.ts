/**
 * What the elements are at one frequency, one row an element, in typed arrays. Each row has one of three forms, and
 * every analysis works on these alone; it does not know kinds. Currents and voltages are from the row's first node to
 * its second.
 */
export const ADMITTANCE = 0;
/** The voltage is given: v = s. An ideal connection is a given voltage of zero. */
export const GIVEN_VOLTAGE = 1;
/** The current is given: i = s. An open circuit is a given current of zero. */
export const GIVEN_CURRENT = 2;

export class BranchTable {
  readonly form: Uint8Array;
  /** Siemens; only for `ADMITTANCE`. */
  readonly yRe: Float64Array;
  readonly yIm: Float64Array;
  /** Ohms, not computed from y, so that each is as exact as the element's value; only for `ADMITTANCE`. */
  readonly zRe: Float64Array;
  readonly zIm: Float64Array;
  /** Volts or amperes, rms; only for the given forms. */
  readonly sRe: Float64Array;
  readonly sIm: Float64Array;

  constructor(readonly size: number) {
    this.form = new Uint8Array(size);
    this.yRe = new Float64Array(size);
    this.yIm = new Float64Array(size);
    this.zRe = new Float64Array(size);
    this.zIm = new Float64Array(size);
    this.sRe = new Float64Array(size);
    this.sIm = new Float64Array(size);
  }

  /** A resistance, R ≠ 0: v = R·i. */
  setResistance(row: number, resistance: number): void {
    this.form[row] = ADMITTANCE;
    this.yRe[row] = 1 / resistance;
    this.yIm[row] = 0;
    this.zRe[row] = resistance;
    this.zIm[row] = 0;
  }

  /** A reactance, X ≠ 0, with its reciprocal given apart where that rounds less: v = jX·i, i = −jB'·v with B' = 1/X. */
  setReactance(row: number, reactance: number, reciprocal: number): void {
    this.form[row] = ADMITTANCE;
    this.yRe[row] = 0;
    this.yIm[row] = -reciprocal;
    this.zRe[row] = 0;
    this.zIm[row] = reactance;
  }

  setVoltage(row: number, re: number, im: number): void {
    this.form[row] = GIVEN_VOLTAGE;
    this.sRe[row] = re;
    this.sIm[row] = im;
  }

  setCurrent(row: number, re: number, im: number): void {
    this.form[row] = GIVEN_CURRENT;
    this.sRe[row] = re;
    this.sIm[row] = im;
  }

  isGivenZero(row: number): boolean {
    return this.sRe[row] === 0 && this.sIm[row] === 0;
  }
}
