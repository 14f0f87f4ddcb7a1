import { all, create } from 'mathjs';
import type { BigNumber } from 'mathjs';
import type { Element, ElementList } from '@/solver';

/**
 * An independent solution to compare with: dense modified nodal equations (Ho, Ruehli and Brennan, IEEE Trans. CAS-22
 * (1975) 504) with 64-digit numbers of mathjs, and for every output the condition Σ|p/H·∂H/∂p| over all element and
 * source values by the adjoint (Director and Rohrer, IEEE Trans. CT-16 (1969) 318). Shares nothing with the solver.
 */
const math = create(all ?? {}, { number: 'BigNumber', precision: 64 });

interface Big {
  readonly re: BigNumber;
  readonly im: BigNumber;
}

const ZERO = math.bignumber(0);
const ONE = math.bignumber(1);
const TWO_PI = math.bignumber(2).times(math.pi as unknown as BigNumber);

/** The exact value of a double; its shortest decimal text would be off by up to half a unit in the last place. */
export function exact(value: number): BigNumber {
  let exponent = 0;
  let mantissa = value;
  while (!Number.isInteger(mantissa)) {
    mantissa *= 2;
    exponent += 1;
  }
  return math.bignumber(mantissa.toFixed(0)).div(math.bignumber(2).pow(exponent));
}

function big(re: BigNumber, im: BigNumber): Big {
  return { re, im };
}
function add(a: Big, b: Big): Big {
  return big(a.re.plus(b.re), a.im.plus(b.im));
}
function sub(a: Big, b: Big): Big {
  return big(a.re.minus(b.re), a.im.minus(b.im));
}
function mul(a: Big, b: Big): Big {
  return big(a.re.times(b.re).minus(a.im.times(b.im)), a.re.times(b.im).plus(a.im.times(b.re)));
}
function div(a: Big, b: Big): Big {
  const square = b.re.times(b.re).plus(b.im.times(b.im));
  const product = mul(a, big(b.re, b.im.neg()));
  return big(product.re.div(square), product.im.div(square));
}
function size(a: Big): BigNumber {
  return a.re.times(a.re).plus(a.im.times(a.im)).sqrt();
}
/** The size as a double, good enough for a condition. */
function roughSize(a: Big): number {
  return Math.hypot(a.re.toNumber(), a.im.toNumber());
}
function isZero(a: Big): boolean {
  return a.re.isZero() && a.im.isZero();
}
const NOTHING = big(ZERO, ZERO);

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
  current(id: string): ExactOutput;
}

function admittance(element: Element, omega: BigNumber): Big | undefined {
  switch (element.kind) {
    case 'resistor':
      return big(ONE.div(exact(element.resistance)), ZERO);
    case 'capacitor':
      return big(ZERO, omega.times(exact(element.capacitance)));
    case 'inductor':
      return big(ZERO, ONE.div(omega.times(exact(element.inductance))).neg());
    case 'voltageSource':
    case 'currentSource':
      return undefined;
  }
}

function phasor(element: Element): Big {
  if (element.kind !== 'voltageSource' && element.kind !== 'currentSource') throw new Error('not a source');
  const angle = exact(element.value.phase)
    .times(math.pi as unknown as BigNumber)
    .div(180);
  const rms = exact(element.value.rms);
  return big(rms.times(angle.cos()), rms.times(angle.sin()));
}

/** Solves a list of resistors, capacitors, inductors and live sources at a frequency above 0 Hz. */
export function solveExactly(list: ElementList, frequency: number): ExactSolution {
  const { elements } = list;
  const omega = TWO_PI.times(exact(frequency));
  const nodes = [...new Set(elements.flatMap((element) => element.nodes))].filter((node) => node !== '0');
  const sources = elements.filter((element) => element.kind === 'voltageSource');
  const order = nodes.length + sources.length;
  const matrix: Big[][] = Array.from({ length: order }, () => Array.from({ length: order }, () => NOTHING));
  const right: Big[] = Array.from({ length: order }, () => NOTHING);
  const at = (node: string): number => nodes.indexOf(node);
  const bump = (row: number, column: number, value: Big): void => {
    const line = matrix[row];
    if (row >= 0 && column >= 0 && line !== undefined) line[column] = add(line[column] ?? NOTHING, value);
  };
  const minus = (value: Big): Big => sub(NOTHING, value);
  for (const element of elements) {
    const [a, b] = [at(element.nodes[0]), at(element.nodes[1])];
    const y = admittance(element, omega);
    if (y !== undefined) {
      bump(a, a, y);
      bump(b, b, y);
      bump(a, b, minus(y));
      bump(b, a, minus(y));
    } else if (element.kind === 'voltageSource') {
      const k = nodes.length + sources.indexOf(element);
      const one = big(ONE, ZERO);
      bump(a, k, one);
      bump(b, k, minus(one));
      bump(k, a, one);
      bump(k, b, minus(one));
      right[k] = phasor(element);
    } else {
      if (a >= 0) right[a] = sub(right[a] ?? NOTHING, phasor(element));
      if (b >= 0) right[b] = add(right[b] ?? NOTHING, phasor(element));
    }
  }
  const inverse = invert(matrix);
  const x = inverse.map((line) => line.reduce((sum, entry, k) => add(sum, mul(entry, right[k] ?? NOTHING)), NOTHING));

  /** y·v of each admittance, and the phasor of each source: p·∂H/∂p is this times the adjoint's voltage or current. */
  const flows = elements.map((element) => {
    const y = admittance(element, omega);
    const [a, b] = [at(element.nodes[0]), at(element.nodes[1])];
    return y === undefined
      ? phasor(element)
      : mul(y, sub(a < 0 ? NOTHING : (x[a] ?? NOTHING), b < 0 ? NOTHING : (x[b] ?? NOTHING)));
  });
  const sizes = flows.map(roughSize);

  /** H = cᵀx + direct, with c given as coefficients of x; `through` is the element whose own admittance c holds. */
  const output = (c: readonly Big[], direct: Big, through?: Element): ExactOutput => {
    const adjoint = matrix.map((_, column) =>
      c.reduce(
        (sum, entry, row) => (isZero(entry) ? sum : add(sum, mul(entry, inverse[row]?.[column] ?? NOTHING))),
        NOTHING,
      ),
    );
    const value = c.reduce((sum, entry, k) => add(sum, mul(entry, x[k] ?? NOTHING)), direct);
    const between = (of: readonly Big[], a: number, b: number): Big =>
      sub(a < 0 ? NOTHING : (of[a] ?? NOTHING), b < 0 ? NOTHING : (of[b] ?? NOTHING));
    let total = 0;
    for (const [k, element] of elements.entries()) {
      const [a, b] = [at(element.nodes[0]), at(element.nodes[1])];
      if (element === through) {
        total += size(minus(mul(flows[k] ?? NOTHING, sub(between(adjoint, a, b), big(ONE, ZERO))))).toNumber();
      } else if (element.kind === 'voltageSource') {
        total +=
          sizes[k] === undefined
            ? 0
            : sizes[k] * roughSize(adjoint[nodes.length + sources.indexOf(element)] ?? NOTHING);
      } else {
        total += (sizes[k] ?? 0) * roughSize(between(adjoint, a, b));
      }
    }
    const magnitude = size(value);
    return {
      re: value.re.toNumber(),
      im: value.im.toNumber(),
      condition: magnitude.isZero() ? Infinity : total / magnitude.toNumber(),
      errorOf: (of) => {
        const off = size(sub(big(exact(of.re), exact(of.im)), value));
        return (magnitude.isZero() ? off : off.div(magnitude)).toNumber();
      },
    };
  };
  const unit = (index: number, value: Big): Big[] =>
    Array.from({ length: order }, (_, k) => (k === index ? value : NOTHING));

  return {
    voltage: (node) => output(unit(at(node), big(ONE, ZERO)), NOTHING),
    current: (id) => {
      const element = elements.find((candidate) => candidate.id === id);
      if (element === undefined) throw new Error(`no element ${id}`);
      if (element.kind === 'voltageSource') {
        return output(unit(nodes.length + sources.indexOf(element), big(ONE, ZERO)), NOTHING);
      }
      if (element.kind === 'currentSource') return output(unit(-1, NOTHING), phasor(element));
      const y = admittance(element, omega) ?? NOTHING;
      const [a, b] = [at(element.nodes[0]), at(element.nodes[1])];
      const c = Array.from({ length: order }, (_, k) => (k === a ? y : k === b ? minus(y) : NOTHING));
      return output(c, NOTHING, element);
    },
  };
}

/** Gauss-Jordan with the largest pivot of each column. */
function invert(matrix: readonly (readonly Big[])[]): Big[][] {
  const order = matrix.length;
  const rows = matrix.map((line, i) => [...line, ...line.map((_, k) => (k === i ? big(ONE, ZERO) : NOTHING))]);
  for (let k = 0; k < order; k++) {
    let best = k;
    for (let i = k + 1; i < order; i++) {
      if (size(rows[i]?.[k] ?? NOTHING).gt(size(rows[best]?.[k] ?? NOTHING))) best = i;
    }
    const kept = rows[k] ?? [];
    const pivotRow = rows[best] ?? [];
    rows[best] = kept;
    const pivot = pivotRow[k] ?? NOTHING;
    if (isZero(pivot)) throw new Error('singular');
    const scaled = pivotRow.map((entry) => (isZero(entry) ? entry : div(entry, pivot)));
    rows[k] = scaled;
    for (let i = 0; i < order; i++) {
      const head = rows[i]?.[k] ?? NOTHING;
      if (i === k || isZero(head)) continue;
      rows[i] = (rows[i] ?? []).map((entry, column) => {
        const above = scaled[column] ?? NOTHING;
        return isZero(above) ? entry : sub(entry, mul(head, above));
      });
    }
  }
  return rows.map((line) => line.slice(order));
}
