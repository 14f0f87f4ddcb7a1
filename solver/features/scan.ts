import type { Problem } from '../analysis/problem';
import { problem } from '../analysis/problem';
import type { ResonanceHint } from '../analysis/adaptive-frequencies';
import type { Band, ResponseFunction } from './response';

export interface ScanOptions extends Band {
  /** Points of the grid in a decade, before it is made finer where the response asks for it; 60 if not given. */
  readonly perDecade?: number;
  /** What the grid must not step over, see `hintsOf`; those of the response itself if not given. */
  readonly hints?: readonly ResonanceHint[];
}

/**
 * A response known so closely that what lies between the points is plain: from each to the next it turns by no more
 * than `TURN` and changes by no more than a factor of two, but beside a zero or a pole on the axis itself. Features
 * start from it and are then refined on the response; nothing is read off the points.
 */
export interface Scan {
  readonly ok: true;
  readonly band: Band;
  readonly response: ResponseFunction;
  /** Hertz, rising. Frequencies without a value are left out. */
  readonly frequencies: Float64Array;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

const PER_DECADE = 60;
const MOST_POINTS = 50_000;
const MOST_ROUNDS = 12;

/** Degrees between one point and the next. */
const TURN = 40;
const COS_TURN = Math.cos((TURN * Math.PI) / 180);

/** Evaluates a response over a band, more closely where it needs it. Costs the grid and some points a resonance. */
export function scanResponse(response: ResponseFunction, options: ScanOptions): Scan | Problem {
  const { low, high, perDecade = PER_DECADE, hints = response.hints ?? [] } = options;
  if (!(low > 0) || !(high > low) || !Number.isFinite(high)) {
    return problem('invalid', [], [], 'A band needs a lower frequency above 0 Hz and a higher one above that. Give two such frequencies.');
  }
  if (!(perDecade >= 1) || Math.log10(high / low) * perDecade > MOST_POINTS) {
    return problem('invalid', [], [], `The grid needs at least 1 point in a decade, and no more than ${MOST_POINTS} in all.`);
  }
  let points = evaluated(response, startingGrid(low, high, perDecade, hints));
  for (let round = 0; round < MOST_ROUNDS && points.length < MOST_POINTS; round++) {
    const between: number[] = [];
    points.forEach((point, k) => {
      const next = points[k + 1];
      if (next !== undefined && !isPlain(point, next)) between.push(Math.sqrt(point.frequency) * Math.sqrt(next.frequency));
    });
    if (between.length === 0) break;
    points = [...points, ...evaluated(response, Float64Array.from(between))].sort((a, b) => a.frequency - b.frequency);
  }
  if (points.length < 2) {
    return problem('notFinite', [], [], 'The response has no value at any frequency of the band. Choose another output, or another band.');
  }
  return {
    ok: true,
    band: { low, high },
    response,
    frequencies: Float64Array.from(points, ({ frequency }) => frequency),
    re: Float64Array.from(points, ({ re }) => re),
    im: Float64Array.from(points, ({ im }) => im),
  };
}

interface Point {
  readonly frequency: number;
  readonly re: number;
  readonly im: number;
}

function isPlain(one: Point, other: Point): boolean {
  // No closer than rounding allows to tell frequencies apart.
  if (other.frequency - one.frequency <= 64 * Number.EPSILON * other.frequency) return true;
  const a = Math.hypot(one.re, one.im);
  const b = Math.hypot(other.re, other.im);
  if (a > 2 * b || b > 2 * a) return false;
  return (one.re / a) * (other.re / b) + (one.im / a) * (other.im / b) >= COS_TURN || a === 0 || b === 0;
}

function startingGrid(low: number, high: number, perDecade: number, hints: readonly ResonanceHint[]): Float64Array {
  const steps = Math.max(1, Math.ceil(Math.log10(high / low) * perDecade));
  const ratio = (high / low) ** (1 / steps);
  const grid = Array.from({ length: steps + 1 }, (_, k) => (k === steps ? high : low * (high / low) ** (k / steps)));
  for (const { frequency, width } of hints) {
    if (!(frequency > 0) || !(width > 0) || !Number.isFinite(frequency) || !Number.isFinite(width)) continue;
    grid.push(frequency);
    // Out to where the grid takes over, in steps that grow with the distance.
    const least = Math.max(width, 4 * Number.EPSILON * frequency);
    for (let off = least / 8; off < 2 * (ratio - 1) * frequency; off *= 1.5) grid.push(frequency - off, frequency + off);
  }
  return Float64Array.from([...new Set(grid.filter((f) => f >= low && f <= high))].sort((a, b) => a - b));
}

function evaluated(response: ResponseFunction, frequencies: Float64Array): Point[] {
  if (response.evaluateAll !== undefined) {
    const { re, im, determined } = response.evaluateAll(frequencies);
    return Array.from(frequencies).flatMap((frequency, k) => (determined[k] === 1 ? finite({ frequency, re: re[k] ?? 0, im: im[k] ?? 0 }) : []));
  }
  return Array.from(frequencies).flatMap((frequency) => {
    const value = response.evaluate(frequency);
    return value === undefined ? [] : finite({ frequency, re: value.re, im: value.im });
  });
}

function finite(point: Point): readonly Point[] {
  return Number.isFinite(point.re) && Number.isFinite(point.im) ? [point] : [];
}

/** |H| at a frequency; infinity, for comparing only, where the response has no value. */
export function magnitudeAt({ response }: Pick<Scan, 'response'>, frequency: number): number {
  const value = response.evaluate(frequency);
  return value === undefined ? Infinity : Math.hypot(value.re, value.im);
}

/** The fault of a band that has to lie within the scan, or undefined. */
export function outside({ band }: Scan, { low, high }: Band): Problem | undefined {
  if (low >= band.low && high <= band.high && low < high) return undefined;
  return problem('invalid', [], [], `The response was looked at from ${band.low} to ${band.high} Hz, so nothing is known from ${low} to ${high} Hz. Widen the one or narrow the other.`);
}
