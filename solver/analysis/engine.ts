import { BranchTable } from '../elements/branch-table';
import type { ElementList } from '../elements/element-list';
import { stampAll } from '../elements/registry';
import { noReferenceProblem } from './diagnosis';
import type { Network } from './network';
import { toNetwork } from './network';
import { NodalForm } from './nodal-form';
import type { Problem } from './problem';
import { Readings } from './readings';
import { solveComponent } from './solve-component';
import type { Structure } from './structure';
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
  private solvedComponents: boolean[] = [];

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
    this.solvedComponents = structure.components.map((component) => {
      const form = nodal[component.index];
      if (form === undefined) return false;
      const outcome = solveComponent(network, structure, component, form, branches, frequency, readings);
      problems.push(...outcome.problems);
      return outcome.solved;
    });
    this.setGivenCurrents(structure);
    readings.vKnown[0] = 1;
    return problems;
  }

  /** Whether both ends of a row lie in components that were solved, so that its power is part of the balance. */
  isSolved(row: number): boolean {
    const { first, second } = this.network;
    const componentOf = this.current?.structure.componentOf;
    const one = componentOf?.[first[row] ?? 0] ?? -1;
    const other = componentOf?.[second[row] ?? 0] ?? -1;
    return this.solvedComponents[one] === true && this.solvedComponents[other] === true;
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

  /** Given currents are what they are, unless an end of theirs could not be solved; so are their voltages between components. */
  private setGivenCurrents(structure: Structure): void {
    const { network, branches, readings } = this;
    for (const component of structure.components) {
      for (const row of [...component.innerCurrents, ...component.outerCurrents]) {
        readings.iRe[row] = branches.sRe[row] ?? 0;
        readings.iIm[row] = branches.sIm[row] ?? 0;
        readings.iKnown[row] = branches.isGivenZero(row) || this.isSolved(row) ? 1 : 0;
      }
      for (const row of component.outerCurrents) {
        const a = network.first[row] ?? 0;
        const b = network.second[row] ?? 0;
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
