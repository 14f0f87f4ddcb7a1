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
const I32_SUB = 0x6b;
const SIMD = 0xfd;
const V128_LOAD = [SIMD, 0x00];
const V128_STORE = [SIMD, 0x0b];
const V128_CONST = [SIMD, 0x0c];
const ARITHMETIC: Readonly<Record<string, readonly number[]>> = {
  '+': [SIMD, 0xf0, 0x01],
  '-': [SIMD, 0xf1, 0x01],
  '*': [SIMD, 0xf2, 0x01],
  '/': [SIMD, 0xf3, 0x01],
};
const ONE_TWICE = [0, 0, 0, 0, 0, 0, 0xf0, 0x3f, 0, 0, 0, 0, 0, 0, 0xf0, 0x3f];

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

/** The bytes of the module. */
export function vectorModule(): Uint8Array<ArrayBuffer> {
  const type = section(1, [1, 0x60, 4, I32, I32, I32, I32, 0]);
  const memory = section(2, [1, ...text('env'), ...text('memory'), 0x02, 0x00, ...unsigned(1)]);
  const functions = section(3, [1, 0]);
  const exports = section(7, [1, ...text('run'), 0x00, 0]);
  const body = [
    2,
    ...unsigned(VECTOR - LEFT),
    I32,
    ...unsigned(VECTOR_NAMES.length),
    V128,
    ...interpreter(),
    END,
  ];
  const code = section(10, [1, ...unsigned(body.length), ...body]);
  return Uint8Array.from([0x00, 0x61, 0x73, 0x6d, 1, 0, 0, 0, ...type, ...memory, ...functions, ...exports, ...code]);
}

/** Takes instruction after instruction and jumps to its kernel. */
function interpreter(): number[] {
  const count = FORMULAS.length;
  const bytes: number[] = [BLOCK, NO_RESULT, LOOP, NO_RESULT];
  bytes.push(LOCAL_GET, PC, LOCAL_GET, LAST, I32_GE_U, BR_IF, 1);
  for (let kernel = 0; kernel < count; kernel++) bytes.push(BLOCK, NO_RESULT);
  bytes.push(LOCAL_GET, PC, I32_LOAD, 2, 0, BR_TABLE, ...unsigned(count - 1));
  for (let kernel = 0; kernel < count; kernel++) bytes.push(kernel);
  bytes.push(END);
  for (const [kernel, [code, formulas]] of FORMULAS.entries()) {
    // Inside as many blocks as there are kernels to come; then follow the loop and the outermost block.
    bytes.push(...kernelOf(code, formulas), BR, ...unsigned(count - 1 - kernel));
    if (kernel < count - 1) bytes.push(END);
  }
  bytes.push(END, END);
  return bytes;
}

function kernelOf(code: number, formulas: readonly string[]): number[] {
  const results = RESULTS[code] ?? 0;
  const operands = OPERANDS[code] ?? 0;
  const pointers = Array.from({ length: results + operands }, (_, place) => POINTER + place);
  const bytes: number[] = [];
  for (const [place, pointer] of pointers.entries()) {
    bytes.push(LOCAL_GET, PC, I32_LOAD, 2, ...unsigned(4 * (place + 1)), LOCAL_SET, pointer);
  }
  bytes.push(LOCAL_GET, PC, I32_CONST, ...signed(4 * (pointers.length + 1)), I32_ADD, LOCAL_SET, PC);
  bytes.push(LOCAL_GET, BYTES, LOCAL_SET, LEFT);
  const watches = formulas.some((formula) => formula.startsWith('watch'));
  if (watches) bytes.push(LOCAL_GET, WATCH, LOCAL_SET, WATCHING);
  const moving = watches ? [...pointers, WATCHING] : pointers;

  bytes.push(LOOP, NO_RESULT);
  for (let offset = 0; offset < UNROLLED; offset += 16) {
    for (let operand = 0; operand < operands; operand++) {
      bytes.push(...load(POINTER + results + operand, offset), LOCAL_SET, vector(OPERAND_NAMES[operand] ?? ''));
    }
    if (watches) bytes.push(...load(WATCHING, offset), LOCAL_SET, vector('watch'));
    let result = 0;
    for (const formula of formulas) {
      const [expression = '', name] = formula.split(' = ').reverse();
      bytes.push(...evaluate(expression), LOCAL_SET, vector(name ?? (result++ === 0 ? 'first' : 'second')));
    }
    bytes.push(...store(POINTER, offset, 'first'));
    if (results === 2) bytes.push(...store(POINTER + 1, offset, 'second'));
    if (watches) bytes.push(...store(WATCHING, offset, 'watch'));
  }
  for (const pointer of moving) bytes.push(LOCAL_GET, pointer, I32_CONST, ...signed(UNROLLED), I32_ADD, LOCAL_SET, pointer);
  bytes.push(LOCAL_GET, LEFT, I32_CONST, ...signed(UNROLLED), I32_SUB, LOCAL_TEE, LEFT, BR_IF, 0, END);
  return bytes;
}

function evaluate(expression: string): number[] {
  return expression.split(' ').flatMap((token) => {
    const operation = ARITHMETIC[token];
    if (operation !== undefined) return [...operation];
    return token === '1' ? [...V128_CONST, ...ONE_TWICE] : [LOCAL_GET, vector(token)];
  });
}

function load(pointer: number, offset: number): number[] {
  return [LOCAL_GET, pointer, ...V128_LOAD, 3, ...unsigned(offset)];
}

function store(pointer: number, offset: number, name: string): number[] {
  return [LOCAL_GET, pointer, LOCAL_GET, vector(name), ...V128_STORE, 3, ...unsigned(offset)];
}

function vector(name: string): number {
  const place = VECTOR_NAMES.indexOf(name);
  if (place < 0) throw new Error(`no vector is called ${name}`);
  return VECTOR + place;
}

function section(id: number, content: readonly number[]): number[] {
  return [id, ...unsigned(content.length), ...content];
}

function text(name: string): number[] {
  return [...unsigned(name.length), ...Array.from(name, (letter) => letter.charCodeAt(0))];
}

/** LEB128, unsigned. */
function unsigned(value: number): number[] {
  const low = value & 0x7f;
  return value < 0x80 ? [low] : [low | 0x80, ...unsigned(value >>> 7)];
}

/** LEB128, signed; for what is not negative a clear sign bit in the last byte. */
function signed(value: number): number[] {
  return value < 0x40 ? [value] : [(value & 0x7f) | 0x80, ...signed(value >>> 7)];
}
