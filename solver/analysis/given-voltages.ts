import type { BranchTable } from '../elements/branch-table';
import type { Network } from './network';
import type { Structure, VoltageLoop } from './structure';

/** A complex value that is written into, so that loops make no objects. */
export interface MutableComplex {
  re: number;
  im: number;
}

/**
 * v(one) − v(other) along the forest of given voltages, for two nodes of one of its trees. Summed only over the path
 * between them, so what both have in common does not enter and cannot round.
 */
export function pathVoltage(
  { first }: Network,
  structure: Structure,
  branches: BranchTable,
  one: number,
  other: number,
  into: MutableComplex,
): void {
  const { parent, parentRow, depth } = structure;
  let a = one;
  let b = other;
  let re = 0;
  let im = 0;
  while (a !== b) {
    const climbsA = (depth[a] ?? 0) >= (depth[b] ?? 0);
    const node = climbsA ? a : b;
    const row = parentRow[node] ?? 0;
    const sign = (first[row] === node) === climbsA ? 1 : -1;
    re += sign * (branches.sRe[row] ?? 0);
    im += sign * (branches.sIm[row] ?? 0);
    if (climbsA) a = parent[node] ?? 0;
    else b = parent[node] ?? 0;
  }
  into.re = re;
  into.im = im;
}

/** Sums of given values agree when they differ by no more than rounding of what they are sums of. */
export const AGREES_WITHIN = 8 * Number.EPSILON;

/** Whether the given voltages of a loop add up to zero. */
export function loopAgrees(network: Network, structure: Structure, branches: BranchTable, loop: VoltageLoop): boolean {
  const { closing, path } = loop;
  const around = { re: 0, im: 0 };
  pathVoltage(network, structure, branches, network.first[closing] ?? 0, network.second[closing] ?? 0, around);
  let size = sizeOf(branches, closing);
  for (const row of path) size += sizeOf(branches, row);
  const off = Math.hypot(around.re - (branches.sRe[closing] ?? 0), around.im - (branches.sIm[closing] ?? 0));
  return off <= AGREES_WITHIN * size;
}

/** Whether the given currents that leave a component add up to zero. */
export function currentsAgree(net: MutableComplex, size: number): boolean {
  return Math.hypot(net.re, net.im) <= AGREES_WITHIN * size;
}

function sizeOf(branches: BranchTable, row: number): number {
  return Math.hypot(branches.sRe[row] ?? 0, branches.sIm[row] ?? 0);
}
