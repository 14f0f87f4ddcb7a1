import type { BranchTable } from '../elements/branch-table';
import type { BranchSystem } from './branch-form';
import { solveInBranchForm } from './branch-form';
import {
  floatingProblem,
  noDataProblem,
  rangeProblem,
  rowsOf,
  singularProblem,
  tooLargeProblem,
  voltageLoopProblem,
} from './diagnosis';
import { readGivenVoltages } from './given-voltage-currents';
import { currentsAgree, loopAgrees } from './given-voltages';
import type { Network } from './network';
import type { NodalForm } from './nodal-form';
import type { Problem } from './problem';
import type { Readings } from './readings';
import type { Component, Structure } from './structure';

/** Values between these keep every product and quotient of the elimination within the range of the arithmetic. */
const SMALLEST = 1e-140;
const LARGEST = 1e140;
/** The product of two readings of this size is still finite, and so are some hundred of them added up. */
const LARGEST_READING = 1e150;

/** What can be said of a component before anything is computed. */
export interface ComponentCheck {
  /**
   * - `sound`: it can be solved, though not all of it need be determined.
   * - `unsolvable`: its given voltages contradict each other, or its values are out of range.
   * - `noWayOn`: the given currents into it contradict Kirchhoff's law, so where else they go cannot be solved either.
   */
  readonly verdict: 'sound' | 'unsolvable' | 'noWayOn';
  readonly problems: readonly Problem[];
}

/** Looks for given voltages in loops, for given currents without a way on, and for values out of range. */
export function checkComponent(
  network: Network,
  structure: Structure,
  component: Component,
  branches: BranchTable,
  frequency: number,
): ComponentCheck {
  const withoutData = [...component.admittances, ...component.equations].filter((row) => branches.isUnknown[row] === 1);
  if (withoutData.length > 0) {
    return { verdict: 'unsolvable', problems: [noDataProblem(network, withoutData, frequency)] };
  }
  const outOfRange = rowsOutOfRange(component, branches);
  if (outOfRange.length > 0) {
    return { verdict: 'unsolvable', problems: [rangeProblem(network, [component], outOfRange)] };
  }
  const problems: Problem[] = [];
  let verdict: ComponentCheck['verdict'] = 'sound';
  for (const loop of component.loops) {
    const agrees = loopAgrees(network, structure, branches, loop);
    if (!agrees) verdict = 'unsolvable';
    problems.push(voltageLoopProblem(network, loop, agrees));
  }
  if (component.grounded) return { verdict, problems };
  const agrees = netCurrentIsZero(network, structure, component, branches);
  if (!agrees) verdict = 'noWayOn';
  const live = component.outerCurrents.some((row) => !branches.isGivenZero(row));
  const inReferenceIsland = structure.islandOf[component.nodes[0] ?? 0] === structure.referenceIsland;
  if (live || inReferenceIsland) problems.push(floatingProblem(network, branches, component, agrees));
  return { verdict, problems };
}

/** What a sound component came to: whether its readings stand, and what more is to be said of it. */
export interface ComponentOutcome {
  readonly solved: boolean;
  readonly problems: readonly Problem[];
}

/** Solves one sound component at one frequency and marks in the readings what is determined. */
export function solveComponent(
  network: Network,
  structure: Structure,
  component: Component,
  nodal: NodalForm,
  branches: BranchTable,
  frequency: number,
  readings: Readings,
): ComponentOutcome {
  const problems: Problem[] = [];
  const unknown = { nodes: new Set<number>(), currents: new Set<number>(), voltages: new Set<number>() };
  if (!nodal.solve(branches, readings)) {
    const outcome = solveInBranchForm(network, asSystem(component), branches, readings);
    if (outcome === 'tooLarge') return { solved: false, problems: [tooLargeProblem(network, [component], frequency)] };
    if (outcome !== 'solved') {
      problems.push(singularProblem(network, branches, rowsOf([component]), outcome, frequency));
      if (!outcome.consistent) return { solved: false, problems };
      for (const node of outcome.nodes) unknown.nodes.add(node);
      for (const row of outcome.currents) unknown.currents.add(row);
      for (const row of outcome.voltages) unknown.voltages.add(row);
    }
  }
  readGivenVoltages(network, structure, component, branches, readings);
  if (!isInRange(component, readings)) return { solved: false, problems: [rangeProblem(network, [component], [])] };

  for (const node of component.nodes) readings.vKnown[node] = component.grounded && !unknown.nodes.has(node) ? 1 : 0;
  for (const row of component.admittances) {
    readings.iKnown[row] = unknown.currents.has(row) ? 0 : 1;
    readings.dKnown[row] = unknown.voltages.has(row) ? 0 : 1;
  }
  for (const row of component.innerCurrents) readings.dKnown[row] = unknown.voltages.has(row) ? 0 : 1;
  for (const row of component.treeVoltages) {
    readings.iKnown[row] = structure.onLoop[row] === 1 || unknown.currents.has(row) ? 0 : 1;
    readings.dKnown[row] = 1;
  }
  for (const { closing } of component.loops) readings.dKnown[closing] = 1;
  return { solved: true, problems };
}

/** A component by itself, with its root at 0 V. */
function asSystem(component: Component): BranchSystem {
  const { nodes, admittances, treeVoltages, equations, innerCurrents, outerCurrents } = component;
  const pinned = new Set([nodes[0] ?? 0]);
  return { nodes, pinned, admittances, treeVoltages, equations, currents: [...innerCurrents, ...outerCurrents] };
}

function rowsOutOfRange(component: Component, branches: BranchTable): number[] {
  const { yRe, yIm, sRe, sIm } = branches;
  const inRange = (size: number): boolean => size >= SMALLEST && size <= LARGEST;
  const faulty = component.admittances.filter(
    (row) => !inRange(Math.max(Math.abs(yRe[row] ?? 0), Math.abs(yIm[row] ?? 0))),
  );
  const given = [
    ...component.treeVoltages,
    ...component.loops.map(({ closing }) => closing),
    ...component.innerCurrents,
    ...component.outerCurrents,
  ];
  for (const row of given) {
    const size = Math.max(Math.abs(sRe[row] ?? 0), Math.abs(sIm[row] ?? 0));
    if (size !== 0 && !inRange(size)) faulty.push(row);
  }
  for (const row of component.equations) {
    const { re, im } = branches.equations[row] ?? { re: [], im: [] };
    if (re.some((part, term) => !isNothingOr(inRange, Math.max(Math.abs(part), Math.abs(im[term] ?? 0))))) faulty.push(row);
  }
  return faulty;
}

function isNothingOr(inRange: (size: number) => boolean, size: number): boolean {
  return size === 0 || inRange(size);
}

/** Whether the given currents into a component without a reference add up to zero, as Kirchhoff's law wants. */
function netCurrentIsZero(
  { first }: Network,
  { componentOf }: Structure,
  component: Component,
  branches: BranchTable,
): boolean {
  const net = { re: 0, im: 0 };
  let size = 0;
  for (const row of component.outerCurrents) {
    const sign = componentOf[first[row] ?? 0] === component.index ? 1 : -1;
    net.re += sign * (branches.sRe[row] ?? 0);
    net.im += sign * (branches.sIm[row] ?? 0);
    size += Math.hypot(branches.sRe[row] ?? 0, branches.sIm[row] ?? 0);
  }
  return currentsAgree(net, size);
}

/** Whether all readings are finite, and small enough that a power, their product, is too. */
export function isInRange(component: Component, readings: Readings): boolean {
  const { vRe, vIm, dRe, dIm, iRe, iIm } = readings;
  const fits = (array: Float64Array, at: number): boolean => Math.abs(array[at] ?? Infinity) <= LARGEST_READING;
  const rows = [...component.admittances, ...component.treeVoltages, ...component.innerCurrents, ...component.equations];
  return (
    component.nodes.every((node) => fits(vRe, node) && fits(vIm, node)) &&
    rows.every((row) => fits(dRe, row) && fits(dIm, row) && fits(iRe, row) && fits(iIm, row))
  );
}
