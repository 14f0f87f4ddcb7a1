import type { Network } from './network';
import type { Readings } from './readings';

/** Improvements feed on each other along a chain of nodes; after so many rounds what is left is not worth more. */
const MOST_ROUNDS = 8;

/** A voltage is replaced only where an element gives it with this many times less error. */
const WORTHWHILE = 4;

/**
 * Gives node voltages back the digits that a weak pivot took. A node whose admittances all but cancel gets its voltage
 * as a difference of large products, while the voltage of an element there, that comes from its current, may be good to
 * the last digit; then the node's voltage is that of the element's other node and the element's own.
 *
 * @param rows elements whose voltages, with bounds on their errors, stand in the readings
 * @param fixed nodes that keep their voltage
 *
 * The bounds on the nodes' errors stand in the readings before and after; only they decide.
 */
export function polishVoltages(
  { first, second }: Network,
  rows: readonly number[],
  fixed: ReadonlySet<number>,
  readings: Readings,
): void {
  const { vRe, vIm, vError, dRe, dIm, dError } = readings;
  const improve = (to: number, from: number, row: number, sign: 1 | -1): boolean => {
    if (fixed.has(to)) return false;
    const re = (vRe[from] ?? 0) + sign * (dRe[row] ?? 0);
    const im = (vIm[from] ?? 0) + sign * (dIm[row] ?? 0);
    const error = (vError[from] ?? 0) + (dError[row] ?? 0) + Number.EPSILON * (Math.abs(re) + Math.abs(im));
    if (WORTHWHILE * error >= (vError[to] ?? 0)) return false;
    vRe[to] = re;
    vIm[to] = im;
    vError[to] = error;
    return true;
  };
  for (let round = 0; round < MOST_ROUNDS; round++) {
    let changed = false;
    for (const row of rows) {
      const a = first[row] ?? 0;
      const b = second[row] ?? 0;
      if (a === b) continue;
      if (improve(a, b, row, 1)) changed = true;
      if (improve(b, a, row, -1)) changed = true;
    }
    if (!changed) return;
  }
}
