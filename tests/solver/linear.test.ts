import { describe, expect, it } from 'vitest';
import { DisjointSets } from '@/solver/linear/disjoint-sets';
import { planElimination } from '@/solver/linear/elimination-plan';
import type { DenseSystem } from '@/solver/linear/rank-revealing';
import { solveDense } from '@/solver/linear/rank-revealing';
import { StarMesh } from '@/solver/linear/star-mesh';
import { Random } from './support/random';

describe('DisjointSets', () => {
  it('joins what is told to be joined, and nothing else', () => {
    const sets = new DisjointSets(6);
    expect(sets.union(0, 1)).toBe(true);
    expect(sets.union(2, 3)).toBe(true);
    expect(sets.union(1, 3)).toBe(true);
    expect(sets.union(0, 2)).toBe(false);
    expect(sets.find(0)).toBe(sets.find(3));
    expect(sets.find(4)).not.toBe(sets.find(5));
    expect(sets.find(4)).not.toBe(sets.find(0));
  });
});

/** A plan for vertices that are each of their own. */
function plain(vertexCount: number, pairs: readonly (readonly [number, number])[], group?: readonly number[]) {
  return planElimination({
    vertexCount,
    group: Int32Array.from({ length: vertexCount }, (_, vertex) => group?.[vertex] ?? vertex),
    root: 0,
    weight: new Float64Array(vertexCount),
    postponed: new Set(),
    pairs,
  });
}

describe('planElimination', () => {
  it('makes no fill on a ladder: the work grows with its length', () => {
    const ladder = (length: number): [number, number][] =>
      Array.from(
        { length },
        (_, k) =>
          [
            [k, k + 1],
            [0, k + 1],
          ] as [number, number][],
      )
        .flat()
        .filter(([a, b]) => a !== b);
    const short = plain(51, ladder(50));
    const long = plain(501, ladder(500));
    expect(short.slotLow).toHaveLength(99);
    expect(long.slotLow).toHaveLength(999);
    expect(long.target.length / short.target.length).toBeLessThan(10.3);
  });

  it('takes the leaves of a star before its middle', () => {
    const plan = plain(6, [
      [0, 1],
      [1, 2],
      [1, 3],
      [1, 4],
      [1, 5],
    ]);
    expect([...plan.stepVertex]).toEqual([2, 3, 4, 5, 1]);
    expect(plan.target).toHaveLength(0);
  });

  it('keeps the root’s group to the end, and joins other groups after all single vertices', () => {
    const plan = plain(
      6,
      [
        [0, 2],
        [2, 3],
        [3, 4],
        [4, 5],
        [1, 5],
      ],
      [0, 0, 2, 3, 3, 5],
    );
    expect([...plan.boundary]).toEqual([0, 1]);
    expect([...plan.stepVertex].slice(0, 2).sort()).toEqual([2, 5]);
    expect([...plan.stepInto]).toEqual([-1, -1, 3, -1]);
  });
});

describe('StarMesh', () => {
  it('divides a voltage, and says so between every pair of vertices', () => {
    const plan = plain(
      3,
      [
        [0, 2],
        [1, 2],
      ],
      [0, 0, 2],
    );
    const mesh = new StarMesh(plan);
    mesh.yRe[plan.slotOfPair[0] ?? 0] = 1;
    mesh.yRe[plan.slotOfPair[1] ?? 0] = 3;
    expect(mesh.factor()).toBe(1);
    mesh.vRe[1] = 8;
    for (const slot of plan.knownSlots) mesh.dRe[slot] = -8;
    mesh.solve();
    expect(mesh.vRe[2]).toBe(6);
    expect(mesh.dRe[plan.slotOfPair[0] ?? 0]).toBe(-6);
    expect(mesh.dRe[plan.slotOfPair[1] ?? 0]).toBe(2);
  });

  it('says what cancellation left of the weakest pivot, and where', () => {
    const plan = plain(2, [
      [0, 1],
      [0, 1],
    ]);
    const mesh = new StarMesh(plan);
    mesh.yIm[0] = 1 - 1;
    expect(mesh.factor()).toBe(0);
    expect(mesh.weakest).toBe(1);
    const three = plain(
      3,
      [
        [0, 2],
        [1, 2],
      ],
      [0, 0, 2],
    );
    const near = new StarMesh(three);
    near.yIm[three.slotOfPair[0] ?? 0] = 1;
    near.yIm[three.slotOfPair[1] ?? 0] = -1 + 1e-6;
    expect(near.factor()).toBeCloseTo(0.5e-6, 12);
    expect(near.weakest).toBe(2);
  });
});

function system(rows: readonly (readonly number[])[], right: readonly number[], error = Number.EPSILON): DenseSystem {
  const size = rows.length;
  const re = Float64Array.from(rows.flat());
  return {
    size,
    re,
    im: new Float64Array(size * size),
    error: re.map((entry) => error * Math.abs(entry)),
    rightRe: Float64Array.from(right),
    rightIm: new Float64Array(size),
    rightError: Float64Array.from(right, (entry) => error * Math.abs(entry)),
  };
}

describe('solveDense', () => {
  it('solves what has full rank', () => {
    const outcome = solveDense(
      system(
        [
          [0, 2, 1],
          [1, 0, 3],
          [4, 5, 0],
        ],
        [7, 10, 14],
      ),
    );
    expect(outcome).toMatchObject({ rank: 3, consistent: true, nullVectors: [] });
    [1, 2, 3].forEach((x, k) => expect(outcome.re[k]).toBeCloseTo(x, 14));
  });

  it('solves complex equations to rounding', () => {
    const random = new Random(7);
    const size = 20;
    const entries = (): Float64Array => Float64Array.from({ length: size * size }, () => random.between(-1, 1));
    const [re, im] = [entries(), entries()];
    const x = Array.from({ length: size }, () => [random.between(-1, 1), random.between(-1, 1)] as const);
    const rightRe = new Float64Array(size);
    const rightIm = new Float64Array(size);
    for (let row = 0; row < size; row++) {
      x.forEach(([xr, xi], k) => {
        rightRe[row] = (rightRe[row] ?? 0) + (re[row * size + k] ?? 0) * xr - (im[row * size + k] ?? 0) * xi;
        rightIm[row] = (rightIm[row] ?? 0) + (re[row * size + k] ?? 0) * xi + (im[row * size + k] ?? 0) * xr;
      });
    }
    const zero = new Float64Array(size * size);
    const outcome = solveDense({ size, re, im, error: zero, rightRe, rightIm, rightError: new Float64Array(size) });
    expect(outcome.rank).toBe(size);
    x.forEach(([xr, xi], k) =>
      expect(Math.hypot((outcome.re[k] ?? 0) - xr, (outcome.im[k] ?? 0) - xi)).toBeLessThan(1e-12),
    );
  });

  it('finds the rank, and what is free, where rows depend on each other but for rounding', () => {
    // The third row is a tenth of the first and a fifth of the second, which no double holds exactly.
    const rows = [
      [0.1, 0.2, 0.3],
      [0.4, 0.5, 0.6],
      [0.1 * 0.1 + 0.2 * 0.4, 0.1 * 0.2 + 0.2 * 0.5, 0.1 * 0.3 + 0.2 * 0.6],
    ];
    const right = [0.6, 1.5, 0.1 * 0.6 + 0.2 * 1.5];
    const outcome = solveDense(system(rows, right));
    expect(outcome).toMatchObject({ rank: 2, consistent: true });
    const [free] = outcome.nullVectors;
    const scale = free?.re[0] ?? 1;
    [1, -2, 1].forEach((entry, k) => expect((free?.re[k] ?? 0) / scale).toBeCloseTo(entry, 12));
    rows.forEach((row, k) =>
      expect(row.reduce((sum, a, j) => sum + a * (outcome.re[j] ?? 0), 0)).toBeCloseTo(right[k] ?? 0, 14),
    );
    expect(solveDense(system(rows, [0.6, 1.5, 0.4])).consistent).toBe(false);
  });

  it('does not take a small entry for a zero that is exact', () => {
    expect(
      solveDense(
        system(
          [
            [1, 0],
            [0, 1e-200],
          ],
          [1, 1e-200],
        ),
      ),
    ).toMatchObject({ rank: 2 });
  });
});
