import { OPERANDS, RESULTS } from './opcode';
import { runKernels } from './kernels';
import type { Level } from './tape-builder';
import type { TapeProgram } from './tape-program';
import { watchSlot } from './tape-program';
import { vectorModule } from './vector-module';

/**
 * Runs programs. There is one memory, and the program that was run last stays loaded; work is done in one go, so
 * programs do not meet.
 */
export interface TapeMachine {
  readonly isVector: boolean;
  /**
   * Makes a program ready to run on so many lanes, a multiple of 8. Answers the memory, slot by slot, each of `lanes`
   * numbers; it holds until the next load.
   */
  load(program: TapeProgram, lanes: number): Float64Array;
  /** Runs the program's instructions of a level; the level's watch starts from nothing. */
  run(level: Level): void;
}

/** Lanes come in multiples of this. */
export const LANE_STEP = 8;

let machine: TapeMachine | undefined;

/**
 * The machine of this thread: of vector kernels where WebAssembly with SIMD may be compiled, else of plain ones. Both
 * compute the same to the last bit.
 */
export function tapeMachine(): TapeMachine {
  machine ??= vectorMachine() ?? plainMachine();
  return machine;
}

/** A machine that runs in any JavaScript. */
export function plainMachine(): TapeMachine {
  let memory = new Float64Array(0);
  let loaded: { program: TapeProgram; lanes: number; code: readonly Int32Array[] } | undefined;
  return {
    isVector: false,
    load(program, lanes) {
      if (loaded?.program === program && loaded.lanes === lanes) return memory;
      const size = program.slotCount * lanes;
      if (memory.length < size) memory = new Float64Array(size);
      loaded = { program, lanes, code: program.code.map((code) => placed(code, lanes)) };
      fillConstants(memory, program, lanes);
      return memory;
    },
    run(level) {
      if (loaded === undefined) return;
      const { lanes, code } = loaded;
      const watch = watchSlot(level) * lanes;
      memory.fill(0, watch, watch + lanes);
      runKernels(memory, code[level] ?? new Int32Array(0), lanes, watch);
    },
  };
}

/** What is used of WebAssembly, which pure code has no types for. */
interface WebAssemblyLike {
  readonly Module: new (bytes: Uint8Array<ArrayBuffer>) => object;
  readonly Memory: new (size: { initial: number }) => { readonly buffer: ArrayBuffer; grow(pages: number): number };
  readonly Instance: new (module: object, imports: object) => { readonly exports: Readonly<Record<string, unknown>> };
}

const PAGE = 65_536;

/** A machine of vector kernels; undefined where the platform has none or a content policy forbids it. */
export function vectorMachine(): TapeMachine | undefined {
  const assembly = (globalThis as unknown as { readonly WebAssembly?: WebAssemblyLike }).WebAssembly;
  if (assembly === undefined) return undefined;
  try {
    return machineOf(assembly);
  } catch {
    return undefined;
  }
}

function machineOf(assembly: WebAssemblyLike): TapeMachine {
  const pages = new assembly.Memory({ initial: 1 });
  const instance = new assembly.Instance(new assembly.Module(vectorModule()), { env: { memory: pages } });
  const run = instance.exports['run'] as (code: number, end: number, bytes: number, watch: number) => void;
  let memory = new Float64Array(pages.buffer);
  let loaded: { program: TapeProgram; lanes: number; start: readonly number[] } | undefined;
  return {
    isVector: true,
    load(program, lanes) {
      if (loaded?.program === program && loaded.lanes === lanes) return memory;
      const rowBytes = 8 * lanes;
      const codeStart = program.slotCount * rowBytes;
      const start = [codeStart];
      for (const code of program.code) start.push((start[start.length - 1] ?? 0) + 4 * code.length);
      const size = start[start.length - 1] ?? 0;
      if (size > pages.buffer.byteLength) {
        pages.grow(Math.ceil((size - pages.buffer.byteLength) / PAGE));
        memory = new Float64Array(pages.buffer);
      }
      for (const [level, code] of program.code.entries()) {
        new Int32Array(pages.buffer, start[level], code.length).set(placed(code, rowBytes));
      }
      fillConstants(memory, program, lanes);
      loaded = { program, lanes, start };
      return memory;
    },
    run(level) {
      if (loaded === undefined) return;
      const { lanes, start } = loaded;
      const watch = watchSlot(level) * lanes;
      memory.fill(0, watch, watch + lanes);
      run(start[level] ?? 0, start[level + 1] ?? 0, 8 * lanes, 8 * watch);
    },
  };
}

/** A code with places instead of slots. */
function placed(code: Int32Array, row: number): Int32Array {
  const places = code.slice();
  for (let pc = 0; pc < code.length; ) {
    const opcode = code[pc] ?? 0;
    const words = 1 + (RESULTS[opcode] ?? 0) + (OPERANDS[opcode] ?? 0);
    for (let word = 1; word < words; word++) places[pc + word] = (code[pc + word] ?? 0) * row;
    pc += words;
  }
  return places;
}

function fillConstants(memory: Float64Array, { constants }: TapeProgram, lanes: number): void {
  for (const { slot, value } of constants) memory.fill(value, slot * lanes, (slot + 1) * lanes);
}
