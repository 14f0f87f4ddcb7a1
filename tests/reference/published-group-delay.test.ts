import { describe, expect, it } from 'vitest';
import type { Root } from '@/solver';
import { polesAndZeros } from '@/solver';
import { network } from '../solver/support/networks';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import { degrees, valueOf } from './support/measure';
import type { DelayFigure, Output } from './support/records';

/**
 * Every published group delay, by the poles and zeros of the network (τ = Σ Re 1/(jω − p) − Σ Re 1/(jω − z)), and by the
 * difference of two phases to six digits.
 */
function delayOf({ s }: Root, omega: number): number {
  return -s.re / (s.re ** 2 + (omega - s.im) ** 2);
}

function nodeOf(output: Output): string {
  if (output.of !== 'voltage') throw new Error('only voltages have delays in the data');
  return output.node;
}

describe.each(figuresOf<DelayFigure>(['groupDelay']))('%s', (_title, { elements }, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    const omega = 2 * Math.PI * figure.frequency;
    const found = polesAndZeros(network(...elements), {
      kind: 'transfer',
      source: 'V1',
      output: { quantity: 'voltage', node: nodeOf(figure.output) },
    });
    if (!found.ok) throw new Error(found.message);
    const total = (roots: readonly Root[]): number => roots.reduce((sum, root) => sum + delayOf(root, omega), 0);
    const delay = total(found.poles) - total(found.zeros);
    expectPrinted(delay, figure);

    // The third derivative is felt as the square of the step.
    const [low, high] = figure.frequency === 0 ? [0, 0.1] : [figure.frequency - 0.5, figure.frequency + 0.5];
    const phaseAt = (frequency: number): number => degrees(valueOf(elements, figure.output, frequency));
    expect(Math.abs((phaseAt(low) - phaseAt(high)) / (360 * (high - low)) / delay - 1)).toBeLessThanOrEqual(1e-6);
  });
});
