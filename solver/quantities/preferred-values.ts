/** The preferred number series of IEC 60063. */
export type PreferredSeries = 'E3' | 'E6' | 'E12' | 'E24' | 'E48' | 'E96' | 'E192';

/** E24 is a list: 27 to 47 and 82 do not follow the rounded geometric series (IEC 60063; values found in public text). */
const E24 = [10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91] as const;

const STEP_OF_E24: Readonly<Record<'E3' | 'E6' | 'E12' | 'E24', number>> = { E3: 8, E6: 4, E12: 2, E24: 1 };
const STEP_OF_E192: Readonly<Record<'E48' | 'E96' | 'E192', number>> = { E48: 4, E96: 2, E192: 1 };

/** E192 is round(100·10^(i/192)), with one exception in the standard: 9.20, where the formula gives 9.19. */
function e192(): number[] {
  return Array.from({ length: 192 }, (_, i) => (i === 185 ? 920 : Math.round(100 * 10 ** (i / 192))));
}

function build(series: PreferredSeries): readonly number[] {
  switch (series) {
    case 'E3':
    case 'E6':
    case 'E12':
    case 'E24':
      return E24.filter((_, i) => i % STEP_OF_E24[series] === 0).map((two) => two / 10);
    case 'E48':
    case 'E96':
    case 'E192':
      return e192()
        .filter((_, i) => i % STEP_OF_E192[series] === 0)
        .map((three) => three / 100);
  }
}

const built = new Map<PreferredSeries, readonly number[]>();

/** The values of one decade of a series, from 1 to below 10, rising. */
export function preferredValues(series: PreferredSeries): readonly number[] {
  const known = built.get(series);
  if (known !== undefined) return known;
  const values = build(series);
  built.set(series, values);
  return values;
}

/**
 * The value of a series nearest to `value` by ratio (a tolerance is a ratio), of two equally near the larger. The
 * sign is kept. Zero, and what is not finite, has no preferred value and is given back as it is.
 */
export function nearestPreferred(value: number, series: PreferredSeries): number {
  if (value === 0 || !Number.isFinite(value)) return value;
  const size = Math.abs(value);
  const decade = Math.floor(Math.log10(size));
  let best = size;
  let bestRatio = Infinity;
  for (const power of [decade - 1, decade, decade + 1]) {
    for (const mantissa of preferredValues(series)) {
      // Read from text, so that 4.7 kΩ is 4700 and not 4700.000000000001.
      const candidate = Number(`${mantissa}e${power}`);
      if (candidate === 0 || !Number.isFinite(candidate)) continue;
      const ratio = candidate > size ? candidate / size : size / candidate;
      if (ratio < bestRatio || (ratio === bestRatio && candidate > best)) {
        best = candidate;
        bestRatio = ratio;
      }
    }
  }
  return value < 0 ? -best : best;
}
