import type { EliminationPlan } from './elimination-plan';

/**
 * Nodal equations solved by star-mesh elimination, with no stored diagonal.
 *
 * Between vertices i and j flows y_ij·(v_i − v_j) + J_ij, with y symmetric and J antisymmetric. Vertex k is taken out
 * with a = Σ_l y_kl, w_l = y_kl / a:
 *
 *     y_lm ← y_lm + w_l·y_km        J_lm ← J_lm + w_l·J_km − w_m·J_kl
 *
 * and afterwards, in the reverse order,
 *
 *     v_k = Σ_l w_l·v_l − Σ_l J_kl / a        v_k − v_j = Σ_l w_l·(v_l − v_j) − Σ_l J_kl / a
 *
 * The diagonal of the nodal matrix is never formed: a node's admittance to the rest is summed afresh from what it is
 * made of, so nothing small is lost in something large and nothing is subtracted but what physics subtracts. That is
 * the idea of Grassmann, Taksar and Heyman for Markov chains (Operations Research 33 (1985) 1107,
 * doi 10.1287/opre.33.5.1107); the star-mesh transform itself is Campbell's (1911) and Rosen's (1924). Carrying the
 * sources on the slots, not as sums at the vertices, and the voltages between neighbours, not only those to the root,
 * keeps the same property for sources and for small voltages between large ones.
 *
 * Cost: the square of a vertex's degree, once each way.
 */
export class StarMesh {
  /** Admittance of each slot, S. Filled in by the caller, then worked upon. */
  readonly yRe: Float64Array;
  readonly yIm: Float64Array;
  /** Source current of each slot from its low to its high vertex, A. Filled in by the caller before each `solve`. */
  readonly jRe: Float64Array;
  readonly jIm: Float64Array;
  /** Voltage of each slot's low vertex over its high one, V. The caller fills in the plan's known slots. */
  readonly dRe: Float64Array;
  readonly dIm: Float64Array;
  /** Voltage of each vertex over the root, V. The caller fills in the root's group. */
  readonly vRe: Float64Array;
  readonly vIm: Float64Array;
  /** For each joining step, the known voltage of its vertex over the one joined to, V; filled in by the caller. */
  readonly eRe: Float64Array;
  readonly eIm: Float64Array;
  /** The vertex of the weakest pivot that `factor` met; −1 where there was none to take. */
  weakest = -1;
  /** How far off each vertex's voltage may be, V; found by `boundErrors`. */
  readonly vertexError: Float64Array;
  private readonly error: Float64Array;
  private readonly wRe: Float64Array;
  private readonly wIm: Float64Array;
  private readonly inverseRe: Float64Array;
  private readonly inverseIm: Float64Array;
  private readonly uRe: Float64Array;
  private readonly uIm: Float64Array;

  constructor(readonly plan: EliminationPlan) {
    const slots = plan.slotLow.length;
    const steps = plan.stepVertex.length;
    const neighbours = plan.neighbour.length;
    [this.yRe, this.yIm, this.jRe, this.jIm] = fourOf(slots);
    [this.dRe, this.dIm, this.error] = fourOf(slots);
    [this.vRe, this.vIm, this.vertexError] = fourOf(plan.vertexCount);
    [this.eRe, this.eIm, this.uRe, this.uIm] = fourOf(steps);
    [this.wRe, this.wIm] = fourOf(neighbours);
    [this.inverseRe, this.inverseIm] = fourOf(steps);
  }

  /** Sets admittances to zero for the next frequency. */
  clearAdmittances(): void {
    this.yRe.fill(0);
    this.yIm.fill(0);
  }

  /** Sets sources and known voltages to zero for the next right-hand side. */
  clearSources(): void {
    const { jRe, jIm, dRe, dIm, vRe, vIm, eRe, eIm } = this;
    for (const array of [jRe, jIm, dRe, dIm, vRe, vIm, eRe, eIm]) array.fill(0);
  }

  /**
   * Takes all vertices out of the admittances. Answers the smallest size of a pivot against the sum of the sizes of
   * its terms, of which cancellation has taken the rest: of so many digits the solution may be short. 0 where a pivot
   * is zero or not finite, and nothing may be solved then. `weakest` is the vertex of that pivot.
   */
  factor(): number {
    const { plan } = this;
    let smallest = Infinity;
    this.weakest = -1;
    for (let step = 0; step < plan.stepVertex.length; step++) {
      if ((plan.stepInto[step] ?? -1) >= 0) {
        this.joinAdmittances(step);
        continue;
      }
      const ratio = this.takeOut(step);
      if (ratio >= smallest) continue;
      smallest = ratio > 0 ? ratio : 0;
      this.weakest = plan.stepVertex[step] ?? -1;
      if (smallest === 0) return 0;
    }
    return Math.min(1, smallest);
  }

  /** Finds all voltages for the sources and known voltages that stand there; the admittances' factors are kept. */
  solve(): void {
    const { plan } = this;
    for (let step = 0; step < plan.stepVertex.length; step++) {
      if ((plan.stepInto[step] ?? -1) < 0) this.carrySources(step);
      else this.joinSources(step);
    }
    for (let step = plan.stepVertex.length - 1; step >= 0; step--) {
      if ((plan.stepInto[step] ?? -1) < 0) this.putBack(step);
      else this.joinBack(step);
    }
  }

  /**
   * How far off each slot's voltage may be by the rounding of `solve`, V: the same recurrences on sizes. A small
   * voltage between vertices that large ones surround may have come out of cancellation, and this tells. Finds those of
   * the vertices, in `vertexError`, on the way.
   */
  boundErrors(): Float64Array {
    const { plan, dRe, dIm, wRe, wIm, error } = this;
    const { neighbourSlot, target } = plan;
    error.fill(0);
    this.vertexError.fill(0);
    for (const slot of plan.knownSlots) error[slot] = Number.EPSILON * sizeAt(dRe, dIm, slot);
    for (let step = plan.stepVertex.length - 1; step >= 0; step--) {
      const start = plan.neighbourStart[step] ?? 0;
      const end = plan.neighbourStart[step + 1] ?? 0;
      let pair = plan.targetStart[step] ?? 0;
      this.boundVertexError(step);
      if ((plan.stepInto[step] ?? -1) >= 0) {
        const given = sizeAt(this.eRe, this.eIm, step);
        for (let at = start; at < end; at++, pair++) {
          const to = target[pair] ?? 0;
          error[neighbourSlot[at] ?? 0] = (error[to] ?? 0) + Number.EPSILON * (sizeAt(dRe, dIm, to) + given);
        }
        continue;
      }
      const source = ROUNDING * sizeAt(this.uRe, this.uIm, step);
      for (let at = start; at < end; at++) error[neighbourSlot[at] ?? 0] = source;
      for (let one = start; one < end; one++) {
        const weight = sizeAt(wRe, wIm, one);
        for (let other = one + 1; other < end; other++, pair++) {
          const slot = target[pair] ?? 0;
          const off = (error[slot] ?? 0) + ROUNDING * sizeAt(dRe, dIm, slot);
          const slotOne = neighbourSlot[one] ?? 0;
          const slotOther = neighbourSlot[other] ?? 0;
          error[slotOther] = (error[slotOther] ?? 0) + weight * off;
          error[slotOne] = (error[slotOne] ?? 0) + sizeAt(wRe, wIm, other) * off;
        }
      }
    }
    return error;
  }

  private boundVertexError(step: number): void {
    const { plan, vRe, vIm, wRe, wIm, vertexError } = this;
    const into = plan.stepInto[step] ?? -1;
    let error = ROUNDING * sizeAt(this.uRe, this.uIm, step);
    if (into >= 0) {
      error = (vertexError[into] ?? 0) + Number.EPSILON * (sizeAt(vRe, vIm, into) + sizeAt(this.eRe, this.eIm, step));
    } else {
      for (let at = plan.neighbourStart[step] ?? 0; at < (plan.neighbourStart[step + 1] ?? 0); at++) {
        const other = plan.neighbour[at] ?? 0;
        error += sizeAt(wRe, wIm, at) * ((vertexError[other] ?? 0) + ROUNDING * sizeAt(vRe, vIm, other));
      }
    }
    vertexError[plan.stepVertex[step] ?? 0] = error;
  }

  /** Answers the size of the pivot against the sum of the sizes of its terms. */
  private takeOut(step: number): number {
    const { plan, yRe, yIm, wRe, wIm } = this;
    const { neighbourSlot, target } = plan;
    const start = plan.neighbourStart[step] ?? 0;
    const end = plan.neighbourStart[step + 1] ?? 0;
    let aRe = 0;
    let aIm = 0;
    let size = 0;
    for (let at = start; at < end; at++) {
      const slot = neighbourSlot[at] ?? 0;
      const re = yRe[slot] ?? 0;
      const im = yIm[slot] ?? 0;
      aRe += re;
      aIm += im;
      size += Math.abs(re) + Math.abs(im);
    }
    const square = aRe * aRe + aIm * aIm;
    if (!(square > 0) || square === Infinity) return 0;
    this.inverseRe[step] = aRe / square;
    this.inverseIm[step] = -aIm / square;
    for (let at = start; at < end; at++) {
      const slot = neighbourSlot[at] ?? 0;
      const re = yRe[slot] ?? 0;
      const im = yIm[slot] ?? 0;
      wRe[at] = (re * aRe + im * aIm) / square;
      wIm[at] = (im * aRe - re * aIm) / square;
    }
    let pair = plan.targetStart[step] ?? 0;
    for (let one = start; one < end; one++) {
      const oneRe = wRe[one] ?? 0;
      const oneIm = wIm[one] ?? 0;
      for (let other = one + 1; other < end; other++, pair++) {
        const slot = target[pair] ?? 0;
        const slotOther = neighbourSlot[other] ?? 0;
        const otherRe = yRe[slotOther] ?? 0;
        const otherIm = yIm[slotOther] ?? 0;
        yRe[slot] = (yRe[slot] ?? 0) + (oneRe * otherRe - oneIm * otherIm);
        yIm[slot] = (yIm[slot] ?? 0) + (oneRe * otherIm + oneIm * otherRe);
      }
    }
    return (Math.abs(aRe) + Math.abs(aIm)) / size;
  }

  /** What p has towards l, q has towards l. */
  private joinAdmittances(step: number): void {
    const { plan, yRe, yIm } = this;
    let pair = plan.targetStart[step] ?? 0;
    for (let at = plan.neighbourStart[step] ?? 0; at < (plan.neighbourStart[step + 1] ?? 0); at++, pair++) {
      const from = plan.neighbourSlot[at] ?? 0;
      const to = plan.target[pair] ?? 0;
      yRe[to] = (yRe[to] ?? 0) + (yRe[from] ?? 0);
      yIm[to] = (yIm[to] ?? 0) + (yIm[from] ?? 0);
    }
  }

  private carrySources(step: number): void {
    const { plan, jRe, jIm, wRe, wIm } = this;
    const { neighbour, neighbourSlot, target } = plan;
    const vertex = plan.stepVertex[step] ?? 0;
    const start = plan.neighbourStart[step] ?? 0;
    const end = plan.neighbourStart[step + 1] ?? 0;
    let sumRe = 0;
    let sumIm = 0;
    for (let at = start; at < end; at++) {
      const slot = neighbourSlot[at] ?? 0;
      const sign = (neighbour[at] ?? 0) > vertex ? 1 : -1;
      sumRe += sign * (jRe[slot] ?? 0);
      sumIm += sign * (jIm[slot] ?? 0);
    }
    const inverseRe = this.inverseRe[step] ?? 0;
    const inverseIm = this.inverseIm[step] ?? 0;
    this.uRe[step] = sumRe * inverseRe - sumIm * inverseIm;
    this.uIm[step] = sumRe * inverseIm + sumIm * inverseRe;
    let pair = plan.targetStart[step] ?? 0;
    for (let one = start; one < end; one++) {
      const slotOne = neighbourSlot[one] ?? 0;
      const signOne = (neighbour[one] ?? 0) > vertex ? 1 : -1;
      const oneRe = wRe[one] ?? 0;
      const oneIm = wIm[one] ?? 0;
      const jOneRe = signOne * (jRe[slotOne] ?? 0);
      const jOneIm = signOne * (jIm[slotOne] ?? 0);
      for (let other = one + 1; other < end; other++, pair++) {
        const slot = target[pair] ?? 0;
        const slotOther = neighbourSlot[other] ?? 0;
        const signOther = (neighbour[other] ?? 0) > vertex ? 1 : -1;
        const jRe2 = signOther * (jRe[slotOther] ?? 0);
        const jIm2 = signOther * (jIm[slotOther] ?? 0);
        const wRe2 = wRe[other] ?? 0;
        const wIm2 = wIm[other] ?? 0;
        jRe[slot] = (jRe[slot] ?? 0) + (oneRe * jRe2 - oneIm * jIm2) - (wRe2 * jOneRe - wIm2 * jOneIm);
        jIm[slot] = (jIm[slot] ?? 0) + (oneRe * jIm2 + oneIm * jRe2) - (wRe2 * jOneIm + wIm2 * jOneRe);
      }
    }
  }

  /** v_p = v_q + e: the source current that p has towards l, q has towards l, with y·e more. */
  private joinSources(step: number): void {
    const { plan, yRe, yIm, jRe, jIm } = this;
    const vertex = plan.stepVertex[step] ?? 0;
    const into = plan.stepInto[step] ?? 0;
    const eRe = this.eRe[step] ?? 0;
    const eIm = this.eIm[step] ?? 0;
    let pair = plan.targetStart[step] ?? 0;
    for (let at = plan.neighbourStart[step] ?? 0; at < (plan.neighbourStart[step + 1] ?? 0); at++, pair++) {
      const from = plan.neighbourSlot[at] ?? 0;
      const to = plan.target[pair] ?? 0;
      const other = plan.neighbour[at] ?? 0;
      const signFrom = other > vertex ? 1 : -1;
      const signTo = other > into ? 1 : -1;
      const re = yRe[from] ?? 0;
      const im = yIm[from] ?? 0;
      jRe[to] = (jRe[to] ?? 0) + signTo * (signFrom * (jRe[from] ?? 0) + (re * eRe - im * eIm));
      jIm[to] = (jIm[to] ?? 0) + signTo * (signFrom * (jIm[from] ?? 0) + (re * eIm + im * eRe));
    }
  }

  private putBack(step: number): void {
    const { plan, vRe, vIm, dRe, dIm, wRe, wIm } = this;
    const { neighbour, neighbourSlot, target } = plan;
    const vertex = plan.stepVertex[step] ?? 0;
    const start = plan.neighbourStart[step] ?? 0;
    const end = plan.neighbourStart[step + 1] ?? 0;
    const uRe = this.uRe[step] ?? 0;
    const uIm = this.uIm[step] ?? 0;
    let sumRe = -uRe;
    let sumIm = -uIm;
    for (let at = start; at < end; at++) {
      const other = neighbour[at] ?? 0;
      const slot = neighbourSlot[at] ?? 0;
      const xRe = vRe[other] ?? 0;
      const xIm = vIm[other] ?? 0;
      const re = wRe[at] ?? 0;
      const im = wIm[at] ?? 0;
      sumRe += re * xRe - im * xIm;
      sumIm += re * xIm + im * xRe;
      const sign = other > vertex ? 1 : -1;
      dRe[slot] = -sign * uRe;
      dIm[slot] = -sign * uIm;
    }
    vRe[vertex] = sumRe;
    vIm[vertex] = sumIm;
    let pair = plan.targetStart[step] ?? 0;
    for (let one = start; one < end; one++) {
      const slotOne = neighbourSlot[one] ?? 0;
      const signOne = (neighbour[one] ?? 0) > vertex ? 1 : -1;
      const oneRe = wRe[one] ?? 0;
      const oneIm = wIm[one] ?? 0;
      for (let other = one + 1; other < end; other++, pair++) {
        const slot = target[pair] ?? 0;
        const slotOther = neighbourSlot[other] ?? 0;
        const signOther = (neighbour[other] ?? 0) > vertex ? 1 : -1;
        const otherRe = wRe[other] ?? 0;
        const otherIm = wIm[other] ?? 0;
        // The neighbours rise, so the slot's low vertex is the first of the pair.
        const re = dRe[slot] ?? 0;
        const im = dIm[slot] ?? 0;
        dRe[slotOther] = (dRe[slotOther] ?? 0) + signOther * (oneRe * re - oneIm * im);
        dIm[slotOther] = (dIm[slotOther] ?? 0) + signOther * (oneRe * im + oneIm * re);
        dRe[slotOne] = (dRe[slotOne] ?? 0) - signOne * (otherRe * re - otherIm * im);
        dIm[slotOne] = (dIm[slotOne] ?? 0) - signOne * (otherRe * im + otherIm * re);
      }
    }
  }

  private joinBack(step: number): void {
    const { plan, vRe, vIm, dRe, dIm } = this;
    const vertex = plan.stepVertex[step] ?? 0;
    const into = plan.stepInto[step] ?? 0;
    const eRe = this.eRe[step] ?? 0;
    const eIm = this.eIm[step] ?? 0;
    vRe[vertex] = (vRe[into] ?? 0) + eRe;
    vIm[vertex] = (vIm[into] ?? 0) + eIm;
    let pair = plan.targetStart[step] ?? 0;
    for (let at = plan.neighbourStart[step] ?? 0; at < (plan.neighbourStart[step + 1] ?? 0); at++, pair++) {
      const from = plan.neighbourSlot[at] ?? 0;
      const to = plan.target[pair] ?? 0;
      const other = plan.neighbour[at] ?? 0;
      const signFrom = other > vertex ? 1 : -1;
      const signTo = other > into ? 1 : -1;
      dRe[from] = signFrom * (signTo * (dRe[to] ?? 0) + eRe);
      dIm[from] = signFrom * (signTo * (dIm[to] ?? 0) + eIm);
    }
  }
}

/** A complex product or quotient, and the sum that it goes into, round by some units in the last place. */
const ROUNDING = 4 * Number.EPSILON;

function sizeAt(re: Float64Array, im: Float64Array, at: number): number {
  return Math.abs(re[at] ?? 0) + Math.abs(im[at] ?? 0);
}

function fourOf(size: number): [Float64Array, Float64Array, Float64Array, Float64Array] {
  return [new Float64Array(size), new Float64Array(size), new Float64Array(size), new Float64Array(size)];
}
