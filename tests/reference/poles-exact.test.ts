import { describe, expect, it } from 'vitest';
import type { Element, ElementList } from '@/solver';
import { polesAndZeros } from '@/solver/analysis/poles-and-zeros';
import { capacitor, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import { Random } from '../solver/support/random';
import { found, toNode } from '../solver/support/roots';
import type { Big } from './support/big-complex';
import { add, big, div, exact, invert, mul, negative, ONE, real, roughSize, sub, ZERO } from './support/big-complex';

/**
 * Poles of random networks against their exact ones: modified nodal equations from the exact element values in 64-digit
 * arithmetic, A(s) = G + s·C, and Newton's method on det A, whose step is 1/tr(A⁻¹·C). Shares nothing with the solver.
 */
interface Equations {
  readonly g: readonly (readonly Big[])[];
  readonly c: readonly (readonly Big[])[];
}

function equationsOf({ elements }: ElementList): Equations {
  const nodes = [...new Set(elements.flatMap(({ nodes: pair }) => [...pair]))].filter((node) => node !== '0');
  const branches = elements.filter(({ kind }) => kind === 'inductor' || kind === 'voltageSource');
  const size = nodes.length + branches.length;
  const zeros = (): Big[][] => Array.from({ length: size }, () => Array.from({ length: size }, () => ZERO));
  const [g, c] = [zeros(), zeros()];
  const bump = (matrix: Big[][], row: number, column: number, value: Big): void => {
    const line = matrix[row];
    if (row >= 0 && column >= 0 && line !== undefined) line[column] = add(line[column] ?? ZERO, value);
  };
  for (const element of elements) {
    const [a, b] = [nodes.indexOf(element.nodes[0] ?? ''), nodes.indexOf(element.nodes[1] ?? '')];
    const k = nodes.length + branches.indexOf(element);
    const admittance = (matrix: Big[][], y: Big): void => {
      for (const [row, column, sign] of [[a, a, 1], [b, b, 1], [a, b, -1], [b, a, -1]] as const) bump(matrix, row, column, sign === 1 ? y : negative(y));
    };
    if (element.kind === 'resistor') admittance(g, div(ONE, real(exact(element.resistance))));
    else if (element.kind === 'capacitor') admittance(c, real(exact(element.capacitance)));
    else {
      for (const [row, sign] of [[a, 1], [b, -1]] as const) {
        const one = sign === 1 ? ONE : negative(ONE);
        bump(g, row, k, one);
        bump(g, k, row, one);
      }
      if (element.kind === 'inductor') bump(c, k, k, negative(real(exact(element.inductance))));
    }
  }
  return { g, c };
}

/** The exact root of det(G + s·C) next to s, and how far s is from it. */
function exactRoot({ g, c }: Equations, re: number, im: number): { readonly re: number; readonly im: number; readonly off: number } {
  const start = big(exact(re), exact(im));
  let s = start;
  for (let step = 0; step < 3; step++) {
    const inverse = inverseOrNothing(g.map((line, i) => line.map((entry, j) => add(entry, mul(s, c[i]?.[j] ?? ZERO)))));
    // Singular to the last of 64 digits: that is the root.
    if (inverse === undefined) break;
    const trace = inverse.reduce((sum, line, i) => line.reduce((part, entry, j) => add(part, mul(entry, c[j]?.[i] ?? ZERO)), sum), ZERO);
    s = sub(s, div(ONE, trace));
  }
  return { re: s.re.toNumber(), im: s.im.toNumber(), off: roughSize(sub(s, start)) };
}

function inverseOrNothing(matrix: readonly (readonly Big[])[]): Big[][] | undefined {
  try {
    return invert(matrix);
  } catch {
    return undefined;
  }
}

/** A ladder with branches here and there, values over so many decades. */
function randomNetwork(random: Random, decades: number): ElementList {
  const spread = (): number => 10 ** random.between(-decades / 2, decades / 2);
  const elements: Element[] = [voltageSource('V1', '1', '0', 1)];
  const nodes = random.whole(3, 5);
  let count = 0;
  const some = (a: string, b: string): Element => {
    const id = `E${count++}`;
    const kind = random.pick(['r', 'r', 'c', 'c', 'l'] as const);
    if (kind === 'r') return resistor(id, a, b, 1e3 * spread());
    return kind === 'c' ? capacitor(id, a, b, 1e-6 * spread()) : inductor(id, a, b, spread());
  };
  for (let node = 2; node <= nodes; node++) elements.push(some(String(node - 1), String(node)), some(String(node), '0'));
  for (let k = 0; k < 2; k++) elements.push(some(String(random.whole(2, nodes)), String(random.whole(0, 1))));
  return network(...elements);
}

describe.each([2, 6, 12])('poles of random networks over %d decades', (decades) => {
  it('are the exact ones, to a few of their uncertainties', () => {
    const random = new Random(60 + decades);
    let compared = 0;
    for (let round = 0; round < 25; round++) {
      const list = randomNetwork(random, decades);
      const result = polesAndZeros(list, toNode('2'));
      if (!result.ok) continue;
      const { poles, cancelled } = found(result);
      const equations = equationsOf(list);
      const all = [...poles, ...cancelled.map(({ pole }) => pole)].filter(({ s, multiplicity }) => s.im >= 0 && multiplicity === 1 && (s.re !== 0 || s.im !== 0));
      const roots = all.map(({ s }) => exactRoot(equations, s.re, s.im));
      roots.forEach(({ re, im, off }, k) => {
        const { uncertainty = 0, s } = all[k] ?? {};
        expect(off / (uncertainty + Number.EPSILON * Math.hypot(re, im)), `round ${round}: ${s?.re} + j${s?.im}`).toBeLessThanOrEqual(8);
        // No root stands for two.
        for (let other = 0; other < k; other++) {
          expect(Math.hypot(re - (roots[other]?.re ?? 0), im - (roots[other]?.im ?? 0))).toBeGreaterThan(uncertainty);
        }
        compared++;
      });
    }
    expect(compared).toBeGreaterThan(50);
  });
});
