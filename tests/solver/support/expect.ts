import { expect } from 'vitest';
import type { Problem, Solution } from '@/solver';

/** What is compared: any complex number. */
export interface ComplexLike {
  readonly re: number;
  readonly im: number;
}

/** A phasor by magnitude and degrees. */
export function polar(magnitude: number, degrees: number): ComplexLike {
  return { re: magnitude * Math.cos((degrees * Math.PI) / 180), im: magnitude * Math.sin((degrees * Math.PI) / 180) };
}

/** |actual − expected| ≤ units·ε·|expected| (·1 where nothing is expected). */
export function expectClose(actual: ComplexLike | undefined, expected: ComplexLike, units: number): void {
  expect(actual).toBeDefined();
  if (actual === undefined) return;
  const off = Math.hypot(actual.re - expected.re, actual.im - expected.im);
  const size = Math.hypot(expected.re, expected.im) || 1;
  expect(
    off / (size * Number.EPSILON),
    `${actual.re} + j${actual.im} against ${expected.re} + j${expected.im}`,
  ).toBeLessThanOrEqual(units);
}

/** Narrows to a solution, with the problem's words if it is none. */
export function solved(result: Solution | Problem): Solution {
  if (!result.ok) throw new Error(`not solved: ${result.message}`);
  return result;
}

/** Narrows to a problem. */
export function unsolved(result: Solution | Problem): Problem {
  if (result.ok) throw new Error('solved, though it should not be');
  return result;
}
