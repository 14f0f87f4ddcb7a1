import type { BranchTable } from '../elements/branch-table';
import { ADMITTANCE, GIVEN_CURRENT, GIVEN_VOLTAGE } from '../elements/branch-table';
import { ExtendedSolver, ExtendedVector } from '../linear/extended';
import { SparseLu } from '../linear/sparse-lu';
import { CoordinateMatrix } from '../linear/sparse-matrix';
import type { ComplexVector } from '../linear/sparse-quality';
import { zeros } from '../linear/sparse-quality';
import type { BranchSystem } from './branch-form';
import type { Network } from './network';
import type { Readings } from './readings';

/** Below this part of the largest entry of its row a pivot has an order found for values that these are not. */
const STRONG_PIVOT = 1e-3;

/** Above this, the network is so near to having no unique solution that the branch form is to look at it. */
const TRUSTED_AMPLIFICATION = 1e7;

/** Roundings of a value on its way into the matrix, and what strewn phases may have made too little of. */
const SAFETY = 10;

const GOLDEN_ANGLE = Math.PI * (3 - Math.sqrt(5));

/**
 * Solves components that equations link, in modified nodal form (Ho, Ruehli and Brennan 1975,
 * doi 10.1109/TCS.1975.1084079): node voltages, and the currents of given voltages and of rows with an equation. The
 * order of pivots is found once and kept for other frequencies and other values while its pivots stay strong. Refined in
 * extended arithmetic from what the matrix is summed of, so that what is small in a sum still counts.
 */
export class ModifiedNodalForm {
  private readonly matrix: CoordinateMatrix;
  private readonly lu: SparseLu;
  private readonly layout: Layout;
  private readonly size: number;
  private readonly x = new ExtendedVector();
  private readonly solver: ExtendedSolver;
  private readonly b: ComplexVector;
  private readonly work: ComplexVector;
  private hasOrder = false;
  private filled = 0;

  constructor(
    private readonly network: Network,
    private readonly system: BranchSystem,
    branches: BranchTable,
  ) {
    this.layout = lay(system);
    this.size = this.layout.size;
    const rows: number[] = [];
    const columns: number[] = [];
    this.walk(branches, (row, column) => {
      rows.push(row);
      columns.push(column);
    });
    this.matrix = new CoordinateMatrix(this.size, Int32Array.from(rows), Int32Array.from(columns));
    this.lu = new SparseLu(this.matrix.pattern);
    this.solver = new ExtendedSolver(this.matrix, this.lu);
    this.b = zeros(this.size);
    this.work = zeros(this.size);
  }

  /** Writes all readings of the system; answers its condition, or undefined where the work cannot be trusted. */
  solve(branches: BranchTable, readings: Readings): number | undefined {
    const { matrix, x, b } = this;
    if (this.size === 0) return 1;
    this.filled = 0;
    this.walk(branches, (_row, _column, re, im) => {
      matrix.re[this.filled] = re;
      matrix.im[this.filled] = im;
      this.filled += 1;
    });
    matrix.sum();
    if (!this.factor()) return undefined;
    const condition = this.amplification(branches);
    if (!(condition < TRUSTED_AMPLIFICATION)) return undefined;
    this.loadRight(branches);
    if (!this.solver.solve(b.re, b.im, x)) return undefined;
    if (!x.re.every(Number.isFinite) || !x.im.every(Number.isFinite)) return undefined;
    this.write(branches, readings);
    return condition;
  }

  private factor(): boolean {
    const { matrix, lu } = this;
    const { sumRe, sumIm } = matrix;
    if (this.hasOrder && lu.factor(sumRe, sumIm) >= STRONG_PIVOT) return true;
    this.hasOrder = lu.analyse(sumRe, sumIm);
    return this.hasOrder && lu.factor(sumRe, sumIm) > 0;
  }

  /** Every entry of the matrix in the same order each time: its line, its column and its value. */
  private walk(
    branches: BranchTable,
    visit: (row: number, column: number, re: number, im: number) => void,
  ): void {
    const { system, layout } = this;
    const put = (row: number, column: number, re: number, im: number): void => {
      if (row >= 0 && column >= 0) visit(row, column, re, im);
    };
    for (const row of system.admittances) {
      const [a, b] = this.ends(row);
      if (a === b) continue;
      const re = branches.yRe[row] ?? 0;
      const im = branches.yIm[row] ?? 0;
      put(a, a, re, im);
      put(b, b, re, im);
      put(a, b, -re, -im);
      put(b, a, -re, -im);
    }
    for (const row of [...system.treeVoltages, ...system.equations]) {
      const at = layout.ofRow.get(row) ?? -1;
      const [a, b] = this.ends(row);
      if (a !== b) {
        put(a, at, 1, 0);
        put(b, at, -1, 0);
      }
      if (branches.form[row] !== GIVEN_VOLTAGE) this.walkEquation(branches, row, at, put);
      else if (a !== b) {
        put(at, a, 1, 0);
        put(at, b, -1, 0);
      }
    }
  }

  private walkEquation(
    branches: BranchTable,
    row: number,
    at: number,
    put: (row: number, column: number, re: number, im: number) => void,
  ): void {
    const equation = branches.equations[row];
    if (equation === undefined) return;
    for (const [place, of] of equation.row.entries()) {
      const re = equation.re[place] ?? 0;
      const im = equation.im[place] ?? 0;
      const [a, b] = this.ends(of);
      if (equation.ofVoltage[place] === 1) {
        if (a === b) continue;
        put(at, a, re, im);
        put(at, b, -re, -im);
      } else if (branches.form[of] === ADMITTANCE) {
        if (a === b) continue;
        const yRe = branches.yRe[of] ?? 0;
        const yIm = branches.yIm[of] ?? 0;
        put(at, a, re * yRe - im * yIm, re * yIm + im * yRe);
        put(at, b, -(re * yRe - im * yIm), -(re * yIm + im * yRe));
      } else {
        put(at, this.layout.ofRow.get(of) ?? -1, re, im);
      }
    }
  }

  private loadRight(branches: BranchTable): void {
    const { b, system, layout } = this;
    b.re.fill(0);
    b.im.fill(0);
    for (const row of system.currents) {
      const [from, to] = this.ends(row);
      this.inject(from, -(branches.sRe[row] ?? 0), -(branches.sIm[row] ?? 0));
      this.inject(to, branches.sRe[row] ?? 0, branches.sIm[row] ?? 0);
    }
    for (const row of system.treeVoltages) {
      this.inject(layout.ofRow.get(row) ?? -1, branches.sRe[row] ?? 0, branches.sIm[row] ?? 0);
    }
    for (const row of system.equations) {
      const equation = branches.equations[row];
      if (equation === undefined) continue;
      for (const [place, of] of equation.row.entries()) {
        if (equation.ofVoltage[place] === 1 || branches.form[of] !== GIVEN_CURRENT) continue;
        const re = equation.re[place] ?? 0;
        const im = equation.im[place] ?? 0;
        const sRe = branches.sRe[of] ?? 0;
        const sIm = branches.sIm[of] ?? 0;
        this.inject(layout.ofRow.get(row) ?? -1, -(re * sRe - im * sIm), -(re * sIm + im * sRe));
      }
    }
  }

  private inject(line: number, re: number, im: number): void {
    if (line < 0) return;
    this.b.re[line] = (this.b.re[line] ?? 0) + re;
    this.b.im[line] = (this.b.im[line] ?? 0) + im;
  }

  /**
   * The largest voltage across any admittance when every admittance, and every voltage that stands in an equation, has
   * an electromotive force of one volt in series, their phases strewn about the circle, and all sources are dead; see
   * `Solution.condition`.
   */
  private amplification(branches: BranchTable): number {
    const { b, work, system, layout } = this;
    b.re.fill(0);
    b.im.fill(0);
    for (const row of system.admittances) {
      const [from, to] = this.ends(row);
      if (from === to) continue;
      const cos = Math.cos(GOLDEN_ANGLE * row);
      const sin = Math.sin(GOLDEN_ANGLE * row);
      const re = (branches.yRe[row] ?? 0) * cos - (branches.yIm[row] ?? 0) * sin;
      const im = (branches.yRe[row] ?? 0) * sin + (branches.yIm[row] ?? 0) * cos;
      this.inject(from, -re, -im);
      this.inject(to, re, im);
    }
    for (const row of system.equations) {
      const equation = branches.equations[row];
      if (equation === undefined) continue;
      for (const [place] of equation.row.entries()) {
        if (equation.ofVoltage[place] !== 1) continue;
        const size = Math.hypot(equation.re[place] ?? 0, equation.im[place] ?? 0);
        const angle = GOLDEN_ANGLE * (row + place + 1);
        this.inject(layout.ofRow.get(row) ?? -1, size * Math.cos(angle), size * Math.sin(angle));
      }
    }
    this.lu.solve(b.re, b.im, work.re, work.im);
    let largest = 0;
    for (const row of system.admittances) {
      const [from, to] = this.ends(row);
      const re = (work.re[from] ?? 0) - (work.re[to] ?? 0);
      const im = (work.im[from] ?? 0) - (work.im[to] ?? 0);
      const size = Math.abs(re) + Math.abs(im);
      if (!(size <= largest)) largest = size;
    }
    return Math.max(1, largest);
  }

  /** Writes the solution that stands in `x`, with their errors. */
  private write(branches: BranchTable, readings: Readings): void {
    const { system, layout, x } = this;
    const { first, second } = this.network;
    for (const [node, at] of layout.ofNode) {
      readings.vRe[node] = at < 0 ? 0 : (x.re[at] ?? 0);
      readings.vIm[node] = at < 0 ? 0 : (x.im[at] ?? 0);
    }
    for (const row of [...system.admittances, ...system.treeVoltages, ...system.equations]) this.readVoltage(row, readings);
    for (const row of system.admittances) {
      const re = readings.dRe[row] ?? 0;
      const im = readings.dIm[row] ?? 0;
      const yRe = branches.yRe[row] ?? 0;
      const yIm = branches.yIm[row] ?? 0;
      readings.iRe[row] = yRe * re - yIm * im;
      readings.iIm[row] = yRe * im + yIm * re;
    }
    for (const row of [...system.treeVoltages, ...system.equations]) {
      const at = layout.ofRow.get(row) ?? -1;
      readings.iRe[row] = x.re[at] ?? 0;
      readings.iIm[row] = x.im[at] ?? 0;
      if (branches.form[row] !== GIVEN_VOLTAGE) continue;
      readings.dRe[row] = branches.sRe[row] ?? 0;
      readings.dIm[row] = branches.sIm[row] ?? 0;
    }
    this.estimateErrors(branches, readings);
    for (const row of system.currents) {
      if (layout.ofNode.has(first[row] ?? 0) && layout.ofNode.has(second[row] ?? 0)) {
        readings.readDifference(first, second, row);
        this.readVoltage(row, readings);
      }
    }
  }

  private readVoltage(row: number, readings: Readings): void {
    const [a, b] = this.ends(row);
    readings.dRe[row] = a === b ? 0 : this.x.differenceRe(a, b);
    readings.dIm[row] = a === b ? 0 : this.x.differenceIm(a, b);
  }

  /**
   * What the rounding of the values does to each unknown: a solution whose sources are that part of every element's
   * voltage and of every term of an equation, each with a phase of its own.
   */
  private estimateErrors(branches: BranchTable, readings: Readings): void {
    const { b, work, system, layout, lu } = this;
    b.re.fill(0);
    b.im.fill(0);
    const strew = (line: number, size: number, angle: number): void =>
      this.inject(line, size * Math.cos(angle), size * Math.sin(angle));
    const part = SAFETY * Number.EPSILON;
    for (const row of system.admittances) {
      const [from, to] = this.ends(row);
      const size = part * Math.hypot(readings.iRe[row] ?? 0, readings.iIm[row] ?? 0);
      if (from === to) continue;
      strew(from, -size, GOLDEN_ANGLE * row);
      strew(to, size, GOLDEN_ANGLE * row);
    }
    for (const row of system.treeVoltages) {
      const size = part * Math.hypot(branches.sRe[row] ?? 0, branches.sIm[row] ?? 0);
      strew(layout.ofRow.get(row) ?? -1, size, GOLDEN_ANGLE * row);
    }
    for (const row of system.currents) {
      const [from, to] = this.ends(row);
      const size = part * Math.hypot(branches.sRe[row] ?? 0, branches.sIm[row] ?? 0);
      strew(from, -size, GOLDEN_ANGLE * row);
      strew(to, size, GOLDEN_ANGLE * row);
    }
    for (const row of system.equations) {
      const equation = branches.equations[row];
      for (const [place, of] of (equation?.row ?? []).entries()) {
        const isVoltage = equation?.ofVoltage[place] === 1;
        const re = (isVoltage ? readings.dRe[of] : readings.iRe[of]) ?? 0;
        const im = (isVoltage ? readings.dIm[of] : readings.iIm[of]) ?? 0;
        const size = part * Math.hypot(equation?.re[place] ?? 0, equation?.im[place] ?? 0) * Math.hypot(re, im);
        strew(layout.ofRow.get(row) ?? -1, size, GOLDEN_ANGLE * (row + place + 1));
      }
    }
    lu.solve(b.re, b.im, work.re, work.im);
    for (const [node, at] of layout.ofNode) readings.vError[node] = at < 0 ? 0 : sizeAt(work, at);
    for (const row of system.admittances) {
      const [from, to] = this.ends(row);
      const re = (work.re[from] ?? 0) - (work.re[to] ?? 0);
      const im = (work.im[from] ?? 0) - (work.im[to] ?? 0);
      readings.dError[row] = Math.hypot(re, im);
      const own = part * Math.hypot(readings.iRe[row] ?? 0, readings.iIm[row] ?? 0);
      readings.iError[row] = Math.hypot(branches.yRe[row] ?? 0, branches.yIm[row] ?? 0) * Math.hypot(re, im) + own;
    }
    for (const row of [...system.treeVoltages, ...system.equations]) {
      readings.iError[row] = sizeAt(work, layout.ofRow.get(row) ?? -1);
    }
  }

  /** The places of a row's nodes; −1 for a pinned one, and for one outside. */
  private ends(row: number): readonly [number, number] {
    const { first, second } = this.network;
    const { ofNode } = this.layout;
    return [ofNode.get(first[row] ?? 0) ?? -1, ofNode.get(second[row] ?? 0) ?? -1];
  }
}

interface Layout {
  /** Column of each node's voltage, and line of its current law; −1 for a pinned one. */
  readonly ofNode: ReadonlyMap<number, number>;
  /** Column of each current that is an unknown, and line of its equation. */
  readonly ofRow: ReadonlyMap<number, number>;
  readonly size: number;
}

function lay(system: BranchSystem): Layout {
  const ofNode = new Map<number, number>();
  const ofRow = new Map<number, number>();
  let size = 0;
  for (const node of system.nodes) ofNode.set(node, system.pinned.has(node) ? -1 : size++);
  for (const row of [...system.treeVoltages, ...system.equations]) ofRow.set(row, size++);
  return { ofNode, ofRow, size };
}

function sizeAt({ re, im }: ComplexVector, at: number): number {
  return Math.hypot(re[at] ?? 0, im[at] ?? 0);
}
