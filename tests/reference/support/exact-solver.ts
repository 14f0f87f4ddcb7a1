import type { ElementList } from '@/solver';
import type { Big } from './big-complex';
import {
  add,
  big,
  exact,
  invert,
  isZero,
  mul,
  negative,
  ONE,
  roughSize,
  sizeOf,
  sub,
  ZERO,
} from './big-complex';
import type { Pair } from './exact-equations';
import { branchName, equationsOf } from './exact-equations';

/**
 * An independent solution to compare with: dense modified nodal equations with 64-digit numbers of mathjs, and for every
 * output the condition Σ|c/H·∂H/∂c| over all coefficients that are made of element and source values, by the adjoint
 * (Director and Rohrer, IEEE Trans. CT-16 (1969) 318). Shares nothing with the solver.
 */

/** One output: its value as doubles, how far a double-precision value is from it, and its condition. */
export interface ExactOutput {
  readonly re: number;
  readonly im: number;
  readonly condition: number;
  /** |value − exact| / |exact|; the absolute difference where exact is 0. */
  errorOf(value: { readonly re: number; readonly im: number }): number;
}

export interface ExactSolution {
  voltage(node: string): ExactOutput;
  /** The current of a port, entering at its first node. */
  current(id: string, port?: number): ExactOutput;
}

/** Solves a list that has a unique solution, at 0 Hz too; throws where the equations are singular. */
export function solveExactly(list: ElementList, frequency: number): ExactSolution {
  const { admittances, given, branches } = equationsOf(list, frequency);
  const nodes = [...new Set(list.elements.flatMap((element) => [...element.nodes]))].filter((node) => node !== '0');
  const nodePlace = new Map(nodes.map((node, place) => [node, place]));
  const branchPlace = new Map(branches.map(({ name }, k) => [name, nodes.length + k]));
  const order = nodes.length + branches.length;
  const matrix: Big[][] = Array.from({ length: order }, () => Array.from({ length: order }, () => ZERO));
  const right: Big[] = Array.from({ length: order }, () => ZERO);
  const at = (node: string): number => nodePlace.get(node) ?? -1;
  const bump = (row: number, column: number, value: Big): void => {
    const line = matrix[row];
    if (row >= 0 && column >= 0 && line !== undefined) line[column] = add(line[column] ?? ZERO, value);
  };
  const bumpVoltage = (row: number, [a, b]: Pair, value: Big): void => {
    bump(row, at(a), value);
    bump(row, at(b), negative(value));
  };
  for (const { nodes: pair, y } of admittances) {
    bumpVoltage(at(pair[0]), pair, y);
    bumpVoltage(at(pair[1]), pair, negative(y));
  }
  for (const { nodes: pair, current } of given) {
    const [a, b] = [at(pair[0]), at(pair[1])];
    if (a >= 0) right[a] = sub(right[a] ?? ZERO, current);
    if (b >= 0) right[b] = add(right[b] ?? ZERO, current);
  }
  branches.forEach((branch, k) => {
    const row = nodes.length + k;
    bump(at(branch.nodes[0]), row, ONE);
    bump(at(branch.nodes[1]), row, negative(ONE));
    for (const { of, coefficient } of branch.terms) {
      if ('branch' in of) bump(row, branchPlace.get(of.branch) ?? -1, coefficient);
      else bumpVoltage(row, of, coefficient);
    }
    right[row] = branch.right;
  });
  const inverse = invert(matrix);
  const x = inverse.map((line) => line.reduce((sum, entry, k) => add(sum, mul(entry, right[k] ?? ZERO)), ZERO));

  const entry = (of: readonly Big[], place: number): Big => of[place] ?? ZERO;
  const between = (of: readonly Big[], [a, b]: Pair): Big => sub(entry(of, at(a)), entry(of, at(b)));
  /** y·v of each admittance, and what each coefficient of values contributes to its equation. */
  const flows = admittances.map(({ nodes: pair, y }) => mul(y, between(x, pair)));
  const shares = branches.map(({ terms, right: value }) => [
    roughSize(value),
    ...terms
      .filter(({ isValue }) => isValue)
      .map(({ of, coefficient }) =>
        roughSize(mul(coefficient, 'branch' in of ? entry(x, branchPlace.get(of.branch) ?? -1) : between(x, of))),
      ),
  ]);

  /** H = cᵀx + direct, with c given as coefficients of x; `through` is the admittance whose own value c holds. */
  const output = (c: readonly Big[], direct: Big, through = -1): ExactOutput => {
    const adjoint = matrix.map((_, column) =>
      c.reduce((sum, one, row) => (isZero(one) ? sum : add(sum, mul(one, inverse[row]?.[column] ?? ZERO))), ZERO),
    );
    const value = c.reduce((sum, one, k) => add(sum, mul(one, x[k] ?? ZERO)), direct);
    let total = 0;
    admittances.forEach(({ nodes: pair }, k) => {
      const reach = between(adjoint, pair);
      total += roughSize(mul(flows[k] ?? ZERO, k === through ? sub(reach, ONE) : reach));
    });
    for (const { nodes: pair, current } of given) total += roughSize(mul(current, between(adjoint, pair)));
    shares.forEach((sizes, k) => {
      const reach = roughSize(entry(adjoint, nodes.length + k));
      for (const share of sizes) total += share * reach;
    });
    const magnitude = sizeOf(value);
    return {
      re: value.re.toNumber(),
      im: value.im.toNumber(),
      condition: magnitude.isZero() ? Infinity : total / magnitude.toNumber(),
      errorOf: (of) => {
        const off = sizeOf(sub(big(exact(of.re), exact(of.im)), value));
        return (magnitude.isZero() ? off : off.div(magnitude)).toNumber();
      },
    };
  };
  const unit = (place: number): Big[] => Array.from({ length: order }, (_, k) => (k === place ? ONE : ZERO));

  return {
    voltage: (node) => output(unit(at(node)), ZERO),
    current: (id, port = 0) => {
      const place = branchPlace.get(branchName(id, port));
      if (place !== undefined) return output(unit(place), ZERO);
      const flow = port === 0 ? given.find((one) => one.id === id) : undefined;
      if (flow !== undefined) return output([], flow.current);
      const k = admittances.findIndex((one) => one.id === id);
      const own = admittances[k];
      if (own === undefined || port !== 0) throw new Error(`no current of ${id}, port ${port}`);
      const [a, b] = [at(own.nodes[0]), at(own.nodes[1])];
      return output(
        Array.from({ length: order }, (_, n) => (n === a ? own.y : n === b ? negative(own.y) : ZERO)),
        ZERO,
        k,
      );
    },
  };
}
