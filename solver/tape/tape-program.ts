import { IntList } from './int-list';
import { COST, INSTRUCTION_WORDS, OPERANDS, RESULTS } from './opcode';
import type { Level, Listing, Part } from './tape-builder';
import { LEVEL, NOTHING } from './tape-builder';

/**
 * A straight-line program ready to run: for each level its instructions, each an opcode with the slots that it writes
 * and reads, as many as it has. A slot is a row of lanes.
 */
export interface TapeProgram {
  /** By level. */
  readonly code: readonly [Int32Array, Int32Array, Int32Array];
  readonly slotCount: number;
  /** The slot of a part: that of an input or an output; −1 for a part that nothing was kept of. */
  readonly slotOf: (part: Part) => number;
  readonly constants: readonly { readonly slot: number; readonly value: number }[];
  /** Floating-point operations a lane, by level. */
  readonly cost: readonly [number, number, number];
}

/** The first slots hold the watches on pivots, one a level. */
const WATCHES = 3;

/** The slot of the watch on the pivots of a level. */
export function watchSlot(level: Level): number {
  return level;
}

/**
 * Lays a listing out for the outputs: what they do not need is left out, what has a level of its own is run with it,
 * and slots are used again when their part is no longer needed. What a later level reads keeps its slot.
 */
export function compileTape(listing: Listing, outputs: readonly Part[]): TapeProgram {
  const { partCount } = listing;
  const words = listing.words.array;
  const live = findLive(listing, outputs);
  const { lastRead, isNeeded } = live;

  const slots = new Int32Array(partCount).fill(-1);
  const free: number[] = [];
  let slotCount = WATCHES;
  const constants: { slot: number; value: number }[] = [];
  for (const [part, value] of listing.constants) {
    if (isNeeded[part] === 0) continue;
    // A constant is filled in when the program is loaded and never again, so its slot stays its own.
    lastRead[part] = NEVER;
    slots[part] = slotCount++;
    constants.push({ slot: slots[part] ?? 0, value });
  }
  for (const part of listing.inputs) {
    if (isNeeded[part] === 1) slots[part] = slotCount++;
  }

  const cost: [number, number, number] = [0, 0, 0];
  const codeOf = (level: Level): Int32Array => {
    const code = new IntList();
    for (const at of live.instructions[level]) {
      const opcode = words[at] ?? 0;
      const results = RESULTS[opcode] ?? 0;
      const operands = OPERANDS[opcode] ?? 0;
      cost[level] += COST[opcode] ?? 0;
      const start = code.length;
      const made = code.extend(1 + results + operands);
      made[start] = opcode;
      for (let operand = 0; operand < operands; operand++) {
        const part = words[at + 3 + operand] ?? 0;
        made[start + 1 + results + operand] = slots[part] ?? 0;
      }
      // An operation reads a lane's operands before it writes its results, so these may take the slots of those.
      for (let operand = 0; operand < operands; operand++) {
        const part = words[at + 3 + operand] ?? 0;
        if (lastRead[part] !== at) continue;
        lastRead[part] = NEVER;
        free.push(slots[part] ?? 0);
      }
      for (let result = 0; result < results; result++) {
        const slot = free.pop() ?? slotCount++;
        slots[words[at + 1 + result] ?? 0] = slot;
        made[start + 1 + result] = slot;
      }
      for (let result = 0; result < results; result++) {
        const part = words[at + 1 + result] ?? 0;
        if (lastRead[part] === UNREAD) free.push(slots[part] ?? 0);
      }
    }
    return code.toArray();
  };
  const code = [codeOf(LEVEL.constant), codeOf(LEVEL.block), codeOf(LEVEL.varying)] as const;
  const kept = new Map<Part, number>();
  for (const part of [...listing.inputs, ...outputs.map((output) => Math.abs(output))]) kept.set(part, slots[part] ?? -1);
  return { code, slotCount, slotOf: (part) => kept.get(Math.abs(part)) ?? -1, constants, cost };
}

/** Places of a last reading that are none: never read; not to be forgotten. */
const UNREAD = -1;
const NEVER = -2;

interface Live {
  readonly isNeeded: Uint8Array;
  /** Where the instruction stands that reads a part last. */
  readonly lastRead: Int32Array;
  /** By level, where the instructions stand that are needed. */
  readonly instructions: readonly [Int32Array, Int32Array, Int32Array];
}

/** Goes through the listing backwards from the outputs. */
function findLive({ words: list, levelOfPart: levels, partCount }: Listing, outputs: readonly Part[]): Live {
  const words = list.array;
  const levelOfPart = levels.array;
  const isNeeded = new Uint8Array(partCount);
  const lastRead = new Int32Array(partCount).fill(UNREAD);
  for (const output of outputs) {
    if (output === NOTHING) continue;
    isNeeded[Math.abs(output)] = 1;
    lastRead[Math.abs(output)] = NEVER;
  }
  const backwards = [new IntList(), new IntList(), new IntList()] as const;
  for (let at = list.length - INSTRUCTION_WORDS; at >= 0; at -= INSTRUCTION_WORDS) {
    if (isNeeded[words[at + 1] ?? 0] === 0 && isNeeded[words[at + 2] ?? 0] === 0) continue;
    const level = levelOfPart[words[at + 1] ?? 0] ?? 0;
    backwards[level]?.push(at);
    const operands = OPERANDS[words[at] ?? 0] ?? 0;
    for (let operand = 0; operand < operands; operand++) {
      const part = words[at + 3 + operand] ?? 0;
      isNeeded[part] = 1;
      // What a later level reads is needed again each time that one runs.
      if (levelOfPart[part] !== level) lastRead[part] = NEVER;
      else if (lastRead[part] === UNREAD) lastRead[part] = at;
    }
  }
  const [constant, block, varying] = backwards;
  const instructions = [constant.toArray().reverse(), block.toArray().reverse(), varying.toArray().reverse()] as const;
  return { isNeeded, lastRead, instructions };
}
