import { blockTriangular } from './block-triangular';
import type { NaturalFrequency, Refined, Root } from './coincident-roots';
import { gather } from './coincident-roots';
import { ComplexLu } from './complex-lu';
import { generalisedEigenvalues } from './generalised-eigenvalues';
import type { PencilMatrices } from './pencil-matrices';
import { balance, copyOfPencil } from './pencil-matrices';
import type { Stamps } from './stamps';

export type NaturalFrequencies =
  | { readonly kind: 'regular'; readonly list: readonly NaturalFrequency[] }
  | { readonly kind: 'singular' }
  | { readonly kind: 'unsettled' };

/**
 * The finite s with det(G + s·C) = 0: generalised eigenvalues at the scale `omega` (rad/s), each then made exact by
 * Rayleigh's quotient −wᵀGv/wᵀCv of its left and right vectors (Ostrowski 1958–59, for matrices that are not symmetric), which is
 * taken over the terms of the equations and not over their sums. The error of the quotient is of second order in those
 * of the vectors, so that the value is as exact as its condition in the element values allows, however the values
 * spread. Real ones are real; complex ones are exactly conjugate, the upper one first.
 *
 * The diagonal blocks of the block triangular form are taken one by one: stages that act on the next but not back have
 * their own eigenvalues and nothing of each other's errors, so that equal stages have equal ones. Within one block a
 * multiple eigenvalue is found as the mean of what it falls apart into.
 */
export function naturalFrequencies(stamps: Stamps, size: number, omega: number): NaturalFrequencies {
  const blocks = blockTriangular(stamps.pattern(size));
  if (blocks === undefined) return { kind: 'singular' };
  const found: Root[] = [];
  for (const [block, { rows, columns }] of blocks.entries()) {
    const outcome = rootsOfBlock(stamps.within(rows, columns), rows.length, omega);
    if ('kind' in outcome) return outcome;
    found.push(...outcome.map((root) => ({ ...root, block })));
  }
  return { kind: 'regular', list: gather(found).map(settle) };
}

function rootsOfBlock(stamps: Stamps, size: number, omega: number): readonly Refined[] | { readonly kind: 'singular' | 'unsettled' } {
  const matrices = stamps.toMatrices(size, omega);
  const outcome = generalisedEigenvalues(matrices);
  if (outcome.kind !== 'regular') return outcome;
  const { re, im } = outcome.finite;
  if (re.length === 0) return [];
  const refiner = new Refiner(stamps, matrices, omega);
  const found: Refined[] = [];
  for (let k = 0; k < re.length; k++) {
    const y = im[k] ?? 0;
    // The lower one of a pair follows the upper one.
    if (y < 0) continue;
    const x = re[k] ?? 0;
    // Zeros are exact: they were found by rank.
    const root = x === 0 && y === 0 ? ORIGIN : refiner.refine(x, y, gapAt(re, im, k));
    found.push(root);
    if (y > 0) found.push({ ...root, im: -root.im, raw: { re: root.raw.re, im: -root.raw.im } });
  }
  return found;
}

const ORIGIN: Refined = { re: 0, im: 0, uncertainty: 0, isRefined: true, raw: { re: 0, im: 0 } };

/** The distance to the nearest other eigenvalue. */
function gapAt(re: Float64Array, im: Float64Array, k: number): number {
  let least = Infinity;
  for (let other = 0; other < re.length; other++) {
    if (other === k) continue;
    least = Math.min(least, Math.hypot((re[other] ?? 0) - (re[k] ?? 0), (im[other] ?? 0) - (im[k] ?? 0)));
  }
  return least;
}

/** A real part of a pair that is nothing beside the uncertainty is nothing. */
function settle(root: NaturalFrequency): NaturalFrequency {
  return Math.abs(root.re) <= 8 * root.uncertainty && root.im !== 0 ? { ...root, re: 0 } : root;
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
  refine(re: number, im: number, gap: number): Refined {
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
        return { ...start, uncertainty: gap * this.omega, isRefined: false, raw: start };
      }
      at = { re: next.re, im: im === 0 ? 0 : next.im };
      uncertainty = next.uncertainty;
      if (moved <= Math.max(uncertainty, Number.EPSILON * Math.hypot(at.re, at.im))) break;
    }
    return { ...at, uncertainty: Math.min(uncertainty, Math.hypot(at.re, at.im)), isRefined: true, raw: start };
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

  private quotient(at: { readonly re: number; readonly im: number }): Pick<Refined, 're' | 'im' | 'uncertainty'> | undefined {
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
