import type { Element, ElementList } from '../elements/element-list';
import { lawsOf } from '../elements/registry';
import { validateElementList } from '../elements/validate-element-list';
import { OUTSIDE, trustedRange } from '../tape/lane-runner';
import type { ScalarInput } from '../tape/network-inputs';
import { LEVEL } from '../tape/tape-builder';
import { faultOfFrequency } from './frequency';
import type { Network } from './network';
import { toNetwork } from './network';
import type { Problem } from './problem';
import { invalid, isProblem, problem } from './problem';
import { ExactSweep } from './sweep-exact';
import type { Output, SweepOutput } from './sweep-output';
import { resolveOutput } from './sweep-output';
import { SweepProgram } from './sweep-program';

export interface SweepSamplesOptions {
  /** The operating frequencies, hertz, in any order. */
  readonly frequencies: ArrayLike<number>;
  readonly outputs: readonly SweepOutput[];
  /**
   * For each element that varies, by its id, its value in every sample: of a resistor, capacitor or inductor in ohms,
   * farads or henries, of a source its rms value, of a controlled source its gain, of a transformer its ratio. All of
   * one length.
   */
  readonly values: Readonly<Record<string, ArrayLike<number>>>;
  /** A result of as many outputs, frequencies and samples that is no longer wanted: its arrays are written over and given back. */
  readonly reuse?: SampledSweep;
}

/** One output over frequencies and samples; the value of a sample at a frequency's place is at place·samples + sample. */
export interface SamplesTrace {
  readonly output: SweepOutput;
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly determined: Uint8Array;
}

export interface SampledSweep {
  readonly ok: true;
  readonly frequencies: Float64Array;
  readonly sampleCount: number;
  readonly traces: readonly SamplesTrace[];
}

/**
 * A sweep for each of many samples of element values, as `sweep` gives it for the list with that sample's values.
 * Work that does not depend on the frequency is done once for all. Nothing is said of why a value is not determined;
 * ask `sweep` with that sample's values.
 */
export function sweepSamples(list: ElementList, options: SweepSamplesOptions): SampledSweep | Problem {
  const checked = validateElementList(list);
  if (!checked.ok) return problem('invalid', checked.elements, [], checked.message);
  const frequencies = Float64Array.from(options.frequencies);
  for (const frequency of frequencies) {
    const fault = faultOfFrequency(frequency);
    if (fault !== undefined) return problem('invalid', [], [], fault);
  }
  const network = toNetwork(checked.list);
  const outputs: Output[] = [];
  for (const output of options.outputs) {
    const found = resolveOutput(network, output);
    if (isProblem(found)) return found;
    outputs.push(found);
  }
  const fault = faultOfValues(network, options.values);
  if (fault !== undefined) return invalid(fault);
  const varied = new Map(Object.entries(options.values));
  const sampleCount = [...varied.values()][0]?.length ?? 1;
  const size = frequencies.length * sampleCount;
  const traces = roomFor(options.outputs, size, options.reuse);
  const doubtful = new Uint8Array(size);
  const idOf = (row: number): string => network.elements[network.elementOf[row] ?? 0]?.id ?? '';
  const program = new SweepProgram(network, outputs, (row) => (varied.has(idOf(row)) ? LEVEL.block : LEVEL.constant));
  const numbersOf = (input: ScalarInput): ArrayLike<number> | undefined => {
    const values = varied.get(idOf(input.row));
    return values === undefined ? undefined : numbersOfInput(network, input, values);
  };
  program.runSamples(network.laws, frequencies, { count: sampleCount, numbersOf }, traces, doubtful);
  doubtOutOfRange(network, varied, frequencies, sampleCount, doubtful);
  for (const [sample, places] of doubtsBySample(doubtful, sampleCount)) {
    const exact = new ExactSweep(sampleOf(checked.list, varied, sample));
    for (const output of outputs) exact.prepare(output);
    for (const place of places) {
      const at = place * sampleCount + sample;
      exact.solveAt(frequencies[place] ?? 0);
      for (const [index, { output: named, re, im, determined }] of traces.entries()) {
        const output = outputs[index];
        const found = output === undefined ? undefined : exact.read(output, named);
        re[at] = found?.re ?? 0;
        im[at] = found?.im ?? 0;
        determined[at] = found === undefined ? 0 : 1;
      }
    }
  }
  return { ok: true, frequencies, sampleCount, traces };
}

/** The places of the frequencies that are in doubt, for each sample that has any. */
function doubtsBySample(doubtful: Uint8Array, sampleCount: number): Map<number, number[]> {
  const doubts = new Map<number, number[]>();
  for (let at = 0; at < doubtful.length; at++) {
    if (doubtful[at] === 0) continue;
    const sample = at % sampleCount;
    const places = doubts.get(sample);
    if (places === undefined) doubts.set(sample, [Math.floor(at / sampleCount)]);
    else places.push(Math.floor(at / sampleCount));
  }
  return doubts;
}

function roomFor(outputs: readonly SweepOutput[], size: number, reuse: SampledSweep | undefined): readonly SamplesTrace[] {
  return outputs.map((output, place) => {
    const old = reuse?.traces[place];
    if (old === undefined || old.re.length !== size) {
      return { output, re: new Float64Array(size), im: new Float64Array(size), determined: new Uint8Array(size).fill(1) };
    }
    const { re, im, determined } = old;
    // A part that is nothing at all frequencies is not written.
    re.fill(0);
    im.fill(0);
    determined.fill(1);
    return { output, re, im, determined };
  });
}

/** The element with its value, the one that its kind is known by; undefined for a kind that has no one value. */
export function withValue(element: Element, value: number): Element | undefined {
  switch (element.kind) {
    case 'resistor':
      return { ...element, resistance: value };
    case 'capacitor':
      return { ...element, capacitance: value };
    case 'inductor':
      return { ...element, inductance: value };
    case 'voltageSource':
    case 'currentSource':
      return { ...element, value: { ...element.value, rms: value } };
    case 'idealTransformer':
      return { ...element, ratio: value };
    case 'voltageControlledVoltageSource':
    case 'currentControlledCurrentSource':
      return { ...element, gain: value };
    case 'voltageControlledCurrentSource':
      return { ...element, transconductance: value };
    case 'currentControlledVoltageSource':
      return { ...element, transresistance: value };
    case 'impedance':
    case 'coupledInductors':
    case 'operationalAmplifier':
    case 'twoPort':
    case 'line':
      return undefined;
  }
}

function sampleOf(list: ElementList, varied: ReadonlyMap<string, ArrayLike<number>>, sample: number): ElementList {
  const elements = list.elements.map((element) => {
    const values = varied.get(element.id);
    return values === undefined ? element : (withValue(element, values[sample] ?? NaN) ?? element);
  });
  return { version: 1, elements };
}

/** What an input reads in each sample. */
function numbersOfInput(network: Network, { row, read }: ScalarInput, values: ArrayLike<number>): ArrayLike<number> {
  const element = network.elements[network.elementOf[row] ?? 0];
  if (element === undefined) return values;
  // Their laws hold the value itself.
  if (element.kind === 'resistor' || element.kind === 'capacitor' || element.kind === 'inductor') return values;
  const port = row - (network.rowStart[network.elementOf[row] ?? 0] ?? 0);
  return Float64Array.from(values, (value) => {
    const law = lawsOf(withValue(element, value) ?? element)[port];
    return law === undefined ? NaN : read(law);
  });
}

/** A value of zero makes a short or an open circuit of an element, which is another tape; so does one out of range. */
function doubtOutOfRange(
  network: Network,
  varied: ReadonlyMap<string, ArrayLike<number>>,
  frequencies: Float64Array,
  sampleCount: number,
  doubtful: Uint8Array,
): void {
  const mark = (sample: number, low: number, high: number): void => {
    for (const [place, frequency] of frequencies.entries()) {
      if (!(frequency >= low && frequency <= high)) doubtful[place * sampleCount + sample] = OUTSIDE;
    }
  };
  const common = trustedRange(network.laws.filter((_, row) => !varied.has(network.elements[network.elementOf[row] ?? 0]?.id ?? '')));
  if (frequencies.some((frequency) => !(frequency >= common.low && frequency <= common.high))) {
    for (let sample = 0; sample < sampleCount; sample++) mark(sample, common.low, common.high);
  }
  for (const [id, values] of varied) {
    const element = network.elements[network.elementIndex.get(id) ?? -1];
    if (element === undefined) continue;
    for (let sample = 0; sample < sampleCount; sample++) {
      const value = values[sample] ?? NaN;
      if (Math.abs(value) > 1e-30 && Math.abs(value) < 1e30) continue;
      const laws = lawsOf(withValue(element, value) ?? element);
      const { low, high } = trustedRange(laws);
      if (value === 0) mark(sample, Infinity, 0);
      else mark(sample, low, high);
    }
  }
}

function faultOfValues({ elements, elementIndex }: Network, values: Readonly<Record<string, ArrayLike<number>>>): string | undefined {
  let length: number | undefined;
  for (const [id, numbers] of Object.entries(values)) {
    const element = elements[elementIndex.get(id) ?? -1];
    if (element === undefined) return `There is no element ${id} in the element list.`;
    if (withValue(element, 1) === undefined) return `Element ${id} has no single value to vary.`;
    length ??= numbers.length;
    if (numbers.length !== length) return `The values of ${id} are ${numbers.length}, those of another element ${length}; give one for each sample.`;
    for (let sample = 0; sample < numbers.length; sample++) {
      if (!Number.isFinite(numbers[sample])) return `The value of ${id} in sample ${sample + 1} must be a finite number.`;
    }
  }
  return undefined;
}
