import type { Network } from '../analysis/network';
import type { Law } from '../elements/law';
import { DisjointSets } from '../linear/disjoint-sets';
import { admittanceAt, Admittances, isAdmittance, sizeOf } from './admittances';
import type { GivenTree } from './given-tree';
import { growTrees, isGivenVoltage } from './given-tree';
import type { OrderWishes } from './mesh-graph';
import { MeshGraph, orderElimination } from './mesh-graph';
import { MeshTape } from './mesh-tape';
import type { NetworkInputs } from './network-inputs';
import type { AdjointReadings, Drive, DriveReadings, NetworkTape, OutputWeights, TapeWishes } from './network-tape';
import { NodalReadings } from './nodal-readings';
import { weakestPivot } from './pivot-strength';
import { ZERO } from './tape-builder';

/** A pivot of less than this part of its terms is one to be put off, if that gives a better one. */
const STRONG_PIVOT = 0.1;
const MOST_POSTPONED = 8;

/** A network of admittances and independent sources, by nodes, on a tape. */
export class NodalTape implements NetworkTape {
  readonly admittances: Admittances;
  private readonly mesh: MeshTape;
  private readonly rowsOfSlot: (number[] | undefined)[] = [];

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
    this.admittances = new Admittances(network, inputs);
    const { vertexOf, boundaryCount } = tree;
    const last = new Set(wishes.last.map((node) => vertexOf[node] ?? 0).filter((vertex) => vertex >= boundaryCount));
    const strengths = this.strengths();
    const groups = tree.groups.map((group) => strongestFirst(group, strengths));
    const postponed = this.postponedAt(wishes, { last, groups });
    const graph = this.graphOf(wishes);
    const order = orderElimination(graph, { last: new Set([...last, ...postponed]), groups });
    this.mesh = new MeshTape(inputs.builder, graph, (slot) => this.admittances.sumOf(this.rowsOfSlot[slot] ?? []), order, groups);
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

  drive(drive: Drive): DriveReadings {
    return new NodalReadings(this.network, this.inputs, this.tree, this.mesh, drive, this.admittances);
  }

  /** The matrix is symmetric: the adjoint is the network itself, its sources dead, with the weights sent in as currents. */
  adjoint({ probes }: OutputWeights): AdjointReadings {
    const readings = this.drive(probes);
    return {
      wantVoltage: (one, other) => readings.wantVoltage(one, other),
      solve: () => readings.solve(),
      voltage: (one, other) => readings.voltage(one, other),
      elsewhere: () => ZERO,
      slope: () => ZERO,
    };
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
