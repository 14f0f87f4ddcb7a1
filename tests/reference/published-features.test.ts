import { describe, it } from 'vitest';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import { crossing, peak, readingOf } from './support/measure';
import type { CrossingFigure, ExtremeFigure, WidthFigure } from './support/records';

/**
 * Every published feature of a response (where it passes a level, how wide a band is, where it is largest), found on
 * the steady state alone.
 */
const KINDS = ['crossing', 'width', 'largest', 'smallest'] as const;

describe.each(figuresOf<CrossingFigure | WidthFigure | ExtremeFigure>(KINDS))('%s', (_name, { elements }, figures) => {
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
