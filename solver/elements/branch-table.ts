import type { Excitation } from './element-definition';
import type { Coefficient, Law } from './law';
import { isLive, phasorIm, phasorRe } from './source-value';

/**
 * What the ports are at one frequency, one row a port, in typed arrays. Each row has one of four forms, and every
 * analysis at a frequency works on these alone. Currents and voltages are from the row's first node to its second.
 */
export const ADMITTANCE = 0;
/** The voltage is given: v = s. An ideal connection is a given voltage of zero. */
export const GIVEN_VOLTAGE = 1;
/** The current is given: i = s. An open port is a given current of zero. */
export const GIVEN_CURRENT = 2;
/** Neither is given alone: an equation between voltages and currents of rows holds, see `Equation`. */
export const EQUATION = 3;

/** Σ coefficient·x = 0 over its terms, x being the voltage or the current of a row. */
export interface Equation {
  readonly row: Int32Array;
  /** 1 where the term is of the row's voltage, 0 where of its current. */
  readonly ofVoltage: Uint8Array;
  /** The coefficients at the frequency; siemens, ohms or plain, as the terms want. */
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export class BranchTable {
  readonly size: number;
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
  /** For each row of the form `EQUATION` what holds; undefined for the others. */
  readonly equations: readonly (Equation | undefined)[];
  /** 1 for a row that stands as a sensing port in an equation, or whose current is sensed. */
  readonly isSensed: Uint8Array;
  /** 1 for a row whose law does not reach to the frequency; the row's numbers are NaN then. */
  readonly isUnknown: Uint8Array;

  /**
   * @param laws one law a row
   * @param rowOfPort the row that a port of a term's is: the `row`th row's element has it by number, another by id
   */
  constructor(
    private readonly laws: readonly Law[],
    rowOfPort: (row: number, port: number | { readonly element: string }) => number,
  ) {
    this.size = laws.length;
    this.form = new Uint8Array(this.size);
    [this.yRe, this.yIm, this.zRe, this.zIm, this.sRe, this.sIm] = Array.from({ length: 6 }, () => new Float64Array(this.size)) as [
      Float64Array,
      Float64Array,
      Float64Array,
      Float64Array,
      Float64Array,
      Float64Array,
    ];
    this.isSensed = new Uint8Array(this.size);
    this.isUnknown = new Uint8Array(this.size);
    this.equations = laws.map((law, row): Equation | undefined => {
      if (law.law !== 'equation') return undefined;
      const { terms } = law;
      const rows = Int32Array.from(terms, ({ port }) => rowOfPort(row, port));
      for (const of of rows) if (of !== row) this.isSensed[of] = 1;
      return {
        row: rows,
        ofVoltage: Uint8Array.from(terms, ({ of }) => (of === 'voltage' ? 1 : 0)),
        re: new Float64Array(terms.length),
        im: new Float64Array(terms.length),
      };
    });
  }

  /** Evaluates every law at the frequency. */
  evaluate(excitation: Excitation): void {
    for (const [row, law] of this.laws.entries()) this.evaluateRow(row, law, excitation);
  }

  isGivenZero(row: number): boolean {
    return this.form[row] !== EQUATION && this.sRe[row] === 0 && this.sIm[row] === 0;
  }

  private evaluateRow(row: number, law: Law, excitation: Excitation): void {
    const { frequency, omega } = excitation;
    switch (law.law) {
      case 'resistance':
        return this.setImmittance(row, 1 / law.resistance, 0, law.resistance, 0);
      case 'capacitance': {
        if (omega === 0) return this.setCurrent(row, 0, 0);
        const susceptance = omega * law.capacitance;
        return this.setImmittance(row, 0, susceptance, 0, -1 / susceptance);
      }
      case 'inductance': {
        if (omega === 0) return this.setVoltage(row, 0, 0);
        const reactance = omega * law.inductance;
        return this.setImmittance(row, 0, -1 / reactance, 0, reactance);
      }
      case 'impedance': {
        const z = law.at(frequency);
        this.isUnknown[row] = z === undefined ? 1 : 0;
        if (z === undefined) return this.setImmittance(row, NaN, NaN, NaN, NaN);
        const [re, im] = z;
        if (re === 0 && im === 0) return this.setVoltage(row, 0, 0);
        const square = re * re + im * im;
        return this.setImmittance(row, re / square, -im / square, re, im);
      }
      case 'voltage': {
        const live = isLive(law.value, excitation);
        return this.setVoltage(row, live ? phasorRe(law.value) : 0, live ? phasorIm(law.value) : 0);
      }
      case 'current': {
        const live = isLive(law.value, excitation);
        return this.setCurrent(row, live ? phasorRe(law.value) : 0, live ? phasorIm(law.value) : 0);
      }
      case 'short':
        return this.setVoltage(row, 0, 0);
      case 'open':
        return this.setCurrent(row, 0, 0);
      case 'equation':
        return this.setEquation(row, law, excitation);
    }
  }

  private setImmittance(row: number, yRe: number, yIm: number, zRe: number, zIm: number): void {
    this.form[row] = ADMITTANCE;
    this.yRe[row] = yRe;
    this.yIm[row] = yIm;
    this.zRe[row] = zRe;
    this.zIm[row] = zIm;
  }

  private setVoltage(row: number, re: number, im: number): void {
    this.form[row] = GIVEN_VOLTAGE;
    this.sRe[row] = re;
    this.sIm[row] = im;
  }

  private setCurrent(row: number, re: number, im: number): void {
    this.form[row] = GIVEN_CURRENT;
    this.sRe[row] = re;
    this.sIm[row] = im;
  }

  private setEquation(row: number, law: Extract<Law, { law: 'equation' }>, excitation: Excitation): void {
    const equation = this.equations[row];
    this.form[row] = EQUATION;
    this.isUnknown[row] = 0;
    for (const [place, { coefficient }] of law.terms.entries()) {
      const value = coefficientAt(coefficient, excitation);
      if (value === undefined) this.isUnknown[row] = 1;
      if (equation === undefined) continue;
      equation.re[place] = value?.[0] ?? NaN;
      equation.im[place] = value?.[1] ?? NaN;
    }
  }
}

/** A coefficient at a frequency; undefined where its table does not reach. */
export function coefficientAt(
  coefficient: Coefficient,
  { frequency, omega }: Excitation,
): readonly [re: number, im: number] | undefined {
  if ('at' in coefficient) return coefficient.at(frequency);
  return [coefficient.constant, coefficient.slope * omega];
}
