import { describe, expect, it } from 'vitest';
import { network } from '../solver/support/networks';
import { found } from '../solver/support/roots';
import type { NetworkReading } from '@/solver/analysis/network-reading';
import type { PolesAndZeros } from '@/solver/analysis/poles-and-zeros';
import { polesAndZeros } from '@/solver/analysis/poles-and-zeros';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import type { Circuit, Output, ResonanceFigure, RootsFigure } from './support/records';

/** Every published pole, zero and quality, to the digits printed. */
function rootsOf({ elements }: Circuit, { source, output }: RootsFigure | ResonanceFigure): PolesAndZeros {
  return found(polesAndZeros(network(...elements), { kind: 'transfer', source, output: outputOf(output) }));
}

function outputOf(output: Output): NetworkReading {
  if (output.of === 'voltage') return { quantity: 'voltageBetween', nodes: [output.node, output.over ?? '0'] };
  if (output.of === 'current') return { quantity: 'current', element: output.element };
  throw new Error(`no transfer to a ${output.of}`);
}

describe.each(figuresOf<RootsFigure | ResonanceFigure>(['poles', 'zeros', 'resonance']))('%s', (_name, circuit, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    const result = rootsOf(circuit, figure);
    if (figure.kind === 'resonance') {
      // s² + (ω₀/Q)·s + ω₀²: of a pair, or of two real poles.
      const complex = result.poles.filter(({ s }) => s.im !== 0);
      const [one, other, ...rest] = complex.length === 0 ? result.poles : complex;
      expect([one !== undefined, other !== undefined, rest]).toEqual([true, true, []]);
      if (one === undefined || other === undefined) return;
      const frequency = Math.sqrt(one.frequency * other.frequency);
      expectPrinted((2 * Math.PI * frequency) / -(one.s.re + other.s.re), figure.quality);
      if (figure.frequency !== undefined) expectPrinted(frequency, figure.frequency);
      if (complex.length > 0) expectPrinted(one.q ?? 0, figure.quality);
      return;
    }
    const [shown, hidden] =
      figure.kind === 'poles'
        ? [result.poles, result.cancelled.map(({ pole }) => pole)]
        : [result.zeros, result.cancelled.map(({ zero }) => zero)];
    // All that the response shows is printed; of what cancels, it may be.
    const left = [...shown, ...hidden].filter(({ s }) => s.im >= 0);
    for (const { re, im } of figure.roots) {
      const distances = left.map(({ s }) => Math.hypot(s.re - Number(re.printed), s.im - Number(im.printed)));
      const [nearest] = left.splice(distances.indexOf(Math.min(...distances)), 1);
      expectPrinted(nearest?.s.re ?? Infinity, re);
      expectPrinted(nearest?.s.im ?? Infinity, im);
    }
    expect(left.filter((root) => shown.includes(root))).toEqual([]);
  });
});
