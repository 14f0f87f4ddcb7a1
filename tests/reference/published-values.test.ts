import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import type { ValueFigure } from './support/records';

/** Element values that the data has from a formula, against what is printed of them. */
function valueOf(element: Element | undefined): number {
  switch (element?.kind) {
    case 'resistor':
      return element.resistance;
    case 'capacitor':
      return element.capacitance;
    case 'inductor':
      return element.inductance;
    default:
      throw new Error('no resistor, capacitor or inductor of that name');
  }
}

describe.each(figuresOf<ValueFigure>(['value']))('%s', (_title, { elements }, figures) => {
  it.each(figures)('%s', (_words, figure) => {
    expect(elements.filter(({ id }) => id === figure.element)).toHaveLength(1);
    expectPrinted(valueOf(elements.find(({ id }) => id === figure.element)), figure);
  });
});
