import { describe, expect, it } from 'vitest';
import { nearestPreferred, preferredValues } from '@/solver';
import { IEC_60063 } from './data/iec-60063';

describe('IEC 60063 preferred series', () => {
  it.each(['E3', 'E6', 'E12', 'E24'] as const)('%s is the standard’s list', (series) => {
    expect(preferredValues(series)).toEqual(IEC_60063[series].map((two) => two / 10));
  });

  it.each(['E48', 'E96', 'E192'] as const)('%s is the standard’s list', (series) => {
    expect(preferredValues(series)).toEqual(IEC_60063[series].map((three) => three / 100));
  });

  it.each(['E3', 'E6', 'E12', 'E24', 'E48', 'E96', 'E192'] as const)(
    '%s takes each of its values to itself',
    (series) => {
      for (const value of preferredValues(series)) expect(nearestPreferred(value, series)).toBe(value);
    },
  );

  it('follows rounding from E48 up, but for 920, and below only where the list does [computed]', () => {
    const rounded = (count: number, digits: number): number[] =>
      Array.from({ length: count }, (_, k) => Math.round(10 ** (digits + k / count)));
    const deviating = (list: readonly number[], digits: number): number[] =>
      list.filter((value, k) => value !== rounded(list.length, digits)[k]);
    const hundreds = (series: 'E48' | 'E96' | 'E192') => preferredValues(series).map((value) => Math.round(value * 100));
    const tens = (series: 'E24') => preferredValues(series).map((value) => Math.round(value * 10));
    expect(deviating(hundreds('E48'), 2)).toEqual([]);
    expect(deviating(hundreds('E96'), 2)).toEqual([]);
    expect(deviating(hundreds('E192'), 2)).toEqual([920]);
    expect(deviating(tens('E24'), 1)).toEqual([27, 30, 33, 36, 39, 43, 47, 82]);
  });
});
