import { describe, expect, it } from 'vitest';
import type { Element, Scan } from '@/solver';
import { extremesOf, levelCrossings, phaseCrossings, rangeOver, realCrossings, scanResponse } from '@/solver';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import { crossing, magnitude, peak, read, readingOf, valueOf } from './support/measure';
import type { CrossingFigure, ExtremeFigure, Output, WidthFigure } from './support/records';

/** Every published feature of a response: where it passes a level, how wide a band is, where it is largest. */
type Feature = CrossingFigure | WidthFigure | ExtremeFigure;

const CASES = figuresOf<Feature>(['crossing', 'width', 'largest', 'smallest']);

/** Found by halving and by the golden section on the steady state alone. */
describe.each(CASES)('by searching: %s', (_name, { elements }, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    const response = readingOf(elements, figure);
    switch (figure.kind) {
      case 'crossing': {
        const [low, high] = figure.between;
        expectPrinted(crossing((f) => response(f) - figure.level, low, high), figure);
        break;
      }
      case 'width': {
        const [low, middle, high] = figure.between;
        const off = (f: number): number => response(f) - figure.level;
        expectPrinted(crossing(off, middle, high) - crossing(off, low, middle), figure);
        break;
      }
      case 'largest':
      case 'smallest': {
        const sign = figure.kind === 'largest' ? 1 : -1;
        const top = peak((f) => sign * response(f), ...figure.between);
        if (figure.at !== undefined) expectPrinted(top, figure.at);
        if (figure.value !== undefined) expectPrinted(response(top), figure.value);
      }
    }
  });
});

function scanOf(elements: readonly Element[], output: Output, low: number, high: number): Scan {
  const scan = scanResponse({ evaluate: (frequency) => valueOf(elements, output, frequency) }, { low, high });
  if (!scan.ok) throw new Error(scan.message);
  return scan;
}

/** The frequencies of a band at which a figure's reading passes its level, by the features of a response. */
function crossingsOf(elements: readonly Element[], figure: CrossingFigure | WidthFigure, low: number, high: number): number[] {
  const { output, level, against = 1 } = figure;
  const scan = scanOf(elements, output, low, high);
  const { evaluate } = scan.response;
  const size = typeof against === 'number' ? against : magnitude(valueOf(elements, output, against.frequency));
  const places = (found: readonly { readonly frequency: number }[]): number[] => found.map(({ frequency }) => frequency);
  switch (figure.read) {
    case 'decibels':
      return places(levelCrossings(scan, level + 20 * Math.log10(size)));
    case 'degrees':
      return places(phaseCrossings(scan, level));
    case 're':
    case 'im':
    case 'magnitude':
    case 'powerDecibels':
      return places(
        realCrossings(
          { evaluate: (f) => read(evaluate(f) ?? { re: NaN, im: NaN }, figure.read, size), frequencies: scan.frequencies },
          level,
        ),
      );
  }
}

describe.each(CASES)('by the features of a response: %s', (_name, { elements }, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    switch (figure.kind) {
      case 'crossing': {
        const found = crossingsOf(elements, figure, ...figure.between);
        expect(found).toHaveLength(1);
        expectPrinted(found[0] ?? NaN, figure);
        break;
      }
      case 'width': {
        const [low, , high] = figure.between;
        const found = crossingsOf(elements, figure, low, high);
        expect(found).toHaveLength(2);
        expectPrinted((found[1] ?? NaN) - (found[0] ?? NaN), figure);
        break;
      }
      case 'largest':
      case 'smallest': {
        const scan = scanOf(elements, figure.output, ...figure.between);
        const { largest, smallest } = rangeOver(scan);
        const extreme = figure.kind === 'largest' ? largest : smallest;
        if (figure.at !== undefined) {
          expectPrinted(extreme.frequency, figure.at);
          expect(extremesOf(scan).map(({ frequency }) => frequency)).toContain(extreme.frequency);
        }
        const { against = 1 } = figure;
        const size = typeof against === 'number' ? against : magnitude(valueOf(elements, figure.output, against.frequency));
        if (figure.value !== undefined) expectPrinted(read({ re: extreme.magnitude, im: 0 }, figure.read, size), figure.value);
      }
    }
  });
});
