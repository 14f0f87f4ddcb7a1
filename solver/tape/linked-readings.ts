import { isAdmittance } from './admittances';
import { isGivenVoltage, nodesBelow } from './given-tree';
import type { CoreLayout } from './linked-tape';
import { MeshSolution } from './mesh-tape';
import type { AdjointReadings, Drive, DriveReadings, OutputWeights, Probe, SignedRow } from './network-tape';
import type { Value } from './tape-builder';
import { isZero, negative, ZERO } from './tape-builder';

/** What stands on the right-hand side of the core's current laws: minus what sources carry away from each of its nodes. */
function rightOfNodes(layout: CoreLayout, solution: MeshSolution): Value[] {
  const { knownCount, coreCount, inputs } = layout;
  const { builder } = inputs;
  return Array.from({ length: coreCount }, (_, place) => {
    const one = knownCount + place;
    const flows: Value[] = [];
    for (let other = 0; other < knownCount + coreCount; other++) {
      if (other !== one) flows.push(negative(solution.sourceFlow(one, other)));
    }
    return builder.sum(flows.filter((flow) => !isZero(flow)));
  });
}

function ends({ network }: CoreLayout, row: number): readonly [number, number] {
  return [network.first[row] ?? 0, network.second[row] ?? 0];
}

function addCurrent({ mesh }: CoreLayout, currents: Map<number, Value>, from: number, to: number, current: Value): void {
  if (from === to || isZero(current)) return;
  const slot = mesh.graph.slot(from, to);
  const known = currents.get(slot) ?? ZERO;
  currents.set(slot, mesh.builder.add(known, from < to ? current : negative(current)));
}

function currentsOf(layout: CoreLayout, probes: readonly Probe[]): Map<number, Value> {
  const currents = new Map<number, Value>();
  const vertex = (node: number): number => layout.vertexOf[node] ?? 0;
  for (const { into, outOf, current } of probes) addCurrent(layout, currents, vertex(outOf), vertex(into), current);
  return currents;
}

/** The readings of one drive of a network with linked ports. */
export class LinkedReadings implements DriveReadings {
  private readonly x: readonly Value[];
  private readonly solution: MeshSolution;
  private readonly isLive: boolean;

  constructor(
    private readonly layout: CoreLayout,
    drive: Drive,
  ) {
    this.isLive = drive === 'sources';
    const { network, vertexOf, inputs, unknownOf, terms, knownEntries } = layout;
    const { builder } = inputs;
    const currents = currentsOf(layout, drive === 'sources' ? [] : drive);
    if (this.isLive) {
      for (const [row, law] of network.laws.entries()) {
        const [a, b] = ends(layout, row);
        if (law.law === 'current') addCurrent(layout, currents, vertexOf[a] ?? 0, vertexOf[b] ?? 0, inputs.phasor(row));
      }
    }
    this.solution = new MeshSolution(layout.mesh, { currents, between: (one, other) => this.betweenKept(one, other) });
    const right = rightOfNodes(layout, this.solution);
    for (const [row, unknown] of unknownOf) {
      right[unknown] = isGivenVoltage(network, row) ? this.phasor(row) : ZERO;
      for (const { coefficient, of, row: port } of terms.get(row) ?? []) {
        if (of !== 'current' || network.laws[port]?.law !== 'current') continue;
        right[unknown] = builder.mulSub(right[unknown] ?? ZERO, coefficient, this.phasor(port));
      }
    }
    for (const [row, known, value] of knownEntries) {
      right[row] = builder.mulSub(right[row] ?? ZERO, value, this.knownVoltage(known));
    }
    this.x = layout.core.solve(right);
  }

  wantVoltage(one: number, other: number): void {
    this.solution.want(this.vertex(one), this.vertex(other));
  }

  wantCurrent(row: number): void {
    for (const { row: part } of this.partsOfCurrent(row)) {
      if (isAdmittance(this.layout.network.laws[part])) this.wantVoltage(...ends(this.layout, part));
    }
  }

  solve(): void {
    this.solution.solve();
  }

  voltage(one: number, other: number): Value {
    return this.solution.between(this.vertex(one), this.vertex(other));
  }

  current(row: number): Value {
    const { network, admittances, unknownOf, inputs } = this.layout;
    const law = network.laws[row];
    const unknown = unknownOf.get(row);
    if (unknown !== undefined) return this.x[unknown] ?? ZERO;
    if (isAdmittance(law)) return inputs.builder.mul(admittances.of(row), this.voltage(...ends(this.layout, row)));
    if (law?.law === 'current') return this.phasor(row);
    if (!isGivenVoltage(network, row)) return ZERO;
    return inputs.builder.sum(
      this.leaving(row).map(({ row: part, sign }) => (sign < 0 ? negative(this.current(part)) : this.current(part))),
    );
  }

  partsOfCurrent(row: number): readonly SignedRow[] {
    const { network, unknownOf } = this.layout;
    const isPart = (part: number): boolean => isAdmittance(network.laws[part]) || unknownOf.has(part);
    if (isPart(row)) return [{ row, sign: 1 }];
    return isGivenVoltage(network, row) ? this.leaving(row).filter(({ row: part }) => isPart(part)) : [];
  }

  /** The rows that lead out of the far side of a given voltage of the reference's tree, by their part in its current. */
  private leaving(row: number): readonly SignedRow[] {
    const { network, tree, unknownOf } = this.layout;
    const below = nodesBelow(tree, row);
    const isFirstBelow = below.has(network.first[row] ?? 0);
    const rows: SignedRow[] = [];
    for (let part = 0; part < network.rowCount; part++) {
      if (isGivenVoltage(network, part) && !unknownOf.has(part)) continue;
      const [a, b] = ends(this.layout, part);
      if (below.has(a) !== below.has(b)) rows.push({ row: part, sign: below.has(a) === isFirstBelow ? -1 : 1 });
    }
    return rows;
  }

  private phasor(row: number): Value {
    return this.isLive ? this.layout.inputs.phasor(row) : ZERO;
  }

  private vertex(node: number): number {
    return this.layout.vertexOf[node] ?? 0;
  }

  private betweenKept(one: number, other: number): Value {
    return this.layout.inputs.builder.sub(this.keptVoltage(one), this.keptVoltage(other));
  }

  private keptVoltage(vertex: number): Value {
    const { knownCount } = this.layout;
    return vertex < knownCount ? this.knownVoltage(vertex) : (this.x[vertex - knownCount] ?? ZERO);
  }

  /** The voltage of a vertex of the reference's tree. */
  private knownVoltage(vertex: number): Value {
    if (!this.isLive) return ZERO;
    const { tree, network, inputs } = this.layout;
    let total = ZERO;
    for (let node = tree.nodeOf[vertex] ?? 0; (tree.parent[node] ?? -1) >= 0; node = tree.parent[node] ?? 0) {
      const row = tree.parentRow[node] ?? 0;
      const source = inputs.phasor(row);
      total = inputs.builder.add(total, network.first[row] === node ? source : negative(source));
    }
    return total;
  }
}

/** The adjoint of an output of a network with linked ports: the transposed system with the output's weights. */
export class LinkedAdjoint implements AdjointReadings {
  private readonly z: readonly Value[];
  private readonly solution: MeshSolution;

  constructor(
    private readonly layout: CoreLayout,
    { probes, currents: weights }: OutputWeights,
  ) {
    const { mesh, unknownOf, core } = layout;
    const currents = currentsOf(layout, probes);
    this.solution = new MeshSolution(mesh, { currents, between: (one, other) => this.betweenKept(one, other) });
    const right = rightOfNodes(layout, this.solution);
    for (const [row, unknown] of unknownOf) right[unknown] = weights.get(row) ?? ZERO;
    this.z = core.solveTransposed(right);
  }

  wantVoltage(one: number, other: number): void {
    this.solution.want(this.vertex(one), this.vertex(other));
  }

  solve(): void {
    this.solution.solve();
  }

  voltage(one: number, other: number): Value {
    return this.solution.between(this.vertex(one), this.vertex(other));
  }

  elsewhere(row: number, readings: DriveReadings): Value {
    const { terms, inputs } = this.layout;
    const { builder } = inputs;
    let total = ZERO;
    for (const [equation, of] of terms) {
      for (const term of of) {
        if (term.of !== 'current' || term.row !== row) continue;
        const effect = builder.mul(this.multiplier(equation), term.coefficient);
        total = builder.mulSub(total, effect, readings.voltage(...ends(this.layout, row)));
      }
    }
    return total;
  }

  slope(readings: DriveReadings): Value {
    const { terms, inputs } = this.layout;
    const { builder } = inputs;
    let total = ZERO;
    for (const [equation, of] of terms) {
      let sum = ZERO;
      for (const { slope, of: kind, row } of of) {
        if (isZero(slope)) continue;
        const quantity = kind === 'voltage' ? readings.voltage(...ends(this.layout, row)) : readings.current(row);
        sum = builder.mulAdd(sum, slope, quantity);
      }
      if (!isZero(sum)) total = builder.mulSub(total, this.multiplier(equation), sum);
    }
    return total;
  }

  /** What the output gains from one more on the right-hand side of a row's equation. */
  private multiplier(row: number): Value {
    return this.z[this.layout.unknownOf.get(row) ?? -1] ?? ZERO;
  }

  private vertex(node: number): number {
    return this.layout.vertexOf[node] ?? 0;
  }

  private betweenKept(one: number, other: number): Value {
    const { knownCount, inputs } = this.layout;
    const of = (vertex: number): Value => (vertex < knownCount ? ZERO : (this.z[vertex - knownCount] ?? ZERO));
    return inputs.builder.sub(of(one), of(other));
  }
}
