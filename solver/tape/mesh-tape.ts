import type { Elimination, MeshGraph, OrderWishes } from './mesh-graph';
import type { Part, TapeBuilder, Value } from './tape-builder';
import { isZero, negative, NOTHING, ZERO } from './tape-builder';

interface Step extends Elimination {
  /** The part of the pivot that each neighbour's admittance is; of a vertex that is joined, the admittances themselves. */
  readonly weights: readonly Value[];
  readonly inverse: Value;
}

/**
 * Star-mesh elimination written on a tape. Between vertices i and j flows y_ij·(v_i − v_j) + J_ij. Vertex k is taken out
 * with a = Σ_l y_kl, w_l = y_kl/a:
 *
 *     y_lm ← y_lm + w_l·y_km        J_lm ← J_lm + w_l·J_km − w_m·J_kl        v_k − v_b = Σ_l w_l·(v_l − v_b) − Σ_l J_kl/a
 *
 * No diagonal is stored and nothing is subtracted but what physics subtracts, as in `StarMesh`, which does the same
 * with numbers and names the sources. Every right-hand side uses the one elimination.
 */
export class MeshTape {
  readonly steps: Step[] = [];
  /** The place of each vertex in the order; the boundary stands after all. */
  readonly placeOf: Float64Array;
  private readonly y: (Value | undefined)[] = [];
  private readonly groupOf: ReadonlyMap<number, number>;

  /**
   * @param admittance writes down the admittance of a slot of the graph as it was given, when it is first needed
   */
  constructor(
    readonly builder: TapeBuilder,
    readonly graph: MeshGraph,
    private readonly admittance: (slot: number) => Value,
    order: readonly Elimination[],
    groups: OrderWishes['groups'],
  ) {
    this.placeOf = new Float64Array(graph.vertexCount).fill(Infinity);
    this.groupOf = new Map(groups.flatMap((group, number) => group.map((vertex) => [vertex, number] as const)));
    for (const elimination of order) {
      this.placeOf[elimination.vertex] = this.steps.length;
      this.steps.push(elimination.into < 0 ? this.take(elimination) : this.join(elimination));
    }
  }

  /** Whether the voltage between two vertices is known beforehand. */
  isKnown(one: number, other: number): boolean {
    const { boundaryCount } = this.graph;
    if (one < boundaryCount) return other < boundaryCount;
    const group = this.groupOf.get(one);
    return group !== undefined && group === this.groupOf.get(other);
  }

  /** The admittance that stands in a slot when its vertices are all that is left. */
  admittanceOf(slot: number): Value {
    const known = this.y[slot];
    if (known !== undefined) return known;
    const given = this.admittance(slot);
    this.y[slot] = given;
    return given;
  }

  private take(elimination: Elimination): Step {
    const { builder, graph } = this;
    const { neighbours, slots } = this.sorted(elimination);
    const admittances = Array.from(slots, (slot) => this.admittanceOf(slot));
    const inverse = builder.reciprocal(builder.sum(admittances), this.watchOf(admittances));
    const weights = admittances.map((y) => builder.mul(y, inverse));
    for (let one = 0; one < neighbours.length; one++) {
      const weight = weights[one] ?? ZERO;
      if (isZero(weight)) continue;
      for (let other = one + 1; other < neighbours.length; other++) {
        const y = admittances[other] ?? ZERO;
        if (isZero(y)) continue;
        const slot = graph.slot(neighbours[one] ?? 0, neighbours[other] ?? 0);
        this.y[slot] = builder.mulAdd(this.admittanceOf(slot), weight, y);
      }
    }
    return { ...elimination, neighbours, slots, weights, inverse };
  }

  /**
   * Neighbours with the boundary last, before it those whose admittances are simplest: a pair's first gives the weight,
   * its second the admittance that is multiplied by it, and what lies between two of the boundary is mostly of no use.
   */
  private sorted({ neighbours, slots }: Elimination): { neighbours: Int32Array; slots: Int32Array } {
    const { boundaryCount } = this.graph;
    const rank = Array.from(neighbours, (vertex, at) => {
      const { re, im } = this.admittanceOf(slots[at] ?? 0);
      return vertex < boundaryCount ? -1 : Number(re !== NOTHING) + Number(im !== NOTHING);
    });
    const order = Array.from(neighbours, (_, at) => at).sort((one, other) => (rank[other] ?? 0) - (rank[one] ?? 0));
    return {
      neighbours: Int32Array.from(order, (at) => neighbours[at] ?? 0),
      slots: Int32Array.from(order, (at) => slots[at] ?? 0),
    };
  }

  /** What the vertex has towards another, the one it is joined to has. */
  private join(elimination: Elimination): Step {
    const { into, neighbours, slots } = elimination;
    const given = Array.from(slots, (slot) => this.admittanceOf(slot));
    for (const [at, y] of given.entries()) {
      const slot = this.graph.slot(into, neighbours[at] ?? 0);
      this.y[slot] = this.builder.add(this.admittanceOf(slot), y);
    }
    return { ...elimination, weights: given, inverse: ZERO };
  }

  /**
   * What the pivot is to be measured against: the squares of its terms. Between two neighbours alone the result is that of
   * two admittances in series, with the relative error of each, however much cancels; only what is next to nothing is of
   * concern, and then the terms are of one size. With one neighbour nothing cancels.
   */
  private watchOf(admittances: readonly Value[]): Part {
    const { builder } = this;
    const present = admittances.filter((y) => !isZero(y));
    if (present.length > 2) return builder.squares(present);
    const [one, other] = present;
    if (one === undefined || other === undefined) return NOTHING;
    const simpler = effortOf(builder, one) <= effortOf(builder, other) ? one : other;
    return builder.mulParts(builder.constantPart(SERIES_SHARE), builder.squares([simpler]));
  }
}

/** Brings a pivot of a ten-millionth of its terms to the limit that other pivots reach at a twentieth. */
const SERIES_SHARE = 4e-12;

/** How much there is to do for the square of a value. */
function effortOf(builder: TapeBuilder, { re, im }: Value): number {
  return [re, im].reduce((total, part) => total + (part === NOTHING ? 0 : 1 + builder.levelOf(part)), 0);
}

/** The sources of one right-hand side: source currents by slot, from its low vertex to its high one, and known voltages. */
export interface Excitation {
  readonly currents: ReadonlyMap<number, Value>;
  /** The known voltage of one vertex over another, both of the boundary or of one group. */
  readonly between: (one: number, other: number) => Value;
}

/** One right-hand side: the voltages that are asked for, and no more. */
export class MeshSolution {
  private readonly currents: Map<number, Value>;
  /** Σ_l J_kl/a of each step. */
  private readonly sources: Value[] = [];
  private readonly wanted: (Set<number> | undefined)[] = [];
  private readonly found = new Map<number, Value>();

  constructor(
    private readonly mesh: MeshTape,
    private readonly excitation: Excitation,
  ) {
    this.currents = new Map(excitation.currents);
    this.carry();
  }

  /** Says that the voltage of one vertex over another will be read. */
  want(one: number, other: number): void {
    if (one === other || this.mesh.isKnown(one, other)) return;
    const { placeOf } = this.mesh;
    const [first, second] = (placeOf[one] ?? 0) < (placeOf[other] ?? 0) ? [one, other] : [other, one];
    const place = placeOf[first] ?? 0;
    (this.wanted[place] ??= new Set()).add(second);
  }

  /** Writes down all that is wanted, and what it needs. */
  solve(): void {
    const { builder, steps } = this.mesh;
    for (const [place, { into, neighbours, weights }] of steps.entries()) {
      for (const other of this.wanted[place] ?? []) {
        if (into >= 0) this.want(into, other);
        else {
          for (const [at, neighbour] of neighbours.entries()) {
            if (!isZero(weights[at] ?? ZERO)) this.want(neighbour, other);
          }
        }
      }
    }
    for (let place = steps.length - 1; place >= 0; place--) {
      const step = steps[place];
      if (step === undefined) continue;
      for (const other of this.wanted[place] ?? []) {
        if (step.into >= 0) {
          const known = this.excitation.between(step.vertex, step.into);
          this.found.set(this.key(step.vertex, other), builder.add(this.between(step.into, other), known));
          continue;
        }
        let total = negative(this.sources[place] ?? ZERO);
        step.neighbours.forEach((neighbour, at) => {
          const weight = step.weights[at] ?? ZERO;
          if (!isZero(weight)) total = builder.mulAdd(total, weight, this.between(neighbour, other));
        });
        this.found.set(this.key(step.vertex, other), total);
      }
    }
  }

  /** v(one) − v(other), which was wanted. */
  between(one: number, other: number): Value {
    if (one === other) return ZERO;
    if (this.mesh.isKnown(one, other)) return this.excitation.between(one, other);
    const { placeOf } = this.mesh;
    const isFirst = (placeOf[one] ?? 0) < (placeOf[other] ?? 0);
    const value = this.found.get(isFirst ? this.key(one, other) : this.key(other, one));
    if (value === undefined) throw new Error('a voltage was read that nobody had asked for');
    return isFirst ? value : negative(value);
  }

  /** The source current that flows from one vertex of the boundary to another, all else being taken out. */
  sourceFlow(one: number, other: number): Value {
    const flow = this.currents.get(this.mesh.graph.slot(one, other)) ?? ZERO;
    return one < other ? flow : negative(flow);
  }

  /** What flows from one vertex of the boundary to another through all that was taken out. */
  boundaryCurrent(one: number, other: number): Value {
    const { builder, graph } = this.mesh;
    const admittance = this.mesh.admittanceOf(graph.slot(one, other));
    return builder.mulAdd(this.sourceFlow(one, other), admittance, this.between(one, other));
  }

  private carry(): void {
    const { builder, steps } = this.mesh;
    for (const [place, step] of steps.entries()) {
      const { vertex, into, neighbours, slots, weights, inverse } = step;
      if (into < 0 && this.currents.size === 0) continue;
      const flows = Array.from(slots, (slot, at) => {
        const flow = this.currents.get(slot) ?? ZERO;
        return vertex < (neighbours[at] ?? 0) ? flow : negative(flow);
      });
      if (into >= 0) {
        const known = this.excitation.between(vertex, into);
        // v_p = v_q + e: what p sends to a neighbour by its sources, q sends, with y·e more.
        for (const [at, flow] of flows.entries()) {
          this.addFlow(into, neighbours[at] ?? 0, builder.mulAdd(flow, weights[at] ?? ZERO, known));
        }
        continue;
      }
      if (flows.every(isZero)) continue;
      this.sources[place] = builder.mul(builder.sum(flows), inverse);
      for (let one = 0; one < flows.length; one++) {
        for (let other = one + 1; other < flows.length; other++) {
          const flow = builder.mul(weights[one] ?? ZERO, flows[other] ?? ZERO);
          const net = builder.mulSub(flow, weights[other] ?? ZERO, flows[one] ?? ZERO);
          this.addFlow(neighbours[one] ?? 0, neighbours[other] ?? 0, net);
        }
      }
    }
  }

  private addFlow(from: number, to: number, flow: Value): void {
    if (isZero(flow)) return;
    const slot = this.mesh.graph.slot(from, to);
    const known = this.currents.get(slot) ?? ZERO;
    this.currents.set(slot, this.mesh.builder.add(known, from < to ? flow : negative(flow)));
  }

  private key(one: number, other: number): number {
    return one * this.mesh.graph.vertexCount + other;
  }
}
