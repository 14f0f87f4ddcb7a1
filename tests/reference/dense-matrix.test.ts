import { EVD, LuDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { solve } from '@/solver';
import { solved } from '../solver/support/expect';
import { capacitor, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import { Random } from '../solver/support/random';

/**
 * Against ml-matrix, a general matrix library [computed]: the nodal equations of a network with one grounded source
 * written as real ones, (G −B; B G)(Re; Im), and solved by LU decomposition. The values lie within two decades, where
 * such a matrix is still well conditioned; the tolerance is in units of ε times its condition number.
 */
const FREQUENCY = 1000;
const OMEGA = 2 * Math.PI * FREQUENCY;
const NODES = 6;

function admittance(element: Element): { readonly g: number; readonly b: number } {
  switch (element.kind) {
    case 'resistor':
      return { g: 1 / element.resistance, b: 0 };
    case 'capacitor':
      return { g: 0, b: OMEGA * element.capacitance };
    case 'inductor':
      return { g: 0, b: -1 / (OMEGA * element.inductance) };
    default:
      throw new Error('a source has no admittance');
  }
}

function randomNetwork(random: Random): Element[] {
  const elements: Element[] = [];
  for (let a = 1; a <= NODES; a++) {
    for (let b = 0; b < a; b++) {
      const size = 10 ** random.between(0, 2);
      const [id, one, other] = [`Z${a}${b}`, String(a), String(b)];
      const kind = random.whole(0, 2);
      if (kind === 0) elements.push(resistor(id, one, other, size));
      else if (kind === 1) elements.push(inductor(id, one, other, size / OMEGA));
      else elements.push(capacitor(id, one, other, 1 / (size * OMEGA)));
    }
  }
  return elements;
}

/** The voltages of nodes 2 and up with 1 V at node 1, and the condition number of the equations. */
function byMatrix(elements: readonly Element[]): { readonly re: number[]; readonly im: number[]; readonly condition: number } {
  const size = NODES - 1;
  const matrix = Matrix.zeros(2 * size, 2 * size);
  const right = Matrix.zeros(2 * size, 1);
  const add = (row: number, column: number, g: number, b: number) => {
    matrix.set(row, column, matrix.get(row, column) + g);
    matrix.set(size + row, size + column, matrix.get(size + row, size + column) + g);
    matrix.set(row, size + column, matrix.get(row, size + column) - b);
    matrix.set(size + row, column, matrix.get(size + row, column) + b);
  };
  for (const element of elements) {
    const { g, b } = admittance(element);
    const ends = element.nodes.map(Number);
    for (const here of ends) {
      if (here < 2) continue;
      add(here - 2, here - 2, g, b);
      const there = ends[0] === here ? ends[1] : ends[0];
      if (there === 1) {
        right.set(here - 2, 0, right.get(here - 2, 0) + g);
        right.set(size + here - 2, 0, right.get(size + here - 2, 0) + b);
      } else if (there !== undefined && there > 1) add(here - 2, there - 2, -g, -b);
    }
  }
  const answer = new LuDecomposition(matrix).solve(right).to1DArray();
  const squares = new EVD(matrix.transpose().mmul(matrix)).realEigenvalues;
  const condition = Math.sqrt(Math.max(...squares) / Math.min(...squares));
  return { re: answer.slice(0, size), im: answer.slice(size), condition };
}

describe('a dense network solved by a general matrix library', () => {
  it('has the same node voltages, within rounding times the condition of the matrix', () => {
    for (let seed = 1; seed <= 100; seed++) {
      const elements = randomNetwork(new Random(seed));
      const expected = byMatrix(elements);
      const solution = solved(solve(network(voltageSource('V1', '1', '0', 1), ...elements), { frequency: FREQUENCY }));
      const largest = Math.max(1, ...expected.re.map((re, at) => Math.hypot(re, expected.im[at] ?? 0)));
      for (let node = 2; node <= NODES; node++) {
        const voltage = solution.voltage(String(node));
        const error = Math.hypot((voltage?.re ?? NaN) - (expected.re[node - 2] ?? NaN), (voltage?.im ?? NaN) - (expected.im[node - 2] ?? NaN));
        expect(error, `seed ${seed}, node ${node}`).toBeLessThan(8 * Number.EPSILON * expected.condition * largest);
      }
    }
  });
});
