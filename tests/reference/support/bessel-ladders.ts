import type { BigNumber } from 'mathjs';
import type { Big } from './big-complex';
import { add, big, div, exact, mul, ONE, real, sizeOf, sub, ZERO } from './big-complex';
import type { Ladder } from './ladders';

/**
 * Ladders of the maximally flat delay, 1 s at 0 Hz, by synthesis with 64 digits: the reverse Bessel polynomial θ_n
 * (Storch, Proc. IRE 42 (1954) 1666) gives the transfer θ_n(0)/θ_n(s); doubly terminated, the reflection coefficient
 * with |ρ|² = 1 − |t|² and its zeros in the left half-plane gives the input impedance (Darlington, J. Math. Phys. 18
 * (1939) 257) and that, divided out as a continued fraction (Cauer), the elements [memory, confirmed by calculation].
 * Real polynomials are arrays of coefficients, the constant first.
 */
type Polynomial = readonly BigNumber[];

const NOTHING = ZERO.re;

/** θ_n(s) = Σ (2n − k)!/(2^(n−k)·k!·(n − k)!)·s^k; monic. */
export function reverseBessel(n: number): Polynomial {
  let [before, here]: [Polynomial, Polynomial] = [[ONE.re], [ONE.re, ONE.re]];
  if (n === 0) return before;
  for (let k = 2; k <= n; k++) {
    const previous = before;
    const last = here;
    // θ_k = (2k − 1)·θ_{k−1} + s²·θ_{k−2}.
    const next = Array.from({ length: k + 1 }, (_, power) =>
      (last[power] ?? NOTHING).times(2 * k - 1).plus(previous[power - 2] ?? NOTHING),
    );
    before = last;
    here = next;
  }
  return here;
}

function valueAt(polynomial: readonly Big[], x: Big): Big {
  return polynomial.reduceRight((sum, coefficient) => add(mul(sum, x), coefficient), ZERO);
}

/** The roots of a monic polynomial, by Durand and Kerner. */
function rootsOf(polynomial: readonly Big[]): Big[] {
  const degree = polynomial.length - 1;
  const radius = 1 + Math.max(...polynomial.slice(0, -1).map((c) => sizeOf(c).toNumber() ** (1 / degree)));
  let roots = Array.from({ length: degree }, (_, k) => {
    const angle = (2 * Math.PI * (k + 0.3)) / degree;
    return big(exact(radius * Math.cos(angle)), exact(radius * Math.sin(angle)));
  });
  for (let step = 0; step < 500; step++) {
    let largest = NOTHING;
    roots = roots.map((own, k) => {
      const others = roots.reduce((product, other, j) => (j === k ? product : mul(product, sub(own, other))), ONE);
      const correction = div(valueAt(polynomial, own), others);
      const relative = sizeOf(correction).div(sizeOf(own));
      if (relative.gt(largest)) largest = relative;
      return sub(own, correction);
    });
    if (largest.toNumber() < 1e-50) return roots;
  }
  throw new Error('the roots were not found');
}

/** The root of a complex number in the left half-plane. */
function leftRoot(x: Big): Big {
  const size = sizeOf(x);
  const re = size.plus(x.re).div(2).sqrt().neg();
  return big(re, re.isZero() ? size.sqrt() : x.im.div(re.times(2)));
}

function product(roots: readonly Big[]): Polynomial {
  let polynomial: Big[] = [ONE];
  for (const own of roots) {
    polynomial = Array.from({ length: polynomial.length + 1 }, (_, power) =>
      sub(polynomial[power - 1] ?? ZERO, mul(own, polynomial[power] ?? ZERO)),
    );
  }
  return polynomial.map(({ re }) => re);
}

/** The quotients of two polynomials whose degrees differ by one, divided out to the end: g_1·s, g_2·s …, and the rest. */
function continuedFraction(above: Polynomial, below: Polynomial): { readonly g: number[]; readonly load: number } {
  let [over, under] = [above, below];
  const g: number[] = [];
  while (under.length > 1 || over.length > 1) {
    const top = over.length - 1;
    const [dividend, divisor] = [over, under];
    const quotient = (dividend[top] ?? NOTHING).div(divisor[top - 1] ?? ONE.re);
    g.push(quotient.toNumber());
    const rest = dividend.slice(0, top).map((c, power) => c.minus(quotient.times(divisor[power - 1] ?? NOTHING)));
    // The next coefficient vanishes too, but for the rounding of the roots: θ and ρ have but one real ladder.
    over = divisor;
    under = rest.slice(0, Math.max(top - 1, 1));
  }
  return { g, load: (over[0] ?? NOTHING).div(under[0] ?? ONE.re).toNumber() };
}

/** Doubly terminated with 1 Ω. */
export function bessel(n: number): Ladder {
  const theta = reverseBessel(n);
  const constant = theta[0] ?? ONE.re;
  // θ(s)·θ(−s) − θ(0)² as a polynomial in x = s², without its root at 0, and made monic.
  const squares = Array.from({ length: n + 1 }, (_, power) => {
    let sum = NOTHING;
    for (let k = 0; k <= 2 * power; k++) {
      const term = (theta[k] ?? NOTHING).times(theta[2 * power - k] ?? NOTHING);
      sum = k % 2 === 0 ? sum.plus(term) : sum.minus(term);
    }
    return power === 0 ? sum.minus(constant.times(constant)) : sum;
  }).slice(1);
  const lead = squares[n - 1] ?? ONE.re;
  const roots = rootsOf(squares.map((c) => real(c.div(lead)))).map(leftRoot);
  const reflected = product([...roots, ZERO]);
  const sum = theta.map((c, power) => c.plus(reflected[power] ?? NOTHING));
  const rest = theta.map((c, power) => c.minus(reflected[power] ?? NOTHING)).slice(0, n);
  return continuedFraction(sum, rest);
}

/** On an ideal voltage source, loaded with 1 Ω: the odd and even parts of θ_n divided out from the load. */
export function besselOnVoltageSource(n: number): Ladder {
  const theta = reverseBessel(n);
  const part = (parity: number): Polynomial => theta.map((c, power) => (power % 2 === parity ? c : NOTHING));
  const above = part(n % 2);
  const below = part((n + 1) % 2).slice(0, n);
  return { g: continuedFraction(above, below).g.reverse(), load: 1 };
}

/** θ_n(0)/θ_n(jω), by 64 digits. */
export function besselTransfer(n: number, omega: number): { readonly re: number; readonly im: number } {
  const theta = reverseBessel(n).map(real);
  const value = div(theta[0] ?? ONE, valueAt(theta, big(NOTHING, exact(omega))));
  return { re: value.re.toNumber(), im: value.im.toNumber() };
}

/** The group delay of θ_n(0)/θ_n(jω), Re θ_n′(jω)/θ_n(jω), seconds; 1 at 0 Hz, by 64 digits. */
export function besselDelay(n: number, omega: number): number {
  const theta = reverseBessel(n);
  const derivative = theta.slice(1).map((c, power) => c.times(power + 1));
  const at = big(NOTHING, exact(omega));
  return div(valueAt(derivative.map(real), at), valueAt(theta.map(real), at)).re.toNumber();
}

/** The frequency, rad/s, of half power of a delay of 1 s; by halving. */
export function besselHalfPower(n: number): number {
  let [low, high] = [0.5, 8];
  while (high - low > Number.EPSILON * low) {
    const middle = (low + high) / 2;
    const { re, im } = besselTransfer(n, middle);
    if (re ** 2 + im ** 2 > 0.5) low = middle;
    else high = middle;
    if (middle === low && (low + high) / 2 === low) break;
  }
  return low;
}

/** Half power at 1 rad/s. */
export function atHalfPower({ g, load }: Ladder, n: number): Ladder {
  const omega = besselHalfPower(n);
  return { g: g.map((value) => value * omega), load };
}
