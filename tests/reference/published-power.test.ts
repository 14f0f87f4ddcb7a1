import { describe, expect, it } from 'vitest';
import { equivalent } from '@/solver';
import { network } from '../solver/support/networks';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import { bySolver } from './support/measure';
import { fixedImpedance } from './support/parts';
import type { GreatestPowerFigure } from './support/records';

/** The published loads that take the greatest power of a source, by its equivalent; and by solving it with that load. */
describe.each(figuresOf<GreatestPowerFigure>(['greatestPower']))('%s', (_title, { elements }, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    const { node, frequency, loads } = figure;
    const found = equivalent(network(...elements), [node, '0'], frequency);
    if (!found.ok) throw new Error(found.message);
    const best = loads === 'all' ? found.conjugateLoad : found.resistiveLoad;
    if (best === undefined) throw new Error('there is no best load');
    expectPrinted(best.impedance.re, figure.load.re);
    expectPrinted(best.impedance.im, figure.load.im);
    expectPrinted(best.power, figure);
    const loaded = [...elements, fixedImpedance('load', node, '0', best.impedance.re, best.impedance.im, frequency)];
    const taken = bySolver(loaded, frequency).power('load').re;
    expect(Math.abs(taken / best.power - 1)).toBeLessThanOrEqual(64 * Number.EPSILON);
  });
});
