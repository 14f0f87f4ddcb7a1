import type { Network } from '../analysis/network';
import type { Admittances } from './admittances';
import { isAdmittance } from './admittances';
import type { GivenTree } from './given-tree';
import { isGivenVoltage, nodesBelow } from './given-tree';
import type { Excitation, MeshTape } from './mesh-tape';
import { MeshSolution } from './mesh-tape';
import type { NetworkInputs } from './network-inputs';
import type { Drive, DriveReadings, Probe, SignedRow } from './network-tape';
import type { Value } from './tape-builder';
import { isZero, negative, ZERO } from './tape-builder';

/** The readings of one drive of a network of admittances. */
export class NodalReadings implements DriveReadings {
  private readonly solution: MeshSolution;
  private readonly isLive: boolean;

  constructor(
    private readonly network: Network,
    private readonly inputs: NetworkInputs,
    private readonly tree: GivenTree,
    private readonly mesh: MeshTape,
    drive: Drive,
    private readonly admittances: Admittances,
  ) {
    this.isLive = drive === 'sources';
    const currents = drive === 'sources' ? this.ownCurrents() : this.probeCurrents(drive);
    const excitation: Excitation = {
      currents,
      between: (one, other) => this.along(tree.nodeOf[one] ?? 0, tree.nodeOf[other] ?? 0),
    };
    this.solution = new MeshSolution(mesh, excitation);
  }

  wantVoltage(one: number, other: number): void {
    this.solution.want(this.vertex(one), this.vertex(other));
  }

  wantCurrent(row: number): void {
    for (const { row: part } of this.partsOf(row) ?? [{ row }]) {
      if (isAdmittance(this.network.laws[part])) this.wantVoltage(...this.ends(part));
    }
  }

  solve(): void {
    this.solution.solve();
  }

  voltage(one: number, other: number): Value {
    return this.solution.between(this.vertex(one), this.vertex(other));
  }

  current(row: number): Value {
    const { builder } = this.mesh;
    const law = this.network.laws[row];
    if (isAdmittance(law)) return builder.mul(this.admittances.of(row), this.voltage(...this.ends(row)));
    if (law?.law === 'current') return this.phasor(row);
    if (!isGivenVoltage(this.network, row)) return ZERO;
    const parts = this.partsOf(row);
    // What leaves the child's side by all else comes in by the row.
    const below = nodesBelow(this.tree, row);
    const leaving =
      parts === undefined
        ? this.leavingBoundary(below)
        : builder.sum(parts.map(({ row: part, out }) => (out ? this.current(part) : negative(this.current(part)))));
    return below.has(this.network.first[row] ?? 0) ? negative(leaving) : leaving;
  }

  partsOfCurrent(row: number): readonly SignedRow[] {
    const { network } = this;
    if (isAdmittance(network.laws[row])) return [{ row, sign: 1 }];
    if (!isGivenVoltage(network, row)) return [];
    const below = nodesBelow(this.tree, row);
    const isFirstBelow = below.has(network.first[row] ?? 0);
    return this.leaving(below)
      .filter(({ row: part }) => isAdmittance(network.laws[part]))
      .map(({ row: part, out }) => ({ row: part, sign: out === isFirstBelow ? -1 : 1 }));
  }

  /**
   * The rows by which current leaves the far side of a row of given voltage. Undefined where the far side is made of
   * whole vertices of the boundary: then what the elimination has left between those tells it.
   */
  private partsOf(row: number): readonly { readonly row: number; readonly out: boolean }[] | undefined {
    const { network, tree } = this;
    if (!isGivenVoltage(network, row)) return undefined;
    const below = nodesBelow(tree, row);
    const [one, other] = this.ends(row);
    const isBoundary = this.vertex(one) < tree.boundaryCount;
    if (isBoundary && this.vertex(one) !== this.vertex(other)) return undefined;
    return this.leaving(below);
  }

  /** The rows, but those of given voltage, that lead out of a set of nodes. */
  private leaving(below: ReadonlySet<number>): readonly { readonly row: number; readonly out: boolean }[] {
    const { network } = this;
    const parts: { row: number; out: boolean }[] = [];
    for (let part = 0; part < network.rowCount; part++) {
      if (isGivenVoltage(network, part)) continue;
      const [a, b] = this.ends(part);
      if (below.has(a) !== below.has(b)) parts.push({ row: part, out: below.has(a) });
    }
    return parts;
  }

  private leavingBoundary(below: ReadonlySet<number>): Value {
    const { tree, mesh, solution } = this;
    const inside = new Set(Array.from(below, (node) => this.vertex(node)));
    const flows: Value[] = [];
    for (const one of inside) {
      for (let other = 0; other < tree.boundaryCount; other++) {
        if (!inside.has(other)) flows.push(solution.boundaryCurrent(one, other));
      }
    }
    return mesh.builder.sum(flows);
  }

  private ownCurrents(): Map<number, Value> {
    const { network, mesh } = this;
    const currents = new Map<number, Value>();
    for (let row = 0; row < network.rowCount; row++) {
      const law = network.laws[row];
      const [a, b] = this.ends(row);
      if (this.vertex(a) === this.vertex(b)) continue;
      if (law?.law === 'current') addCurrent(mesh, currents, this.vertex(a), this.vertex(b), this.phasor(row));
    }
    return currents;
  }

  private probeCurrents(probes: readonly Probe[]): Map<number, Value> {
    const currents = new Map<number, Value>();
    for (const { into, outOf, current } of probes) {
      addCurrent(this.mesh, currents, this.vertex(outOf), this.vertex(into), current);
    }
    return currents;
  }

  private phasor(row: number): Value {
    return this.isLive ? this.inputs.phasor(row) : ZERO;
  }

  private ends(row: number): readonly [number, number] {
    return [this.network.first[row] ?? 0, this.network.second[row] ?? 0];
  }

  private vertex(node: number): number {
    return this.tree.vertexOf[node] ?? 0;
  }

  /** v(one) − v(other) along a tree, by the path between them alone. */
  private along(one: number, other: number): Value {
    if (!this.isLive) return ZERO;
    const { parent, parentRow, depth } = this.tree;
    const { builder } = this.mesh;
    let [a, b] = [one, other];
    let total = ZERO;
    while (a !== b) {
      const climbsA = (depth[a] ?? 0) >= (depth[b] ?? 0);
      const node = climbsA ? a : b;
      const row = parentRow[node] ?? 0;
      const source = this.inputs.phasor(row);
      total = builder.add(total, (this.network.first[row] === node) === climbsA ? source : negative(source));
      if (climbsA) a = parent[node] ?? 0;
      else b = parent[node] ?? 0;
    }
    return total;
  }
}

/** Adds a current from one vertex to another; the graph has to have the slot before the elimination, or keep it last. */
function addCurrent(mesh: MeshTape, currents: Map<number, Value>, from: number, to: number, current: Value): void {
  if (from === to || isZero(current)) return;
  const slot = mesh.graph.slot(from, to);
  const known = currents.get(slot) ?? ZERO;
  currents.set(slot, mesh.builder.add(known, from < to ? current : negative(current)));
}
