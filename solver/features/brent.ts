/**
 * Brent's two methods without derivatives: R. P. Brent, *Algorithms for Minimization without Derivatives*,
 * Prentice-Hall 1973, chapters 4 and 5; the first also in Comput. J. 14 (1971) 422, doi 10.1093/comjnl/14.4.422.
 */

const MOST_STEPS = 200;

/**
 * A point at which `of` changes its sign, between two at which its signs differ, to a few units of rounding: bisection,
 * the secant or inverse quadratic interpolation, whichever is safe and fast. `atA` and `atB` are its values there; a
 * value of 0 is a root. Converges for every function, in some ten evaluations for a smooth one.
 */
export function findRoot(of: (x: number) => number, a: number, b: number, atA: number, atB: number): number {
  let [p, q, r] = [a, b, a];
  let [fp, fq, fr] = [atA, atB, atA];
  let step = q - p;
  let before = step;
  for (let count = 0; count < MOST_STEPS; count++) {
    if (Math.abs(fr) < Math.abs(fq)) {
      [p, q, r] = [q, r, q];
      [fp, fq, fr] = [fq, fr, fq];
    }
    const tolerance = 2 * Number.EPSILON * Math.abs(q);
    const half = (r - q) / 2;
    if (Math.abs(half) <= tolerance || fq === 0) return q;
    if (Math.abs(before) < tolerance || Math.abs(fp) <= Math.abs(fq)) {
      step = half;
      before = half;
    } else {
      const [above, below] = interpolation(p, q, r, fp, fq, fr, half);
      const usable = 2 * above < Math.min(3 * half * below - Math.abs(tolerance * below), Math.abs(before * below));
      before = usable ? step : half;
      step = usable ? above / below : half;
    }
    p = q;
    fp = fq;
    q += Math.abs(step) > tolerance ? step : half > 0 ? tolerance : -tolerance;
    fq = of(q);
    if (fq > 0 === fr > 0) {
      r = p;
      fr = fp;
      step = q - p;
      before = step;
    }
  }
  return q;
}

/** The step of the secant or of inverse quadratic interpolation, as a fraction whose upper part is positive. */
function interpolation(p: number, q: number, r: number, fp: number, fq: number, fr: number, half: number): [number, number] {
  const s = fq / fp;
  let above: number;
  let below: number;
  if (p === r) {
    above = 2 * half * s;
    below = 1 - s;
  } else {
    const t = fp / fr;
    const u = fq / fr;
    above = s * (2 * half * t * (t - u) - (q - p) * (u - 1));
    below = (t - 1) * (u - 1) * (s - 1);
  }
  return above > 0 ? [above, -below] : [-above, below];
}

/** The square root of the rounding: about a minimum, values tell no more of the place. */
const RESOLUTION = Math.sqrt(Number.EPSILON);

const GOLDEN = (3 - Math.sqrt(5)) / 2;

/**
 * A minimum of `of` inside [a, b], from a first point `x` inside that is lower than both ends: golden section and
 * parabolas. The place is found to about the square root of the rounding of b − a, which is as much as values can tell
 * of a function that changes over all of the interval.
 */
export function findMinimum(of: (x: number) => number, a: number, b: number, x: number, atX: number): number {
  let [low, high] = [a, b];
  let [best, second, third] = [x, x, x];
  let [fBest, fSecond, fThird] = [atX, atX, atX];
  const tolerance = Math.max(RESOLUTION * (b - a), Number.EPSILON * Math.abs(x));
  let step = 0;
  let before = 0;
  for (let count = 0; count < MOST_STEPS; count++) {
    const middle = (low + high) / 2;
    if (Math.abs(best - middle) <= 2 * tolerance - (high - low) / 2) break;
    let usable = false;
    if (Math.abs(before) > tolerance) {
      const r = (best - second) * (fBest - fThird);
      const t = (best - third) * (fBest - fSecond);
      const above = (best - third) * t - (best - second) * r;
      const below = 2 * (t - r);
      const move = below === 0 ? Infinity : -above / below;
      usable = Math.abs(move) < Math.abs(before) / 2 && best + move > low && best + move < high;
      before = step;
      if (usable) {
        step = move;
        const next = best + step;
        if (next - low < 2 * tolerance || high - next < 2 * tolerance) step = best < middle ? tolerance : -tolerance;
      }
    }
    if (!usable) {
      before = best < middle ? high - best : low - best;
      step = GOLDEN * before;
    }
    const next = best + (Math.abs(step) >= tolerance ? step : step > 0 ? tolerance : -tolerance);
    const value = of(next);
    if (value <= fBest) {
      if (next < best) high = best;
      else low = best;
      [third, second, best] = [second, best, next];
      [fThird, fSecond, fBest] = [fSecond, fBest, value];
    } else {
      if (next < best) low = next;
      else high = next;
      if (value <= fSecond || second === best) {
        [third, second] = [second, next];
        [fThird, fSecond] = [fSecond, value];
      } else if (value <= fThird || third === best || third === second) {
        third = next;
        fThird = value;
      }
    }
  }
  return best;
}
