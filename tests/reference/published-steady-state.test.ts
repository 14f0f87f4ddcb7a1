import { describe, expect, it } from 'vitest';
import { figuresOf } from './support/describe-figure';
import { expectAngle, expectPhasor, expectPrinted } from './support/expect-figure';
import { byDenseEquations, bySolver, difference, magnitude, readingOf, valueOf } from './support/measure';
import type { ExactFigure, PhasorFigure, ReadingFigure } from './support/records';

/**
 * Every published phasor and reading at one frequency, by the solver; and the same by the dense equations, so that a
 * figure that neither reproduces is known to be a fault of the data.
 */
type SteadyFigure = ReadingFigure | PhasorFigure | ExactFigure;

const CASES = figuresOf<SteadyFigure>(['reading', 'phasor', 'exact']);

describe.each([
  ['the solver', bySolver],
  ['dense equations with 64 digits', byDenseEquations],
] as const)('by %s', (_, solveAt) => {
  describe.each(CASES)('%s', (_title, { elements }, figures) => {
    it.each(figures)('%s', (_words, figure) => {
      switch (figure.kind) {
        case 'reading': {
          const value = readingOf(elements, figure, solveAt)(figure.frequency);
          if (figure.read === 'degrees') expectAngle(value, figure);
          else expectPrinted(value, figure);
          break;
        }
        case 'phasor':
          expectPhasor(valueOf(elements, figure.output, figure.frequency, solveAt), figure);
          break;
        case 'exact': {
          const off = magnitude(
            difference(valueOf(elements, figure.output, figure.frequency, solveAt), figure.value),
          );
          expect(off / (magnitude(figure.value) || 1)).toBeLessThanOrEqual(figure.units * Number.EPSILON);
        }
      }
    });
  });
});
