import { Matrix, inverse } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { SparseLu } from '@/solver/linear/sparse-lu';
import { CoordinateMatrix } from '@/solver/linear/sparse-matrix';
import type { SparseMatrix } from '@/solver/linear/sparse-quality';
import { backwardError, estimateCondition, refine, residual, zeros } from '@/solver/linear/sparse-quality';
import { Random } from './support/random';

/** A random sparse matrix with a zero-free transversal, rows and columns scaled over some decades. */
function randomMatrix(random: Random, size: number, density: number, decades: number): CoordinateMatrix {
  const rows: number[] = [];
  const columns: number[] = [];
  const shift = random.whole(0, size - 1);
  for (let row = 0; row < size; row++) {
    for (let column = 0; column < size; column++) {
      if (column !== (row + shift) % size && random.next() > density) continue;
      rows.push(row);
      columns.push(column);
    }
  }
  const matrix = new CoordinateMatrix(size, Int32Array.from(rows), Int32Array.from(columns));
  const scale = (): number[] => Array.from({ length: size }, () => 10 ** random.between(-decades, decades));
  const [rowScale, columnScale] = [scale(), scale()];
  for (let at = 0; at < rows.length; at++) {
    const size2 = (rowScale[rows[at] ?? 0] ?? 1) * (columnScale[columns[at] ?? 0] ?? 1);
    matrix.re[at] = size2 * random.between(-1, 1);
    matrix.im[at] = size2 * random.between(-1, 1);
  }
  matrix.sum();
  return matrix;
}

function sums({ pattern, sumRe, sumIm }: CoordinateMatrix): SparseMatrix {
  return { pattern, re: sumRe, im: sumIm };
}

function factored(matrix: CoordinateMatrix): SparseLu {
  const lu = new SparseLu(matrix.pattern);
  expect(lu.analyse(matrix.sumRe, matrix.sumIm)).toBe(true);
  expect(lu.factor(matrix.sumRe, matrix.sumIm)).toBeGreaterThanOrEqual(0.0999);
  return lu;
}

function randomVector(random: Random, size: number) {
  const x = zeros(size);
  for (let at = 0; at < size; at++) {
    x.re[at] = random.between(-1, 1);
    x.im[at] = random.between(-1, 1);
  }
  return x;
}

function transposed({ pattern, row, column, re, im }: CoordinateMatrix): CoordinateMatrix {
  const other = new CoordinateMatrix(pattern.size, column, row);
  other.re.set(re);
  other.im.set(im);
  other.sum();
  return other;
}

/** The real embedding of the matrix as equilibrated. */
function dense(matrix: CoordinateMatrix, lu: SparseLu): Matrix {
  const { size, rowStart, column } = matrix.pattern;
  const full = Matrix.zeros(2 * size, 2 * size);
  for (let row = 0; row < size; row++) {
    for (let at = rowStart[row] ?? 0; at < (rowStart[row + 1] ?? 0); at++) {
      const to = column[at] ?? 0;
      const scale = (lu.rowScale[row] ?? 1) * (lu.columnScale[to] ?? 1);
      full.set(row, to, scale * (matrix.sumRe[at] ?? 0));
      full.set(size + row, size + to, scale * (matrix.sumRe[at] ?? 0));
      full.set(row, size + to, -scale * (matrix.sumIm[at] ?? 0));
      full.set(size + row, to, scale * (matrix.sumIm[at] ?? 0));
    }
  }
  return full;
}

/** ‖·‖₁ of the complex matrix whose real embedding this is. */
function complexOneNorm(full: Matrix): number {
  const size = full.rows / 2;
  let norm = 0;
  for (let column = 0; column < size; column++) {
    let sum = 0;
    for (let row = 0; row < size; row++) sum += Math.hypot(full.get(row, column), full.get(size + row, column));
    norm = Math.max(norm, sum);
  }
  return norm;
}

describe('CoordinateMatrix', () => {
  it('adds up what falls on one place', () => {
    const matrix = new CoordinateMatrix(2, Int32Array.of(1, 0, 1, 1), Int32Array.of(0, 1, 0, 1));
    matrix.re.set([1, 2, 3, 4]);
    matrix.im.set([0, 0, -1, 0]);
    matrix.sum();
    expect([...matrix.pattern.rowStart]).toEqual([0, 1, 3]);
    expect([...matrix.pattern.column]).toEqual([1, 0, 1]);
    expect([...matrix.sumRe]).toEqual([2, 4, 4]);
    expect([...matrix.sumIm]).toEqual([0, -1, 0]);
  });
});

describe('SparseLu', () => {
  it('solves random systems and their transposes with a backward error of rounding', () => {
    const random = new Random(11);
    for (let round = 0; round < 200; round++) {
      const size = random.whole(1, 40);
      const matrix = randomMatrix(random, size, random.between(0.02, 0.5), random.between(0, 6));
      const lu = new SparseLu(matrix.pattern);
      // A pattern with a transversal is not yet far from singular; the few that are, are told.
      if (!lu.analyse(matrix.sumRe, matrix.sumIm)) continue;
      expect(lu.factor(matrix.sumRe, matrix.sumIm)).toBeGreaterThanOrEqual(0.0999);
      const b = randomVector(random, size);
      const x = zeros(size);
      lu.solve(b.re, b.im, x.re, x.im);
      refine(lu, sums(matrix), x, b, zeros(size));
      expect(backwardError(sums(matrix), x, b)).toBeLessThanOrEqual(8 * Number.EPSILON);
      lu.solveTransposed(b.re, b.im, x.re, x.im);
      const r = zeros(size);
      const other = sums(transposed(matrix));
      residual(other, x, b, r);
      lu.solveTransposed(r.re, r.im, r.re, r.im);
      for (let at = 0; at < size; at++) {
        x.re[at] = (x.re[at] ?? 0) + (r.re[at] ?? 0);
        x.im[at] = (x.im[at] ?? 0) + (r.im[at] ?? 0);
      }
      expect(backwardError(other, x, b)).toBeLessThanOrEqual(8 * Number.EPSILON);
    }
  });

  it('factors other values of the same pattern along the same order', () => {
    const random = new Random(12);
    const matrix = randomMatrix(random, 30, 0.1, 1);
    const lu = factored(matrix);
    const b = randomVector(random, 30);
    const x = zeros(30);
    for (let round = 0; round < 20; round++) {
      for (let at = 0; at < matrix.re.length; at++) {
        matrix.re[at] = (matrix.re[at] ?? 0) * random.between(0.9, 1.1);
        matrix.im[at] = (matrix.im[at] ?? 0) * random.between(0.9, 1.1);
      }
      matrix.sum();
      const smallest = lu.factor(matrix.sumRe, matrix.sumIm);
      lu.solve(b.re, b.im, x.re, x.im);
      refine(lu, sums(matrix), x, b, zeros(30));
      expect(backwardError(sums(matrix), x, b)).toBeLessThanOrEqual((8 * Number.EPSILON) / Math.min(1, smallest));
    }
  });

  it('tells of a pivot that other values have made small, and that a new analysis cures', () => {
    const matrix = new CoordinateMatrix(2, Int32Array.of(0, 0, 1, 1), Int32Array.of(0, 1, 0, 1));
    matrix.re.set([1, 0.5, 0.5, -1]);
    matrix.sum();
    const lu = factored(matrix);
    matrix.re.set([1e-9, 1, 1, 1e-9]);
    matrix.sum();
    expect(lu.factor(matrix.sumRe, matrix.sumIm)).toBeLessThan(1e-8);
    expect(lu.analyse(matrix.sumRe, matrix.sumIm)).toBe(true);
    expect(lu.factor(matrix.sumRe, matrix.sumIm)).toBe(1);
  });

  it('finds the rank of a matrix without an inverse, and which rows and columns have no pivot', () => {
    const structural = new CoordinateMatrix(3, Int32Array.of(0, 1, 2, 0), Int32Array.of(0, 0, 2, 2));
    structural.re.fill(1);
    structural.sum();
    const lu = new SparseLu(structural.pattern);
    expect(lu.analyse(structural.sumRe, structural.sumIm)).toBe(false);
    expect(lu.rank).toBe(2);
    expect([...lu.dependent.columns]).toEqual([1]);
    expect(lu.factor(structural.sumRe, structural.sumIm)).toBe(0);

    // Three conductances in a ring without a reference: the rows add up to nothing but for rounding.
    const places = [0, 1, 2].flatMap((row) => [0, 1, 2].map((column) => [row, column] as const));
    const ring = new CoordinateMatrix(3, Int32Array.from(places, ([row]) => row), Int32Array.from(places, ([, column]) => column));
    const y = (a: number, b: number): number => 1 / (a + b + 0.7);
    places.forEach(([row, column], at) => {
      const others = [0, 1, 2].filter((other) => other !== row);
      ring.re[at] = row === column ? others.reduce((sum, other) => sum + y(row, other), 0) : -y(row, column);
    });
    ring.sum();
    const second = new SparseLu(ring.pattern);
    expect(second.analyse(ring.sumRe, ring.sumIm)).toBe(false);
    expect(second.rank).toBe(2);
  });

  it('makes no fill on a chain, in whatever order its places are given', () => {
    const random = new Random(13);
    const size = 1000;
    const places: [number, number][] = [];
    for (let at = 0; at < size; at++) {
      places.push([at, at]);
      if (at > 0) places.push([at, at - 1], [at - 1, at]);
    }
    const names = Array.from({ length: size }, (_, at) => at);
    for (let at = size - 1; at > 0; at--) {
      const other = random.whole(0, at);
      [names[at], names[other]] = [names[other] ?? 0, names[at] ?? 0];
    }
    const matrix = new CoordinateMatrix(
      size,
      Int32Array.from(places, ([row]) => names[row] ?? 0),
      Int32Array.from(places, ([, column]) => names[column] ?? 0),
    );
    places.forEach(([row, column], at) => {
      matrix.re[at] = row === column ? 3 : -1;
    });
    matrix.sum();
    expect(factored(matrix).entries).toBe(places.length);
  });

  it('estimates the condition within a factor of three of the true one, mostly exactly', () => {
    const random = new Random(14);
    let exact = 0;
    let cases = 0;
    for (let round = 0; round < 60; round++) {
      const matrix = randomMatrix(random, random.whole(2, 12), 0.4, 3);
      const lu = new SparseLu(matrix.pattern);
      if (!lu.analyse(matrix.sumRe, matrix.sumIm)) continue;
      lu.factor(matrix.sumRe, matrix.sumIm);
      const full = dense(matrix, lu);
      const condition = complexOneNorm(full) * complexOneNorm(inverse(full));
      const estimate = estimateCondition(lu, sums(matrix));
      expect(estimate).toBeLessThanOrEqual(condition * (1 + 1e-13 * condition));
      expect(estimate).toBeGreaterThanOrEqual(condition / 3);
      cases++;
      if (estimate > 0.999 * condition) exact++;
    }
    expect(cases).toBeGreaterThan(40);
    expect(exact / cases).toBeGreaterThan(0.7);
  });
});
