import type { BranchTable } from '../elements/branch-table';
import { ADMITTANCE, GIVEN_CURRENT, GIVEN_VOLTAGE } from '../elements/branch-table';
import type { DenseOutcome, DenseSystem } from '../linear/rank-revealing';
import { solveDense } from '../linear/rank-revealing';
import type { Network } from './network';
import type { Readings } from './readings';

/** What is solved at once: one component, or several that equations link. */
export interface BranchSystem {
  /** Each node once; the reference node too, where it is one of them. */
  readonly nodes: readonly number[];
  /** Nodes at 0 V, whose current law follows from the others: the reference node, or one of a part without it. */
  readonly pinned: ReadonlySet<number>;
  readonly admittances: readonly number[];
  readonly treeVoltages: readonly number[];
  readonly equations: readonly number[];
  /** Rows of given current with an end in it, open ports too. */
  readonly currents: readonly number[];
}

/** What is free in a network without a unique solution. */
export interface Freedom {
  /** Whether a solution exists at all. */
  readonly consistent: boolean;
  /** How many solutions may be added to one, independent of each other. */
  readonly dimension: number;
  /** Nodes whose voltage is not determined. */
  readonly nodes: readonly number[];
  /** Rows whose current, and rows whose voltage, is not determined. */
  readonly currents: readonly number[];
  readonly voltages: readonly number[];
}

/** What came of it: solved, not unique, or too large to be done this way. */
export type BranchFormOutcome = Freedom | 'solved' | 'tooLarge';

/** Above this the cube of the number of unknowns takes seconds. */
const MOST_UNKNOWNS = 700;

/**
 * Solves a system in branch form (the modified nodal form of Ho, Ruehli and Brennan 1975, doi 10.1109/TCS.1975.1084079,
 * with every element's current an unknown): Kirchhoff's current law at every node that is not pinned,
 * v_a − v_b − z·i = 0 for an admittance, v_a − v_b = E for a given voltage, and the equations as they stand. Slower than
 * the nodal form, but it divides by nothing that may cancel, and it tells a network that has no unique solution.
 * Unknowns and equations are scaled by powers of two, which is exact, to volts, with every impedance between a half and
 * one. Writes voltages, currents and the bounds on their errors.
 */
export function solveInBranchForm(
  network: Network,
  system: BranchSystem,
  branches: BranchTable,
  readings: Readings,
): BranchFormOutcome {
  const layout = lay(network, system);
  if (layout.size > MOST_UNKNOWNS) return 'tooLarge';
  const scale = currentScales(network, layout, branches);
  const outcome = solveDense(assemble(network, system, branches, layout, scale));
  if (outcome.consistent) write(network, system, branches, readings, layout, scale, outcome);
  if (outcome.nullVectors.length === 0) return 'solved';
  return freedomOf(network, system, layout, outcome);
}

interface Layout {
  /** Column of each node's voltage, and row of its current law; −1 for a pinned one. */
  readonly ofNode: ReadonlyMap<number, number>;
  /** Column of each row's current, and row of its equation. */
  readonly ofRow: ReadonlyMap<number, number>;
  readonly size: number;
}

function lay({ first, second }: Network, system: BranchSystem): Layout {
  const ofNode = new Map<number, number>();
  const ofRow = new Map<number, number>();
  let size = 0;
  for (const node of system.nodes) ofNode.set(node, system.pinned.has(node) ? -1 : size++);
  for (const row of [...system.treeVoltages, ...system.equations]) ofRow.set(row, size++);
  for (const row of system.admittances) {
    if (first[row] !== second[row]) ofRow.set(row, size++);
  }
  return { ofNode, ofRow, size };
}

/** Amperes that stand for one volt of each scaled current: a power of two near 1/|z|. */
function currentScales({ first, second }: Network, layout: Layout, branches: BranchTable): Map<number, number> {
  const scale = new Map<number, number>();
  const largestAt = new Map<number, number>();
  for (const row of layout.ofRow.keys()) {
    if (branches.form[row] !== ADMITTANCE) continue;
    const impedance = Math.max(Math.abs(branches.zRe[row] ?? 0), Math.abs(branches.zIm[row] ?? 0));
    const amperes = 2 ** -Math.ceil(Math.log2(impedance));
    scale.set(row, amperes);
    for (const node of [first[row] ?? 0, second[row] ?? 0]) {
      largestAt.set(node, Math.max(largestAt.get(node) ?? 0, amperes));
    }
  }
  for (const row of layout.ofRow.keys()) {
    if (branches.form[row] === ADMITTANCE) continue;
    const own = ownAdmittance(branches, row);
    const around = Math.max(largestAt.get(first[row] ?? 0) ?? 0, largestAt.get(second[row] ?? 0) ?? 0);
    scale.set(row, own > 0 ? 2 ** Math.round(Math.log2(own)) : around || 1);
  }
  return scale;
}

/** The size of the ratio of a row's current to its voltage in its own equation; 0 where it has none. */
function ownAdmittance(branches: BranchTable, row: number): number {
  const equation = branches.equations[row];
  let voltage = 0;
  let current = 0;
  equation?.row.forEach((of, place) => {
    if (of !== row) return;
    const size = Math.hypot(equation.re[place] ?? 0, equation.im[place] ?? 0);
    if (equation.ofVoltage[place] === 1) voltage += size;
    else current += size;
  });
  const ratio = voltage / current;
  return ratio > 0 && ratio < Infinity ? ratio : 0;
}

/** Element values are taken to be right to one unit in the last place or so: 2πf·L rounds twice. */
const DATA_ERROR = 4 * Number.EPSILON;

function assemble(
  network: Network,
  system: BranchSystem,
  branches: BranchTable,
  layout: Layout,
  scale: ReadonlyMap<number, number>,
): DenseSystem {
  const { first, second } = network;
  const { size, ofNode, ofRow } = layout;
  const dense: DenseSystem = {
    size,
    re: new Float64Array(size * size),
    im: new Float64Array(size * size),
    error: new Float64Array(size * size),
    rightRe: new Float64Array(size),
    rightIm: new Float64Array(size),
    rightError: new Float64Array(size),
  };
  const { re, im, error, rightRe, rightIm, rightError } = dense;
  for (const [row, at] of ofRow) {
    const a = ofNode.get(first[row] ?? 0) ?? -1;
    const b = ofNode.get(second[row] ?? 0) ?? -1;
    const amperes = scale.get(row) ?? 1;
    if (a !== b) {
      if (a >= 0) re[a * size + at] = amperes;
      if (b >= 0) re[b * size + at] = -amperes;
    }
    if (branches.equations[row] !== undefined) {
      placeEquation(network, branches, layout, scale, row, dense);
      continue;
    }
    if (a !== b) {
      if (a >= 0) re[at * size + a] = 1;
      if (b >= 0) re[at * size + b] = -1;
    }
    if (branches.form[row] === ADMITTANCE) {
      const zRe = (branches.zRe[row] ?? 0) * amperes;
      const zIm = (branches.zIm[row] ?? 0) * amperes;
      re[at * size + at] = -zRe;
      im[at * size + at] = -zIm;
      error[at * size + at] = DATA_ERROR * (Math.abs(zRe) + Math.abs(zIm));
    } else {
      rightRe[at] = branches.sRe[row] ?? 0;
      rightIm[at] = branches.sIm[row] ?? 0;
      rightError[at] = DATA_ERROR * (Math.abs(rightRe[at] ?? 0) + Math.abs(rightIm[at] ?? 0));
    }
  }
  for (const row of system.currents) {
    const sRe = branches.sRe[row] ?? 0;
    const sIm = branches.sIm[row] ?? 0;
    for (const [node, sign] of [
      [first[row] ?? 0, -1],
      [second[row] ?? 0, 1],
    ] as const) {
      const at = ofNode.get(node) ?? -1;
      if (at < 0) continue;
      rightRe[at] = (rightRe[at] ?? 0) + sign * sRe;
      rightIm[at] = (rightIm[at] ?? 0) + sign * sIm;
      rightError[at] = (rightError[at] ?? 0) + DATA_ERROR * (Math.abs(sRe) + Math.abs(sIm));
    }
  }
  for (const at of ofNode.values()) if (at >= 0) scaleLine(dense, at);
  for (const [row, at] of ofRow) if (branches.equations[row] !== undefined) scaleLine(dense, at);
  return dense;
}

/** Writes the equation of a row: terms of voltages into the columns of nodes, of currents into those of rows. */
function placeEquation(
  { first, second }: Network,
  branches: BranchTable,
  { size, ofNode, ofRow }: Layout,
  scale: ReadonlyMap<number, number>,
  row: number,
  { re, im, error, rightRe, rightIm, rightError }: DenseSystem,
): void {
  const equation = branches.equations[row];
  const at = ofRow.get(row) ?? 0;
  const add = (column: number, cRe: number, cIm: number): void => {
    const to = at * size + column;
    re[to] = (re[to] ?? 0) + cRe;
    im[to] = (im[to] ?? 0) + cIm;
    error[to] = (error[to] ?? 0) + DATA_ERROR * (Math.abs(cRe) + Math.abs(cIm));
  };
  equation?.row.forEach((of, place) => {
    const cRe = equation.re[place] ?? 0;
    const cIm = equation.im[place] ?? 0;
    if (equation.ofVoltage[place] === 1) {
      const a = ofNode.get(first[of] ?? 0) ?? -1;
      const b = ofNode.get(second[of] ?? 0) ?? -1;
      if (a === b) return;
      if (a >= 0) add(a, cRe, cIm);
      if (b >= 0) add(b, -cRe, -cIm);
      return;
    }
    const column = ofRow.get(of);
    const amperes = scale.get(of) ?? 1;
    if (column !== undefined) return add(column, cRe * amperes, cIm * amperes);
    if (branches.form[of] !== GIVEN_CURRENT) return;
    const sRe = branches.sRe[of] ?? 0;
    const sIm = branches.sIm[of] ?? 0;
    rightRe[at] = (rightRe[at] ?? 0) - (cRe * sRe - cIm * sIm);
    rightIm[at] = (rightIm[at] ?? 0) - (cRe * sIm + cIm * sRe);
    rightError[at] =
      (rightError[at] ?? 0) + 2 * DATA_ERROR * (Math.abs(cRe) + Math.abs(cIm)) * (Math.abs(sRe) + Math.abs(sIm));
  });
}

/** Divides a line of the system by a power of two near the largest of its coefficients. */
function scaleLine({ size, re, im, error, rightRe, rightIm, rightError }: DenseSystem, at: number): void {
  let largest = 0;
  for (let column = 0; column < size; column++) {
    largest = Math.max(largest, Math.abs(re[at * size + column] ?? 0), Math.abs(im[at * size + column] ?? 0));
  }
  if (!(largest > 0 && largest < Infinity)) return;
  const by = 2 ** Math.round(Math.log2(largest));
  for (let column = at * size; column < (at + 1) * size; column++) {
    re[column] = (re[column] ?? 0) / by;
    im[column] = (im[column] ?? 0) / by;
    error[column] = (error[column] ?? 0) / by;
  }
  rightRe[at] = (rightRe[at] ?? 0) / by;
  rightIm[at] = (rightIm[at] ?? 0) / by;
  rightError[at] = (rightError[at] ?? 0) / by;
}

function write(
  { first, second }: Network,
  system: BranchSystem,
  branches: BranchTable,
  readings: Readings,
  { ofNode, ofRow }: Layout,
  scale: ReadonlyMap<number, number>,
  { re, im, error }: DenseOutcome,
): void {
  for (const [node, at] of ofNode) {
    readings.vRe[node] = re[at] ?? 0;
    readings.vIm[node] = im[at] ?? 0;
    readings.vError[node] = error[at] ?? 0;
  }
  for (const row of [...system.admittances, ...system.equations, ...system.treeVoltages]) {
    const at = ofRow.get(row);
    const amperes = scale.get(row) ?? 1;
    const iRe = at === undefined ? 0 : (re[at] ?? 0) * amperes;
    const iIm = at === undefined ? 0 : (im[at] ?? 0) * amperes;
    readings.iRe[row] = iRe;
    readings.iIm[row] = iIm;
    readings.iError[row] = at === undefined ? 0 : (error[at] ?? 0) * amperes;
    if (branches.form[row] === GIVEN_VOLTAGE) {
      readings.dRe[row] = branches.sRe[row] ?? 0;
      readings.dIm[row] = branches.sIm[row] ?? 0;
    } else if (branches.form[row] === ADMITTANCE) {
      const zRe = branches.zRe[row] ?? 0;
      const zIm = branches.zIm[row] ?? 0;
      readings.dRe[row] = zRe * iRe - zIm * iIm;
      readings.dIm[row] = zRe * iIm + zIm * iRe;
      readings.dError[row] = Math.hypot(zRe, zIm) * (readings.iError[row] ?? 0);
    } else {
      readings.readDifference(first, second, row);
    }
  }
  for (const row of system.currents) {
    if (ofNode.has(first[row] ?? 0) && ofNode.has(second[row] ?? 0)) readings.readDifference(first, second, row);
  }
}

/** Entries of a null vector below this part of its largest are rounding. */
const FREE_ABOVE = 1e-9;

function freedomOf(
  { first, second }: Network,
  system: BranchSystem,
  { ofNode, ofRow }: Layout,
  { consistent, nullVectors }: DenseOutcome,
): Freedom {
  const nodes = new Set<number>();
  const currents = new Set<number>();
  const voltages = new Set<number>();
  for (const { re, im } of nullVectors) {
    const at = (place: number): readonly [number, number] => [re[place] ?? 0, im[place] ?? 0];
    let largest = 0;
    for (let place = 0; place < re.length; place++) largest = Math.max(largest, Math.hypot(...at(place)));
    const isFree = (re1: number, im1: number): boolean => Math.hypot(re1, im1) > FREE_ABOVE * largest;
    for (const [node, place] of ofNode) if (place >= 0 && isFree(...at(place))) nodes.add(node);
    for (const [row, place] of ofRow) if (isFree(...at(place))) currents.add(row);
    for (const row of [...system.admittances, ...system.equations, ...system.currents]) {
      const [aRe, aIm] = at(ofNode.get(first[row] ?? 0) ?? -1);
      const [bRe, bIm] = at(ofNode.get(second[row] ?? 0) ?? -1);
      if (isFree(aRe - bRe, aIm - bIm)) voltages.add(row);
    }
  }
  return { consistent, dimension: nullVectors.length, nodes: [...nodes], currents: [...currents], voltages: [...voltages] };
}
