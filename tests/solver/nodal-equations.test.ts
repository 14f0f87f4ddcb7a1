import { all, create } from 'mathjs';
import type { Complex as MathComplex, Matrix as MathMatrix } from 'mathjs';
import { describe, expect, it } from 'vitest';
import type { ElementList } from '@/solver';
import type { NodalEquations } from '@/solver/analysis/nodal-equations';
import { nodalEquations } from '@/solver/analysis/nodal-equations';
import { isProblem } from '@/solver/analysis/problem';
import { ResponseOperator } from '@/solver/analysis/response-operator';
import type { Factor, Product, Sum } from '@/solver/analysis/symbols';
import { ExtendedVector } from '@/solver/linear/extended';
import { randomLinearNetwork } from './support/linear-networks';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';

const math = create(all ?? {});

function found(list: ElementList, frequency: number): NodalEquations {
  const result = nodalEquations(list, frequency);
  if (!result.ok) throw new Error(result.message);
  return result;
}

/** Plain writing, enough to compare with what a hand writes. */
function factorText(factor: Factor): string {
  switch (factor.symbol) {
    case 'value':
      return factor.index === undefined ? factor.element : `${factor.element}.${factor.index + 1}`;
    case 'mutualInductance':
      return `M(${factor.element})`;
    case 'source':
      return factor.element;
    case 'imaginaryUnit':
      return 'j';
    case 'angularFrequency':
      return 'ω';
    case 'frequency':
      return 'f';
    default:
      return `${factor.symbol}(${factor.element})`;
  }
}

function productText({ sign, numerator, denominator }: Product): string {
  const above = numerator.map(factorText).join('') || '1';
  return `${sign < 0 ? '−' : '+'}${above}${denominator.length === 0 ? '' : `/${denominator.map(factorText).join('')}`}`;
}

function sumText(sum: Sum): string {
  return sum.map(productText).join(' ') || '0';
}

function texts({ unknowns, equations }: NodalEquations): string[] {
  const names = unknowns.map((unknown) =>
    unknown.quantity === 'voltage' ? `V(${unknown.node})` : `I(${unknown.element}${unknown.port === 0 ? '' : `,${unknown.port}`})`,
  );
  return equations.map(
    ({ terms, right }) => `${terms.map(({ unknown, sum }) => `(${sumText(sum)})·${names[unknown] ?? ''}`).join(' + ')} = ${sumText(right.sum)}`,
  );
}

describe('nodalEquations', () => {
  it('are what a hand writes for a loaded low-pass', () => {
    const list = network(voltageSource('E', 'a', '0', 2), resistor('R1', 'a', 'b', 100), capacitor('C', 'b', '0', 1e-6), resistor('R2', 'b', '0', 300));
    expect(texts(found(list, 1000))).toEqual([
      '(+1/R1)·V(a) + (−1/R1)·V(b) + (+1)·I(E) = 0',
      '(−1/R1)·V(a) + (+1/R1 +jωC +1/R2)·V(b) = 0',
      '(+1)·V(a) = +E',
    ]);
    // At 0 Hz the capacitance is not there at all.
    expect(texts(found(list, 0))[1]).toBe('(−1/R1)·V(a) + (+1/R1 +1/R2)·V(b) = 0');
    const { equations } = found(list, 1000);
    expect(equations.map(({ about }) => about)).toEqual([
      { law: 'current', node: 'a' },
      { law: 'current', node: 'b' },
      { law: 'element', element: 'E', port: 0 },
    ]);
    expect(equations[1]?.terms[1]).toMatchObject({ re: 1 / 100 + 1 / 300, im: expect.closeTo(2 * Math.PI * 1e-3, 17) as number });
    expect(equations[2]?.right).toMatchObject({ re: 2, im: 0 });
  });

  it('have sources of current on the right, and known currents that something senses too', () => {
    const list = network(
      currentSource('J', '0', 'a', 1),
      inductor('L', 'a', '0', 1),
      { id: 'CS', kind: 'currentControlledVoltageSource', nodes: ['b', '0'], sensedElement: 'J', transresistance: 5 },
      resistor('R', 'b', '0', 1),
    );
    expect(texts(found(list, 50))).toEqual(['(+1/jωL)·V(a) = +J', '(+1/R)·V(b) + (+1)·I(CS) = 0', '(+1)·V(b) = +CSJ']);
  });

  it('write coupled coils, transformers, amplifiers, lines and blocks by their own symbols', () => {
    const list = network(
      voltageSource('E', 'a', '0', 1),
      { id: 'TR', kind: 'coupledInductors', nodes: ['a', '0', 'b', '0'], inductances: [1, 2], coupling: 0.5 },
      { id: 'T', kind: 'idealTransformer', nodes: ['b', '0', 'c', '0'], ratio: 3 },
      { id: 'A', kind: 'operationalAmplifier', nodes: ['c', 'd', 'd'], openLoopGain: 1e5, gainBandwidth: 1e6, outputResistance: 50 },
      { id: 'N', kind: 'line', nodes: ['d', '0', 'e', '0'], impedance: 75, delay: 1e-9 },
      resistor('R', 'e', '0', 75),
    );
    expect(texts(found(list, 1000)).slice(5)).toEqual([
      '(+1)·V(a) = +E',
      '(+1)·V(a) + (−jωTR.1)·I(TR) + (−jωM(TR))·I(TR,1) = 0',
      '(+1)·V(b) + (−jωM(TR))·I(TR) + (−jωTR.2)·I(TR,1) = 0',
      '(+1)·V(b) + (−T)·V(c) = 0',
      '(+T)·I(T) + (+1)·I(T,1) = 0',
      '(−1)·V(c) + (+1 +1/A +jf/A)·V(d) + (−A/A −Ajf/A)·I(A,1) = 0',
      '(+1)·V(d) + (−propagation(N))·V(e) + (−N)·I(N) + (−Npropagation(N))·I(N,1) = 0',
      '(−propagation(N))·V(d) + (+1)·V(e) + (−Npropagation(N))·I(N) + (−N)·I(N,1) = 0',
    ]);
  });

  it('say where the network leaves a choice', () => {
    const list = network(
      voltageSource('E', 'a', '0', 1),
      { id: 'T', kind: 'idealTransformer', nodes: ['a', '0', 'b', 'c'], ratio: 3 },
      resistor('R', 'b', 'c', 75),
    );
    const { equations, unknowns } = found(list, 50);
    expect(equations[1]?.about).toEqual({ law: 'choice', unknown: 1 });
    expect(unknowns[1]).toEqual({ quantity: 'voltage', node: 'b' });
    expect(equations[1]?.terms).toEqual([{ unknown: 1, sum: [expect.anything()], re: 1, im: 0 }]);
  });

  it('have in numbers the matrix and the solution of the operator, on networks of all kinds', () => {
    const random = new Random(81);
    for (let round = 0; round < 60; round++) {
      const drawn = randomLinearNetwork(random, { nodes: 4, elements: 10, decades: 2 });
      const list = network(...drawn.elements, currentSource('J', '0', '4', 1, 30));
      const frequency = round % 4 === 0 ? 0 : 10 ** random.between(0, 5);
      const operator = ResponseOperator.of(list);
      if (isProblem(operator)) throw new Error(operator.message);
      const x = new ExtendedVector();
      const failed = operator.prepare(frequency) ?? operator.exciteSources(x);
      if (failed !== undefined) throw new Error(failed.message);
      const { equations } = found(list, frequency);
      const { pattern, sumRe, sumIm } = operator.layout.matrix;
      const size = pattern.size;
      expect(equations).toHaveLength(size);
      const dense = Array.from({ length: size }, () => Array.from({ length: size }, () => math.complex(0, 0)));
      equations.forEach(({ terms }, row) => {
        const entries = new Map(terms.map(({ unknown, re, im }) => [unknown, [re, im] as const]));
        const start = pattern.rowStart[row] ?? 0;
        for (let at = start; at < (pattern.rowStart[row + 1] ?? 0); at++) {
          const column = pattern.column[at] ?? 0;
          const [re, im] = entries.get(column) ?? [0, 0];
          const [expectedRe, expectedIm] = [sumRe[at] ?? NaN, sumIm[at] ?? NaN];
          const terms2 = Math.hypot(expectedRe, expectedIm);
          // Sums of some terms, which may be added in another order.
          expect(Math.hypot(re - expectedRe, im - expectedIm)).toBeLessThanOrEqual(64 * Number.EPSILON * (terms2 + 1e-3));
          entries.delete(column);
        }
        // What the operator leaves out is nothing in numbers too.
        for (const [re, im] of entries.values()) expect(Math.hypot(re, im)).toBe(0);
        for (const { unknown, re, im } of terms) {
          const line = dense[row];
          if (line !== undefined) line[unknown] = math.complex(re, im);
        }
      });
      const right = equations.map(({ right: { re, im } }) => [math.complex(re, im)]);
      const answer = (math.lusolve(math.matrix(dense), math.matrix(right)) as MathMatrix).toArray() as unknown as (MathComplex | number)[][];
      // A whole number comes back as a plain one.
      const solution = answer.map(([value]) => math.complex(value as MathComplex));
      const condition = conditionOf(dense);
      const largest = Math.max(...solution.map(({ re, im }) => Math.hypot(re, im)));
      solution.forEach(({ re, im }, at) => {
        const off = Math.hypot(re - (x.re[at] ?? NaN), im - (x.im[at] ?? NaN));
        expect(off).toBeLessThanOrEqual(16 * Number.EPSILON * condition * largest);
      });
    }
  });

  it('can be written where they have many solutions, but not where they contradict each other, nor without data', () => {
    const tank = network(currentSource('J', '0', 'a', 1), capacitor('C', 'a', '0', 1), inductor('L', 'a', '0', 1 / (2 * Math.PI) ** 2));
    expect(texts(found(tank, 1))).toEqual(['(+jωC +1/jωL)·V(a) = +J']);
    const alike = network(voltageSource('E', 'a', '0', 1), voltageSource('F', 'a', '0', 1));
    expect(texts(found(alike, 50))).toEqual(['(+1)·I(E) + (+1)·I(F) = 0', '(+1)·V(a) = +E', '(+1)·I(F) = 0']);
    const list = network(voltageSource('E', 'a', '0', 1), voltageSource('F', 'a', '0', 2));
    expect(nodalEquations(list, 50)).toMatchObject({ ok: false, kind: 'voltageLoop' });
    const table = network({ id: 'Z', kind: 'impedance', nodes: ['a', '0'], points: [{ frequency: 10, resistance: 1, reactance: 0 }] });
    expect(nodalEquations(table, 50)).toMatchObject({ ok: false, kind: 'noData', elements: ['Z'] });
    expect(nodalEquations(table, -1)).toMatchObject({ ok: false, kind: 'invalid' });
  });
});

/** ‖A‖∞·‖A⁻¹‖∞. */
function conditionOf(dense: MathComplex[][]): number {
  const norm = (rows: MathComplex[][]): number => Math.max(...rows.map((row) => row.reduce((sum, { re, im }) => sum + Math.hypot(re, im), 0)));
  return norm(dense) * norm((math.inv(math.matrix(dense)) as MathMatrix).toArray() as unknown as MathComplex[][]);
}
