import type { ElementDefinition, UnknownFields } from './element-definition';
import type { CoupledInductors } from './element-list';
import type { Law, Term } from './law';
import { constant, timesS } from './law';

/** A coupling of exactly 1 is legal; beyond it by more than rounding is not. */
const ROUNDING = 64 * Number.EPSILON;

const MOST_COILS = 32;

/** v_i = s·Σ_j M_ij·i_j, with M_ii = L_i and M_ij = k_ij·√(L_i·L_j). At 0 Hz every coil is an ideal connection. */
export const coupledInductors: ElementDefinition<CoupledInductors> = {
  name: 'coupled inductors',
  nodeCount: ({ inductances }) => 2 * (Array.isArray(inductances) ? inductances.length : 2),
  faultOf,
  ports: ({ nodes }) =>
    Array.from({ length: nodes.length / 2 }, (_, coil) => [nodes[2 * coil] ?? '', nodes[2 * coil + 1] ?? ''] as const),
  laws: ({ inductances, coupling }) =>
    inductances.map((_, coil): Law => {
      const own: Term = { port: coil, of: 'voltage', coefficient: constant(1) };
      const terms = inductances.map(
        (_other, other): Term => ({
          port: other,
          of: 'current',
          coefficient: timesS(-mutualInductance(inductances, coupling, coil, other)),
        }),
      );
      return { law: 'equation', terms: [own, ...terms.filter(({ coefficient }) => !isZero(coefficient))] };
    }),
};

function isZero(coefficient: Term['coefficient']): boolean {
  return 'slope' in coefficient && coefficient.slope === 0 && coefficient.constant === 0;
}

/** M_ij in henries; L_i for i = j. */
export function mutualInductance(
  inductances: readonly number[],
  coupling: CoupledInductors['coupling'],
  one: number,
  other: number,
): number {
  const product = Math.sqrt(inductances[one] ?? 0) * Math.sqrt(inductances[other] ?? 0);
  return one === other ? (inductances[one] ?? 0) : couplingOf(inductances.length, coupling, one, other) * product;
}

function couplingOf(coils: number, coupling: CoupledInductors['coupling'], one: number, other: number): number {
  if (typeof coupling === 'number') return coupling;
  const low = Math.min(one, other);
  const high = Math.max(one, other);
  return coupling[low * coils - (low * (low + 1)) / 2 + (high - low - 1)] ?? 0;
}

function faultOf({ inductances, coupling }: UnknownFields): string | undefined {
  if (!isNumbers(inductances) || inductances.length < 2 || inductances.length > MOST_COILS) {
    return `needs 2 to ${MOST_COILS} inductances, finite numbers of henries`;
  }
  if (inductances.some((inductance) => !(inductance > 0))) return 'needs inductances above zero';
  const coils = inductances.length;
  const pairs = (coils * (coils - 1)) / 2;
  const given = typeof coupling === 'number' ? [coupling] : coupling;
  if (!isNumbers(given) || given.length !== pairs) {
    return pairs === 1 ? 'needs a finite number as its coupling' : `needs ${pairs} couplings, one for each pair of coils`;
  }
  const beyond = given.find((k) => Math.abs(k) > 1);
  if (beyond !== undefined) {
    return `has a coupling of ${beyond}, and no coils couple more than completely; give it one between −1 and 1`;
  }
  if (isPositiveSemidefinite(coils, (one, other) => couplingOf(coils, coupling as CoupledInductors['coupling'], one, other))) {
    return undefined;
  }
  return 'has couplings that contradict each other: some currents would store less than no energy; make them smaller';
}

function isNumbers(value: unknown): value is readonly number[] {
  return Array.isArray(value) && value.every((one) => typeof one === 'number' && Number.isFinite(one));
}

/** By Cholesky's factors of the matrix of couplings, whose diagonal is 1; a pivot of zero must have a row of zeros. */
function isPositiveSemidefinite(size: number, couplingAt: (one: number, other: number) => number): boolean {
  const rest = Array.from({ length: size }, (_, one) =>
    Array.from({ length: size }, (_unused, other) => (one === other ? 1 : couplingAt(one, other))),
  );
  const at = (one: number, other: number): number => rest[one]?.[other] ?? 0;
  const left = new Set(Array.from({ length: size }, (_, index) => index));
  while (left.size > 0) {
    const pivot = [...left].reduce((best, one) => (at(one, one) > at(best, best) ? one : best));
    const size2 = at(pivot, pivot);
    if (size2 < -ROUNDING * size) return false;
    left.delete(pivot);
    if (size2 <= ROUNDING * size) {
      // The largest diagonal entry that is left is nothing: so must be all the rest.
      return [...left].every((one) => Math.abs(at(one, pivot)) <= Math.sqrt(ROUNDING * size) && at(one, one) >= -ROUNDING * size);
    }
    for (const one of left) {
      for (const other of left) {
        const row = rest[one];
        if (row) row[other] = at(one, other) - (at(one, pivot) * at(pivot, other)) / size2;
      }
    }
  }
  return true;
}
