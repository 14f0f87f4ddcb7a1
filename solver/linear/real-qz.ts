import type { Spectrum } from './spectrum';
import { ASIDE_EVERY, NO_CONVERGENCE_AFTER } from './spectrum';

/**
 * The eigenvalues of a real pencil A − λB, A upper Hessenberg, B upper triangular and of full rank: the QZ iteration
 * with a double shift, so that complex ones come in exact pairs and the arithmetic stays real (Moler and Stewart 1973,
 * doi 10.1137/0710024; Golub and Van Loan 2013, algorithms 7.7.2 and 7.7.3). Overwrites both; undefined if an
 * eigenvalue does not converge. About 15n³ multiplications.
 */
export function realQz(a: Float64Array, b: Float64Array, size: number): Spectrum | undefined {
  liftDiagonal(b, size);
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  let last = size - 1;
  let steps = 0;
  while (last >= 0) {
    const first = startOfBlock(a, size, last, steps);
    if (first === last) {
      re[last] = (a[last * size + last] ?? 0) / (b[last * size + last] ?? 1);
      last -= 1;
      steps = 0;
    } else if (first === last - 1) {
      pairOf(a, b, size, first, re, im);
      last -= 2;
      steps = 0;
    } else {
      if (steps === NO_CONVERGENCE_AFTER) return undefined;
      steps += 1;
      doubleShift(a, b, size, first, last, steps);
    }
  }
  return { re, im };
}

/** A diagonal entry of B that is nothing beside the rest is made as small as the rest can tell. */
function liftDiagonal(b: Float64Array, size: number): void {
  let most = 0;
  for (const entry of b) most = Math.max(most, Math.abs(entry));
  const least = Number.EPSILON * most;
  for (let k = 0; k < size; k++) {
    const at = k * (size + 1);
    if (Math.abs(b[at] ?? 0) < least) b[at] = (b[at] ?? 0) < 0 ? -least : least;
  }
}

/** Where the block that ends at `last` begins; entries below the diagonal that are nothing beside their neighbours are set to 0. */
function startOfBlock(a: Float64Array, size: number, last: number, steps: number): number {
  // A block that resists for long is judged a little less strictly.
  const tolerance = Number.EPSILON * (steps > NO_CONVERGENCE_AFTER / 2 ? 64 : 1);
  for (let k = last; k > 0; k--) {
    const at = k * size + k;
    const around = Math.abs(a[at] ?? 0) + Math.abs(a[at - size - 1] ?? 0);
    if (Math.abs(a[at - 1] ?? 0) <= tolerance * around) {
      a[at - 1] = 0;
      return k;
    }
  }
  return 0;
}

/** The eigenvalues of the two by two block at `k`, by A·B⁻¹. */
function pairOf(a: Float64Array, b: Float64Array, size: number, k: number, re: Float64Array, im: Float64Array): void {
  const at = k * size + k;
  const b11 = b[at] ?? 1;
  const b12 = b[at + 1] ?? 0;
  const b22 = b[at + size + 1] ?? 1;
  const m11 = (a[at] ?? 0) / b11;
  const m21 = (a[at + size] ?? 0) / b11;
  const m12 = ((a[at + 1] ?? 0) - m11 * b12) / b22;
  const m22 = ((a[at + size + 1] ?? 0) - m21 * b12) / b22;
  const half = (m11 - m22) / 2;
  const square = half * half + m12 * m21;
  if (square < 0) {
    re[k] = (m11 + m22) / 2;
    re[k + 1] = (m11 + m22) / 2;
    im[k] = Math.sqrt(-square);
    im[k + 1] = -Math.sqrt(-square);
    return;
  }
  // The one that is further from m22 adds, and the other follows from their product about m22 (as half of it cancels).
  const far = half + (half < 0 ? -1 : 1) * Math.sqrt(square);
  re[k] = m22 + far;
  re[k + 1] = far === 0 ? m22 : m22 - (m12 * m21) / far;
  im[k] = 0;
  im[k + 1] = 0;
}

/** One step on rows and columns `first` to `last`, three or more. */
function doubleShift(a: Float64Array, b: Float64Array, size: number, first: number, last: number, step: number): void {
  let [x, y, z] = step % ASIDE_EVERY === 0 ? EXCEPTIONAL : startOf(a, b, size, first, last);
  for (let k = first; k < last; k++) {
    const from = Math.max(k - 1, first);
    const low = Math.min(k + 3, last);
    const three = k + 2 <= last;
    // Rows: the bulge in the column before goes, or the step begins.
    if (three) {
      const length = rotateRows(a, b, size, k + 1, y, z, from);
      y = length;
    }
    rotateRows(a, b, size, k, x, y, from);
    if (k > first) {
      a[(k + 1) * size + k - 1] = 0;
      if (three) a[(k + 2) * size + k - 1] = 0;
    }
    // Columns: B goes back to a triangle.
    if (three) {
      const bottom = (k + 2) * size + k;
      rotateColumns(a, b, size, k, b[bottom] ?? 0, b[bottom + 1] ?? 0, low);
      b[bottom] = 0;
      rotateColumns(a, b, size, k + 1, b[bottom + 1] ?? 0, b[bottom + 2] ?? 0, low);
      b[bottom + 1] = 0;
    }
    const middle = (k + 1) * size + k;
    rotateColumns(a, b, size, k, b[middle] ?? 0, b[middle + 1] ?? 0, low);
    b[middle] = 0;
    x = a[(k + 1) * size + k] ?? 0;
    y = k + 2 <= last ? (a[(k + 2) * size + k] ?? 0) : 0;
    z = k + 3 <= last ? (a[(k + 3) * size + k] ?? 0) : 0;
  }
}

/** A start without shifts, when the usual one has gone in circles (the figures are those of EISPACK's hqr and qzit). */
const EXCEPTIONAL: readonly [number, number, number] = [0, 1, 1.1605];

/** The first column of (M − σ₁)(M − σ₂), M = A·B⁻¹, with the eigenvalues of M's last two by two block as shifts. */
function startOf(a: Float64Array, b: Float64Array, size: number, first: number, last: number): [number, number, number] {
  const f = first * size + first;
  const b11 = b[f] ?? 1;
  const b12 = b[f + 1] ?? 0;
  const b22 = b[f + size + 1] ?? 1;
  const m11 = (a[f] ?? 0) / b11;
  const m21 = (a[f + size] ?? 0) / b11;
  const m12 = ((a[f + 1] ?? 0) - m11 * b12) / b22;
  const m22 = ((a[f + size + 1] ?? 0) - m21 * b12) / b22;
  const m32 = (a[f + 2 * size + 1] ?? 0) / b22;
  const e = (last - 1) * size + last - 1;
  const b33 = b[e] ?? 1;
  const b34 = b[e + 1] ?? 0;
  const b44 = b[e + size + 1] ?? 1;
  const m33 = (a[e] ?? 0) / b33;
  const m43 = (a[e + size] ?? 0) / b33;
  const m34 = ((a[e + 1] ?? 0) - m33 * b34) / b44;
  const m44 = ((a[e + size + 1] ?? 0) - m43 * b34) / b44;
  // m21 ≠ 0 inside a block, so the column may be divided by it.
  const x = ((m33 - m11) * (m44 - m11) - m34 * m43) / m21 + m12;
  const y = m22 - m11 - (m33 - m11) - (m44 - m11);
  const most = Math.max(Math.abs(x), Math.abs(y), Math.abs(m32));
  return most > 0 && most < Infinity ? [x / most, y / most, m32 / most] : [...EXCEPTIONAL];
}

/** Turns rows `row` and the next so that (x, y) becomes (√(x² + y²), 0); answers that length. */
function rotateRows(a: Float64Array, b: Float64Array, size: number, row: number, x: number, y: number, from: number): number {
  const length = Math.hypot(x, y);
  if (y === 0 || length === 0) return x;
  const c = x / length;
  const s = y / length;
  rotate(a, row * size + from, (row + 1) * size + from, 1, size - from, c, s);
  rotate(b, row * size + from, (row + 1) * size + from, 1, size - from, c, s);
  return length;
}

/** Turns columns `column` and the next, down to row `low`, so that (x, y) in a row becomes (0, √(x² + y²)). */
function rotateColumns(a: Float64Array, b: Float64Array, size: number, column: number, x: number, y: number, low: number): void {
  const length = Math.hypot(x, y);
  if (x === 0 || length === 0) return;
  const c = y / length;
  const s = x / length;
  rotate(a, column + 1, column, size, low + 1, c, s);
  rotate(b, column + 1, column, size, low + 1, c, s);
}

function rotate(m: Float64Array, x: number, y: number, stride: number, count: number, c: number, s: number): void {
  for (let k = 0, i = x, j = y; k < count; k++, i += stride, j += stride) {
    const p = m[i] ?? 0;
    const q = m[j] ?? 0;
    m[i] = c * p + s * q;
    m[j] = c * q - s * p;
  }
}
