/** One s at which det(G + s·C) is zero. */
export interface NaturalFrequency {
  /** rad/s. */
  readonly re: number;
  readonly im: number;
  /**
   * How far it moves, rad/s, when every element value is off by one unit of rounding: ε·Σ|p·∂s/∂p|. Errors are of this
   * size. Near a multiple one it is what a multiple one may move by.
   */
  readonly uncertainty: number;
  /** How many coincide within their uncertainties; each of them is in the list, all at their mean. */
  readonly multiplicity: number;
}

/** An eigenvalue of one block. */
export interface Refined {
  readonly re: number;
  readonly im: number;
  readonly uncertainty: number;
  /** Whether the quotient led anywhere; beside a multiple eigenvalue it does not. */
  readonly isRefined: boolean;
  /** The eigenvalue as the iteration gave it. */
  readonly raw: { readonly re: number; readonly im: number };
}

export interface Root extends Refined {
  readonly block: number;
}

/** How many uncertainties apart two values may lie and still be taken for one. */
export const COINCIDENT = 32;

/** An m-fold eigenvalue that is perturbed by ε spreads by some ᵐ√ε; what lies further apart is not one. */
function spread(multiplicity: number, size: number): number {
  return (64 * Number.EPSILON) ** (1 / multiplicity) * size;
}

/** Finds those that coincide within their uncertainties, and puts them at their mean, which is far better determined. */
export function gather(roots: readonly Root[]): NaturalFrequency[] {
  const groupOf = roots.map((_, k) => k);
  const uncertainties = roots.map(({ uncertainty }) => uncertainty);
  roots.forEach((root, k) => {
    const size = Math.hypot(root.re, root.im);
    const others = roots
      .map((other, index) => ({ index, distance: Math.hypot(other.re - root.re, other.im - root.im) }))
      .sort((a, b) => a.distance - b.distance || a.index - b.index);
    for (let m = roots.length; m > 1; m--) {
      const reach = root.isRefined ? Math.min(COINCIDENT * root.uncertainty, spread(m, size)) : spread(m, size);
      if ((others[m - 1]?.distance ?? Infinity) > reach) continue;
      uncertainties[k] = root.isRefined ? Math.min(root.uncertainty, spread(m, size)) : spread(m, size);
      for (const { index } of others.slice(0, m)) join(groupOf, k, index);
      break;
    }
  });
  return roots.map((root, k) => {
    const members = roots.filter((_, other) => groupOf[other] === groupOf[k]);
    if (members.length === 1) return { re: root.re, im: root.im, uncertainty: root.uncertainty, multiplicity: 1 };
    const values = members.map((one) => (isSplit(one, members) ? one.raw : one));
    const mean = (pick: (one: Refined['raw']) => number): number => values.reduce((sum, one) => sum + pick(one), 0) / members.length;
    const isReal = members.some(({ im }) => im === 0) || (members.some(({ im }) => im > 0) && members.some(({ im }) => im < 0));
    const most = Math.max(...uncertainties.filter((_, other) => groupOf[other] === groupOf[k]));
    return { re: mean(({ re }) => re), im: isReal ? 0 : mean(({ im }) => im), uncertainty: most, multiplicity: members.length };
  });
}

/** Much worse than what an eigenvalue of its own has. */
const ILL_CONDITIONED = 4096;

/**
 * Whether a member is one of those into which a multiple eigenvalue of one block has split. Their mean is the mean of
 * what the iteration gave, whose sum it keeps to rounding; singly refined they go anywhere within their uncertainties.
 */
function isSplit(one: Root, members: readonly Root[]): boolean {
  const beside = members.filter(({ block }) => block === one.block);
  const isIll = ({ isRefined, uncertainty, re, im }: Root): boolean => !isRefined || uncertainty > ILL_CONDITIONED * Number.EPSILON * Math.hypot(re, im);
  return beside.length > 1 && beside.some(isIll);
}

function join(groupOf: number[], one: number, other: number): void {
  const from = groupOf[other] ?? other;
  const to = groupOf[one] ?? one;
  if (from === to) return;
  groupOf.forEach((group, k) => {
    if (group === from) groupOf[k] = to;
  });
}
