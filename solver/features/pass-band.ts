import type { Problem } from '../analysis/problem';
import type { Crossing, Reference } from './crossings';
import { magnitudeCrossings, referenceMagnitude } from './crossings';
import type { Extreme } from './extremes';
import { extremesOf, rangeOver } from './extremes';
import type { Band } from './response';
import { decibels, HALF_POWER_DECIBELS, magnitudeOf } from './response';
import type { Scan } from './scan';
import { outside } from './scan';

/** The pass band about the largest magnitude. */
export interface PassBand {
  /** Where the magnitude is largest within the scanned band; it may lie at an end of that. */
  readonly peak: Extreme;
  /** The magnitude that bounds the pass band. */
  readonly level: number;
  /** The cut-off frequencies, hertz; undefined where the magnitude keeps above the level to the end of the scanned band. */
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  /** upper − lower, hertz, where there are both. */
  readonly bandwidth: number | undefined;
  /** √(lower·upper), hertz. */
  readonly centre: number | undefined;
  /** centre / bandwidth: the quality factor of a resonance if the level is that of half the power. */
  readonly q: number | undefined;
}

/**
 * The pass band about the largest magnitude: from there down and up to the first frequencies where the magnitude falls
 * below a level, in decibels over the reference (half the power if none is given, over the maximum). Undefined if
 * the largest magnitude is not above the level.
 */
export function passBand(
  scan: Scan,
  { level = HALF_POWER_DECIBELS, reference = { to: 'maximum' } }: { readonly level?: number; readonly reference?: Reference } = {},
): PassBand | undefined {
  const base = referenceMagnitude(scan, reference);
  const peak = rangeOver(scan).largest;
  if (base === undefined || base === 0) return undefined;
  const bound = base * magnitudeOf(level);
  if (!(peak.magnitude > bound)) return undefined;
  return { peak, level: bound, ...between(magnitudeCrossings(scan, bound), peak.frequency) };
}

function between(
  crossings: readonly Crossing[],
  frequency: number,
): Pick<PassBand, 'lower' | 'upper' | 'bandwidth' | 'centre' | 'q'> {
  const lower = crossings.filter((one) => one.frequency < frequency).at(-1)?.frequency;
  const upper = crossings.find((one) => one.frequency > frequency)?.frequency;
  if (lower === undefined || upper === undefined) return { lower, upper, bandwidth: undefined, centre: undefined, q: undefined };
  const centre = Math.sqrt(lower) * Math.sqrt(upper);
  return { lower, upper, bandwidth: upper - lower, centre, q: centre / (upper - lower) };
}

/** A frequency that does not pass. */
export interface Notch {
  /** Hertz. */
  readonly frequency: number;
  readonly magnitude: number;
  /** Decibels below the reference; undefined where nothing at all passes. */
  readonly depth: number | undefined;
  /** Where the magnitude is back at half the power of the reference, hertz, and how far apart that is. */
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  readonly width: number | undefined;
  /** √(lower·upper) / width. */
  readonly q: number | undefined;
}

/** The minima that lie at least `least` decibels (3.01 if not given) below the reference, in rising frequency. */
export function notchesOf(
  scan: Scan,
  { reference = { to: 'maximum' }, least = -HALF_POWER_DECIBELS }: { readonly reference?: Reference; readonly least?: number } = {},
): readonly Notch[] {
  const base = referenceMagnitude(scan, reference);
  if (base === undefined || base === 0) return [];
  const crossings = magnitudeCrossings(scan, base * Math.SQRT1_2);
  return extremesOf(scan)
    .filter(({ kind, magnitude }) => kind === 'minimum' && magnitude <= base * magnitudeOf(-least))
    .map(({ frequency, magnitude }) => {
      const level = decibels(magnitude / base);
      const { lower, upper, bandwidth, q } = between(crossings, frequency);
      return { frequency, magnitude, depth: level === undefined ? undefined : -level, lower, upper, width: bandwidth, q };
    });
}

/** How much the magnitude varies over a band. */
export interface Ripple {
  readonly ok: true;
  /** Largest over smallest, decibels; undefined where the smallest is 0. */
  readonly decibels: number | undefined;
  readonly largest: Extreme;
  readonly smallest: Extreme;
}

/** The ripple over a band, its ends included; a `Problem` if that is not within the scanned one. */
export function rippleOver(scan: Scan, band: Band): Ripple | Problem {
  const fault = outside(scan, band);
  if (fault !== undefined) return fault;
  const { largest, smallest } = rangeOver(scan, band);
  const ratio = smallest.magnitude === 0 ? undefined : decibels(largest.magnitude / smallest.magnitude);
  return { ok: true, decibels: ratio, largest, smallest };
}

/** How little passes in a band. */
export interface Rejection {
  readonly ok: true;
  /** The least attenuation, decibels: the reference over the largest magnitude of the band; undefined where nothing passes. */
  readonly decibels: number | undefined;
  readonly worst: Extreme;
}

/** The rejection over a band, its ends included; a `Problem` if that is not within the scanned one. */
export function rejectionOver(scan: Scan, band: Band, reference: Reference = { to: 'maximum' }): Rejection | Problem {
  const fault = outside(scan, band);
  if (fault !== undefined) return fault;
  const { largest } = rangeOver(scan, band);
  const base = referenceMagnitude(scan, reference) ?? 0;
  const ratio = largest.magnitude === 0 ? undefined : decibels(base / largest.magnitude);
  return { ok: true, decibels: ratio, worst: largest };
}
