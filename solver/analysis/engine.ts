import { BranchTable } from '../elements/branch-table';
import type { ElementList } from '../elements/element-list';
import { stampAll } from '../elements/registry';
import { noReferenceProblem } from './diagnosis';
import type { Network } from './network';
import { REFERENCE, toNetwork } from './network';
import { NodalForm } from './nodal-form';
import type { Problem } from './problem';
import { silenceQuietBlocks } from './quiet-blocks';
import { Readings } from './readings';
import { checkComponent, solveComponent } from './solve-component';
import type { Component, Structure } from './structure';
import { analyseStructure, patternOf } from './structure';

interface Prepared {
  readonly structure: Structure;
  readonly nodal: readonly NodalForm[];
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
    this.branches = new BranchTable(list.elements.length);
    this.readings = new Readings(this.network.nodeNames.length, list.elements.length);
  }

  /** Fills `branches` and `readings` for a frequency (hertz, finite, not negative), and answers what stood in the way. */
  solveAt(frequency: number): readonly Problem[] {
    const { network, branches, readings } = this;
    stampAll(network.elements, { frequency, omega: 2 * Math.PI * frequency }, branches);
    const { structure, nodal } = this.prepare();
    readings.clear();
    const problems: Problem[] = [...noReference(network, structure)];
    const { components } = structure;
    const checks = components.map((component) => checkComponent(network, structure, component, branches));
    this.condition = 1;
    const hasNoWayOn = checks.map(({ verdict }) => verdict === 'noWayOn');
    this.solved = components.map((component) => {
      const check = checks[component.index];
      const form = nodal[component.index];
      if (check === undefined || form === undefined) return false;
      problems.push(...check.problems);
      if (check.verdict !== 'sound' || this.isEnteredBy(component, structure, hasNoWayOn)) return false;
      const outcome = solveComponent(network, structure, component, form, branches, frequency, readings);
      problems.push(...outcome.problems);
      if (form.condition === undefined || this.condition === undefined) this.condition = undefined;
      else this.condition = Math.max(this.condition, form.condition);
      return outcome.solved;
    });
    this.setGivenCurrents(structure, hasNoWayOn);
    const contradicted = new Set(
      components.filter(({ index }) => this.solved[index] !== true).flatMap(({ nodes }) => nodes.map((node) => structure.islandOf[node])),
    );
    silenceQuietBlocks(network, branches, readings, (node) => !contradicted.has(structure.islandOf[node]));
    readings.vKnown[REFERENCE] = 1;
    return problems;
  }

  /** Whether a node lies in a component that was solved; the reference node always does. */
  isSolved(node: number): boolean {
    if (node === REFERENCE) return true;
    const index = this.current?.structure.componentOf[node] ?? -1;
    return this.solved[index] === true;
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
      const nodal = structure.components.map((component) => new NodalForm(this.network, structure, component));
      prepared = { structure, nodal };
      this.prepared.set(pattern, prepared);
    }
    this.current = prepared;
    return prepared;
  }

  /** Given currents are what they are, unless one has no way on at one of its ends; fills in voltages between components. */
  private setGivenCurrents({ components, componentOf }: Structure, hasNoWayOn: readonly boolean[]): void {
    const { network, branches, readings } = this;
    const { first, second } = network;
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
    const rows = network.elements.flatMap((_, row) => (islandOf[network.first[row] ?? 0] === island ? [row] : []));
    return noReferenceProblem(network, nodes, rows);
  });
}
