import type { Law } from '../elements/law';
import { OUTSIDE, runOverPoints } from './lane-runner';
import type { NetworkInputs } from './network-inputs';
import type { Value } from './tape-builder';
import { compileTape } from './tape-program';

/** Values of a tape that is being written, in numbers, at frequencies; those at which something is not known are left out. */
export function sampledValues(
  inputs: NetworkInputs,
  laws: readonly Law[],
  values: readonly Value[],
  frequencies: readonly number[],
): readonly { readonly re: Float64Array; readonly im: Float64Array }[] {
  const program = compileTape(
    inputs.builder,
    values.flatMap(({ re, im }) => [re, im]),
  );
  const count = frequencies.length;
  const arrays = values.map(() => ({ re: new Float64Array(count), im: new Float64Array(count) }));
  const doubtful = new Uint8Array(count);
  runOverPoints({ program, inputs, values }, laws, { frequencies: Float64Array.from(frequencies) }, arrays, doubtful);
  const isKnown = (_: number, place: number): boolean => doubtful[place] !== OUTSIDE;
  return arrays.map(({ re, im }) => ({ re: re.filter(isKnown), im: im.filter(isKnown) }));
}
