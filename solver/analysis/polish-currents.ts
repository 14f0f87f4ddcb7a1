import type { BranchTable } from '../elements/branch-table';
import type { Network } from './network';
import type { Readings } from './readings';

/** Improvements feed on each other along a chain of nodes; after so many rounds what is left is not worth more. */
const MOST_ROUNDS = 8;

/** A current is replaced only where the current law gives it with this many times less error. */
const WORTHWHILE = 4;

/**
 * Gives currents back the digits that cancellation took. A small voltage across a strong element between two nodes of
 * large voltage may have lost digits, and its current with it; if the other currents at one of its nodes are better
 * known, Kirchhoff's current law gives it from them.
 *
 * @param around the rows at each node whose current law may be used. Nodes with a given voltage are not among them
 *   where the current there is itself found by the law.
 * @param errorOf a bound on the error of each admittance's current; only the bounds decide, so a current is never
 *   replaced by a worse one. The bounds that are left are noted in the readings.
 */
export function polishCurrents(
  network: Network,
  around: ReadonlyMap<number, readonly number[]>,
  branches: BranchTable,
  readings: Readings,
  errorOf: ReadonlyMap<number, number>,
): void {
  const errors = new Map(errorOf);
  for (let round = 0; round < MOST_ROUNDS; round++) {
    let changed = false;
    for (const [node, rows] of around) {
      if (improveAt(network, node, rows, branches, readings, errors)) changed = true;
    }
    if (!changed) break;
  }
  for (const [row, error] of errors) readings.iError[row] = error;
}

/** The rows at each of the nodes; both ends on one node do not count. */
export function rowsAround(
  { first, second }: Network,
  nodes: Iterable<number>,
  rows: Iterable<number>,
): ReadonlyMap<number, readonly number[]> {
  const around = new Map<number, number[]>();
  for (const node of nodes) around.set(node, []);
  for (const row of rows) {
    const a = first[row] ?? 0;
    const b = second[row] ?? 0;
    if (a === b) continue;
    around.get(a)?.push(row);
    around.get(b)?.push(row);
  }
  return around;
}

/** Replaces the least well known current at a node by what the others leave it, if that is better. */
function improveAt(
  { first }: Network,
  node: number,
  rows: readonly number[],
  branches: BranchTable,
  readings: Readings,
  errors: Map<number, number>,
): boolean {
  let worst = -1;
  let worstError = 0;
  let total = 0;
  for (const row of rows) {
    const error = errors.get(row) ?? 0;
    total += error;
    if (error > worstError) {
      worst = row;
      worstError = error;
    }
  }
  if (worst < 0 || worstError <= WORTHWHILE * (total - worstError)) return false;
  let re = 0;
  let im = 0;
  let error = 0;
  for (const row of rows) {
    if (row === worst) continue;
    const isGiven = !errors.has(row);
    const sign = first[row] === node ? 1 : -1;
    const iRe = (isGiven ? branches.sRe[row] : readings.iRe[row]) ?? 0;
    const iIm = (isGiven ? branches.sIm[row] : readings.iIm[row]) ?? 0;
    re += sign * iRe;
    im += sign * iIm;
    error += (errors.get(row) ?? 0) + Number.EPSILON * (Math.abs(iRe) + Math.abs(iIm));
  }
  if (WORTHWHILE * error >= worstError) return false;
  const sign = first[worst] === node ? -1 : 1;
  const zRe = branches.zRe[worst] ?? 0;
  const zIm = branches.zIm[worst] ?? 0;
  readings.iRe[worst] = sign * re;
  readings.iIm[worst] = sign * im;
  readings.dRe[worst] = sign * (zRe * re - zIm * im);
  readings.dIm[worst] = sign * (zRe * im + zIm * re);
  errors.set(worst, error);
  return true;
}
