/**
 * The operations of a tape, on lanes of real numbers: each reads up to six slots and writes one or two. Complex values
 * are pairs of slots; what is known to be real or imaginary has one. Beside each: what it writes, from operands in order.
 */
export const OP = {
  /** a + b */
  add: 0,
  /** a − b */
  sub: 1,
  /** a·b */
  mul: 2,
  /** a + b·c */
  mulAdd: 3,
  /** a − b·c */
  mulSub: 4,
  /** a·b + c·d */
  dot: 5,
  /** a·b − c·d */
  det: 6,
  /** a + (b·c + d·e) */
  addDot: 7,
  /** a + (b·c − d·e) */
  addDet: 8,
  /** a − (b·c + d·e) */
  subDot: 9,
  /** 1/a */
  reciprocal: 10,
  /** 1/a, and the watch on the pivot a whose terms have squares of the sum b: watch += (b/a²)². */
  watchedReciprocal: 11,
  /** a + c, b + d */
  pairAdd: 12,
  /** a − c, b − d */
  pairSub: 13,
  /** a·b, a·c */
  scale: 14,
  /** a + c·d, b + c·e */
  scaleAdd: 15,
  /** (a + jb)·(c + jd): a·c − b·d, a·d + b·c */
  complexMul: 16,
  /** (a − jb)·(c + jd): a·c + b·d, a·d − b·c */
  conjugateMul: 17,
  /** (a + jb) + (c + jd)·(e + jf) */
  complexMulAdd: 18,
  /** (a + jb) + (c − jd)·(e + jf) */
  conjugateMulAdd: 19,
  /** a/(a² + b²), b/(a² + b²): the reciprocal of a − jb */
  complexReciprocal: 20,
  /** The same, and the watch on the pivot, c being the sum of the squares of its terms: watch += (c/(a² + b²))². */
  watchedComplexReciprocal: 21,
  /** a + c, b − d */
  pairAddSub: 22,
  /** a + c·d, b − c·e */
  scaleAddSub: 23,
  /** a − c·d, b + c·e */
  scaleSubAdd: 24,
  /** a − c·d, b − c·e */
  scaleSub: 25,
  /** a + (c·e − d·f), b − (c·f + d·e) */
  complexMulAddSub: 26,
  /** a − (c·e − d·f), b + (c·f + d·e) */
  complexMulSubAdd: 27,
  /** a − (c·e − d·f), b − (c·f + d·e) */
  complexMulSub: 28,
  /** a + (c·e + d·f), b − (c·f − d·e) */
  conjugateMulAddSub: 29,
  /** a − (c·e + d·f), b + (c·f − d·e) */
  conjugateMulSubAdd: 30,
  /** a − (c·e + d·f), b − (c·f − d·e) */
  conjugateMulSub: 31,
} as const;

export type Opcode = (typeof OP)[keyof typeof OP];

/** How many slots each operation writes, by opcode. */
export const RESULTS: readonly number[] = [
  1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2,
];

/** How many slots each operation reads, by opcode. */
export const OPERANDS: readonly number[] = [
  2, 2, 2, 3, 3, 4, 4, 5, 5, 5, 1, 2, 4, 4, 3, 5, 4, 4, 6, 6, 2, 3, 4, 5, 5, 5, 6, 6, 6, 6, 6, 6,
];

/** Floating-point operations of each, by opcode; a division counts as four. For choosing between orders, not for timing. */
export const COST: readonly number[] = [
  1, 1, 1, 2, 2, 3, 3, 4, 4, 4, 4, 8, 2, 2, 2, 4, 6, 6, 8, 8, 9, 12, 2, 4, 4, 4, 8, 8, 8, 8, 8, 8,
];

/** The words of an instruction as stored: opcode, two results, six operands. */
export const INSTRUCTION_WORDS = 9;
