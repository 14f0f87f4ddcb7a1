/**
 * The graph that star-mesh elimination works on, and its order. The first vertices are the boundary, whose voltages are
 * known, and stay. A slot stands between two vertices that something connects; it is numbered when it comes into being,
 * and keeps its number when its vertices are gone.
 */
export class MeshGraph {
  readonly low: number[] = [];
  readonly high: number[] = [];
  private readonly around: Map<number, number>[];

  constructor(
    readonly vertexCount: number,
    readonly boundaryCount: number,
  ) {
    this.around = Array.from({ length: vertexCount }, () => new Map<number, number>());
  }

  get slotCount(): number {
    return this.low.length;
  }

  /** The slot between two different vertices; a new one where there is none. */
  slot(one: number, other: number): number {
    // A vertex that is gone stands in no list but its own.
    const known = this.around[one]?.get(other) ?? this.around[other]?.get(one);
    if (known !== undefined) return known;
    const slot = this.low.length;
    this.low.push(Math.min(one, other));
    this.high.push(Math.max(one, other));
    this.around[one]?.set(other, slot);
    this.around[other]?.set(one, slot);
    return slot;
  }

  degree(vertex: number): number {
    return this.around[vertex]?.size ?? 0;
  }

  neighbours(vertex: number): IterableIterator<[vertex: number, slot: number]> {
    return (this.around[vertex] ?? new Map<number, number>()).entries();
  }

  /** Takes a vertex out of its neighbours' lists and joins them among each other; its own list stays. */
  remove(vertex: number): void {
    const around = this.detach(vertex);
    for (const [place, one] of around.entries()) {
      for (let next = place + 1; next < around.length; next++) {
        const other = around[next] ?? one;
        // What lies between two known voltages is of use only to the currents of sources; it is kept, it costs little.
        this.slot(one, other);
      }
    }
  }

  /** Takes a vertex out and gives its neighbours to another. */
  join(vertex: number, into: number, neighbours: readonly number[]): void {
    this.detach(vertex);
    for (const other of neighbours) this.slot(into, other);
  }

  private detach(vertex: number): readonly number[] {
    const around = [...(this.around[vertex]?.keys() ?? [])];
    for (const other of around) this.around[other]?.delete(vertex);
    return around;
  }
}

/** A vertex to be taken out, with those that are left about it, and its slots with them. */
export interface Elimination {
  readonly vertex: number;
  /** −1 where it is eliminated; else the vertex of the same group that it is joined to. */
  readonly into: number;
  readonly neighbours: Int32Array;
  readonly slots: Int32Array;
}

/** What an order of elimination is to heed. */
export interface OrderWishes {
  /** Vertices to be taken out after all others: what is asked for between them needs no way back. */
  readonly last: ReadonlySet<number>;
  /** Sets of vertices, outside the boundary, that hold known voltages to each other; the one to join all others to first. */
  readonly groups: readonly (readonly number[])[];
}

/**
 * The order in which all vertices but the boundary are taken out, each when it has the fewest neighbours, of equals the
 * one that has been so the longest; then put into postorder of the elimination tree, in which what a vertex leaves
 * behind is soon used. Groups are joined to one vertex each when all else but the last is gone: a difference of two
 * large known voltages loses nothing while their vertices are still apart.
 *
 * Minimum degree: Tinney and Walker 1967, doi 10.1109/PROC.1967.6011. First come, first served among equals takes
 * vertices from all over the network in turn, which fills in less than working along one edge of it. A postorder fills
 * in the same: Liu 1990, doi 10.1137/0611010.
 */
export function orderElimination(graph: MeshGraph, { last, groups }: OrderWishes): Elimination[] {
  const { boundaryCount, vertexCount } = graph;
  const order: Elimination[] = [];
  const placeOf = new Int32Array(vertexCount).fill(-1);
  const groupOf = new Map(groups.flatMap((group, number) => group.map((vertex) => [vertex, number] as const)));
  const isLate = (vertex: number): boolean => last.has(vertex) || groupOf.has(vertex);

  const close = (vertex: number, into: number): readonly number[] => {
    const neighbours: number[] = [];
    const slots: number[] = [];
    for (const [other, slot] of graph.neighbours(vertex)) {
      // What lies within a group carries what it carries, and tells nothing.
      if (into >= 0 && groupOf.get(other) === groupOf.get(vertex)) continue;
      neighbours.push(other);
      slots.push(slot);
    }
    placeOf[vertex] = order.length;
    order.push({ vertex, into, neighbours: Int32Array.from(neighbours), slots: Int32Array.from(slots) });
    return neighbours;
  };

  for (const late of [false, true]) {
    const queue = new DegreeQueue();
    let waiting = 0;
    for (let vertex = boundaryCount; vertex < vertexCount; vertex++) {
      if (isLate(vertex) !== late || (placeOf[vertex] ?? 0) >= 0) continue;
      waiting++;
      queue.put(vertex, graph.degree(vertex));
    }
    for (; waiting > 0; waiting--) {
      const vertex = queue.next((candidate, degree) => (placeOf[candidate] ?? 0) < 0 && graph.degree(candidate) === degree);
      const neighbours = close(vertex, -1);
      graph.remove(vertex);
      for (const other of neighbours) {
        if (other >= boundaryCount && isLate(other) === late) queue.put(other, graph.degree(other));
      }
    }
    if (late) break;
    for (const [into = -1, ...others] of groups) {
      for (const vertex of others) {
        const neighbours = close(vertex, into);
        graph.join(vertex, into, neighbours);
      }
    }
  }
  return groups.length === 0 ? postorder(order, placeOf) : order;
}

/** A vertex's parent is the first of its neighbours that goes. */
function postorder(order: readonly Elimination[], placeOf: Int32Array): Elimination[] {
  const children: number[][] = order.map(() => []);
  const roots: number[] = [];
  for (const [place, { neighbours }] of order.entries()) {
    let parent = Infinity;
    for (const other of neighbours) {
      const at = placeOf[other] ?? -1;
      if (at >= 0 && at < parent) parent = at;
    }
    (children[parent] ?? roots).push(place);
  }
  const result: Elimination[] = [];
  const path: number[] = [];
  const next = new Int32Array(order.length);
  for (const root of roots) {
    path.push(root);
    while (path.length > 0) {
      const place = path[path.length - 1] ?? root;
      const child = children[place]?.[next[place] ?? 0];
      next[place] = (next[place] ?? 0) + 1;
      if (child !== undefined) {
        path.push(child);
        continue;
      }
      path.pop();
      const step = order[place];
      if (step !== undefined) result.push(step);
    }
  }
  return result;
}

/** Vertices by degree; one whose degree has changed is put in again, and its old entry is passed over. */
class DegreeQueue {
  private readonly buckets: { readonly vertices: number[]; head: number }[] = [];
  private lowest = 0;

  put(vertex: number, degree: number): void {
    while (this.buckets.length <= degree) this.buckets.push({ vertices: [], head: 0 });
    this.buckets[degree]?.vertices.push(vertex);
    this.lowest = Math.min(this.lowest, degree);
  }

  next(isValid: (vertex: number, degree: number) => boolean): number {
    for (; this.lowest < this.buckets.length; this.lowest++) {
      const bucket = this.buckets[this.lowest];
      while (bucket !== undefined && bucket.head < bucket.vertices.length) {
        const vertex = bucket.vertices[bucket.head++] ?? -1;
        if (isValid(vertex, this.lowest)) return vertex;
      }
    }
    throw new Error('the queue holds no vertex that is still there');
  }
}
