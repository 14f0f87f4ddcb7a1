/** Where a response may change over a width that a grid would step over: a pole or a zero tells, see `hintsOf`. */
export interface ResonanceHint {
  /** Hertz. */
  readonly frequency: number;
  /** The width over which it changes, hertz: that of a resonance between its half-power points. */
  readonly width: number;
}

export interface AdaptiveOptions {
  /** Where narrow resonances are known to be; those that are not are looked for. */
  readonly hints?: readonly ResonanceHint[];
  /** How far a straight line between two neighbours may be from the response halfway, as a part of it; 0.01 if not given. */
  readonly tolerance?: number;
  /** Points in all; 20,000 if not given. */
  readonly mostPoints?: number;
}

/** Complex values at frequencies, one pair of arrays an output; `determined` is 0 where there is none. */
export interface ResponseValues {
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly determined: Uint8Array;
}

const TOLERANCE = 0.01;
const MOST_POINTS = 20_000;
const MOST_ROUNDS = 60;

/**
 * What is off by more than this in an interval, and is not much less off in its halves, is looked into further: of a
 * resonance between two points nothing may be seen at them but how slightly it bends the response.
 */
const SUSPICIOUS = 1e-6;
/** Between points that are twice as close a smooth response is 16 times closer to a cubic; a resonance is not. */
const SMOOTH_GAIN = 4;
/** A response is not followed into a zero further than this part of what is beside it. */
const DEEPEST = 1e-4;

/** Distances from a resonance in units of its width at which points are laid. */
const ABOUT = [0.1, 0.2, 0.35, 0.5, 0.75, 1, 1.5, 2.5, 4, 7, 12, 20];

interface Interval {
  readonly low: number;
  readonly high: number;
  /** How far off the interval was that this is a half of. */
  readonly offBefore: number;
}

/**
 * Adds frequencies to a grid where the response needs them. Every interval is looked at halfway: where a straight line
 * between its ends is off, the middle is added and the halves are looked at. Where a cubic in ln f through the four points
 * about it is off, and does not come closer as the points do, something narrow may be in it, and the halves are looked at
 * too. All intervals of a round are evaluated at once.
 *
 * @param grid hertz, in any order; 0 Hz is kept, and nothing is added below the lowest frequency above it
 * @param evaluate the outputs at frequencies; undefined ends the search
 */
export function adaptiveFrequencies(
  grid: ArrayLike<number>,
  evaluate: (frequencies: Float64Array) => readonly ResponseValues[] | undefined,
  { hints = [], tolerance = TOLERANCE, mostPoints = MOST_POINTS }: AdaptiveOptions,
): Float64Array {
  const given = [...new Set(Array.from(grid))].sort((a, b) => a - b);
  const start = withHints(given, hints);
  const positive = start.filter((frequency) => frequency > 0);
  const values = new Map<number, Point>();
  const known = evaluateInto(values, positive, evaluate);
  if (!known || positive.length < 2) return Float64Array.from(start);

  /** All that were evaluated, rising: what is told from. */
  let points = positive;
  const kept = new Set(start);
  let open = positive.slice(1).map((high, place): Interval => ({ low: positive[place] ?? high, high, offBefore: Infinity }));
  for (let round = 0; round < MOST_ROUNDS && open.length > 0 && points.length + open.length <= mostPoints; round++) {
    const middles = open.map(({ low, high }) => Math.sqrt(low) * Math.sqrt(high));
    if (!evaluateInto(values, middles, evaluate)) break;
    const next: Interval[] = [];
    const placeOf = new Map(points.map((frequency, place) => [frequency, place]));
    for (const [index, { low, high, offBefore }] of open.entries()) {
      const middle = middles[index] ?? low;
      const place = placeOf.get(low) ?? 0;
      const off = offAt(values, aboutPlace(points, place), middle);
      const isOff = offAt(values, [low, high], middle) > tolerance;
      const isSuspicious = off > SUSPICIOUS && off > offBefore / SMOOTH_GAIN;
      if (isOff) kept.add(middle);
      if (!isOff && !isSuspicious && offBefore !== Infinity) continue;
      if (!isOff && off <= SUSPICIOUS) continue;
      for (const half of [
        { low, high: middle },
        { low: middle, high },
      ]) {
        // No closer than frequencies can be told apart.
        if (half.high - half.low > 64 * Number.EPSILON * half.high) next.push({ ...half, offBefore: off });
      }
    }
    points = [...new Set([...points, ...middles])].sort((a, b) => a - b);
    open = next;
  }
  return Float64Array.from(kept).sort();
}

interface Point {
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly isKnown: boolean;
}

function evaluateInto(
  values: Map<number, Point>,
  frequencies: readonly number[],
  evaluate: (frequencies: Float64Array) => readonly ResponseValues[] | undefined,
): boolean {
  const found = evaluate(Float64Array.from(frequencies));
  if (found === undefined) return false;
  for (const [place, frequency] of frequencies.entries()) {
    values.set(frequency, {
      re: Float64Array.from(found, ({ re }) => re[place] ?? 0),
      im: Float64Array.from(found, ({ im }) => im[place] ?? 0),
      isKnown: found.every(({ determined }) => determined[place] === 1),
    });
  }
  return true;
}

/** The four points about an interval, or what there is of them. */
function aboutPlace(points: readonly number[], place: number): readonly number[] {
  const first = Math.max(0, Math.min(place - 1, points.length - 4));
  return points.slice(first, first + 4);
}

/** How far the response at a frequency is from the polynomial in ln f through points, as a part of it, at the worst output. */
function offAt(values: ReadonlyMap<number, Point>, about: readonly number[], frequency: number): number {
  const actual = values.get(frequency);
  const found = about.map((at) => values.get(at));
  if (actual?.isKnown !== true || found.some((point) => point?.isKnown !== true)) return 0;
  const logs = about.map(Math.log);
  const x = Math.log(frequency);
  const weights = logs.map((xi, i) => logs.reduce((product, xj, j) => (j === i ? product : (product * (x - xj)) / (xi - xj)), 1));
  let worst = 0;
  for (let output = 0; output < actual.re.length; output++) {
    let [re, im, largest] = [0, 0, 0];
    for (const [i, point] of found.entries()) {
      const [pRe, pIm] = [point?.re[output] ?? 0, point?.im[output] ?? 0];
      re += (weights[i] ?? 0) * pRe;
      im += (weights[i] ?? 0) * pIm;
      largest = Math.max(largest, Math.hypot(pRe, pIm));
    }
    const size = Math.max(Math.hypot(actual.re[output] ?? 0, actual.im[output] ?? 0), DEEPEST * largest);
    if (size > 0) worst = Math.max(worst, Math.hypot(re - (actual.re[output] ?? 0), im - (actual.im[output] ?? 0)) / size);
  }
  return worst;
}

function withHints(given: readonly number[], hints: readonly ResonanceHint[]): number[] {
  const lowest = given.find((frequency) => frequency > 0) ?? Infinity;
  const highest = given[given.length - 1] ?? 0;
  const all = new Set(given);
  for (const { frequency, width } of hints) {
    if (!(width > 0)) continue;
    for (const distance of [0, ...ABOUT, ...ABOUT.map((one) => -one)]) {
      const at = frequency + distance * width;
      if (at > lowest && at < highest) all.add(at);
    }
  }
  return [...all].sort((a, b) => a - b);
}
