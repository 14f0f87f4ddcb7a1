import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { levelCrossings, magnitudeCrossings, phaseCrossings } from '@/solver/features/crossings';
import { rangeOver } from '@/solver/features/extremes';
import { realCrossings, realExtremes } from '@/solver/features/real-curve';
import type { Scan } from '@/solver/features/scan';
import { scanResponse } from '@/solver/features/scan';
import { figuresOf } from '../reference/support/describe-figure';
import { expectPrinted } from '../reference/support/expect-figure';
import { magnitude, readingOf, valueOf } from '../reference/support/measure';
import type { CrossingFigure, ExtremeFigure, WidthFigure } from '../reference/support/records';

/**
 * Every published feature of a response, to the digits printed, found by looking over the whole band that the figure
 * leaves for it and refining. Sources and marks stand beside the figures.
 */
type Feature = CrossingFigure | WidthFigure | ExtremeFigure;

function scanOf(elements: readonly Element[], { output, between }: Feature): Scan {
  const [low, ...rest] = between;
  const scan = scanResponse({ evaluate: (f) => valueOf(elements, output, f) }, { low, high: rest.at(-1) ?? low });
  if (!scan.ok) throw new Error(scan.message);
  return scan;
}

function againstOf(elements: readonly Element[], { output, against = 1 }: Feature): number {
  return typeof against === 'number' ? against : magnitude(valueOf(elements, output, against.frequency));
}

/** Where the reading passes its level, in rising frequency. */
function crossingsOf(elements: readonly Element[], figure: CrossingFigure | WidthFigure): readonly number[] {
  const scan = scanOf(elements, figure);
  switch (figure.read) {
    case 'decibels':
      return levelCrossings(scan, figure.level + 20 * Math.log10(againstOf(elements, figure))).map(({ frequency }) => frequency);
    case 'magnitude':
      return magnitudeCrossings(scan, figure.level * againstOf(elements, figure)).map(({ frequency }) => frequency);
    case 'degrees':
      return phaseCrossings(scan, figure.level).map(({ frequency }) => frequency);
    case 're':
    case 'im':
    case 'powerDecibels':
      return realCrossings({ evaluate: readingOf(elements, figure), frequencies: scan.frequencies }, figure.level).map(({ frequency }) => frequency);
  }
}

describe.each(figuresOf<Feature>(['crossing', 'width', 'largest', 'smallest']))('%s', (_name, { elements }, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    switch (figure.kind) {
      case 'crossing': {
        const found = crossingsOf(elements, figure);
        expect(found.length).toBe(1);
        expectPrinted(found[0] ?? 0, figure);
        break;
      }
      case 'width': {
        const found = crossingsOf(elements, figure);
        const [, middle] = figure.between;
        expect(found.map((f) => f < middle)).toEqual([true, false]);
        expectPrinted((found[1] ?? 0) - (found[0] ?? 0), figure);
        break;
      }
      case 'largest':
      case 'smallest': {
        const scan = scanOf(elements, figure);
        const evaluate = readingOf(elements, figure);
        const isLevel = figure.read === 'decibels' || figure.read === 'magnitude';
        const kind = figure.kind === 'largest' ? 'maximum' : 'minimum';
        const range = rangeOver(scan);
        const places = isLevel
          ? [(figure.kind === 'largest' ? range.largest : range.smallest).frequency]
          : realExtremes({ evaluate, frequencies: scan.frequencies }).filter((one) => one.kind === kind).map(({ frequency }) => frequency);
        expect(places.length).toBe(1);
        const [place = 0] = places;
        if (figure.at !== undefined) expectPrinted(place, figure.at);
        if (figure.value !== undefined) expectPrinted(evaluate(place), figure.value);
      }
    }
  });
});
