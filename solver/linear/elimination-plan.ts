/**
 * The order and the bookkeeping of star-mesh elimination, found once from the graph and used at every frequency.
 *
 * The graph has vertices and, between pairs of them, slots. A slot stands for all that connects its pair: an
 * admittance, a source current, and in the end the voltage between them. Vertices in the same *group* hold known
 * voltages to each other; the group of the root is the boundary and stays to the end.
 */
export interface PlanGraph {
  readonly vertexCount: number;
  /** For each vertex a number that is the same within a group; a vertex of its own has a group to itself. */
  readonly group: Int32Array;
  readonly root: number;
  /** How strongly each vertex is tied to others, in any measure: of a group, the strongest keeps its place longest. */
  readonly weight: Float64Array;
  /** Vertices to be eliminated after all others that are single, because their pivot cancels before that. */
  readonly postponed: ReadonlySet<number>;
  /** Pairs of different vertices that are connected, as [low, high]; repeats are allowed. */
  readonly pairs: readonly (readonly [number, number])[];
}

export interface EliminationPlan {
  readonly vertexCount: number;
  readonly root: number;
  /** The vertices of the root's group, which stay to the end. */
  readonly boundary: Int32Array;
  readonly slotLow: Int32Array;
  readonly slotHigh: Int32Array;
  /** The slot of each pair of the graph, in its order. */
  readonly slotOfPair: Int32Array;
  /** Slots whose two vertices are in one group: their voltage is known beforehand. */
  readonly knownSlots: Int32Array;
  /** The vertex that each step takes out. */
  readonly stepVertex: Int32Array;
  /** −1 where the step eliminates; else the vertex of the same group that the step's vertex is joined to. */
  readonly stepInto: Int32Array;
  /** Where each step's neighbours start; one entry more than steps. */
  readonly neighbourStart: Int32Array;
  /** Neighbours in rising order. */
  readonly neighbour: Int32Array;
  /** The slot between the step's vertex and the neighbour. */
  readonly neighbourSlot: Int32Array;
  /** Where each step's targets start; one entry more than steps. */
  readonly targetStart: Int32Array;
  /**
   * Elimination: the slot of each pair of neighbours (i < j, j running fastest). Joining: the slot between the vertex
   * joined to and each neighbour.
   */
  readonly target: Int32Array;
}

class Slots {
  readonly low: number[] = [];
  readonly high: number[] = [];
  readonly of: Map<number, number>[];

  constructor(vertexCount: number) {
    this.of = Array.from({ length: vertexCount }, () => new Map<number, number>());
  }

  get(one: number, other: number): number {
    const known = this.of[one]?.get(other);
    if (known !== undefined) return known;
    const slot = this.low.length;
    this.low.push(Math.min(one, other));
    this.high.push(Math.max(one, other));
    this.of[one]?.set(other, slot);
    this.of[other]?.set(one, slot);
    return slot;
  }
}

/**
 * Minimum-degree order by the graph alone (Markowitz 1957 in its symmetric form; Tinney and Walker 1967,
 * doi 10.1109/PROC.1967.6011), of equal degrees the lowest number. Vertices of their own go first; groups are then
 * joined to one vertex each, as late as possible, because a difference of two large known voltages loses nothing while
 * their vertices are still apart, and to the one most strongly tied, because the small voltage across a strong tie
 * would otherwise come out as a difference of large ones; postponed vertices come next, and then what the groups were
 * joined to. All that is left is the root's group.
 */
export function planElimination(graph: PlanGraph): EliminationPlan {
  const { vertexCount, group, root, weight, postponed, pairs } = graph;
  const slots = new Slots(vertexCount);
  const slotOfPair = Int32Array.from(pairs, ([one, other]) => slots.get(one, other));
  const rootGroup = group[root] ?? -1;
  const groupSize = new Map<number, number>();
  for (const of of group) groupSize.set(of, (groupSize.get(of) ?? 0) + 1);

  const stepVertex: number[] = [];
  const stepInto: number[] = [];
  const neighbourStart: number[] = [0];
  const neighbour: number[] = [];
  const neighbourSlot: number[] = [];
  const targetStart: number[] = [0];
  const target: number[] = [];

  /** Ends the step's record and takes its vertex out of the living graph; its slots keep their numbers. */
  const close = (vertex: number, into: number, around: readonly number[]): void => {
    stepVertex.push(vertex);
    stepInto.push(into);
    neighbour.push(...around);
    neighbourStart.push(neighbour.length);
    targetStart.push(target.length);
    for (const other of slots.of[vertex]?.keys() ?? []) slots.of[other]?.delete(vertex);
  };

  const eliminate = (vertex: number): void => {
    const around = [...(slots.of[vertex]?.keys() ?? [])].sort((x, y) => x - y);
    for (const other of around) neighbourSlot.push(slots.get(vertex, other));
    for (const [i, one] of around.entries()) {
      for (const other of around.slice(i + 1)) target.push(slots.get(one, other));
    }
    close(vertex, -1, around);
  };

  const join = (vertex: number, into: number): void => {
    const around = [...(slots.of[vertex]?.keys() ?? [])]
      .filter((other) => group[other] !== group[vertex])
      .sort((x, y) => x - y);
    for (const other of around) {
      neighbourSlot.push(slots.get(vertex, other));
      target.push(slots.get(into, other));
    }
    close(vertex, into, around);
  };

  const byDegree = (waiting: Set<number>): void => {
    while (waiting.size > 0) {
      let best = -1;
      let bestDegree = Infinity;
      for (const vertex of waiting) {
        const degree = slots.of[vertex]?.size ?? 0;
        if (degree < bestDegree) {
          best = vertex;
          bestDegree = degree;
          if (degree <= 1) break;
        }
      }
      waiting.delete(best);
      eliminate(best);
    }
  };

  const single = new Set<number>();
  const late = new Set<number>();
  const representative = new Map<number, number>();
  for (let vertex = 0; vertex < vertexCount; vertex++) {
    const of = group[vertex] ?? vertex;
    if (of === rootGroup) continue;
    if (groupSize.get(of) === 1) (postponed.has(vertex) ? late : single).add(vertex);
    else if ((weight[vertex] ?? 0) > (weight[representative.get(of) ?? -1] ?? -1)) representative.set(of, vertex);
  }
  byDegree(single);
  for (let vertex = 0; vertex < vertexCount; vertex++) {
    const into = representative.get(group[vertex] ?? -1);
    if (into !== undefined && into !== vertex) join(vertex, into);
  }
  byDegree(late);
  byDegree(new Set(representative.values()));

  const knownSlots: number[] = [];
  for (const [slot, low] of slots.low.entries()) {
    if (group[low] === group[slots.high[slot] ?? low]) knownSlots.push(slot);
  }
  return {
    vertexCount,
    root,
    boundary: Int32Array.from({ length: vertexCount }, (_, vertex) => vertex).filter(
      (vertex) => group[vertex] === rootGroup,
    ),
    slotLow: Int32Array.from(slots.low),
    slotHigh: Int32Array.from(slots.high),
    slotOfPair,
    knownSlots: Int32Array.from(knownSlots),
    stepVertex: Int32Array.from(stepVertex),
    stepInto: Int32Array.from(stepInto),
    neighbourStart: Int32Array.from(neighbourStart),
    neighbour: Int32Array.from(neighbour),
    neighbourSlot: Int32Array.from(neighbourSlot),
    targetStart: Int32Array.from(targetStart),
    target: Int32Array.from(target),
  };
}
