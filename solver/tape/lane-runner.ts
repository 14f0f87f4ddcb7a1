import { sameFrequency } from '../elements/source-value';
import type { Law } from '../elements/law';
import type { Part, Value } from './tape-builder';
import { LEVEL, NOTHING } from './tape-builder';
import type { TapeMachine } from './tape-machine';
import { LANE_STEP, tapeMachine } from './tape-machine';
import { watchSlot } from './tape-program';
import type { SweepTape } from './sweep-tape';

/** A pivot of less than a twentieth or so of its terms: the square of the square of what the terms are to it. */
const WATCH_LIMIT = 1.6e5;

/** Admittances within these bounds leave room for every product of the elimination. */
const SMALLEST = 1e-75;
const LARGEST = 1e75;

/** A block's lanes: so many that its work stays in cache. */
const MOST_LANES = 64;
const CACHED_NUMBERS = 20_000;

/** Where an output goes: one number a frequency. */
export interface OutputArrays {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** The number of lanes at which a program's rows fit the cache. */
export function lanesFor(slotCount: number, most = MOST_LANES): number {
  const fitting = Math.floor(CACHED_NUMBERS / slotCount / LANE_STEP) * LANE_STEP;
  return Math.max(LANE_STEP, Math.min(most, fitting));
}

/**
 * Runs a tape over frequencies, a block of lanes at a time, and writes each output's values. Marks the frequencies at
 * which it is not to be trusted: a pivot that has cancelled, a value that is not finite, an element value out of range
 * or not known, a source of just that frequency, 0 Hz.
 */
export function runOverFrequencies(
  { program, inputs, values }: SweepTape,
  laws: readonly Law[],
  frequencies: Float64Array,
  arrays: readonly OutputArrays[],
  doubtful: Uint8Array,
  machine: TapeMachine = tapeMachine(),
): void {
  const count = frequencies.length;
  const range = trustedRange(laws);
  const own = ownFrequencies(laws);
  const lanes = lanesFor(program.slotCount, Math.max(LANE_STEP, Math.ceil(Math.min(count, MOST_LANES) / LANE_STEP) * LANE_STEP));
  const memory = machine.load(program, lanes);
  const at = (part: Part): number => program.slotOf(part) * lanes;
  for (const { part, row, read } of inputs.scalars) {
    const start = at(part);
    const law = laws[row];
    if (start >= 0 && law !== undefined) memory.fill(read(law), start, start + lanes);
  }
  const functions = inputs.functions.map(({ value, row, read }) => {
    const law = laws[row];
    return { re: at(value.re), im: at(value.im), table: law === undefined ? undefined : read(law) };
  });
  machine.run(LEVEL.constant);
  machine.run(LEVEL.block);
  const omega = at(inputs.omega);
  const watches = [LEVEL.constant, LEVEL.block, LEVEL.varying].map((level) => watchSlot(level) * lanes);
  const outputs = values.map((value) => readerOf(value, at));
  for (let start = 0; start < count; start += lanes) {
    const used = Math.min(lanes, count - start);
    for (let lane = 0; lane < lanes; lane++) {
      // Lanes beyond the last frequency do its work again.
      const frequency = frequencies[start + Math.min(lane, used - 1)] ?? 0;
      if (omega >= 0) memory[omega + lane] = 2 * Math.PI * frequency;
      if (lane < used && !(frequency >= range.low && frequency <= range.high)) doubtful[start + lane] = 1;
      for (const { re, im, table } of functions) {
        const value = table?.(frequency);
        if (value === undefined && lane < used) doubtful[start + lane] = 1;
        if (re >= 0) memory[re + lane] = value?.[0] ?? 1;
        if (im >= 0) memory[im + lane] = value?.[1] ?? 1;
      }
    }
    machine.run(LEVEL.varying);
    for (let lane = 0; lane < used; lane++) {
      const watch =
        (memory[watches[0] ?? 0] ?? 0) + (memory[watches[1] ?? 0] ?? 0) + (memory[(watches[2] ?? 0) + lane] ?? 0);
      if (!(watch < WATCH_LIMIT)) doubtful[start + lane] = 1;
    }
    for (const [place, { re, im, signRe, signIm }] of outputs.entries()) {
      const array = arrays[place];
      if (array === undefined) continue;
      copyLanes(memory, re, signRe, array.re, start, used, doubtful);
      copyLanes(memory, im, signIm, array.im, start, used, doubtful);
    }
  }
  if (own.length === 0) return;
  for (const [place, frequency] of frequencies.entries()) {
    if (own.some((live) => sameFrequency(live, frequency))) doubtful[place] = 1;
  }
}

export interface Reader {
  readonly re: number;
  readonly im: number;
  readonly signRe: number;
  readonly signIm: number;
}

/** Where a value's parts stand in memory, and their signs; a sign of 0 stands for nothing. */
export function readerOf({ re, im }: Value, at: (part: Part) => number): Reader {
  return {
    re: re === NOTHING ? 0 : at(re),
    im: im === NOTHING ? 0 : at(im),
    signRe: Math.sign(re),
    signIm: Math.sign(im),
  };
}

function copyLanes(
  memory: Float64Array,
  from: number,
  sign: number,
  into: Float64Array,
  start: number,
  used: number,
  doubtful: Uint8Array,
): void {
  if (sign === 0) return;
  for (let lane = 0; lane < used; lane++) {
    const value = sign * (memory[from + lane] ?? 0);
    into[start + lane] = value;
    // Not finite: the difference is not a number.
    if (value - value !== 0) doubtful[start + lane] = 1;
  }
}

/** The frequencies, in hertz and above zero, at which every admittance is in range. */
export function trustedRange(laws: readonly Law[]): { readonly low: number; readonly high: number } {
  let low = Number.MIN_VALUE;
  let high = Infinity;
  const between = (from: number, to: number): void => {
    low = Math.max(low, from);
    high = Math.min(high, to);
  };
  for (const law of laws) {
    if (law.law === 'resistance') {
      const g = Math.abs(1 / law.resistance);
      if (!(g >= SMALLEST && g <= LARGEST)) high = -1;
    } else if (law.law === 'capacitance' || law.law === 'inductance') {
      const size = 2 * Math.PI * Math.abs(law.law === 'capacitance' ? law.capacitance : law.inductance);
      between(SMALLEST / size, LARGEST / size);
    }
  }
  return { low, high };
}

function ownFrequencies(laws: readonly Law[]): readonly number[] {
  const own = new Set<number>();
  for (const law of laws) {
    if ((law.law === 'voltage' || law.law === 'current') && law.value.frequency !== null) own.add(law.value.frequency);
  }
  return [...own];
}
