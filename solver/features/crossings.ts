import { findRoot } from './brent';
import { extremesOf, rangeOver } from './extremes';
import { magnitudeOf } from './response';
import type { Scan } from './scan';
import { magnitudeAt } from './scan';

/** What a level is counted from: the largest magnitude of the band, the magnitude at a frequency (0 Hz too), or 1. */
export type Reference =
  | { readonly to: 'maximum' }
  | { readonly to: 'frequency'; readonly frequency: number }
  | { readonly to: 'unity' };

/** A frequency at which something passes a level. */
export interface Crossing {
  /** Hertz. */
  readonly frequency: number;
  readonly direction: 'rising' | 'falling';
}

/** The magnitude that a reference stands for; undefined where the response has none there. */
export function referenceMagnitude(scan: Scan, reference: Reference): number | undefined {
  switch (reference.to) {
    case 'maximum':
      return rangeOver(scan).largest.magnitude;
    case 'frequency': {
      const magnitude = magnitudeAt(scan, reference.frequency);
      return Number.isFinite(magnitude) ? magnitude : undefined;
    }
    case 'unity':
      return 1;
  }
}

/**
 * Where the magnitude passes a level, in decibels over the reference, in rising frequency. Between the extremes the
 * magnitude runs one way, so none is missed; each is refined to rounding. A level that is touched at an extreme and
 * not passed is no crossing.
 */
export function levelCrossings(scan: Scan, level: number, reference: Reference = { to: 'unity' }): readonly Crossing[] {
  const base = referenceMagnitude(scan, reference);
  return base === undefined || base === 0 ? [] : magnitudeCrossings(scan, base * magnitudeOf(level));
}

/** As a part of the level, what rounding alone may take a magnitude off it: an all-pass does not pass its own. */
const ON_LEVEL = 1e-12;

/** Where the magnitude passes a magnitude above 0, from one side of it to the other by more than rounding. */
export function magnitudeCrossings(scan: Scan, magnitude: number): readonly Crossing[] {
  const { frequencies, re, im } = scan;
  const points = Array.from(frequencies, (frequency, k) => ({ frequency, magnitude: Math.hypot(re[k] ?? 0, im[k] ?? 0) }));
  points.push(...extremesOf(scan));
  points.sort((a, b) => a.frequency - b.frequency);
  // Bounded, and straight about the level, also where the magnitude is 0 or has no value.
  const off = (size: number): number => (size === Infinity ? 1 : (size - magnitude) / (size + magnitude));
  const found: Crossing[] = [];
  let before: { readonly frequency: number; readonly off: number } | undefined;
  for (const { frequency, magnitude: size } of points) {
    const there = { frequency, off: off(size) };
    if (Math.abs(there.off) <= ON_LEVEL) continue;
    if (before !== undefined && before.off > 0 !== there.off > 0) {
      const at = findRoot((f) => off(magnitudeAt(scan, f)), before.frequency, frequency, before.off, there.off);
      found.push({ frequency: at, direction: there.off > 0 ? 'rising' : 'falling' });
    }
    before = there;
  }
  return found;
}

/** Sines below this are a crossing; a jump by half a turn, at a zero on the axis, has none so small. */
const NO_JUMP = 1e-3;

/**
 * Where the phase passes a number of degrees, whole turns aside, in rising frequency; `falling` where it passes to less.
 * No unwrapping: it is where the response, turned back by that angle, passes the positive real axis.
 */
export function phaseCrossings(scan: Scan, degrees: number): readonly Crossing[] {
  const { frequencies, re, im, response } = scan;
  const [c, s] = directionOf(degrees);
  const sineAt = (x: number, y: number): number => (y * c - x * s) / (Math.hypot(x, y) || 1);
  const cosineAt = (x: number, y: number): number => (x * c + y * s) / (Math.hypot(x, y) || 1);
  const found: Crossing[] = [];
  for (let k = 0; k + 1 < frequencies.length; k++) {
    const [x, y] = [re[k] ?? 0, im[k] ?? 0];
    const [nextX, nextY] = [re[k + 1] ?? 0, im[k + 1] ?? 0];
    const [here, there] = [sineAt(x, y), sineAt(nextX, nextY)];
    if (here >= 0 === there >= 0 || cosineAt(x, y) + cosineAt(nextX, nextY) <= 0) continue;
    const of = (f: number): number => {
      const value = response.evaluate(f);
      return value === undefined ? 0 : sineAt(value.re, value.im);
    };
    const frequency = findRoot(of, frequencies[k] ?? 0, frequencies[k + 1] ?? 0, here, there);
    const value = response.evaluate(frequency);
    if (value === undefined || cosineAt(value.re, value.im) <= 0 || Math.abs(sineAt(value.re, value.im)) > NO_JUMP) continue;
    found.push({ frequency, direction: there >= 0 ? 'rising' : 'falling' });
  }
  return found;
}

/** Cosine and sine of an angle in degrees, exact for quarter turns. */
function directionOf(degrees: number): readonly [number, number] {
  const turned = ((degrees % 360) + 360) % 360;
  const quarter = [
    [1, 0],
    [0, 1],
    [-1, 0],
    [0, -1],
  ] as const;
  const exact = turned % 90 === 0 ? quarter[turned / 90] : undefined;
  return exact ?? [Math.cos((turned * Math.PI) / 180), Math.sin((turned * Math.PI) / 180)];
}
