import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { nearestPreferred, preferredValues } from '@/solver';

describe('nearestPreferred', () => {
  it.each([
    [4650, 'E12', 4700],
    [5230, 'E24', 5100],
    [9.9, 'E12', 10],
    [0.96, 'E3', 1],
    [1.01e-9, 'E6', 1e-9],
    [-4650, 'E12', -4700],
    [919, 'E192', 920],
    [0, 'E12', 0],
  ] as const)('takes %d in %s to %d', (value, series, nearest) => {
    expect(nearestPreferred(value, series)).toBe(nearest);
  });

  it('gives decimal values to the last bit', () => {
    expect(nearestPreferred(4.69e-7, 'E12')).toBe(4.7e-7);
    expect(nearestPreferred(1.99e5, 'E24')).toBe(2e5);
  });

  it('never takes a value that another of the series is nearer to, by ratio', () => {
    const series = fc.constantFrom('E3', 'E6', 'E12', 'E24', 'E48', 'E96', 'E192' as const);
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 10, noNaN: true }),
        fc.integer({ min: -15, max: 12 }),
        series,
        (m, power, name) => {
          const value = m * 10 ** power;
          const off = Math.abs(Math.log(nearestPreferred(value, name) / value));
          return [power - 1, power, power + 1].every((decade) =>
            preferredValues(name).every((step) => Math.abs(Math.log((step * 10 ** decade) / value)) >= off - 1e-12),
          );
        },
      ),
      { seed: 20260104, numRuns: 500 },
    );
  });

  it('does not choke on what has no neighbour', () => {
    expect(nearestPreferred(Infinity, 'E12')).toBe(Infinity);
    expect(nearestPreferred(5e-324, 'E12')).toBeGreaterThan(0);
    expect(nearestPreferred(1.7e308, 'E12')).toBe(1.5e308);
  });
});
