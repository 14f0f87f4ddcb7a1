import type { PivotOrder } from './pivot-order';
import type { Part, TapeBuilder, Value } from './tape-builder';
import { isZero, negative, NOTHING, ZERO } from './tape-builder';

/** A multiplier a thousand times too large for its row is as doubtful as a pivot of a twentieth of its terms. */
const GROWTH_SHARE = 4e-4;

/**
 * A square system of equations on its way to be eliminated. Its first columns, and those beyond its size, are voltages of
 * nodes: unknown ones, and known ones. Every equation speaks of voltages by differences alone, so its coefficients of all
 * these columns add up to nothing; each of the first rows leaves out the one of its own column, which the others tell.
 */
export class CoreMatrix {
  /** By row: its coefficients by column. */
  readonly rows: Map<number, Value>[];

  /**
   * @param nodes unknown voltages, and rows that leave their own column out
   * @param size unknowns, and rows
   * @param known known voltages: columns from `size` on
   */
  constructor(
    private readonly builder: TapeBuilder,
    readonly nodes: number,
    readonly size: number,
    readonly known: number,
  ) {
    this.rows = Array.from({ length: size }, () => new Map<number, Value>());
  }

  /** Adds to a coefficient; to one that is left out it is left to the others. */
  add(row: number, column: number, value: Value): void {
    if (isZero(value) || (row === column && row < this.nodes)) return;
    const line = this.rows[row];
    line?.set(column, this.builder.add(line.get(column) ?? ZERO, value));
  }

  isVoltage(column: number): boolean {
    return column < this.nodes || column >= this.size;
  }

  /** The coefficient that a row leaves out: minus the sum of its others of voltages. */
  own(row: number): Value {
    return negative(this.builder.sum(this.voltagesOf(row)));
  }

  voltagesOf(row: number): Value[] {
    return [...(this.rows[row] ?? [])].flatMap(([column, value]) => (this.isVoltage(column) ? [value] : []));
  }
}

interface Step {
  readonly row: number;
  readonly column: number;
  readonly inverse: Value;
  readonly factors: readonly (readonly [row: number, factor: Value])[];
  /** The rest of the row, but known columns. */
  readonly rest: readonly (readonly [column: number, value: Value])[];
}

/**
 * The elimination of a system on a tape, by pivots chosen before. As in star-mesh elimination a node's own coefficient is
 * not stored but summed of the others when it is needed, which row operations allow: they keep the sums of rows.
 */
export class CoreTape {
  private readonly steps: Step[] = [];
  private readonly masses: Map<number, Part>[];
  private readonly isLeftOut: boolean[];

  constructor(
    private readonly builder: TapeBuilder,
    private readonly matrix: CoreMatrix,
    { pivots, rowScale }: PivotOrder,
  ) {
    const { rows, nodes, size } = matrix;
    this.masses = rows.map((row) => new Map(Array.from(row, ([column, value]) => [column, builder.squares([value])])));
    this.isLeftOut = rows.map((_, row) => row < nodes);
    const left = new Set(rows.keys());
    for (const [row, column] of pivots) {
      left.delete(row);
      if (this.isLeftOut[row] === true) this.writeOwn(row);
      const line = rows[row] ?? new Map<number, Value>();
      const heads: (readonly [number, Value])[] = [];
      for (const other of left) {
        if (other === column && this.isLeftOut[other] === true) this.writeOwn(other);
        const head = rows[other]?.get(column) ?? ZERO;
        if (!isZero(head)) heads.push([other, head]);
      }
      const inverse = builder.reciprocal(line.get(column) ?? ZERO, this.watchOf(row, column, heads, rowScale));
      const factors = heads.map(([other, head]) => [other, builder.mul(head, inverse)] as const);
      for (const [other, factor] of factors) this.combine(other, row, column, factor);
      const rest = [...line].filter(([at]) => at !== column && at < size);
      this.steps.push({ row, column, inverse, factors, rest });
    }
  }

  /** x of A·x = b. */
  solve(right: readonly Value[]): Value[] {
    const { builder, steps } = this;
    const b = [...right];
    for (const { row, factors } of steps) {
      const value = b[row] ?? ZERO;
      for (const [other, factor] of factors) b[other] = builder.mulSub(b[other] ?? ZERO, factor, value);
    }
    const x: Value[] = [];
    for (const { row, column, inverse, rest } of [...steps].reverse()) {
      let sum = b[row] ?? ZERO;
      for (const [at, value] of rest) sum = builder.mulSub(sum, value, x[at] ?? ZERO);
      x[column] = builder.mul(sum, inverse);
    }
    return x;
  }

  /** z of Aᵀ·z = c. */
  solveTransposed(right: readonly Value[]): Value[] {
    const { builder, steps } = this;
    const c = [...right];
    const z: Value[] = [];
    for (const { row, column, inverse, rest } of steps) {
      const value = builder.mul(c[column] ?? ZERO, inverse);
      z[row] = value;
      for (const [at, coefficient] of rest) c[at] = builder.mulSub(c[at] ?? ZERO, coefficient, value);
    }
    for (const { row, factors } of [...steps].reverse()) {
      let sum = z[row] ?? ZERO;
      for (const [other, factor] of factors) sum = builder.mulSub(sum, factor, z[other] ?? ZERO);
      z[row] = sum;
    }
    return z;
  }

  private writeOwn(row: number): void {
    const { matrix, builder } = this;
    this.isLeftOut[row] = false;
    const value = matrix.own(row);
    if (isZero(value)) return;
    matrix.rows[row]?.set(row, value);
    this.masses[row]?.set(row, builder.squares(matrix.voltagesOf(row).slice(0, -1)));
  }

  /** other ← other − factor·row, without the column of the pivot. */
  private combine(other: number, row: number, column: number, factor: Value): void {
    const { matrix, builder } = this;
    const line = matrix.rows[other];
    const masses = this.masses[other];
    if (line === undefined || masses === undefined) return;
    line.delete(column);
    for (const [at, value] of matrix.rows[row] ?? []) {
      if (at === column || (at === other && this.isLeftOut[other] === true)) continue;
      const result = builder.mulSub(line.get(at) ?? ZERO, factor, value);
      line.set(at, result);
      const mass = builder.squares([builder.mul(factor, value)]);
      masses.set(at, builder.addParts(masses.get(at) ?? NOTHING, mass));
    }
  }

  /** What the pivot is to be measured against: what it was summed of, and the heads that it has to divide. */
  private watchOf(row: number, column: number, heads: readonly (readonly [number, Value])[], rowScale: Float64Array): Part {
    const { builder } = this;
    let total: Part = this.masses[row]?.get(column) ?? NOTHING;
    for (const [other, head] of heads) {
      const ratio = (rowScale[other] ?? 1) / (rowScale[row] ?? 1);
      const share = builder.constantPart(GROWTH_SHARE * ratio * ratio);
      total = builder.mulAddParts(total, share, builder.squares([head]));
    }
    return total;
  }
}
