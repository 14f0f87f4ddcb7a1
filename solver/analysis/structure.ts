import type { BranchTable } from '../elements/branch-table';
import { ADMITTANCE, EQUATION, GIVEN_CURRENT, GIVEN_VOLTAGE } from '../elements/branch-table';
import { DisjointSets } from '../linear/disjoint-sets';
import type { EliminationPlan, PlanGraph } from '../linear/elimination-plan';
import { planElimination } from '../linear/elimination-plan';
import type { Network } from './network';
import { REFERENCE } from './network';

/**
 * A conducting component: nodes that admittances, given voltages and ports with an equation tie together, not counting
 * ties by way of the reference node, whose voltage is known whatever happens. Between components there are only given
 * currents, open ports and the reference node, so each is solved by itself unless an equation links it to others (see
 * `LinkedSystem`), and what is wrong in one does no harm to another.
 */
export interface Component {
  readonly index: number;
  /** Its nodes, the root first; the root is the reference node where anything that conducts leads there. */
  readonly nodes: readonly number[];
  readonly grounded: boolean;
  /** Rows with both ends in it that are admittances. */
  readonly admittances: readonly number[];
  /** Rows of given voltage that form a spanning forest of those, each after the one that leads to its parent. */
  readonly treeVoltages: readonly number[];
  /** Rows of given voltage that close a loop with the forest, with the forest's rows on that loop. */
  readonly loops: readonly VoltageLoop[];
  /** Rows of given current with both ends in it. */
  readonly innerCurrents: readonly number[];
  /** Rows of given current (open circuits too) with just one end in it. */
  readonly outerCurrents: readonly number[];
  /** Rows with an equation. */
  readonly equations: readonly number[];
  /** Its nodal equations as a graph, and how they are solved. */
  readonly graph: PlanGraph;
  readonly plan: EliminationPlan;
  /**
   * For each admittance and each given current but those of zero: its slot, or −1 where its ends are one vertex (see
   * `vertexOf`). A given current that leaves the component is taken to come back at the root: the root's current law
   * is not among the equations, and in a component without a reference what leaves it adds up to zero.
   */
  readonly slotOfRow: ReadonlyMap<number, number>;
}

/** Components that equations link: a transformer's sides, what an amplifier senses and what it drives. */
export interface LinkedSystem {
  readonly index: number;
  readonly components: readonly Component[];
}

export interface VoltageLoop {
  readonly closing: number;
  readonly path: readonly number[];
}

/**
 * The graph of a network for one pattern of forms; it holds at every frequency with that pattern. Only the choice of
 * each group's last vertex looks at values, those of the frequency it was made at.
 */
export interface Structure {
  readonly components: readonly Component[];
  readonly systems: readonly LinkedSystem[];
  /** The linked system of each component, by index; −1 for one that no equation touches. */
  readonly systemOf: Int32Array;
  /** The component of each node. The reference node, which every grounded component has, stands under a component of its own. */
  readonly componentOf: Int32Array;
  /** Sets of nodes that elements of any form join: one number a set. */
  readonly islandOf: Int32Array;
  /** The island of the reference node. */
  readonly referenceIsland: number;
  /** Nodes joined by given voltages of zero are one vertex; numbered within each component, its root 0. */
  readonly vertexOf: Int32Array;
  /** A node for each component's vertices. */
  readonly nodeOfVertex: readonly Int32Array[];
  /** The forest of given voltages: each node's parent, or −1 at a root. */
  readonly parent: Int32Array;
  /** The row that leads to the parent, or −1. */
  readonly parentRow: Int32Array;
  readonly depth: Int32Array;
  /** Rows of given voltage that lie on a loop of given voltages: their current is not determined. */
  readonly onLoop: Uint8Array;
}

const PATTERN_LETTERS = { [ADMITTANCE]: 'y', [GIVEN_VOLTAGE]: 'v', [GIVEN_CURRENT]: 'i', [EQUATION]: 'e' } as Readonly<Record<number, string>>;

/** A text that is the same for two tables when their structure is. */
export function patternOf(branches: BranchTable): string {
  let pattern = '';
  for (let row = 0; row < branches.size; row++) {
    const form = branches.form[row] ?? ADMITTANCE;
    pattern += PATTERN_LETTERS[form] ?? '';
    if ((form === GIVEN_VOLTAGE || form === GIVEN_CURRENT) && branches.isGivenZero(row)) pattern += '0';
  }
  return pattern;
}

/** Finds components, the forest and loops of given voltages, and an elimination plan for each component. */
export function analyseStructure(network: Network, branches: BranchTable): Structure {
  const { first, second } = network;
  const nodeCount = network.nodeNames.length;
  const ends = (row: number): readonly [number, number] => [first[row] ?? 0, second[row] ?? 0];
  const conducting = new DisjointSets(nodeCount);
  const joined = new DisjointSets(nodeCount);
  const merged = new DisjointSets(nodeCount);
  const grouped = new DisjointSets(nodeCount);
  const isGrounded = new Set<number>([REFERENCE]);
  for (let row = 0; row < branches.size; row++) {
    const [a, b] = ends(row);
    joined.union(a, b);
    if (branches.form[row] === GIVEN_CURRENT) continue;
    if (a !== REFERENCE && b !== REFERENCE) conducting.union(a, b);
    else isGrounded.add(a === REFERENCE ? b : a);
    if (branches.form[row] !== GIVEN_VOLTAGE) continue;
    grouped.union(a, b);
    if (branches.isGivenZero(row)) merged.union(a, b);
  }

  const forest = growForest(network, branches);
  const componentOf = new Int32Array(nodeCount);
  const nodesOf: number[][] = [];
  const numberOf = new Map<number, number>();
  for (let node = 0; node < nodeCount; node++) {
    const set = conducting.find(node);
    const known = numberOf.get(set);
    const index = known ?? nodesOf.length;
    if (known === undefined) {
      numberOf.set(set, index);
      nodesOf.push([]);
    }
    componentOf[node] = index;
    nodesOf[index]?.push(node);
  }
  const grounded = new Set(Array.from(isGrounded, (node) => componentOf[node] ?? -1));
  for (const index of grounded) if (index !== componentOf[REFERENCE]) nodesOf[index]?.unshift(REFERENCE);

  const vertexOf = new Int32Array(nodeCount);
  const nodeOfVertex = nodesOf.map((nodes) => numberVertices(nodes, merged, vertexOf));
  const rows = sortRows(network, branches, componentOf, grounded, forest, nodesOf.length);
  const components = nodesOf.map((nodes, index): Component => {
    const mine = rows[index] ?? emptyRows();
    const currents = [...mine.innerCurrents, ...mine.outerCurrents].filter((row) => !branches.isGivenZero(row));
    const inSlots = [...mine.admittances, ...currents];
    const root = nodes[0] ?? 0;
    const pairs: [number, number][] = [];
    const pairOfRow = new Map<number, number>();
    for (const row of inSlots) {
      const [one, other] = ends(row).map((node) => vertexOf[componentOf[node] === index ? node : root] ?? 0) as [
        number,
        number,
      ];
      if (one === other) continue;
      pairOfRow.set(row, pairs.length);
      pairs.push(one < other ? [one, other] : [other, one]);
    }
    const representatives = nodeOfVertex[index] ?? new Int32Array(0);
    const weight = new Float64Array(representatives.length);
    for (const row of mine.admittances) {
      const size = Math.hypot(branches.yRe[row] ?? 0, branches.yIm[row] ?? 0);
      for (const node of ends(row)) weight[vertexOf[node] ?? 0] = (weight[vertexOf[node] ?? 0] ?? 0) + size;
    }
    const graph: PlanGraph = {
      vertexCount: representatives.length,
      group: Int32Array.from(representatives, (node) => grouped.find(node)),
      root: vertexOf[root] ?? 0,
      weight,
      postponed: new Set(),
      pairs,
    };
    const plan = planElimination(graph);
    const slotOfRow = new Map(inSlots.map((row) => [row, slotOfPairRow(plan, pairOfRow.get(row))]));
    return { index, nodes, grounded: grounded.has(index), ...mine, graph, plan, slotOfRow };
  });

  return {
    components,
    ...linkComponents(network, branches, components, componentOf),
    componentOf,
    islandOf: Int32Array.from({ length: nodeCount }, (_, node) => joined.find(node)),
    referenceIsland: joined.find(REFERENCE),
    vertexOf,
    nodeOfVertex,
    parent: forest.parent,
    parentRow: forest.parentRow,
    depth: forest.depth,
    onLoop: forest.onLoop,
  };
}

function slotOfPairRow(plan: EliminationPlan, pair: number | undefined): number {
  return pair === undefined ? -1 : (plan.slotOfPair[pair] ?? -1);
}

interface Forest {
  readonly parent: Int32Array;
  readonly parentRow: Int32Array;
  readonly depth: Int32Array;
  /** Rows of the forest, parents before children. */
  readonly order: readonly number[];
  readonly loops: readonly VoltageLoop[];
  readonly onLoop: Uint8Array;
}

/** A breadth-first spanning forest of the given voltages, rooted at the lowest node of each tree, and what closes loops. */
function growForest({ first, second, nodeNames }: Network, branches: BranchTable): Forest {
  const nodeCount = nodeNames.length;
  const around: number[][] = Array.from({ length: nodeCount }, () => []);
  for (let row = 0; row < branches.size; row++) {
    if (branches.form[row] !== GIVEN_VOLTAGE) continue;
    around[first[row] ?? 0]?.push(row);
    around[second[row] ?? 0]?.push(row);
  }
  const parent = new Int32Array(nodeCount).fill(-1);
  const parentRow = new Int32Array(nodeCount).fill(-1);
  const depth = new Int32Array(nodeCount).fill(-1);
  const order: number[] = [];
  const closing = new Set<number>();
  for (let root = 0; root < nodeCount; root++) {
    if ((depth[root] ?? -1) >= 0) continue;
    depth[root] = 0;
    const queue = [root];
    for (let node = queue.shift(); node !== undefined; node = queue.shift()) {
      for (const row of around[node] ?? []) {
        if (row === parentRow[node]) continue;
        const other = first[row] === node ? (second[row] ?? 0) : (first[row] ?? 0);
        if ((depth[other] ?? -1) >= 0) {
          // The row to a child comes up again from the child's side only as its parent row.
          if (parentRow[other] !== row) closing.add(row);
          continue;
        }
        depth[other] = (depth[node] ?? 0) + 1;
        parent[other] = node;
        parentRow[other] = row;
        order.push(row);
        queue.push(other);
      }
    }
  }
  const onLoop = new Uint8Array(branches.size);
  const loops = [...closing].map((row): VoltageLoop => {
    const path = treePath(first[row] ?? 0, second[row] ?? 0, { parent, parentRow, depth });
    for (const member of [row, ...path]) onLoop[member] = 1;
    return { closing: row, path };
  });
  return { parent, parentRow, depth, order, loops, onLoop };
}

/** The forest's rows between two nodes of one tree. */
function treePath(one: number, other: number, forest: Pick<Forest, 'parent' | 'parentRow' | 'depth'>): number[] {
  const path: number[] = [];
  let a = one;
  let b = other;
  while (a !== b) {
    const climbsA = (forest.depth[a] ?? 0) >= (forest.depth[b] ?? 0);
    const node = climbsA ? a : b;
    path.push(forest.parentRow[node] ?? -1);
    const up = forest.parent[node] ?? -1;
    if (climbsA) a = up;
    else b = up;
  }
  return path;
}

function numberVertices(nodes: readonly number[], merged: DisjointSets, vertexOf: Int32Array): Int32Array {
  const representatives: number[] = [];
  const numberOf = new Map<number, number>();
  for (const node of nodes) {
    const set = merged.find(node);
    const known = numberOf.get(set);
    vertexOf[node] = known ?? representatives.length;
    if (known !== undefined) continue;
    numberOf.set(set, representatives.length);
    representatives.push(node);
  }
  return Int32Array.from(representatives);
}

/**
 * Joins the components that the rows of an equation lie in. An open port that nothing senses links nothing; the
 * reference node, whose voltage is known, links nothing either.
 */
function linkComponents(
  { first, second }: Network,
  branches: BranchTable,
  components: readonly Component[],
  componentOf: Int32Array,
): Pick<Structure, 'systems' | 'systemOf'> {
  const linked = new DisjointSets(components.length);
  const touched = new Set<number>();
  for (let row = 0; row < branches.size; row++) {
    const equation = branches.equations[row];
    if (equation === undefined) continue;
    const homes = new Set(
      [row, ...equation.row].flatMap((of) => {
        const apart = [first[of] ?? 0, second[of] ?? 0].filter((node) => node !== REFERENCE);
        // A port with both ends on the reference node has its current all the same.
        return (apart.length === 0 ? [REFERENCE] : apart).map((node) => componentOf[node] ?? 0);
      }),
    );
    const [one] = homes;
    for (const home of homes) {
      touched.add(home);
      if (one !== undefined) linked.union(one, home);
    }
  }
  const systemOf = new Int32Array(components.length).fill(-1);
  const members: Component[][] = [];
  const numberOf = new Map<number, number>();
  for (const component of components) {
    if (!touched.has(component.index)) continue;
    const set = linked.find(component.index);
    const known = numberOf.get(set);
    const index = known ?? members.length;
    if (known === undefined) {
      numberOf.set(set, index);
      members.push([]);
    }
    systemOf[component.index] = index;
    members[index]?.push(component);
  }
  return { systems: members.map((of, index) => ({ index, components: of })), systemOf };
}

interface ComponentRows {
  readonly admittances: number[];
  readonly treeVoltages: number[];
  readonly loops: VoltageLoop[];
  readonly innerCurrents: number[];
  readonly outerCurrents: number[];
  readonly equations: number[];
}

function emptyRows(): ComponentRows {
  return { admittances: [], treeVoltages: [], loops: [], innerCurrents: [], outerCurrents: [], equations: [] };
}

function sortRows(
  { first, second }: Network,
  branches: BranchTable,
  componentOf: Int32Array,
  grounded: ReadonlySet<number>,
  forest: Forest,
  componentCount: number,
): ComponentRows[] {
  const sorted = Array.from({ length: componentCount }, emptyRows);
  /** The component that a row lies in: that of its end that is not the reference node, if one is not. */
  const homeOf = (row: number): number => {
    const a = first[row] ?? 0;
    return componentOf[a === REFERENCE ? (second[row] ?? 0) : a] ?? 0;
  };
  for (let row = 0; row < branches.size; row++) {
    const home = homeOf(row);
    if (branches.form[row] === ADMITTANCE) sorted[home]?.admittances.push(row);
    if (branches.form[row] === EQUATION) sorted[home]?.equations.push(row);
    if (branches.form[row] !== GIVEN_CURRENT) continue;
    const ends = [first[row] ?? 0, second[row] ?? 0].filter((node) => node !== REFERENCE);
    const homes = new Set(ends.map((node) => componentOf[node] ?? 0));
    const isInner = ends.length === 2 ? homes.size === 1 : grounded.has(home);
    if (isInner) sorted[home]?.innerCurrents.push(row);
    else for (const index of homes) sorted[index]?.outerCurrents.push(row);
  }
  for (const row of forest.order) sorted[homeOf(row)]?.treeVoltages.push(row);
  for (const loop of forest.loops) sorted[homeOf(loop.closing)]?.loops.push(loop);
  return sorted;
}
