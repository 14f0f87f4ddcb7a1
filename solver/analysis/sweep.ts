import type { ElementList } from '../elements/element-list';
import { validateElementList } from '../elements/validate-element-list';
import { Engine } from './engine';
import type { Problem } from './problem';
import { problem } from './problem';
import { faultOfFrequency } from './steady-state';

/** What is recorded at each frequency: the voltage of a node, or the current or voltage of an element. */
export type SweepOutput =
  | { readonly quantity: 'voltage'; readonly node: string }
  | { readonly quantity: 'elementVoltage'; readonly element: string }
  | { readonly quantity: 'current'; readonly element: string };

export interface SweepOptions {
  /** The operating frequencies, hertz, in any order. */
  readonly frequencies: ArrayLike<number>;
  readonly outputs: readonly SweepOutput[];
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
 */
export function sweep(list: ElementList, options: SweepOptions): Sweep | Problem {
  const checked = validateElementList(list);
  if (!checked.ok) return problem('invalid', [], [], checked.message);
  const frequencies = Float64Array.from(options.frequencies);
  for (const frequency of frequencies) {
    const fault = faultOfFrequency(frequency);
    if (fault !== undefined) return problem('invalid', [], [], fault);
  }
  const engine = new Engine(checked.list);
  const channels: Channel[] = [];
  for (const output of options.outputs) {
    const channel = channelOf(engine, output, frequencies.length);
    if ('ok' in channel) return channel;
    channels.push(channel);
  }
  const problems = new Map<string, { problem: Problem; at: number[] }>();
  for (const [place, frequency] of frequencies.entries()) {
    for (const found of engine.solveAt(frequency)) note(problems, found, place);
    for (const channel of channels) record(channel, place);
  }
  const [worst] = problems.values();
  const determined = channels.some(({ trace }) => trace.determined.includes(1));
  if (worst !== undefined && channels.length > 0 && !determined) return worst.problem;
  return { ok: true, frequencies, traces: channels.map(({ trace }) => trace), problems: [...problems.values()] };
}

interface Channel {
  readonly trace: SweepTrace;
  /** The readings that it is taken from, and the place in them. */
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly known: Uint8Array;
  readonly at: number;
}

function channelOf({ network, readings }: Engine, output: SweepOutput, length: number): Channel | Problem {
  const trace: SweepTrace = {
    output,
    re: new Float64Array(length),
    im: new Float64Array(length),
    determined: new Uint8Array(length),
  };
  switch (output.quantity) {
    case 'voltage': {
      const at = network.nodeIndex.get(output.node);
      if (at === undefined) return problem('invalid', [], [], `There is no node ${output.node} in the element list.`);
      return { trace, re: readings.vRe, im: readings.vIm, known: readings.vKnown, at };
    }
    case 'elementVoltage': {
      const at = network.elementIndex.get(output.element);
      if (at === undefined) return noElement(output.element);
      return { trace, re: readings.dRe, im: readings.dIm, known: readings.dKnown, at };
    }
    case 'current': {
      const at = network.elementIndex.get(output.element);
      if (at === undefined) return noElement(output.element);
      return { trace, re: readings.iRe, im: readings.iIm, known: readings.iKnown, at };
    }
  }
}

function noElement(id: string): Problem {
  return problem('invalid', [], [], `There is no element ${id} in the element list.`);
}

function record({ trace, re, im, known, at }: Channel, place: number): void {
  if (known[at] !== 1) return;
  trace.re[place] = re[at] ?? 0;
  trace.im[place] = im[at] ?? 0;
  trace.determined[place] = 1;
}

/** The same problem at several frequencies is one, with its places; a resonance names its frequency and stays apart. */
function note(problems: Map<string, { problem: Problem; at: number[] }>, found: Problem, place: number): void {
  const known = problems.get(found.message);
  if (known === undefined) problems.set(found.message, { problem: found, at: [place] });
  else known.at.push(place);
}
