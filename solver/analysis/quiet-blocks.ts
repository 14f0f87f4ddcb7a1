import type { BranchTable } from '../elements/branch-table';
import { ADMITTANCE, EQUATION, GIVEN_CURRENT } from '../elements/branch-table';
import type { Network } from './network';
import type { Readings } from './readings';

/**
 * Sets to nothing, exactly, the currents that can only be nothing, where the elimination left rounding in their place.
 *
 * By Kirchhoff's law no net current crosses from one block (biconnected component) of the network to another through
 * the node that joins them, so each block is a network of its own. An element that is a block by itself lies in no loop
 * and carries no current; a block without a live source has neither currents nor voltages. What is not determined stays
 * so: a lossless loop at its own resonance may carry any current.
 *
 * @param holds whether Kirchhoff's laws hold all over the island of a node; where given values contradict each other
 *   they do not, and nothing follows from them.
 *
 * Method: blocks by depth-first search, J. Hopcroft and R. Tarjan, "Algorithm 447: efficient algorithms for graph
 * manipulation", Communications of the ACM 16 (1973) 372–378. Linear in the number of elements.
 */
export function silenceQuietBlocks(
  network: Network,
  branches: BranchTable,
  readings: Readings,
  holds: (node: number) => boolean,
): void {
  for (const block of findBlocks(network, branches)) {
    const [only] = block;
    if (only === undefined || !holds(network.first[only] ?? 0)) continue;
    if (block.length === 1) {
      // A given current that lies in no loop contradicts itself; what is given is not touched here.
      if (branches.form[only] !== GIVEN_CURRENT) silence(only, branches, readings);
    } else if (!block.some((row) => isLive(row, branches))) {
      for (const row of block) silence(row, branches, readings);
    }
  }
}

/** Whether a row may drive others. One with an equation may, by what drives the rows that stand in it. */
function isLive(row: number, branches: BranchTable): boolean {
  return branches.form[row] === EQUATION || (branches.form[row] !== ADMITTANCE && !branches.isGivenZero(row));
}

function silence(row: number, branches: BranchTable, readings: Readings): void {
  if (readings.iKnown[row] === 1) {
    readings.iRe[row] = 0;
    readings.iIm[row] = 0;
  }
  if (branches.form[row] === ADMITTANCE && readings.dKnown[row] === 1) {
    readings.dRe[row] = 0;
    readings.dIm[row] = 0;
  }
}

/** The rows of each block. Open circuits join nothing and are left out; so are elements with both ends on one node. */
function findBlocks({ first, second, nodeNames }: Network, branches: BranchTable): number[][] {
  const incident: number[][] = nodeNames.map(() => []);
  for (let row = 0; row < first.length; row++) {
    const a = first[row] ?? 0;
    const b = second[row] ?? 0;
    if (a === b || (branches.form[row] === GIVEN_CURRENT && branches.isGivenZero(row))) continue;
    incident[a]?.push(row);
    incident[b]?.push(row);
  }
  const blocks: number[][] = [];
  const order = new Int32Array(nodeNames.length);
  const low = new Int32Array(nodeNames.length);
  const next = new Int32Array(nodeNames.length);
  const seen = new Uint8Array(first.length);
  const rows: number[] = [];
  let count = 0;
  for (let root = 0; root < nodeNames.length; root++) {
    if (order[root] !== 0) continue;
    order[root] = low[root] = ++count;
    // Explicit stacks: a ladder of thousands of sections would be as deep as that in calls.
    const path = [root];
    const entered: number[] = [];
    while (path.length > 0) {
      const node = path[path.length - 1] ?? root;
      const row = incident[node]?.[next[node] ?? 0];
      if (row !== undefined) {
        next[node] = (next[node] ?? 0) + 1;
        if (seen[row] === 1) continue;
        seen[row] = 1;
        rows.push(row);
        const other = first[row] === node ? (second[row] ?? 0) : (first[row] ?? 0);
        if (order[other] === 0) {
          order[other] = low[other] = ++count;
          path.push(other);
          entered.push(row);
        } else {
          low[node] = Math.min(low[node] ?? 0, order[other] ?? 0);
        }
        continue;
      }
      path.pop();
      const above = path[path.length - 1];
      const by = entered.pop();
      if (above === undefined || by === undefined) continue;
      low[above] = Math.min(low[above] ?? 0, low[node] ?? 0);
      if ((low[node] ?? 0) < (order[above] ?? 0)) continue;
      const start = rows.lastIndexOf(by);
      blocks.push(rows.splice(start));
    }
  }
  return blocks;
}
