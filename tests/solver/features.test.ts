import { describe, expect, it } from 'vitest';
import { findMinimum, findRoot } from '@/solver/features/brent';
import { levelCrossings, phaseCrossings } from '@/solver/features/crossings';
import { extremesOf, rangeOver } from '@/solver/features/extremes';
import { loopMargins } from '@/solver/features/loop-margins';
import { notchesOf, passBand, rejectionOver, rippleOver } from '@/solver/features/pass-band';
import { realCrossings, realExtremes } from '@/solver/features/real-curve';
import type { ResponseFunction } from '@/solver/features/response';
import { decibels, HALF_POWER_DECIBELS } from '@/solver/features/response';
import type { Scan, ScanOptions } from '@/solver/features/scan';
import { scanResponse } from '@/solver/features/scan';
import { findStationaryPoint } from '@/solver/features/stationary-point';
import { Random } from './support/random';
import { refused } from './support/roots';

/** Responses with closed forms; the frequency stands for ω where nothing else is said. */
interface Complex {
  readonly re: number;
  readonly im: number;
}

function over(a: Complex, b: Complex): Complex {
  const square = b.re ** 2 + b.im ** 2;
  return { re: (a.re * b.re + a.im * b.im) / square, im: (a.im * b.re - a.re * b.im) / square };
}

function times(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

const ONE: Complex = { re: 1, im: 0 };

function response(evaluate: (f: number) => Complex | undefined): ResponseFunction {
  return { evaluate };
}

function scanned(of: ResponseFunction, options: ScanOptions): Scan {
  const scan = scanResponse(of, options);
  if (!scan.ok) throw new Error(scan.message);
  return scan;
}

/** 1/(1 + jQ(f/f0 − f0/f)). */
function resonance(f0: number, q: number): ResponseFunction {
  return response((f) => over(ONE, { re: 1, im: (q * (f - f0) * (f + f0)) / (f * f0) }));
}

/** Half-power frequencies of the same: f0·(√(1 + 1/4Q²) ± 1/2Q). */
function halfPower(f0: number, q: number, sign: 1 | -1): number {
  return f0 * (Math.sqrt(1 + 1 / (4 * q * q)) + sign / (2 * q));
}

function relative(value: number | undefined, expected: number): number {
  return Math.abs((value ?? Infinity) / expected - 1);
}

describe('a resonance', () => {
  it.each([0.6, 3, 100, 1e4, 1e6])('of quality %d is found with its half-power points, wherever it lies between the points of the grid', (q) => {
    const random = new Random(5);
    for (let round = 0; round < 10; round++) {
      const f0 = 1000 * 10 ** random.between(-1, 1);
      const scan = scanned(resonance(f0, q), { low: 10, high: 1e5, hints: [{ frequency: f0, width: f0 / q }] });
      const extremes = extremesOf(scan);
      expect(extremes.map(({ kind }) => kind)).toEqual(['maximum']);
      expect(relative(extremes[0]?.frequency, f0)).toBeLessThanOrEqual(1e-11);
      expect(relative(extremes[0]?.magnitude, 1)).toBeLessThanOrEqual(4 * Number.EPSILON);
      const band = passBand(scan);
      expect(relative(band?.lower, halfPower(f0, q, -1))).toBeLessThanOrEqual(1e-13);
      expect(relative(band?.upper, halfPower(f0, q, 1))).toBeLessThanOrEqual(1e-13);
      expect(relative(band?.centre, f0)).toBeLessThanOrEqual(1e-13);
      expect(relative(band?.q, q)).toBeLessThanOrEqual(1e-15 * q + 1e-13);
      expect(relative(phaseCrossings(scan, 0)[0]?.frequency, f0)).toBeLessThanOrEqual(1e-13);
      expect(relative(phaseCrossings(scan, -45)[0]?.frequency, halfPower(f0, q, 1))).toBeLessThanOrEqual(1e-13);
    }
  });

  it('beside a zero half a width away is found with both its extremes', () => {
    const f0 = 1234.5;
    const w = f0 / 2e4;
    const weak = response((f) => over({ re: w, im: f - f0 - w / 2 }, { re: w, im: f - f0 }));
    const extremes = extremesOf(scanned(weak, { low: 10, high: 1e5, hints: [{ frequency: f0, width: 2 * w }] }));
    // |H|² = (w² + (x − w/2)²)/(w² + x²), stationary at x = w/4 ± √(w²/16 + w²).
    expect(extremes.map(({ kind }) => kind)).toEqual(['maximum', 'minimum']);
    const root = Math.sqrt(17) / 4;
    expect(relative(extremes[0]?.frequency, f0 + w * (0.25 - root))).toBeLessThanOrEqual(1e-13);
    expect(relative(extremes[1]?.frequency, f0 + w * (0.25 + root))).toBeLessThanOrEqual(1e-13);
  });

  it('that the grid alone steps over is found where a hint says', () => {
    const f0 = 1234.5;
    const w = f0 / 2e5;
    const bump = response((f) => ({ re: 1 + (1 + ((f - f0) / w) ** 2) ** -4, im: 0 }));
    const band = { low: 10, high: 1e5 };
    expect(extremesOf(scanned(bump, band))).toEqual([]);
    const extremes = extremesOf(scanned(bump, { ...band, hints: [{ frequency: f0 + w / 3, width: 2 * w }] }));
    expect(extremes.map(({ kind }) => kind)).toEqual(['maximum']);
    expect(relative(extremes[0]?.frequency, f0)).toBeLessThanOrEqual(1e-13);
  });

  it('is bounded by both its crossings though they lie between two points of a coarse grid', () => {
    const scan = scanned(resonance(1000, 20), { low: 100, high: 1e4, perDecade: 3 });
    expect(levelCrossings(scan, HALF_POWER_DECIBELS, { to: 'maximum' }).map(({ direction }) => direction)).toEqual(['rising', 'falling']);
    expect(relative(passBand(scan)?.upper, halfPower(1000, 20, 1))).toBeLessThanOrEqual(1e-13);
  });

  it('without losses has no largest value, and its flanks are found', () => {
    // 1/(1 − f²), without a value at 1.
    const lossless = response((f) => (f === 1 ? undefined : { re: 1 / ((1 - f) * (1 + f)), im: 0 }));
    const scan = scanned(lossless, { low: 0.01, high: 100, hints: [{ frequency: 1, width: 1e-9 }] });
    expect(extremesOf(scan)).toEqual([]);
    const level = levelCrossings(scan, 20 * Math.log10(4));
    expect(level.map(({ direction }) => direction)).toEqual(['rising', 'falling']);
    expect(relative(level[0]?.frequency, Math.sqrt(0.75))).toBeLessThanOrEqual(1e-14);
    expect(relative(level[1]?.frequency, Math.sqrt(1.25))).toBeLessThanOrEqual(1e-14);
  });
});

describe('a notch', () => {
  /** An open twin-T: (1 − u²)/(1 − u² + 4ju); null at 1, −3 dB at √5 ∓ 2. */
  const twinT = response((u) => over({ re: (1 - u) * (1 + u), im: 0 }, { re: (1 - u) * (1 + u), im: 4 * u }));
  it('of a twin-T is at its frequency, complete, a quarter in quality', () => {
    const scan = scanned(twinT, { low: 0.0123, high: 100 });
    const [notch, ...more] = notchesOf(scan, { reference: { to: 'frequency', frequency: 0 } });
    expect(more).toEqual([]);
    expect(relative(notch?.frequency, 1)).toBeLessThanOrEqual(1e-12);
    expect(notch?.depth ?? Infinity).toBeGreaterThan(220);
    expect(relative(notch?.lower, Math.sqrt(5) - 2)).toBeLessThanOrEqual(1e-14);
    expect(relative(notch?.upper, Math.sqrt(5) + 2)).toBeLessThanOrEqual(1e-14);
    expect(relative(notch?.q, 0.25)).toBeLessThanOrEqual(1e-14);
  });
  it('that is not complete has its depth', () => {
    const q = 5000;
    const shallow = response((u) => {
      const x = (q * (u - 1) * (u + 1)) / u;
      return over({ re: 0.001, im: x }, { re: 1, im: x });
    });
    const [notch] = notchesOf(scanned(shallow, { low: 0.01, high: 100, hints: [{ frequency: 1, width: 1 / q }] }));
    expect(relative(notch?.depth, 60)).toBeLessThanOrEqual(1e-10);
    expect(relative(notch?.frequency, 1)).toBeLessThanOrEqual(1e-12);
    // Back at half the power: x² = 1 − 2·10⁻⁶, which is the width of quality q but for that.
    expect(relative(notch?.q, q / Math.sqrt(1 - 2e-6))).toBeLessThanOrEqual(1e-9);
  });
});

/** Chebyshev by its poles: |H|² = 1/(1 + ε²T_n²). */
function chebyshev(n: number, ripple: number): ResponseFunction {
  const epsilon = Math.sqrt(10 ** (ripple / 10) - 1);
  const a = Math.asinh(1 / epsilon) / n;
  return response((w) => {
    let h: Complex = { re: 1 / (epsilon * 2 ** (n - 1)), im: 0 };
    for (let k = 0; k < n; k++) {
      const angle = ((2 * k + 1) * Math.PI) / (2 * n);
      h = over(h, { re: Math.sinh(a) * Math.sin(angle), im: w - Math.cosh(a) * Math.cos(angle) });
    }
    return h;
  });
}

describe('a low-pass', () => {
  it.each([
    [3, 0.5],
    [6, 0.1],
    [7, 1],
    [10, 3],
  ] as const)('of order %d and %d dB of ripple has its extremes, its ripple and its rejection', (n, ripple) => {
    const scan = scanned(chebyshev(n, ripple), { low: 0.01, high: 100 });
    const expected = Array.from({ length: n - 1 }, (_, k) => Math.cos(((k + 1) * Math.PI) / (2 * n))).filter((w) => w > 0.01).reverse();
    const extremes = extremesOf(scan);
    const inside = Array.from({ length: n - 1 }, (_, k) => Math.cos(((k + 1) * Math.PI) / (2 * n)));
    expect(extremes.length).toBe(inside.length);
    extremes.forEach(({ frequency }, k) => expect(relative(frequency, expected[k] ?? 0)).toBeLessThanOrEqual(1e-11));
    const over0 = rippleOver(scan, { low: 0.01, high: 1 });
    expect(over0.ok && relative(over0.decibels, ripple)).toBeLessThanOrEqual(1e-12);
    const rejection = rejectionOver(scan, { low: 2, high: 100 });
    const epsilonSquared = 10 ** (ripple / 10) - 1;
    const attenuation = 10 * Math.log10(1 + epsilonSquared * Math.cosh(n * Math.acosh(2)) ** 2);
    expect(rejection.ok && relative(rejection.decibels, attenuation)).toBeLessThanOrEqual(1e-12);
    expect(rejection.ok && rejection.worst.frequency).toBe(2);
    // The last time at the ripple's level is the edge.
    const edge = levelCrossings(scan, -ripple, { to: 'maximum' }).at(-1);
    expect(relative(edge?.frequency, 1)).toBeLessThanOrEqual(1e-12);
    // Half the power: cosh(acosh(1/ε)/n), for a ripple below 3.01 dB.
    if (ripple < 3) expect(relative(passBand(scan)?.upper, Math.cosh(Math.acosh(1 / Math.sqrt(epsilonSquared)) / n))).toBeLessThanOrEqual(1e-12);
  });

  it('that is maximally flat has no extremes, and one cut-off', () => {
    const n = 8;
    const flat = response((w) => {
      let h = ONE;
      for (let k = 0; k < n; k++) {
        const angle = ((2 * k + 1) * Math.PI) / (2 * n);
        h = over(h, { re: Math.sin(angle), im: w - Math.cos(angle) });
      }
      return h;
    });
    const scan = scanned(flat, { low: 1e-3, high: 1e3 });
    expect(extremesOf(scan)).toEqual([]);
    const band = passBand(scan);
    expect([band?.lower, band?.bandwidth, band?.q]).toEqual([undefined, undefined, undefined]);
    expect(relative(band?.upper, 1)).toBeLessThanOrEqual(1e-14);
    const [sixty] = levelCrossings(scan, -60, { to: 'frequency', frequency: 0 });
    expect(relative(sixty?.frequency, (1e6 - 1) ** (1 / (2 * n)))).toBeLessThanOrEqual(1e-14);
    expect(rangeOver(scan).smallest.frequency).toBe(1e3);
  });
});

describe('an all-pass', () => {
  it('has no extremes and no level, and passes each phase once', () => {
    // Three first-order sections: −6·arctan ω.
    const h = response((w) => {
      const one = over({ re: 1, im: -w }, { re: 1, im: w });
      return times(one, times(one, one));
    });
    const scan = scanned(h, { low: 1e-4, high: 1e4 });
    expect(extremesOf(scan)).toEqual([]);
    expect(levelCrossings(scan, -1e-6)).toEqual([]);
    for (const [degrees, turn] of [
      [-90, 90],
      [90, 270],
      [-180, 180],
      [-10, 370],
      [-60, 60],
    ] as const) {
      const angles = [turn, turn + 360, turn - 360].filter((angle) => angle > 0.1 && angle < 539);
      const found = phaseCrossings(scan, degrees);
      expect(found.map(({ direction }) => direction)).toEqual(angles.map(() => 'falling'));
      const expected = angles.map((angle) => Math.tan((angle * Math.PI) / 1080)).sort((a, b) => a - b);
      found.forEach(({ frequency }, k) => expect(relative(frequency, expected[k] ?? 0)).toBeLessThanOrEqual(1e-13));
    }
  });

  it('that jumps at a zero on the axis passes no phase there', () => {
    const jump = response((w) => ({ re: 0, im: 1 - w }));
    expect(phaseCrossings(scanned(jump, { low: 0.1, high: 10 }), 0)).toEqual([]);
  });
});

describe('the margins of a loop', () => {
  const loop = (gain: number): ResponseFunction =>
    response((w) => over({ re: gain, im: 0 }, times({ re: 0, im: w }, times({ re: 1, im: w }, { re: 2, im: w }))));
  it('K/(s(s + 1)(s + 2)) with K = √10: arctan ⅓ at 1 rad/s, and 20 lg(6/√10) at √2', () => {
    const margins = loopMargins(scanned(loop(Math.sqrt(10)), { low: 1e-2, high: 1e2 }));
    expect(margins.phase.length).toBe(1);
    expect(relative(margins.leastPhase?.frequency, 1)).toBeLessThanOrEqual(1e-14);
    expect(relative(margins.leastPhase?.degrees, (Math.atan(1 / 3) * 180) / Math.PI)).toBeLessThanOrEqual(1e-13);
    expect(margins.gain.length).toBe(1);
    expect(relative(margins.leastGain?.frequency, Math.SQRT2)).toBeLessThanOrEqual(1e-14);
    expect(relative(margins.leastGain?.decibels, 20 * Math.log10(6 / Math.sqrt(10)))).toBeLessThanOrEqual(1e-13);
  });
  it('are negative beyond the limit K = 6, and nothing at it', () => {
    const beyond = loopMargins(scanned(loop(12), { low: 1e-2, high: 1e2 }));
    expect(beyond.leastPhase?.degrees).toBeLessThan(0);
    expect(relative(beyond.leastGain?.decibels, -20 * Math.log10(2))).toBeLessThanOrEqual(1e-13);
    const limit = loopMargins(scanned(loop(6), { low: 1e-2, high: 1e2 }));
    expect(Math.abs(limit.leastPhase?.degrees ?? 1)).toBeLessThanOrEqual(1e-12);
    expect(Math.abs(limit.leastGain?.decibels ?? 1)).toBeLessThanOrEqual(1e-13);
  });
  it('are none where the loop crosses nothing', () => {
    const weak = loopMargins(scanned(response((w) => over({ re: 0.5, im: 0 }, { re: 1, im: w })), { low: 1e-2, high: 1e2 }));
    expect([weak.phase, weak.gain, weak.leastPhase, weak.leastGain]).toEqual([[], [], undefined, undefined]);
  });
});

describe('a real curve, such as a group delay', () => {
  it('has its peak and the frequencies at which it is half as large', () => {
    // The delay of one pair of poles, alone: w/(w² + (x − x0)²) per radian.
    const [x0, w] = [777, 0.05];
    const curve = { evaluate: (x: number): number => w / (w * w + (x - x0) ** 2), frequencies: [1, 100, 770, 776.9, 777.01, 777.2, 780, 1000, 1e5] };
    const extremes = realExtremes(curve);
    expect(extremes.map(({ kind }) => kind)).toEqual(['maximum']);
    expect(relative(extremes[0]?.frequency, x0)).toBeLessThanOrEqual(1e-13);
    expect(relative(extremes[0]?.value, 1 / w)).toBeLessThanOrEqual(4 * Number.EPSILON);
    const half = realCrossings(curve, 1 / (2 * w));
    expect(relative(half[0]?.frequency, x0 - w)).toBeLessThanOrEqual(1e-14);
    expect(relative(half[1]?.frequency, x0 + w)).toBeLessThanOrEqual(1e-14);
  });
  it('may be negative, and pass zero', () => {
    const curve = { evaluate: (x: number): number => Math.cos(x), frequencies: Array.from({ length: 50 }, (_, k) => 0.1 + k / 5) };
    expect(realExtremes(curve).map(({ kind, frequency, value }) => [kind, Math.round((frequency / Math.PI) * 1e12) / 1e12, value])).toEqual([
      ['minimum', 1, -1],
      ['maximum', 2, 1],
      ['minimum', 3, -1],
    ]);
    expect(realCrossings(curve, 0).map(({ frequency }) => Math.round((frequency / Math.PI) * 1e14) / 1e14)).toEqual([0.5, 1.5, 2.5]);
  });
});

describe('a scan', () => {
  it('evaluates many at once where it can, with the same outcome', () => {
    const single = resonance(1000, 50);
    let calls = 0;
    const many: ResponseFunction = {
      ...single,
      evaluateAll: (frequencies) => {
        calls++;
        const values = Array.from(frequencies, (f) => single.evaluate(f));
        return {
          re: Float64Array.from(values, (value) => value?.re ?? 0),
          im: Float64Array.from(values, (value) => value?.im ?? 0),
          determined: Uint8Array.from(values, (value) => (value === undefined ? 0 : 1)),
        };
      },
    };
    const scan = scanned(many, { low: 10, high: 1e5 });
    expect(calls).toBeGreaterThan(0);
    expect(calls).toBeLessThan(15);
    expect(scan.frequencies).toEqual(scanned(single, { low: 10, high: 1e5 }).frequencies);
  });

  it('refuses a band that is none, and features a band that was not looked at', () => {
    const of = resonance(1000, 1);
    for (const band of [{ low: 0, high: 1 }, { low: 2, high: 1 }, { low: 1, high: Infinity }, { low: Number.NaN, high: 1 }]) {
      expect(refused(scanResponse(of, band)).kind).toBe('invalid');
    }
    expect(refused(scanResponse(of, { low: 1, high: 10, perDecade: 0 })).kind).toBe('invalid');
    expect(refused(scanResponse(response(() => undefined), { low: 1, high: 10 })).kind).toBe('notFinite');
    const scan = scanned(of, { low: 10, high: 1e4 });
    expect(refused(rippleOver(scan, { low: 1, high: 100 })).message).toContain('from 10 to 10000 Hz');
    expect(refused(rejectionOver(scan, { low: 100, high: 1e5 })).kind).toBe('invalid');
  });

  it('never answers NaN or infinity for a response that is 0', () => {
    const scan = scanned(response(() => ({ re: 0, im: 0 })), { low: 1, high: 10 });
    expect([extremesOf(scan), levelCrossings(scan, -3, { to: 'maximum' }), notchesOf(scan), passBand(scan)]).toEqual([[], [], [], undefined]);
    const ripple = rippleOver(scan, { low: 1, high: 10 });
    expect(ripple.ok && [ripple.decibels, ripple.largest.decibels]).toEqual([undefined, undefined]);
    expect(decibels(0)).toBeUndefined();
  });
});

describe('the methods under it', () => {
  it('find roots of steep, flat and kinked functions', () => {
    const cases: readonly (readonly [(x: number) => number, number, number, number])[] = [
      [(x) => Math.cos(x) - x, 0, 1, 0.7390851332151607],
      [(x) => x ** 3 - 2, 0, 2, Math.cbrt(2)],
      [(x) => Math.expm1(50 * (x - 0.3)), 0, 1, 0.3],
      [(x) => (x - 0.7) ** 9, 0, 1.1, 0.7],
      [(x) => (x < 0.25 ? -1 : 1), 0, 1, 0.25],
      [(x) => Math.atan(1e8 * (x - 1e-3)), -5, 5, 1e-3],
    ];
    for (const [of, a, b, root] of cases) {
      let calls = 0;
      const counted = (x: number): number => {
        calls++;
        return of(x);
      };
      const found = findRoot(counted, a, b, of(a), of(b));
      // A root of ninth order is only as sharp as the ninth root of what is left of the function.
      expect(Math.abs(found - root)).toBeLessThanOrEqual(root === 0.7 ? 1e-15 ** (1 / 9) : 8 * Number.EPSILON);
      expect(calls).toBeLessThan(150);
    }
  });

  it('find minima to the square root of rounding, and stationary points to rounding', () => {
    const of = (x: number): number => Math.cosh(3 * (x - 1 / 3)) + 0.2 * (x - 1 / 3) ** 3;
    expect(Math.abs(findMinimum(of, 0, 1, 0.5, of(0.5)) - 1 / 3)).toBeLessThanOrEqual(1e-7);
    expect(Math.abs((findStationaryPoint(of, 0.34, 0.3) ?? 0) - 1 / 3)).toBeLessThanOrEqual(1e-14);
    expect(findStationaryPoint((x) => Math.exp(x), 0, 1)).toBeUndefined();
    expect(findStationaryPoint((x) => Math.abs(x - 0.1), 0, 1)).toBeUndefined();
  });
});
