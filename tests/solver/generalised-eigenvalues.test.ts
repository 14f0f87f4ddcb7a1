import { describe, expect, it } from 'vitest';
import { generalisedEigenvalues } from '@/solver/linear/generalised-eigenvalues';
import type { PencilMatrices } from '@/solver/linear/pencil-matrices';
import { emptyPencil } from '@/solver/linear/pencil-matrices';
import { Random } from './support/random';

/**
 * Pencils whose eigenvalues are known because they are made from them: P·(T_A − λT_B)·Q with triangles of known
 * diagonals, and P and Q products of rotations, so that the conditions stay small.
 */
type Pair = readonly [re: number, im: number];

interface Complex {
  re: number;
  im: number;
}

type Matrix = Complex[][];

function matrix(size: number, at: (row: number, column: number) => Complex): Matrix {
  return Array.from({ length: size }, (_, i) => Array.from({ length: size }, (_unused, j) => at(i, j)));
}

function turn(m: Matrix, i: number, j: number, angle: number, rows: boolean): void {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  m.forEach((_, k) => {
    const x = rows ? m[i]?.[k] : m[k]?.[i];
    const y = rows ? m[j]?.[k] : m[k]?.[j];
    if (x === undefined || y === undefined) return;
    const [xRe, xIm] = [x.re, x.im];
    x.re = c * xRe + s * y.re;
    x.im = c * xIm + s * y.im;
    y.re = c * y.re - s * xRe;
    y.im = c * y.im - s * xIm;
  });
}

function mixed(a: Matrix, b: Matrix, random: Random): PencilMatrices {
  const size = a.length;
  for (let k = 0; k < 3 * size; k++) {
    const i = random.whole(0, size - 1);
    const j = (i + random.whole(1, Math.max(1, size - 1))) % size;
    if (i === j) continue;
    const angle = random.between(-3, 3);
    const rows = random.next() < 0.5;
    turn(a, i, j, angle, rows);
    turn(b, i, j, angle, rows);
  }
  const pencil = emptyPencil(size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      const at = i * size + j;
      const [x, y] = [a[i]?.[j], b[i]?.[j]];
      if (x === undefined || y === undefined) continue;
      pencil.aRe[at] = x.re;
      pencil.aIm[at] = x.im;
      pencil.bRe[at] = y.re;
      pencil.bIm[at] = y.im;
      pencil.aError[at] = 64 * Number.EPSILON;
      pencil.bError[at] = 64 * Number.EPSILON;
    }
  }
  return pencil;
}

/** The largest distance from an expected value to the nearest one found that is not taken yet, over 1 + its size. */
function worst(found: { readonly re: Float64Array; readonly im: Float64Array }, expected: readonly Pair[]): number {
  const left = Array.from(found.re, (re, k): Pair => [re, found.im[k] ?? 0]);
  let most = 0;
  for (const [re, im] of expected) {
    const distances = left.map(([x, y]) => Math.hypot(x - re, y - im));
    const least = Math.min(...distances);
    left.splice(distances.indexOf(least), 1);
    most = Math.max(most, least / (1 + Math.hypot(re, im)));
  }
  return most;
}

const ZERO = (): Complex => ({ re: 0, im: 0 });

/** Upper triangular with two by two blocks on the diagonal of A for pairs; `beta` 0 makes an eigenvalue infinite. */
function realPencil(random: Random, pairs: number, reals: number, infinite: number): { pencil: PencilMatrices; expected: Pair[] } {
  const size = 2 * pairs + reals + infinite;
  const upper = (i: number, j: number): Complex => (j > i ? { re: random.between(-0.3, 0.3), im: 0 } : ZERO());
  const a = matrix(size, upper);
  const b = matrix(size, upper);
  const expected: Pair[] = [];
  const set = (m: Matrix, i: number, j: number, re: number): void => {
    const row = m[i];
    if (row !== undefined) row[j] = { re, im: 0 };
  };
  for (let k = 0; k < pairs; k++) {
    const [sigma, omega] = [random.between(-2, 2), random.between(0.2, 2)];
    expected.push([sigma, omega], [sigma, -omega]);
    set(a, 2 * k, 2 * k, sigma);
    set(a, 2 * k, 2 * k + 1, omega);
    set(a, 2 * k + 1, 2 * k, -omega);
    set(a, 2 * k + 1, 2 * k + 1, sigma);
    set(b, 2 * k, 2 * k, 1);
    set(b, 2 * k, 2 * k + 1, 0);
    set(b, 2 * k + 1, 2 * k + 1, 1);
  }
  for (let k = 2 * pairs; k < size; k++) {
    const isInfinite = k >= 2 * pairs + reals;
    const value = random.between(-2, 2);
    if (!isInfinite) expected.push([value, 0]);
    set(a, k, k, isInfinite ? 1 : value);
    set(b, k, k, isInfinite ? 0 : 1);
  }
  return { pencil: mixed(a, b, random), expected };
}

describe('generalised eigenvalues of a real pencil', () => {
  it('are those it was made from, real ones real and complex ones in exactly conjugate pairs', () => {
    const random = new Random(11);
    for (let round = 0; round < 60; round++) {
      const { pencil, expected } = realPencil(random, random.whole(0, 4), random.whole(1, 4), 0);
      const outcome = generalisedEigenvalues(pencil);
      expect(outcome.kind).toBe('regular');
      if (outcome.kind !== 'regular') continue;
      const { finite } = outcome;
      expect(finite.re.length).toBe(expected.length);
      // The conditions of such pencils are some thousands.
      expect(worst(finite, expected)).toBeLessThanOrEqual(2e4 * Number.EPSILON * expected.length);
      for (let k = 0; k < finite.im.length; k++) {
        if (finite.im[k] === 0) continue;
        expect(finite.re[k + 1]).toBe(finite.re[k]);
        expect(finite.im[k + 1]).toBe(-(finite.im[k] ?? 0));
        k++;
      }
    }
  });

  it('leave out every infinite one, of an index up to the number of them', () => {
    const random = new Random(12);
    for (let round = 0; round < 60; round++) {
      const infinite = random.whole(1, 5);
      const { pencil, expected } = realPencil(random, random.whole(0, 2), random.whole(1, 3), infinite);
      const outcome = generalisedEigenvalues(pencil);
      expect(outcome.kind).toBe('regular');
      if (outcome.kind !== 'regular') continue;
      expect(outcome.infinite).toBe(infinite);
      expect(worst(outcome.finite, expected)).toBeLessThanOrEqual(1e6 * Number.EPSILON);
    }
  });

  it('count zero as often as it counts, exactly', () => {
    // A is nilpotent, B the identity: one block of four zeros, and beside it −3.
    const pencil = emptyPencil(5);
    for (let k = 0; k < 3; k++) pencil.aRe[k * 5 + k + 1] = 1;
    pencil.aRe[24] = -3;
    for (let k = 0; k < 5; k++) pencil.bRe[k * 6] = 1;
    const outcome = generalisedEigenvalues(pencil);
    expect(outcome.kind === 'regular' && Array.from(outcome.finite.re).sort((x, y) => x - y)).toEqual([-3, 0, 0, 0, 0]);
  });

  it('of a pencil without B, of order none, and of order one', () => {
    expect(generalisedEigenvalues(emptyPencil(0))).toMatchObject({ kind: 'regular', infinite: 0 });
    const one = emptyPencil(1);
    one.aRe[0] = 6;
    expect(generalisedEigenvalues(one)).toMatchObject({ kind: 'regular', infinite: 1 });
    one.bRe[0] = -2;
    const outcome = generalisedEigenvalues(one);
    expect(outcome.kind === 'regular' && [...outcome.finite.re, ...outcome.finite.im]).toEqual([-3, 0]);
  });

  it('of a pencil that is singular for every λ are none', () => {
    const pencil = emptyPencil(3);
    // Row 3 = row 1 + row 2 in both matrices.
    const rows = [
      [1, 2, 3],
      [0.1, 0.7, -0.3],
    ] as const;
    for (let j = 0; j < 3; j++) {
      pencil.aRe[j] = rows[0][j] ?? 0;
      pencil.aRe[3 + j] = rows[1][j] ?? 0;
      pencil.aRe[6 + j] = (rows[0][j] ?? 0) + (rows[1][j] ?? 0);
      pencil.bRe[j] = (rows[1][j] ?? 0) * 3;
      pencil.bRe[3 + j] = (rows[0][j] ?? 0) / 7;
      pencil.bRe[6 + j] = (rows[1][j] ?? 0) * 3 + (rows[0][j] ?? 0) / 7;
    }
    for (let k = 0; k < 9; k++) {
      pencil.aError[k] = Number.EPSILON * Math.abs(pencil.aRe[k] ?? 0);
      pencil.bError[k] = Number.EPSILON * Math.abs(pencil.bRe[k] ?? 0);
    }
    expect(generalisedEigenvalues(pencil).kind).toBe('singular');
  });

  it('do not change but for rounding when λ is scaled and rows and columns by powers of ten', () => {
    const random = new Random(13);
    const { pencil, expected } = realPencil(random, 2, 3, 1);
    const { size } = pencil;
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) {
        const by = 10 ** (3 * i - 2 * j);
        for (const entries of [pencil.aRe, pencil.bRe, pencil.aError, pencil.bError]) {
          entries[i * size + j] = (entries[i * size + j] ?? 0) * by;
        }
      }
    }
    const outcome = generalisedEigenvalues(pencil);
    expect(outcome.kind).toBe('regular');
    if (outcome.kind === 'regular') expect(worst(outcome.finite, expected)).toBeLessThanOrEqual(1e7 * Number.EPSILON);
  });

  it('settles for larger ones, of order 60', () => {
    const { pencil, expected } = realPencil(new Random(14), 20, 15, 5);
    const outcome = generalisedEigenvalues(pencil);
    expect(outcome.kind).toBe('regular');
    if (outcome.kind !== 'regular') return;
    expect(outcome.infinite).toBe(5);
    expect(outcome.finite.re.length).toBe(expected.length);
    // A random triangle of this order is far from normal; the sum, which is a trace, is not.
    const total = outcome.finite.re.reduce((sum, re) => sum + re, 0);
    expect(Math.abs(total - expected.reduce((sum, [re]) => sum + re, 0))).toBeLessThanOrEqual(1e-6);
  });
});

describe('generalised eigenvalues of a complex pencil', () => {
  it('are those it was made from, without the infinite ones', () => {
    const random = new Random(21);
    for (let round = 0; round < 60; round++) {
      const infinite = random.whole(0, 3);
      const count = random.whole(1, 6);
      const upper = (i: number, j: number): Complex =>
        j > i ? { re: random.between(-0.3, 0.3), im: random.between(-0.3, 0.3) } : ZERO();
      const a = matrix(count + infinite, upper);
      const b = matrix(count + infinite, upper);
      const expected: Pair[] = [];
      for (let k = 0; k < count + infinite; k++) {
        const value: Pair = [random.between(-2, 2), random.between(-2, 2)];
        const [x, y] = [a[k], b[k]];
        if (x === undefined || y === undefined) continue;
        x[k] = k < count ? { re: value[0], im: value[1] } : { re: 1, im: 0 };
        y[k] = { re: k < count ? 1 : 0, im: 0 };
        if (k < count) expected.push(value);
      }
      const outcome = generalisedEigenvalues(mixed(a, b, random));
      expect(outcome.kind).toBe('regular');
      if (outcome.kind !== 'regular') continue;
      expect(outcome.infinite).toBe(infinite);
      expect(worst(outcome.finite, expected)).toBeLessThanOrEqual(1e6 * Number.EPSILON);
    }
  });
});
