import type { BranchTable } from '../elements/branch-table';
import type { BranchSystem, Freedom } from './branch-form';
import { solveInBranchForm } from './branch-form';
import { rangeProblem, rowsOf, singularProblem, tooLargeProblem } from './diagnosis';
import { amplifiersWithoutFeedback } from './feedback';
import { ModifiedNodalForm } from './modified-nodal-form';
import type { Network } from './network';
import { REFERENCE } from './network';
import type { Problem } from './problem';
import type { Readings } from './readings';
import { isInRange } from './solve-component';
import type { Component, LinkedSystem, Structure } from './structure';

/** What a linked system came to. */
export interface SystemOutcome {
  readonly solved: boolean;
  /** An estimate of the condition, or undefined where there is none to be trusted. */
  readonly condition: number | undefined;
  readonly problems: readonly Problem[];
}

/** How a linked system is solved: what the pattern of forms settles, kept with its work space for other frequencies. */
export interface LinkedForm {
  readonly components: readonly Component[];
  readonly system: BranchSystem;
  readonly nodal: ModifiedNodalForm;
}

/** Prepares a linked system for one pattern of forms. */
export function prepareLinkedSystem(
  network: Network,
  structure: Structure,
  { components }: LinkedSystem,
  branches: BranchTable,
): LinkedForm {
  const system = asSystem(network, structure, components, branches);
  return { components, system, nodal: new ModifiedNodalForm(network, system, branches) };
}

/**
 * Solves components that equations link, at one frequency, and marks in the readings what is determined. Modified nodal
 * form first; where that cannot be trusted, branch form, which tells what is free.
 */
export function solveLinkedSystem(
  network: Network,
  structure: Structure,
  { components, system, nodal }: LinkedForm,
  branches: BranchTable,
  frequency: number,
  readings: Readings,
): SystemOutcome {
  const open = amplifiersWithoutFeedback(network, components.flatMap(({ equations }) => equations), branches);
  if (open.length > 0) return { solved: false, condition: undefined, problems: open };
  const problems: Problem[] = [];
  const unknown = { nodes: new Set<number>(), currents: new Set<number>(), voltages: new Set<number>() };
  const condition = nodal.solve(branches, readings);
  if (condition === undefined) {
    const outcome = solveInBranchForm(network, system, branches, readings);
    if (outcome === 'tooLarge') {
      return { solved: false, condition, problems: [tooLargeProblem(network, components, frequency)] };
    }
    if (outcome !== 'solved') {
      if (!isSaidElsewhere(components, system, outcome)) {
        problems.push(singularProblem(network, branches, rowsOf(components), outcome, frequency));
      }
      if (!outcome.consistent) return { solved: false, condition, problems };
      for (const node of outcome.nodes) unknown.nodes.add(node);
      for (const row of outcome.currents) unknown.currents.add(row);
      for (const row of outcome.voltages) unknown.voltages.add(row);
    }
  }
  for (const { loops } of components) for (const { closing } of loops) giveLoopVoltage(branches, readings, closing);
  if (!components.every((component) => isInRange(component, readings))) {
    return { solved: false, condition, problems: [rangeProblem(network, components, [])] };
  }
  for (const component of components) mark(structure, component, system, readings, unknown);
  for (const row of system.currents) markOuter(network, structure, row, readings);
  return { solved: true, condition, problems };
}

function giveLoopVoltage(branches: BranchTable, readings: Readings, row: number): void {
  readings.dRe[row] = branches.sRe[row] ?? 0;
  readings.dIm[row] = branches.sIm[row] ?? 0;
  readings.iRe[row] = 0;
  readings.iIm[row] = 0;
}

/**
 * The system's rows together. A part that nothing that conducts leads from to the reference node is held at 0 V at its
 * root, whose current law follows from the others, so that its common mode, which nothing determines, does no harm;
 * unless a port senses the voltage between it and another part, and the common mode is not for free.
 */
function asSystem(
  network: Network,
  { componentOf }: Structure,
  components: readonly Component[],
  branches: BranchTable,
): BranchSystem {
  const pinned = new Set([REFERENCE]);
  const currents = new Set<number>();
  for (const component of components) {
    for (const row of [...component.innerCurrents, ...component.outerCurrents]) currents.add(row);
    if (component.grounded) continue;
    const isSensedFromOutside = component.outerCurrents.some((row) => {
      if (branches.isSensed[row] !== 1) return false;
      return componentOf[network.first[row] ?? 0] !== componentOf[network.second[row] ?? 0];
    });
    if (!isSensedFromOutside) pinned.add(component.nodes[0] ?? 0);
  }
  return {
    nodes: [...new Set(components.flatMap(({ nodes }) => nodes))],
    pinned,
    admittances: components.flatMap(({ admittances }) => admittances),
    treeVoltages: components.flatMap(({ treeVoltages }) => treeVoltages),
    equations: components.flatMap(({ equations }) => equations),
    currents: [...currents],
  };
}

/**
 * Whether what is free comes from parts that nothing that conducts ties to the reference node, one freedom a part, which
 * is said of them already: what senses such a part is as little determined as the part.
 */
function isSaidElsewhere(components: readonly Component[], { pinned }: BranchSystem, freedom: Freedom): boolean {
  const floating = components.filter(({ grounded, nodes }) => !grounded && !pinned.has(nodes[0] ?? 0));
  return freedom.consistent && freedom.dimension <= floating.length;
}

interface Unknown {
  readonly nodes: ReadonlySet<number>;
  readonly currents: ReadonlySet<number>;
  readonly voltages: ReadonlySet<number>;
}

function mark(structure: Structure, component: Component, system: BranchSystem, readings: Readings, unknown: Unknown): void {
  const hasVoltages = component.grounded || !system.pinned.has(component.nodes[0] ?? 0);
  for (const node of component.nodes) {
    if (node !== REFERENCE) readings.vKnown[node] = hasVoltages && !unknown.nodes.has(node) ? 1 : 0;
  }
  for (const row of [...component.admittances, ...component.equations, ...component.treeVoltages]) {
    readings.iKnown[row] = structure.onLoop[row] === 1 || unknown.currents.has(row) ? 0 : 1;
    readings.dKnown[row] = unknown.voltages.has(row) ? 0 : 1;
  }
  for (const row of component.innerCurrents) readings.dKnown[row] = unknown.voltages.has(row) ? 0 : 1;
  for (const { closing } of component.loops) readings.dKnown[closing] = 1;
}

/** A given current or a sensing port between two parts has a voltage where both of its nodes have. */
function markOuter({ first, second }: Network, { componentOf }: Structure, row: number, readings: Readings): void {
  const a = first[row] ?? 0;
  const b = second[row] ?? 0;
  if (componentOf[a] === componentOf[b]) return;
  const isKnown = (node: number): boolean => node === REFERENCE || readings.vKnown[node] === 1;
  if (isKnown(a) && isKnown(b)) readings.dKnown[row] = 1;
}
