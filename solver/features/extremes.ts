import { findMinimum } from './brent';
import type { Band } from './response';
import { decibels } from './response';
import type { Scan } from './scan';
import { magnitudeAt } from './scan';
import { findStationaryPoint } from './stationary-point';

/** A largest or smallest magnitude among its neighbours. */
export interface Extreme {
  readonly kind: 'maximum' | 'minimum';
  /** Hertz. */
  readonly frequency: number;
  readonly magnitude: number;
  /** 20 lg of the magnitude; undefined where that is 0. */
  readonly decibels: number | undefined;
}

/** Changes of a magnitude by less than this, relative, are taken for rounding: a flat response has no extremes. */
const FLAT = 1e-10;

/**
 * The maxima and minima of the magnitude inside the scanned band, in rising frequency; its ends are none. Each is found
 * by the slope of |H|² (of 1/|H|² for a maximum, which at a resonance is a parabola), to about 1e-12 of its frequency;
 * less where the response is nearly flat. A pole on the axis, where |H| has no value, is left out.
 */
export function extremesOf(scan: Scan): readonly Extreme[] {
  const known = KNOWN.get(scan);
  if (known !== undefined) return known;
  const found = findExtremes(scan);
  KNOWN.set(scan, found);
  return found;
}

/** Nearly every feature starts from the extremes; they are found once a scan. */
const KNOWN = new WeakMap<Scan, readonly Extreme[]>();

function findExtremes(scan: Scan): readonly Extreme[] {
  const { frequencies, re, im } = scan;
  const logarithms = re.map((part, k) => Math.log(Math.hypot(part, im[k] ?? 0)));
  return turningPoints(logarithms, FLAT).flatMap(({ kind, place }) => {
    const low = frequencies[place - 1];
    const start = frequencies[place];
    const high = frequencies[place + 1];
    if (low === undefined || start === undefined || high === undefined) return [];
    const scale = Math.hypot(re[place] ?? 0, im[place] ?? 0) || Math.hypot(re[place + 1] ?? 0, im[place + 1] ?? 0) || 1;
    const squared = (f: number): number => {
      const ratio = magnitudeAt(scan, f) / scale;
      return kind === 'minimum' ? ratio * ratio : 1 / (ratio * ratio);
    };
    const frequency = refine(squared, low, start, high);
    const magnitude = magnitudeAt(scan, frequency);
    if (kind === 'maximum' && isPole(scan, frequency, magnitude)) return [];
    return Number.isFinite(magnitude) ? [{ kind, frequency, magnitude, decibels: decibels(magnitude) }] : [];
  });
}

/** Rounding of a frequency, with some room. */
const BESIDE = 2 ** -46;

/** Whether a maximum is no wider than rounding can tell: then it is a pole on the axis, and its height means nothing. */
function isPole(scan: Scan, frequency: number, magnitude: number): boolean {
  const beside = Math.max(magnitudeAt(scan, frequency * (1 - BESIDE)), magnitudeAt(scan, frequency * (1 + BESIDE)));
  return beside < magnitude / 2 || beside === Infinity;
}

/** The minimum of a smooth function between two points, from a lower one between them. */
export function refine(of: (x: number) => number, low: number, start: number, high: number): number {
  const rough = findMinimum(of, low, high, start, of(start));
  const reach = Math.min(rough - low, high - rough);
  if (!(reach > 0)) return rough;
  return findStationaryPoint(of, rough, reach) ?? rough;
}

export interface TurningPoint {
  readonly kind: 'maximum' | 'minimum';
  readonly place: number;
}

/** Where a row of values turns back by more than `least`, its ends left out. */
export function turningPoints(values: ArrayLike<number>, least: number): readonly TurningPoint[] {
  const found: TurningPoint[] = [];
  let highest = 0;
  let lowest = 0;
  let rising: boolean | undefined;
  for (let k = 1; k < values.length; k++) {
    const value = values[k] ?? 0;
    if (value > (values[highest] ?? 0)) highest = k;
    if (value < (values[lowest] ?? 0)) lowest = k;
    if (rising !== false && value < (values[highest] ?? 0) - least) {
      if (rising === true) found.push({ kind: 'maximum', place: highest });
      rising = false;
      lowest = k;
      highest = k;
    } else if (rising !== true && value > (values[lowest] ?? 0) + least) {
      if (rising === false) found.push({ kind: 'minimum', place: lowest });
      rising = true;
      highest = k;
      lowest = k;
    }
  }
  return found;
}

/** The largest and the smallest magnitude of a part of the scanned band, its ends included. */
export interface Range {
  readonly largest: Extreme;
  readonly smallest: Extreme;
}

/** The range over a band that lies within that of the scan. */
export function rangeOver(scan: Scan, { low, high }: Band = scan.band): Range {
  const ends = [low, high].map((frequency) => ({ frequency, magnitude: magnitudeAt(scan, frequency) }));
  const inner = extremesOf(scan).filter(({ frequency }) => frequency > low && frequency < high);
  const all = [...ends.filter(({ magnitude }) => Number.isFinite(magnitude)), ...inner];
  const start = all[0] ?? { frequency: low, magnitude: 0 };
  const largest = all.reduce((best, one) => (one.magnitude > best.magnitude ? one : best), start);
  const smallest = all.reduce((best, one) => (one.magnitude < best.magnitude ? one : best), start);
  return { largest: asExtreme('maximum', largest), smallest: asExtreme('minimum', smallest) };
}

function asExtreme(kind: Extreme['kind'], { frequency, magnitude }: Pick<Extreme, 'frequency' | 'magnitude'>): Extreme {
  return { kind, frequency, magnitude, decibels: decibels(magnitude) };
}
