import type { BranchTable } from '../elements/branch-table';
import type { Network } from './network';
import type { Readings } from './readings';
import type { Component, Structure } from './structure';

/** A current, and the sum of the sizes it was summed from: what its rounding is to be measured against. */
class Sum {
  re = 0;
  im = 0;
  size = 0;

  add(re: number, im: number): void {
    this.re += re;
    this.im += im;
    this.size += Math.abs(re) + Math.abs(im);
  }

  include(other: Sum): void {
    this.re += other.re;
    this.im += other.im;
    this.size += other.size;
  }
}

/**
 * Reads the rows of given voltage: their voltages as given, their currents by Kirchhoff's current law. A row of the
 * forest parts its tree in two; the current law holds for both parts, and the part in which less was summed up rounds
 * less (a large current that only circulates at one end of a source does not blur the source's own). A row that closes
 * a loop gets no current, which is one of the many that are possible.
 */
export function readGivenVoltages(
  network: Network,
  structure: Structure,
  component: Component,
  branches: BranchTable,
  readings: Readings,
): void {
  const { first, second } = network;
  const loopRows = component.loops.map(({ closing }) => closing);
  for (const row of [...component.treeVoltages, ...loopRows]) {
    readings.dRe[row] = branches.sRe[row] ?? 0;
    readings.dIm[row] = branches.sIm[row] ?? 0;
    readings.iRe[row] = 0;
    readings.iIm[row] = 0;
  }
  if (component.treeVoltages.length === 0) return;

  const childOf = (row: number): number => {
    const a = first[row] ?? 0;
    return structure.parentRow[a] === row ? a : (second[row] ?? 0);
  };
  const own = sumsAtNodes(network, component, branches, readings);
  const childrenOf = new Map<number, number[]>();
  const below = new Map<number, Sum>();
  for (const row of component.treeVoltages.toReversed()) {
    const child = childOf(row);
    const parent = structure.parent[child] ?? 0;
    below.set(
      child,
      total(
        own.get(child),
        (childrenOf.get(child) ?? []).map((other) => below.get(other)),
      ),
    );
    const siblings = childrenOf.get(parent);
    if (siblings === undefined) childrenOf.set(parent, [child]);
    else siblings.push(child);
  }
  const above = new Map<number, Sum>();
  for (const row of component.treeVoltages) {
    const child = childOf(row);
    const parent = structure.parent[child] ?? 0;
    const siblings = (childrenOf.get(parent) ?? []).filter((other) => other !== child);
    const rest = total(own.get(parent), [above.get(parent), ...siblings.map((other) => below.get(other))]);
    above.set(child, rest);
    const inside = below.get(child) ?? new Sum();
    const byChild = inside.size <= rest.size;
    const { re, im } = byChild ? inside : rest;
    // What leaves a part by its other elements comes into it through the row.
    const intoFirst = (child === first[row]) === byChild;
    readings.iRe[row] = intoFirst ? -re : re;
    readings.iIm[row] = intoFirst ? -im : im;
  }
}

/** What leaves each node that has a given voltage by its other elements. */
function sumsAtNodes(
  { first, second }: Network,
  component: Component,
  branches: BranchTable,
  readings: Readings,
): Map<number, Sum> {
  const sums = new Map<number, Sum>();
  for (const row of component.treeVoltages) {
    for (const node of [first[row] ?? 0, second[row] ?? 0]) sums.set(node, new Sum());
  }
  for (const row of component.admittances) {
    const re = readings.iRe[row] ?? 0;
    const im = readings.iIm[row] ?? 0;
    sums.get(first[row] ?? 0)?.add(re, im);
    sums.get(second[row] ?? 0)?.add(-re, -im);
  }
  const isHere = new Set(component.nodes);
  for (const rows of [component.innerCurrents, component.outerCurrents]) {
    for (const row of rows) {
      const re = branches.sRe[row] ?? 0;
      const im = branches.sIm[row] ?? 0;
      // What goes to another component comes back by the reference node, the root; without one it adds up to zero.
      const endOf = (node: number): number => (isHere.has(node) ? node : (component.nodes[0] ?? 0));
      sums.get(endOf(first[row] ?? 0))?.add(re, im);
      sums.get(endOf(second[row] ?? 0))?.add(-re, -im);
    }
  }
  return sums;
}

function total(own: Sum | undefined, others: readonly (Sum | undefined)[]): Sum {
  const sum = new Sum();
  for (const part of [own, ...others]) if (part !== undefined) sum.include(part);
  return sum;
}
