import type { ExactOutput } from '../../reference/support/exact-solver';
import type { ComplexLike } from './expect';

/** The error of a value in units of ε·(1 + condition); where 64 digits leave a remainder of nothing, nothing is expected. */
export function unitsOff(of: ExactOutput, value: ComplexLike): number {
  if (Math.hypot(of.re, of.im) > 1e-30) return of.errorOf(value) / (Number.EPSILON * (1 + of.condition));
  return Math.hypot(value.re, value.im) < 1e-20 ? 0 : Infinity;
}
