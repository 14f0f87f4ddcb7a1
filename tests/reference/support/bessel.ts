/**
 * Bessel ladders in exact arithmetic: the reverse Bessel polynomial θ_n(s) = Σ (2n − k)!/(2^(n−k)·k!·(n − k)!)·s^k
 * (Krall and Frink 1949, doi 10.1090/S0002-9947-1949-0028473-1; Thomson 1949), whose even over odd part, as a continued
 * fraction, is the ladder between an ideal source and 1 Ω.
 */
function factorial(n: number): bigint {
  let product = 1n;
  for (let k = 2n; k <= BigInt(n); k++) product *= k;
  return product;
}

/** Coefficients of s⁰, s¹ …; whole numbers. */
function reverseBessel(n: number): bigint[] {
  return Array.from({ length: n + 1 }, (_, k) => factorial(2 * n - k) / (2n ** BigInt(n - k) * factorial(k) * factorial(n - k)));
}

function greatestDivisor(a: bigint, b: bigint): bigint {
  let [x, y] = [a < 0n ? -a : a, b < 0n ? -b : b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** a/b, rounded once. */
function quotient(a: bigint, b: bigint): number {
  return Number((a << 120n) / b) / 2 ** 120;
}

/** The elements, that next to the source first, which is a series inductor; the last is next to the load. */
export function besselLadder(n: number): number[] {
  const theta = reverseBessel(n);
  const part = (parity: number): bigint[] => theta.map((a, k) => (k % 2 === parity ? a : 0n));
  let [above, below] = [part(n % 2), part(1 - (n % 2))];
  const elements: number[] = [];
  for (let degree = n; degree >= 1; degree--) {
    const a = above[degree] ?? 0n;
    const b = below[degree - 1] ?? 0n;
    elements.push(quotient(a, b));
    // above/below = (a/b)·s + rest/(b·below), and the next is below over what is left.
    const rest = above.map((coefficient, k) => b * coefficient - (k === 0 ? 0n : a * (below[k - 1] ?? 0n)));
    const next = below.map((coefficient) => b * coefficient);
    const common = [...rest, ...next].reduce(greatestDivisor, 0n);
    above = next.map((coefficient) => coefficient / common);
    below = rest.map((coefficient) => coefficient / common);
  }
  return elements.reverse();
}

const BITS = 200n;

/** A whole number of 2^−200, from a double, exactly. */
function fixed(value: number): bigint {
  const high = BigInt(Math.trunc(value * 2 ** 52));
  return high << (BITS - 52n);
}

function toNumber(value: bigint): number {
  return Number(value >> (BITS - 120n)) / 2 ** 120;
}

/** The root of θ_n next to a point, by six steps of Newton's method. */
export function besselRoot(n: number, re: number, im: number): [number, number] {
  const theta = reverseBessel(n);
  let [x, y] = [fixed(re), fixed(im)];
  for (let step = 0; step < 6; step++) {
    let [p, q] = [0n, 0n];
    let [dp, dq] = [0n, 0n];
    for (let k = n; k >= 0; k--) {
      [dp, dq] = [((dp * x - dq * y) >> BITS) + p, ((dp * y + dq * x) >> BITS) + q];
      [p, q] = [((p * x - q * y) >> BITS) + ((theta[k] ?? 0n) << BITS), (p * y + q * x) >> BITS];
    }
    const square = (dp * dp + dq * dq) >> BITS;
    x -= (p * dp + q * dq) / square;
    y -= (q * dp - p * dq) / square;
  }
  return [toNumber(x), toNumber(y)];
}
