import type { BranchTable } from '../elements/branch-table';
import { ADMITTANCE, GIVEN_VOLTAGE } from '../elements/branch-table';
import type { DenseOutcome, DenseSystem } from '../linear/rank-revealing';
import { solveDense } from '../linear/rank-revealing';
import type { Network } from './network';
import type { Readings } from './readings';
import type { Component } from './structure';

/** What is free in a network without a unique solution. */
export interface Freedom {
  /** Whether a solution exists at all. */
  readonly consistent: boolean;
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
 * Solves one component in branch form (the modified nodal form of Ho, Ruehli and Brennan 1975 with every element's
 * current an unknown): Kirchhoff's current law at every node but the root, v_a − v_b − z·i = 0 for an admittance,
 * v_a − v_b = E for a given voltage. Slower than the nodal form, but it divides by nothing that may cancel, and it
 * tells a network that has no unique solution. Unknowns and equations are scaled by powers of two, which is exact, to
 * volts, with every impedance between a half and one.
 */
export function solveInBranchForm(
  network: Network,
  component: Component,
  branches: BranchTable,
  readings: Readings,
): BranchFormOutcome {
  const layout = lay(network, component);
  if (layout.size > MOST_UNKNOWNS) return 'tooLarge';
  const scale = currentScales(network, layout, branches);
  const outcome = solveDense(assemble(network, component, branches, layout, scale));
  if (outcome.consistent) write(network, component, branches, readings, layout, scale, outcome);
  if (outcome.nullVectors.length === 0) return 'solved';
  return freedomOf(network, component, layout, outcome);
}

interface Layout {
  /** Column of each node's voltage, and row of its current law; −1 for the root. */
  readonly ofNode: ReadonlyMap<number, number>;
  /** Column of each row's current, and row of its equation. */
  readonly ofRow: ReadonlyMap<number, number>;
  readonly size: number;
}

function lay({ first, second }: Network, component: Component): Layout {
  const ofNode = new Map<number, number>();
  component.nodes.forEach((node, place) => ofNode.set(node, place - 1));
  const ofRow = new Map<number, number>();
  let size = component.nodes.length - 1;
  for (const row of component.treeVoltages) ofRow.set(row, size++);
  for (const row of component.admittances) {
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
    if (branches.form[row] !== GIVEN_VOLTAGE) continue;
    scale.set(row, Math.max(largestAt.get(first[row] ?? 0) ?? 0, largestAt.get(second[row] ?? 0) ?? 0) || 1);
  }
  return scale;
}

/** Element values are taken to be right to one unit in the last place or so: 2πf·L rounds twice. */
const DATA_ERROR = 4 * Number.EPSILON;

function assemble(
  { first, second }: Network,
  component: Component,
  branches: BranchTable,
  layout: Layout,
  scale: ReadonlyMap<number, number>,
): DenseSystem {
  const { size, ofNode, ofRow } = layout;
  const system: DenseSystem = {
    size,
    re: new Float64Array(size * size),
    im: new Float64Array(size * size),
    error: new Float64Array(size * size),
    rightRe: new Float64Array(size),
    rightIm: new Float64Array(size),
    rightError: new Float64Array(size),
  };
  const { re, im, error, rightRe, rightIm, rightError } = system;
  for (const [row, at] of ofRow) {
    const a = ofNode.get(first[row] ?? 0) ?? -1;
    const b = ofNode.get(second[row] ?? 0) ?? -1;
    const amperes = scale.get(row) ?? 1;
    if (a >= 0) {
      re[at * size + a] = 1;
      re[a * size + at] = amperes;
    }
    if (b >= 0) {
      re[at * size + b] = -1;
      re[b * size + at] = -amperes;
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
  for (const row of [...component.innerCurrents, ...component.outerCurrents]) {
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
  for (const at of ofNode.values()) {
    if (at >= 0) scaleCurrentLaw(system, at);
  }
  return system;
}

/** Divides a node's current law by the largest of its coefficients, a power of two. */
function scaleCurrentLaw({ size, re, rightRe, rightIm, rightError }: DenseSystem, at: number): void {
  let largest = 0;
  for (let column = 0; column < size; column++) largest = Math.max(largest, Math.abs(re[at * size + column] ?? 0));
  if (largest === 0) return;
  for (let column = 0; column < size; column++) re[at * size + column] = (re[at * size + column] ?? 0) / largest;
  rightRe[at] = (rightRe[at] ?? 0) / largest;
  rightIm[at] = (rightIm[at] ?? 0) / largest;
  rightError[at] = (rightError[at] ?? 0) / largest;
}

function write(
  { first, second }: Network,
  component: Component,
  branches: BranchTable,
  readings: Readings,
  { ofNode, ofRow }: Layout,
  scale: ReadonlyMap<number, number>,
  { re, im }: DenseOutcome,
): void {
  for (const [node, at] of ofNode) {
    readings.vRe[node] = re[at] ?? 0;
    readings.vIm[node] = im[at] ?? 0;
  }
  for (const row of component.admittances) {
    const at = ofRow.get(row);
    const amperes = scale.get(row) ?? 1;
    const iRe = at === undefined ? 0 : (re[at] ?? 0) * amperes;
    const iIm = at === undefined ? 0 : (im[at] ?? 0) * amperes;
    const zRe = branches.zRe[row] ?? 0;
    const zIm = branches.zIm[row] ?? 0;
    readings.iRe[row] = iRe;
    readings.iIm[row] = iIm;
    readings.dRe[row] = zRe * iRe - zIm * iIm;
    readings.dIm[row] = zRe * iIm + zIm * iRe;
  }
  for (const row of component.innerCurrents) {
    const a = first[row] ?? 0;
    const b = second[row] ?? 0;
    readings.dRe[row] = (readings.vRe[a] ?? 0) - (readings.vRe[b] ?? 0);
    readings.dIm[row] = (readings.vIm[a] ?? 0) - (readings.vIm[b] ?? 0);
  }
}

/** Entries of a null vector below this part of its largest are rounding. */
const FREE_ABOVE = 1e-9;

function freedomOf(
  { first, second }: Network,
  component: Component,
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
    for (const row of [...component.admittances, ...component.innerCurrents]) {
      const [aRe, aIm] = at(ofNode.get(first[row] ?? 0) ?? -1);
      const [bRe, bIm] = at(ofNode.get(second[row] ?? 0) ?? -1);
      if (isFree(aRe - bRe, aIm - bIm)) voltages.add(row);
    }
  }
  return { consistent, nodes: [...nodes], currents: [...currents], voltages: [...voltages] };
}
