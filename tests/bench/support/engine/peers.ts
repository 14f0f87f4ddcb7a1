import { Complex } from 'complex.js';
import { all, create } from 'mathjs';
import { Matrix, solve as solveReal } from 'ml-matrix';
import type { Equations } from './networks';

/**
 * The same nodal equations by what a program in JavaScript would else be written with. Each answers the output's voltage
 * at one frequency, so that nothing is optimised away.
 */
export type Peer = (equations: Equations, frequency: number) => number;

/** Complex.js objects, an array of arrays, elimination with the largest pivot of each column. */
export const byComplexObjects: Peer = ({ size, output, entries, right }, frequency) => {
  const omega = 2 * Math.PI * frequency;
  const matrix = Array.from({ length: size }, () => Array.from({ length: size + 1 }, () => new Complex(0, 0)));
  for (const [row, column, g, c, gamma] of entries) {
    const line = matrix[row];
    if (line) line[column] = new Complex(g, omega * c - gamma / omega);
  }
  for (const [row, g, c, gamma] of right) {
    const line = matrix[row];
    if (line) line[size] = new Complex(g, omega * c - gamma / omega);
  }
  const at = (row: number, column: number): Complex => matrix[row]?.[column] ?? Complex.ZERO;
  for (let k = 0; k < size; k++) {
    let best = k;
    for (let row = k + 1; row < size; row++) if (at(row, k).abs() > at(best, k).abs()) best = row;
    [matrix[k], matrix[best]] = [matrix[best] ?? [], matrix[k] ?? []];
    const pivot = at(k, k).inverse();
    for (let row = k + 1; row < size; row++) {
      const line = matrix[row] ?? [];
      const head = at(row, k);
      if (head.re === 0 && head.im === 0) continue;
      const factor = head.mul(pivot);
      for (let column = k + 1; column <= size; column++) line[column] = at(row, column).sub(factor.mul(at(k, column)));
    }
  }
  const solution: Complex[] = [];
  for (let row = size - 1; row >= 0; row--) {
    let sum = at(row, size);
    for (let column = row + 1; column < size; column++) sum = sum.sub(at(row, column).mul(solution[column] ?? Complex.ZERO));
    solution[row] = sum.div(at(row, row));
  }
  return solution[output]?.abs() ?? 0;
};

const math = create(all ?? {});

/** Mathjs: its complex numbers and its own solution by factors. */
export const byMathjs: Peer = ({ size, output, entries, right }, frequency) => {
  const omega = 2 * Math.PI * frequency;
  const matrix = Array.from({ length: size }, () => Array.from({ length: size }, () => math.complex(0, 0)));
  for (const [row, column, g, c, gamma] of entries) {
    const line = matrix[row];
    if (line) line[column] = math.complex(g, omega * c - gamma / omega);
  }
  const vector = Array.from({ length: size }, () => [math.complex(0, 0)]);
  for (const [row, g, c, gamma] of right) vector[row] = [math.complex(g, omega * c - gamma / omega)];
  const solution = math.lusolve(matrix, vector) as unknown as { re: number; im: number }[][];
  const value = solution[output]?.[0];
  return Math.hypot(value?.re ?? 0, value?.im ?? 0);
};

/** Ml-matrix has real numbers: [G −B; B G] has the same solution, twice as large. */
export const byRealEmbedding: Peer = ({ size, output, entries, right }, frequency) => {
  const omega = 2 * Math.PI * frequency;
  const matrix = Matrix.zeros(2 * size, 2 * size);
  for (const [row, column, g, c, gamma] of entries) {
    const b = omega * c - gamma / omega;
    matrix.set(row, column, g);
    matrix.set(size + row, size + column, g);
    matrix.set(row, size + column, -b);
    matrix.set(size + row, column, b);
  }
  const vector = Matrix.zeros(2 * size, 1);
  for (const [row, g, c, gamma] of right) {
    vector.set(row, 0, g);
    vector.set(size + row, 0, omega * c - gamma / omega);
  }
  const solution = solveReal(matrix, vector);
  return Math.hypot(solution.get(output, 0), solution.get(size + output, 0));
};
