import type { ElementList } from '../elements/element-list';
import type { Law } from '../elements/law';
import { validateElementList } from '../elements/validate-element-list';
import type { AdaptiveOptions } from './adaptive-frequencies';
import { adaptiveFrequencies } from './adaptive-frequencies';
import { faultOfFrequency } from './frequency';
import type { Network } from './network';
import { toNetwork } from './network';
import type { Problem } from './problem';
import { isProblem, problem } from './problem';
import { ExactSweep } from './sweep-exact';
import type { Output, SweepOutput } from './sweep-output';
import { resolveOutput } from './sweep-output';
import { SweepProgram } from './sweep-program';

export interface SweepOptions {
  /** The operating frequencies, hertz, in any order. */
  readonly frequencies: ArrayLike<number>;
  readonly outputs: readonly SweepOutput[];
  /** Adds frequencies where the outputs need them, so that no narrow resonance is missed; the result is rising then. */
  readonly adaptive?: AdaptiveOptions;
}

/** One output over the frequencies, rms phasors. Where `determined` is 0 there is no value, and `re` and `im` hold 0. */
export interface SweepTrace {
  readonly output: SweepOutput;
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly determined: Uint8Array;
}

/** A problem, and the places of the frequencies at which it stands. */
export interface SweepProblem {
  readonly problem: Problem;
  readonly at: readonly number[];
}

export interface Sweep {
  readonly ok: true;
  readonly frequencies: Float64Array;
  /** One for each output asked for, in that order. */
  readonly traces: readonly SweepTrace[];
  readonly problems: readonly SweepProblem[];
}

/**
 * The steady state at many frequencies, as `solve` gives it at each, with the network analysed once. A source with a
 * frequency of its own is dead at all others. A bare `Problem` where the request is faulty, or where nothing that was
 * asked for is determined at any frequency.
 *
 * Method: the elimination of the network's equations is compiled to a straight-line program and run over blocks of
 * frequencies (see `compileSweep`); a frequency at which a pivot cancels, 0 Hz, and a network without a unique solution
 * are done as `solve` does them. Cost: for what a person draws, far below a microsecond a frequency and unknown.
 */
export function sweep(list: ElementList, options: SweepOptions): Sweep | Problem {
  const prepared = prepareSweep(list, options.outputs);
  return prepared.ok ? prepared.run(options.frequencies, options) : prepared;
}

/** A network analysed for outputs, to be run again and again. */
export interface PreparedSweep {
  readonly ok: true;
  /** Runs over frequencies, hertz. */
  run(frequencies: ArrayLike<number>, options?: RunOptions): Sweep | Problem;
}

export interface RunOptions {
  /**
   * Other values of the same elements between the same nodes. Nothing is analysed again unless a value comes to be zero,
   * or the phase of a source to be a whole number of quarter turns.
   */
  readonly list?: ElementList;
  /** A sweep of this handle over as many frequencies that is no longer wanted: its arrays are written over and given back. */
  readonly reuse?: Sweep;
  /** As in `SweepOptions`. */
  readonly adaptive?: AdaptiveOptions;
}

/** Analyses a network for outputs; a `Problem` where the request is faulty. */
export function prepareSweep(list: ElementList, outputs: readonly SweepOutput[]): PreparedSweep | Problem {
  const checked = validateElementList(list);
  if (!checked.ok) return problem('invalid', checked.elements, [], checked.message);
  const network = toNetwork(checked.list);
  const resolved: Output[] = [];
  for (const output of outputs) {
    const found = resolveOutput(network, output);
    if (isProblem(found)) return found;
    resolved.push(found);
  }
  let program = new SweepProgram(network, resolved);
  return {
    ok: true,
    run(given, { list: changed, reuse, adaptive } = {}) {
      let current = checked.list;
      let { laws } = network;
      if (changed !== undefined) {
        const rechecked = validateElementList(changed);
        if (!rechecked.ok) return problem('invalid', rechecked.elements, [], rechecked.message);
        current = rechecked.list;
        const other = toNetwork(current);
        if (!isSameGraph(network, other)) {
          return problem('invalid', [], [], 'The list has other elements or nodes than the one that was prepared; prepare it anew.');
        }
        ({ laws } = other);
        if (!program.fits(laws)) program = new SweepProgram(other, resolved);
      }
      const runOver = (frequencies: ArrayLike<number>, over?: Sweep): Sweep | Problem =>
        runPrepared(current, laws, program, resolved, outputs, frequencies, over);
      if (adaptive === undefined) return runOver(given, reuse);
      const plain = runOver(given);
      if (!plain.ok) return plain;
      const evaluate = (frequencies: Float64Array): readonly SweepTrace[] | undefined => {
        const found = runOver(frequencies);
        return found.ok ? found.traces : undefined;
      };
      return runOver(adaptiveFrequencies(given, evaluate, adaptive), reuse);
    },
  };
}

function isSameGraph(one: Network, other: Network): boolean {
  return (
    one.rowCount === other.rowCount &&
    one.elements.every(({ id, kind }, place) => other.elements[place]?.id === id && other.elements[place]?.kind === kind) &&
    one.nodeNames.every((name, node) => other.nodeNames[node] === name) &&
    one.first.every((node, row) => other.first[row] === node) &&
    one.second.every((node, row) => other.second[row] === node)
  );
}

function runPrepared(
  list: ElementList,
  laws: readonly Law[],
  program: SweepProgram,
  outputs: readonly Output[],
  asked: readonly SweepOutput[],
  given: ArrayLike<number>,
  reuse: Sweep | undefined,
): Sweep | Problem {
  const { frequencies, traces } = roomIn(reuse, given, asked) ?? roomFor(given, asked);
  for (let place = 0; place < frequencies.length; place++) {
    const fault = faultOfFrequency(frequencies[place]);
    if (fault !== undefined) return problem('invalid', [], [], fault);
  }
  const count = frequencies.length;
  const doubtful = program.doubtsFor(count);

  const problems = new Map<string, { problem: Problem; at: number[] }>();
  if (program.run(laws, frequencies, traces, doubtful)) {
    const exact = new ExactSweep(list);
    for (const output of outputs) exact.prepare(output);
    for (const [place, frequency] of frequencies.entries()) {
      if (doubtful[place] === 0) continue;
      for (const found of exact.solveAt(frequency)) note(problems, found, place);
      for (const [index, { output: named, re, im, determined }] of traces.entries()) {
        const output = outputs[index];
        const found = output === undefined ? undefined : exact.read(output, named);
        re[place] = found?.re ?? 0;
        im[place] = found?.im ?? 0;
        determined[place] = found === undefined ? 0 : 1;
      }
    }
  }
  const [worst] = problems.values();
  const isDetermined = traces.some(({ determined }) => determined.includes(1));
  if (worst !== undefined && traces.length > 0 && !isDetermined) return worst.problem;
  return { ok: true, frequencies, traces, problems: [...problems.values()] };
}

/** The arrays of a sweep that is no longer wanted, if they are of the right size. */
function roomIn(
  reuse: Sweep | undefined,
  given: ArrayLike<number>,
  asked: readonly SweepOutput[],
): Pick<Sweep, 'frequencies' | 'traces'> | undefined {
  if (reuse === undefined || reuse.frequencies.length !== given.length) return undefined;
  if (reuse.traces.length !== asked.length || reuse.traces.some(({ output }, place) => output !== asked[place])) return undefined;
  reuse.frequencies.set(given);
  for (const { re, im, determined } of reuse.traces) {
    // A part that is nothing at all frequencies is not written.
    re.fill(0);
    im.fill(0);
    determined.fill(1);
  }
  return reuse;
}

/** The arrays of a sweep, in one piece of memory: to ask for many takes longer than to fill them. */
function roomFor(given: ArrayLike<number>, asked: readonly SweepOutput[]): { frequencies: Float64Array; traces: SweepTrace[] } {
  const count = given.length;
  const numbers = new Float64Array(count * (1 + 2 * asked.length));
  const flags = new Uint8Array(count * asked.length).fill(1);
  numbers.set(given);
  const traces = asked.map((output, place): SweepTrace => {
    const start = count * (1 + 2 * place);
    return {
      output,
      re: numbers.subarray(start, start + count),
      im: numbers.subarray(start + count, start + 2 * count),
      determined: flags.subarray(count * place, count * (place + 1)),
    };
  });
  return { frequencies: numbers.subarray(0, count), traces };
}

/** The same problem at several frequencies is one, with its places; a resonance names its frequency and stays apart. */
function note(problems: Map<string, { problem: Problem; at: number[] }>, found: Problem, place: number): void {
  const known = problems.get(found.message);
  if (known === undefined) problems.set(found.message, { problem: found, at: [place] });
  else known.at.push(place);
}
