import { ExtendedSolver, ExtendedVector } from '../linear/extended';
import { SparseLu } from '../linear/sparse-lu';
import type { Pin, ResponseLayout } from './response-layout';

/** A linear form of the unknowns: Σ coefficient · unknown. An unknown of −1 is the reference node's voltage, 0. */
export interface LinearForm {
  readonly unknowns: readonly number[];
  readonly re: readonly number[];
  readonly im: readonly number[];
}

/** The factors of a new frequency are taken along the old order unless a pivot is smaller than this in its row. */
const GOOD_PIVOT = 1e-4;

/** So small against its terms, a sum is nothing but rounding. */
const ROUNDING = 1e-10;

/** In what may be added to a solution at one frequency only, what is smaller than this part of the largest is rounding. */
const PART_OF_A_MODE = 1e-9;

/**
 * The equations of a layout at one frequency after another, with their factors, a right-hand side to be filled, and what
 * may be added to a solution. Kept with its work space.
 */
export class ResponseEquations {
  /** Right-hand sides; rows beyond the size are those that were left out. */
  readonly bRe: Float64Array;
  readonly bIm: Float64Array;
  readonly lu: SparseLu;
  private readonly solver: ExtendedSolver;
  private isOrdered = false;
  private knownModes: readonly ExtendedVector[] | undefined;
  private knownDuals: readonly ExtendedVector[] | undefined;

  constructor(readonly layout: ResponseLayout) {
    const { matrix } = layout;
    this.lu = new SparseLu(matrix.pattern);
    this.solver = new ExtendedSolver(matrix, this.lu);
    this.bRe = new Float64Array(matrix.rowCount);
    this.bIm = new Float64Array(matrix.rowCount);
  }

  /** Sets the frequency. Answers a row of the network whose table does not reach it, or −1. */
  fill(frequency: number): number {
    this.knownModes = undefined;
    this.knownDuals = undefined;
    return this.layout.fill(frequency);
  }

  /** Factors, along the old order while that is good, and answers whether there is something to solve with. */
  factor(): boolean {
    const { lu } = this;
    const { sumRe, sumIm } = this.layout.matrix;
    if (this.isOrdered && lu.factor(sumRe, sumIm) >= GOOD_PIVOT) return true;
    this.isOrdered = lu.analyse(sumRe, sumIm);
    return this.isOrdered && lu.factor(sumRe, sumIm) > 0;
  }

  /** How far the worst pivot, or sum of contributions, has cancelled: about ε where only rounding is left of it. */
  cancellation(): number {
    return Math.min(this.lu.cancellation, this.layout.matrix.cancellation());
  }

  /** Whether something is solved that excites all of the equations, each in its own scale. */
  converges(): boolean {
    const { layout, lu, bRe } = this;
    this.clear();
    for (let row = 0; row < layout.size; row++) bRe[row] = (row % 2 === 0 ? 1 : -0.75) / (lu.rowScale[row] ?? 1);
    return this.solve(new ExtendedVector());
  }

  clear(): void {
    this.bRe.fill(0);
    this.bIm.fill(0);
  }

  solve(x: ExtendedVector): boolean {
    return this.solver.solve(this.bRe, this.bIm, x);
  }

  /** Multipliers for a right-hand side that is a form; 0 for equations that were left out. */
  solveAdjoint({ unknowns, re, im }: LinearForm, x: ExtendedVector): boolean {
    const { bRe, bIm } = this;
    this.clear();
    unknowns.forEach((unknown, place) => {
      if (unknown < 0) return;
      bRe[unknown] = (bRe[unknown] ?? 0) + (re[place] ?? 0);
      bIm[unknown] = (bIm[unknown] ?? 0) + (im[place] ?? 0);
    });
    if (!this.solver.solve(bRe, bIm, x, true)) return false;
    for (const { row } of this.layout.pins) set(x, row, 0);
    return true;
  }

  /** The first pin whose equation the solution just found does not keep, by its place, or −1. */
  brokenPin(x: ExtendedVector): number {
    const { layout, solver, bRe, bIm } = this;
    const offs = layout.pins.map(({ outerRow }) => Math.abs(solver.outerRe(outerRow)) + Math.abs(solver.outerIm(outerRow)));
    let dependence = 0;
    return layout.pins.findIndex(({ cause, outerRow }, place) => {
      // An equation that follows from others may have nothing in it but rounding, and is held against all of those.
      const dual = cause === 'dependence' ? this.resonantDuals[dependence++] : undefined;
      const weightOf = dual === undefined ? (row: number) => (row === outerRow ? 1 : 0) : weights(layout, dual);
      return (offs[place] ?? 0) > ROUNDING * sizeOfRows(layout, weightOf, x, bRe, bIm);
    });
  }

  /** For each pin what may be added to a solution without breaking any equation; undefined where it cannot be found. */
  get modes(): readonly ExtendedVector[] | undefined {
    return (this.knownModes ??= this.findModes());
  }

  /** Those of floating parts and loops. */
  get structuralModes(): readonly ExtendedVector[] {
    return this.modesOf((cause) => cause !== 'dependence');
  }

  /** Those that are there at this one frequency, as a resonance is. */
  get resonantModes(): readonly ExtendedVector[] {
    return this.modesOf((cause) => cause === 'dependence');
  }

  /**
   * For each of `resonantModes` the multipliers with which its equation follows from the others, 1 for its own: what
   * stands on the right-hand sides has to add up to nothing by them.
   */
  get resonantDuals(): readonly ExtendedVector[] {
    return (this.knownDuals ??= this.findDuals());
  }

  private modesOf(isWanted: (cause: Pin['cause']) => boolean): readonly ExtendedVector[] {
    const { pins } = this.layout;
    if (pins.length === 0) return [];
    return (this.modes ?? []).filter((_, place) => isWanted(pins[place]?.cause ?? 'part'));
  }

  private findModes(): readonly ExtendedVector[] | undefined {
    const { layout, solver, lu } = this;
    const isPlain = !layout.isCrossed && layout.pins.every(({ cause }) => cause === 'part');
    const isResonant = layout.pins.some(({ cause }) => cause === 'dependence');
    const modes: ExtendedVector[] = [];
    const bRe = new Float64Array(layout.size);
    const bIm = new Float64Array(layout.size);
    for (const { row, of } of layout.pins) {
      const mode = new ExtendedVector(layout.size);
      modes.push(mode);
      if (isPlain) {
        layout.partOf.forEach((part, node) => {
          if (part === layout.partOf[of]) mode.re[node - 1] = 1;
        });
        continue;
      }
      bRe.fill(0);
      bRe[row] = 1;
      if (!solver.solve(bRe, bIm, mode)) return undefined;
      clean(mode, lu.columnScale, isResonant ? PART_OF_A_MODE : Number.EPSILON);
    }
    return modes;
  }

  private findDuals(): readonly ExtendedVector[] {
    const { layout, solver, lu } = this;
    const { matrix, pins } = layout;
    const bRe = new Float64Array(layout.size);
    const bIm = new Float64Array(layout.size);
    return pins.flatMap(({ cause, outerRow, row }) => {
      if (cause !== 'dependence') return [];
      bRe.fill(0);
      bIm.fill(0);
      matrix.row.forEach((of, at) => {
        if (of !== outerRow) return;
        const column = matrix.column[at] ?? 0;
        bRe[column] = (bRe[column] ?? 0) - (matrix.re[at] ?? 0);
        bIm[column] = (bIm[column] ?? 0) - (matrix.im[at] ?? 0);
      });
      const dual = new ExtendedVector(layout.size);
      solver.solve(bRe, bIm, dual, true);
      for (const pin of pins) set(dual, pin.row, 0);
      set(dual, row, 1);
      clean(dual, lu.rowScale, PART_OF_A_MODE);
      return [dual];
    });
  }
}

/** Whether a form is other for what may be added to a solution. */
export function isMovedBy({ unknowns, re, im }: LinearForm, mode: ExtendedVector): boolean {
  let sumRe = 0;
  let sumIm = 0;
  let size = 0;
  unknowns.forEach((unknown, term) => {
    if (unknown < 0) return;
    const [cRe, cIm] = [re[term] ?? 0, im[term] ?? 0];
    const [nRe, nIm] = [mode.re[unknown] ?? 0, mode.im[unknown] ?? 0];
    sumRe += cRe * nRe - cIm * nIm;
    sumIm += cRe * nIm + cIm * nRe;
    size += (Math.abs(cRe) + Math.abs(cIm)) * (Math.abs(nRe) + Math.abs(nIm));
  });
  return Math.abs(sumRe) + Math.abs(sumIm) > ROUNDING * size;
}

/** Σ of the sizes of the terms of equations, each with its weight. */
function sizeOfRows(
  { matrix }: ResponseLayout,
  weightOf: (row: number) => number,
  x: ExtendedVector,
  bRe: Float64Array,
  bIm: Float64Array,
): number {
  let size = 0;
  for (let row = 0; row < matrix.rowCount; row++) size += weightOf(row) * (Math.abs(bRe[row] ?? 0) + Math.abs(bIm[row] ?? 0));
  for (let at = 0; at < matrix.row.length; at++) {
    const weight = weightOf(matrix.row[at] ?? 0);
    if (weight === 0) continue;
    const from = matrix.column[at] ?? 0;
    const entry = Math.abs(matrix.re[at] ?? 0) + Math.abs(matrix.im[at] ?? 0);
    size += weight * entry * (Math.abs(x.re[from] ?? 0) + Math.abs(x.im[from] ?? 0));
  }
  return size;
}

/** The sizes of multipliers, by where the rows that they belong to stand. */
function weights({ pins, size }: ResponseLayout, { re, im }: ExtendedVector): (row: number) => number {
  const replaced = new Set(pins.map(({ row }) => row));
  const of = (row: number): number => Math.abs(re[row] ?? 0) + Math.abs(im[row] ?? 0);
  return (row) => (row >= size ? of(pins[row - size]?.row ?? -1) : replaced.has(row) ? 0 : of(row));
}

function set(x: ExtendedVector, at: number, value: number): void {
  x.re[at] = value;
  for (const part of [x.im, x.reLow, x.imLow]) part[at] = 0;
}

/** What is no more than a part of the largest, each in the scale of its own unknown, becomes nothing. */
function clean({ re, im, reLow, imLow }: ExtendedVector, scale: Float64Array, least: number): void {
  const sizeAt = (at: number): number => (Math.abs(re[at] ?? 0) + Math.abs(im[at] ?? 0)) / (scale[at] ?? 1);
  let largest = 0;
  for (let at = 0; at < re.length; at++) largest = Math.max(largest, sizeAt(at));
  for (let at = 0; at < re.length; at++) {
    if (sizeAt(at) > least * largest) continue;
    for (const part of [re, im, reLow, imLow]) part[at] = 0;
  }
}
