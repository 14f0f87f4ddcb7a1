import type { UnknownFields } from './element-definition';
import type { Tabulated } from './law';

const MOST_POINTS = 100_000;

/** One part in 10¹²: a frequency that went to rad/s and back is still within its table. */
const EDGE = 1e-12;

/**
 * Complex values known at rising frequencies, linear in log frequency between them, real and imaginary part each. Not
 * known outside; a table of one point is known at that frequency alone. 0 Hz is known only where it is a point, and
 * between it and the next point the values are linear in frequency, for want of a logarithm of nothing.
 */
export function tabulated(
  frequencies: readonly number[],
  values: readonly (readonly [re: number, im: number])[],
): Tabulated {
  return (frequency) => {
    const first = frequencies[0] ?? Infinity;
    const last = frequencies[frequencies.length - 1] ?? -Infinity;
    if (frequency < first * (1 - EDGE) || frequency > last * (1 + EDGE)) return undefined;
    let low = 0;
    let high = frequencies.length - 1;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if ((frequencies[middle] ?? 0) <= frequency) low = middle;
      else high = middle;
    }
    const [lowRe, lowIm] = values[low] ?? [0, 0];
    const [highRe, highIm] = values[high] ?? [0, 0];
    const from = frequencies[low] ?? 0;
    const to = frequencies[high] ?? 0;
    if (frequency <= from || from === to) return [lowRe, lowIm];
    if (frequency >= to) return [highRe, highIm];
    const part = from === 0 ? frequency / to : Math.log(frequency / from) / Math.log(to / from);
    return [lowRe + part * (highRe - lowRe), lowIm + part * (highIm - lowIm)];
  };
}

/** The fault of `points` whose rows each hold the named numbers beside a rising frequency, or undefined. */
export function faultOfPoints({ points }: UnknownFields, isRow: (row: UnknownFields) => boolean, what: string): string | undefined {
  if (!Array.isArray(points) || points.length === 0) return 'needs at least one point';
  if (points.length > MOST_POINTS) return `has more than ${MOST_POINTS} points`;
  let before = -1;
  for (const [place, point] of (points as readonly unknown[]).entries()) {
    const row = typeof point === 'object' && point !== null ? (point as UnknownFields) : {};
    const { frequency } = row;
    if (typeof frequency !== 'number' || !Number.isFinite(frequency) || frequency < 0 || !isRow(row)) {
      return `needs ${what} as its point ${place + 1}`;
    }
    if (frequency <= before) return `has points that do not rise in frequency, at point ${place + 1}`;
    before = frequency;
  }
  return undefined;
}

export function isFiniteNumber(value: unknown): value is number {
  return typeof value === 'number' && Number.isFinite(value);
}
