import { ComplexLu } from './complex-lu';
import { generalisedEigenvalues } from './generalised-eigenvalues';
import type { PencilMatrices } from './pencil-matrices';
import { balance, copyOfPencil } from './pencil-matrices';
import type { Stamps } from './stamps';

/** One s at which det(G + s·C) is zero. */
export interface NaturalFrequency {
  /** rad/s. */
  readonly re: number;
  readonly im: number;
  /**
   * How far it moves, rad/s, when every element value is off by one unit of rounding: ε·Σ|p·∂s/∂p|. Errors are of this
   * size. Near a multiple one it is what a multiple one may move by.
   */
  readonly uncertainty: number;
  /** How many coincide within their uncertainties; each of them is in the list, all at their mean. */
  readonly multiplicity: number;
}

export type NaturalFrequencies =
  | { readonly kind: 'regular'; readonly list: readonly NaturalFrequency[] }
  | { readonly kind: 'singular' }
  | { readonly kind: 'unsettled' };

/** How many uncertainties apart two values may lie and still be taken for one. */
export const COINCIDENT = 32;

/**
 * The finite s with det(G + s·C) = 0: generalised eigenvalues at the scale `omega` (rad/s), each then made exact by
 * Rayleigh's quotient −wᵀGv/wᵀCv of its left and right vectors (Ostrowski 1958–59, doi 10.1007/BF00284275), which is
 * taken over the terms of the equations and not over their sums. The error of the quotient is of second order in those
 * of the vectors, so that the value is as exact as its condition in the element values allows, however the values
 * spread. Real ones are real; complex ones are exactly conjugate, the upper one first.
 */
export function naturalFrequencies(stamps: Stamps, size: number, omega: number): NaturalFrequencies {
  const matrices = stamps.toMatrices(size, omega);
  const outcome = generalisedEigenvalues(matrices);
  if (outcome.kind !== 'regular') return outcome;
  const { re, im } = outcome.finite;
  const refiner = new Refiner(stamps, matrices, omega);
  const found: Root[] = [];
  for (let k = 0; k < re.length; k++) {
    const y = im[k] ?? 0;
    // The lower one of a pair follows the upper one.
    if (y < 0) continue;
    const x = re[k] ?? 0;
    // Zeros are exact: they were found by rank.
    const root = x === 0 && y === 0 ? { re: 0, im: 0, uncertainty: 0 } : refiner.refine(x, y, gapAt(re, im, k));
    found.push(root);
    if (y > 0) found.push({ ...root, im: -root.im });
  }
  return { kind: 'regular', list: gather(found.map(settle)) };
}

interface Root {
  readonly re: number;
  readonly im: number;
  readonly uncertainty: number;
}

/** The distance to the nearest other eigenvalue. */
function gapAt(re: Float64Array, im: Float64Array, k: number): number {
  let least = Infinity;
  for (let other = 0; other < re.length; other++) {
    if (other === k) continue;
    least = Math.min(least, Math.hypot((re[other] ?? 0) - (re[k] ?? 0), (im[other] ?? 0) - (im[k] ?? 0)));
  }
  return least;
}

/** A part that is nothing beside the uncertainty is nothing. */
function settle(root: Root): Root {
  const least = 8 * root.uncertainty;
  return {
    re: Math.abs(root.re) <= least && root.im !== 0 ? 0 : root.re,
    im: root.im,
    uncertainty: root.uncertainty,
  };
}

const MOST_STEPS = 8;

class Refiner {
  private readonly lu: ComplexLu;
  private readonly balanced: PencilMatrices;
  private readonly rows: Float64Array;
  private readonly columns: Float64Array;
  private readonly v: Vector;
  private readonly w: Vector;
  private readonly scaledV: Vector;
  private readonly scaledW: Vector;
  private readonly kept: Vector;
  private readonly forms = new Float64Array(5);

  constructor(
    private readonly stamps: Stamps,
    matrices: PencilMatrices,
    private readonly omega: number,
  ) {
    const { size } = matrices;
    this.balanced = copyOfPencil(matrices);
    const { rows, columns } = balance(this.balanced);
    this.rows = rows;
    this.columns = columns;
    this.lu = new ComplexLu(size);
    this.v = emptyVector(size);
    this.w = emptyVector(size);
    this.scaledV = emptyVector(size);
    this.scaledW = emptyVector(size);
    this.kept = emptyVector(size);
  }

  /** From an eigenvalue of the scaled pencil, and its distance to the next, to one in rad/s. */
  refine(re: number, im: number, gap: number): Root {
    const start = { re: re * this.omega, im: im * this.omega };
    begin(this.v);
    begin(this.w);
    let at = start;
    let uncertainty = Infinity;
    for (let step = 0; step < MOST_STEPS; step++) {
      this.improveVectors(at.re / this.omega, at.im / this.omega, step === 0);
      const next = this.quotient(at);
      if (next === undefined) break;
      const moved = Math.hypot(next.re - at.re, next.im - at.im);
      // Further than a third of the way to another one, it might as well end there: then what was found stays.
      if (Math.hypot(next.re - start.re, next.im - start.im) > (gap * this.omega) / 3) {
        return { ...start, uncertainty: Math.max(next.uncertainty, Math.min(moved, Math.hypot(start.re, start.im))) };
      }
      at = { re: next.re, im: im === 0 ? 0 : next.im };
      uncertainty = next.uncertainty;
      if (moved <= Math.max(uncertainty, Number.EPSILON * Math.hypot(at.re, at.im))) break;
    }
    return { ...at, uncertainty: Math.min(uncertainty, Math.hypot(at.re, at.im)) };
  }

  /**
   * Inverse iteration at λ, for the right and the left vector: (A − λB)·v' = B·v. Without the B it would fail where
   * wᵀv is 0, as it can be though wᵀBv is not.
   */
  private improveVectors(re: number, im: number, fromNothing: boolean): void {
    const { lu, balanced, v, w } = this;
    for (let k = 0; k < lu.re.length; k++) {
      const bRe = balanced.bRe[k] ?? 0;
      lu.re[k] = (balanced.aRe[k] ?? 0) - re * bRe;
      lu.im[k] = -im * bRe;
    }
    lu.factor();
    if (fromNothing) this.solveBoth();
    this.applyB(v, 1);
    this.applyB(w, lu.size);
    this.solveBoth();
  }

  private solveBoth(): void {
    const { lu, v, w } = this;
    lu.solve(v.re, v.im);
    normalise(v);
    lu.solveTransposed(w.re, w.im);
    normalise(w);
  }

  /** x = B·x with a step of 1 along a row, Bᵀ·x with a step of `size`. */
  private applyB(x: Vector, step: number): void {
    const { balanced, kept } = this;
    const { size, bRe } = balanced;
    const rowStep = step === 1 ? size : 1;
    kept.re.fill(0);
    kept.im.fill(0);
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) {
        const entry = bRe[i * rowStep + j * step] ?? 0;
        if (entry === 0) continue;
        kept.re[i] = (kept.re[i] ?? 0) + entry * (x.re[j] ?? 0);
        kept.im[i] = (kept.im[i] ?? 0) + entry * (x.im[j] ?? 0);
      }
    }
    x.re.set(kept.re);
    x.im.set(kept.im);
  }

  private quotient(at: { readonly re: number; readonly im: number }): Root | undefined {
    const { stamps, forms, rows, columns, v, w, scaledV, scaledW } = this;
    for (let k = 0; k < rows.length; k++) {
      scaledV.re[k] = (v.re[k] ?? 0) * (columns[k] ?? 1);
      scaledV.im[k] = (v.im[k] ?? 0) * (columns[k] ?? 1);
      scaledW.re[k] = (w.re[k] ?? 0) * (rows[k] ?? 1);
      scaledW.im[k] = (w.im[k] ?? 0) * (rows[k] ?? 1);
    }
    stamps.formsAt(scaledW, scaledV, at.re, at.im, forms);
    const [gRe = 0, gIm = 0, cRe = 0, cIm = 0, terms = 0] = forms;
    const square = cRe * cRe + cIm * cIm;
    const root = {
      re: -(gRe * cRe + gIm * cIm) / square,
      im: -(gIm * cRe - gRe * cIm) / square,
      uncertainty: (Number.EPSILON * terms) / Math.sqrt(square),
    };
    return Number.isFinite(root.re) && Number.isFinite(root.im) && Number.isFinite(root.uncertainty) ? root : undefined;
  }
}

interface Vector {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

function emptyVector(size: number): Vector {
  return { re: new Float64Array(size), im: new Float64Array(size) };
}

const GOLDEN = (Math.sqrt(5) - 1) / 2;

/** Something of every direction, the same each time. */
function begin({ re, im }: Vector): void {
  for (let k = 0; k < re.length; k++) {
    re[k] = 0.5 + (((k + 1) * GOLDEN) % 1);
    im[k] = 0;
  }
}

/** To a largest entry of one. */
function normalise({ re, im }: Vector): void {
  let most = 0;
  for (let k = 0; k < re.length; k++) most = Math.max(most, Math.abs(re[k] ?? 0), Math.abs(im[k] ?? 0));
  if (most === 0) return;
  for (let k = 0; k < re.length; k++) {
    re[k] = (re[k] ?? 0) / most;
    im[k] = (im[k] ?? 0) / most;
  }
}

/** An m-fold eigenvalue that is perturbed by ε spreads by some ᵐ√ε; what lies further apart is not one. */
function spread(multiplicity: number, size: number): number {
  return (64 * Number.EPSILON) ** (1 / multiplicity) * size;
}

/** Finds those that coincide within their uncertainties, and puts them at their mean, which is far better determined. */
function gather(roots: readonly Root[]): NaturalFrequency[] {
  const groupOf = roots.map((_, k) => k);
  const uncertainties = roots.map(({ uncertainty }) => uncertainty);
  roots.forEach((root, k) => {
    const size = Math.hypot(root.re, root.im);
    const others = roots
      .map((other, index) => ({ index, distance: Math.hypot(other.re - root.re, other.im - root.im) }))
      .sort((a, b) => a.distance - b.distance || a.index - b.index);
    for (let m = roots.length; m > 1; m--) {
      const reach = Math.min(COINCIDENT * root.uncertainty, spread(m, size));
      if ((others[m - 1]?.distance ?? Infinity) > reach) continue;
      uncertainties[k] = Math.min(root.uncertainty, spread(m, size));
      for (const { index } of others.slice(0, m)) join(groupOf, k, index);
      break;
    }
  });
  return roots.map((root, k) => {
    const members = roots.filter((_, other) => groupOf[other] === groupOf[k]);
    if (members.length === 1) return { ...root, multiplicity: 1 };
    const mean = (pick: (one: Root) => number): number => members.reduce((sum, one) => sum + pick(one), 0) / members.length;
    const isReal = members.some(({ im }) => im === 0) || (members.some(({ im }) => im > 0) && members.some(({ im }) => im < 0));
    const most = Math.max(...uncertainties.filter((_, other) => groupOf[other] === groupOf[k]));
    return { re: mean(({ re }) => re), im: isReal ? 0 : mean(({ im }) => im), uncertainty: most, multiplicity: members.length };
  });
}

function join(groupOf: number[], one: number, other: number): void {
  const from = groupOf[other] ?? other;
  const to = groupOf[one] ?? one;
  if (from === to) return;
  groupOf.forEach((group, k) => {
    if (group === from) groupOf[k] = to;
  });
}
