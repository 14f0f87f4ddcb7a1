import { describe, expect, it } from 'vitest';
import { insertionLoss, matrixAt, twoPort } from '@/solver';
import { network } from '../solver/support/networks';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import type { ReadingFigure, ScatteringFigure } from './support/records';

/** Published scattering parameters and insertion losses, by the analysis of two-ports. */
const PLACES = { s11: 0, s12: 2, s21: 4, s22: 6 } as const;

describe.each(figuresOf<ScatteringFigure>(['scattering']))('%s', (_title, { elements }, figures) => {
  it.each(figures)('%s', (_words, { ports: [one, other], reference, frequency, parameter, re, im }) => {
    const found = twoPort(network(...elements), [[one, '0'], [other, '0']], { frequencies: [frequency], reference });
    if (!found.ok) throw new Error(found.message);
    const matrix = matrixAt(found.parameters('scattering'), 0);
    expectPrinted(matrix?.[PLACES[parameter]] ?? NaN, re);
    expectPrinted(matrix?.[PLACES[parameter] + 1] ?? NaN, im);
  });
});

const LOSSES = figuresOf<ReadingFigure>(['reading']).flatMap(([title, circuit, figures]) => {
  const losses = figures.filter(([, { output }]) => output.of === 'insertion');
  return losses.length === 0 ? [] : [[title, circuit, losses] as const];
});

describe.each(LOSSES)('%s', (_title, { elements }, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    const { output, frequency } = figure;
    if (output.of !== 'insertion') throw new Error('not an insertion loss');
    const { from, to, source, load } = output;
    const found = twoPort(network(...elements), [[from, '0'], [to, '0']], { frequencies: [frequency], reference: 50 });
    if (!found.ok) throw new Error(found.message);
    const scattering = matrixAt(found.parameters('scattering'), 0);
    if (scattering === undefined) throw new Error('there are no scattering parameters');
    expect(figure.read).toBe('decibels');
    expectPrinted(insertionLoss(scattering, [50, 50], [source, load]) ?? NaN, figure);
  });
});
