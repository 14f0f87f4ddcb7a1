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
});
