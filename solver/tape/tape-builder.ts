import { IntList } from './int-list';
import type { Opcode } from './opcode';
import { INSTRUCTION_WORDS, OP } from './opcode';

/**
 * One real number a lane, defined once. 0 is the number zero; a negative part is the negative of the part of that
 * number, so a change of sign costs nothing and zeros never reach the tape.
 */
export type Part = number;

/** A complex number a lane: zero, real, imaginary or complex by which of its parts are `NOTHING`. */
export interface Value {
  readonly re: Part;
  readonly im: Part;
}

export const NOTHING: Part = 0;
export const ZERO: Value = { re: NOTHING, im: NOTHING };

/**
 * When a part has to be computed: once a run, once a block of lanes, or at every point of the block's inner run. A
 * result has the latest level of its operands.
 */
export const LEVEL = { constant: 0, block: 1, varying: 2 } as const;
export type Level = (typeof LEVEL)[keyof typeof LEVEL];

const LEVELS: readonly Level[] = [LEVEL.constant, LEVEL.block, LEVEL.varying];

/** A straight-line program as it was written down, before it is laid out. */
export interface Listing {
  /** Instructions of `INSTRUCTION_WORDS` words each; results and operands are parts above zero. */
  readonly words: IntList;
  readonly levelOfPart: IntList;
  readonly inputs: readonly Part[];
  readonly partCount: number;
  /** A number for each constant part. */
  readonly constants: ReadonlyMap<Part, number>;
}

/**
 * Writes down a straight-line program over complex values. Every operation folds what is zero, keeps real and imaginary
 * values apart from complex ones, and takes the fused operation that fits.
 */
export class TapeBuilder implements Listing {
  readonly words = new IntList();
  readonly levelOfPart = new IntList();
  readonly inputs: Part[] = [];
  readonly constants = new Map<Part, number>();
  /** The number one. */
  readonly one: Value;
  private readonly onePart: Part;
  private readonly places = new Map<number, Part>();

  constructor() {
    this.levelOfPart.push(LEVEL.constant);
    this.onePart = this.constantPart(1);
    this.one = { re: this.onePart, im: NOTHING };
  }

  get partCount(): number {
    return this.levelOfPart.length;
  }

  /** A lane of numbers that the caller fills in before each run of its level; its slot may be used again after that. */
  input(level: Level): Part {
    const part = this.newPart(level);
    this.inputs.push(part);
    return part;
  }

  constant(re: number, im = 0): Value {
    return { re: this.constantPart(re), im: this.constantPart(im) };
  }

  constantPart(value: number): Part {
    if (value === 0) return NOTHING;
    const size = Math.abs(value);
    const known = this.places.get(size);
    const part = known ?? this.newPart(LEVEL.constant);
    if (known === undefined) {
      this.places.set(size, part);
      this.constants.set(part, size);
    }
    return value < 0 ? -part : part;
  }

  levelOf(part: Part): Level {
    return LEVELS[this.levelOfPart.at(Math.abs(part))] ?? LEVEL.varying;
  }

  add(a: Value, b: Value): Value {
    if (isComplex(a) && isComplex(b)) {
      const sameRe = sign(a.re) === sign(b.re);
      const sameIm = sign(a.im) === sign(b.im);
      if (!sameRe && sameIm) {
        const [im, re] = this.emitPair(OP.pairAddSub, a.im, a.re, b.im, b.re);
        return { re: signed(re, a.re), im: signed(im, a.im) };
      }
      const code = !sameRe ? OP.pairSub : sameIm ? OP.pairAdd : OP.pairAddSub;
      const [re, im] = this.emitPair(code, a.re, a.im, b.re, b.im);
      return { re: signed(re, a.re), im: signed(im, a.im) };
    }
    return { re: this.addParts(a.re, b.re), im: this.addParts(a.im, b.im) };
  }

  sub(a: Value, b: Value): Value {
    return this.add(a, negative(b));
  }

  /** The sum of all, the constant ones first, so that theirs is constant too. */
  sum(values: readonly Value[]): Value {
    const [first] = values;
    if (first === undefined) return ZERO;
    if (values.length === 1) return first;
    if (values.every((value) => isComplex(value) && this.isVarying(value))) {
      return values.slice(1).reduce((total, value) => this.add(total, value), first);
    }
    return { re: this.sumParts(values.map(({ re }) => re)), im: this.sumParts(values.map(({ im }) => im)) };
  }

  mul(a: Value, b: Value): Value {
    return this.mulAdd(ZERO, a, b);
  }

  /** c + a·b. */
  mulAdd(c: Value, a: Value, b: Value): Value {
    if (!isComplex(a)) return this.scaleAdd(c, a, b);
    if (!isComplex(b)) return this.scaleAdd(c, b, a);
    const conjugate = (a.re > 0 === a.im > 0) !== (b.re > 0 === b.im > 0);
    const signRe = sign(a.re) * sign(b.re);
    const signIm = sign(a.re) * sign(b.im);
    if (isZero(c)) {
      const [re, im] = this.emitPair(conjugate ? OP.conjugateMul : OP.complexMul, a.re, a.im, b.re, b.im);
      return { re: signRe * re, im: signIm * im };
    }
    if (isComplex(c)) {
      const codes = conjugate ? CONJUGATE_MUL_ADD : COMPLEX_MUL_ADD;
      const code = codes[signPlace(c, signRe, signIm)] ?? OP.complexMulAdd;
      const [re, im] = this.emitPair(code, c.re, c.im, a.re, a.im, b.re, b.im);
      return { re: signed(re, c.re), im: signed(im, c.im) };
    }
    return {
      re: this.addDot(c.re, a.re, b.re, -a.im, b.im),
      im: this.addDot(c.im, a.re, b.im, a.im, b.re),
    };
  }

  /** c − a·b. */
  mulSub(c: Value, a: Value, b: Value): Value {
    return this.mulAdd(c, negative(a), b);
  }

  /**
   * 1/a. With `squares`, the sum of the squares of the terms that a is the sum of, the lane's watch grows by the square of
   * squares/|a|²: enormous where a has cancelled, not finite where a is zero.
   */
  reciprocal(a: Value, squares?: Part): Value {
    // Not a number: the lane is not to be trusted, whatever is done with this.
    if (isZero(a)) return { re: this.constantPart(NaN), im: NOTHING };
    const watched = squares !== undefined;
    if (isComplex(a)) {
      const [re, im] = watched
        ? this.emitPair(OP.watchedComplexReciprocal, a.re, a.im, squares === NOTHING ? this.emptyPart() : squares)
        : this.emitPair(OP.complexReciprocal, a.re, a.im);
      return { re: signed(re, a.re), im: -signed(im, a.im) };
    }
    const part = a.re === NOTHING ? a.im : a.re;
    const result = watched
      ? this.emitOne(OP.watchedReciprocal, part, squares === NOTHING ? this.emptyPart() : squares)
      : this.emitOne(OP.reciprocal, part);
    return a.re === NOTHING ? { re: NOTHING, im: -signed(result, part) } : { re: signed(result, part), im: NOTHING };
  }

  div(a: Value, b: Value): Value {
    return isZero(a) ? ZERO : this.mul(a, this.reciprocal(b));
  }

  /** Σ |a|² over all, the constant ones first. */
  squares(values: readonly Value[]): Part {
    let total: Part = NOTHING;
    for (const level of LEVELS) {
      for (const { re, im } of values) {
        const first = re !== NOTHING && this.levelOf(re) === level ? re : NOTHING;
        const second = im !== NOTHING && this.levelOf(im) === level ? im : NOTHING;
        total = this.addDot(total, first, first, second, second);
      }
    }
    return total;
  }

  addParts(a: Part, b: Part): Part {
    if (a === NOTHING) return b;
    if (b === NOTHING) return a;
    if (a > 0 === b > 0) return signed(this.emitOne(OP.add, a, b), a);
    return a > 0 ? this.emitOne(OP.sub, a, b) : this.emitOne(OP.sub, b, a);
  }

  mulParts(a: Part, b: Part): Part {
    if (a === NOTHING || b === NOTHING) return NOTHING;
    if (Math.abs(a) === this.onePart) return sign(a) * b;
    if (Math.abs(b) === this.onePart) return sign(b) * a;
    return sign(a) * sign(b) * this.emitOne(OP.mul, a, b);
  }

  /** c + a·b. */
  mulAddParts(c: Part, a: Part, b: Part): Part {
    if (a === NOTHING || b === NOTHING) return c;
    if (c === NOTHING || Math.abs(a) === this.onePart || Math.abs(b) === this.onePart) {
      return this.addParts(c, this.mulParts(a, b));
    }
    return signed(this.emitOne(sign(a) * sign(b) === sign(c) ? OP.mulAdd : OP.mulSub, c, a, b), c);
  }

  /** e + a·b + c·d. */
  addDot(e: Part, a: Part, b: Part, c: Part, d: Part): Part {
    const first = a !== NOTHING && b !== NOTHING;
    const second = c !== NOTHING && d !== NOTHING;
    if (!first) return this.mulAddParts(e, c, d);
    if (!second) return this.mulAddParts(e, a, b);
    const signFirst = sign(a) * sign(b);
    const signSecond = sign(c) * sign(d);
    const alike = signFirst === signSecond;
    if (e === NOTHING) return signFirst * this.emitOne(alike ? OP.dot : OP.det, a, b, c, d);
    if (alike) return signed(this.emitOne(signFirst === sign(e) ? OP.addDot : OP.subDot, e, a, b, c, d), e);
    const result =
      signFirst === sign(e) ? this.emitOne(OP.addDet, e, a, b, c, d) : this.emitOne(OP.addDet, e, c, d, a, b);
    return signed(result, e);
  }

  /** c + s·b, s being zero, real or imaginary. */
  private scaleAdd(c: Value, s: Value, b: Value): Value {
    if (isZero(s) || isZero(b)) return c;
    const factor = s.re === NOTHING ? s.im : s.re;
    const turned = s.re === NOTHING ? { re: -b.im, im: b.re } : b;
    if (!isComplex(b) || Math.abs(factor) === this.onePart) return this.scaleParts(c, factor, turned);
    const signRe = sign(factor) * sign(turned.re);
    const signIm = sign(factor) * sign(turned.im);
    if (isZero(c)) {
      const [re, im] = this.emitPair(OP.scale, factor, turned.re, turned.im);
      return { re: signRe * re, im: signIm * im };
    }
    if (isComplex(c)) {
      const code = SCALE_ADD[signPlace(c, signRe, signIm)] ?? OP.scaleAdd;
      const [re, im] = this.emitPair(code, c.re, c.im, factor, turned.re, turned.im);
      return { re: signed(re, c.re), im: signed(im, c.im) };
    }
    return this.scaleParts(c, factor, turned);
  }

  private scaleParts(c: Value, factor: Part, b: Value): Value {
    return { re: this.mulAddParts(c.re, factor, b.re), im: this.mulAddParts(c.im, factor, b.im) };
  }

  private sumParts(parts: readonly Part[]): Part {
    let total: Part = NOTHING;
    for (const level of LEVELS) {
      for (const part of parts) {
        if (part !== NOTHING && this.levelOf(part) === level) total = this.addParts(total, part);
      }
    }
    return total;
  }

  private isVarying({ re, im }: Value): boolean {
    return this.levelOf(re) === LEVEL.varying && this.levelOf(im) === LEVEL.varying;
  }

  /** A lane of zeros, for an operation that has to read one. */
  private emptyPart(): Part {
    const known = this.places.get(0);
    if (known !== undefined) return known;
    const part = this.newPart(LEVEL.constant);
    this.places.set(0, part);
    this.constants.set(part, 0);
    return part;
  }

  private newPart(level: number): Part {
    this.levelOfPart.push(level);
    return this.levelOfPart.length - 1;
  }

  private emitOne(code: Opcode, a: Part, b: Part = NOTHING, c: Part = NOTHING, d: Part = NOTHING, e: Part = NOTHING): Part {
    const part = this.newPart(this.latest(a, b, c, d, e, NOTHING));
    this.write(code, part, NOTHING, a, b, c, d, e, NOTHING);
    return part;
  }

  private emitPair(
    code: Opcode,
    a: Part,
    b: Part,
    c: Part = NOTHING,
    d: Part = NOTHING,
    e: Part = NOTHING,
    f: Part = NOTHING,
  ): readonly [Part, Part] {
    const level = this.latest(a, b, c, d, e, f);
    const one = this.newPart(level);
    const other = this.newPart(level);
    this.write(code, one, other, a, b, c, d, e, f);
    return [one, other];
  }

  private latest(a: Part, b: Part, c: Part, d: Part, e: Part, f: Part): number {
    const { levelOfPart } = this;
    return Math.max(
      levelOfPart.at(Math.abs(a)),
      levelOfPart.at(Math.abs(b)),
      levelOfPart.at(Math.abs(c)),
      levelOfPart.at(Math.abs(d)),
      levelOfPart.at(Math.abs(e)),
      levelOfPart.at(Math.abs(f)),
    );
  }

  private write(code: Opcode, one: Part, other: Part, a: Part, b: Part, c: Part, d: Part, e: Part, f: Part): void {
    const at = this.words.length;
    const words = this.words.extend(INSTRUCTION_WORDS);
    words[at] = code;
    words[at + 1] = one;
    words[at + 2] = other;
    words[at + 3] = Math.abs(a);
    words[at + 4] = Math.abs(b);
    words[at + 5] = Math.abs(c);
    words[at + 6] = Math.abs(d);
    words[at + 7] = Math.abs(e);
    words[at + 8] = Math.abs(f);
  }
}

export function isZero({ re, im }: Value): boolean {
  return re === NOTHING && im === NOTHING;
}

export function isComplex({ re, im }: Value): boolean {
  return re !== NOTHING && im !== NOTHING;
}

/** The negative, for nothing. */
export function negative({ re, im }: Value): Value {
  return { re: -re, im: -im };
}

export function conjugate({ re, im }: Value): Value {
  return { re, im: -im };
}

/** j·a, for nothing. */
export function timesJ({ re, im }: Value): Value {
  return { re: -im, im: re };
}

/** Operations that add a product to a pair: by whether its parts are taken from the pair's first, and second. */
const SCALE_ADD: readonly Opcode[] = [OP.scaleAdd, OP.scaleAddSub, OP.scaleSubAdd, OP.scaleSub];
const COMPLEX_MUL_ADD: readonly Opcode[] = [OP.complexMulAdd, OP.complexMulAddSub, OP.complexMulSubAdd, OP.complexMulSub];
const CONJUGATE_MUL_ADD: readonly Opcode[] = [
  OP.conjugateMulAdd,
  OP.conjugateMulAddSub,
  OP.conjugateMulSubAdd,
  OP.conjugateMulSub,
];

/** The place in these, for a product whose parts have the signs. */
function signPlace(c: Value, signRe: number, signIm: number): number {
  return (sign(c.re) === signRe ? 0 : 2) + (sign(c.im) === signIm ? 0 : 1);
}

function sign(part: Part): 1 | -1 {
  return part < 0 ? -1 : 1;
}

function signed(part: Part, like: Part): Part {
  return like < 0 ? -part : part;
}

