import type { PencilMatrices } from './pencil-matrices';
import { emptyPencil } from './pencil-matrices';

/**
 * A real pencil G + s·C as a sum of terms (g + s·c)·(e_a − e_b)·(e_p − e_q)ᵀ, one for each coefficient of the equations
 * of a network, with −1 where a unit vector is missing. The sum G loses what small terms say beside large ones; the
 * terms keep it, so eigenvalues are made exact with these (see `refine`).
 */
export class Stamps {
  /** The unit vectors: rows a and b, columns p and q, four numbers a term. */
  private readonly places: number[] = [];
  private readonly constants: number[] = [];
  private readonly slopes: number[] = [];
  /** Whether the coefficient says how the network hangs together (±1, without error) and not what an element is. */
  private readonly exact: boolean[] = [];

  get length(): number {
    return this.constants.length;
  }

  add(a: number, b: number, p: number, q: number, constant: number, slope: number, exact: boolean): void {
    this.places.push(a, b, p, q);
    this.constants.push(constant);
    this.slopes.push(slope);
    this.exact.push(exact);
  }

  /** All terms but those of one row alone, in whose place another equation is to be put. */
  withoutRow(row: number): Stamps {
    const rest = new Stamps();
    for (let k = 0; k < this.length; k++) {
      const [a = -1, b = -1, p = -1, q = -1] = this.places.slice(4 * k, 4 * k + 4);
      if (a === row && b < 0) continue;
      rest.add(a, b, p, q, this.constants[k] ?? 0, this.slopes[k] ?? 0, this.exact[k] ?? false);
    }
    return rest;
  }

  /** The columns in which each row has anything. */
  pattern(size: number): readonly (readonly number[])[] {
    const columns = Array.from({ length: size }, () => new Set<number>());
    this.forEachEntry((row, column) => columns[row]?.add(column));
    return columns.map((set) => [...set]);
  }

  /** What of the terms lies in some rows and columns, which are numbered anew from 0. */
  within(rows: readonly number[], columns: readonly number[]): Stamps {
    const rowAt = new Map(rows.map((row, k) => [row, k]));
    const columnAt = new Map(columns.map((column, k) => [column, k]));
    const part = new Stamps();
    for (let k = 0; k < this.length; k++) {
      const [a = -1, b = -1, p = -1, q = -1] = this.places.slice(4 * k, 4 * k + 4);
      const [i, j] = [rowAt.get(a) ?? -1, rowAt.get(b) ?? -1];
      const [m, n] = [columnAt.get(p) ?? -1, columnAt.get(q) ?? -1];
      if ((i < 0 && j < 0) || (m < 0 && n < 0)) continue;
      part.add(i, j, m, n, this.constants[k] ?? 0, this.slopes[k] ?? 0, this.exact[k] ?? false);
    }
    return part;
  }

  /** G − λB with λ = s/omega and B = −omega·C, with the errors that ε in each element and in each sum makes. */
  toMatrices(size: number, omega: number): PencilMatrices {
    const pencil = emptyPencil(size);
    const { aRe, aError, bRe, bError } = pencil;
    const put = (entries: Float64Array, errors: Float64Array, at: number, value: number, exact: boolean): void => {
      const sum = (entries[at] ?? 0) + value;
      errors[at] = (errors[at] ?? 0) + Number.EPSILON * ((exact ? 0 : Math.abs(value)) + (entries[at] === 0 ? 0 : Math.abs(sum) / 2));
      entries[at] = sum;
    };
    this.forEachEntry((row, column, sign, k) => {
      const at = row * size + column;
      const constant = this.constants[k] ?? 0;
      const slope = this.slopes[k] ?? 0;
      if (constant !== 0) put(aRe, aError, at, sign * constant, this.exact[k] ?? false);
      if (slope !== 0) put(bRe, bError, at, -sign * slope * omega, this.exact[k] ?? false);
    });
    return pencil;
  }

  /** Calls for each of the up to four entries of each term, with its sign. */
  private forEachEntry(call: (row: number, column: number, sign: number, term: number) => void): void {
    for (let k = 0; k < this.length; k++) {
      for (let i = 0; i < 2; i++) {
        const row = this.places[4 * k + i] ?? -1;
        if (row < 0) continue;
        for (let j = 2; j < 4; j++) {
          const column = this.places[4 * k + j] ?? -1;
          if (column >= 0) call(row, column, (i === 1) === (j === 3) ? 1 : -1, k);
        }
      }
    }
  }

  /**
   * wᵀ·G·v and wᵀ·C·v, term by term, and Σ |wᵀ·(part of G + s·C)·v| over all parts that have errors: for an eigenvalue
   * s with vectors w and v that sum over |wᵀ·C·v| is Σ |p·∂s/∂p| over the element values p, its condition in rad/s.
   * `into` takes [G re, G im, C re, C im, sum].
   */
  formsAt(
    w: { readonly re: Float64Array; readonly im: Float64Array },
    v: { readonly re: Float64Array; readonly im: Float64Array },
    sRe: number,
    sIm: number,
    into: Float64Array,
  ): void {
    into.fill(0);
    const { places, constants, slopes, exact } = this;
    const length = this.length;
    let gRe = 0;
    let gIm = 0;
    let cRe = 0;
    let cIm = 0;
    let terms = 0;
    const size = Math.hypot(sRe, sIm);
    for (let k = 0; k < length; k++) {
      const a = places[4 * k] ?? -1;
      const b = places[4 * k + 1] ?? -1;
      const p = places[4 * k + 2] ?? -1;
      const q = places[4 * k + 3] ?? -1;
      const wRe = (a < 0 ? 0 : (w.re[a] ?? 0)) - (b < 0 ? 0 : (w.re[b] ?? 0));
      const wIm = (a < 0 ? 0 : (w.im[a] ?? 0)) - (b < 0 ? 0 : (w.im[b] ?? 0));
      const vRe = (p < 0 ? 0 : (v.re[p] ?? 0)) - (q < 0 ? 0 : (v.re[q] ?? 0));
      const vIm = (p < 0 ? 0 : (v.im[p] ?? 0)) - (q < 0 ? 0 : (v.im[q] ?? 0));
      const re = wRe * vRe - wIm * vIm;
      const im = wRe * vIm + wIm * vRe;
      const g = constants[k] ?? 0;
      const c = slopes[k] ?? 0;
      gRe += g * re;
      gIm += g * im;
      cRe += c * re;
      cIm += c * im;
      if (exact[k] !== true) terms += Math.hypot(re, im) * (Math.abs(g) + Math.abs(c) * size);
    }
    into[0] = gRe;
    into[1] = gIm;
    into[2] = cRe;
    into[3] = cIm;
    into[4] = terms;
  }
}
