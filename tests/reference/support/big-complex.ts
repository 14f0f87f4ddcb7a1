import { all, create } from 'mathjs';
import type { BigNumber } from 'mathjs';

/** Complex numbers of 64 decimal digits, by mathjs. */
const math = create(all ?? {}, { number: 'BigNumber', precision: 64 });

export interface Big {
  readonly re: BigNumber;
  readonly im: BigNumber;
}

export const PI = math.pi as unknown as BigNumber;

const REAL_ZERO = math.bignumber(0);

/** The exact value of a double; its shortest decimal text would be off by up to half a unit in the last place. */
export function exact(value: number): BigNumber {
  let exponent = 0;
  let mantissa = value;
  while (!Number.isInteger(mantissa)) {
    mantissa *= 2;
    exponent += 1;
  }
  return math.bignumber(mantissa.toFixed(0)).div(math.bignumber(2).pow(exponent));
}

export function big(re: BigNumber, im: BigNumber): Big {
  return { re, im };
}
export function real(re: BigNumber): Big {
  return { re, im: REAL_ZERO };
}
export function imaginary(im: BigNumber): Big {
  return { re: REAL_ZERO, im };
}
export const ZERO = real(REAL_ZERO);
export const ONE = real(math.bignumber(1));

export function add(a: Big, b: Big): Big {
  return big(a.re.plus(b.re), a.im.plus(b.im));
}
export function sub(a: Big, b: Big): Big {
  return big(a.re.minus(b.re), a.im.minus(b.im));
}
export function negative(a: Big): Big {
  return big(a.re.neg(), a.im.neg());
}
export function mul(a: Big, b: Big): Big {
  return big(a.re.times(b.re).minus(a.im.times(b.im)), a.re.times(b.im).plus(a.im.times(b.re)));
}
export function div(a: Big, b: Big): Big {
  const square = b.re.times(b.re).plus(b.im.times(b.im));
  const product = mul(a, big(b.re, b.im.neg()));
  return big(product.re.div(square), product.im.div(square));
}
/** A phasor of a size at an angle in radians. */
export function turned(size: BigNumber, angle: BigNumber): Big {
  return big(size.times(angle.cos()), size.times(angle.sin()));
}
export function sizeOf(a: Big): BigNumber {
  return a.re.times(a.re).plus(a.im.times(a.im)).sqrt();
}
/** The size as a double, good enough for a condition. */
export function roughSize(a: Big): number {
  return Math.hypot(a.re.toNumber(), a.im.toNumber());
}
export function isZero(a: Big): boolean {
  return a.re.isZero() && a.im.isZero();
}

/** The inverse, by Gauss and Jordan with the largest pivot of each column; throws where there is none. */
export function invert(matrix: readonly (readonly Big[])[]): Big[][] {
  const order = matrix.length;
  const rows = matrix.map((line, i) => [...line, ...line.map((_, k) => (k === i ? ONE : ZERO))]);
  for (let k = 0; k < order; k++) {
    let best = k;
    for (let i = k + 1; i < order; i++) {
      if (sizeOf(rows[i]?.[k] ?? ZERO).gt(sizeOf(rows[best]?.[k] ?? ZERO))) best = i;
    }
    const kept = rows[k] ?? [];
    const pivotRow = rows[best] ?? [];
    rows[best] = kept;
    const pivot = pivotRow[k] ?? ZERO;
    if (isZero(pivot)) throw new Error('singular');
    const scaled = pivotRow.map((entry) => (isZero(entry) ? entry : div(entry, pivot)));
    rows[k] = scaled;
    for (let i = 0; i < order; i++) {
      const head = rows[i]?.[k] ?? ZERO;
      if (i === k || isZero(head)) continue;
      rows[i] = (rows[i] ?? []).map((entry, column) => {
        const above = scaled[column] ?? ZERO;
        return isZero(above) ? entry : sub(entry, mul(head, above));
      });
    }
  }
  return rows.map((line) => line.slice(order));
}
