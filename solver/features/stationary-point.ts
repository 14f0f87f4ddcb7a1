import { findRoot } from './brent';

/** Points of one interpolation; its accuracy is judged by its last coefficients. */
const POINTS = 17;

/** The last coefficients against the largest: below it, the polynomial is the function but for rounding. */
const RESOLVED = 1e-14;

const MOST_HALVINGS = 40;

/**
 * The place near `centre`, at most `reach` away, at which a smooth function has no slope, as the root of the derivative
 * of a polynomial through its values at Chebyshev points (Boyd, SIAM J. Numer. Anal. 40 (2002) 1666, doi
 * 10.1137/S0036142901398325). Where comparing values tells a place to the square root of the rounding, this tells it to
 * some hundred units of rounding of the width over which the function changes. The interval is halved until the
 * polynomial resolves the function; undefined if it does not, or if the slope keeps its sign.
 */
export function findStationaryPoint(of: (x: number) => number, centre: number, reach: number): number | undefined {
  const values = new Float64Array(POINTS);
  for (let halving = 0, half = reach; halving < MOST_HALVINGS; halving++, half /= 2) {
    for (let k = 0; k < POINTS; k++) values[k] = of(centre + half * Math.cos((Math.PI * k) / (POINTS - 1)));
    if (!values.every(Number.isFinite)) continue;
    const coefficients = coefficientsOf(values);
    let most = 0;
    // Without the constant: only what changes has to be resolved, down to the rounding of the values.
    for (let k = 1; k < POINTS; k++) most = Math.max(most, Math.abs(coefficients[k] ?? 0));
    const last = Math.max(...coefficients.slice(-3).map(Math.abs));
    const rounding = 4 * Number.EPSILON * Math.max(...values.map(Math.abs));
    if (last > Math.max(RESOLVED * most, rounding)) continue;
    const slope = derivativeOf(coefficients);
    const [low, high] = [clenshaw(slope, -1), clenshaw(slope, 1)];
    if (low > 0 === high > 0) return undefined;
    return centre + half * findRoot((x) => clenshaw(slope, x), -1, 1, low, high);
  }
  return undefined;
}

/** Σ c_k·T_k(x) through the values at cos(πk/n). */
function coefficientsOf(values: Float64Array): Float64Array {
  const n = values.length - 1;
  return values.map((_, k) => {
    let sum = 0;
    for (let j = 0; j <= n; j++) sum += (j === 0 || j === n ? 0.5 : 1) * (values[j] ?? 0) * Math.cos((Math.PI * j * k) / n);
    return ((k === 0 || k === n ? 1 : 2) * sum) / n;
  });
}

function derivativeOf(coefficients: Float64Array): Float64Array {
  const n = coefficients.length - 1;
  const slope = new Float64Array(n + 2);
  for (let k = n; k >= 1; k--) slope[k - 1] = (slope[k + 1] ?? 0) + 2 * k * (coefficients[k] ?? 0);
  slope[0] = (slope[0] ?? 0) / 2;
  return slope;
}

function clenshaw(coefficients: Float64Array, x: number): number {
  let [one, two] = [0, 0];
  for (let k = coefficients.length - 1; k >= 1; k--) [one, two] = [(coefficients[k] ?? 0) + 2 * x * one - two, one];
  return (coefficients[0] ?? 0) + x * one - two;
}
