/**
 * Complex triangular factors P·A = L·U with the largest entry of each column as pivot, for solving with A and with its
 * transpose. A pivot that is nothing beside the largest entry is made as small as that can tell: then the solution
 * is huge in the direction of a null vector, which is what inverse iteration wants (Golub and Van Loan 2013, section
 * 7.6.1). Row by row; work space is kept, so one object serves one size.
 */
export class ComplexLu {
  readonly re: Float64Array;
  readonly im: Float64Array;
  private readonly order: Int32Array;
  private readonly kept: Float64Array;

  constructor(readonly size: number) {
    this.re = new Float64Array(size * size);
    this.im = new Float64Array(size * size);
    this.order = new Int32Array(size);
    this.kept = new Float64Array(2 * size);
  }

  /** Factors what stands in `re` and `im`, in place. */
  factor(): void {
    const { size, re, im, order } = this;
    let most = 0;
    for (let k = 0; k < size * size; k++) most = Math.max(most, Math.abs(re[k] ?? 0), Math.abs(im[k] ?? 0));
    const least = most === 0 ? 1 : Number.EPSILON * most;
    for (let k = 0; k < size; k++) {
      let best = k;
      let bestSize = -1;
      for (let i = k; i < size; i++) {
        const entry = Math.abs(re[i * size + k] ?? 0) + Math.abs(im[i * size + k] ?? 0);
        if (entry > bestSize) {
          bestSize = entry;
          best = i;
        }
      }
      order[k] = best;
      if (best !== k) this.swapRows(k, best);
      const at = k * size + k;
      if (bestSize < least) {
        re[at] = least;
        im[at] = 0;
      }
      const pRe = re[at] ?? 1;
      const pIm = im[at] ?? 0;
      const square = pRe * pRe + pIm * pIm;
      for (let i = k + 1; i < size; i++) {
        const head = i * size + k;
        const hRe = re[head] ?? 0;
        const hIm = im[head] ?? 0;
        if (hRe === 0 && hIm === 0) continue;
        const lRe = (hRe * pRe + hIm * pIm) / square;
        const lIm = (hIm * pRe - hRe * pIm) / square;
        re[head] = lRe;
        im[head] = lIm;
        for (let from = at + 1, to = head + 1; from < (k + 1) * size; from++, to++) {
          const uRe = re[from] ?? 0;
          const uIm = im[from] ?? 0;
          re[to] = (re[to] ?? 0) - (lRe * uRe - lIm * uIm);
          im[to] = (im[to] ?? 0) - (lRe * uIm + lIm * uRe);
        }
      }
    }
  }

  /** Solves A·x = b in place. */
  solve(xRe: Float64Array, xIm: Float64Array): void {
    const { size, order } = this;
    for (let k = 0; k < size; k++) swapEntries(xRe, xIm, k, order[k] ?? k);
    for (let i = 1; i < size; i++) this.subtractRow(xRe, xIm, i, 0, i);
    for (let i = size - 1; i >= 0; i--) {
      this.subtractRow(xRe, xIm, i, i + 1, size);
      this.divide(xRe, xIm, i);
    }
  }

  /** Solves Aᵀ·x = b in place; the transpose, without conjugates. */
  solveTransposed(xRe: Float64Array, xIm: Float64Array): void {
    const { size, order } = this;
    for (let i = 0; i < size; i++) {
      this.subtractColumn(xRe, xIm, i, 0, i);
      this.divide(xRe, xIm, i);
    }
    for (let i = size - 2; i >= 0; i--) this.subtractColumn(xRe, xIm, i, i + 1, size);
    for (let k = size - 1; k >= 0; k--) swapEntries(xRe, xIm, k, order[k] ?? k);
  }

  private subtractRow(xRe: Float64Array, xIm: Float64Array, i: number, from: number, to: number): void {
    this.subtract(xRe, xIm, i, from, to, i * this.size + from, 1);
  }

  private subtractColumn(xRe: Float64Array, xIm: Float64Array, i: number, from: number, to: number): void {
    this.subtract(xRe, xIm, i, from, to, from * this.size + i, this.size);
  }

  private subtract(
    xRe: Float64Array,
    xIm: Float64Array,
    i: number,
    from: number,
    to: number,
    start: number,
    stride: number,
  ): void {
    const { re, im } = this;
    let sumRe = xRe[i] ?? 0;
    let sumIm = xIm[i] ?? 0;
    for (let j = from, at = start; j < to; j++, at += stride) {
      const aRe = re[at] ?? 0;
      const aIm = im[at] ?? 0;
      sumRe -= aRe * (xRe[j] ?? 0) - aIm * (xIm[j] ?? 0);
      sumIm -= aRe * (xIm[j] ?? 0) + aIm * (xRe[j] ?? 0);
    }
    xRe[i] = sumRe;
    xIm[i] = sumIm;
  }

  private divide(xRe: Float64Array, xIm: Float64Array, i: number): void {
    const at = i * this.size + i;
    const pRe = this.re[at] ?? 1;
    const pIm = this.im[at] ?? 0;
    const square = pRe * pRe + pIm * pIm;
    const re = xRe[i] ?? 0;
    const im = xIm[i] ?? 0;
    xRe[i] = (re * pRe + im * pIm) / square;
    xIm[i] = (im * pRe - re * pIm) / square;
  }

  private swapRows(one: number, other: number): void {
    const { size, re, im, kept } = this;
    for (const part of [re, im]) {
      kept.set(part.subarray(one * size, (one + 1) * size));
      part.copyWithin(one * size, other * size, (other + 1) * size);
      part.set(kept.subarray(0, size), other * size);
    }
  }
}

function swapEntries(xRe: Float64Array, xIm: Float64Array, one: number, other: number): void {
  if (one === other) return;
  const re = xRe[one] ?? 0;
  const im = xIm[one] ?? 0;
  xRe[one] = xRe[other] ?? 0;
  xIm[one] = xIm[other] ?? 0;
  xRe[other] = re;
  xIm[other] = im;
}
