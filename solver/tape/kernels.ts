import { OP, OPERANDS, RESULTS } from './opcode';

/**
 * Runs instructions on lanes in plain JavaScript: one loop a kernel, over typed memory. `code` holds places in
 * `memory` (slot times lanes) after each opcode. Each kernel reads a lane's operands before it writes its results, which
 * may stand in the same place.
 */
export function runKernels(memory: Float64Array, code: Int32Array, lanes: number, watch: number): void {
  for (let pc = 0; pc < code.length; ) {
    const opcode = code[pc] ?? 0;
    const p = code[pc + 1] ?? 0;
    const q = code[pc + 2] ?? 0;
    const r = code[pc + 3] ?? 0;
    const s = code[pc + 4] ?? 0;
    const t = code[pc + 5] ?? 0;
    const u = code[pc + 6] ?? 0;
    const v = code[pc + 7] ?? 0;
    const w = code[pc + 8] ?? 0;
    switch (opcode) {
      case OP.add:
        add(memory, lanes, p, q, r);
        break;
      case OP.sub:
        sub(memory, lanes, p, q, r);
        break;
      case OP.mul:
        mul(memory, lanes, p, q, r);
        break;
      case OP.mulAdd:
        mulAdd(memory, lanes, p, q, r, s);
        break;
      case OP.mulSub:
        mulSub(memory, lanes, p, q, r, s);
        break;
      case OP.dot:
        dot(memory, lanes, p, q, r, s, t);
        break;
      case OP.det:
        det(memory, lanes, p, q, r, s, t);
        break;
      case OP.addDot:
        addDot(memory, lanes, p, q, r, s, t, u);
        break;
      case OP.addDet:
        addDet(memory, lanes, p, q, r, s, t, u);
        break;
      case OP.subDot:
        subDot(memory, lanes, p, q, r, s, t, u);
        break;
      case OP.reciprocal:
        reciprocal(memory, lanes, p, q);
        break;
      case OP.watchedReciprocal:
        watchedReciprocal(memory, lanes, p, q, r, watch);
        break;
      case OP.pairAdd:
        pairAdd(memory, lanes, p, q, r, s, t, u);
        break;
      case OP.pairSub:
        pairSub(memory, lanes, p, q, r, s, t, u);
        break;
      case OP.pairAddSub:
        pairAddSub(memory, lanes, p, q, r, s, t, u);
        break;
      case OP.scale:
        scale(memory, lanes, p, q, r, s, t);
        break;
      case OP.scaleAdd:
        scaleAdd(memory, lanes, p, q, r, s, t, u, v, 1, 1);
        break;
      case OP.scaleAddSub:
        scaleAdd(memory, lanes, p, q, r, s, t, u, v, 1, -1);
        break;
      case OP.scaleSubAdd:
        scaleAdd(memory, lanes, p, q, r, s, t, u, v, -1, 1);
        break;
      case OP.scaleSub:
        scaleAdd(memory, lanes, p, q, r, s, t, u, v, -1, -1);
        break;
      case OP.complexMul:
        complexMul(memory, lanes, p, q, r, s, t, u);
        break;
      case OP.conjugateMul:
        conjugateMul(memory, lanes, p, q, r, s, t, u);
        break;
      case OP.complexMulAdd:
        complexMulAdd(memory, lanes, p, q, r, s, t, u, v, w, 1, 1);
        break;
      case OP.complexMulAddSub:
        complexMulAdd(memory, lanes, p, q, r, s, t, u, v, w, 1, -1);
        break;
      case OP.complexMulSubAdd:
        complexMulAdd(memory, lanes, p, q, r, s, t, u, v, w, -1, 1);
        break;
      case OP.complexMulSub:
        complexMulAdd(memory, lanes, p, q, r, s, t, u, v, w, -1, -1);
        break;
      case OP.conjugateMulAdd:
        conjugateMulAdd(memory, lanes, p, q, r, s, t, u, v, w, 1, 1);
        break;
      case OP.conjugateMulAddSub:
        conjugateMulAdd(memory, lanes, p, q, r, s, t, u, v, w, 1, -1);
        break;
      case OP.conjugateMulSubAdd:
        conjugateMulAdd(memory, lanes, p, q, r, s, t, u, v, w, -1, 1);
        break;
      case OP.conjugateMulSub:
        conjugateMulAdd(memory, lanes, p, q, r, s, t, u, v, w, -1, -1);
        break;
      case OP.complexReciprocal:
        complexReciprocal(memory, lanes, p, q, r, s);
        break;
      case OP.watchedComplexReciprocal:
        watchedComplexReciprocal(memory, lanes, p, q, r, s, t, watch);
        break;
      default:
        throw new Error(`the tape has no operation ${opcode}`);
    }
    pc += 1 + (RESULTS[opcode] ?? 0) + (OPERANDS[opcode] ?? 0);
  }
}

type Lanes = Float64Array;

function add(m: Lanes, n: number, p: number, a: number, b: number): void {
  for (let i = 0; i < n; i++) m[p + i] = (m[a + i] ?? 0) + (m[b + i] ?? 0);
}

function sub(m: Lanes, n: number, p: number, a: number, b: number): void {
  for (let i = 0; i < n; i++) m[p + i] = (m[a + i] ?? 0) - (m[b + i] ?? 0);
}

function mul(m: Lanes, n: number, p: number, a: number, b: number): void {
  for (let i = 0; i < n; i++) m[p + i] = (m[a + i] ?? 0) * (m[b + i] ?? 0);
}

function mulAdd(m: Lanes, n: number, p: number, a: number, b: number, c: number): void {
  for (let i = 0; i < n; i++) m[p + i] = (m[a + i] ?? 0) + (m[b + i] ?? 0) * (m[c + i] ?? 0);
}

function mulSub(m: Lanes, n: number, p: number, a: number, b: number, c: number): void {
  for (let i = 0; i < n; i++) m[p + i] = (m[a + i] ?? 0) - (m[b + i] ?? 0) * (m[c + i] ?? 0);
}

function dot(m: Lanes, n: number, p: number, a: number, b: number, c: number, d: number): void {
  for (let i = 0; i < n; i++) m[p + i] = (m[a + i] ?? 0) * (m[b + i] ?? 0) + (m[c + i] ?? 0) * (m[d + i] ?? 0);
}

function det(m: Lanes, n: number, p: number, a: number, b: number, c: number, d: number): void {
  for (let i = 0; i < n; i++) m[p + i] = (m[a + i] ?? 0) * (m[b + i] ?? 0) - (m[c + i] ?? 0) * (m[d + i] ?? 0);
}

function addDot(m: Lanes, n: number, p: number, a: number, b: number, c: number, d: number, e: number): void {
  for (let i = 0; i < n; i++) {
    m[p + i] = (m[a + i] ?? 0) + ((m[b + i] ?? 0) * (m[c + i] ?? 0) + (m[d + i] ?? 0) * (m[e + i] ?? 0));
  }
}

function addDet(m: Lanes, n: number, p: number, a: number, b: number, c: number, d: number, e: number): void {
  for (let i = 0; i < n; i++) {
    m[p + i] = (m[a + i] ?? 0) + ((m[b + i] ?? 0) * (m[c + i] ?? 0) - (m[d + i] ?? 0) * (m[e + i] ?? 0));
  }
}

function subDot(m: Lanes, n: number, p: number, a: number, b: number, c: number, d: number, e: number): void {
  for (let i = 0; i < n; i++) {
    m[p + i] = (m[a + i] ?? 0) - ((m[b + i] ?? 0) * (m[c + i] ?? 0) + (m[d + i] ?? 0) * (m[e + i] ?? 0));
  }
}

function reciprocal(m: Lanes, n: number, p: number, a: number): void {
  for (let i = 0; i < n; i++) m[p + i] = 1 / (m[a + i] ?? 0);
}

function watchedReciprocal(m: Lanes, n: number, p: number, a: number, b: number, watch: number): void {
  for (let i = 0; i < n; i++) {
    const inverse = 1 / (m[a + i] ?? 0);
    const part = (m[b + i] ?? 0) * (inverse * inverse);
    m[watch + i] = (m[watch + i] ?? 0) + part * part;
    m[p + i] = inverse;
  }
}

function pairAdd(m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number, d: number): void {
  for (let i = 0; i < n; i++) {
    const re = (m[a + i] ?? 0) + (m[c + i] ?? 0);
    const im = (m[b + i] ?? 0) + (m[d + i] ?? 0);
    m[p + i] = re;
    m[q + i] = im;
  }
}

function pairSub(m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number, d: number): void {
  for (let i = 0; i < n; i++) {
    const re = (m[a + i] ?? 0) - (m[c + i] ?? 0);
    const im = (m[b + i] ?? 0) - (m[d + i] ?? 0);
    m[p + i] = re;
    m[q + i] = im;
  }
}

function pairAddSub(m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number, d: number): void {
  for (let i = 0; i < n; i++) {
    const re = (m[a + i] ?? 0) + (m[c + i] ?? 0);
    const im = (m[b + i] ?? 0) - (m[d + i] ?? 0);
    m[p + i] = re;
    m[q + i] = im;
  }
}

function scale(m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number): void {
  for (let i = 0; i < n; i++) {
    const factor = m[a + i] ?? 0;
    const re = factor * (m[b + i] ?? 0);
    const im = factor * (m[c + i] ?? 0);
    m[p + i] = re;
    m[q + i] = im;
  }
}

/** The signs, 1 or −1, are of the products; to multiply by them is exact. */
// prettier-ignore
function scaleAdd(
  m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number, d: number, e: number,
  signRe: number, signIm: number,
): void {
  for (let i = 0; i < n; i++) {
    const factor = m[c + i] ?? 0;
    const re = (m[a + i] ?? 0) + signRe * (factor * (m[d + i] ?? 0));
    const im = (m[b + i] ?? 0) + signIm * (factor * (m[e + i] ?? 0));
    m[p + i] = re;
    m[q + i] = im;
  }
}

function complexMul(m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number, d: number): void {
  for (let i = 0; i < n; i++) {
    const aRe = m[a + i] ?? 0;
    const aIm = m[b + i] ?? 0;
    const bRe = m[c + i] ?? 0;
    const bIm = m[d + i] ?? 0;
    m[p + i] = aRe * bRe - aIm * bIm;
    m[q + i] = aRe * bIm + aIm * bRe;
  }
}

function conjugateMul(m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number, d: number): void {
  for (let i = 0; i < n; i++) {
    const aRe = m[a + i] ?? 0;
    const aIm = m[b + i] ?? 0;
    const bRe = m[c + i] ?? 0;
    const bIm = m[d + i] ?? 0;
    m[p + i] = aRe * bRe + aIm * bIm;
    m[q + i] = aRe * bIm - aIm * bRe;
  }
}

// prettier-ignore
function complexMulAdd(
  m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number, d: number, e: number, f: number,
  signRe: number, signIm: number,
): void {
  for (let i = 0; i < n; i++) {
    const aRe = m[c + i] ?? 0;
    const aIm = m[d + i] ?? 0;
    const bRe = m[e + i] ?? 0;
    const bIm = m[f + i] ?? 0;
    const re = (m[a + i] ?? 0) + signRe * (aRe * bRe - aIm * bIm);
    const im = (m[b + i] ?? 0) + signIm * (aRe * bIm + aIm * bRe);
    m[p + i] = re;
    m[q + i] = im;
  }
}

// prettier-ignore
function conjugateMulAdd(
  m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number, d: number, e: number, f: number,
  signRe: number, signIm: number,
): void {
  for (let i = 0; i < n; i++) {
    const aRe = m[c + i] ?? 0;
    const aIm = m[d + i] ?? 0;
    const bRe = m[e + i] ?? 0;
    const bIm = m[f + i] ?? 0;
    const re = (m[a + i] ?? 0) + signRe * (aRe * bRe + aIm * bIm);
    const im = (m[b + i] ?? 0) + signIm * (aRe * bIm - aIm * bRe);
    m[p + i] = re;
    m[q + i] = im;
  }
}

function complexReciprocal(m: Lanes, n: number, p: number, q: number, a: number, b: number): void {
  for (let i = 0; i < n; i++) {
    const re = m[a + i] ?? 0;
    const im = m[b + i] ?? 0;
    const inverse = 1 / (re * re + im * im);
    m[p + i] = re * inverse;
    m[q + i] = im * inverse;
  }
}

// prettier-ignore
function watchedComplexReciprocal(
  m: Lanes, n: number, p: number, q: number, a: number, b: number, c: number, watch: number,
): void {
  for (let i = 0; i < n; i++) {
    const re = m[a + i] ?? 0;
    const im = m[b + i] ?? 0;
    const inverse = 1 / (re * re + im * im);
    const part = (m[c + i] ?? 0) * inverse;
    m[watch + i] = (m[watch + i] ?? 0) + part * part;
    m[p + i] = re * inverse;
    m[q + i] = im * inverse;
  }
}
