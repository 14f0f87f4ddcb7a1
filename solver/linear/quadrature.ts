/**
 * Adaptive quadrature of several functions at once, by Gauss's 7-point and Kronrod's 15-point rules (Kronrod 1965;
 * Piessens, de Doncker-Kapenga, Überhuber and Kahaner, QUADPACK, Springer 1983).
 */

/** Kronrod's abscissae on (0, 1], those of Gauss at odd places, and the weights. */
const ABSCISSAE = [
  0.991455371120812639206854697526329, 0.949107912342758524526189684047851, 0.864864423359769072789712788640926,
  0.741531185599394439863864773280788, 0.58608723546769113029414483825873, 0.405845151377397166906606412076961,
  0.207784955007898467600689403773245, 0,
] as const;
const KRONROD = [
  0.022935322010529224963732008058970, 0.063092092629978553290700663189204, 0.104790010322250183839876322541518,
  0.140653259715525918745189590510238, 0.16900472663926790282829543358104, 0.190350578064785409913256402421014,
  0.204432940075298892414161999234649, 0.209482141084727828012999174891714,
] as const;
const GAUSS = [0.129484966168869693270611432679082, 0.27970539148927666790146777142378, 0.381830050505118944950369775488975, 0.417959183673469387755102040816327] as const;

const MOST_INTERVALS = 5_000;

interface Interval {
  readonly from: number;
  readonly to: number;
  readonly sums: Float64Array;
  /** Of the first function. */
  readonly error: number;
}

export interface Integral {
  /** One a function. */
  readonly values: Float64Array;
  /** An estimate of the error of the first, seldom too small. */
  readonly error: number;
  readonly isConverged: boolean;
}

/**
 * Integrals of `count` functions over [from, to], to a relative error of the first. `at` writes the functions' values
 * into `out` and answers whether there are any; where it answers false the whole answer is undefined. The range is
 * first cut into `pieces`.
 */
export function integrate(
  at: (x: number, out: Float64Array) => boolean,
  count: number,
  from: number,
  to: number,
  tolerance: number,
  pieces: number,
): Integral | undefined {
  const out = new Float64Array(count);
  const measure = (low: number, high: number): Interval | undefined => {
    const sums = new Float64Array(count);
    let gauss = 0;
    const middle = (low + high) / 2;
    const half = (high - low) / 2;
    for (const [place, abscissa] of ABSCISSAE.entries()) {
      for (const sign of abscissa === 0 ? [0] : [-1, 1]) {
        if (!at(middle + sign * abscissa * half, out)) return undefined;
        for (let k = 0; k < count; k++) sums[k] = (sums[k] ?? 0) + half * (KRONROD[place] ?? 0) * (out[k] ?? 0);
        if (place % 2 === 1) gauss += half * (GAUSS[(place - 1) / 2] ?? 0) * (out[0] ?? 0);
      }
    }
    return { from: low, to: high, sums, error: Math.abs((sums[0] ?? 0) - gauss) };
  };
  const waiting: Interval[] = [];
  const values = new Float64Array(count);
  let error = 0;
  const put = (interval: Interval, sign: 1 | -1): void => {
    for (let k = 0; k < count; k++) values[k] = (values[k] ?? 0) + sign * (interval.sums[k] ?? 0);
    error += sign * interval.error;
    if (sign === 1) push(waiting, interval);
  };
  for (let piece = 0; piece < pieces; piece++) {
    const interval = measure(from + ((to - from) * piece) / pieces, from + ((to - from) * (piece + 1)) / pieces);
    if (interval === undefined) return undefined;
    put(interval, 1);
  }
  while (error > tolerance * Math.abs(values[0] ?? 0) && waiting.length < MOST_INTERVALS) {
    const worst = pop(waiting);
    if (worst === undefined) break;
    const middle = (worst.from + worst.to) / 2;
    const [left, right] = [measure(worst.from, middle), measure(middle, worst.to)];
    if (left === undefined || right === undefined) return undefined;
    put(worst, -1);
    put(left, 1);
    put(right, 1);
  }
  // Summed afresh: what was added and taken away again has left its rounding.
  values.fill(0);
  error = 0;
  for (const interval of waiting) {
    for (let k = 0; k < count; k++) values[k] = (values[k] ?? 0) + (interval.sums[k] ?? 0);
    error += interval.error;
  }
  return { values, error, isConverged: error <= tolerance * Math.abs(values[0] ?? 0) * 2 };
}

/** A heap with the largest error first. */
function push(heap: Interval[], interval: Interval): void {
  let at = heap.length;
  heap.push(interval);
  while (at > 0) {
    const parent = (at - 1) >> 1;
    const above = heap[parent];
    if (above === undefined || above.error >= interval.error) break;
    heap[at] = above;
    at = parent;
  }
  heap[at] = interval;
}

function pop(heap: Interval[]): Interval | undefined {
  const [top] = heap;
  const last = heap.pop();
  if (last === undefined || heap.length === 0) return top;
  let at = 0;
  for (;;) {
    const left = 2 * at + 1;
    const right = left + 1;
    const larger = (heap[right]?.error ?? -1) > (heap[left]?.error ?? -1) ? right : left;
    const below = heap[larger];
    if (below === undefined || below.error <= last.error) break;
    heap[at] = below;
    at = larger;
  }
  heap[at] = last;
  return top;
}
