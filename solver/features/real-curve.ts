import { findRoot } from './brent';
import type { Crossing } from './crossings';
import { refine, turningPoints } from './extremes';

/**
 * A real quantity as a function of the frequency, such as a group delay in seconds or the real part of an impedance,
 * with the frequencies (hertz, rising) at which to look first; those of a scan of the response it belongs to serve.
 */
export interface RealCurve {
  readonly evaluate: (frequency: number) => number;
  readonly frequencies: ArrayLike<number>;
}

export interface RealExtreme {
  readonly kind: 'maximum' | 'minimum';
  /** Hertz. */
  readonly frequency: number;
  readonly value: number;
}

/** Changes by less than this, against the largest value, are taken for rounding. */
const FLAT = 1e-10;

/** The maxima and minima between the first and the last frequency, in rising frequency, refined as those of a magnitude. */
export function realExtremes({ evaluate, frequencies }: RealCurve): readonly RealExtreme[] {
  const values = Float64Array.from(frequencies, evaluate);
  const most = values.reduce((largest, value) => Math.max(largest, Math.abs(value)), 0);
  return turningPoints(values, FLAT * most).flatMap(({ kind, place }) => {
    const [low, start, high] = [frequencies[place - 1], frequencies[place], frequencies[place + 1]];
    if (low === undefined || start === undefined || high === undefined) return [];
    const sign = kind === 'minimum' ? 1 : -1;
    const frequency = refine((f) => sign * evaluate(f), low, start, high);
    return [{ kind, frequency, value: evaluate(frequency) }];
  });
}

/** Where the curve passes a value, in rising frequency; between the extremes it runs one way, so none is missed. */
export function realCrossings(curve: RealCurve, value: number): readonly Crossing[] {
  const { evaluate, frequencies } = curve;
  const points = [...Array.from(frequencies), ...realExtremes(curve).map(({ frequency }) => frequency)].sort((a, b) => a - b);
  const off = points.map((frequency) => evaluate(frequency) - value);
  return points.flatMap((frequency, k) => {
    const next = points[k + 1];
    const [here = 0, there = 0] = [off[k], off[k + 1]];
    if (next === undefined || here >= 0 === there >= 0) return [];
    const at = findRoot((f) => evaluate(f) - value, frequency, next, here, there);
    return [{ frequency: at, direction: there >= 0 ? ('rising' as const) : ('falling' as const) }];
  });
}
