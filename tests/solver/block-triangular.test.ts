import { describe, expect, it } from 'vitest';
import { blockTriangular } from '@/solver/linear/block-triangular';
import { Random } from './support/random';

describe('the block triangular form of a pattern', () => {
  it('has one block for what hangs together both ways, and several for what acts only onwards', () => {
    expect(blockTriangular([[0, 1], [1, 2], [2, 0]])?.length).toBe(1);
    const onwards = blockTriangular([[0], [0, 1], [1, 2]]);
    expect(onwards?.map(({ rows, columns }) => [rows, columns])).toEqual([
      [[0], [0]],
      [[1], [1]],
      [[2], [2]],
    ]);
    expect(blockTriangular([])).toEqual([]);
  });

  it('matches rows to columns along augmenting paths where the diagonal is empty', () => {
    const blocks = blockTriangular([[1], [0, 1, 2], [1, 2]]);
    expect(blocks?.flatMap(({ rows, columns }) => rows.map((row, k) => [row, columns[k]]))).toEqual(expect.arrayContaining([[0, 1], [1, 0], [2, 2]]));
  });

  it('is none where every matrix with the pattern is singular', () => {
    expect(blockTriangular([[0, 1], [2], [2]])).toBeUndefined();
    expect(blockTriangular([[]])).toBeUndefined();
  });

  it('of a random pattern has blocks that multiply to its determinant', () => {
    const random = new Random(71);
    let several = 0;
    for (let round = 0; round < 200; round++) {
      const size = random.whole(2, 7);
      const matrix = Array.from({ length: size }, () => Array.from({ length: size }, () => (random.next() < 0.35 ? random.whole(1, 9) : 0)));
      const blocks = blockTriangular(matrix.map((row) => row.flatMap((entry, j) => (entry === 0 ? [] : [j]))));
      const whole = Math.abs(determinant(matrix));
      if (blocks === undefined) {
        expect(whole).toBe(0);
        continue;
      }
      if (blocks.length > 1) several++;
      const product = blocks.reduce((sofar, { rows, columns }) => sofar * determinant(rows.map((row) => columns.map((column) => matrix[row]?.[column] ?? 0))), 1);
      expect(Math.abs(product)).toBe(whole);
    }
    expect(several).toBeGreaterThan(30);
  });
});

/** By the first row; whole numbers stay whole. */
function determinant(matrix: readonly (readonly number[])[]): number {
  if (matrix.length === 0) return 1;
  return (matrix[0] ?? []).reduce((sum, entry, j) => {
    if (entry === 0) return sum;
    const rest = matrix.slice(1).map((row) => row.filter((_, column) => column !== j));
    return sum + (j % 2 === 0 ? 1 : -1) * entry * determinant(rest);
  }, 0);
}
