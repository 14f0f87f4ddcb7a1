import { complexQz } from './complex-qz';
import { toHessenbergTriangular } from './hessenberg-triangular';
import { deflateInfinite } from './infinite-deflation';
import type { PencilMatrices } from './pencil-matrices';
import { balance, copyOfPencil, reversed } from './pencil-matrices';
import { realQz } from './real-qz';
import type { Spectrum } from './spectrum';

export type EigenvalueOutcome =
  /** The finite eigenvalues, each as often as it counts, and how many more are infinite. */
  | { readonly kind: 'regular'; readonly finite: Spectrum; readonly infinite: number }
  /** det(A − λB) is 0 for every λ, as far as the errors of the entries allow to tell. */
  | { readonly kind: 'singular' }
  /** The iteration did not settle; not known to happen for finite entries. */
  | { readonly kind: 'unsettled' };

/**
 * The λ with det(A − λB) = 0, for n by n matrices, real or complex.
 *
 * Rows and columns are balanced by powers of two; the infinite eigenvalues and those that are exactly zero are taken out
 * with their whole blocks, each judged against bounds on the errors of the entries (see `deflateInfinite`), so that a
 * threefold zero at the origin is three zeros and not three of the size ∛ε; what is left goes through the
 * Hessenberg-triangular form and the QZ iteration. A pencil without imaginary parts gives real eigenvalues and exactly
 * conjugate pairs, a pair next to each other. Errors are those of a perturbation by some ε of the balanced matrices: the
 * largest eigenvalues are as exact as their condition allows, those smaller by a factor k may lose k times as much.
 * The scale of λ is the caller's: choose it so that A and B are of like size.
 *
 * Moler and Stewart 1973, doi 10.1137/0710024. Time grows with n³: some 6 ms for 40 unknowns.
 */
export function generalisedEigenvalues(given: PencilMatrices): EigenvalueOutcome {
  const pencil = copyOfPencil(given);
  balance(pencil);
  const withoutInfinite = deflateInfinite(pencil);
  if (withoutInfinite.kind === 'singular') return withoutInfinite;
  const withoutZero = deflateInfinite(reversed(withoutInfinite.pencil));
  if (withoutZero.kind === 'singular') return withoutZero;
  const core = reversed(withoutZero.pencil);
  balance(core);
  toHessenbergTriangular(core);
  const isReal = core.aIm.every(isZero) && core.bIm.every(isZero);
  const found = isReal ? realQz(core.aRe, core.bRe, core.size) : complexQz(core);
  if (found === undefined || !found.re.every(Number.isFinite) || !found.im.every(Number.isFinite)) return { kind: 'unsettled' };
  const zeros = withoutZero.removed;
  const re = new Float64Array(zeros + core.size);
  const im = new Float64Array(zeros + core.size);
  re.set(found.re, zeros);
  im.set(found.im, zeros);
  return { kind: 'regular', finite: { re, im }, infinite: withoutInfinite.removed };
}

function isZero(part: number): boolean {
  return part === 0;
}
