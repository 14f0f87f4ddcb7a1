import { DisjointSets } from '../linear/disjoint-sets';
import type { Network } from '../analysis/network';
import { REFERENCE } from '../analysis/network';
import { phasorOf } from './network-inputs';

/** Whether a row's voltage is given, and whether it is given as nothing. */
export function isGivenVoltage(network: Network, row: number): boolean {
  const law = network.laws[row]?.law;
  return law === 'voltage' || law === 'short';
}

function isShort(network: Network, row: number): boolean {
  const law = network.laws[row];
  if (law?.law !== 'voltage') return law?.law === 'short';
  const { re, im } = phasorOf(law);
  return re === 0 && im === 0;
}

/**
 * The trees that rows of given voltage grow from the reference node and from other nodes, and the vertices that come of
 * it: every set of nodes at one voltage is one. Those of the reference's tree are the boundary and stand first; those of
 * any other tree of more than one are a group.
 */
export interface GivenTree {
  readonly parent: Int32Array;
  readonly parentRow: Int32Array;
  readonly depth: Int32Array;
  readonly vertexOf: Int32Array;
  readonly vertexCount: number;
  readonly boundaryCount: number;
  readonly groups: readonly (readonly number[])[];
  /** A node of each vertex. */
  readonly nodeOf: Int32Array;
}

/**
 * The trees of a network; undefined where rows of given voltage form a loop.
 *
 * @param isLeftOut rows that are not to be taken for given voltages, though they are
 */
export function growTrees(network: Network, isLeftOut: (row: number) => boolean = () => false): GivenTree | undefined {
  const { first, second, rowCount, nodeNames } = network;
  const nodeCount = nodeNames.length;
  const around: number[][] = Array.from({ length: nodeCount }, () => []);
  const merged = new DisjointSets(nodeCount);
  for (let row = 0; row < rowCount; row++) {
    if (!isGivenVoltage(network, row) || isLeftOut(row)) continue;
    const a = first[row] ?? 0;
    const b = second[row] ?? 0;
    if (a === b) return undefined;
    around[a]?.push(row);
    around[b]?.push(row);
    if (isShort(network, row)) merged.union(a, b);
  }
  const parent = new Int32Array(nodeCount).fill(-1);
  const parentRow = new Int32Array(nodeCount).fill(-1);
  const depth = new Int32Array(nodeCount).fill(-1);
  const vertexOf = new Int32Array(nodeCount).fill(-1);
  const nodeOf: number[] = [];
  const vertexOfSet = new Map<number, number>();
  const groups: number[][] = [];
  let boundaryCount = 0;
  for (let root = REFERENCE; root < nodeCount; root++) {
    if ((depth[root] ?? -1) >= 0) continue;
    const start = nodeOf.length;
    depth[root] = 0;
    const queue = [root];
    for (let head = 0; head < queue.length; head++) {
      const node = queue[head] ?? root;
      const set = merged.find(node);
      const known = vertexOfSet.get(set);
      vertexOf[node] = known ?? nodeOf.length;
      if (known === undefined) {
        vertexOfSet.set(set, nodeOf.length);
        nodeOf.push(node);
      }
      for (const row of around[node] ?? []) {
        if (row === parentRow[node]) continue;
        const other = first[row] === node ? (second[row] ?? 0) : (first[row] ?? 0);
        if ((depth[other] ?? -1) >= 0) return undefined;
        depth[other] = (depth[node] ?? 0) + 1;
        parent[other] = node;
        parentRow[other] = row;
        queue.push(other);
      }
    }
    if (root === REFERENCE) boundaryCount = nodeOf.length;
    else if (nodeOf.length > start + 1) groups.push(Array.from({ length: nodeOf.length - start }, (_, place) => start + place));
  }
  return { parent, parentRow, depth, vertexOf, vertexCount: nodeOf.length, boundaryCount, groups, nodeOf: Int32Array.from(nodeOf) };
}

/** The nodes on the far side of a row of a tree: the child's end of it and all that hangs from there. */
export function nodesBelow({ parent, parentRow }: GivenTree, row: number): Set<number> {
  const below = new Set<number>();
  const isBelow = (node: number): boolean => {
    for (let at = node; at >= 0; at = parent[at] ?? -1) {
      if (below.has(at) || parentRow[at] === row) return true;
    }
    return false;
  };
  for (let node = 0; node < parent.length; node++) if (isBelow(node)) below.add(node);
  return below;
}
