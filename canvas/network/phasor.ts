/** An rms phasor on the cosine, as plain numbers: real and imaginary part. */
export type Phasor = { readonly re: number; readonly im: number };

export function magnitude(phasor: Phasor): number {
  return Math.hypot(phasor.re, phasor.im);
}

/** Degrees in (−180, 180]; 0 for a zero phasor. */
export function angleDegrees(phasor: Phasor): number {
  if (phasor.re === 0 && phasor.im === 0) return 0;
  const degrees = (Math.atan2(phasor.im, phasor.re) * 180) / Math.PI;
  return degrees === -180 ? 180 : degrees;
}

export function scaled(phasor: Phasor, by: number): Phasor {
  return { re: phasor.re * by, im: phasor.im * by };
}

/** a / b. The caller sees to it that b is not zero. Smith's method keeps it from overflowing on the way. */
export function quotient(a: Phasor, b: Phasor): Phasor {
  if (Math.abs(b.re) >= Math.abs(b.im)) {
    const r = b.im / b.re;
    const d = b.re + b.im * r;
    return { re: (a.re + a.im * r) / d, im: (a.im - a.re * r) / d };
  }
  const r = b.re / b.im;
  const d = b.re * r + b.im;
  return { re: (a.re * r + a.im) / d, im: (a.im * r - a.re) / d };
}
