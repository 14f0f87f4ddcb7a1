import type { Coefficient, Law, Tabulated, Term } from '../elements/law';
import { DisjointSets } from '../linear/disjoint-sets';
import { CoordinateMatrix } from '../linear/sparse-matrix';
import type { Network } from './network';
import { REFERENCE, rowOf } from './network';

/** How a port stands in the equations. */
export const BY_ADMITTANCE = 0;
/** With its current as an unknown, and an equation of its own. */
export const BY_BRANCH = 1;
/** Its current is given: it is not in the matrix at all. */
export const BY_SOURCE = 2;
export const BY_NOTHING = 3;

/** Why a row of the matrix was replaced by "this unknown is nothing": the row follows from others. */
export interface Pin {
  /**
   * - `part`: the current law of a node of a part that floats.
   * - `loop`: the voltage law of an ideal connection that closes a loop.
   * - `dependence`: an equation that follows from others by the numbers of one frequency.
   */
  readonly cause: 'part' | 'loop' | 'dependence';
  readonly row: number;
  readonly unknown: number;
  /** Where the row that was replaced stands, beyond the size. */
  readonly outerRow: number;
  /** The pinned node, or the row of the port in the network; −1 for a dependence. */
  readonly of: number;
}

/** A row of the matrix that follows from others at one frequency, and an unknown that is left free by that. */
export interface Dependence {
  readonly row: number;
  readonly unknown: number;
}

/** A sensed current that a source gives: it belongs on the right-hand side. */
interface SensedSource {
  readonly equation: number;
  readonly source: number;
  readonly coefficient: Coefficient;
}

/**
 * Modified nodal equations (Ho, Ruehli and Brennan, IEEE Trans. Circuits Syst. 22 (1975) 504, doi
 * 10.1109/TCS.1975.1084079) of a network for 0 Hz or for every other frequency: which unknowns there are, and the
 * contributions to the matrix as functions of the frequency. Unknowns: the voltage of each node but the reference, then
 * the current of each port that an admittance does not describe. Equations: Σ of the currents that leave each node
 * = what is sent in, then the law of each such port. Nothing else of an analysis knows laws.
 */
export class ResponseLayout {
  readonly size: number;
  readonly matrix: CoordinateMatrix;
  /** By row of the network. */
  readonly form: Uint8Array;
  /** The unknown that is a port's current; −1 where none is. */
  readonly branchOf: Int32Array;
  readonly pins: readonly Pin[];
  /** Parts of the network that currents join, by node; the reference node's is that of `REFERENCE`. */
  readonly partOf: Int32Array;
  /** Whether an equation holds the voltage between two parts. */
  readonly isCrossed: boolean;
  /** Where each row of the equations is written to: itself, or beyond the size. */
  private readonly writtenTo: Int32Array;
  private readonly constant: Float64Array;
  private readonly slope: Float64Array;
  private readonly inverse: Float64Array;
  private readonly table: Int32Array;
  private readonly sign: Float64Array;
  private readonly tables: readonly { readonly at: Tabulated; readonly row: number }[];
  private readonly tableRe: Float64Array;
  private readonly tableIm: Float64Array;
  private readonly sensedSources: readonly SensedSource[];

  /**
   * @param isExpanded whether the current of every port that conducts is an unknown, so that no two values are added up
   * @param dependences rows that are left out for following from others
   */
  constructor(
    readonly network: Network,
    readonly isDirect: boolean,
    readonly isExpanded = false,
    dependences: readonly Dependence[] = [],
  ) {
    const built = new Builder(network, isDirect, isExpanded, dependences);
    const { entries } = built;
    const numbers = (of: (entry: Entry) => number): Float64Array => Float64Array.from(entries, of);
    this.size = built.size;
    this.form = built.form;
    this.branchOf = built.branchOf;
    this.writtenTo = built.writtenTo;
    this.pins = built.pins;
    this.partOf = built.partOf;
    this.isCrossed = built.isCrossed;
    this.constant = numbers(({ constant }) => constant);
    this.slope = numbers(({ slope }) => slope);
    this.inverse = numbers(({ inverse }) => inverse);
    this.table = Int32Array.from(entries, ({ table }) => table);
    this.sign = numbers(({ sign }) => sign);
    this.tables = built.tables;
    this.tableRe = new Float64Array(built.tables.length);
    this.tableIm = new Float64Array(built.tables.length);
    this.sensedSources = built.sensedSources;
    this.matrix = new CoordinateMatrix(
      built.size,
      Int32Array.from(entries, ({ row }) => row),
      Int32Array.from(entries, ({ column }) => column),
      built.size + built.pins.length,
    );
  }

  /** Sets the matrix for a frequency. Answers a row whose table does not reach it, or −1. */
  fill(frequency: number): number {
    const { matrix, constant, slope, inverse, table, sign, tables, tableRe, tableIm } = this;
    const omega = 2 * Math.PI * frequency;
    for (const [index, { at, row }] of tables.entries()) {
      const value = at(frequency);
      if (value === undefined) return row;
      [tableRe[index], tableIm[index]] = value;
    }
    for (let at = 0; at < constant.length; at++) {
      let re = constant[at] ?? 0;
      let im = omega * (slope[at] ?? 0);
      const reciprocal = inverse[at] ?? 0;
      if (reciprocal !== 0) im -= reciprocal / omega;
      const of = table[at] ?? -1;
      if (of >= 0) {
        re += (sign[at] ?? 0) * (tableRe[of] ?? 0);
        im += (sign[at] ?? 0) * (tableIm[of] ?? 0);
      }
      matrix.re[at] = re;
      matrix.im[at] = im;
    }
    matrix.sum();
    return -1;
  }

  /**
   * Adds a source to a right-hand side: `value` volts or amperes at the source's row of the network. The arrays also
   * hold the rows beyond the size.
   */
  addSource(row: number, re: number, im: number, bRe: Float64Array, bIm: Float64Array): void {
    const { network, form, branchOf, writtenTo } = this;
    const add = (to: number, sign: number, re1: number, im1: number): void => {
      bRe[to] = (bRe[to] ?? 0) + sign * re1;
      bIm[to] = (bIm[to] ?? 0) + sign * im1;
    };
    if (form[row] === BY_BRANCH) {
      add(writtenTo[branchOf[row] ?? 0] ?? 0, 1, re, im);
      return;
    }
    this.addCurrent(network.first[row] ?? 0, -1, re, im, bRe, bIm);
    this.addCurrent(network.second[row] ?? 0, 1, re, im, bRe, bIm);
    for (const { equation, source, coefficient } of this.sensedSources) {
      if (source !== row || 'at' in coefficient) continue;
      add(equation, -coefficient.constant, re, im);
    }
  }

  /** Adds a current that is sent into a node. */
  addCurrent(node: number, sign: number, re: number, im: number, bRe: Float64Array, bIm: Float64Array): void {
    if (node === REFERENCE) return;
    const row = this.writtenTo[node - 1] ?? node - 1;
    bRe[row] = (bRe[row] ?? 0) + sign * re;
    bIm[row] = (bIm[row] ?? 0) + sign * im;
  }
}

/** One contribution: constant + s·slope + inverse/s + sign·table(f). */
interface Entry {
  readonly row: number;
  readonly column: number;
  readonly constant: number;
  readonly slope: number;
  readonly inverse: number;
  readonly table: number;
  readonly sign: number;
}

type Value = Omit<Entry, 'row' | 'column'>;

const NOTHING: Value = { constant: 0, slope: 0, inverse: 0, table: -1, sign: 0 };
const ONE: Value = { ...NOTHING, constant: 1 };

function negative({ constant, slope, inverse, table, sign }: Value): Value {
  return { constant: -constant, slope: -slope, inverse: -inverse, table, sign: -sign };
}

class Builder {
  readonly size: number;
  readonly form: Uint8Array;
  readonly branchOf: Int32Array;
  readonly partOf: Int32Array;
  readonly pins: Pin[] = [];
  readonly entries: Entry[] = [];
  readonly tables: { at: Tabulated; row: number }[] = [];
  readonly sensedSources: SensedSource[] = [];
  isCrossed = false;
  readonly writtenTo: Int32Array;

  constructor(
    private readonly network: Network,
    private readonly isDirect: boolean,
    isExpanded: boolean,
    dependences: readonly Dependence[],
  ) {
    const { rowCount, nodeNames, laws } = network;
    this.form = new Uint8Array(rowCount);
    this.branchOf = new Int32Array(rowCount).fill(-1);
    const sensed = this.sensedRows();
    let unknown = nodeNames.length - 1;
    laws.forEach((law, row) => {
      this.form[row] = formOf(law, isExpanded || sensed.has(row), isDirect);
      if (this.form[row] === BY_BRANCH) this.branchOf[row] = unknown++;
    });
    this.size = unknown;
    this.writtenTo = Int32Array.from({ length: unknown }, (_, row) => row);
    this.partOf = this.findParts();
    this.pinParts();
    this.pinLoops();
    for (const { row, unknown: free } of dependences) this.pin('dependence', row, free, -1);
    for (const [row, law] of laws.entries()) this.write(row, law);
  }

  private sensedRows(): ReadonlySet<number> {
    const { laws } = this.network;
    return new Set(
      laws.flatMap((law, row) =>
        law.law === 'equation' ? law.terms.flatMap((term) => (term.of === 'current' ? [this.rowOfTerm(row, term)] : [])) : [],
      ),
    );
  }

  /** The row of the port that a term of an equation speaks of. */
  private rowOfTerm(row: number, { port }: Term): number {
    const { network } = this;
    if (typeof port === 'number') return (network.rowStart[network.elementOf[row] ?? 0] ?? 0) + port;
    return rowOf(network, port.element);
  }

  private findParts(): Int32Array {
    const { network, form } = this;
    const parts = new DisjointSets(network.nodeNames.length);
    for (let row = 0; row < network.rowCount; row++) {
      if (form[row] === BY_ADMITTANCE || form[row] === BY_BRANCH) parts.union(network.first[row] ?? 0, network.second[row] ?? 0);
    }
    return Int32Array.from(network.nodeNames, (_, node) => parts.find(node));
  }

  /** In a part that floats the current laws add up to nothing, so one of them goes, and one node's voltage is 0. */
  private pinParts(): void {
    const pinned = new Set([this.partOf[REFERENCE]]);
    for (let node = 1; node < this.partOf.length; node++) {
      if (pinned.has(this.partOf[node])) continue;
      pinned.add(this.partOf[node]);
      this.pin('part', node - 1, node - 1, node);
    }
  }

  /** Ideal connections and given voltages in a loop: the last of them adds nothing but a current that is free. */
  private pinLoops(): void {
    const { network, branchOf } = this;
    const joined = new DisjointSets(network.nodeNames.length);
    const shorts = network.laws.flatMap((law, row) => (this.isShort(row, law) ? [row] : []));
    const isGiven = (row: number): number => (network.laws[row]?.law === 'voltage' ? 0 : 1);
    for (const row of shorts.sort((a, b) => isGiven(a) - isGiven(b))) {
      if (joined.union(network.first[row] ?? 0, network.second[row] ?? 0)) continue;
      this.pin('loop', branchOf[row] ?? 0, branchOf[row] ?? 0, row);
    }
  }

  private isShort(row: number, law: Law): boolean {
    switch (law.law) {
      case 'voltage':
      case 'short':
        return true;
      case 'inductance':
        return this.isDirect;
      case 'equation': {
        const terms = law.terms.filter(({ coefficient }) => !this.vanishes(coefficient));
        const [only] = terms;
        return terms.length === 1 && only !== undefined && only.of === 'voltage' && this.rowOfTerm(row, only) === row;
      }
      default:
        return false;
    }
  }

  private vanishes(coefficient: Coefficient): boolean {
    return 'constant' in coefficient && coefficient.constant === 0 && (this.isDirect || coefficient.slope === 0);
  }

  private pin(cause: Pin['cause'], row: number, unknown: number, of: number): void {
    const outerRow = this.size + this.pins.length;
    this.pins.push({ cause, row, unknown, outerRow, of });
    this.writtenTo[row] = outerRow;
    this.entries.push({ row, column: unknown, ...ONE });
  }

  private add(row: number, column: number, value: Value): void {
    if (row < 0 || column < 0) return;
    this.entries.push({ row: this.writtenTo[row] ?? row, column, ...value });
  }

  /** A row times the voltage of a port. */
  private addVoltage(equation: number, port: number, value: Value): void {
    const { network, partOf } = this;
    const [a, b] = [network.first[port] ?? 0, network.second[port] ?? 0];
    if (partOf[a] !== partOf[b]) this.isCrossed = true;
    if (a === b) return;
    this.add(equation, a - 1, value);
    this.add(equation, b - 1, negative(value));
  }

  private write(row: number, law: Law): void {
    const { network, form } = this;
    const a = (network.first[row] ?? 0) - 1;
    const b = (network.second[row] ?? 0) - 1;
    if (form[row] === BY_ADMITTANCE) {
      if (a === b) return;
      const y = admittanceOf(law);
      this.addVoltage(a, row, y);
      this.addVoltage(b, row, negative(y));
      return;
    }
    if (form[row] !== BY_BRANCH) return;
    const branch = this.branchOf[row] ?? -1;
    if (a !== b) {
      this.add(a, branch, ONE);
      this.add(b, branch, negative(ONE));
    }
    this.writeEquation(row, branch, law);
  }

  private writeEquation(row: number, branch: number, law: Law): void {
    switch (law.law) {
      case 'resistance':
        this.addVoltage(branch, row, ONE);
        this.add(branch, branch, { ...NOTHING, constant: -law.resistance });
        return;
      case 'capacitance':
        this.addVoltage(branch, row, { ...NOTHING, slope: -law.capacitance });
        this.add(branch, branch, ONE);
        return;
      case 'inductance':
        this.addVoltage(branch, row, ONE);
        if (!this.isDirect) this.add(branch, branch, { ...NOTHING, slope: -law.inductance });
        return;
      case 'impedance':
        this.addVoltage(branch, row, ONE);
        this.add(branch, branch, { ...NOTHING, table: this.tableOf(law.at, row), sign: -1 });
        return;
      case 'voltage':
      case 'short':
        this.addVoltage(branch, row, ONE);
        return;
      case 'equation':
        for (const term of law.terms) this.writeTerm(row, branch, term);
        return;
      case 'current':
      case 'open':
        return;
    }
  }

  private writeTerm(row: number, branch: number, term: Term): void {
    const { coefficient } = term;
    if (this.vanishes(coefficient)) return;
    const port = this.rowOfTerm(row, term);
    if (term.of === 'current' && this.form[port] === BY_SOURCE) {
      this.sensedSources.push({ equation: this.writtenTo[branch] ?? branch, source: port, coefficient });
      return;
    }
    const value: Value =
      'at' in coefficient
        ? { ...NOTHING, table: this.tableOf(coefficient.at, row), sign: 1 }
        : { ...NOTHING, constant: coefficient.constant, slope: this.isDirect ? 0 : coefficient.slope };
    if (term.of === 'voltage') this.addVoltage(branch, port, value);
    else this.add(branch, this.branchOf[port] ?? -1, value);
  }

  private tableOf(at: Tabulated, row: number): number {
    const known = this.tables.findIndex((table) => table.at === at);
    if (known >= 0) return known;
    this.tables.push({ at, row });
    return this.tables.length - 1;
  }
}

function formOf(law: Law, hasBranch: boolean, isDirect: boolean): number {
  switch (law.law) {
    case 'resistance':
      return hasBranch ? BY_BRANCH : BY_ADMITTANCE;
    case 'capacitance':
      return isDirect ? BY_NOTHING : hasBranch ? BY_BRANCH : BY_ADMITTANCE;
    case 'inductance':
      return isDirect || hasBranch ? BY_BRANCH : BY_ADMITTANCE;
    case 'impedance':
    case 'voltage':
    case 'short':
    case 'equation':
      return BY_BRANCH;
    case 'current':
      return BY_SOURCE;
    case 'open':
      return BY_NOTHING;
  }
}

function admittanceOf(law: Law): Value {
  switch (law.law) {
    case 'resistance':
      return { ...NOTHING, constant: 1 / law.resistance };
    case 'capacitance':
      return { ...NOTHING, slope: law.capacitance };
    case 'inductance':
      return { ...NOTHING, inverse: 1 / law.inductance };
    default:
      return NOTHING;
  }
}
