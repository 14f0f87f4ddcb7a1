import { DisjointSets } from '../linear/disjoint-sets';
import type { Network } from '../analysis/network';
import type { Law, Tabulated } from '../elements/law';
import type { GivenTree } from './given-tree';
import { growTrees, isGivenVoltage, nodesBelow } from './given-tree';
import type { OrderWishes } from './mesh-graph';
import { MeshGraph, orderElimination } from './mesh-graph';
import type { Excitation } from './mesh-tape';
import { MeshSolution, MeshTape } from './mesh-tape';
import type { NetworkInputs } from './network-inputs';
import { weakestPivot } from './pivot-strength';
import type { TapeBuilder, Value } from './tape-builder';
import { isZero, negative, NOTHING, ZERO } from './tape-builder';

/** A pair of nodes, and the current, in amperes, that comes into the first from outside and leaves by the second. */
export interface Probe {
  readonly into: number;
  readonly outOf: number;
  readonly current: Value;
}

/** What drives the network: its own sources, or, those dead, currents from outside. */
export type Drive = 'sources' | readonly Probe[];

/** One drive's readings on the tape: first all that will be read is asked for, then `solve`, then it is read. */
export interface DriveReadings {
  wantVoltage(one: number, other: number): void;
  wantCurrent(row: number): void;
  solve(): void;
  /** The voltage of one node over another. */
  voltage(one: number, other: number): Value;
  /** The current through a row from its first node to its second. */
  current(row: number): Value;
  /** Admittances, each with the sign of its current in that of the row: their sum and given currents make it up. */
  admittancesOf(row: number): readonly { readonly row: number; readonly sign: 1 | -1 }[];
}

/** What a network is compiled for. */
export interface TapeWishes {
  /** Nodes between which outputs are asked for: they stay longest. */
  readonly last: readonly number[];
  /** Pairs of nodes at which drives from outside will be put. */
  readonly probed: readonly (readonly [number, number])[];
  /** Frequencies, hertz, at which no pivot may be weak; none for the usual order. */
  readonly samples: readonly number[];
}

/** A pivot of less than this part of its terms is one to be put off, if that gives a better one. */
const STRONG_PIVOT = 0.1;
const MOST_POSTPONED = 8;

/** A network of admittances and independent sources, by nodes, on a tape. */
export class NodalTape {
  readonly builder: TapeBuilder;
  private readonly mesh: MeshTape;
  private readonly rowsOfSlot: (number[] | undefined)[] = [];
  private readonly admittances = new Map<number, Value>();

  /**
   * The tape of a network; undefined where it has other elements, loops of given voltages, or a part that no
   * admittance ties to the reference.
   */
  static of(network: Network, inputs: NetworkInputs, wishes: TapeWishes): NodalTape | undefined {
    if (network.laws.some(({ law }) => law === 'equation')) return undefined;
    const tree = growTrees(network);
    if (tree === undefined || !isGrounded(network, tree)) return undefined;
    return new NodalTape(network, inputs, tree, wishes);
  }

  private constructor(
    readonly network: Network,
    readonly inputs: NetworkInputs,
    private readonly tree: GivenTree,
    wishes: TapeWishes,
  ) {
    this.builder = inputs.builder;
    const { vertexOf, boundaryCount } = tree;
    const last = new Set(wishes.last.map((node) => vertexOf[node] ?? 0).filter((vertex) => vertex >= boundaryCount));
    const strengths = this.strengths();
    const groups = tree.groups.map((group) => strongestFirst(group, strengths));
    const postponed = this.postponedAt(wishes, { last, groups });
    const graph = this.graphOf(wishes);
    const order = orderElimination(graph, { last: new Set([...last, ...postponed]), groups });
    this.mesh = new MeshTape(this.builder, graph, (slot) => this.admittanceOfSlot(slot), order, groups);
  }

  /** The graph of the vertices; what stands in its slots is written to `rowsOfSlot`, the same each time. */
  private graphOf({ probed }: TapeWishes): MeshGraph {
    const { network, tree } = this;
    const { first, second, rowCount } = network;
    const { vertexOf, vertexCount, boundaryCount } = tree;
    const graph = new MeshGraph(vertexCount, boundaryCount);
    this.rowsOfSlot.length = 0;
    for (let row = 0; row < rowCount; row++) {
      const one = vertexOf[first[row] ?? 0] ?? 0;
      const other = vertexOf[second[row] ?? 0] ?? 0;
      if (one === other || isGivenVoltage(network, row) || network.laws[row]?.law === 'open') continue;
      const slot = graph.slot(one, other);
      if (isAdmittance(network.laws[row])) (this.rowsOfSlot[slot] ??= []).push(row);
    }
    for (const [a, b] of probed) {
      const [one, other] = [vertexOf[a] ?? 0, vertexOf[b] ?? 0];
      if (one !== other) graph.slot(one, other);
    }
    return graph;
  }

  /** The vertices to put off so that pivots are strong at the samples: the weakest, again and again, while that helps. */
  private postponedAt(wishes: TapeWishes, { last, groups }: OrderWishes): ReadonlySet<number> {
    let best: ReadonlySet<number> = new Set<number>();
    if (wishes.samples.length === 0) return best;
    let bestStrength = -1;
    const postponed = new Set<number>();
    for (let attempt = 0; attempt <= MOST_POSTPONED; attempt++) {
      const graph = this.graphOf(wishes);
      const order = orderElimination(graph, { last: new Set([...last, ...postponed]), groups });
      let weakest = { vertex: -1, strength: 1 };
      for (const frequency of wishes.samples) {
        const { re, im } = this.numbersAt(frequency);
        const found = weakestPivot(graph, order, re, im);
        if (found.strength < weakest.strength) weakest = found;
      }
      if (weakest.strength > bestStrength) {
        bestStrength = weakest.strength;
        best = new Set(postponed);
      }
      if (bestStrength >= STRONG_PIVOT || postponed.has(weakest.vertex)) break;
      postponed.add(weakest.vertex);
    }
    return best;
  }

  /** The admittances of the slots at a frequency, in numbers. */
  private numbersAt(frequency: number): { re: number[]; im: number[] } {
    const re: number[] = [];
    const im: number[] = [];
    for (const [slot, rows] of this.rowsOfSlot.entries()) {
      let [sumRe, sumIm] = [0, 0];
      for (const row of rows ?? []) {
        const [r, i] = admittanceAt(this.network.laws[row], frequency);
        sumRe += r;
        sumIm += i;
      }
      re[slot] = sumRe;
      im[slot] = sumIm;
    }
    return { re, im };
  }

  /**
   * How strongly each vertex is tied to others, roughly, at a frequency in the middle of the network's own: the small
   * voltage across a strong tie would come out as a difference of large ones, were its vertex not the one that others
   * are joined to.
   */
  private strengths(): Float64Array {
    const { laws, first, second } = this.network;
    const omega = middleOf(laws);
    const strengths = new Float64Array(this.tree.vertexCount);
    for (const [row, law] of laws.entries()) {
      const one = this.tree.vertexOf[first[row] ?? 0] ?? 0;
      const other = this.tree.vertexOf[second[row] ?? 0] ?? 0;
      const size = sizeOf(law, omega);
      strengths[one] = (strengths[one] ?? 0) + size;
      strengths[other] = (strengths[other] ?? 0) + size;
    }
    return strengths;
  }

  /** Readings of a drive. */
  drive(drive: Drive): DriveReadings {
    return new NodalReadings(this.network, this.inputs, this.tree, this.mesh, drive, (row) => this.admittanceOf(row));
  }

  /** The admittance of a row. */
  admittanceOf(row: number): Value {
    const known = this.admittances.get(row);
    if (known !== undefined) return known;
    const value = this.sumOf([row]);
    this.admittances.set(row, value);
    return value;
  }

  /** s·dy/ds of a row: y for a capacitor, −y for an inductor, and for a table what its curve does at the frequency. */
  logarithmicSlope(row: number): Value {
    const { builder } = this;
    switch (this.network.laws[row]?.law) {
      case 'capacitance':
        return this.admittanceOf(row);
      case 'inductance':
        return negative(this.admittanceOf(row));
      case 'impedance': {
        const y = this.admittanceOf(row);
        const slope = this.inputs.functionOf(row, (law) => logarithmicSlopeOf(tableOf(law)));
        return negative(builder.mul(builder.mul(y, y), slope));
      }
      default:
        return ZERO;
    }
  }

  private admittanceOfSlot(slot: number): Value {
    const rows = this.rowsOfSlot[slot] ?? [];
    return rows.length === 1 ? this.admittanceOf(rows[0] ?? 0) : this.sumOf(rows);
  }

  /** G + j(ωC − Γ/ω) of rows in parallel, each kind summed before the frequency comes in; and what comes from tables. */
  private sumOf(rows: readonly number[]): Value {
    const { builder, inputs, network } = this;
    let [conductance, capacitance, inverseInductance] = [NOTHING, NOTHING, NOTHING];
    let rest = ZERO;
    for (const row of rows) {
      switch (network.laws[row]?.law) {
        case 'resistance': {
          const r = inputs.scalar(row, 'R', (law) => (law.law === 'resistance' ? law.resistance : NaN));
          conductance = builder.addParts(conductance, builder.reciprocal({ re: r, im: NOTHING }).re);
          break;
        }
        case 'capacitance': {
          const c = inputs.scalar(row, 'C', (law) => (law.law === 'capacitance' ? law.capacitance : NaN));
          capacitance = builder.addParts(capacitance, c);
          break;
        }
        case 'inductance': {
          const l = inputs.scalar(row, 'L', (law) => (law.law === 'inductance' ? law.inductance : NaN));
          inverseInductance = builder.addParts(inverseInductance, builder.reciprocal({ re: l, im: NOTHING }).re);
          break;
        }
        case 'impedance':
          rest = builder.add(rest, builder.reciprocal(inputs.functionOf(row, tableOf)));
          break;
        default:
          break;
      }
    }
    const im = builder.addDot(NOTHING, inputs.omega, capacitance, -inputs.inverseOmega, inverseInductance);
    return builder.add({ re: conductance, im }, rest);
  }
}

/** |y| of a law at an angular frequency; nothing for one that is no admittance or not known by a number. */
function sizeOf(law: Law, omega: number): number {
  switch (law.law) {
    case 'resistance':
      return Math.abs(1 / law.resistance);
    case 'capacitance':
      return Math.abs(omega * law.capacitance);
    case 'inductance':
      return Math.abs(1 / (omega * law.inductance));
    default:
      return 0;
  }
}

/** An angular frequency at which reactances are of the size of resistances, by the means of their logarithms. */
function middleOf(laws: readonly Law[]): number {
  const mean = (values: readonly number[]): number | undefined =>
    values.length === 0 ? undefined : values.reduce((sum, value) => sum + Math.log(Math.abs(value)), 0) / values.length;
  const r = mean(laws.flatMap((law) => (law.law === 'resistance' ? [law.resistance] : [])));
  const c = mean(laws.flatMap((law) => (law.law === 'capacitance' ? [law.capacitance] : [])));
  const l = mean(laws.flatMap((law) => (law.law === 'inductance' ? [law.inductance] : [])));
  if (c !== undefined && l !== undefined) return Math.exp(-(c + l) / 2);
  if (c !== undefined) return Math.exp(-c - (r ?? 0));
  return l === undefined ? 1 : Math.exp((r ?? 0) - l);
}

function strongestFirst(group: readonly number[], strengths: Float64Array): number[] {
  return [...group].sort((one, other) => (strengths[other] ?? 0) - (strengths[one] ?? 0));
}

function admittanceAt(law: Law | undefined, frequency: number): readonly [number, number] {
  const omega = 2 * Math.PI * frequency;
  switch (law?.law) {
    case 'resistance':
      return [1 / law.resistance, 0];
    case 'capacitance':
      return [0, omega * law.capacitance];
    case 'inductance':
      return [0, -1 / (omega * law.inductance)];
    case 'impedance': {
      const [re, im] = law.at(frequency) ?? [1, 0];
      const square = re * re + im * im;
      return [re / square, -im / square];
    }
    default:
      return [0, 0];
  }
}

function tableOf(law: Law): Tabulated | undefined {
  return law.law === 'impedance' ? law.at : undefined;
}

/** A step in ln f that stays within a table's interval, and is far above rounding. */
const STEP = 1e-6;

/** dZ/d(ln f). A table is linear in ln f between its points, so the difference quotient within an interval is exact. */
function logarithmicSlopeOf(table: Tabulated | undefined): Tabulated | undefined {
  if (table === undefined) return undefined;
  return (frequency) => {
    const here = table(frequency);
    if (here === undefined) return undefined;
    const above = table(frequency * (1 + STEP));
    const there = above ?? table(frequency * (1 - STEP));
    if (there === undefined) return undefined;
    const span = Math.log1p(above === undefined ? -STEP : STEP);
    return [(there[0] - here[0]) / span, (there[1] - here[1]) / span];
  };
}

function isAdmittance(law: Law | undefined): boolean {
  switch (law?.law) {
    case 'resistance':
    case 'capacitance':
    case 'inductance':
    case 'impedance':
      return true;
    default:
      return false;
  }
}

/** Whether admittances and given voltages tie every node to the reference. */
function isGrounded({ laws, first, second, rowCount }: Network, { vertexOf, vertexCount, boundaryCount }: GivenTree): boolean {
  const tied = new DisjointSets(vertexCount);
  for (let vertex = 1; vertex < boundaryCount; vertex++) tied.union(0, vertex);
  for (let row = 0; row < rowCount; row++) {
    if (isAdmittance(laws[row])) tied.union(vertexOf[first[row] ?? 0] ?? 0, vertexOf[second[row] ?? 0] ?? 0);
  }
  for (let vertex = 0; vertex < vertexCount; vertex++) if (tied.find(vertex) !== tied.find(0)) return false;
  return true;
}

class NodalReadings implements DriveReadings {
  private readonly solution: MeshSolution;
  private readonly isLive: boolean;

  constructor(
    private readonly network: Network,
    private readonly inputs: NetworkInputs,
    private readonly tree: GivenTree,
    private readonly mesh: MeshTape,
    drive: Drive,
    private readonly admittanceOf: (row: number) => Value,
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
    if (isAdmittance(law)) return builder.mul(this.admittanceOf(row), this.voltage(...this.ends(row)));
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

  admittancesOf(row: number): readonly { readonly row: number; readonly sign: 1 | -1 }[] {
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
