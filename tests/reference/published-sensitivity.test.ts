import { describe, expect, it } from 'vitest';
import type { SensitivityTrace } from '@/solver';
import { sensitivity } from '@/solver';
import { network } from '../solver/support/networks';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import type { Circuit, SensitivityFigure } from './support/records';

/** Every published relative sensitivity, by the adjoint. */
function tracesOf({ elements }: Circuit, { output, frequency }: SensitivityFigure): readonly SensitivityTrace[] {
  if (output.of !== 'voltage') throw new Error('only voltages have sensitivities in the data');
  const found = sensitivity(
    network(...elements),
    { quantity: 'voltageBetween', nodes: [output.node, output.over ?? '0'] },
    [frequency],
  );
  if (!found.ok) throw new Error(found.message);
  return found.traces;
}

describe.each(figuresOf<SensitivityFigure>(['sensitivity']))('%s', (_title, circuit, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    const trace = tracesOf(circuit, figure).find(({ element }) => element === figure.element);
    expect(trace?.determined[0]).toBe(1);
    expectPrinted(trace?.relativeRe[0] ?? NaN, figure.re);
    expectPrinted(trace?.relativeIm[0] ?? NaN, figure.im);
  });

  it('adds up: the resistances’ less the capacitances’ is nothing, as H has no unit', () => {
    const [first] = figures;
    if (first === undefined) throw new Error('no figure');
    const traces = tracesOf(circuit, first[1]);
    const sum = (key: 'relativeRe' | 'relativeIm'): number =>
      traces.reduce((total, trace) => total + (trace.field === 'capacitance' ? -1 : 1) * (trace[key][0] ?? NaN), 0);
    expect(Math.abs(sum('relativeRe'))).toBeLessThanOrEqual(8 * Number.EPSILON);
    expect(Math.abs(sum('relativeIm'))).toBeLessThanOrEqual(8 * Number.EPSILON);
  });
});
