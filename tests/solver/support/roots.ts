import { expect } from 'vitest';
import type { Element } from '@/solver';
import type { PolesAndZeros, Root, Transfer } from '@/solver/analysis/poles-and-zeros';
import type { Problem } from '@/solver/analysis/problem';

export function found(result: PolesAndZeros | Problem): PolesAndZeros {
  if (!result.ok) throw new Error(result.message);
  return result;
}

export function refused(result: { readonly ok: true } | Problem): Problem {
  if (result.ok) throw new Error('answered, though it should not be');
  return result;
}

/** The voltage of a node, over another or the reference, from a source. */
export function toNode(node: string, source = 'V1', over?: string): Transfer {
  return { kind: 'transfer', source, output: over === undefined ? { quantity: 'voltage', node } : { quantity: 'voltageBetween', nodes: [node, over] } };
}

/** An ideal one. */
export function amplifier(id: string, plus: string, minus: string, output: string): Element {
  return { id, kind: 'operationalAmplifier', nodes: [plus, minus, output] };
}

export function buffer(id: string, from: string, to: string): Element {
  return { id, kind: 'voltageControlledVoltageSource', nodes: [to, '0', from, '0'], gain: 1 };
}

/** Every expected root is there, to so many uncertainties and units of rounding, and no other. */
export function expectRoots(roots: readonly Root[], expected: readonly (readonly [number, number])[], units = 4): void {
  expect(roots.length).toBe(expected.length);
  for (const [re, im] of expected) {
    const excess = roots.map(({ s, uncertainty }) => Math.hypot(s.re - re, s.im - im) - units * (uncertainty + Number.EPSILON * Math.hypot(re, im)));
    expect(Math.min(...excess), `${re} + j${im}`).toBeLessThanOrEqual(0);
  }
}

/** H(jω) by poles and zeros. */
export function evaluate({ poles, zeros, scaledGain, omega }: PolesAndZeros, frequency: number): { re: number; im: number } {
  const y = (2 * Math.PI * frequency) / omega;
  let h = { re: scaledGain, im: 0 };
  for (const { s } of zeros) {
    const f = { re: -s.re / omega, im: y - s.im / omega };
    h = { re: h.re * f.re - h.im * f.im, im: h.re * f.im + h.im * f.re };
  }
  for (const { s } of poles) {
    const f = { re: -s.re / omega, im: y - s.im / omega };
    const square = f.re ** 2 + f.im ** 2;
    h = { re: (h.re * f.re + h.im * f.im) / square, im: (h.im * f.re - h.re * f.im) / square };
  }
  return h;
}
