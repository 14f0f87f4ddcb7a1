import type { BranchTable } from '../elements/branch-table';
import type { ElementList } from '../elements/element-list';
import { noReferenceProblem, notReliableProblem } from './diagnosis';
import type { LinkedForm } from './linked-system';
import { prepareLinkedSystem, solveLinkedSystem } from './linked-system';
import type { Network } from './network';
import { branchTableOf, REFERENCE, toNetwork } from './network';
import { NodalForm } from './nodal-form';
import type { Problem } from './problem';
import { silenceQuietBlocks } from './quiet-blocks';
import { Readings } from './readings';
import { checkComponent, solveComponent } from './solve-component';
import type { Component, Structure } from './structure';
import { analyseStructure, patternOf } from './structure';

interface Prepared {
  readonly structure: Structure;
  /** None for a component that equations link to others. */
  readonly nodal: readonly (NodalForm | undefined)[];
  readonly linked: readonly LinkedForm[];
}

/**
 * Solves one network at one frequency after another. What depends only on the pattern of forms (which elements are
 * open, closed or dead) is found once for each pattern met and kept, with its work space.
 */
export class Engine {
  readonly network: Network;
  readonly branches: BranchTable;
  readonly readings: Readings;
  private readonly prepared = new Map<string, Prepared>();
  private current: Prepared | undefined;
  /** The condition of the network at the last frequency; see `Solution`. */
  condition: number | undefined;
  private solved: readonly boolean[] = [];

  constructor(list: ElementList) {
    this.network = toNetwork(list);
    const { network } = this;
    this.branches = branchTableOf(network);
    this.readings = new Readings(network.nodeNames.length, network.rowCount);
  }

  /** Fills `branches` and `readings` for a frequency (hertz, finite, not negative), and answers what stood in the way. */
  solveAt(frequency: number): readonly Problem[] {
    const { network, branches, readings } = this;
    branches.evaluate({ frequency, omega: 2 * Math.PI * frequency });
    const { structure, nodal, linked } = this.prepare();
    readings.clear();
    const problems: Problem[] = [...noReference(network, structure)];
    const { components, systemOf } = structure;
    const checks = components.map((component) => checkComponent(network, structure, component, branches, frequency));
    for (const check of checks) problems.push(...check.problems);
    this.condition = 1;
    const hasNoWayOn = checks.map(({ verdict }) => verdict === 'noWayOn');
    const isReady = (component: Component): boolean =>
      checks[component.index]?.verdict === 'sound' && !this.isEnteredBy(component, structure, hasNoWayOn);
    const solved = components.map((component) => {
      const form = nodal[component.index];
      if (systemOf[component.index] !== -1 || form === undefined || !isReady(component)) return false;
      const outcome = solveComponent(network, structure, component, form, branches, frequency, readings);
      problems.push(...outcome.problems);
      this.noteCondition(form.condition);
      return outcome.solved;
    });
    for (const form of linked) {
      if (!form.components.every(isReady)) continue;
      const outcome = solveLinkedSystem(network, structure, form, branches, frequency, readings);
      problems.push(...outcome.problems);
      this.noteCondition(outcome.condition);
      for (const { index } of form.components) solved[index] = outcome.solved;
    }
    this.solved = solved;
    this.setGivenCurrents(structure, hasNoWayOn);
    const contradicted = new Set(
      components.filter(({ index }) => this.solved[index] !== true).flatMap(({ nodes }) => nodes.map((node) => structure.islandOf[node])),
    );
    silenceQuietBlocks(network, branches, readings, (node) => !contradicted.has(structure.islandOf[node]));
    readings.vKnown[REFERENCE] = 1;
    problems.push(...unreliable(network, readings));
    return problems;
  }

  private noteCondition(condition: number | undefined): void {
    this.condition =
      condition === undefined || this.condition === undefined ? undefined : Math.max(this.condition, condition);
  }

  /** Whether a node lies in a component that was solved; the reference node always does. */
  isSolved(node: number): boolean {
    if (node === REFERENCE) return true;
    const index = this.current?.structure.componentOf[node] ?? -1;
    return this.solved[index] === true;
  }

  /** Whether a node lies in a component that equations link to others. */
  isLinked(node: number): boolean {
    const { structure } = this.current ?? {};
    return (structure?.systemOf[structure.componentOf[node] ?? -1] ?? -1) >= 0;
  }

  /** Whether a given current without a way on at its other end enters the component. */
  private isEnteredBy(component: Component, { componentOf }: Structure, hasNoWayOn: readonly boolean[]): boolean {
    const { first, second } = this.network;
    return component.outerCurrents.some((row) => {
      if (this.branches.isGivenZero(row)) return false;
      const a = first[row] ?? 0;
      const b = second[row] ?? 0;
      const there = componentOf[a] === component.index ? b : a;
      return hasNoWayOn[componentOf[there] ?? -1] === true;
    });
  }

  private prepare(): Prepared {
    const pattern = patternOf(this.branches);
    let prepared = this.prepared.get(pattern);
    if (prepared === undefined) {
      const structure = analyseStructure(this.network, this.branches);
      const nodal = structure.components.map((component) =>
        structure.systemOf[component.index] === -1 ? new NodalForm(this.network, structure, component) : undefined,
      );
      const linked = structure.systems.map((system) =>
        prepareLinkedSystem(this.network, structure, system, this.branches),
      );
      prepared = { structure, nodal, linked };
      this.prepared.set(pattern, prepared);
    }
    this.current = prepared;
    return prepared;
  }

  /** Given currents are what they are, unless one has no way on at one of its ends; fills in voltages between components. */
  private setGivenCurrents({ components, componentOf }: Structure, hasNoWayOn: readonly boolean[]): void {
    const { network, branches, readings } = this;
    const { first, second } = network;
    const isKnown = (node: number): boolean => node === REFERENCE || readings.vKnown[node] === 1;
    for (const component of components) {
      for (const row of [...component.innerCurrents, ...component.outerCurrents]) {
        const ends = [first[row] ?? 0, second[row] ?? 0];
        const stuck = ends.some((node) => hasNoWayOn[componentOf[node] ?? -1] === true);
        readings.iRe[row] = branches.sRe[row] ?? 0;
        readings.iIm[row] = branches.sIm[row] ?? 0;
        readings.iKnown[row] = stuck && !branches.isGivenZero(row) ? 0 : 1;
      }
      for (const row of component.outerCurrents) {
        const a = first[row] ?? 0;
        const b = second[row] ?? 0;
        readings.dRe[row] = (readings.vRe[a] ?? 0) - (readings.vRe[b] ?? 0);
        readings.dIm[row] = (readings.vIm[a] ?? 0) - (readings.vIm[b] ?? 0);
        if (isKnown(a) && isKnown(b)) readings.dKnown[row] = 1;
      }
    }
  }
}

/** One problem for each part of the network that nothing at all joins to the reference node. */
function noReference(network: Network, structure: Structure): Problem[] {
  const { islandOf, referenceIsland } = structure;
  const nodesOf = new Map<number, number[]>();
  islandOf.forEach((island, node) => {
    if (island === referenceIsland) return;
    const nodes = nodesOf.get(island);
    if (nodes === undefined) nodesOf.set(island, [node]);
    else nodes.push(node);
  });
  return Array.from(nodesOf, ([island, nodes]) => {
    const rows = Array.from(network.first, (_, row) => row).filter((row) => islandOf[network.first[row] ?? 0] === island);
    return noReferenceProblem(network, nodes, rows);
  });
}

/** A reading may be off by so much of itself, or by so much of the largest of its kind, before it is said. */
const WORST_OF_ITSELF = 1e-6;
const WORST_OF_LARGEST = 1e-9;

/** Readings whose digits rounding may have taken; those that are nothing beside the largest of their kind do not count. */
function unreliable(network: Network, readings: Readings): Problem[] {
  const { vRe, vIm, vKnown, vError, iRe, iIm, iKnown, iError } = readings;
  const nodes = doubtful(vRe, vIm, vKnown, vError);
  const rows = doubtful(iRe, iIm, iKnown, iError);
  return nodes.length + rows.length === 0 ? [] : [notReliableProblem(network, nodes, rows)];
}

function doubtful(re: Float64Array, im: Float64Array, known: Uint8Array, error: Float64Array): number[] {
  let largest = 0;
  for (let at = 0; at < re.length; at++) {
    if (known[at] === 1) largest = Math.max(largest, Math.hypot(re[at] ?? 0, im[at] ?? 0));
  }
  const found: number[] = [];
  for (let at = 0; at < re.length; at++) {
    const off = error[at] ?? 0;
    if (known[at] !== 1 || off <= WORST_OF_LARGEST * largest) continue;
    if (off > WORST_OF_ITSELF * Math.hypot(re[at] ?? 0, im[at] ?? 0)) found.push(at);
  }
  return found;
}
