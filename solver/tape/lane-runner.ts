import { sameFrequency } from '../elements/source-value';
import type { Law } from '../elements/law';
import type { ScalarInput } from './network-inputs';
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

/**
 * An output of this size, whatever its unit, is more often what a pivot that cancelled exactly has left than what a network
 * does: the next order, or the exact engine, looks at it again.
 */
const IMPLAUSIBLE = 1e12;

/** A block's lanes: fewer where rows of so many would take more than some megabytes. */
const MOST_LANES = 72;
const MOST_NUMBERS = 1_500_000;

const WATCHED = [LEVEL.constant, LEVEL.block, LEVEL.varying];

/** The tape may do better in another order; see `SweepProgram`. */
export const WEAK = 1;
/** Not to be had from a tape. */
export const OUTSIDE = 2;

/** Where an output goes: one number a frequency. */
export interface OutputArrays {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** How many lanes to run a program on for so many points: few blocks, and little of the last one idle. */
export function lanesFor(slotCount: number, points: number): number {
  const fitting = Math.max(LANE_STEP, Math.min(MOST_LANES, Math.floor(MOST_NUMBERS / slotCount / LANE_STEP) * LANE_STEP));
  const blocks = Math.max(1, Math.ceil(points / fitting));
  return Math.max(LANE_STEP, Math.ceil(points / blocks / LANE_STEP) * LANE_STEP);
}

/** Element values that differ from sample to sample. */
export interface Samples {
  readonly count: number;
  /** The numbers of an input over the samples; undefined for one that is the same in all. */
  readonly numbersOf: (input: ScalarInput) => ArrayLike<number> | undefined;
}

/** A point of each frequency, or of each frequency and the sample that stands beside it. */
export interface Points {
  readonly frequencies: Float64Array;
  readonly samples?: Samples;
  readonly sampleOf?: Int32Array;
}

interface Varied {
  readonly start: number;
  readonly numbers: ArrayLike<number>;
}

/** Fills in what is the same for all points, and answers what is not. */
function fillScalars(
  { inputs }: SweepTape,
  laws: readonly Law[],
  samples: Samples | undefined,
  memory: Float64Array,
  lanes: number,
  at: (part: Part) => number,
): Varied[] {
  const varied: Varied[] = [];
  for (const input of inputs.scalars) {
    const start = at(input.part);
    const law = laws[input.row];
    if (start < 0 || law === undefined) continue;
    const numbers = samples?.numbersOf(input);
    if (numbers === undefined) memory.fill(input.read(law), start, start + lanes);
    else varied.push({ start, numbers });
  }
  return varied;
}

/**
 * Runs a tape over points, a block of lanes at a time, and writes each output's values. Marks the points at which it is
 * not to be trusted: `WEAK` for a pivot that has cancelled or a value that is not finite, `OUTSIDE` for an element value
 * out of range or not known, a source of just that frequency, 0 Hz.
 */
export function runOverPoints(
  tape: SweepTape,
  laws: readonly Law[],
  { frequencies, samples, sampleOf }: Points,
  arrays: readonly OutputArrays[],
  doubtful: Uint8Array,
  machine: TapeMachine = tapeMachine(),
): void {
  const { program, inputs, values } = tape;
  const count = frequencies.length;
  const lanes = lanesFor(program.slotCount, count);
  const memory = machine.load(program, lanes);
  const at = (part: Part): number => program.slotOf(part) * lanes;
  const varied = fillScalars(tape, laws, samples, memory, lanes, at);
  const functions = inputs.functions.map(({ value, row, read }) => {
    const law = laws[row];
    return { re: at(value.re), im: at(value.im), table: law === undefined ? undefined : read(law) };
  });
  machine.run(LEVEL.constant);
  machine.run(LEVEL.block);
  const omega = at(inputs.omega);
  const [constantWatch = 0, blockWatch = 0, watch = 0] = WATCHED.map((level) => watchSlot(level) * lanes);
  const outputs = values.map((value) => readerOf(value, at));
  const limit = WATCH_LIMIT - (memory[constantWatch] ?? 0);
  for (let start = 0; start < count; start += lanes) {
    const used = Math.min(lanes, count - start);
    if (omega >= 0) fillOmega(memory, omega, lanes, frequencies, start, used);
    if (varied.length > 0 && sampleOf !== undefined) {
      for (const { start: from, numbers } of varied) {
        for (let lane = 0; lane < lanes; lane++) {
          memory[from + lane] = numbers[sampleOf[start + Math.min(lane, used - 1)] ?? 0] ?? 0;
        }
      }
      machine.run(LEVEL.block);
    }
    for (const { re, im, table } of functions) {
      for (let lane = 0; lane < lanes; lane++) {
        const value = table?.(frequencies[start + Math.min(lane, used - 1)] ?? 0);
        if (value === undefined && lane < used) doubtful[start + lane] = OUTSIDE;
        if (re >= 0) memory[re + lane] = value?.[0] ?? 1;
        if (im >= 0) memory[im + lane] = value?.[1] ?? 1;
      }
    }
    machine.run(LEVEL.varying);
    markBothWatched(memory, watch, blockWatch, limit, used, doubtful, start);
    for (let place = 0; place < outputs.length; place++) {
      const output = outputs[place];
      const array = arrays[place];
      if (output === undefined || array === undefined) continue;
      copyLanes(memory, output.re, output.signRe, array.re, start, used, doubtful);
      copyLanes(memory, output.im, output.signIm, array.im, start, used, doubtful);
    }
  }
  markOutside(laws, frequencies, doubtful);
}

/**
 * Runs a tape over samples of element values, a block of samples at a time, each at all frequencies: what does not depend
 * on the frequency is done once a block. Values and doubts are written at frequency·samples + sample.
 */
export function runOverSamples(
  tape: SweepTape,
  laws: readonly Law[],
  frequencies: Float64Array,
  samples: Samples,
  arrays: readonly OutputArrays[],
  doubtful: Uint8Array,
  machine: TapeMachine = tapeMachine(),
): void {
  const { program, inputs, values } = tape;
  const { count } = samples;
  const lanes = lanesFor(program.slotCount, count);
  const memory = machine.load(program, lanes);
  const at = (part: Part): number => program.slotOf(part) * lanes;
  const own = ownFrequencies(laws);
  const varied = fillScalars(tape, laws, samples, memory, lanes, at);
  const functions = inputs.functions.map(({ value, row, read }) => {
    const law = laws[row];
    return { re: at(value.re), im: at(value.im), table: law === undefined ? undefined : read(law) };
  });
  machine.run(LEVEL.constant);
  const omega = at(inputs.omega);
  const [constantWatch = 0, blockWatch = 0, watch = 0] = WATCHED.map((level) => watchSlot(level) * lanes);
  const outputs = values.map((value) => readerOf(value, at));
  const limit = WATCH_LIMIT - (memory[constantWatch] ?? 0);
  for (let first = 0; first < count; first += lanes) {
    const used = Math.min(lanes, count - first);
    for (const { start, numbers } of varied) {
      for (let lane = 0; lane < lanes; lane++) memory[start + lane] = numbers[first + Math.min(lane, used - 1)] ?? 0;
    }
    machine.run(LEVEL.block);
    for (const [place, frequency] of frequencies.entries()) {
      if (omega >= 0) memory.fill(2 * Math.PI * frequency, omega, omega + lanes);
      let isKnown = frequency > 0 && !own.some((live) => sameFrequency(live, frequency));
      for (const { re, im, table } of functions) {
        const value = table?.(frequency);
        isKnown &&= value !== undefined;
        if (re >= 0) memory.fill(value?.[0] ?? 1, re, re + lanes);
        if (im >= 0) memory.fill(value?.[1] ?? 1, im, im + lanes);
      }
      machine.run(LEVEL.varying);
      const start = place * count + first;
      if (isKnown) markBothWatched(memory, watch, blockWatch, limit, used, doubtful, start);
      else doubtful.fill(OUTSIDE, start, start + used);
      for (let index = 0; index < outputs.length; index++) {
        const output = outputs[index];
        const array = arrays[index];
        if (output === undefined || array === undefined) continue;
        copyLanes(memory, output.re, output.signRe, array.re, start, used, doubtful);
        copyLanes(memory, output.im, output.signIm, array.im, start, used, doubtful);
      }
    }
  }
}

/** Lanes beyond the last frequency do its work again. */
function fillOmega(memory: Float64Array, omega: number, lanes: number, frequencies: Float64Array, start: number, used: number): void {
  for (let lane = 0; lane < used; lane++) memory[omega + lane] = 2 * Math.PI * (frequencies[start + lane] ?? 0);
  for (let lane = used; lane < lanes; lane++) memory[omega + lane] = memory[omega + used - 1] ?? 0;
}

/** Marks the frequencies at which an admittance is out of range, at which a source of its own delivers, and 0 Hz. */
function markOutside(laws: readonly Law[], frequencies: Float64Array, doubtful: Uint8Array): void {
  const { low, high } = trustedRange(laws);
  const own = ownFrequencies(laws);
  for (let place = 0; place < frequencies.length; place++) {
    const frequency = frequencies[place] ?? 0;
    if (!(frequency >= low && frequency <= high)) doubtful[place] = OUTSIDE;
  }
  if (own.length === 0) return;
  for (const [place, frequency] of frequencies.entries()) {
    if (own.some((live) => sameFrequency(live, frequency))) doubtful[place] = OUTSIDE;
  }
}

/** Watches are not negative, so while their sum is below the limit each is, and all are numbers; else each is looked at. */
// prettier-ignore
function markWatched(
  memory: Float64Array, watch: number, limit: number, used: number, doubtful: Uint8Array, start: number,
): void {
  let [even, odd] = [memory[watch] ?? 0, 0];
  // With an odd number of lanes the first is taken twice.
  for (let lane = used & 1; lane < used; lane += 2) {
    even += memory[watch + lane] ?? 0;
    odd += memory[watch + lane + 1] ?? 0;
  }
  if (even + odd < limit) return;
  for (let lane = 0; lane < used; lane++) if (!((memory[watch + lane] ?? 0) < limit)) doubtful[start + lane] = WEAK;
}

/** The same for a watch and the one of an earlier level, lane by lane. */
// prettier-ignore
function markBothWatched(
  memory: Float64Array, watch: number, earlier: number, limit: number, used: number, doubtful: Uint8Array, start: number,
): void {
  markWatched(memory, watch, limit / 2, used, doubtful, start);
  markWatched(memory, earlier, limit / 2, used, doubtful, start);
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
  // A sum of squares is beyond the limit as soon as one of them is, and no number where one is none; two sums need not
  // wait for each other.
  let [even, odd] = [0, 0];
  const pairs = used & ~1;
  for (let lane = 0; lane < pairs; lane += 2) {
    const one = sign * (memory[from + lane] ?? 0);
    const other = sign * (memory[from + lane + 1] ?? 0);
    into[start + lane] = one;
    into[start + lane + 1] = other;
    even += one * one;
    odd += other * other;
  }
  if (pairs < used) {
    const last = sign * (memory[from + pairs] ?? 0);
    into[start + pairs] = last;
    even += last * last;
  }
  if (even + odd < IMPLAUSIBLE * IMPLAUSIBLE) return;
  for (let lane = 0; lane < used; lane++) {
    if (!(Math.abs(memory[from + lane] ?? 0) < IMPLAUSIBLE)) doubtful[start + lane] = WEAK;
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
