import type { PencilMatrices } from './pencil-matrices';
import { PlaneRotation } from './plane-rotation';
import type { Spectrum } from './spectrum';
import { ASIDE_EVERY, NO_CONVERGENCE_AFTER } from './spectrum';

/**
 * The eigenvalues of a complex pencil A − λB, A upper Hessenberg, B upper triangular and of full rank: the QZ iteration
 * with single shifts (Moler and Stewart 1973, doi 10.1137/0710024). Overwrites both; undefined if an eigenvalue does
 * not converge. About 20n³ complex multiplications.
 */
export function complexQz({ size, aRe, aIm, bRe, bIm }: PencilMatrices): Spectrum | undefined {
  liftDiagonal(bRe, bIm, size);
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  const rotation = new PlaneRotation();
  let last = size - 1;
  let steps = 0;
  while (last >= 0) {
    const first = startOfBlock(aRe, aIm, size, last, steps);
    if (first === last) {
      const at = last * size + last;
      [re[last], im[last]] = over(aRe[at] ?? 0, aIm[at] ?? 0, bRe[at] ?? 1, bIm[at] ?? 0);
      last -= 1;
      steps = 0;
      continue;
    }
    if (steps === NO_CONVERGENCE_AFTER) return undefined;
    steps += 1;
    const [shiftRe, shiftIm] = shiftOf({ aRe, aIm, bRe, bIm }, size, last, steps);
    const start = first * size + first;
    const headRe = (aRe[start] ?? 0) - (shiftRe * (bRe[start] ?? 0) - shiftIm * (bIm[start] ?? 0));
    const headIm = (aIm[start] ?? 0) - (shiftRe * (bIm[start] ?? 0) + shiftIm * (bRe[start] ?? 0));
    rotation.aim(headRe, headIm, aRe[start + size] ?? 0, aIm[start + size] ?? 0);
    for (let k = first; k < last; k++) {
      const at = k * size + k;
      if (k > first) {
        rotation.aim(aRe[at - 1] ?? 0, aIm[at - 1] ?? 0, aRe[at + size - 1] ?? 0, aIm[at + size - 1] ?? 0);
      }
      const from = Math.max(k - 1, first);
      rotation.turn(aRe, aIm, k * size + from, (k + 1) * size + from, 1, size - from);
      rotation.turn(bRe, bIm, at, at + size, 1, size - k);
      if (k > first) {
        aRe[at + size - 1] = 0;
        aIm[at + size - 1] = 0;
      }
      const below = at + size;
      rotation.aim(bRe[below + 1] ?? 0, bIm[below + 1] ?? 0, bRe[below] ?? 0, bIm[below] ?? 0);
      rotation.turn(aRe, aIm, k + 1, k, size, Math.min(k + 2, last) + 1);
      rotation.turn(bRe, bIm, k + 1, k, size, k + 2);
      bRe[below] = 0;
      bIm[below] = 0;
    }
  }
  return { re, im };
}

/** A diagonal entry of B that is nothing beside the rest is made as small as the rest can tell. */
function liftDiagonal(bRe: Float64Array, bIm: Float64Array, size: number): void {
  let most = 0;
  for (let k = 0; k < bRe.length; k++) most = Math.max(most, Math.abs(bRe[k] ?? 0), Math.abs(bIm[k] ?? 0));
  const least = Number.EPSILON * most;
  for (let k = 0; k < size; k++) {
    const at = k * (size + 1);
    if (Math.hypot(bRe[at] ?? 0, bIm[at] ?? 0) >= least) continue;
    bRe[at] = least;
    bIm[at] = 0;
  }
}

function startOfBlock(aRe: Float64Array, aIm: Float64Array, size: number, last: number, steps: number): number {
  const tolerance = Number.EPSILON * (steps > NO_CONVERGENCE_AFTER / 2 ? 64 : 1);
  const sizeAt = (at: number): number => Math.abs(aRe[at] ?? 0) + Math.abs(aIm[at] ?? 0);
  for (let k = last; k > 0; k--) {
    const at = k * size + k;
    if (sizeAt(at - 1) <= tolerance * (sizeAt(at) + sizeAt(at - size - 1))) {
      aRe[at - 1] = 0;
      aIm[at - 1] = 0;
      return k;
    }
  }
  return 0;
}

/** The eigenvalue of the last two by two block of A·B⁻¹ that is nearer to its last entry (Wilkinson's shift). */
function shiftOf(
  { aRe, aIm, bRe, bIm }: Pick<PencilMatrices, 'aRe' | 'aIm' | 'bRe' | 'bIm'>,
  size: number,
  last: number,
  step: number,
): readonly [number, number] {
  const e = (last - 1) * size + last - 1;
  const a = (at: number): [number, number] => [aRe[at] ?? 0, aIm[at] ?? 0];
  const b = (at: number): [number, number] => [bRe[at] ?? 0, bIm[at] ?? 0];
  const m33 = over(...a(e), ...b(e));
  const m43 = over(...a(e + size), ...b(e));
  const m34 = over(...minus(a(e + 1), times(m33, b(e + 1))), ...b(e + size + 1));
  const m44 = over(...minus(a(e + size + 1), times(m43, b(e + 1))), ...b(e + size + 1));
  // A step to the side now and then, for a block that goes in circles.
  if (step % ASIDE_EVERY === 0) return [(m44[0] ?? 0) + Math.hypot(...m43), m44[1] ?? 0];
  const half = minus(m33, m44).map((part) => part / 2) as [number, number];
  const product = times(m34, m43);
  const square = times(half, half);
  const root = squareRoot(square[0] + product[0], square[1] + product[1]);
  // λ = m44 + half ± root; the smaller step of the two is −m34·m43/(half ± root), with the sign that adds.
  const adds = half[0] * root[0] + half[1] * root[1] >= 0 ? 1 : -1;
  const far: [number, number] = [half[0] + adds * root[0], half[1] + adds * root[1]];
  if (far[0] === 0 && far[1] === 0) return m44;
  return minus(m44, over(...product, ...far));
}

function over(aRe: number, aIm: number, bRe: number, bIm: number): [number, number] {
  const square = bRe * bRe + bIm * bIm;
  return [(aRe * bRe + aIm * bIm) / square, (aIm * bRe - aRe * bIm) / square];
}

function times(a: readonly [number, number], b: readonly [number, number]): [number, number] {
  return [a[0] * b[0] - a[1] * b[1], a[0] * b[1] + a[1] * b[0]];
}

function minus(a: readonly [number, number], b: readonly [number, number]): [number, number] {
  return [a[0] - b[0], a[1] - b[1]];
}

function squareRoot(re: number, im: number): [number, number] {
  const size = Math.hypot(re, im);
  if (size === 0) return [0, 0];
  const part = Math.sqrt((size + Math.abs(re)) / 2);
  return re >= 0 ? [part, im / (2 * part)] : [Math.abs(im) / (2 * part), im < 0 ? -part : part];
}
