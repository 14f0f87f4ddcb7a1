import { describe, expect, it } from 'vitest';
import { exactFrequency, POLES, PRINTED_POLES, WEIGHTING_CIRCUITS, WEIGHTING_ROWS } from './data/sound-weighting';
import { expectPrinted } from './support/expect-figure';
import { readingOf } from './support/measure';
import { volts } from './support/figures';

/** What the tables of IEC 61672-1 say of each other. The decibels themselves are checked with all other figures. */
describe('IEC 61672-1', () => {
  it('has its poles as printed', () => {
    POLES.forEach((pole, k) => expectPrinted(pole, { printed: PRINTED_POLES[k] ?? '' }));
  });

  it('has nominal frequencies beside exact ones, a tenth of a decade apart', () => {
    WEIGHTING_ROWS.forEach(([nominal], k) => expect(Math.abs(nominal / exactFrequency(k) - 1)).toBeLessThan(0.013));
    expect(exactFrequency(0)).toBeCloseTo(10, 12);
    expect(exactFrequency(WEIGHTING_ROWS.length - 1)).toBeCloseTo(19952.623, 3);
  });

  it.each(WEIGHTING_CIRCUITS)('$id of the network lies within the limits of class 1 about the table', ({ id, elements }) => {
    const isA = id.startsWith('A');
    const response = readingOf(elements, {
      output: volts(isA ? 'b6' : 'b4'),
      read: 'decibels',
      against: { frequency: 1000 },
    });
    WEIGHTING_ROWS.forEach(([, a, c, upper, lower], k) => {
      const off = response(exactFrequency(k)) - (isA ? a : c);
      expect(off).toBeLessThan(upper);
      expect(off).toBeGreaterThan(lower ?? -Infinity);
    });
  });
});
