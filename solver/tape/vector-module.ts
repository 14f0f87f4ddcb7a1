import { OP, OPERANDS, RESULTS } from './opcode';

/**
 * The tape's kernels as a WebAssembly module, two lanes an operation (fixed-width SIMD). It is assembled here, byte by
 * byte, from one formula for each result, so that there is no second language to build, and it computes what the plain
 * kernels compute, operation for operation: the results are the same to the last bit.
 *
 * The module imports a memory and exports `run(code, end, bytes, watch)`: addresses of the first instruction and of the
 * byte after the last, the bytes of a row of lanes (a multiple of `UNROLLED`), and the address of the watch. An
 * instruction is an opcode and the addresses of its results and operands, four bytes each.
 *
 * Format: WebAssembly Core Specification 2.0, section 5 (binary format); the numbers of the opcodes are from there.
 */

/**
 * Each result in reverse Polish notation over the operands a to f; a name before `=` is for the formulas after it, and
 * `watch` stands for the lane's watch, read and written.
 */
const FORMULAS: readonly (readonly [code: number, formulas: readonly string[]])[] = [
  [OP.add, ['a b +']],
  [OP.sub, ['a b -']],
  [OP.mul, ['a b *']],
  [OP.mulAdd, ['a b c * +']],
  [OP.mulSub, ['a b c * -']],
  [OP.dot, ['a b * c d * +']],
  [OP.det, ['a b * c d * -']],
  [OP.addDot, ['a b c * d e * + +']],
  [OP.addDet, ['a b c * d e * - +']],
  [OP.subDot, ['a b c * d e * + -']],
  [OP.reciprocal, ['1 a /']],
  [OP.watchedReciprocal, ['u = 1 a /', 'v = b u u * *', 'watch = watch v v * +', 'u']],
  [OP.pairAdd, ['a c +', 'b d +']],
  [OP.pairSub, ['a c -', 'b d -']],
  [OP.scale, ['a b *', 'a c *']],
  [OP.scaleAdd, ['a c d * +', 'b c e * +']],
  [OP.complexMul, ['a c * b d * -', 'a d * b c * +']],
  [OP.conjugateMul, ['a c * b d * +', 'a d * b c * -']],
  [OP.complexMulAdd, ['a c e * d f * - +', 'b c f * d e * + +']],
  [OP.conjugateMulAdd, ['a c e * d f * + +', 'b c f * d e * - +']],
  [OP.complexReciprocal, ['u = 1 a a * b b * + /', 'a u *', 'b u *']],
  [OP.watchedComplexReciprocal, ['u = 1 a a * b b * + /', 'v = c u *', 'watch = watch v v * +', 'a u *', 'b u *']],
  [OP.pairAddSub, ['a c +', 'b d -']],
  [OP.scaleAddSub, ['a c d * +', 'b c e * -']],
  [OP.scaleSubAdd, ['a c d * -', 'b c e * +']],
  [OP.scaleSub, ['a c d * -', 'b c e * -']],
  [OP.complexMulAddSub, ['a c e * d f * - +', 'b c f * d e * + -']],
  [OP.complexMulSubAdd, ['a c e * d f * - -', 'b c f * d e * + +']],
  [OP.complexMulSub, ['a c e * d f * - -', 'b c f * d e * + -']],
  [OP.conjugateMulAddSub, ['a c e * d f * + +', 'b c f * d e * - -']],
  [OP.conjugateMulSubAdd, ['a c e * d f * + -', 'b c f * d e * - +']],
  [OP.conjugateMulSub, ['a c e * d f * + -', 'b c f * d e * - -']],
];

/** Bytes of a row of lanes that one turn of a kernel's loop works off: four times two lanes. */
export const UNROLLED = 64;

const I32 = 0x7f;
const V128 = 0x7b;
const BLOCK = 0x02;
const LOOP = 0x03;
const NO_RESULT = 0x40;
const END = 0x0b;
const BR = 0x0c;
const BR_IF = 0x0d;
const BR_TABLE = 0x0e;
const LOCAL_GET = 0x20;
const LOCAL_SET = 0x21;
const LOCAL_TEE = 0x22;
const I32_LOAD = 0x28;
const I32_CONST = 0x41;
const I32_GE_U = 0x4f;
const I32_ADD = 0x6a;
const SIMD = 0xfd;
const V128_LOAD = 0x00;
const V128_STORE = 0x0b;
const V128_CONST = 0x0c;
/** f64x2.add, of whose number this is the first byte; sub, mul and div follow. */
const F64X2_ADD = 0xf0;
const ARITHMETIC = ['+', '-', '*', '/'];

/** Parameters and locals of `run`, by number. */
const PC = 0;
const LAST = 1;
const BYTES = 2;
const WATCH = 3;
const LEFT = 4;
const POINTER = 5;
const MOST_POINTERS = 9;
/** The pointer into the watch. */
const WATCHING = POINTER + MOST_POINTERS - 1;
const VECTOR = POINTER + MOST_POINTERS;
const OPERAND_NAMES = ['a', 'b', 'c', 'd', 'e', 'f'];
const VECTOR_NAMES = [...OPERAND_NAMES, 'u', 'v', 'watch', 'first', 'second'];

/** The bytes of the module. It is made on the way to the first sweep, so by a writer and not by joining lists. */
export function vectorModule(): Uint8Array<ArrayBuffer> {
  const body = new Bytes();
  body.put(2);
  body.unsigned(VECTOR - LEFT);
  body.put(I32, VECTOR_NAMES.length, V128);
  writeInterpreter(body);
  body.put(END);

  const out = new Bytes();
  for (const byte of [0x00, 0x61, 0x73, 0x6d, 1, 0, 0, 0]) out.put(byte);
  // One type: four i32, no result. One import: env.memory. One function of that type, exported as run.
  for (const byte of [1, 8, 1, 0x60, 4, I32, I32, I32, I32, 0]) out.put(byte);
  for (const byte of [2, 15, 1, 3, ...codesOf('env'), 6, ...codesOf('memory'), 0x02, 0x00, 1]) out.put(byte);
  for (const byte of [3, 2, 1, 0]) out.put(byte);
  for (const byte of [7, 7, 1, 3, ...codesOf('run'), 0x00, 0]) out.put(byte);
  const size = new Bytes();
  size.unsigned(body.length);
  out.put(10);
  out.unsigned(1 + size.length + body.length);
  out.put(1);
  out.append(size);
  out.append(body);
  return out.toArray();
}

/** Takes instruction after instruction and jumps to its kernel. */
function writeInterpreter(out: Bytes): void {
  const count = FORMULAS.length;
  out.put(BLOCK, NO_RESULT, LOOP, NO_RESULT);
  out.put(LOCAL_GET, PC, LOCAL_GET, LAST);
  out.put(I32_GE_U, BR_IF, 1);
  for (let kernel = 0; kernel < count; kernel++) out.put(BLOCK, NO_RESULT);
  out.put(LOCAL_GET, PC, I32_LOAD, 2);
  out.put(0, BR_TABLE, count - 1);
  for (let kernel = 0; kernel < count; kernel++) out.put(kernel);
  out.put(END);
  for (let kernel = 0; kernel < count; kernel++) {
    const [code = 0, formulas = []] = FORMULAS[kernel] ?? [];
    writeKernel(out, code, formulas);
    // Inside as many blocks as there are kernels to come; then follow the loop and the outermost block.
    out.put(BR, count - 1 - kernel);
    if (kernel < count - 1) out.put(END);
  }
  out.put(END, END);
}

function writeKernel(out: Bytes, code: number, formulas: readonly string[]): void {
  const results = RESULTS[code] ?? 0;
  const operands = OPERANDS[code] ?? 0;
  const pointers = results + operands;
  for (let place = 0; place < pointers; place++) {
    out.put(LOCAL_GET, PC, I32_LOAD, 2);
    out.put(4 * (place + 1), LOCAL_SET, POINTER + place);
  }
  out.put(LOCAL_GET, PC);
  out.addConstant(4 * (pointers + 1));
  out.put(LOCAL_SET, PC);
  out.put(LOCAL_GET, BYTES, LOCAL_SET, LEFT);
  const watches = formulas.some((formula) => formula.startsWith('watch'));
  if (watches) out.put(LOCAL_GET, WATCH, LOCAL_SET, WATCHING);

  const work = formulas.map(parse);
  out.put(LOOP, NO_RESULT);
  for (let offset = 0; offset < UNROLLED; offset += 16) {
    for (let operand = 0; operand < operands; operand++) {
      out.put(LOCAL_GET, POINTER + results + operand);
      out.put(SIMD, V128_LOAD, 3, offset);
      out.put(LOCAL_SET, VECTOR + operand);
    }
    if (watches) {
      out.put(LOCAL_GET, WATCHING);
      out.put(SIMD, V128_LOAD, 3, offset);
      out.put(LOCAL_SET, vector('watch'));
    }
    let result = 0;
    for (const { name, tokens } of work) {
      writeExpression(out, tokens);
      out.put(LOCAL_SET, name ?? (result++ === 0 ? vector('first') : vector('second')));
    }
    writeStore(out, POINTER, offset, vector('first'));
    if (results === 2) writeStore(out, POINTER + 1, offset, vector('second'));
    if (watches) writeStore(out, WATCHING, offset, vector('watch'));
  }
  for (let place = 0; place < pointers; place++) moveOn(out, POINTER + place);
  if (watches) moveOn(out, WATCHING);
  out.put(LOCAL_GET, LEFT);
  out.addConstant(-UNROLLED);
  out.put(LOCAL_TEE, LEFT, BR_IF, 0);
  out.put(END);
}

interface Formula {
  /** The vector that the result goes to; undefined for the next of the operation's own. */
  readonly name: number | undefined;
  /** The number of a vector; below zero an operation, by its place in `ARITHMETIC`, or the number one. */
  readonly tokens: readonly number[];
}

const ONE = -1 - ARITHMETIC.length;

function parse(formula: string): Formula {
  const [expression = '', name] = formula.split(' = ').reverse();
  const tokens = expression.split(' ').map((token) => {
    if (token === '1') return ONE;
    const operation = ARITHMETIC.indexOf(token);
    return operation >= 0 ? -1 - operation : vector(token);
  });
  return { name: name === undefined ? undefined : vector(name), tokens };
}

function writeExpression(out: Bytes, tokens: readonly number[]): void {
  for (const token of tokens) {
    if (token >= 0) out.put(LOCAL_GET, token);
    else if (token === ONE) {
      out.put(SIMD, V128_CONST);
      for (let half = 0; half < 2; half++) {
        out.put(0, 0, 0, 0);
        out.put(0, 0, 0xf0, 0x3f);
      }
    } else out.put(SIMD, F64X2_ADD - 1 - token, 0x01);
  }
}

function writeStore(out: Bytes, pointer: number, offset: number, from: number): void {
  out.put(LOCAL_GET, pointer, LOCAL_GET, from);
  out.put(SIMD, V128_STORE, 3, offset);
}

function moveOn(out: Bytes, pointer: number): void {
  out.put(LOCAL_GET, pointer);
  out.addConstant(UNROLLED);
  out.put(LOCAL_SET, pointer);
}

function vector(name: string): number {
  const place = VECTOR_NAMES.indexOf(name);
  if (place < 0) throw new Error(`no vector is called ${name}`);
  return VECTOR + place;
}

function codesOf(name: string): number[] {
  return Array.from(name, (letter) => letter.charCodeAt(0));
}

class Bytes {
  length = 0;
  private bytes = new Uint8Array(16_384);

  /** Up to four bytes. */
  put(a: number, b?: number, c?: number, d?: number): void {
    this.bytes[this.length++] = a;
    if (b === undefined) return;
    this.bytes[this.length++] = b;
    if (c === undefined) return;
    this.bytes[this.length++] = c;
    if (d !== undefined) this.bytes[this.length++] = d;
  }

  /** LEB128, unsigned. */
  unsigned(value: number): void {
    let left = value;
    for (; left >= 0x80; left >>>= 7) this.put((left & 0x7f) | 0x80);
    this.put(left);
  }

  /** Adds a small number to the i32 on the stack; LEB128, signed, in two bytes. */
  addConstant(value: number): void {
    this.put(I32_CONST, (value & 0x7f) | 0x80, (value >> 7) & 0x7f, I32_ADD);
  }

  append(other: Bytes): void {
    this.bytes.set(other.bytes.subarray(0, other.length), this.length);
    this.length += other.length;
  }

  toArray(): Uint8Array<ArrayBuffer> {
    return this.bytes.slice(0, this.length);
  }
}
