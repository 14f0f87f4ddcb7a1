/**
 * A complex plane rotation: (x, y) becomes (c·x + s·y, −s̄·x + c·y), with c real (Givens; Golub and Van Loan, *Matrix
 * Computations*, 4th ed. 2013, chapter 5). One object serves a whole reduction.
 */
export class PlaneRotation {
  private c = 1;
  private sRe = 0;
  private sIm = 0;

  /** Turns (f, g) onto its first axis. */
  aim(fRe: number, fIm: number, gRe: number, gIm: number): void {
    const g = Math.hypot(gRe, gIm);
    if (g === 0) {
      this.c = 1;
      this.sRe = 0;
      this.sIm = 0;
      return;
    }
    const f = Math.hypot(fRe, fIm);
    const whole = Math.hypot(f, g);
    this.c = f / whole;
    // f/|f|, and 1 for f = 0.
    const turnRe = f === 0 ? 1 : fRe / f;
    const turnIm = f === 0 ? 0 : fIm / f;
    this.sRe = (turnRe * gRe + turnIm * gIm) / whole;
    this.sIm = (turnIm * gRe - turnRe * gIm) / whole;
  }

  /** Turns the `count` pairs at x and y and every `stride` entries on. */
  turn(re: Float64Array, im: Float64Array, x: number, y: number, stride: number, count: number): void {
    const { c, sRe, sIm } = this;
    if (sRe === 0 && sIm === 0 && c === 1) return;
    for (let k = 0, i = x, j = y; k < count; k++, i += stride, j += stride) {
      const xRe = re[i] ?? 0;
      const xIm = im[i] ?? 0;
      const yRe = re[j] ?? 0;
      const yIm = im[j] ?? 0;
      re[i] = c * xRe + (sRe * yRe - sIm * yIm);
      im[i] = c * xIm + (sRe * yIm + sIm * yRe);
      re[j] = c * yRe - (sRe * xRe + sIm * xIm);
      im[j] = c * yIm - (sRe * xIm - sIm * xRe);
    }
  }
}
