import { describe, expect, it } from 'vitest';
import { polesAndZeros } from '@/solver/analysis/poles-and-zeros';
import { network } from '../solver/support/networks';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import type { DecayFigure } from './support/records';

/** Published times in which a capacitor left to itself is discharged, by the one pole of the impedance across it. */
describe.each(figuresOf<DecayFigure>(['decay']))('%s', (_title, { elements }, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    const found = polesAndZeros(network(...elements), { kind: 'impedance', nodes: [figure.node, '0'] });
    if (!found.ok) throw new Error(found.message);
    const [pole, ...others] = found.poles;
    expect(others).toEqual([]);
    expect(pole?.s.im).toBe(0);
    expectPrinted(Math.log(figure.from / figure.to) / -(pole?.s.re ?? 0), figure);
  });
});
